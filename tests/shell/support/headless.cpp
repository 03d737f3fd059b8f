#include "tests/shell/support/headless.hpp"

#include <imgui_internal.h>

#include <algorithm>
#include <stdexcept>
#include <utility>

#include "shell/context.hpp"
#include "tests/shell/support/save_png.hpp"

namespace steelyard::testing {
namespace {

constexpr float frame_seconds = 1.0F / 60;
constexpr int most_frames = 3600; // a minute: what takes longer hangs

std::string all_labels(const Ledger& ledger) {
    std::string labels;
    for (const LedgerItem& item : ledger.items()) {
        if (item.visible) labels += "\n  " + item.role + ": " + item.label;
    }
    return labels;
}

} // namespace

Headless::Headless(HeadlessOptions options)
    : options_(std::move(options)), context_(make_context(options_.density)) {
    platform_.dark = options_.dark;
    platform_.on_picked = [this](const TestFile& file) { app_->open_text(file.name, file.text); };
    if (options_.prepare) options_.prepare(platform_);
    ImGuiIO& io = ImGui::GetIO();
    io.ClipboardUserData = this;
    io.SetClipboardTextFn = [](void* self, const char* text) {
        static_cast<Headless*>(self)->clipboard_ = text;
        static_cast<Headless*>(self)->platform_.copy_text(text);
    };
    io.GetClipboardTextFn = [](void* self) { return static_cast<Headless*>(self)->clipboard_.c_str(); };
    app_ = std::make_unique<App>(platform_);
    app_->start();
    resize(options_.width, options_.height, options_.density);
    settle();
}

Headless::~Headless() {
    ImGui::SetCurrentContext(context_);
    app_.reset();
    ImGui::DestroyContext(context_);
}

void Headless::resize(int width, int height, float density) {
    ImGui::SetCurrentContext(context_);
    if (density != options_.density) set_density(density);
    options_.width = width;
    options_.height = height;
    options_.density = density;
    unsigned char* alpha = nullptr;
    int atlas_width = 0;
    int atlas_height = 0;
    ImGui::GetIO().Fonts->GetTexDataAsAlpha8(&alpha, &atlas_width, &atlas_height);
    painter_.set_atlas(alpha, atlas_width, atlas_height);
}

void Headless::frame(int count) {
    for (int i = 0; i < count; ++i) {
        ImGui::SetCurrentContext(context_);
        ImGuiIO& io = ImGui::GetIO();
        io.DisplaySize = {static_cast<float>(options_.width), static_cast<float>(options_.height)};
        io.DisplayFramebufferScale = {options_.density, options_.density};
        io.DeltaTime = frame_seconds;
        platform_.answer();
        ImGui::NewFrame();
        app_->draw();
        ImGui::Render();
        const auto pixels = [&](int size) {
            return static_cast<int>(static_cast<float>(size) * options_.density);
        };
        painter_.paint(*ImGui::GetDrawData(), pixels(options_.width), pixels(options_.height),
                       ImGui::GetColorU32(ImGuiCol_WindowBg));
    }
}

void Headless::settle() {
    // What a frame asks for, such as the focus, shows in the next.
    frame(2);
    for (int i = 0; i < most_frames; ++i) {
        if (app_->idle() && !app_->wants_frame() && !platform_.waiting() &&
            context_->InputEventsQueue.empty())
            return;
        frame();
    }
    throw std::runtime_error("the shell does not come to rest");
}

void Headless::wait(float seconds) {
    frame(static_cast<int>(seconds / frame_seconds) + 1);
}

const LedgerItem* Headless::find(std::string_view label, std::string_view role) const {
    return ledger().find(label, role);
}

const LedgerItem& Headless::item(std::string_view label, std::string_view role) const {
    const LedgerItem* found = find(label, role);
    if (found == nullptr)
        throw std::runtime_error("no " + std::string(role.empty() ? "item" : role) + " \"" +
                                 std::string(label) + "\" is to be seen; there are:" + all_labels(ledger()));
    return *found;
}

const LedgerItem& Headless::item_of_id(std::string_view id) const {
    for (const LedgerItem& item : ledger().items()) {
        if (item.id == id) return item;
    }
    throw std::runtime_error("no item has the id \"" + std::string(id) + "\"");
}

ImVec2 Headless::middle(const LedgerItem& item) {
    const float left = std::max(item.at.x, item.clip_min.x);
    const float top = std::max(item.at.y, item.clip_min.y);
    const float right = std::min(item.at.x + item.size.x, item.clip_max.x);
    const float bottom = std::min(item.at.y + item.size.y, item.clip_max.y);
    return {(left + right) / 2, (top + bottom) / 2};
}

void Headless::move_to(ImVec2 place) {
    ImGui::SetCurrentContext(context_);
    ImGui::GetIO().AddMousePosEvent(place.x, place.y);
    // An item learns in one frame that the pointer is on it, and in the next that it may be pressed.
    frame(2);
}

void Headless::press(ImGuiMouseButton button, bool down) {
    ImGui::SetCurrentContext(context_);
    ImGui::GetIO().AddMouseButtonEvent(button, down);
    frame();
}

void Headless::click(std::string_view label, std::string_view role) {
    click_at(middle(item(label, role)));
}

void Headless::click_at(ImVec2 place, ImGuiMouseButton button) {
    move_to(place);
    press(button, true);
    press(button, false);
    settle();
}

void Headless::double_click(std::string_view label, std::string_view role) {
    double_click_at(middle(item(label, role)));
}

void Headless::double_click_at(ImVec2 place) {
    move_to(place);
    for (int i = 0; i < 2; ++i) {
        press(ImGuiMouseButton_Left, true);
        press(ImGuiMouseButton_Left, false);
    }
    settle();
}

void Headless::drag(ImVec2 from, ImVec2 to, int steps) {
    drag_halfway(from, to, steps);
    release();
}

void Headless::drag_halfway(ImVec2 from, ImVec2 to, int steps) {
    move_to(from);
    press(ImGuiMouseButton_Left, true);
    for (int i = 1; i <= steps; ++i) {
        const float part = static_cast<float>(i) / static_cast<float>(steps);
        ImGui::GetIO().AddMousePosEvent(from.x + (to.x - from.x) * part, from.y + (to.y - from.y) * part);
        frame();
    }
    frame();
}

void Headless::release() {
    press(ImGuiMouseButton_Left, false);
    settle();
}

void Headless::wheel(ImVec2 place, float lines_down) {
    move_to(place);
    ImGui::GetIO().AddMouseWheelEvent(0, -lines_down);
    frame();
    settle();
}

void Headless::hold_modifiers(ImGuiKeyChord modifiers, bool down) {
    for (const ImGuiKey each : {ImGuiMod_Ctrl, ImGuiMod_Shift, ImGuiMod_Alt, ImGuiMod_Super}) {
        if ((modifiers & each) == 0) continue;
        ImGui::GetIO().AddKeyEvent(each, down);
        frame();
    }
}

void Headless::key(ImGuiKey key, ImGuiKeyChord modifiers) {
    ImGui::SetCurrentContext(context_);
    hold_modifiers(modifiers, true);
    ImGui::GetIO().AddKeyEvent(key, true);
    frame();
    ImGui::GetIO().AddKeyEvent(key, false);
    frame();
    hold_modifiers(modifiers, false);
    settle();
}

void Headless::type(std::string_view text) {
    ImGui::SetCurrentContext(context_);
    while (!text.empty()) {
        std::size_t length = 1;
        while (length < text.size() && (static_cast<unsigned char>(text[length]) & 0xC0) == 0x80) ++length;
        ImGui::GetIO().AddInputCharactersUTF8(std::string(text.substr(0, length)).c_str());
        text.remove_prefix(length);
        frame();
    }
    settle();
}

void Headless::paste(const std::string& text) {
    ImGui::SetCurrentContext(context_);
    if (ImGui::GetIO().WantTextInput) {
        clipboard_ = text;
        key(ImGuiKey_V, ImGuiMod_Ctrl);
    } else {
        app_->paste_text(text);
        settle();
    }
}

bool Headless::save_png(const std::string& path) const {
    return testing::save_png(path, painter_.pixels(), painter_.width(), painter_.height());
}

} // namespace steelyard::testing
