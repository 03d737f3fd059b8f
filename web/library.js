// Emscripten's --js-library: the functions of web/imports.hpp, passed on to the object `host` that the page hands in.
// `text` with a length may hold any bytes that are UTF-8, a zero too.
mergeInto(LibraryManager.library, {
    host_random: function (bytes, length) {
        crypto.getRandomValues(HEAPU8.subarray(bytes, bytes + length));
    },
    host_failed: function (problem) {
        Module['host'].failed(UTF8ToString(problem));
    },
    $hostText: function (text, length) {
        return new TextDecoder('utf-8', { ignoreBOM: true }).decode(HEAPU8.subarray(text, text + length));
    },
    host_save_file__deps: ['$hostText'],
    host_save_file: function (request, name, mediaType, text, length) {
        Module['host'].saveFile(request, UTF8ToString(name), UTF8ToString(mediaType), hostText(text, length));
    },
    host_pick_file: function () {
        Module['host'].pickFile();
    },
    host_copy_text: function (text) {
        Module['host'].copyText(UTF8ToString(text));
    },
    host_list_kept: function (request) {
        Module['host'].listKept(request);
    },
    host_load_kept: function (request, id) {
        Module['host'].loadKept(request, UTF8ToString(id));
    },
    host_store__deps: ['$hostText'],
    host_store: function (request, id, title, text, length, savedAt, revision) {
        Module['host'].store(request, {
            id: UTF8ToString(id),
            title: UTF8ToString(title),
            text: hostText(text, length),
            saved_at: UTF8ToString(savedAt),
            revision: revision,
        });
    },
    host_forget: function (request, id) {
        Module['host'].forget(request, UTF8ToString(id));
    },
    host_claim: function (request, id, takeOver) {
        Module['host'].claim(request, UTF8ToString(id), takeOver !== 0);
    },
    host_set_title: function (title) {
        Module['host'].setTitle(UTF8ToString(title));
    },
    host_set_unsaved: function (unsaved) {
        Module['host'].setUnsaved(unsaved !== 0);
    },
    host_prefers_dark: function () {
        return Module['host'].prefersDark() ? 1 : 0;
    },
    host_set_caret: function (x, y, lineHeight) {
        Module['host'].setCaret(x, y, lineHeight);
    },
});
