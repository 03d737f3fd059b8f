// The main job, done by hand as a person does it: with the mouse, the keyboard and the clipboard, in the release file.

import assert from 'node:assert/strict';

import { solveNatively } from './browsers.mjs';
import { inEachBrowser } from './each_browser.mjs';

const list = 'Environment\n\tPower drawn\n\tWater used\nTraining needed\n';

// Runs in the page before its own scripts: how long each animation frame's work takes.
const timeFrames = () => {
    window.frameTimes = [];
    const request = window.requestAnimationFrame.bind(window);
    window.requestAnimationFrame = (callback) =>
        request((time) => {
            const start = performance.now();
            callback(time);
            window.frameTimes.push(performance.now() - start);
        });
};

const points = (score) => (100 * score).toFixed(1);

/// The texts of the standing beside the room.
async function standing(page) {
    const beside = (await page.all({ room: 'frame', role: 'text' })).filter((item) => item.x > 1000);
    return beside.map((item) => item.label);
}

inEachBrowser('the main job', (test, name) => {
    test('from the example to a saved file whose solution is what the screen shows', async (open, browser) => {
        const page = await open({ width: 1366, height: 768, before: [timeFrames] });
        const before = JSON.parse(await page.results());
        assert.equal(before.ranks.brook, 1);

        // Frame: rename an option, add a criterion.
        await page.click({ label: 'Frame', role: 'tab' });
        await page.enter({ label: 'Name of option A', role: 'textbox' }, 'Alder R3');
        await page.click({ label: 'Fit to the cell', role: 'treeitem' });
        await page.click({ label: 'Add below it', role: 'button' });
        await page.press('Control+A');
        await page.type('Chip drag-out');
        await page.press('Enter');
        await page.find({ label: 'Chip drag-out', role: 'treeitem' });

        // Weigh: three pairs by keys, one by dragging the poise.
        await page.click({ label: 'Weigh', role: 'tab' });
        await page.click({ label: 'Fit to the cell', role: 'tab' });
        for (const keys of [['3'], ['2', 'x'], ['5']]) {
            for (const key of keys) {
                await page.press(key);
            }
            await page.press('Enter');
        }
        const { x, y } = page.middle(await page.find({ label: 'Poise' }));
        await page.tab.evaluate(() => (window.frameTimes.length = 0));
        await page.drag({ x, y }, { x: x + 130, y }, 40);
        const times = await page.tab.evaluate(() => window.frameTimes);
        times.sort((a, b) => a - b);
        console.log(
            `${name}: dragging the poise at 1366 x 768: ${times.length} frames, median ` +
                `${times[times.length >> 1].toFixed(1)} ms, longest ${times.at(-1).toFixed(1)} ms`
        );

        // Gauge: type a figure.
        await page.click({ label: 'Gauge', role: 'tab' });
        await page.click({ label: 'Purchase price of Alder R3', role: 'gridcell' });
        await page.type('71,500');
        await page.press('Enter');

        // Frame: paste an indented list under the goal.
        await page.click({ label: 'Frame', role: 'tab' });
        await page.click({ label: 'Best washer for cell 7', role: 'treeitem' });
        await browser.fillClipboard(list);
        await page.front();
        await page.paste();
        await page.click({ label: 'Add 4 criteria', role: 'button' });
        await page.find({ label: 'Power drawn', role: 'treeitem' });

        const after = JSON.parse(await page.results());
        assert.equal(after.ranks.alder, 1, 'the ranking changed');
        const shown = await standing(page);
        for (const option of ['alder', 'brook', 'cove']) {
            assert.ok(shown.includes(points(after.scores[option])), option + ' stands with its points: ' + shown);
        }

        // All of it is there after a reload.
        await page.reload();
        assert.deepEqual(JSON.parse(await page.results()), after);
        await page.click({ label: 'Frame', role: 'tab' });
        await page.find({ label: 'Name of option A', value: 'Alder R3' });
        const there = (await page.items()).map((item) => item.label);
        assert.ok(there.includes('Water used') && there.includes('Chip drag-out'), 'the criteria are there, scrolled or not');

        // The saved file, solved natively, gives the numbers on the screen.
        await page.press('Control+S');
        const file = await browser.download(/\.decision\.json$/);
        const solved = solveNatively(file);
        const again = await standing(page);
        assert.equal(solved.ranks.alder, 1);
        for (const [option, score] of Object.entries(solved.scores)) {
            assert.ok(Math.abs(score - after.scores[option]) <= 1e-12 * Math.abs(score), option);
            assert.ok(again.includes(points(score)), option + ' stands with its points');
        }
        assert.equal(solved.decision_sha256, after.decision_sha256);
    });

    test('without input nothing is drawn', async (open) => {
        const page = await open({ width: 1366, height: 768 });
        const start = await page.frame();
        await new Promise((resolve) => setTimeout(resolve, 10000));
        const drawn = (await page.frame()) - start;
        assert.ok(drawn <= 2, drawn + ' frames in ten idle seconds');
    });

    test('starting empty keeps the decision before in the list of what is kept', async (open) => {
        const page = await open({ width: 1366, height: 768 });
        await page.click({ label: 'Frame', role: 'tab' });
        await page.enter({ label: 'Title', role: 'textbox' }, 'My washer');
        await page.click({ label: 'Start empty', role: 'button' });
        await page.find({ label: 'Untitled decision', role: 'text' });
        await page.click({ label: 'File', role: 'combobox' });
        await page.click({ label: 'Kept in this browser\u2026', role: 'option' });
        await page.find({ label: 'My washer', role: 'text' });
        await page.click({ label: 'Open', role: 'button' });
        await page.find({ label: 'My washer', role: 'text' });
    });

    test('undo and redo by keys', async (open) => {
        const page = await open({ width: 1366, height: 768 });
        await page.click({ label: 'Weigh', role: 'tab' });
        await page.press('7');
        await page.find({ label: 'Whole-life cost against Cleaning result', role: 'slider', value: '7' });
        await page.press('Control+Z');
        await page.find({ label: 'Whole-life cost against Cleaning result', role: 'slider', value: '' });
        await page.press('Control+Y');
        await page.find({ label: 'Whole-life cost against Cleaning result', role: 'slider', value: '7' });
    });
});
