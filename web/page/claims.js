// One writer for each decision: a Web Lock by its id, held as long as the page lives or claims another. Where the
// browser has no locks for this page, pages ask each other over a BroadcastChannel; where that fails too, every
// page is granted its claim and the store's comparison of revisions is what is left.

const answerTime = 250; // milliseconds that other pages have to say that they hold a decision

function makeClaims() {
    const lost = new Set(); // decisions that another page took from this one
    let ways = navigator.locks ? makeLocks() : makeChannel();

    function makeLocks() {
        let held = null; // { release, released }
        let latest = null; // the claim asked for last
        let ready = Promise.resolve(); // until the claim before is given up

        function giveUp() {
            if (held) {
                ready = held.released;
                held.release();
                held = null;
            }
        }

        function claim(id, takeOver, done) {
            giveUp();
            let answered = false;
            const answer = (granted) => {
                answered = true;
                done(granted);
            };
            const mine = { release: null, released: null };
            latest = mine;
            const options = takeOver ? { steal: true } : { ifAvailable: true };
            ready.then(() => {
                const given = (lock) => {
                    if (!lock || latest !== mine) {
                        answer(false); // held elsewhere, or no longer wanted
                        return undefined;
                    }
                    held = mine;
                    lost.delete(id);
                    answer(true);
                    return new Promise((resolve) => {
                        mine.release = resolve;
                    });
                };
                const name = 'steelyard.decision.' + id;
                const ended = Promise.resolve().then(() => navigator.locks.request(name, options, given));
                mine.released = ended.catch((error) => {
                    if (!answered) {
                        // No locks for this page after all (a sandbox, a policy).
                        ways = makeChannel();
                        ways(id, takeOver, done);
                    } else if (error.name === 'AbortError') {
                        lost.add(id);
                        if (held === mine) {
                            held = null;
                        }
                    }
                });
            });
        }
        return claim;
    }

    function makeChannel() {
        let channel = null;
        let held = null;
        let asking = null; // { id, denied }
        try {
            channel = new BroadcastChannel('steelyard.claims');
        } catch (error) {
            return (id, takeOver, done) => done(true);
        }
        channel.onmessage = ({ data }) => {
            if (!data || typeof data.id !== 'string') {
                return;
            }
            if (data.kind === 'ask' && (held === data.id || (asking && asking.id === data.id))) {
                channel.postMessage({ kind: 'held', id: data.id });
            } else if (data.kind === 'held' && asking && asking.id === data.id) {
                asking.denied = true;
            } else if (data.kind === 'take' && held === data.id) {
                lost.add(data.id);
                held = null;
            }
        };

        function grant(id, done) {
            held = id;
            lost.delete(id);
            done(true);
        }

        function claim(id, takeOver, done) {
            held = null;
            if (takeOver) {
                channel.postMessage({ kind: 'take', id });
                grant(id, done);
                return;
            }
            const mine = { id, denied: false };
            asking = mine;
            channel.postMessage({ kind: 'ask', id });
            setTimeout(() => {
                if (asking === mine) {
                    asking = null;
                }
                if (mine.denied) {
                    done(false);
                } else {
                    grant(id, done);
                }
            }, answerTime);
        }
        return claim;
    }

    return {
        claim: (id, takeOver, done) => ways(id, takeOver, done),
        isLost: (id) => lost.has(id),
    };
}
