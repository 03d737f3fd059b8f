// The picture: its size in device pixels, and when it is drawn. A frame is drawn only for a reason, and none while
// hidden.

// Beyond this the picture is coarser than the screen: painting and copying more would be felt (5120 x 2880 is below
// it).
const mostPixels = 16000000;

// Input may lead to a second frame (something opens) and a third (it knows its size).
const framesAfterInput = 3;

// By ImGuiMouseCursor; -1 is none.
const cursors = [
    'default', 'text', 'move', 'ns-resize', 'ew-resize', 'nesw-resize', 'nwse-resize', 'pointer', 'not-allowed',
];

function makeView(canvas, program) {
    const context = canvas.getContext('2d', { alpha: false });
    const afterFrame = [];
    let wanted = null; // the size that the page gives the picture
    let image = null; // the program's pixels, seen as an image
    let wholePicture = true;
    let requested = 0;
    let timer = 0;
    let framesLeft = 0;

    function request() {
        timer = clearTimeout(timer);
        if (!requested && !document.hidden && program.alive) {
            requested = requestAnimationFrame(draw);
        }
    }

    function poke() {
        framesLeft = framesAfterInput;
        request();
    }

    function pause() {
        timer = clearTimeout(timer);
        cancelAnimationFrame(requested);
        requested = 0;
    }

    function applySize() {
        if (canvas.width === wanted.width && canvas.height === wanted.height && wanted.applied) {
            return;
        }
        canvas.width = wanted.width;
        canvas.height = wanted.height;
        program.resize(wanted.width, wanted.height, wanted.density);
        wanted.applied = true;
        wholePicture = true;
    }

    // The program's memory moves when it grows, and so does the picture in it.
    function currentImage() {
        const length = 4 * canvas.width * canvas.height;
        const pixels = program.pixels(length);
        if (!image || image.data.buffer !== pixels.buffer || image.data.byteOffset !== pixels.byteOffset ||
            image.width !== canvas.width || image.height !== canvas.height) {
            image = new ImageData(pixels, canvas.width, canvas.height);
        }
        return image;
    }

    function draw() {
        cancelAnimationFrame(requested);
        requested = 0;
        if (document.hidden || !program.alive) {
            return;
        }
        applySize();
        const count = program.frame();
        if (!program.alive) {
            return;
        }
        if (wholePicture) {
            context.putImageData(currentImage(), 0, 0);
            wholePicture = false;
        } else if (count > 0) {
            const changes = program.changes(count);
            const picture = currentImage();
            for (let i = 0; i < 4 * count; i += 4) {
                const [left, top, right, bottom] = changes.subarray(i, i + 4);
                context.putImageData(picture, 0, 0, left, top, right - left, bottom - top);
            }
        }
        canvas.style.cursor = cursors[program.mouseCursor()] || 'none';
        afterFrame.forEach((action) => action());
        plan();
    }

    function plan() {
        if (framesLeft > 0) {
            --framesLeft;
            request();
            return;
        }
        const due = program.nextFrameIn();
        if (due === 0) {
            request();
        } else if (due > 0) {
            timer = setTimeout(request, due);
        }
    }

    function measure(entry) {
        const box = entry.devicePixelContentBoxSize && entry.devicePixelContentBoxSize[0];
        let density = window.devicePixelRatio;
        let width = Math.round(entry.contentRect.width * density);
        let height = Math.round(entry.contentRect.height * density);
        // The browser's own count is exact where a pixel is cut by the window's edge. Where a density is only
        // played (by developer tools) it is that of the real screen: not to be used.
        if (box && Math.abs(box.inlineSize - width) <= 2 && Math.abs(box.blockSize - height) <= 2) {
            width = box.inlineSize;
            height = box.blockSize;
        }
        const pixels = width * height;
        if (pixels > mostPixels) {
            const less = Math.sqrt(mostPixels / pixels);
            density *= less;
            width = Math.floor(width * less);
            height = Math.floor(height * less);
        }
        return { width: Math.max(1, width), height: Math.max(1, height), density, applied: false };
    }

    // Calls back once the size is known, and draws by itself whenever it changes: in the same frame, so that the old
    // picture is never seen stretched.
    function observe(ready) {
        let known = false;
        const changed = (entry) => {
            wanted = measure(entry);
            if (!known) {
                known = true;
                ready();
            } else {
                framesLeft = framesAfterInput;
                draw();
            }
        };
        const observer = new ResizeObserver((entries) => changed(entries[entries.length - 1]));
        // Observing anew reports anew. Safari knows only the box in CSS pixels.
        const observeBox = () => {
            observer.unobserve(canvas);
            try {
                observer.observe(canvas, { box: 'device-pixel-content-box' });
            } catch (error) {
                observer.observe(canvas);
            }
        };
        // The same window on another screen, or zoomed: its box may stay the same while the density changes.
        const watchDensity = () => {
            const query = matchMedia('(resolution: ' + window.devicePixelRatio + 'dppx)');
            const changedDensity = () => {
                observeBox();
                watchDensity();
            };
            query.addEventListener('change', changedDensity, { once: true });
        };
        observeBox();
        watchDensity();
    }

    canvas.addEventListener('contextrestored', () => {
        wholePicture = true;
        poke();
    });

    return {
        observe,
        poke,
        pause,
        draw,
        afterFrame: (action) => afterFrame.push(action),
        applySize,
        get resting() {
            return requested === 0;
        },
    };
}
