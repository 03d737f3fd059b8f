// Decisions kept in the browser: for each a head for the list, and its last states. A state is never overwritten: its
// revision is its key, so a second page that stores the same revision is refused by the store itself.

const statesKept = 10;

const newerElsewhere = 'Another page has stored a newer state of this decision. Save this one to a file, then open the other.';
const takenOver = 'Another page has taken this decision over. Save this state to a file if it is not there.';

function statesOf(id) {
    return IDBKeyRange.bound([id], [id, []]); // an array sorts behind every number
}

function soundHead(head) {
    return Boolean(head) && typeof head.id === 'string' && typeof head.title === 'string' && typeof head.saved_at === 'string';
}

function soundState(state) {
    return soundHead(state) && typeof state.text === 'string' && Number.isSafeInteger(state.revision) && state.revision > 0;
}

function makeStorage(isLost) {
    const database = makeDatabase();
    const inFlight = new Set();

    // Latest saved first.
    function list(done) {
        database.transact(
            'readonly',
            ({ heads }, ask, report) => ask(heads.getAll(), report),
            (problem, found) => {
                const sound = problem ? [] : found.filter(soundHead);
                sound.sort((a, b) => (a.saved_at < b.saved_at ? 1 : a.saved_at > b.saved_at ? -1 : 0));
                done(problem, sound);
            }
        );
    }

    // The newest state that is one; null where there is none.
    function load(id, done) {
        database.transact(
            'readonly',
            ({ states }, ask, report) => {
                report(null);
                ask(states.openCursor(statesOf(id), 'prev'), (cursor) => {
                    if (cursor && soundState(cursor.value)) {
                        report(cursor.value);
                    } else if (cursor) {
                        cursor.continue();
                    }
                });
            },
            (problem, state) => done(problem, problem ? null : state)
        );
    }

    function put({ heads, states }, ask, record, stored) {
        ask(states.add(record), stored);
        ask(heads.put({ id: record.id, title: record.title, saved_at: record.saved_at, revision: record.revision }));
    }

    // All requests are made at once: should the page go away now, they are with the browser already. The comparison comes
    // first in the same transaction, which it takes back where a newer revision is there.
    function store(record, done) {
        if (isLost(record.id)) {
            done(takenOver);
            return;
        }
        inFlight.add(record);
        database.transact(
            'readwrite',
            (stores, ask, report, refuse) => {
                ask(stores.states.openKeyCursor(statesOf(record.id), 'prev'), (newest) => {
                    if (newest && newest.key[1] >= record.revision) {
                        refuse(newerElsewhere);
                    }
                });
                put(stores, ask, record, () =>
                    ask(stores.states.getAllKeys(statesOf(record.id)), (keys) =>
                        keys.slice(0, -statesKept).forEach((key) => ask(stores.states.delete(key)))
                    )
                );
            },
            (problem) => {
                inFlight.delete(record);
                done(problem);
            }
        );
    }

    // The page is going away: what is on its way goes once more, committed without waiting for an answer. Where the first
    // one got through, the state is there and the second is refused.
    function hurry() {
        for (const record of inFlight) {
            database.transact(
                'readwrite',
                (stores, ask) => {
                    put(stores, ask, record);
                    if (stores.transaction.commit) {
                        stores.transaction.commit();
                    }
                },
                () => {}
            );
        }
    }

    function forget(id, done) {
        database.transact(
            'readwrite',
            ({ heads, states }, ask) => {
                ask(heads.delete(id));
                ask(states.delete(statesOf(id)));
            },
            done
        );
    }

    return { list, load, store, hurry, forget };
}
