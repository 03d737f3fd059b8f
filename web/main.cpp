// What the page's scripts call: the program's start, frames, input and the read-only access for tests. The
// page calls nothing before app_start, and app_resize before the first frame. Answers to the program's own
// questions: answers.cpp.

#include <emscripten/emscripten.h>

#include "web/running.hpp"

namespace steelyard {

std::unique_ptr<Program> program;

} // namespace steelyard

using steelyard::guarded;
using steelyard::program;
using steelyard::Program;

extern "C" {

EMSCRIPTEN_KEEPALIVE void app_start(double now, int mac) {
    steelyard::guard([&] { program = std::make_unique<Program>(now, mac != 0); });
}

/// Loads what was kept; the picture has its size by now.
EMSCRIPTEN_KEEPALIVE void app_load() {
    guarded([](Program& p) { p.start(); });
}

EMSCRIPTEN_KEEPALIVE void app_resize(int pixel_width, int pixel_height, float density) {
    guarded([&](Program& p) { p.resize(pixel_width, pixel_height, density); });
}

/// One frame, laid out and painted. Returns how many rectangles changed; app_changes and app_pixels tell the
/// rest.
EMSCRIPTEN_KEEPALIVE int app_frame(double now) {
    int changes = 0;
    guarded([&](Program& p) {
        p.step(now);
        p.paint();
        changes = static_cast<int>(p.changes().size());
    });
    return changes;
}

/// The rectangles that the last app_frame changed, in device pixels: left, top, right, bottom of each.
EMSCRIPTEN_KEEPALIVE const steelyard::PixelRect* app_changes() {
    static_assert(sizeof(steelyard::PixelRect) == 4 * sizeof(int), "the page reads them as 32-bit integers");
    return program->changes().data();
}

EMSCRIPTEN_KEEPALIVE const std::uint32_t* app_pixels() {
    return program->painter().pixels().data();
}

/// Takes queued input at once, without painting.
EMSCRIPTEN_KEEPALIVE void app_settle(double now) {
    guarded([&](Program& p) { p.settle(now); });
}

EMSCRIPTEN_KEEPALIVE double app_next_frame_in() {
    double milliseconds = -1;
    guarded([&](Program& p) { milliseconds = p.next_frame_in(); });
    return milliseconds;
}

EMSCRIPTEN_KEEPALIVE int app_wants_text() {
    return ImGui::GetIO().WantTextInput ? 1 : 0;
}

EMSCRIPTEN_KEEPALIVE int app_mouse_cursor() {
    return ImGui::GetMouseCursor();
}

// ---- Input. Positions in CSS pixels; sources and buttons as ImGui numbers them. ----

EMSCRIPTEN_KEEPALIVE void app_pointer(float x, float y, int source) {
    guarded([&](Program& p) { p.pointer(x, y, source); });
}

EMSCRIPTEN_KEEPALIVE void app_pointer_gone() {
    guarded([](Program& p) { p.pointer_gone(); });
}

EMSCRIPTEN_KEEPALIVE void app_button(int button, int down, int source, double now) {
    guarded([&](Program& p) { p.button(button, down != 0, source, now); });
}

EMSCRIPTEN_KEEPALIVE void app_wheel(float x, float y) {
    guarded([&](Program& p) { p.wheel(x, y); });
}

EMSCRIPTEN_KEEPALIVE void app_modifiers(int ctrl, int shift, int alt, int meta) {
    guarded([&](Program& p) { p.modifiers(ctrl != 0, shift != 0, alt != 0, meta != 0); });
}

EMSCRIPTEN_KEEPALIVE void app_key(const char* code, const char* key, int down) {
    guarded([&](Program& p) { p.key(code, key, down != 0); });
}

EMSCRIPTEN_KEEPALIVE void app_text(const char* text) {
    guarded([&](Program& p) { p.text(text); });
}

EMSCRIPTEN_KEEPALIVE void app_focus(int gained) {
    guarded([&](Program& p) { p.focus(gained != 0); });
}

/// The text to put on the clipboard, or null.
EMSCRIPTEN_KEEPALIVE const char* app_copy(int cut, double now) {
    const char* copied = nullptr;
    guarded([&](Program& p) {
        if (const auto& text = p.copy(cut != 0, now)) copied = text->c_str();
    });
    return copied;
}

EMSCRIPTEN_KEEPALIVE void app_paste(const char* text, double now) {
    guarded([&](Program& p) { p.paste(text, now); });
}

EMSCRIPTEN_KEEPALIVE void app_open_file(const char* name, const char* bytes, int length) {
    guarded(
        [&](Program& p) { p.app().open_text(name, std::string(bytes, static_cast<std::size_t>(length))); });
}

// ---- The page's surroundings ----

EMSCRIPTEN_KEEPALIVE void app_flush(int leaving, double now) {
    guarded([&](Program& p) { p.flush(leaving != 0, now); });
}

EMSCRIPTEN_KEEPALIVE void app_set_dark(int dark) {
    guarded([&](Program& p) { p.app().set_dark(dark != 0); });
}

EMSCRIPTEN_KEEPALIVE void app_reduce_motion(int on) {
    guarded([&](Program& p) { p.reduce_motion(on != 0); });
}

// ---- Read-only access for tests ----

EMSCRIPTEN_KEEPALIVE const char* app_items() {
    const char* json = "[]";
    guarded([&](Program& p) { json = p.hand_out(steelyard::ledger_json(p.app().ledger())); });
    return json;
}

EMSCRIPTEN_KEEPALIVE const char* app_results() {
    const char* json = "";
    guarded([&](Program& p) { json = p.hand_out(p.app().results_file()); });
    return json;
}

EMSCRIPTEN_KEEPALIVE unsigned app_frames() {
    return program->frames();
}

EMSCRIPTEN_KEEPALIVE int app_idle() {
    bool idle = false;
    guarded([&](Program& p) { idle = p.idle(); });
    return idle ? 1 : 0;
}

} // extern "C"
