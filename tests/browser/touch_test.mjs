// Fingers, tried on the probe.

import assert from 'node:assert/strict';

import { probeFile } from './browsers.mjs';
import { inEachBrowser } from './each_browser.mjs';
import { touch } from './touch.mjs';

inEachBrowser('touch', (test) => {
    const wait = (milliseconds) => new Promise((resolve) => setTimeout(resolve, milliseconds));

    test('a tap presses', async (open) => {
        const page = await open({ path: probeFile });
        const { x, y } = page.middle(await page.find({ label: 'Count' }));
        await touch(page, 'down', [[1, x, y]]);
        await touch(page, 'up', [[1, x, y]]);
        await page.idle();
        assert.equal(await page.value('clicks'), '1');
        assert.equal(await page.value('right clicks'), '0');
    });

    test('a tap on a field brings the keyboard', async (open) => {
        const page = await open({ path: probeFile });
        const { x, y } = page.middle(await page.find({ label: 'Title' }));
        await touch(page, 'down', [[1, x, y]]);
        await touch(page, 'up', [[1, x, y]]);
        await page.type('by thumb');
        assert.equal(await page.value('Title'), 'by thumb');
    });

    test('a drag moves the slider to where the finger leaves it', async (open) => {
        const page = await open({ path: probeFile });
        const { x, y, w, h } = await page.find({ label: 'Weight' });
        await touch(page, 'down', [[1, x + 20, y + h / 2]]);
        for (let i = 1; i <= 5; ++i) {
            await touch(page, 'move', [[1, x + 20 + (i * w) / 10, y + h / 2]]);
        }
        await touch(page, 'up', [[1, x + 20 + w / 2, y + h / 2]]);
        await page.idle();
        const weight = Number(await page.value('Weight'));
        assert.ok(weight > 4 && weight < 7, String(weight));
    });

    test('a finger held still asks for the context menu, and does not press', async (open) => {
        const page = await open({ path: probeFile });
        const { x, y } = page.middle(await page.find({ label: 'Count' }));
        await touch(page, 'down', [[1, x, y]]);
        await page.findValue('right clicks', '1');
        await touch(page, 'up', [[1, x, y]]);
        await page.idle();
        assert.equal(await page.value('clicks'), '0');
    });

    test('a finger that wanders is not held still', async (open) => {
        const page = await open({ path: probeFile });
        const { x, y, w, h } = await page.find({ label: 'Weight' });
        await touch(page, 'down', [[1, x + w / 4, y + h / 2]]);
        await touch(page, 'move', [[1, x + w / 4 + 30, y + h / 2]]);
        await wait(800); // longer than holding takes
        await touch(page, 'up', [[1, x + w / 4 + 30, y + h / 2]]);
        await page.idle();
        assert.equal(await page.value('right clicks'), '0');
    });

    test('two fingers scroll what is under them and press nothing', async (open) => {
        const page = await open({ path: probeFile });
        const { x, y, w, h } = await page.find({ label: 'rows' });
        const at = (dy) => [[1, x + w / 3, y + h - 10 + dy], [2, x + (2 * w) / 3, y + h - 10 + dy]];
        await touch(page, 'down', [at(0)[0]]);
        await touch(page, 'down', [at(0)[1]]);
        for (let i = 1; i <= 8; ++i) {
            await touch(page, 'move', at(-10 * i));
            await page.idle();
        }
        await touch(page, 'up', at(-80));
        await page.idle();
        const scrolled = Number(await page.value('rows'));
        // What was under the fingers stays there: 80 px, as far as a notch allows in a list this low.
        assert.ok(scrolled > 40 && scrolled <= 90, String(scrolled));
        assert.equal(await page.value('clicks'), '0');
    });
});
