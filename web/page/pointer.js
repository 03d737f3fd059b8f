// Mouse, pen and wheel. Fingers have a file of their own: touch.js.

const sources = { mouse: 0, touch: 1, pen: 2 };

// Bits of MouseEvent.buttons against the program's numbers; back and forward stay the browser's.
const mouseButtons = [
    { bit: 1, number: 0 },
    { bit: 2, number: 1 },
    { bit: 4, number: 2 },
];

// A notch of the wheel is 1 in the program.
const wheelUnits = [1 / 100, 1 / 3, 80]; // by deltaMode: pixels, lines, pages
const mostWheel = 10; // what one event may scroll

function listenToPointer(canvas, program, view, focus, keys) {
    const touch = makeTouch(program, view, focus);
    let pressed = 0;

    function place(event) {
        program.pointer(event.clientX, event.clientY, sources[event.pointerType] || 0);
    }

    // Only the first button pressed makes a pointerdown; the others show in `buttons` of a pointermove.
    function buttons(event) {
        const source = sources[event.pointerType] || 0;
        for (const { bit, number } of mouseButtons) {
            if ((pressed ^ event.buttons) & bit) {
                program.button(number, (event.buttons & bit) !== 0, source);
            }
        }
        const changed = ((pressed ^ event.buttons) & 7) !== 0;
        pressed = event.buttons & 7;
        return changed;
    }

    function mouse(event) {
        keys.modifiers(event);
        place(event);
        if (buttons(event)) {
            // At once, so that the focus and the clipboard follow inside the person's event.
            program.settle();
            focus.follow();
        }
        view.poke();
    }

    function letGo() {
        pressed = 0;
        program.pointerGone();
        mouseButtons.forEach(({ number }) => program.button(number, false, 0));
        view.poke();
    }

    const byKind = (onTouch, onMouse) => (event) =>
        event.pointerType === 'touch' ? onTouch(event) : onMouse(event);

    canvas.addEventListener('pointerdown', (event) => {
        canvas.setPointerCapture(event.pointerId);
        focus.take();
        byKind(touch.down, mouse)(event);
    });
    canvas.addEventListener('pointermove', byKind(touch.move, mouse));
    canvas.addEventListener('pointerup', byKind(touch.up, mouse));
    canvas.addEventListener('pointercancel', byKind(touch.cancel, letGo));
    canvas.addEventListener('pointerleave', (event) => {
        if (event.pointerType !== 'touch' && pressed === 0) {
            program.pointerGone();
            view.poke();
        }
    });
    // The browser would move the focus, scroll by the middle button, or open its own menu.
    canvas.addEventListener('mousedown', (event) => event.preventDefault());
    canvas.addEventListener('contextmenu', (event) => event.preventDefault());

    canvas.addEventListener(
        'wheel',
        (event) => {
            if (event.ctrlKey) {
                return; // the browser's zoom
            }
            event.preventDefault();
            keys.modifiers(event);
            place(event);
            const limit = (delta) => {
                const notches = -delta * wheelUnits[event.deltaMode];
                return Math.max(-mostWheel, Math.min(mostWheel, notches));
            };
            let x = limit(event.deltaX);
            let y = limit(event.deltaY);
            if (event.shiftKey && y === 0) {
                // Some browsers turn Shift and the wheel into a sideways one; the program does that itself.
                [x, y] = [0, x];
            }
            program.wheel(x, y);
            view.poke();
        },
        { passive: false }
    );

    return { letGo };
}
