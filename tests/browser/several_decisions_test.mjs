// On the release file: nothing that opens, starts or reloads loses another decision, and a store that refuses is no
// secret.

import assert from 'node:assert/strict';

import { inEachBrowser } from './each_browser.mjs';

const menu = async (page, entry) => {
    await page.click({ label: 'File', role: 'combobox' });
    await page.click({ label: entry, role: 'option' });
};

inEachBrowser('several decisions', (test) => {
    test('"Start empty" keeps the one before, and it opens again', async (open) => {
        const page = await open();
        await page.enter({ label: 'Title', role: 'textbox' }, 'The first one');
        await menu(page, 'Start empty');
        await page.findValue('Title', 'Untitled decision');
        await page.enter({ label: 'Title', role: 'textbox' }, 'The second one');
        await menu(page, 'Kept in this browser…');
        const firstOne = { label: 'The first one', role: 'text' };
        await page.click(await page.findBeside(firstOne, { label: 'Open', role: 'button' }));
        await page.find({ label: 'The first one', role: 'text' });
        await page.reload();
        await menu(page, 'Kept in this browser…');
        await page.find({ label: 'The second one' });
        await page.find({ label: 'The first one' });
    });

    test('a half-typed name is there after a reload', async (open) => {
        const page = await open();
        await page.click({ label: 'Author', role: 'textbox' });
        await page.press('Control+A');
        await page.tab.keyboard.type('half typ');
        await page.reload();
        await page.findValue('Author', 'half typ');
    });

    test('a second tab changes nothing of a decision that the first one writes', async (open) => {
        const first = await open();
        await first.enter({ label: 'Title', role: 'textbox' }, 'Ours');
        const second = await open();
        await second.find({ label: /^open for reading only/ });
        await second.find({ label: 'Ours', role: 'text' });
        // Nothing there takes a change.
        assert.deepEqual(await second.all({ role: 'textbox', enabled: true, room: 'frame' }), []);
        await second.press('Control+Z');
        await first.front();
        await first.reload();
        await first.findValue('Title', 'Ours');
    });

    test('a browser that keeps nothing is told in a bar that stays', async (open) => {
        const page = await open({
            before: [() => (IDBFactory.prototype.open = () => { throw new DOMException('no', 'SecurityError'); })],
        });
        await page.enter({ label: 'Title', role: 'textbox' }, 'Kept nowhere');
        await page.find({ label: /refuses its store/, role: 'text' });
    });
});
