// The WebAssembly program: unpacked, started, and its exported functions as plain calls with strings in and out.

// Exceptions and vectors in WebAssembly, DecompressionStream, a transaction's commit(): which release brought the
// last of them is from memory of the vendors' release notes.
const tooOld = 'Use a newer browser: Chrome or Edge 95, Firefox 113, Safari 16.4, or later.';

function fromBase64(text) {
    if (Uint8Array.fromBase64) {
        return Uint8Array.fromBase64(text);
    }
    const bytes = atob(text);
    const result = new Uint8Array(bytes.length);
    for (let i = 0; i < bytes.length; ++i) {
        result[i] = bytes.charCodeAt(i);
    }
    return result;
}

async function unpackProgram() {
    if (typeof WebAssembly === 'undefined') {
        throw new Fault('This browser runs no WebAssembly, or it is switched off.', tooOld);
    }
    if (typeof DecompressionStream === 'undefined') {
        throw new Fault('This browser cannot unpack the program (no DecompressionStream).', tooOld);
    }
    const packed = document.getElementById('wasm');
    try {
        const stream = new Blob([fromBase64(packed.textContent)]).stream();
        const bytes = await new Response(stream.pipeThrough(new DecompressionStream('gzip'))).arrayBuffer();
        packed.remove();
        return bytes;
    } catch (error) {
        throw new Fault(
            'The program inside this file cannot be unpacked: the file was damaged or changed on its way here.',
            'Get the file again from where it is published and compare its SHA-256.',
            error
        );
    }
}

// Runs the program's module. `host` answers the imports of web/library.js.
async function loadModule(host) {
    const bytes = await unpackProgram();
    return new Promise((resolve, reject) => {
        makeProgram({
            host,
            instantiateWasm(imports, receive) {
                WebAssembly.instantiate(bytes, imports).then(
                    (result) => receive(result.instance, result.module),
                    (error) => reject(new Fault('This browser cannot run the program inside this file.', tooOld, error))
                );
                return {};
            },
        }).then(resolve, reject);
    });
}

// The program's functions. After the first failure every call does nothing: its state cannot be trusted any more.
function makeProgramCalls(module, stopped) {
    const encoder = new TextEncoder();
    let alive = true;

    function fail(error) {
        if (alive) {
            alive = false;
            stopped(error);
        }
    }

    function call(name, ...values) {
        if (!alive) {
            return 0;
        }
        try {
            return module['_' + name](...values);
        } catch (error) {
            fail(error);
            return 0;
        }
    }

    // Copies texts and bytes into the program's memory for the time of one call. A text ends with a zero.
    function withBytes(parts, use) {
        if (!alive) {
            return 0;
        }
        const places = parts.map((part) => {
            const bytes = typeof part === 'string' ? encoder.encode(part + '\0') : part;
            const place = module._malloc(bytes.length + 1);
            module.HEAPU8.set(bytes, place);
            return place;
        });
        const result = use(...places);
        if (alive) {
            places.forEach((place) => module._free(place));
        }
        return result;
    }

    const text = (place) => (place ? module.UTF8ToString(place) : null);
    const now = () => performance.now();

    return {
        get alive() {
            return alive;
        },
        fail,
        start: (mac) => call('app_start', now(), mac),
        load: () => call('app_load'),
        resize: (width, height, density) => call('app_resize', width, height, density),
        frame: () => call('app_frame', now()),
        changes: (count) => new Int32Array(module.HEAPU8.buffer, call('app_changes'), 4 * count),
        pixels: (length) => new Uint8ClampedArray(module.HEAPU8.buffer, call('app_pixels'), length),
        settle: () => call('app_settle', now()),
        nextFrameIn: () => (alive ? call('app_next_frame_in') : -1),
        wantsText: () => call('app_wants_text') !== 0,
        mouseCursor: () => call('app_mouse_cursor'),

        pointer: (x, y, source) => call('app_pointer', x, y, source),
        pointerGone: () => call('app_pointer_gone'),
        button: (which, down, source) => call('app_button', which, down, source, now()),
        wheel: (x, y) => call('app_wheel', x, y),
        modifiers: (ctrl, shift, alt, meta) => call('app_modifiers', ctrl, shift, alt, meta),
        key: (code, key, down) => withBytes([code, key], (c, k) => call('app_key', c, k, down)),
        text: (typed) => withBytes([typed], (t) => call('app_text', t)),
        focus: (gained) => call('app_focus', gained),
        copy: (cut) => text(call('app_copy', cut, now())),
        paste: (pasted) => withBytes([pasted], (t) => call('app_paste', t, now())),
        openFile: (name, bytes) => withBytes([name, bytes], (n, b) => call('app_open_file', n, b, bytes.length)),

        flush: (leaving) => call('app_flush', leaving, now()),
        setDark: (dark) => call('app_set_dark', dark),
        reduceMotion: (on) => call('app_reduce_motion', on),

        items: () => text(call('app_items')) || '[]',
        results: () => text(call('app_results')) || '',
        frames: () => call('app_frames') >>> 0,
        idle: () => call('app_idle') !== 0,

        answerSave: (request, outcome) =>
            withBytes([outcome.problem || ''], (p) =>
                call('app_answer_save', request, outcome.saved, outcome.cancelled, p)
            ),
        answerList(request, entries, problem) {
            for (const entry of entries) {
                withBytes([entry.id, entry.title, entry.saved_at], (i, t, s) => call('app_answer_list_entry', i, t, s));
            }
            withBytes([problem], (p) => call('app_answer_list', request, p));
        },
        answerLoad(request, record, problem) {
            if (!record) {
                withBytes([problem], (p) => call('app_answer_load_nothing', request, p));
                return;
            }
            const bytes = encoder.encode(record.text);
            withBytes([record.id, record.title, bytes, record.saved_at], (i, t, b, s) =>
                call('app_answer_load', request, i, t, b, bytes.length, s, record.revision)
            );
        },
        answerClaim: (request, granted) => call('app_answer_claim', request, granted),
    };
}
