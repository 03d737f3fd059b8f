// Text and the clipboard. Text comes from a real field that stands, unseen, at the caret: so dead keys, input
// methods and phone keyboards work.

function listenToTyping(field, program, view, focus, keys) {
    // A composition ends with `input` before `compositionend` in one browser and after it in another: both come
    // here, and the second finds nothing.
    function harvest() {
        const typed = field.value;
        field.value = '';
        if (typed) {
            program.text(typed);
            view.poke();
        }
    }

    field.addEventListener('input', (event) => {
        if (!event.isComposing) {
            harvest();
        }
    });
    field.addEventListener('compositionstart', () => field.classList.add('composing'));
    field.addEventListener('compositionend', () => {
        field.classList.remove('composing');
        harvest();
    });
    // Phone keyboards send these without a key; the field itself is empty, the text is the program's.
    field.addEventListener('beforeinput', (event) => {
        const key = {
            deleteContentBackward: 'Backspace',
            deleteContentForward: 'Delete',
            insertLineBreak: 'Enter',
            insertParagraph: 'Enter',
        }[event.inputType];
        if (key && !event.isComposing) {
            event.preventDefault();
            keys.tap(key);
        }
    });
    field.addEventListener('blur', () => {
        field.classList.remove('composing');
        field.value = '';
    });

    return {
        setCaret(x, y, lineHeight) {
            field.style.left = Math.max(0, Math.min(x, window.innerWidth - 2)) + 'px';
            field.style.top = Math.max(0, Math.min(y, window.innerHeight - lineHeight)) + 'px';
            field.style.height = lineHeight + 'px';
        },
    };
}

// The clipboard's events carry the text, so they are answered at once and need no permission.
function listenToClipboard(program, view, focus, openFile) {
    let offered = null; // a text of ours that goes out with the copy event that we ask for ourselves

    function give(event, cut) {
        let text = offered;
        if (text === null) {
            if (!focus.ours) {
                return;
            }
            text = program.copy(cut);
            focus.follow();
            view.poke();
        }
        if (text !== null) {
            event.clipboardData.setData('text/plain', text);
            event.preventDefault();
        }
    }

    document.addEventListener('copy', (event) => give(event, false));
    document.addEventListener('cut', (event) => give(event, true));
    document.addEventListener('paste', (event) => {
        if (!focus.ours) {
            return;
        }
        event.preventDefault();
        if (event.clipboardData.files.length > 0) {
            openFile(event.clipboardData.files[0]);
            return;
        }
        program.paste(event.clipboardData.getData('text/plain'));
        focus.follow();
        view.poke();
    });

    function copyByEvent(text) {
        offered = text;
        document.execCommand('copy');
        offered = null;
    }

    return {
        copyText(text) {
            if (navigator.clipboard && navigator.clipboard.writeText) {
                navigator.clipboard.writeText(text).catch(() => copyByEvent(text));
            } else {
                copyByEvent(text);
            }
        },
    };
}
