// Files going out and coming in. Tried on the probe; its "Save a file" saves the title.

import assert from 'node:assert/strict';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

import { probeFile } from './browsers.mjs';
import { inEachBrowser } from './each_browser.mjs';

// The browser's own dialog is out of every driver's reach: what it gives the page is played here.
const playPicker = (mode) => {
    window.written = [];
    window.showSaveFilePicker = async (options) => {
        window.asked = options;
        if (mode === 'cancelled') {
            throw new DOMException('closed', 'AbortError');
        }
        if (mode === 'refused') {
            throw new DOMException('not now', 'NotAllowedError');
        }
        return {
            createWritable: async () => {
                if (mode === 'read-only') {
                    throw new DOMException('read-only disk', 'NoModificationAllowedError');
                }
                return { write: async (text) => window.written.push(text), close: async () => {} };
            },
            getFile: async () => new Blob([mode === 'bad disk' ? 'something else' : window.written.join('')]),
        };
    };
};

inEachBrowser('files', (test, name) => {
    const saveWith = async (open, mode) => {
        const page = await open({ path: probeFile, savePicker: true, before: [[playPicker, mode]] });
        await page.enter({ label: 'Title' }, 'Größe');
        await page.click({ label: 'Save a file' });
        return page;
    };

    test('without a dialog to save with, a download: its name is dated and safe', async (open, browser) => {
        const page = await open({ path: probeFile });
        await page.enter({ label: 'Title' }, 'Größe');
        await page.click({ label: 'Save a file' });
        await page.findValue('file', 'saved');
        const file = await browser.download(/^probe/);
        assert.match(file, /probe- a-b \d{4}-\d\d-\d\d \d{6}\.decision\.json$/);
        assert.equal(readFileSync(file, 'utf8'), 'Größe');
    });

    test('the dialog is offered a name, and the file is read back', async (open) => {
        const page = await saveWith(open, 'good');
        await page.findValue('file', 'saved');
        assert.deepEqual(await page.tab.evaluate(() => window.written), ['Größe']);
        assert.deepEqual(await page.tab.evaluate(() => window.asked), {
            suggestedName: 'probe- a-b.decision.json',
            types: [{ accept: { 'application/json': ['.json'] } }],
        });
    });

    test('a dialog that is closed is no fault', async (open) => {
        const page = await saveWith(open, 'cancelled');
        await page.findValue('file', 'cancelled');
    });

    test('a dialog that is refused becomes a download', async (open, browser) => {
        const page = await saveWith(open, 'refused');
        await page.findValue('file', 'saved');
        await browser.download(/^probe/);
        assert.deepEqual(await page.tab.evaluate(() => window.written), []);
    });

    test('a file that cannot be written, or reads back otherwise, is told in words', async (open) => {
        const readOnly = await saveWith(open, 'read-only');
        await readOnly.find({ label: 'file', value: /could not be written \(NoModificationAllowedError: read-only disk\)/ });
        const badDisk = await saveWith(open, 'bad disk');
        await badDisk.find({ label: 'file', value: /does not hold what was written/ });
    });

    test('a picked file is read', async (open) => {
        const folder = mkdtempSync(join(tmpdir(), 'steelyard-files-'));
        try {
            const file = join(folder, 'wäge #1.decision.json');
            writeFileSync(file, '\ufeff{"a": 1}');
            const page = await open({ path: probeFile });
            await page.openFile({ label: 'Open a file' }, file);
            await page.findValue('opened', 'wäge #1.decision.json, 11 bytes: \ufeff{"a": 1}');
            // The same one again.
            writeFileSync(file, '{}');
            await page.openFile({ label: 'Open a file' }, file);
            await page.findValue('opened', 'wäge #1.decision.json, 2 bytes: {}');
        } finally {
            rmSync(folder, { recursive: true });
        }
    });

    // Synthesised events: drivers drag no files.
    test('a dropped and a pasted file are read, a huge one only as far as it is refused', async (open) => {
        const page = await open({ path: probeFile });
        const give = (kind, fileName, size) =>
            page.tab.evaluate(
                (type, called, length) => {
                    const data = new DataTransfer();
                    data.items.add(new File(['x'.repeat(length)], called));
                    const event = new Event(type, { bubbles: true, cancelable: true });
                    Object.defineProperty(event, type === 'paste' ? 'clipboardData' : 'dataTransfer', { value: data });
                    return document.getElementById('picture').dispatchEvent(event);
                },
                kind, fileName, size
            );
        assert.equal(await give('drop', 'dropped.json', 3), false);
        await page.findValue('opened', 'dropped.json, 3 bytes: xxx');
        assert.equal(await give('paste', 'pasted.json', 2), false);
        await page.findValue('opened', 'pasted.json, 2 bytes: xx');
        await give('drop', 'huge.json', 20 * 1024 * 1024);
        await page.find({ label: 'opened', value: /^huge\.json, 16777217 bytes/ });
    });
});
