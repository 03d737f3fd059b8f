#include "web/program.hpp"

#include <imgui_internal.h>

#include <algorithm>
#include <cfloat>
#include <cmath>
#include <utility>

#include "shell/context.hpp"
#include "web/imports.hpp"
#include "web/keys.hpp"

namespace steelyard {

namespace {

// ImGui refuses a time step of 0; one of more than a second would only make its timers jump.
constexpr double shortest_step = 1e-4;
constexpr double longest_step = 1;

// A click that opens a text field is laid out, activates it, and is known in `WantTextInput` one step later.
constexpr int steps_after_input = 2;

// Each queued event takes at most a step; more at once means that something keeps feeding the queue.
constexpr int most_steps = 64;

/// Milliseconds until the caret appears or disappears; the phases are ImGui's (InputTextEx: shown for 0.8
/// of 1.2 s).
double caret_flips_in(const ImGuiInputTextState& state) {
    const double at = state.CursorAnim;
    const double phase = at <= 0 ? at : std::fmod(at, 1.2);
    return 1000 * ((phase <= 0.8 ? 0.8 : 1.2) - phase) + 5;
}

} // namespace

Program::Program(double now, bool mac) : app_((make_context(1), platform_)), last_step_(now) {
    ImGuiIO& io = ImGui::GetIO();
    io.ConfigMacOSXBehaviors = mac;
    io.BackendPlatformName = "steelyard_page";
    io.ClipboardUserData = this;
    io.SetClipboardTextFn = [](void* self, const char* text) {
        static_cast<Program*>(self)->platform_.copy_text(text);
    };
    io.GetClipboardTextFn = [](void* self) { return static_cast<Program*>(self)->pasted_.c_str(); };
    io.SetPlatformImeDataFn = [](ImGuiViewport*, ImGuiPlatformImeData* data) {
        host_set_caret(data->InputPos.x, data->InputPos.y, data->InputLineHeight);
    };
}

void Program::resize(int pixel_width, int pixel_height, float density) {
    pixel_width_ = pixel_width;
    pixel_height_ = pixel_height;
    if (density == density_) return;
    density_ = density;
    set_density(density);
    unsigned char* alpha = nullptr;
    int width = 0;
    int height = 0;
    ImGui::GetIO().Fonts->GetTexDataAsAlpha8(&alpha, &width, &height);
    painter_.set_atlas(alpha, width, height);
}

void Program::step(double now, bool finish_editing) {
    ImGuiIO& io = ImGui::GetIO();
    io.DisplaySize =
        ImVec2(static_cast<float>(pixel_width_) / density_, static_cast<float>(pixel_height_) / density_);
    io.DisplayFramebufferScale = ImVec2(density_, density_);
    io.DeltaTime = static_cast<float>(std::clamp((now - last_step_) / 1000, shortest_step, longest_step));
    last_step_ = std::max(now, last_step_);
    ImGui::NewFrame();
    // Between two frames this would lose that the field was edited.
    if (finish_editing) ImGui::ClearActiveID();
    app_.draw();
    ImGui::Render();
    ++frames_;
}

void Program::take_queue(double now) {
    for (int steps = 0; steps < most_steps && !GImGui->InputEventsQueue.empty(); ++steps) step(now);
}

void Program::settle(double now) {
    take_queue(now);
    for (int i = 0; i < steps_after_input; ++i) step(now);
}

void Program::paint() {
    changes_ = painter_.paint(*ImGui::GetDrawData(), pixel_width_, pixel_height_,
                              ImGui::GetColorU32(ImGuiCol_WindowBg));
}

double Program::next_frame_in() const {
    const ImGuiContext& g = *GImGui;
    if (app_.wants_frame() || !g.InputEventsQueue.empty()) return 0;
    double due = -1;
    const auto at_most = [&due](double in) { due = due < 0 ? in : std::min(due, in); };
    if (g.IO.WantTextInput && g.IO.ConfigInputTextCursorBlink && g.InputTextState.ID == g.ActiveId)
        at_most(caret_flips_in(g.InputTextState));
    // A tip that shows once the pointer has rested on something.
    if (g.HoverItemDelayId != 0 && g.HoverItemDelayTimer < g.Style.HoverDelayNormal)
        at_most(1000 * std::max(0.05, double(g.Style.HoverDelayNormal - g.HoverItemDelayTimer)));
    return due;
}

void Program::pointer(float x, float y, int source) {
    ImGuiIO& io = ImGui::GetIO();
    io.AddMouseSourceEvent(static_cast<ImGuiMouseSource>(source));
    io.AddMousePosEvent(x, y);
}

void Program::pointer_gone() {
    ImGui::GetIO().AddMousePosEvent(-FLT_MAX, -FLT_MAX);
}

void Program::button(int button, bool down, int source, double now) {
    take_queue(now);
    ImGuiIO& io = ImGui::GetIO();
    io.AddMouseSourceEvent(static_cast<ImGuiMouseSource>(source));
    io.AddMouseButtonEvent(button, down);
}

void Program::wheel(float x, float y) {
    ImGui::GetIO().AddMouseWheelEvent(x, y);
}

void Program::modifiers(bool ctrl, bool shift, bool alt, bool meta) {
    ImGuiIO& io = ImGui::GetIO();
    // macOS tells nothing of a key that goes up while Cmd is held.
    if (io.KeySuper && !meta) release_keys();
    io.AddKeyEvent(ImGuiMod_Ctrl, ctrl);
    io.AddKeyEvent(ImGuiMod_Shift, shift);
    io.AddKeyEvent(ImGuiMod_Alt, alt);
    io.AddKeyEvent(ImGuiMod_Super, meta);
}

void Program::key(const std::string& code, const std::string& key, bool down) {
    // What a key goes up as may differ from what it went down as: a modifier in between changes `key`.
    const std::string& place = code.empty() ? key : code;
    ImGuiKey which = ImGuiKey_None;
    if (const auto held = held_.find(place); held != held_.end() && !down) {
        which = held->second;
        held_.erase(held);
    } else {
        which = key_of(code, key);
    }
    if (which == ImGuiKey_None) return;
    if (down) held_[place] = which;
    ImGui::GetIO().AddKeyEvent(which, down);
}

void Program::release_keys() {
    for (const auto& [place, which] : std::exchange(held_, {})) ImGui::GetIO().AddKeyEvent(which, false);
}

void Program::text(const std::string& text) {
    ImGui::GetIO().AddInputCharactersUTF8(text.c_str());
}

void Program::focus(bool gained) {
    ImGuiIO& io = ImGui::GetIO();
    if (!gained) {
        // Off the items first: a button that goes up elsewhere clicks nothing.
        pointer_gone();
        for (int which = 0; which < 3; ++which) io.AddMouseButtonEvent(which, false);
        release_keys();
        modifiers(false, false, false, false);
    }
    io.AddFocusEvent(gained);
}

void Program::shortcut(ImGuiKey key, double now) {
    ImGuiIO& io = ImGui::GetIO();
    take_queue(now);
    const ImGuiKey modifier = io.ConfigMacOSXBehaviors ? ImGuiMod_Super : ImGuiMod_Ctrl;
    // From the browser's own menu the modifier is not down.
    const bool held = io.ConfigMacOSXBehaviors ? io.KeySuper : io.KeyCtrl;
    io.AddKeyEvent(modifier, true);
    io.AddKeyEvent(key, true);
    take_queue(now);
    io.AddKeyEvent(key, false);
    if (!held) io.AddKeyEvent(modifier, false);
    settle(now);
}

const std::optional<std::string>& Program::copy(bool cut, double now) {
    platform_.collect_copies(true);
    shortcut(cut ? ImGuiKey_X : ImGuiKey_C, now);
    platform_.collect_copies(false);
    return platform_.collected();
}

void Program::paste(const std::string& text, double now) {
    take_queue(now);
    if (ImGui::GetIO().WantTextInput) {
        pasted_ = text;
        shortcut(ImGuiKey_V, now);
        pasted_.clear();
    } else {
        app_.paste_text(text);
        settle(now);
    }
}

void Program::flush(bool leaving, double now) {
    settle(now);
    if (leaving) {
        step(now, true);
        settle(now);
    }
    app_.flush();
}

void Program::reduce_motion(bool on) {
    ImGui::GetIO().ConfigInputTextCursorBlink = !on;
}

bool Program::idle() const {
    return app_.idle() && !platform_.waiting() && GImGui->InputEventsQueue.empty();
}

const char* Program::hand_out(std::string text) {
    handed_out_ = std::move(text);
    return handed_out_.c_str();
}

} // namespace steelyard
