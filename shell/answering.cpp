#include <algorithm>

#include "core/decision/lookup.hpp"
#include "shell/app_state.hpp"
#include "shell/rooms/weigh_answers.hpp"
#include "shell/sentences.hpp"
#include "shell/widgets/controls.hpp"
#include "shell/widgets/panels.hpp"
#include "shell/widgets/sentence.hpp"
#include "shell/widgets/text.hpp"

/// Who answers, and what is folded away while he does.
namespace steelyard {
namespace {

/// A card in the upper middle of an area, at most so large.
Box card_box(const Box& area, float width, float height) {
    const float w = std::min(width, area.w);
    const float h = std::min(height, area.h);
    return {area.x + (area.w - w) / 2, area.y + std::min((area.h - h) / 3, 90.0f), w, h};
}

/// Buttons from the left, each below the one before where the width does not suffice.
class Buttons {
public:
    /// `indent`: how far right the first one begins.
    Buttons(Ui& ui, const Box& space, float indent = 0)
        : ui_(ui), space_(space), x_(space.x + indent), y_(space.y) {}

    bool add(std::string_view id, std::string_view label, ButtonKind kind) {
        const float width = std::min(button_width(label, kind), space_.w);
        if (x_ > space_.x && x_ + width > space_.right()) {
            x_ = space_.x;
            y_ += 44;
        }
        const Box box{x_, y_, width, 38};
        x_ += width + 12;
        return button(ui_, id, label, box, kind);
    }
    float bottom() const { return y_ + 38; }

private:
    Ui& ui_;
    Box space_;
    float x_;
    float y_;
};

} // namespace

void draw_begin_card(App::State& state, const RoomView& view, Box area) {
    Ui& ui = state.ui;
    const Theme& theme = ui.look();
    const Person& person = *find_person(view.decision, state.handing_to);
    const std::string name = person_name(view.decision, person.id);
    const Box box = card_box(area, 680, 290);
    const Card card(ui, box, theme.brass);
    ScrollArea scroll(ui, "begin-card", box.inset(22));
    Box inside = scroll.inner();
    float y = inside.y;
    draw_text(ui, {inside.x + inside.w / 2, y}, "Who answers now",
              {.ink = theme.quiet, .max_width = inside.w, .align = Align::centre});
    y += 34;
    y += draw_sentence(ui, {inside.x, y, inside.w, 100}, name, Font::huge, Font::heading, 2) + 2;
    if (!person.role.empty()) {
        draw_text(ui, {inside.x + inside.w / 2, y}, person.role,
                  {.ink = theme.quiet, .max_width = inside.w, .align = Align::centre});
        y += 26;
    }
    y += 10;
    const std::string begin = "I am " + name + ": begin";
    float wide = button_width(begin) + 12 + button_width("Back", ButtonKind::quiet);
    if (!view.sealed()) wide += button_width("Answer in the open") + 12;
    Buttons buttons(ui, {inside.x, y, inside.w, 0}, std::max(0.0f, (inside.w - wide) / 2));
    if (buttons.add("begin", begin, ButtonKind::strong)) {
        const Id next = person.id;
        state.after_frame.emplace_back([&state, next] {
            state.change_answering(Answering::alone);
            state.seat(next);
        });
    }
    if (!view.sealed() && buttons.add("begin-open", "Answer in the open", ButtonKind::plain)) {
        const Id next = person.id;
        state.after_frame.emplace_back([&state, next] {
            state.change_answering(Answering::agreed);
            state.seat(next);
        });
    }
    if (buttons.add("begin-back", "Back", ButtonKind::quiet)) {
        state.after_frame.emplace_back([&state] {
            state.handing_to.clear();
            state.fresh_frames = 2;
        });
    }
    y = buttons.bottom() + 16;
    y += draw_paragraph(ui, {inside.x, y}, inside.w,
                        "Until the answers are opened, nobody else sees yours and you see nobody else's. The "
                        "standing stays folded away.");
    scroll.reach(y + 4);
}

void draw_opening_card(App::State& state, const RoomView& view, Box area) {
    Ui& ui = state.ui;
    const Box box = card_box(area, 620, 240);
    const Card card(ui, box);
    ScrollArea scroll(ui, "opening-card", box.inset(22));
    Box inside = scroll.inner();
    float y = inside.y;
    draw_text(ui, {inside.x, y}, "Open what was sealed?", {.font = Font::heading, .max_width = inside.w});
    y += 36;
    const auto missing = not_done(view, {});
    const std::string who = missing.empty() ? "Everybody has answered everything."
                                            : listed(missing, 6) + (missing.size() == 1 ? " has" : " have") +
                                                  " not answered everything yet.";
    y += draw_paragraph(ui, {inside.x, y}, inside.w,
                        who + " All answers, and the standing they give, then show to everybody.");
    y += 16;
    Buttons buttons(ui, {inside.x, y, inside.w, 0});
    if (buttons.add("open-sealed", "Open everything", ButtonKind::strong)) {
        state.after_frame.emplace_back([&state] { state.change_answering(*state.opening); });
    }
    if (buttons.add("stay-sealed", "Stay sealed", ButtonKind::quiet)) {
        state.after_frame.emplace_back([&state] {
            state.opening.reset();
            state.fresh_frames = 2;
        });
    }
    scroll.reach(buttons.bottom() + 4);
}

void draw_folded_card(App::State& state, Actions& actions, Box area) {
    Ui& ui = state.ui;
    const Box box = card_box(area, 620, 210);
    const Card card(ui, box);
    ScrollArea scroll(ui, "folded-card", box.inset(22));
    Box inside = scroll.inner();
    float y = inside.y;
    y += draw_paragraph(ui, {inside.x, y}, inside.w, "Folded away while answers are sealed",
                        {.font = Font::heading});
    y += 10;
    y += draw_paragraph(
        ui, {inside.x, y}, inside.w,
        "What stands here follows from everybody's answers. It comes back when they are opened.");
    y += 16;
    Buttons buttons(ui, {inside.x, y, inside.w, 0});
    if (buttons.add("folded-weigh", "Go to Weigh", ButtonKind::plain)) actions.go(RoomId::weigh);
    if (buttons.add("folded-open", "Open what is sealed", ButtonKind::quiet))
        actions.answer_by(Answering::agreed);
    scroll.reach(buttons.bottom() + 4);
}

void draw_sealed_bar(App::State& state, Actions& actions, Box box) {
    Ui& ui = state.ui;
    const Theme& theme = ui.look();
    ImGui::GetWindowDrawList()->AddRectFilled(box.at(), box.end(), theme.brass_wash);
    rule(ui, box.x, box.bottom() - 1, box.w);
    const OnPaper paper(ui, theme.brass_wash);
    Box row = box;
    row.take_right(12);
    const std::string label = "Open what is sealed";
    const Box open = row.take_right(button_width(label, ButtonKind::quiet), 10);
    const std::string text = box.w > 900
                                 ? "Each answers alone: the standing and the others' answers are folded away."
                                 : "Sealed: the standing is folded away.";
    draw_text(ui, {box.x + 24, box.y + (box.h - font_size(Font::body)) / 2}, text,
              {.ink = theme.brass_ink, .max_width = open.x - box.x - 34});
    if (button(ui, "sealed-open", label, {open.x, open.y + 3, open.w, open.h - 6}, ButtonKind::quiet))
        actions.answer_by(Answering::agreed);
}

} // namespace steelyard
