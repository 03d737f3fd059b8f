// The release file: that it starts from wherever it lies, quietly, and that every failed start is told in words.

import assert from 'node:assert/strict';
import { copyFileSync, mkdirSync, mkdtempSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { dirname, join } from 'node:path';

import { pageFile, probeFile, until } from './browsers.mjs';
import { inEachBrowser } from './each_browser.mjs';

/// Copies the page to a folder of its own for as long as `use` runs; `change` gets its text and gives another.
async function withCopy(name, use, change = null) {
    const folder = mkdtempSync(join(tmpdir(), 'steelyard-page-'));
    try {
        const file = join(folder, name);
        mkdirSync(dirname(file), { recursive: true });
        if (change) {
            writeFileSync(file, change(readFileSync(pageFile, 'utf8')));
        } else {
            copyFileSync(pageFile, file);
        }
        await use(file);
    } finally {
        rmSync(folder, { recursive: true });
    }
}

/// The error box, once it shows.
const faultBox = (page) =>
    until('the error box', () =>
        page.tab.evaluate(() => {
            const box = document.getElementById('fault');
            return box && !box.hidden ? box.innerText : null;
        })
    );

inEachBrowser('the start', (test, name) => {
    test('starts quietly: no word on the console, no request but the file', async (open) => {
        const page = await open();
        assert.match(await page.tab.title(), /Parts washer for cell 7/);
        assert.ok((await page.items()).length > 20);
        assert.equal(await page.tab.evaluate(() => document.getElementById('start')), null);
    });

    for (const file of ['a page.html', 'with # and ? and %20.html', 'Größe/Wäge käse.html', 'renamed.htm']) {
        test('starts as ' + file, async (open) => {
            await withCopy(file, async (path) => {
                const page = await open({ path });
                assert.ok((await page.items()).length > 20);
            });
        });
    }

    test('starts narrow and in forced colours', async (open) => {
        const page = await open({ width: 360, height: 640 });
        if (name === 'chromium') {
            const driver = await page.tab.createCDPSession();
            await driver.send('Emulation.setEmulatedMedia', { features: [{ name: 'forced-colors', value: 'active' }] });
        }
        await page.reload();
        assert.ok((await page.items()).length > 20);
    });

    test('what tests may read cannot be changed and gives no way in', async (open) => {
        const page = await open();
        const [names, changed, results] = await page.tab.evaluate(() => {
            window.steelyard = 1;
            try {
                window.steelyard.items = 2;
            } catch {
                // refused, as it should be
            }
            return [
                Object.getOwnPropertyNames(window.steelyard).sort(),
                typeof window.steelyard.items,
                JSON.parse(window.steelyard.results()).format,
            ];
        });
        assert.deepEqual(names, ['frame', 'idle', 'items', 'results']);
        assert.equal(changed, 'function');
        assert.equal(results, 'steelyard-results');
        const item = (await page.items())[0];
        const members = ['id', 'room', 'label', 'role', 'value', 'x', 'y', 'w', 'h', 'enabled', 'focused', 'visible'];
        assert.deepEqual(Object.keys(item).sort(), members.sort());
    });

    test('the policy stands first and holds', async (open) => {
        const page = await open({ quiet: false });
        const policy = await page.tab.evaluate(
            () => document.head.querySelector('meta[http-equiv]').getAttribute('content')
        );
        assert.match(
            policy,
            new RegExp(
                "^default-src 'none'; script-src 'sha256-[^' ]+' 'sha256-[^' ]+' 'wasm-unsafe-eval'; style-src 'sha256-[^' ]+'; " +
                    "img-src data: blob:; base-uri 'none'; form-action 'none'; require-trusted-types-for 'script'; trusted-types 'none'$"
            )
        );
        const head = readFileSync(pageFile, 'utf8').slice(0, 400);
        assert.ok(head.indexOf('Content-Security-Policy') < head.indexOf('<style') || !head.includes('<style'));
        const reached = await page.tab.evaluate(async () => {
            // A task of the page's own: inside the driver's one, Chromium lets evaluation pass.
            await new Promise((resolve) => setTimeout(resolve));
            const tries = {
                inline: () => document.body.appendChild(document.createElement('script')).append('window.got = true'),
                markup: () => (document.body.innerHTML += '<img src=x onerror="window.got = true">'),
                network: () => fetch('https://example.org/'),
                evaluation: () => (0, eval)('window.got = true'),
            };
            for (const attempt of Object.values(tries)) {
                try {
                    await attempt();
                } catch {
                    // refused
                }
            }
            return window.got ?? false;
        });
        assert.equal(reached, false);
    });

    test('the file is as small as promised', () => {
        assert.ok(statSync(pageFile).size <= 1000000);
    });

    const broken = { quiet: false, waitForStart: false };
    const failures = {
        'no DecompressionStream': [() => delete window.DecompressionStream, /cannot unpack the program/, /newer browser/],
        'no WebAssembly': [() => delete window.WebAssembly, /runs no WebAssembly/, /newer browser/],
        'WebAssembly without what the program needs': [
            () => (WebAssembly.instantiate = () => Promise.reject(new WebAssembly.CompileError('no such instruction'))),
            /cannot run the program/, /CompileError: no such instruction/,
        ],
        'no picture': [() => (HTMLCanvasElement.prototype.getContext = () => null), /did not expect/, /Reload/],
        'no ResizeObserver': [() => delete window.ResizeObserver, /did not expect/, /ResizeObserver/],
    };
    for (const [what, [before, sentence, detail]] of Object.entries(failures)) {
        test('a failed start is told in words: ' + what, async (open) => {
            const page = await open({ ...broken, before: [before] });
            const told = await faultBox(page);
            assert.match(told, /^Steelyard (could not start|stopped)/);
            assert.match(told, sentence);
            assert.match(told, detail);
        });
    }

    test('a failed start is told in words: a damaged program', async (open) => {
        await withCopy(
            'damaged.html',
            async (path) => {
                const told = await faultBox(await open({ ...broken, path }));
                assert.match(told, /damaged or changed on its way/);
                assert.match(told, /SHA-256/);
            },
            (text) => text.replace(/(id="wasm">.{2000}).{400}/, '$1' + 'A'.repeat(400))
        );
    });

    // Nothing of ours runs then: the message that stands in the page itself has to say it.
    test('a failed start is told in words: a changed script', async (open) => {
        await withCopy(
            'changed.html',
            async (path) => {
                const page = await open({ ...broken, path });
                await until('the late message', () =>
                    page.tab.evaluate(() => getComputedStyle(document.querySelector('#start .late')).visibility === 'visible')
                );
                const told = await page.tab.evaluate(() => document.getElementById('start').innerText);
                assert.match(told, /changed on its way here/);
            },
            (text) => text.replace(/'use strict'/g, '"use strict"')
        );
    });

    // The second script does not parse, the first does: as in a browser that is too old for its language.
    test('a failed start is told in words: a script that is not understood', async (open) => {
        await withCopy(
            'older.html',
            async (path) => {
                const told = await faultBox(await open({ ...broken, path }));
                assert.match(told, /^Steelyard could not start/);
                assert.match(told, /SyntaxError/);
            },
            (text) =>
                text
                    .replace('async function start()', 'sync function start()')
                    .replace(/script-src [^;]*;/, "script-src 'unsafe-inline' 'wasm-unsafe-eval';")
        );
    });

    test('an error later on stops the program with its reason; what was kept is kept', async (open) => {
        const page = await open({ path: probeFile });
        await page.enter({ label: 'Title' }, 'kept');
        await page.findValue('stored', 'revision 1');
        const { x, y } = page.middle(await page.find({ label: 'Throw' }));
        await page.tab.mouse.click(x, y);
        const told = await faultBox(page);
        assert.match(told, /^Steelyard stopped/);
        assert.match(told, /thrown on purpose/);
        await page.reload();
        assert.equal(await page.value('Title'), 'kept');
    });
});
