// IndexedDB, opened when first needed. What comes from it is as untrusted as a file: on file:// other local pages may share it.

const databaseName = 'steelyard.decisions';
const headsStore = 'heads'; // key id: { id, title, saved_at, revision }, for the list
const statesStore = 'states'; // key [id, revision]: { id, title, saved_at, revision, text }

const openTimeout = 5000; // milliseconds
const answerTimeout = 15000; // what is asked takes milliseconds; past this the browser will not answer at all

function storeProblem(error) {
    const name = (error && error.name) || 'no reason given';
    if (name === 'QuotaExceededError') {
        return 'The browser has no room left for this page.';
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
            request.result.createObjectStore(headsStore, { keyPath: 'id' });
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

    // Runs `body(stores, report, refuse)` in one transaction over both stores. Then exactly one call of `done(problem, value)`:
    // with what was reported last, or with why nothing was changed.
    function transact(mode, body, done) {
        run(true);

        function run(mayReopen) {
            withConnection((opened) => {
                let transaction;
                try {
                    transaction = opened.transaction([headsStore, statesStore], mode, { durability: 'strict' });
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
            let value;
            let problem = '';
            let finished = false;
            let timer = 0;
            function finish(ended) {
                if (!finished) {
                    finished = true;
                    clearTimeout(timer);
                    done(ended, value);
                }
            }
            function refuse(why) {
                problem = problem || why;
                try {
                    transaction.abort();
                } catch (error) {
                    finish(problem); // it has ended already
                }
            }
            timer = setTimeout(() => {
                refuse('The browser’s store does not answer.');
                finish(problem);
            }, answerTimeout);
            transaction.oncomplete = () => finish('');
            transaction.onabort = () => finish(problem || storeProblem(transaction.error));
            transaction.onerror = (event) => event.preventDefault(); // each request's own handler has aborted already
            const stores = {
                heads: transaction.objectStore(headsStore),
                states: transaction.objectStore(statesStore),
                transaction,
            };
            // Every request goes through here, so that no failure is left out.
            const ask = (request, answered) => {
                request.onerror = (event) => {
                    event.preventDefault();
                    refuse(request.error && request.error.name === 'ConstraintError' ? newerElsewhere : storeProblem(request.error));
                };
                request.onsuccess = () => {
                    if (answered && !finished) {
                        answered(request.result);
                    }
                };
            };
            try {
                body(stores, ask, (result) => (value = result), refuse);
            } catch (error) {
                refuse(storeProblem(error));
            }
        }
    }

    return { transact };
}
