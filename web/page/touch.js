// Fingers: one presses and drags, held still it opens the context menu, two scroll.

const holdTime = 550; // milliseconds
const holdSlack = 10; // CSS pixels that a finger held still may wander
const pixelsPerNotch = 80; // a notch scrolls five lines of 16 px: what is under the fingers stays there

function makeTouch(program, view, focus) {
    const source = 1;
    const fingers = new Map();
    let gesture = 'none'; // none, press, scroll, over
    let timer = 0;
    let start = null;

    function step() {
        program.settle();
        focus.follow();
        view.poke();
    }

    // Lets go without a click: off the item first.
    function takeBack() {
        timer = clearTimeout(timer);
        program.pointerGone();
        program.button(0, false, source);
        program.settle();
    }

    function held() {
        takeBack();
        gesture = 'over';
        program.pointer(start.x, start.y, source);
        program.button(1, true, source);
        program.button(1, false, source);
        step();
    }

    function middle() {
        let x = 0;
        let y = 0;
        for (const finger of fingers.values()) {
            x += finger.x / fingers.size;
            y += finger.y / fingers.size;
        }
        return { x, y };
    }

    const at = (event) => ({ x: event.clientX, y: event.clientY });

    function down(event) {
        fingers.set(event.pointerId, at(event));
        if (fingers.size === 1) {
            gesture = 'press';
            start = at(event);
            timer = setTimeout(held, holdTime);
            program.pointer(start.x, start.y, source);
            program.button(0, true, source);
            step();
        } else if (fingers.size === 2 && gesture === 'press') {
            takeBack();
            gesture = 'scroll';
            start = middle();
            program.pointer(start.x, start.y, source);
            step();
        }
    }

    function move(event) {
        if (!fingers.has(event.pointerId)) {
            return;
        }
        fingers.set(event.pointerId, at(event));
        if (gesture === 'press') {
            if (Math.hypot(event.clientX - start.x, event.clientY - start.y) > holdSlack) {
                timer = clearTimeout(timer);
            }
            program.pointer(event.clientX, event.clientY, source);
        } else if (gesture === 'scroll') {
            const now = middle();
            program.wheel((now.x - start.x) / pixelsPerNotch, (now.y - start.y) / pixelsPerNotch);
            start = now;
        }
        view.poke();
    }

    function up(event) {
        if (!fingers.delete(event.pointerId)) {
            return;
        }
        timer = clearTimeout(timer);
        if (gesture === 'press') {
            program.pointer(event.clientX, event.clientY, source);
            program.button(0, false, source);
            step();
        }
        gesture = fingers.size > 0 ? 'over' : 'none';
        if (gesture === 'none') {
            program.pointerGone(); // a finger that is gone points at nothing
        }
        view.poke();
    }

    function cancel(event) {
        if (gesture === 'press') {
            takeBack();
            gesture = 'over';
        }
        up(event);
    }

    return { down, move, up, cancel };
}
