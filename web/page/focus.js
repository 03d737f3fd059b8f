// Which of our elements has the keyboard: the picture, or the typing field while the program wants text.

function makeFocus(canvas, field, program, view) {
    let focused = false;

    const ours = (element) => element === canvas || element === field;

    // Puts the focus where the program wants it; never takes it from something that is not ours.
    function follow() {
        const active = document.activeElement;
        const wantsText = program.wantsText();
        if (active === canvas && wantsText) {
            field.focus({ preventScroll: true });
        } else if (active === field && !wantsText && !field.classList.contains('composing')) {
            canvas.focus({ preventScroll: true });
        }
    }

    function take() {
        if (!ours(document.activeElement)) {
            canvas.focus({ preventScroll: true });
        }
    }

    function tell(gained) {
        if (gained !== focused) {
            focused = gained;
            program.focus(gained);
            view.poke();
        }
    }

    for (const element of [canvas, field]) {
        element.addEventListener('focus', () => tell(true));
        // From one of ours to the other is no loss.
        element.addEventListener('blur', (event) => tell(ours(event.relatedTarget)));
    }
    view.afterFrame(follow);

    return {
        follow,
        take,
        release: () => tell(false),
        regain: () => tell(document.hasFocus() && ours(document.activeElement)),
        get ours() {
            return ours(document.activeElement);
        },
    };
}
