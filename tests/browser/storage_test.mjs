// What the browser keeps, who may write it, and what happens where it refuses. Tried on the probe.

import assert from 'node:assert/strict';

import { probeFile, until } from './browsers.mjs';
import { inEachBrowser } from './each_browser.mjs';

const withoutLocks = () => Object.defineProperty(Navigator.prototype, 'locks', { value: undefined });
const withoutChannels = () => delete window.BroadcastChannel;

/// Waits until the probe has stored its title under this revision.
const stored = (page, revision) => page.findValue('stored', 'revision ' + revision);

/// The states kept, as [revision, title] each.
const inStore = (page) =>
    page.tab.evaluate(
        () =>
            new Promise((resolve, reject) => {
                const opening = indexedDB.open('steelyard.decisions');
                opening.onerror = () => reject(opening.error);
                opening.onsuccess = () => {
                    const reading = opening.result.transaction('states').objectStore('states').getAll();
                    reading.onsuccess = () => {
                        opening.result.close();
                        resolve(reading.result.map(({ revision, title }) => [revision, title]));
                    };
                };
            })
    );

inEachBrowser('keeping decisions', (test) => {
    test('a reload finds what was typed', async (open) => {
        const page = await open({ path: probeFile });
        assert.equal(await page.value('loaded'), 'nothing');
        await page.enter({ label: 'Title' }, 'Washer');
        await stored(page, 1);
        const id = await page.value('id');
        await page.reload();
        assert.equal(await page.value('Title'), 'Washer');
        assert.equal(await page.value('id'), id);
        assert.match(id, /^[0-9a-f]{8}-[0-9a-f]{4}-4[0-9a-f]{3}-[89ab][0-9a-f]{3}-[0-9a-f]{12}$/);
        assert.equal(await page.value('loaded'), 'revision 1');
    });

    test('a reload right after the last key loses nothing', async (open) => {
        const page = await open({ path: probeFile });
        await page.click({ label: 'Title' });
        for (const text of ['first', ' second', ' third']) {
            await page.click({ label: 'Title' });
            await page.press('End');
            await page.tab.keyboard.type(text);
            await page.reload(); // the page saves 0.3 s after a change: not yet
        }
        assert.equal(await page.value('Title'), 'first second third');
        assert.equal(page.lastDialog, undefined, 'what is on its way to the store is nothing to ask about');
    });

    test('a tab closed right after the last key loses nothing', async (open) => {
        const page = await open({ path: probeFile });
        await page.click({ label: 'Title' });
        await page.tab.keyboard.type('kept');
        await page.tab.goto('about:blank');
        const again = await open({ path: probeFile });
        assert.equal(await again.value('Title'), 'kept');
        page.complaints = []; // about:blank is none of ours
    });

    test('the last ten states are kept', async (open) => {
        const page = await open({ path: probeFile });
        await page.click({ label: 'Title' });
        for (let i = 1; i <= 13; ++i) {
            await page.type('x');
            await stored(page, i);
        }
        const expected = [4, 5, 6, 7, 8, 9, 10, 11, 12, 13].map((revision) => [revision, 'x'.repeat(revision)]);
        assert.deepEqual(await inStore(page), expected);
    });

    test('what is forgotten is gone', async (open) => {
        const page = await open({ path: probeFile });
        await page.enter({ label: 'Title' }, 'gone');
        await stored(page, 1);
        await page.click({ label: 'Forget' });
        await page.findValue('stored', 'forgotten');
        assert.deepEqual(await inStore(page), []);
    });

    test('entries that are not ours are left out of the list', async (open) => {
        const page = await open({ path: probeFile });
        await page.enter({ label: 'Title' }, 'sound');
        await stored(page, 1);
        await page.tab.evaluate(
            () =>
                new Promise((resolve) => {
                    const opening = indexedDB.open('steelyard.decisions');
                    opening.onsuccess = () => {
                        const transaction = opening.result.transaction('states', 'readwrite');
                        const states = transaction.objectStore('states');
                        states.put({ id: 'zzz', revision: 'many', title: 'a', saved_at: '9999', text: 'b' });
                        states.put({ id: 'zzz', revision: 5, title: 7, saved_at: '9999', text: 'b' });
                        states.put({ id: 8, revision: 5, title: 'a', saved_at: '9999', text: 'b' });
                        transaction.oncomplete = () => {
                            opening.result.close();
                            resolve();
                        };
                    };
                })
        );
        await page.reload();
        assert.equal(await page.value('kept'), 'sound');
        assert.equal(await page.value('Title'), 'sound');
    });

    test('another page that deletes the store is let, and storing goes on', async (open) => {
        const page = await open({ path: probeFile });
        await page.enter({ label: 'Title' }, 'one');
        await stored(page, 1);
        const deleted = await page.tab.evaluate(
            () =>
                new Promise((resolve) => {
                    const deleting = indexedDB.deleteDatabase('steelyard.decisions');
                    deleting.onsuccess = () => resolve('deleted');
                    deleting.onblocked = () => resolve('blocked');
                })
        );
        assert.equal(deleted, 'deleted');
        await page.enter({ label: 'Title' }, 'two');
        await stored(page, 2);
        await page.reload();
        assert.equal(await page.value('Title'), 'two');
    });

    // Three ways to know of other pages, the best that the browser offers is used.
    for (const [way, before] of [['Web Locks', []], ['messages, without Web Locks', [withoutLocks]]]) {
        test('two tabs: the second does not get the decision, or takes it over: ' + way, async (open) => {
            const first = await open({ path: probeFile, before });
            await first.enter({ label: 'Title' }, 'ours');
            await stored(first, 1);
            assert.equal(await first.value('claim'), 'granted');

            const second = await open({ path: probeFile, before });
            assert.equal(await second.value('Title'), 'ours');
            assert.equal(await second.value('claim'), 'taken elsewhere');
            await second.click({ label: 'Take over' });
            await second.findValue('claim', 'granted');
            await second.enter({ label: 'Title' }, 'mine now');
            await stored(second, 2);

            await first.front();
            await first.enter({ label: 'Title' }, 'too late');
            await first.findValue('stored', 'no');
            assert.match(await first.value('problem'), /taken this decision over/);
            assert.deepEqual(await inStore(first), [[1, 'ours'], [2, 'mine now']]);

            // A closed tab gives up its claim, some time after it is gone.
            await second.close();
            await until('the claim', async () => {
                await first.click({ label: 'Claim' });
                return (await first.value('claim')) === 'granted';
            });
        });
    }

    test('two tabs without any way to know of each other: the older state is refused', async (open) => {
        const before = [withoutLocks, withoutChannels];
        const first = await open({ path: probeFile, before });
        await first.enter({ label: 'Title' }, 'ours');
        await stored(first, 1);
        const second = await open({ path: probeFile, before });
        assert.equal(await second.value('claim'), 'granted');
        await second.enter({ label: 'Title' }, 'newer');
        await stored(second, 2);
        await first.front();
        await first.enter({ label: 'Title' }, 'older');
        await first.findValue('stored', 'no');
        assert.match(await first.value('problem'), /newer state/);
        assert.deepEqual(await inStore(first), [[1, 'ours'], [2, 'newer']]);

        // So far ahead that the revision in question is no longer kept.
        await second.front();
        await second.click({ label: 'Title' });
        for (let revision = 3; revision <= 14; ++revision) {
            await second.type('!');
            await stored(second, revision);
        }
        await first.front();
        await first.enter({ label: 'Title' }, 'much older');
        await first.find({ label: 'problem', value: /newer state/ });
        await first.findValue('stored', 'no');
        await first.reload();
        assert.match(await first.value('Title'), /^newer!+$/);
    });

    // The browser's refusals, played at the seam: each has to end in one sentence, none on the console.
    const refusals = {
        'no IndexedDB': [() => Object.defineProperty(window, 'indexedDB', { value: undefined }), /refuses its store/],
        'opening throws': [
            () => (IDBFactory.prototype.open = () => { throw new DOMException('no', 'SecurityError'); }),
            /refuses its store \(SecurityError: no\)/,
        ],
        'opening fails': [
            () => {
                IDBFactory.prototype.open = () => {
                    const request = { error: new DOMException('not here', 'InvalidStateError') };
                    setTimeout(() => request.onerror({ preventDefault() {} }), 10);
                    return request;
                };
            },
            /refuses its store \(InvalidStateError: not here\)/,
        ],
        'opening is never answered': [() => (IDBFactory.prototype.open = () => ({})), /does not open its store/],
        'an older page blocks it': [
            () => {
                IDBFactory.prototype.open = () => {
                    const request = {};
                    setTimeout(() => request.onblocked(), 10);
                    return request;
                };
            },
            /Another page keeps the browser’s store open/,
        ],
        'no room': [
            () => (IDBObjectStore.prototype.add = () => { throw new DOMException('full', 'QuotaExceededError'); }),
            /no room left/,
        ],
        'no room, said late': [
            () => {
                const add = IDBObjectStore.prototype.add;
                IDBObjectStore.prototype.add = function (value) {
                    const request = add.call(this, value);
                    Object.defineProperty(request, 'error', { value: new DOMException('full', 'QuotaExceededError') });
                    request.addEventListener('success', () => request.onerror());
                    return request;
                };
            },
            /no room left/,
        ],
        'transactions are refused': [
            () => (IDBDatabase.prototype.transaction = () => { throw new DOMException('closing', 'InvalidStateError'); }),
            /refuses its store \(InvalidStateError: closing\)/,
        ],
    };
    for (const [what, [before, sentence]] of Object.entries(refusals)) {
        test('a store that refuses is told in words: ' + what, async (open) => {
            const page = await open({ path: probeFile, before: [before] });
            await page.enter({ label: 'Title' }, 'kept nowhere');
            await page.find({ label: 'stored', value: 'no' });
            assert.match(await page.value('problem'), sentence);
            // It still works, and asks before it loses something.
            assert.equal(await page.value('Title'), 'kept nowhere');
            await page.tab.reload();
            assert.equal(page.lastDialog, 'beforeunload');
        });
    }

    test('leaving asks nothing when everything is kept', async (open) => {
        const page = await open({ path: probeFile });
        await page.enter({ label: 'Title' }, 'kept');
        await stored(page, 1);
        await page.reload();
        assert.equal(page.lastDialog, undefined);
    });
});
