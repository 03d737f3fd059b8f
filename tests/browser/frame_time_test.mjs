// How long a frame takes and how few there are, on the release file. The times are printed; only the typical one is
// held to its promise, since a shared machine may steal any single one.

import assert from 'node:assert/strict';

import { inEachBrowser } from './each_browser.mjs';

const promised = 16; // milliseconds

/// Clocks every frame from the outside: what the page does in its animation frames.
const clockFrames = () => {
    const request = window.requestAnimationFrame.bind(window);
    window.frameTimes = [];
    window.requestAnimationFrame = (draw) =>
        request((time) => {
            const start = performance.now();
            draw(time);
            window.frameTimes.push(performance.now() - start);
        });
};

inEachBrowser('frames', (test, name) => {
    test('dragging the poise at 1366 x 768', async (open) => {
        const page = await open({ width: 1366, height: 768, before: [clockFrames] });
        await page.click({ label: 'Weigh', role: 'tab' });
        const poise = page.middle(await page.find({ label: 'Poise' }));
        await page.tab.mouse.move(poise.x, poise.y);
        await page.tab.mouse.down();
        await page.tab.evaluate(() => (window.frameTimes.length = 0));
        for (let step = 0; step < 120; ++step) {
            await page.tab.mouse.move(poise.x + 200 * Math.sin(step / 12), poise.y);
        }
        const times = await page.tab.evaluate(() => window.frameTimes.slice());
        await page.tab.mouse.up();
        await page.idle();
        times.sort((a, b) => a - b);
        const at = (share) => times[Math.floor(share * (times.length - 1))];
        const text = [0.5, 0.95, 1].map((share) => at(share).toFixed(1)).join(', ');
        console.log(`${name}: ${times.length} frames while dragging; median, 95 % and longest: ${text} ms`);
        assert.ok(times.length >= 20, String(times.length));
        assert.ok(at(0.5) < promised, text);
    });

    test('ten seconds without input draw nothing', async (open) => {
        const page = await open({ width: 1366, height: 768 });
        const before = await page.frame();
        await new Promise((resolve) => setTimeout(resolve, 10000));
        assert.equal(await page.frame(), before);
    });
});
