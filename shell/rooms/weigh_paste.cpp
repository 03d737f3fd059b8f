#include "shell/rooms/weigh_paste.hpp"

#include <algorithm>
#include <utility>

#include "core/decision/lookup.hpp"
#include "shell/rooms/weigh_matrix_plan.hpp"
#include "shell/widgets/controls.hpp"
#include "shell/widgets/panels.hpp"
#include "shell/widgets/text.hpp"

namespace steelyard {
namespace {

constexpr std::string_view field_id = "matrix-text";
constexpr float button_height = 32;

} // namespace

void MatrixPaste::open(std::string text, const Id& set, const Id& person) {
    open_ = true;
    fresh_ = true;
    clear_ = false;
    text_ = std::move(text);
    set_ = set;
    person_ = person;
}

bool MatrixPaste::draw(Ui& ui, const RoomView& view, Actions& actions, const SetResult& entry, Box box) {
    const Theme& theme = ui.look();
    const std::string* draft = draft_of(ui, field_id);
    const std::string& text = draft != nullptr ? *draft : text_;
    const bool waiting = text.find_first_not_of(" \t\r\n") == std::string::npos;
    const MatrixPlan plan = plan_matrix(view, entry, text, clear_);

    const std::string whose =
        view.person.empty() ? "agreed in the room" : "of " + person_name(view.decision, view.person);
    draw_text(ui, box.take_top(26).at(), "Paste a matrix of answers " + whose,
              {.font = Font::strong, .ink = theme.quiet, .max_width = box.w});
    Box buttons = box.take_bottom(button_height, 10);
    const std::size_t entered = plan.entered + plan.replaced;
    const std::size_t count = entered > 0 ? entered : clear_ ? plan.left_blank : 0;
    const std::string label = std::string(entered > 0 || count == 0 ? "Enter " : "Clear ") +
                              std::to_string(count) + (count == 1 ? " answer" : " answers");
    const bool ready = plan.problem.empty() && count > 0 && !view.read_only;

    {
        ScrollArea area(ui, "matrix-paste", box);
        const Box in = area.inner();
        const float w = box.w - ImGui::GetStyle().ScrollbarSize - 4;
        float y = in.y;
        const auto say = [&](const std::string& words, Font font, ImU32 ink) {
            if (!words.empty()) y += draw_paragraph(ui, {in.x, y}, w, words, {.font = font, .ink = ink}) + 4;
        };
        if (waiting) {
            say("Copy the matrix in the spreadsheet, with or without its names, and paste it here.",
                Font::body, theme.ink);
        } else if (!plan.problem.empty()) {
            say("Nothing was changed.", Font::strong, theme.red);
            say(plan.problem, Font::body, theme.ink);
        } else {
            say(plan.words, Font::strong, theme.ink);
            say(plan.notes, Font::small, theme.quiet);
            if (plan.left_blank > 0) {
                const std::string blank = "Clear the " + std::to_string(plan.left_blank) + " it leaves blank";
                if (const auto now = tick_box(ui, "matrix-clear", blank, clear_, {in.x, y, w, 28}))
                    clear_ = *now;
                y += 32;
            }
        }
        y += 4;
        if (fresh_ && waiting) ui.focus_next = std::string(field_id);
        const float height = std::max(64.0f, in.y + box.h - y - 4);
        if (auto now = text_area(ui, field_id, "Matrix as text", text_, {in.x + 3, y, w - 6, height}))
            text_ = std::move(*now);
        area.reach(y + height + 4);
    }

    const Box enter = buttons.take_left(button_width(label, ButtonKind::strong), 10);
    const Box cancel = buttons.take_left(button_width("Cancel"));
    if (fresh_ && ready) ui.focus_next = "matrix-enter";
    fresh_ = false;
    if (button(ui, "matrix-enter", label, enter, ButtonKind::strong, ready)) {
        actions.edit(plan.edits, plan.label);
        close();
    }
    const bool escaped = draft == nullptr && ImGui::IsKeyPressed(ImGuiKey_Escape, false);
    if (button(ui, "matrix-cancel", "Cancel", cancel) || escaped) close();
    return open_;
}

} // namespace steelyard
