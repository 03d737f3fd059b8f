#include "tests/shell/support/card_page.hpp"

#include <algorithm>
#include <stdexcept>
#include <utility>

#include "shell/context.hpp"
#include "shell/theme.hpp"
#include "tests/shell/support/ledger_checks.hpp"
#include "tests/shell/support/save_png.hpp"

namespace steelyard::testing {

CardPage::CardPage(Decision decision, Draw draw, CardOptions options)
    : draw_(std::move(draw)), options_(options), session_(std::move(decision)), context_(make_context(1)) {
    ui_.theme = options.dark ? &dark_theme() : &light_theme();
    apply_theme(*ui_.theme);
    unsigned char* alpha = nullptr;
    int width = 0;
    int height = 0;
    ImGui::GetIO().Fonts->GetTexDataAsAlpha8(&alpha, &width, &height);
    painter_.set_atlas(alpha, width, height);
    frame(3);
}

CardPage::~CardPage() {
    ImGui::SetCurrentContext(context_);
    ImGui::DestroyContext(context_);
}

void CardPage::frame(int count) {
    for (int i = 0; i < count; ++i) draw_frame();
}

void CardPage::draw_frame() {
    ImGui::SetCurrentContext(context_);
    ImGuiIO& io = ImGui::GetIO();
    io.DisplaySize = {static_cast<float>(options_.width), static_cast<float>(options_.height)};
    io.DeltaTime = 1.0F / 60;
    ImGui::NewFrame();
    if (io.MouseDown[0]) ui_.keyboard_used = false;
    ui_.ledger.begin_frame("card");
    ui_.paper = ui_.look().paper;
    ui_.scrolling = false;
    ImGui::SetNextWindowPos({0, 0});
    ImGui::SetNextWindowSize(io.DisplaySize);
    ImGui::Begin("page", nullptr,
                 ImGuiWindowFlags_NoDecoration | ImGuiWindowFlags_NoMove | ImGuiWindowFlags_NoSavedSettings);
    sharpen_edges();
    Actions actions;
    {
        const RoomView view{.decision = session_.decision(),
                            .results = session_.results(),
                            .person = person,
                            .read_only = read_only,
                            .answering = answering,
                            .examination = examination ? &*examination : nullptr};
        draw_(ui_, view, actions, Box{0, 0, io.DisplaySize.x, io.DisplaySize.y}.inset(8));
    }
    ImGui::End();
    ImGui::Render();
    painter_.paint(*ImGui::GetDrawData(), options_.width, options_.height,
                   ImGui::GetColorU32(ImGuiCol_WindowBg));
    if (!actions.to_copy.empty()) copied.push_back(actions.to_copy);
    if (!actions.message.empty()) message = actions.message;
    if (actions.go_to.wanted) went = actions.go_to;
    if (actions.answers.wanted) answers = actions.answers.person;
    examined = actions.to_examine;
    for (auto& step : actions.steps) {
        const auto outcome =
            session_.apply(step.edits, Stamp{"2026-01-02T03:04:05Z", person, step.why}, step.label);
        if (!outcome.problems.empty()) throw std::runtime_error(sentence(outcome.problems.front()));
    }
}

bool CardPage::undo() {
    const bool done = session_.undo(Stamp{});
    frame(3);
    return done;
}

void CardPage::click(std::string_view label, std::string_view role) {
    const LedgerItem& one = item(label, role);
    const float left = std::max(one.at.x, one.clip_min.x);
    const float top = std::max(one.at.y, one.clip_min.y);
    const float right = std::min(one.at.x + one.size.x, one.clip_max.x);
    const float bottom = std::min(one.at.y + one.size.y, one.clip_max.y);
    click_at({(left + right) / 2, (top + bottom) / 2});
}

void CardPage::click_at(ImVec2 place) {
    drag(place, place, 0);
}

void CardPage::drag(ImVec2 from, ImVec2 to, int steps) {
    ImGui::SetCurrentContext(context_);
    ImGuiIO& io = ImGui::GetIO();
    io.AddMousePosEvent(from.x, from.y);
    frame(2);
    io.AddMouseButtonEvent(0, true);
    frame();
    for (int i = 1; i <= steps; ++i) {
        const float part = static_cast<float>(i) / static_cast<float>(steps);
        io.AddMousePosEvent(from.x + (to.x - from.x) * part, from.y + (to.y - from.y) * part);
        frame();
    }
    io.AddMouseButtonEvent(0, false);
    frame(4);
}

void CardPage::hold_modifiers(ImGuiKeyChord modifiers, bool down) {
    for (const ImGuiKey each : {ImGuiMod_Ctrl, ImGuiMod_Shift, ImGuiMod_Alt}) {
        if ((modifiers & each) == 0) continue;
        ImGui::GetIO().AddKeyEvent(each, down);
        frame();
    }
}

void CardPage::key(ImGuiKey key, ImGuiKeyChord modifiers) {
    ImGui::SetCurrentContext(context_);
    ui_.keyboard_used = true;
    hold_modifiers(modifiers, true);
    ImGui::GetIO().AddKeyEvent(key, true);
    frame();
    ImGui::GetIO().AddKeyEvent(key, false);
    frame();
    hold_modifiers(modifiers, false);
    frame(3);
}

void CardPage::type(std::string_view text) {
    ImGui::SetCurrentContext(context_);
    for (const char c : text) {
        ImGui::GetIO().AddInputCharacter(static_cast<unsigned char>(c));
        frame();
    }
    frame(3);
}

void CardPage::wheel(float lines_down) {
    ImGui::SetCurrentContext(context_);
    ImGui::GetIO().AddMousePosEvent(static_cast<float>(options_.width) / 2,
                                    static_cast<float>(options_.height) / 2);
    frame(2);
    ImGui::GetIO().AddMouseWheelEvent(0, -lines_down);
    frame(4);
}

const LedgerItem* CardPage::find(std::string_view label, std::string_view role) const {
    return ui_.ledger.find(label, role);
}

const LedgerItem& CardPage::item(std::string_view label, std::string_view role) const {
    const LedgerItem* found = find(label, role);
    if (found == nullptr)
        throw std::runtime_error("no \"" + std::string(label) + "\" is to be seen; there is: " + texts());
    return *found;
}

std::string CardPage::texts() const {
    std::string all;
    for (const LedgerItem& one : ui_.ledger.items()) {
        if (one.role == "text") all += (all.empty() || all.back() == ' ' ? "" : " ") + one.label;
    }
    return all;
}

bool CardPage::says(const std::string& part) const {
    if (texts().find(part) != std::string::npos) return true;
    for (const LedgerItem& one : ui_.ledger.items()) {
        if (one.label.find(part) != std::string::npos) return true;
    }
    return false;
}

std::vector<std::string> CardPage::faults() const {
    return all_faults(ui_.ledger.items(), static_cast<float>(options_.width),
                      static_cast<float>(options_.height));
}

void CardPage::save_png(const std::string& path) const {
    testing::save_png(path, painter_.pixels(), painter_.width(), painter_.height());
}

} // namespace steelyard::testing
