// The main job, done as a person does it, on the release file: from the example to a saved decision whose numbers
// the native command confirms.

import assert from 'node:assert/strict';
import { readFileSync } from 'node:fs';

import { solveNatively } from './browsers.mjs';
import { inEachBrowser } from './each_browser.mjs';

/// The standing at the side, as it reads: [name, points of 100] from the first down.
async function standing(page) {
    const texts = (await page.all({ role: 'text' })).filter(({ room, x }) => room === 'frame' && x > 1090);
    const points = texts.filter(({ label }) => /^\d+\.\d$/.test(label)).sort((a, b) => a.y - b.y);
    return points.map(({ label, y }) => {
        const row = texts.filter((text) => Math.abs(text.y - y) < 12 && text.label.length > 1 && text.label !== label);
        return [row[0].label, Number(label)];
    });
}

/// Both are results files; numbers agree to what native and WebAssembly promise.
function assertSameResults(page, native, at = 'results') {
    if (typeof page === 'number' && typeof native === 'number') {
        assert.ok(Math.abs(page - native) <= 1e-12 * Math.max(1, Math.abs(native)), `${at}: ${page} and ${native}`);
    } else if (page && native && typeof page === 'object') {
        assert.deepEqual(Object.keys(page), Object.keys(native), at);
        for (const key of Object.keys(page)) {
            assertSameResults(page[key], native[key], at + '/' + key);
        }
    } else {
        assert.equal(page, native, at);
    }
}

inEachBrowser('the main job', (test) => {
    test('from the example to a file, by mouse and keyboard', async (open, browser) => {
        const page = await open({ width: 1366, height: 768 });
        const before = await standing(page);
        assert.deepEqual(before.map(([name]) => name), ['Brook', 'Alder', 'Cove']);
        const room = (label) => page.click({ label, role: 'tab' });

        // An option is renamed.
        await page.enter({ label: 'Name of option A', role: 'textbox' }, 'Alder R3');
        assert.deepEqual((await standing(page)).map(([name]) => name), ['Brook', 'Alder R3', 'Cove']);

        // A criterion is added below a group and gets its name.
        await page.click({ label: 'Supplier', role: 'treeitem' });
        await page.scrollTo({ label: 'Add below it', role: 'button' }, { label: 'Supplier', role: 'treeitem' });
        await page.click({ label: 'Add below it', role: 'button' });
        await page.press('Control+A');
        await page.type('Spare parts');
        await page.press('Enter');
        await page.find({ label: 'Spare parts', role: 'treeitem' });

        // Three pairs are judged by keys, one by dragging the poise.
        await room('Weigh');
        await page.click({ label: 'Supplier', role: 'tab' });
        for (const key of ['5', '3', '7']) {
            const { label } = await page.find({ label: /Spare parts/, role: 'slider' });
            await page.press(key);
            assert.equal(await page.value(label, 'slider'), key);
            await page.press('Enter');
        }
        await page.click({ label: 'Enlarge the grid', role: 'button' });
        await page.click({ label: 'Service against Spare parts', role: 'gridcell' });
        await page.click({ label: 'Shrink the grid', role: 'button' });
        const poise = page.middle(await page.find({ label: 'Poise' }));
        await page.drag(poise, { x: poise.x + 150, y: poise.y });
        assert.match(await page.value('Service against Spare parts', 'slider'), /^1\/\d/);

        // A figure is typed.
        await room('Gauge');
        await page.click({ label: 'Residual dirt of Cove', role: 'gridcell' });
        await page.enter({ label: 'Value of Residual dirt of Cove', role: 'textbox' }, '0.6');
        await page.find({ label: 'Residual dirt of Cove', role: 'gridcell', value: /^0\.6/ });

        // An indented list is pasted.
        await browser.fillClipboard('Handling 20\n  Lifting aid 60\n  Reach 40');
        await page.front();
        await room('Frame');
        await page.paste();
        await page.click({ label: 'Add 3 criteria', role: 'button' });
        await page.scrollTo({ label: 'Lifting aid', role: 'treeitem' }, { label: 'Best washer for cell 7', role: 'treeitem' });

        // All this has changed the ranking in sight.
        const after = await standing(page);
        assert.notDeepEqual(after, before);

        // A reload finds it all.
        await page.reload();
        assert.deepEqual(await standing(page), after);
        assert.equal(await page.value('Name of option A', 'textbox'), 'Alder R3');

        // The saved file solves to the numbers on the screen.
        await page.press('Control+S');
        const file = await browser.download(/\.decision\.json$/);
        const saved = JSON.parse(readFileSync(file, 'utf8'));
        assert.equal(saved.options[0].name, 'Alder R3');
        const native = solveNatively(file);
        assertSameResults(JSON.parse(await page.results()), native);
        const names = new Map(saved.options.map(({ id, name }) => [id, name]));
        const shown = Object.entries(native.scores)
            .sort(([, a], [, b]) => b - a)
            .map(([id, score]) => [names.get(id), Number((100 * score).toFixed(1))]);
        assert.deepEqual(after, shown);
    });
});
