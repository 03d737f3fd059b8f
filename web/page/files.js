// Files: picked, dropped or pasted ones come in; texts go out to a place the person chooses, or as a download.

// One byte more than the program accepts is enough for it to refuse a file; more is not read.
const mostFileBytes = 16 * 1024 * 1024 + 1;

// Browsers read a Blob's link some time after the click.
const linkLife = 120000; // milliseconds

function makeFiles(picker, program, view) {
    let reading = 0;

    async function open(file) {
        ++reading;
        try {
            const bytes = new Uint8Array(await file.slice(0, mostFileBytes).arrayBuffer());
            program.openFile(file.name, bytes);
        } catch (error) {
            // A folder, or a file that is gone: the program says in words that an empty text is no decision.
            program.openFile(file.name, new Uint8Array(0));
        } finally {
            --reading;
            view.poke();
        }
    }

    picker.addEventListener('change', () => {
        const file = picker.files[0];
        if (file) {
            open(file);
        }
        picker.value = ''; // the same file again is a change again
    });
    // Without these two the browser would leave the page for the file.
    document.addEventListener('dragover', (event) => {
        event.preventDefault();
        event.dataTransfer.dropEffect = 'copy';
    });
    document.addEventListener('drop', (event) => {
        event.preventDefault();
        if (event.dataTransfer.files.length > 0) {
            open(event.dataTransfer.files[0]);
        }
    });

    // A download cannot overwrite, and browsers number equal names: a date in it tells them apart.
    function datedName(name) {
        if (/\d{4}-\d\d-\d\d/.test(name)) {
            return name;
        }
        const now = new Date();
        const two = (number) => String(number).padStart(2, '0');
        const date = [now.getFullYear(), two(now.getMonth() + 1), two(now.getDate())].join('-');
        const dot = name.indexOf('.');
        const stem = dot > 0 ? name.slice(0, dot) : name;
        return stem + ' ' + date + ' ' + two(now.getHours()) + two(now.getMinutes()) + two(now.getSeconds()) +
            (dot > 0 ? name.slice(dot) : '');
    }

    // Signs that some file system refuses in names.
    function safeName(name) {
        return name.replace(/[\\/:*?"<>|\u0000-\u001f]/g, '-').replace(/^[. ]+/, '') || 'decision.json';
    }

    function download(name, mediaType, text) {
        const link = document.createElement('a');
        link.href = URL.createObjectURL(new Blob([text], { type: mediaType }));
        link.download = datedName(name);
        link.click();
        setTimeout(() => URL.revokeObjectURL(link.href), linkLife);
        return { saved: true };
    }

    async function writeTo(handle, text) {
        const writable = await handle.createWritable();
        await writable.write(text);
        await writable.close();
        // Said to be saved only when it reads back.
        const written = await (await handle.getFile()).text();
        if (written !== text) {
            return { problem: 'The file does not hold what was written to it. Save it again, elsewhere.' };
        }
        return { saved: true };
    }

    async function save(name, mediaType, text) {
        const safe = safeName(name);
        if (window.showSaveFilePicker) {
            let handle = null;
            try {
                const ending = safe.slice(safe.lastIndexOf('.'));
                const accept = { [mediaType]: [ending] };
                handle = await window.showSaveFilePicker({ suggestedName: safe, types: [{ accept }] });
            } catch (error) {
                if (error.name === 'AbortError') {
                    return { cancelled: true };
                }
            }
            if (handle) {
                try {
                    return await writeTo(handle, text);
                } catch (error) {
                    return { problem: 'The file could not be written (' + error.name + ': ' + error.message + ').' };
                }
            }
        }
        try {
            return download(safe, mediaType, text);
        } catch (error) {
            return { problem: 'The browser refuses the download (' + error.name + ': ' + error.message + ').' };
        }
    }

    return {
        open,
        save,
        pick: () => picker.click(),
        get resting() {
            return reading === 0;
        },
    };
}
