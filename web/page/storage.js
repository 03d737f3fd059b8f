// Decisions kept in the browser: the last states of each, under its id and a revision that rises with every one.

const statesKept = 10;
const lingerTime = 30; // milliseconds

const takenOver = 'Another page has taken this decision over. Save this state to a file if it is not there.';

// All keys [id, revision] of a decision, up to a revision; an array sorts behind every number.
function keysOf(id, last = []) {
    return IDBKeyRange.bound([id], [id, last]);
}

function soundState(state) {
    const texts = [state.id, state.title, state.saved_at, state.text];
    return texts.every((text) => typeof text === 'string') && Number.isSafeInteger(state.revision) && state.revision > 0;
}

function makeStorage(isLost) {
    const database = makeDatabase();
    let storing = 0;
    let answers = false; // the last thing asked of the store went well

    // Walks from the last key down. `take(state)` says where to go on: at the next key, at another one, or nowhere
    // (null).
    function walk(states, range, ask, take) {
        ask(states.openCursor(range, 'prev'), (cursor) => {
            const next = cursor ? take(cursor.value, cursor.key) : null;
            if (next !== null) {
                cursor.continue(next);
            }
        });
    }

    // The newest state of each, latest saved first, without their texts.
    function list(done) {
        const found = [];
        database.transact(
            'readonly',
            (states, ask) =>
                walk(states, null, ask, (state, [id]) => {
                    if (!soundState(state)) {
                        return undefined;
                    }
                    found.push({ id, title: state.title, saved_at: state.saved_at });
                    return [id]; // before all its states: on to the next decision
                }),
            (problem) => {
                answers = !problem;
                found.sort((a, b) => (a.saved_at < b.saved_at ? 1 : a.saved_at > b.saved_at ? -1 : 0));
                done(problem, problem ? [] : found);
            }
        );
    }

    // The newest state; null where there is none.
    function load(id, done) {
        let newest = null;
        database.transact(
            'readonly',
            (states, ask) =>
                walk(states, keysOf(id), ask, (state) => {
                    newest = soundState(state) ? state : null;
                    return newest ? null : undefined;
                }),
            (problem) => done(problem, problem ? null : newest)
        );
    }

    // Everything is asked for at once: a page that is going away hears no answer any more. A state is added, never
    // replaced: where another page has stored this revision, the store itself refuses, whatever the browser then
    // makes of the rest (one aborts, one commits). Where another page is so far ahead that it has removed this
    // revision again, the newest key tells.
    function store(record, done) {
        const { id, revision } = record;
        if (isLost(id)) {
            done(takenOver);
            return;
        }
        ++storing;
        database.transact(
            'readwrite',
            (states, ask, complain) => {
                ask(states.add(record));
                ask(states.openKeyCursor(keysOf(id), 'prev'), (newest) => {
                    if (newest && newest.key[1] > revision) {
                        complain(newerElsewhere);
                    }
                });
                ask(states.delete(keysOf(id, revision - statesKept)));
            },
            (problem) => {
                --storing;
                answers = !problem;
                done(problem);
            }
        );
    }

    // A state is with the browser, and there is no reason to think that it will be refused.
    function underway() {
        return storing > 0 && answers;
    }

    // Chromium may drop what a page hands it while going away: measured at one in five reloads, at none in 60 when
    // the page stayed this much longer. Waits only while something is on its way.
    function linger() {
        const end = performance.now() + (storing > 0 ? lingerTime : 0);
        while (performance.now() < end) {
            // nothing can be awaited any more
        }
    }

    function forget(id, done) {
        database.transact('readwrite', (states, ask) => ask(states.delete(keysOf(id))), done);
    }

    return { list, load, store, forget, underway, linger };
}
