// Judging on the release file: by keys, by touch, as a pasted matrix, alone and then together, and a contradiction
// corrected; each undone again.

import assert from 'node:assert/strict';
import { mkdtempSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

import { inEachBrowser } from './each_browser.mjs';
import { touch } from './touch.mjs';

/// A decision file with these criteria, two options graded on each, and what else is given.
function decisionFile(names, more = {}) {
    const criteria = names.map((name, i) => ({
        id: 'c' + (i + 1), name, rate: 'grade',
        grades: [{ id: 'good', name: 'good', worth: 1 }, { id: 'fair', name: 'fair', worth: 0.5 }],
    }));
    const grades = criteria.flatMap(({ id }, i) => [
        { criterion: id, option: 'A', grade: i % 2 ? 'good' : 'fair' },
        { criterion: id, option: 'B', grade: i % 2 ? 'fair' : 'good' },
    ]);
    const decision = {
        format: 'steelyard-decision', version: 1, id: 'judging', title: 'Judging',
        options: [{ id: 'A', name: 'Alder' }, { id: 'B', name: 'Brook' }],
        criteria: { id: 'goal', name: 'Goal', children: criteria },
        grades, ...more,
    };
    const file = join(mkdtempSync(join(tmpdir(), 'steelyard-judging-')), 'judging.decision.json');
    writeFileSync(file, JSON.stringify(decision));
    return file;
}

const six = ['Noise', 'Floor space', 'Throughput', 'Reach', 'Service', 'Delivery'];

// HOUSE: T. L. Saaty, European Journal of Operational Research 48 (1990) 9-26; from memory of the source.
const house = [
    [5, 3, 7, 6, 6, 1 / 3, 1 / 4], [1 / 3, 5, 3, 3, 1 / 5, 1 / 7], [6, 3, 4, 6, 1 / 5], [1 / 3, 1 / 4, 1 / 7, 1 / 8],
    [1 / 2, 1 / 5, 1 / 6], [1 / 5, 1 / 6], [1 / 2],
];

inEachBrowser('judging', (test) => {
    async function openWeigh(open, file, size = { width: 1366, height: 768 }) {
        const page = await open(size);
        await page.openFile({ label: 'Open a file', role: 'button' }, file);
        await page.click({ label: 'Weigh', role: 'tab' });
        return page;
    }

    const results = async (page) => JSON.parse(await page.results());
    const groupOf = async (page) => (await results(page)).sets.find(({ set, by }) => set === 'goal' && !by);

    /// Undoes until nothing is left to undo: everything is as it was opened.
    async function undoAll(page, before, steps) {
        for (let i = 0; i < steps; ++i) {
            await page.press('Control+Z');
        }
        assert.deepEqual(await groupOf(page), before);
    }

    test('a set of six by keys alone', async (open) => {
        const page = await openWeigh(open, decisionFile(six));
        const before = await groupOf(page);
        await page.find({ role: 'slider', focused: true });
        let acts = 0;
        const act = async (key) => {
            ++acts;
            await page.press(key);
        };
        for (let pair = 0; pair < 15; ++pair) {
            await act(String(1 + (pair % 5)));
            if (pair % 3 === 0) {
                await act('x');
            }
            await act('Enter');
        }
        assert.ok(acts <= 60, `${acts} acts`);
        const after = await groupOf(page);
        assert.equal(after.missing.length, 0);
        assert.equal(after.misfits.length, 15);
        await undoAll(page, before, 20);
    });

    test('a pair by touch', async (open) => {
        const page = await openWeigh(open, decisionFile(six));
        const before = await groupOf(page);
        const { x, y } = page.middle(await page.find({ label: 'Poise' }));
        await touch(page, 'down', [[1, x, y]]);
        for (let i = 1; i <= 6; ++i) {
            await touch(page, 'move', [[1, x - 20 * i, y]]);
        }
        await touch(page, 'up', [[1, x - 120, y]]);
        await page.idle();
        const after = await groupOf(page);
        assert.equal(after.missing.length, 14);
        const said = Number(await page.value('Noise against Floor space', 'slider'));
        assert.ok(said > 1.5, `for the left load: ${said}`);
        await undoAll(page, before, 1);
    });

    test('a matrix from a spreadsheet', async (open, browser) => {
        const page = await openWeigh(open, decisionFile(six));
        const before = await groupOf(page);
        const rows = six.map((row, i) =>
            [row, ...six.map((_, j) => (i === j ? '1' : i < j ? String(1 + ((i + j) % 4)).replace('4', '2,5') : ''))]
        );
        await browser.fillClipboard([['', ...six], ...rows].map((row) => row.join('\t')).join('\n'));
        await page.front();
        await page.paste();
        await page.click({ label: /^Enter 15 answers|^Enter these|^Enter/, role: 'button' });
        const after = await groupOf(page);
        assert.equal(after.missing.length, 0);
        const given = new Map(after.misfits.map(({ a, b, given }) => [a + b, given]));
        assert.equal(given.get('c1c2'), 2);
        assert.equal(given.get('c1c4'), 2.5);
        await undoAll(page, before, 1);

        // A wrong cell is named, and nothing changes.
        rows[0][2] = 'many';
        await browser.fillClipboard([['', ...six], ...rows].map((row) => row.join('\t')).join('\n'));
        await page.front();
        await page.paste();
        await page.find({ role: 'text', label: /Nothing was changed.*Noise.*Floor space/ });
        assert.deepEqual(await groupOf(page), before);
    });

    test('three judges alone, then together', async (open) => {
        const people = [
            { id: 'p1', name: 'R. Voss' }, { id: 'p2', name: 'T. Lindqvist' }, { id: 'p3', name: 'M. Ito' },
        ];
        const page = await openWeigh(open, decisionFile(['Noise', 'Floor space', 'Reach'], { people }));
        const before = await groupOf(page);
        await page.click({ label: 'How answers are given: Each alone', role: 'radio' });
        const digits = { 'R. Voss': '5', 'T. Lindqvist': '3', 'M. Ito': '7' };
        for (const { name } of people) {
            await page.click({ label: 'Hand over to ' + name, role: 'button' });
            await page.click({ label: `I am ${name}: begin`, role: 'button' });
            for (let pair = 0; pair < 3; ++pair) {
                await page.press(digits[name]);
                if (name === 'T. Lindqvist') {
                    await page.press('x');
                }
                // Nobody else and no standing is to be seen.
                const seen = (await page.items()).filter((item) => item.visible).map(({ label }) => label).join('\n');
                for (const other of people.filter((one) => one.name !== name)) {
                    assert.ok(!seen.includes(other.name), `${name} sees ${other.name}`);
                }
                assert.ok(!seen.includes('points of 100'), `${name} sees the standing`);
                await page.press('Enter');
            }
            await page.click({ label: 'Hand over', role: 'button' });
        }
        await page.click({ label: 'Reveal', role: 'button' });
        const seen = (await page.items()).filter((item) => item.visible).map(({ label }) => label).join('\n');
        for (const { name } of people) {
            assert.ok(seen.includes(name), `${name} is not shown`);
        }
        assert.match(seen, /21 times apart/);
        const after = await groupOf(page);
        assert.equal(after.misfits.length, 3);
        assert.ok(after.concordance.judges.length === 3);
        await page.click({ label: 'How answers are given: Agreed in the room', role: 'radio' });
        if ((await page.all({ label: 'Open everything', role: 'button' })).length > 0) {
            await page.click({ label: 'Open everything', role: 'button' });
        }
        await undoAll(page, before, 12);
    });

    test('HOUSE: the contradiction is named and corrected', async (open) => {
        const names = ['one', 'two', 'three', 'four', 'five', 'six', 'seven', 'eight'].map((n) => 'Matter ' + n);
        const judgments = house.flatMap((row, i) =>
            row.map((ratio, k) => ({ set: 'goal', a: 'c' + (i + 1), b: 'c' + (i + k + 2), ratio }))
        );
        const page = await openWeigh(open, decisionFile(names, { judgments }), { width: 1600, height: 1000 });
        const before = await groupOf(page);
        assert.ok(Math.abs(before.cr - 0.1696) < 0.001, String(before.cr));
        await page.click({ label: 'Enlarge the card', role: 'button' });
        await page.find({ role: 'text', label: /Matter three counts 6 times as much as Matter seven/ });
        await page.find({ role: 'text', label: /fits best.*0\.4625.*CR is 0\.0824/ });
        await page.find({ role: 'text', label: 'One change is enough, and no fewer.' });
        await page.find({ role: 'text', label: 'However this is corrected, Brook stays first.' });
        await page.click({ label: 'Matter seven 2 times Matter three', role: 'radio' });
        await page.click({ label: 'Correct this answer', role: 'button' });
        const after = await groupOf(page);
        // CR .0825 at 1/2: Saaty 2003 prints .083.
        assert.ok(Math.abs(after.cr - 0.0825) < 0.00005, String(after.cr));
        assert.equal(after.misfits.find(({ a, b }) => a === 'c3' && b === 'c7').given, 0.5);
        await undoAll(page, before, 1);
    });
});
