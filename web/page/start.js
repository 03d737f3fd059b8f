// Puts the parts together and starts the program.

async function start() {
    const canvas = document.getElementById('picture');
    const field = document.getElementById('typing');
    const showInspectable = makeInspectable();
    const darkScheme = matchMedia('(prefers-color-scheme: dark)');
    const lessMotion = matchMedia('(prefers-reduced-motion: reduce)');
    const claims = makeClaims();
    const storage = makeStorage(claims.isLost);
    let parts = null; // made once the program is there

    // The program calls the host in the middle of a frame: what may call back comes after it, still in the person's
    // event.
    const later = (action) => Promise.resolve().then(action);
    const answered = (action) => {
        action();
        parts.view.poke();
    };
    const saved = (request) => (problem) =>
        answered(() => parts.program.answerSave(request, { saved: !problem, problem }));

    const askBeforeLeaving = (event) => {
        if (!storage.underway()) {
            event.preventDefault();
        }
    };
    const host = {
        failed: (problem) => parts.program.fail(new Error(problem)),
        saveFile: (request, name, mediaType, text) =>
            later(() => parts.files.save(name, mediaType, text)).then((outcome) =>
                answered(() => parts.program.answerSave(request, outcome))
            ),
        pickFile: () => later(() => parts.files.pick()),
        copyText: (text) => later(() => parts.clipboard.copyText(text)),
        listKept: (request) =>
            storage.list((problem, entries) =>
                later(() => answered(() => parts.program.answerList(request, entries, problem)))
            ),
        loadKept: (request, id) =>
            storage.load(id, (problem, record) =>
                later(() => answered(() => parts.program.answerLoad(request, record, problem)))
            ),
        store: (request, record) => storage.store(record, (problem) => later(() => saved(request)(problem))),
        forget: (request, id) => storage.forget(id, (problem) => later(() => saved(request)(problem))),
        claim: (request, id, takeOver) =>
            claims.claim(id, takeOver, (granted) =>
                later(() => answered(() => parts.program.answerClaim(request, granted)))
            ),
        setTitle: (title) => {
            document.title = title;
        },
        // Attached only while there is something to lose.
        setUnsaved: (unsaved) =>
            unsaved
                ? window.addEventListener('beforeunload', askBeforeLeaving)
                : window.removeEventListener('beforeunload', askBeforeLeaving),
        prefersDark: () => darkScheme.matches,
        setCaret: (x, y, lineHeight) => parts.typing.setCaret(x, y, lineHeight),
    };

    const module = await loadModule(host);
    const program = makeProgramCalls(module, (error) => {
        parts.view.pause();
        showFault('Steelyard stopped', error);
    });
    const view = makeView(canvas, program);
    parts = { program, view };

    // Nothing of a person's input comes before the picture has its size.
    view.observe(() => {
        program.start(onMac);
        view.applySize();
        listen();
        program.load();
        view.poke();
        view.draw();
        if (program.alive) {
            document.getElementById('start').remove();
            parts.focus.take();
            showInspectable(program, () => view.resting && parts.files.resting);
        }
    });

    function listen() {
        const focus = makeFocus(canvas, field, program, view);
        const keys = listenToKeys(field, program, view, focus);
        const pointer = listenToPointer(canvas, program, view, focus, keys);
        parts.focus = focus;
        parts.files = makeFiles(document.getElementById('file'), program, view);
        parts.typing = listenToTyping(field, program, view, focus, keys);
        parts.clipboard = listenToClipboard(program, view, focus, parts.files.open);

        darkScheme.addEventListener('change', () => {
            program.setDark(darkScheme.matches);
            view.poke();
        });
        program.reduceMotion(lessMotion.matches);
        lessMotion.addEventListener('change', () => program.reduceMotion(lessMotion.matches));

        // A reload or a closed tab comes without `visibilitychange`, a phone's switch of programs with nothing else.
        // The first comes earliest, but not everywhere.
        window.addEventListener('beforeunload', () => program.flush(true));
        window.addEventListener('pagehide', () => {
            program.flush(true);
            storage.linger();
        });
        document.addEventListener('visibilitychange', () => {
            if (document.hidden) {
                program.flush(false); // who looks something up elsewhere goes on typing when he is back
                pointer.letGo();
                focus.release();
                view.pause();
            } else {
                focus.regain();
                view.poke();
            }
        });
    }
}

start().catch((error) => showFault('Steelyard could not start', error));
