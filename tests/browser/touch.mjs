// Fingers. Chromium's driver touches the screen; in Firefox the events are synthesised.

/// Fingers at some places: `kind` is down, move or up; `fingers` are [id, x, y] each.
export async function touch(page, kind, fingers) {
    if (page.browser.name === 'chromium') {
        page.driver ??= await page.tab.createCDPSession();
        page.down ??= new Map();
        for (const [id, x, y] of fingers) {
            kind === 'up' ? page.down.delete(id) : page.down.set(id, { id, x, y });
        }
        const type = { down: 'touchStart', move: 'touchMove', up: 'touchEnd' }[kind];
        await page.driver.send('Input.dispatchTouchEvent', { type, touchPoints: [...page.down.values()] });
    } else {
        await page.tab.evaluate(
            (type, points) => {
                const canvas = document.getElementById('picture');
                canvas.setPointerCapture = () => {}; // refused for pointers that the browser does not know
                for (const [pointerId, clientX, clientY] of points) {
                    const init = { pointerId, clientX, clientY, pointerType: 'touch', bubbles: true, cancelable: true };
                    canvas.dispatchEvent(new PointerEvent(type, { ...init, isPrimary: pointerId === 1 }));
                }
            },
            'pointer' + kind, fingers
        );
    }
}
