// The page as a person has it in front of them: opened from a file in a real browser, acted on with the mouse and the
// keyboard, read through window.steelyard. Every test uses this; see browsers.mjs for how the browsers are started.

import assert from 'node:assert/strict';
import { pathToFileURL } from 'node:url';

import { pageFile, until } from './browsers.mjs';

// Runs in the page before its own scripts.
function collectViolations() {
    window.violations = [];
    document.addEventListener('securitypolicyviolation', (event) => {
        window.violations.push(event.violatedDirective + ' ' + event.blockedURI + ' ' + event.sample);
    });
}

// Browsers ask for a place in a dialog that no driver reaches: without it the page downloads.
function removeSavePicker() {
    delete window.showSaveFilePicker;
}

/// Options: path (the file; the built page), width, height, density (0: the browser's own window), before
/// (functions that run in the page before its scripts, each a function or [function, argument]), savePicker (true
/// keeps the dialog), waitForStart (false: not), context (tabs of one context share what is kept).
export async function openPage(browser, options = {}) {
    const tab = await (options.context ?? browser.puppeteer).newPage();
    const page = new SteelyardPage(browser, tab, pathToFileURL(options.path ?? pageFile).href);
    await page.open(options);
    return page;
}

class SteelyardPage {
    constructor(browser, tab, url) {
        this.browser = browser;
        this.tab = tab;
        this.url = url;
        this.complaints = [];
        this.requests = [];
        tab.on('console', (message) => {
            if (message.type() === 'error' || message.type() === 'warn') {
                this.complaints.push(message.type() + ': ' + message.text());
            }
        });
        tab.on('pageerror', (error) => this.complaints.push('exception: ' + error));
        tab.on('request', (request) => this.requests.push(request.url()));
        tab.on('dialog', (dialog) => {
            this.lastDialog = dialog.type();
            dialog.accept();
        });
    }

    async open({ width = 1280, height = 720, density = 1, before = [], savePicker = false, waitForStart = true } = {}) {
        if (density > 0) {
            await this.resize(width, height, density);
        }
        const scripts = [collectViolations, ...(savePicker ? [] : [removeSavePicker]), ...before];
        for (const script of scripts) {
            await this.tab.evaluateOnNewDocument(...[script].flat());
        }
        await this.tab.goto(this.url);
        if (waitForStart) {
            await this.idle();
        }
    }

    resize(width, height, density = 1) {
        return this.tab.setViewport({ width, height, deviceScaleFactor: density });
    }

    /// Until nothing is pending: input, frames, saving.
    async idle() {
        await until('the page to be idle', () => this.tab.evaluate(() => window.steelyard?.idle ?? false));
    }

    async reload() {
        await this.tab.reload();
        await this.idle();
    }

    front() {
        return this.tab.bringToFront();
    }

    /// Nothing on the console, nothing against the policy, no request but the file itself. Call it at the end of
    /// every test.
    async assertQuiet() {
        const violations = await this.tab.evaluate(() => window.violations);
        assert.deepEqual(violations, [], 'the policy was violated');
        assert.deepEqual(this.complaints, [], 'the console is not empty');
        const inside = (url) => url === this.url || url.startsWith('data:') || url.startsWith('blob:');
        assert.deepEqual(this.requests.filter((url) => !inside(url)), [], 'something was requested');
    }

    async close() {
        await this.tab.close({ runBeforeUnload: false });
    }

    // ---- What is on the screen ----

    items() {
        return this.tab.evaluate(() => window.steelyard.items());
    }

    frame() {
        return this.tab.evaluate(() => window.steelyard.frame);
    }

    results() {
        return this.tab.evaluate(() => window.steelyard.results());
    }

    /// The visible items that have all these members, for instance { label, role, room }. A member may be a RegExp.
    async all(wanted) {
        const fits = (item) =>
            Object.entries(wanted).every(([name, value]) =>
                value instanceof RegExp ? value.test(item[name]) : item[name] === value
            );
        return (await this.items()).filter((item) => item.visible && fits(item));
    }

    /// The first such item, waited for.
    find(wanted) {
        const name = JSON.stringify(wanted, (key, value) => (value instanceof RegExp ? String(value) : value));
        return until('an item like ' + name, async () => (await this.all(wanted))[0]);
    }

    /// Until an item with this label has this value.
    findValue(label, value) {
        return this.find({ label, value });
    }

    /// The item like `wanted` that stands in the same line as another, for instance the button beside a name.
    async findBeside(other, wanted) {
        const { y, h } = await this.find(other);
        const name = JSON.stringify(wanted) + ' beside ' + JSON.stringify(other);
        const inLine = (item) => item.y < y + h && item.y + item.h > y;
        return until('an item like ' + name, async () => (await this.all(wanted)).find(inLine));
    }

    async value(label, role) {
        return (await this.find(role ? { label, role } : { label })).value;
    }

    /// The colours of some device pixels, [red, green, blue, alpha] each.
    pixels(x, y, width, height) {
        return this.tab.evaluate(
            (...box) => Array.from(document.getElementById('picture').getContext('2d').getImageData(...box).data),
            x, y, width, height
        );
    }

    // ---- The mouse ----

    middle(item) {
        return { x: item.x + item.w / 2, y: item.y + item.h / 2 };
    }

    async itemOf(wanted) {
        return 'x' in wanted ? wanted : this.find(wanted);
    }

    /// `wanted`: an item, or what to find it by.
    async click(wanted, options = {}) {
        const { x, y } = this.middle(await this.itemOf(wanted));
        await this.tab.mouse.move(x, y);
        await this.tab.mouse.click(x, y, options);
        await this.idle();
    }

    async hover(wanted) {
        const { x, y } = this.middle(await this.itemOf(wanted));
        await this.tab.mouse.move(x, y);
        await this.idle();
    }

    /// Drags from one place to another, in CSS pixels.
    async drag(from, to, steps = 12) {
        await this.tab.mouse.move(from.x, from.y);
        await this.tab.mouse.down();
        await this.tab.mouse.move(to.x, to.y, { steps });
        await this.tab.mouse.up();
        await this.idle();
    }

    async wheel(wanted, deltaY) {
        await this.hover(wanted);
        await this.tab.mouse.wheel({ deltaY });
        await this.idle();
    }

    /// Presses something that asks for a file, and gives it this one.
    async openFile(wanted, file) {
        const { x, y } = this.middle(await this.itemOf(wanted));
        const asked = this.tab.waitForFileChooser();
        await this.tab.evaluate(() => 0); // the browser takes orders in turn: from here on it hands choosers over
        await this.tab.mouse.click(x, y);
        const chooser = await asked;
        await chooser.accept([file]);
        await this.idle();
    }

    /// Turns the wheel over something until an item comes into view, and gives it.
    async scrollTo(wanted, over) {
        for (let turns = 0; turns < 40; ++turns) {
            const [found] = await this.all(wanted);
            if (found) {
                return found;
            }
            await this.wheel(over, 120);
        }
        return this.find(wanted);
    }

    // ---- The keyboard ----

    /// A key or several at once: 'Enter', 'Control+Z', 'Control+Shift+Z', 'Shift+Tab'. Names as in puppeteer's
    /// KeyInput.
    async press(keys) {
        const names = keys.split('+');
        const last = names.pop();
        for (const name of names) {
            await this.tab.keyboard.down(name);
        }
        await this.tab.keyboard.press(names.length > 0 && /^[A-Z]$/.test(last) ? 'Key' + last : last);
        for (const name of names.reverse()) {
            await this.tab.keyboard.up(name);
        }
        await this.idle();
    }

    async type(text) {
        await this.tab.keyboard.type(text);
        await this.idle();
    }

    /// Puts a text into a field in place of what is there, and ends with Enter.
    async enter(wanted, text) {
        await this.click(wanted);
        await this.press('Control+A');
        await this.type(text);
        await this.press('Enter');
    }

    /// Ctrl and C, X or V. Chromium takes the clipboard's commands from the driver only beside the key.
    async clipboardKey(letter, command) {
        await this.tab.keyboard.down('Control');
        const commands = this.browser.name === 'chromium' ? { commands: [command] } : {};
        await this.tab.keyboard.down('Key' + letter, commands);
        await this.tab.keyboard.up('Key' + letter);
        await this.tab.keyboard.up('Control');
        await this.idle();
    }

    copy() {
        return this.clipboardKey('C', 'Copy');
    }

    cut() {
        return this.clipboardKey('X', 'Cut');
    }

    paste() {
        return this.clipboardKey('V', 'Paste');
    }
}
