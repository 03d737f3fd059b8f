// Debian's Chromium and Firefox, headless, without graphics acceleration, each with a profile of its own.

import { spawnSync } from 'node:child_process';
import { mkdtempSync, readdirSync, renameSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';

import puppeteer from 'puppeteer-core';

// STEELYARD_PAGES names another folder of built pages.
function builtPage(name) {
    const folder = process.env.STEELYARD_PAGES ?? fileURLToPath(new URL('../../build/web', import.meta.url));
    return join(folder, name + '.html');
}

export const patience = 30000; // milliseconds; what is waited for takes a fraction of a second

/// Waits for a value that counts as true, and gives it.
export async function until(what, condition) {
    const end = Date.now() + patience;
    for (;;) {
        const value = await condition();
        if (value) {
            return value;
        }
        if (Date.now() > end) {
            throw new Error('waited in vain for ' + what);
        }
        await new Promise((resolve) => setTimeout(resolve, 15));
    }
}

/// The release file: what is built is what is tested.
export const pageFile = builtPage('steelyard');

/// The page around a shell that only shows what the page does for it (probe/probe.cpp).
export const probeFile = builtPage('probe');

/// The native command, for comparing what the page saves and shows.
export const nativeCommand = fileURLToPath(new URL('../../build/native/steelyard', import.meta.url));

export const browserNames = (process.env.STEELYARD_BROWSERS ?? 'chromium,firefox').split(',');

const chromiumArguments = [
    '--no-sandbox', '--disable-quic', '--no-first-run', '--disable-background-networking', '--disable-component-update',
    '--disable-sync', '--disable-gpu',
];

function firefoxPreferences(downloads) {
    return {
        // The driver would give all files one origin; people's browsers do not.
        'security.fileuri.strict_origin_policy': true,
        'gfx.webrender.software': true,
        'layers.acceleration.disabled': true,
        'browser.download.folderList': 2,
        'browser.download.dir': downloads,
        'browser.download.useDownloadDir': true,
        'browser.download.alwaysOpenPanel': false,
        'browser.helperApps.neverAsk.saveToDisk': 'application/json,text/csv,text/html,text/plain',
    };
}

const downloadTo = (folder) => ({ policy: 'allow', downloadPath: folder });

/// Starts a browser. `preferences`: further ones for Firefox; `args`: further ones for Chromium.
export async function startBrowser(name, { preferences = {}, args = [] } = {}) {
    const downloads = mkdtempSync(join(tmpdir(), 'steelyard-downloads-'));
    const common = { headless: true, defaultViewport: null, downloadBehavior: downloadTo(downloads) };
    const started =
        name === 'firefox'
            ? await puppeteer.launch({
                  ...common,
                  browser: 'firefox',
                  executablePath: '/usr/bin/firefox-esr',
                  extraPrefsFirefox: { ...firefoxPreferences(downloads), ...preferences },
              })
            : await puppeteer.launch({
                  ...common,
                  browser: 'chrome',
                  executablePath: '/usr/bin/chromium',
                  args: [...chromiumArguments, ...args],
              });
    return new Browser(name, started, downloads);
}

class Browser {
    constructor(name, started, downloads) {
        this.name = name;
        this.puppeteer = started;
        this.downloads = downloads;
        this.taken = mkdtempSync(join(tmpdir(), 'steelyard-taken-'));
    }

    /// A profile of its own within the browser.
    newContext() {
        return this.puppeteer.createBrowserContext({ downloadBehavior: downloadTo(this.downloads) });
    }

    /// The path of the one downloaded file with such a name, waited for, and removed before the next.
    async download(pattern) {
        const finished = () => {
            const names = readdirSync(this.downloads);
            // Beside a file still being written stands its unfinished part.
            return names.some((name) => /\.(crdownload|part)$/.test(name)) ? [] : names.filter((name) => pattern.test(name));
        };
        const [name] = await until('a download like ' + pattern, () => (finished().length > 0 ? finished() : null));
        const taken = join(this.taken, name);
        renameSync(join(this.downloads, name), taken);
        return taken;
    }

    /// Puts a text on the clipboard as a person does: typed somewhere else, marked, copied.
    async fillClipboard(text) {
        const tab = await this.puppeteer.newPage();
        await tab.evaluate((value) => {
            const area = document.body.appendChild(document.createElement('textarea'));
            area.value = value;
            area.select();
        }, text);
        await tab.keyboard.down('Control');
        await tab.keyboard.down('KeyC', this.name === 'chromium' ? { commands: ['Copy'] } : {});
        await tab.keyboard.up('KeyC');
        await tab.keyboard.up('Control');
        await tab.close();
    }

    /// What is on the clipboard, pasted somewhere else.
    async readClipboard() {
        const tab = await this.puppeteer.newPage();
        await tab.evaluate(() => document.body.appendChild(document.createElement('textarea')).focus());
        await tab.keyboard.down('Control');
        await tab.keyboard.down('KeyV', this.name === 'chromium' ? { commands: ['Paste'] } : {});
        await tab.keyboard.up('KeyV');
        await tab.keyboard.up('Control');
        const text = await tab.evaluate(() => document.querySelector('textarea').value);
        await tab.close();
        return text;
    }

    async close() {
        await this.puppeteer.close();
        for (const folder of [this.downloads, this.taken]) {
            rmSync(folder, { recursive: true, force: true });
        }
    }
}

/// What the native command makes of a decision file.
export function solveNatively(file) {
    const ran = spawnSync(nativeCommand, ['solve', file], { encoding: 'utf8', maxBuffer: 64 * 1024 * 1024 });
    if (ran.status !== 0) {
        throw new Error('steelyard solve: ' + ran.stderr);
    }
    return JSON.parse(ran.stdout);
}
