// How a browser test is declared: `inEachBrowser('name', async (browser) => …)` runs once in Chromium and once in
// Firefox, in a browser that the tests of one file share, each test in tabs of its own.

import { after, before, describe, it } from 'node:test';

import { browserNames, startBrowser } from './browsers.mjs';
import { openPage } from './page.mjs';

/// `declare(test, browserName)`: test(name, action) declares a test; action gets `open`, which opens a page that is
/// checked to have been quiet and closed after the test; `quiet: false` leaves the check out. Nothing is kept from
/// one test to the next.
export function inEachBrowser(title, declare) {
    for (const name of browserNames) {
        describe(title + ' in ' + name, () => {
            let browser;
            before(async () => {
                browser = await startBrowser(name);
            });
            after(() => browser?.close());

            const test = (what, action) =>
                it(what, { timeout: 120000 }, async () => {
                    const context = await browser.newContext();
                    const pages = [];
                    const open = async ({ quiet = true, ...options } = {}) => {
                        const page = await openPage(browser, { context, ...options });
                        pages.push({ page, quiet });
                        return page;
                    };
                    try {
                        await action(open, browser);
                        for (const { page, quiet } of pages) {
                            if (quiet && !page.tab.isClosed()) {
                                await page.assertQuiet();
                            }
                        }
                    } finally {
                        await context.close();
                    }
                });
            declare(test, name);
        });
    }
}
