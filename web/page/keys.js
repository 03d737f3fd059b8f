// Keys: which are the program's, and which stay the browser's. Text does not come from here (typing.js).

// Keys the program uses by themselves, with Shift, and (those marked) with Ctrl.
const ownKeys = new Map([
    ['Tab', false], ['Enter', true], ['Escape', false], ['Backspace', true], ['Delete', true], ['Insert', false], ['F2', false],
    ['ArrowLeft', true], ['ArrowRight', true], ['ArrowUp', true], ['ArrowDown', true],
    ['Home', true], ['End', true], ['PageUp', false], ['PageDown', false],
]);

// With Ctrl, on macOS with Cmd: undo, redo, save, open, select all; redo also as Shift and Z.
const ownShortcuts = new Set(['z', 'y', 's', 'o', 'a']);
const ownShiftedShortcuts = new Set(['z']);

const modifierKeys = new Set(['Control', 'Shift', 'Alt', 'Meta', 'AltGraph']);

const onMac = /mac|iphone|ipad/i.test(
    (navigator.userAgentData && navigator.userAgentData.platform) || navigator.platform || ''
);

// The letter that a shortcut means, where the layout has no Latin one by the place of the key.
function shortcutLetter(event) {
    const key = event.key.toLowerCase();
    if (/^[a-z]$/.test(key)) {
        return key;
    }
    const place = /^Key([A-Z])$/.exec(event.code);
    return place ? place[1].toLowerCase() : '';
}

// 'program': for the program alone. 'text': the program sees the key, the browser makes text of it. 'modifier'.
// 'browser'.
function whoseKey(event, typing) {
    if (modifierKeys.has(event.key)) {
        return 'modifier';
    }
    const altGraph = event.getModifierState('AltGraph');
    const ctrl = event.ctrlKey && !altGraph;
    const alt = event.altKey && !altGraph;
    const shortcut = onMac ? event.metaKey && !ctrl : ctrl && !event.metaKey;
    if (ownKeys.has(event.key)) {
        if (alt) {
            // Moves things, and on macOS by words. The browser's way back by such a key would leave the program.
            return event.key.startsWith('Arrow') && !ctrl && !event.metaKey ? 'program' : 'browser';
        }
        if (ctrl || event.metaKey) {
            return shortcut && ownKeys.get(event.key) ? 'program' : 'browser';
        }
        // Shift and Insert pastes: the browser makes its own event of that.
        return event.key === 'Insert' && event.shiftKey ? 'browser' : 'program';
    }
    if (shortcut && !alt) {
        const own = event.shiftKey ? ownShiftedShortcuts : ownShortcuts;
        return own.has(shortcutLetter(event)) ? 'program' : 'browser';
    }
    if (ctrl || event.metaKey || (alt && !onMac)) {
        return 'browser';
    }
    if ([...event.key].length === 1) {
        // Outside a text field the browser would scroll on a space or search on a slash.
        return typing ? 'text' : 'program';
    }
    return 'browser';
}

function listenToKeys(field, program, view, focus) {
    // Escape and then Tab leaves the picture, for those who cannot use a mouse.
    let leaving = false;

    function modifiers(event) {
        const altGraph = event.getModifierState('AltGraph');
        program.modifiers(event.ctrlKey && !altGraph, event.shiftKey, event.altKey && !altGraph, event.metaKey);
    }

    function down(event) {
        // While an input method composes, keys are its own; 229 is how phones say so.
        if (!focus.ours || event.isComposing || event.keyCode === 229) {
            return;
        }
        modifiers(event);
        const whose = whoseKey(event, document.activeElement === field);
        if (event.key === 'Tab' && leaving) {
            leaving = false;
            return;
        }
        leaving = event.key === 'Escape' || (leaving && whose === 'modifier');
        if (whose === 'browser') {
            view.poke();
            return;
        }
        program.key(event.code, event.key, true);
        if (whose === 'program') {
            event.preventDefault();
            if (!event.repeat) {
                // At once, so that what is typed next goes where this key has led.
                program.settle();
                focus.follow();
            }
        }
        view.poke();
    }

    function up(event) {
        if (!focus.ours) {
            return;
        }
        modifiers(event);
        program.key(event.code, event.key, false);
        view.poke();
    }

    // A key that exists only as an event of a phone's keyboard.
    function tap(key) {
        program.key(key, key, true);
        program.settle();
        program.key(key, key, false);
        program.settle();
        focus.follow();
        view.poke();
    }

    document.addEventListener('keydown', down);
    document.addEventListener('keyup', up);
    return { modifiers, tap };
}
