// The person's input on its way to the program, tried on the probe.

import assert from 'node:assert/strict';

import { inEachBrowser } from './each_browser.mjs';
import { probeFile } from './browsers.mjs';

inEachBrowser('input', (test, name) => {
    test('what is typed arrives, right after the click that opens the field', async (open) => {
        const page = await open({ path: probeFile });
        const field = await page.find({ label: 'Title', role: 'textbox' });
        // No waiting in between: the field takes the keyboard inside the click.
        await page.tab.mouse.click(field.x + 20, field.y + field.h / 2);
        await page.tab.keyboard.type('Größe ≤ 5 µm, Ωmega?');
        await page.idle();
        assert.equal(await page.value('Title'), 'Größe ≤ 5 µm, Ωmega?');
    });

    test('copy, cut and paste go through the real clipboard', async (open, browser) => {
        const page = await open({ path: probeFile });
        await page.enter({ label: 'Title' }, 'balance');
        await page.click({ label: 'Title' });
        await page.press('Control+A');
        await page.copy();
        assert.equal(await page.value('Title'), 'balance');
        assert.equal(await browser.readClipboard(), 'balance');

        await page.front();
        await page.click({ label: 'Title' });
        await page.press('Control+A');
        await page.cut();
        assert.equal(await page.value('Title'), '');
        await page.paste();
        await page.paste();
        assert.equal(await page.value('Title'), 'balancebalance');
    });

    test('copying with nothing marked leaves the clipboard alone', async (open, browser) => {
        await browser.fillClipboard('from elsewhere');
        const page = await open({ path: probeFile });
        await page.copy();
        assert.equal(await browser.readClipboard(), 'from elsewhere');
    });

    test('several lines pasted keep their ends in a field of several lines', async (open, browser) => {
        await browser.fillClipboard('Cost\n  Price\n  Running\nEase');
        const page = await open({ path: probeFile });
        await page.click({ label: 'Notes' });
        await page.paste();
        assert.equal(await page.value('Notes'), 'Cost\n  Price\n  Running\nEase');
    });

    test('text pasted outside a field comes to the shell', async (open, browser) => {
        await browser.fillClipboard('Cost\n  Price');
        const page = await open({ path: probeFile });
        await page.click({ label: 'Count' });
        await page.paste();
        assert.equal(await page.value('pasted'), 'Cost\n  Price');
    });

    test('a button copies by the click alone', async (open, browser) => {
        const page = await open({ path: probeFile });
        await page.enter({ label: 'Title' }, 'poise');
        await page.click({ label: 'Copy' });
        assert.equal(await browser.readClipboard(), 'copied poise');
    });

    test('undo belongs to the field while it is active, to the shell otherwise', async (open) => {
        const page = await open({ path: probeFile });
        await page.click({ label: 'Title' });
        await page.type('ab');
        await page.press('Control+Z');
        assert.equal(await page.value('Title'), 'a');
        assert.equal(await page.value('keys'), '');
        await page.press('Escape');
        await page.press('Control+Z');
        await page.press('Control+Shift+Z');
        await page.press('Control+S');
        await page.press('5');
        assert.equal(await page.value('keys'), 'undo redo save 5 ');
    });

    test('Tab goes from field to field, and text follows it', async (open) => {
        const page = await open({ path: probeFile });
        await page.click({ label: 'Title' });
        await page.tab.keyboard.type('one');
        await page.tab.keyboard.press('Tab');
        await page.tab.keyboard.type('two');
        await page.idle();
        assert.equal(await page.value('Title'), 'one');
        assert.equal(await page.value('Notes'), 'two');
    });

    test('Escape and then Tab leaves the picture', async (open) => {
        const page = await open({ path: probeFile });
        const active = () => page.tab.evaluate(() => document.activeElement.id);
        await page.click({ label: 'Title' });
        assert.equal(await active(), 'typing');
        await page.press('Tab');
        assert.equal(await active(), 'typing');
        await page.press('Escape');
        assert.equal(await active(), 'picture');
        await page.press('Tab');
        assert.notEqual(await active(), 'picture');
        assert.notEqual(await active(), 'typing');
    });

    // Synthesised events: the real keys would reload or leave the page.
    test('the browser keeps its keys', async (open) => {
        const page = await open({ path: probeFile });
        const prevented = (keys) =>
            page.tab.evaluate(
                (all) =>
                    all.filter((key) => {
                        const event = new KeyboardEvent('keydown', { bubbles: true, cancelable: true, ...key });
                        return !document.getElementById('picture').dispatchEvent(event);
                    }).map(({ key }) => key),
                keys
            );
        const ctrl = (key) => ({ key, code: 'Key' + key.toUpperCase(), ctrlKey: true });
        const browsers = [
            ...['F1', 'F3', 'F5', 'F6', 'F11', 'F12'].map((key) => ({ key, code: key })),
            ...['c', 'x', 'v', 'l', 't', 'w', 'n', 'r', 'f', 'p', '+', '-', '0'].map(ctrl),
            { key: 'Tab', code: 'Tab', ctrlKey: true },
            { key: 'F4', code: 'F4', altKey: true },
            { key: 'Insert', code: 'Insert', shiftKey: true },
        ];
        assert.deepEqual(await prevented(browsers), []);
        // Outside a text field Firefox would search on a slash.
        const ours = [...['z', 'y', 's', 'o', 'a'].map(ctrl), { key: '/', code: 'Slash' },
            { key: 'ArrowLeft', code: 'ArrowLeft', altKey: true }, { key: 'Tab', code: 'Tab' }];
        assert.deepEqual(await prevented(ours), ours.map(({ key }) => key));
    });

    test('a slider is dragged with the mouse, past its end too', async (open) => {
        const page = await open({ path: probeFile });
        const { x, y, w, h } = await page.find({ label: 'Weight' });
        await page.drag({ x: x + w / 4, y: y + h / 2 }, { x: x + (3 * w) / 4, y: y + h / 2 });
        const weight = Number(await page.value('Weight'));
        assert.ok(weight > 5 && weight < 8, String(weight));
        await page.drag({ x: x + w / 4, y: y + h / 2 }, { x: 1275, y: y + 300 });
        assert.equal(await page.value('Weight'), '9');
    });

    test('buttons of the mouse: left counts, right opens no menu of the browser', async (open) => {
        const page = await open({
            path: probeFile,
            before: [
                () => window.addEventListener('contextmenu', (event) => (window.menuPrevented = event.defaultPrevented)),
            ],
        });
        await page.click({ label: 'Count' });
        await page.click({ label: 'Count' }, { count: 2 });
        await page.click({ label: 'Count' }, { button: 'right' });
        assert.equal(await page.value('clicks'), '3');
        assert.equal(await page.value('right clicks'), '1');
        assert.equal(await page.tab.evaluate(() => window.menuPrevented), true);
    });

    test('the wheel scrolls what is under the pointer', async (open) => {
        const page = await open({ path: probeFile });
        await page.wheel({ label: 'rows' }, 200);
        const down = Number(await page.value('rows'));
        assert.ok(down > 50, String(down));
        await page.wheel({ label: 'rows' }, -1000);
        assert.equal(await page.value('rows'), '0');
    });

    // Synthesised events: the driver has no pinch, and units other than pixels come from hardware.
    test('the wheel: lines and pages count, Ctrl and the wheel stays the browser’s zoom', async (open) => {
        const page = await open({ path: probeFile });
        const { x, y, w, h } = await page.find({ label: 'rows' });
        const turn = async (init) => {
            const prevented = await page.tab.evaluate(
                (options) => {
                    const event = new WheelEvent('wheel', { bubbles: true, cancelable: true, ...options });
                    return !document.getElementById('picture').dispatchEvent(event);
                },
                { clientX: x + w / 2, clientY: y + h / 2, ...init }
            );
            await page.idle();
            return [prevented, Number(await page.value('rows'))];
        };
        const lines = await turn({ deltaY: 3, deltaMode: 1 });
        assert.ok(lines[0] && lines[1] > 20, String(lines));
        const pages = await turn({ deltaY: 1, deltaMode: 2 });
        assert.ok(pages[1] > lines[1], String(pages));
        const zoom = await turn({ deltaY: -3, deltaMode: 1, ctrlKey: true });
        assert.deepEqual(zoom, [false, pages[1]]);
    });

    test('nothing stays pressed when the page loses the focus', async (open) => {
        const page = await open({ path: probeFile });
        const { x, y, w, h } = await page.find({ label: 'Weight' });
        await page.tab.mouse.move(x + w / 2, y + h / 2);
        await page.tab.mouse.down();
        await page.tab.evaluate(() => document.activeElement.blur());
        await page.idle();
        const before = await page.value('Weight');
        await page.tab.mouse.move(x + 5, y + h / 2, { steps: 4 });
        await page.idle();
        assert.equal(await page.value('Weight'), before);
        await page.tab.mouse.up();
    });

    // Chromium's driver composes as an input method does; in Firefox the events are synthesised in that browser's
    // order.
    test('a composed text arrives once', async (open) => {
        const page = await open({ path: probeFile });
        await page.click({ label: 'Title' });
        if (name === 'chromium') {
            const driver = await page.tab.createCDPSession();
            await driver.send('Input.imeSetComposition', { text: 'に', selectionStart: 1, selectionEnd: 1 });
            await driver.send('Input.imeSetComposition', { text: 'にほ', selectionStart: 2, selectionEnd: 2 });
            assert.equal(await page.value('Title'), '');
            await driver.send('Input.insertText', { text: '日本' });
        } else {
            await page.tab.evaluate(() => {
                const field = document.getElementById('typing');
                const send = (event) => field.dispatchEvent(event);
                send(new CompositionEvent('compositionstart', { bubbles: true }));
                send(new KeyboardEvent('keydown', { key: 'Process', keyCode: 229, bubbles: true, isComposing: true }));
                field.value = 'にほ';
                send(new InputEvent('input', { data: 'にほ', isComposing: true, bubbles: true }));
                field.value = '日本';
                send(new CompositionEvent('compositionend', { data: '日本', bubbles: true }));
                send(new InputEvent('input', { data: '日本', bubbles: true }));
            });
        }
        await page.idle();
        assert.equal(await page.value('Title'), '日本');
    });

    // Synthesised events: no driver has a phone's keyboard.
    test('a phone’s keyboard deletes and ends lines without keys', async (open) => {
        const page = await open({ path: probeFile });
        await page.click({ label: 'Notes' });
        await page.type('abc');
        await page.tab.evaluate(() => {
            const field = document.getElementById('typing');
            for (const inputType of ['deleteContentBackward', 'insertLineBreak']) {
                field.dispatchEvent(new InputEvent('beforeinput', { inputType, bubbles: true, cancelable: true }));
            }
        });
        await page.type('d');
        assert.equal(await page.value('Notes'), 'ab\nd');
    });
});
