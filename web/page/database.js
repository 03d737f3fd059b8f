// IndexedDB, opened when first needed. What comes from it is as untrusted as a file: on file:// other local pages
// may share it.

const databaseName = 'steelyard.decisions';
const statesStore = 'states'; // key [id, revision]: { id, title, saved_at, revision, text }

const openTimeout = 5000; // milliseconds
const answerTimeout = 15000; // what is asked takes milliseconds; past this the browser will not answer at all

const newerElsewhere =
    'Another page has stored a newer state of this decision. Save this one to a file, then open the other.';

function storeProblem(error) {
    const name = (error && error.name) || 'no reason given';
    if (name === 'QuotaExceededError') {
        return 'The browser has no room left for this page.';
    }
    if (name === 'ConstraintError') {
        return newerElsewhere;
    }
    return 'The browser refuses its store (' + name + (error && error.message ? ': ' + error.message : '') + ').';
}

function makeDatabase() {
    let connection = null;
    let waiting = []; // who waits for it to open; not empty while it does

    function drop(closed) {
        if (connection === closed) {
            connection = null;
        }
    }

    function open() {
        let settled = false;
        let timer = 0;
        function settle(opened, problem) {
            if (settled) {
                if (opened) {
                    opened.close(); // too late: whoever waited has been told
                }
                return;
            }
            settled = true;
            clearTimeout(timer);
            connection = opened;
            const all = waiting;
            waiting = [];
            all.forEach(({ use, failed }) => (opened ? use(opened) : failed(problem)));
        }
        let request;
        try {
            request = indexedDB.open(databaseName, 1);
        } catch (error) {
            settle(null, storeProblem(error));
            return;
        }
        timer = setTimeout(() => settle(null, 'The browser does not open its store.'), openTimeout);
        request.onupgradeneeded = () => {
            request.result.createObjectStore(statesStore, { keyPath: ['id', 'revision'] });
        };
        request.onblocked = () => settle(null, 'Another page keeps the browser’s store open in an older form. Close it.');
        request.onerror = (event) => {
            event.preventDefault();
            settle(null, storeProblem(request.error));
        };
        request.onsuccess = () => {
            const opened = request.result;
            opened.onversionchange = () => {
                opened.close();
                drop(opened);
            };
            opened.onclose = () => drop(opened);
            settle(opened, '');
        };
    }

    // Uses the connection at once where it is open: a page that is going away has no later.
    function withConnection(use, failed) {
        if (connection) {
            use(connection);
            return;
        }
        waiting.push({ use, failed });
        if (waiting.length === 1) {
            open();
        }
    }

    // Runs `body(states, ask, complain)` in one transaction: `ask(request, answered)` watches over a request,
    // `complain` sets a problem. Then exactly one call of `done(problem)`.
    function transact(mode, body, done) {
        run(true);

        function run(mayReopen) {
            withConnection((opened) => {
                let transaction;
                try {
                    transaction = opened.transaction(statesStore, mode, { durability: 'strict' });
                } catch (error) {
                    // The browser may close a connection and tell us only afterwards.
                    drop(opened);
                    if (mayReopen) {
                        run(false);
                    } else {
                        done(storeProblem(error));
                    }
                    return;
                }
                perform(transaction);
            }, done);
        }

        function perform(transaction) {
            let problem = '';
            let finished = false;
            function finish(ended) {
                if (!finished) {
                    finished = true;
                    clearTimeout(timer);
                    done(ended);
                }
            }
            function complain(why) {
                problem = problem || why;
            }
            function abort(why) {
                complain(why);
                try {
                    transaction.abort();
                } catch (error) {
                    finish(problem); // it has ended already, or is being committed
                }
            }
            const timer = setTimeout(() => {
                abort('The browser’s store does not answer.');
                finish(problem);
            }, answerTimeout);
            transaction.oncomplete = () => finish(problem);
            transaction.onabort = () => finish(problem || storeProblem(transaction.error));
            const ask = (request, answered) => {
                request.onerror = () => complain(storeProblem(request.error));
                request.onsuccess = () => {
                    if (answered && !finished) {
                        answered(request.result);
                    }
                };
            };
            try {
                body(transaction.objectStore(statesStore), ask, complain);
                if (mode === 'readwrite') {
                    // A page that is going away commits nothing by itself, and what is not committed blocks what
                    // follows.
                    transaction.commit();
                }
            } catch (error) {
                abort(storeProblem(error));
            }
        }
    }

    return { transact };
}
