// The picture: its size and density, and that a frame is drawn only for a reason. Tried on the probe.

import assert from 'node:assert/strict';
import { createHash } from 'node:crypto';
import { describe, it } from 'node:test';

import { browserNames, probeFile, startBrowser } from './browsers.mjs';
import { inEachBrowser } from './each_browser.mjs';
import { openPage } from './page.mjs';

const pictureSize = (page) =>
    page.tab.evaluate(() => {
        const { width, height } = document.getElementById('picture');
        return [width, height];
    });

const wait = (milliseconds) => new Promise((resolve) => setTimeout(resolve, milliseconds));

inEachBrowser('the picture', (test, name) => {
    test('follows the window and its density, pixel for pixel', async (open) => {
        const page = await open({ path: probeFile, width: 1280, height: 720 });
        assert.deepEqual(await pictureSize(page), [1280, 720]);
        assert.equal(await page.value('size'), '1280 x 720 at 1');

        // Size and density together: Chromium’s driver tells a page nothing of a density that changes alone.
        for (const [width, height, density] of [[1600, 900, 1.25], [1280, 720, 2], [640, 900, 1], [1920, 1080, 0.5]]) {
            await page.resize(width, height, density);
            await page.findValue('size', `${width} x ${height} at ${density}`);
            await page.idle();
            assert.deepEqual(await pictureSize(page), [Math.round(width * density), Math.round(height * density)]);
        }
    });

    test('items stand where they are drawn at another density', async (open) => {
        const page = await open({ path: probeFile, density: 2 });
        await page.click({ label: 'Count' });
        assert.equal(await page.value('clicks'), '1');
    });

    test('a very large window gets a coarser picture, not a slow one', async (open) => {
        const page = await open({ path: probeFile, width: 3840, height: 2160, density: 2 });
        const [width, height] = await pictureSize(page);
        assert.ok(width * height <= 16000000 && width * height > 15900000, `${width} x ${height}`);
        await page.click({ label: 'Count' });
        assert.equal(await page.value('clicks'), '1');
    });

    test('nothing is drawn without a reason', async (open) => {
        const page = await open({ path: probeFile });
        const before = await page.frame();
        await wait(3000);
        assert.equal(await page.frame(), before);
    });

    test('in a text field only the caret’s frames are drawn', async (open) => {
        const page = await open({ path: probeFile });
        await page.click({ label: 'Title' });
        const before = await page.frame();
        await wait(6000);
        // Twice in 1.2 s: 10 in 6 s.
        const drawn = (await page.frame()) - before;
        assert.ok(drawn >= 8 && drawn <= 12, String(drawn));
    });

    test('the caret does not blink for those who asked for less motion', async (open) => {
        const page = await open({
            path: probeFile,
            before: [
                // Firefox's driver cannot set it: the query's answer is replaced.
                () => {
                    const real = window.matchMedia.bind(window);
                    window.matchMedia = (query) => {
                        const list = real(query);
                        if (query.includes('reduced-motion')) {
                            Object.defineProperty(list, 'matches', { value: true });
                        }
                        return list;
                    };
                },
            ],
        });
        await page.click({ label: 'Title' });
        const before = await page.frame();
        await wait(2000);
        assert.equal(await page.frame(), before);
    });

    test('a few frames after input, then none', async (open) => {
        const page = await open({ path: probeFile });
        const before = await page.frame();
        await page.hover({ label: 'Count' });
        const after = await page.frame();
        assert.ok(after - before <= 6, String(after - before));
        await wait(1000);
        assert.equal(await page.frame(), after);
    });

    test('nothing is drawn while the page is hidden', async (open) => {
        const page = await open({ path: probeFile });
        const other = await open({ path: probeFile });
        await other.front();
        const hidden = await page.tab.evaluate(() => document.hidden);
        if (!hidden) {
            // This driver shows all tabs: the page is told that it is hidden.
            await page.tab.evaluate(() => {
                Object.defineProperty(document, 'hidden', { value: true, configurable: true });
                document.dispatchEvent(new Event('visibilitychange'));
            });
        }
        const before = await page.frame();
        await page.tab.evaluate(() => window.dispatchEvent(new Event('resize')));
        await page.tab.evaluate(() =>
            document.getElementById('picture').dispatchEvent(
                new PointerEvent('pointermove', { clientX: 100, clientY: 100, bubbles: true })
            )
        );
        await wait(500);
        assert.equal(await page.frame(), before);
        await page.front();
        await page.tab.evaluate(() => {
            delete document.hidden;
            document.dispatchEvent(new Event('visibilitychange'));
        });
        await page.idle();
        assert.ok((await page.frame()) > before);
    });

    test('the cursor says what is under it', async (open) => {
        const page = await open({ path: probeFile });
        const cursor = () => page.tab.evaluate(() => document.getElementById('picture').style.cursor);
        await page.hover({ label: 'Title' });
        assert.equal(await cursor(), 'text');
        await page.hover({ label: 'Count' });
        assert.equal(await cursor(), 'default');
    });

    // Firefox's driver cannot change it: there it is tried at the start only, below.
    test('follows the system’s colour scheme', async (open) => {
        const page = await open({ path: probeFile });
        assert.equal(await page.value('scheme'), 'light');
        if (name === 'chromium') {
            await page.tab.emulateMediaFeatures([{ name: 'prefers-color-scheme', value: 'dark' }]);
            await page.findValue('scheme', 'dark');
        }
    });
});

describe('a screen of its own kind', () => {
    for (const name of browserNames) {
        // Not played by the driver but the browser's own, so that its count of device pixels is used; 1.25 cuts pixels.
        for (const density of [1.25, 2]) {
            it(`${name}, ${density} device pixels to the CSS pixel, dark`, async () => {
                const browser = await startBrowser(name, {
                    args: [`--force-device-scale-factor=${density}`],
                    preferences: {
                        'layout.css.devPixelsPerPx': String(density),
                        'layout.css.prefers-color-scheme.content-override': 0,
                    },
                });
                try {
                    const page = await openPage(browser, { path: probeFile, density: 0 });
                    const [inside, box] = await page.tab.evaluate(
                        () =>
                            new Promise((resolve) => {
                                const canvas = document.getElementById('picture');
                                new ResizeObserver(([entry]) => {
                                    const { inlineSize, blockSize } = entry.devicePixelContentBoxSize[0];
                                    resolve([[window.innerWidth, window.devicePixelRatio], [inlineSize, blockSize]]);
                                }).observe(canvas, { box: 'device-pixel-content-box' });
                            })
                    );
                    assert.equal(inside[1], density);
                    assert.ok(Math.abs(inside[0] * density - box[0]) <= 1, String([inside, box]));
                    assert.deepEqual(await pictureSize(page), box);
                    await page.click({ label: 'Count' });
                    assert.equal(await page.value('clicks'), '1');
                    if (name === 'firefox') {
                        assert.equal(await page.value('scheme'), 'dark');
                    }
                    await page.assertQuiet();
                } finally {
                    await browser.close();
                }
            });
        }
    }
});

it('both browsers show the same pixels', { skip: browserNames.length < 2 }, async () => {
    // Down to the buttons: below them stands a random name.
    const digests = [];
    for (const name of browserNames) {
        const browser = await startBrowser(name);
        try {
            const page = await openPage(browser, { path: probeFile, width: 800, height: 300, density: 1.25 });
            digests.push(createHash('sha256').update(Buffer.from(await page.pixels(0, 0, 1000, 225))).digest('hex'));
        } finally {
            await browser.close();
        }
    }
    assert.equal(digests[0], digests[1]);
});
