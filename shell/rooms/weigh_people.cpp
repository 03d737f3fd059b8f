#include "shell/rooms/weigh_people.hpp"

#include <algorithm>

#include "core/decision/lookup.hpp"
#include "shell/rooms/weigh_apart.hpp"
#include "shell/rooms/weigh_differ.hpp"
#include "shell/sentences.hpp"
#include "shell/widgets/controls.hpp"
#include "shell/widgets/panels.hpp"
#include "shell/widgets/text.hpp"

namespace steelyard {
namespace {

constexpr float row_height = 38;
constexpr float row_gap = 10;
constexpr float one_row_from = 760;

/// Whether somebody has answered something of the set for himself.
bool anybody(const RoomView& view, const Id& set) {
    return std::any_of(view.decision.judgments.begin(), view.decision.judgments.end(),
                       [&](const Judgment& judgment) { return judgment.set == set && !judgment.by.empty(); });
}

bool two_rows(const RoomView& view, const Id& set, float width) {
    const bool more =
        view.sealed() || !view.person.empty() || (view.answering == Answering::agreed && anybody(view, set));
    return width < one_row_from && more;
}

/// Who is at the seat, in large letters, and the way to the next one.
void draw_seat(Ui& ui, const RoomView& view, Actions& actions, Box box) {
    const Theme& theme = ui.look();
    const std::string label = "Hand over";
    const Box over = box.take_right(button_width(label), 14);
    if (button(ui, "hand-over", label, {over.x, over.y + 2, over.w, 34}, ButtonKind::plain)) {
        actions.answer_as({});
        // In the open the seat is left for good; sealed, the next one is chosen from a list.
    }
    const std::string name = person_name(view.decision, view.person);
    const std::string how = view.sealed() ? " answers alone" : " answers in the open";
    const float how_width = text_size(Font::body, how).x + 4;
    const bool fits = text_size(Font::large, name).x + how_width <= box.w;
    const Font font = fits ? Font::large : Font::heading;
    const float space = std::max(60.0f, box.w - how_width);
    const float width = std::min(text_size(font, name).x, space);
    float x = box.right() - width - how_width;
    draw_text(ui, {x, box.y + (box.h - font_size(font)) / 2}, name, {.font = font, .max_width = space});
    x = box.right() - how_width + 4;
    if (box.w - how_width >= 60)
        draw_text(ui, {x, box.y + (box.h - font_size(Font::body)) / 2 + (fits ? 4 : 1)}, how.substr(1),
                  {.ink = theme.brass_ink});
}

} // namespace

float head_height(const RoomView& view, const Id& set, float width) {
    if (view.decision.people.empty()) return 0;
    return two_rows(view, set, width) ? 2 * row_height + row_gap : row_height;
}

Box draw_head(Ui& ui, const RoomView& view, Actions& actions, const SetResult& group, WeighPart& part,
              Box box) {
    if (view.decision.people.empty()) return {box.x, box.y, 0, 0};
    Box first = box.take_top(row_height, row_gap);
    const bool stacked = two_rows(view, group.set, first.w);
    const float wanted = first.w < one_row_from && !stacked ? first.w - 160 : 462.0f;
    const Box ways = first.take_left(stacked ? first.w : std::clamp(wanted, 300.0f, 462.0f), 16);
    // In the open as a person is none of the three.
    const bool open_person = view.answering == Answering::agreed && !view.person.empty();
    const std::size_t chosen = open_person ? 3 : static_cast<std::size_t>(view.answering);
    if (const auto way = choice(ui, "answering-way", "How answers are given",
                                {"Agreed in the room", "Each alone", "Show of hands"}, chosen, ways)) {
        part = WeighPart::arm;
        const auto next = static_cast<Answering>(*way);
        if (next == view.answering)
            actions.answer_as({});
        else
            actions.answer_by(next);
    }
    Box seat = stacked ? box : first;
    if (!view.person.empty()) {
        draw_seat(ui, view, actions, seat);
    } else if (view.answering == Answering::agreed) {
        const auto turn_to = [&](const char* id, const char* label, WeighPart to) {
            const Box place = seat.take_right(std::min(button_width(label), seat.w), 10);
            if (button(ui, id, label, {place.x, place.y + 2, place.w, 34}, ButtonKind::plain)) part = to;
        };
        if (part != WeighPart::arm) turn_to("part/arm", "Back to the arm", WeighPart::arm);
        if (part != WeighPart::differ && DifferPage::has_something(view))
            turn_to("part/differ", "Where you disagree", WeighPart::differ);
        if (part != WeighPart::everybody && anybody(view, group.set))
            turn_to("part/everybody", "Everybody's answers", WeighPart::everybody);
    }
    return stacked ? Box{first.x, first.y, 0, 0} : seat;
}

void draw_hand_over(Ui& ui, const RoomView& view, Actions& actions, const SetResult& group,
                    std::set<Id>& revealed, Box box) {
    const Theme& theme = ui.look();
    const Decision& d = view.decision;
    const Card card(ui, box);
    Box inside = box.inset(20);
    ScrollArea area(ui, "hand-over-card", inside);
    const Box in = area.inner();
    float y = in.y;
    y += draw_paragraph(ui, {in.x, y}, in.w, "Who answers next?", {.font = Font::heading}) + 8;
    bool suggested = false; // One of them stands out: the next who has something to answer.
    for (const auto& person : d.people) {
        const std::string name = person_name(d, person.id);
        const Progress here = progress_of(d, group, person.id);
        std::size_t done = 0;
        std::size_t sets = 0;
        for (const auto& entry : view.results.sets) {
            if (!entry.by.empty()) continue;
            ++sets;
            if (progress_of(d, entry, person.id).done()) ++done;
        }
        const std::string label = "Hand over to " + name;
        const float width = std::min(button_width(label), in.w * 0.48f);
        if (button(ui, "seat/" + person.id, label, {in.right() - width - 4, y + 3, width, 36},
                   here.done() || suggested ? ButtonKind::plain : ButtonKind::strong, !view.read_only))
            actions.answer_as(person.id);
        suggested = suggested || !here.done();
        const float space = in.w - width - 24;
        draw_text(ui, {in.x, y + 2}, name, {.font = Font::strong, .max_width = space});
        std::string words = (here.done() && !here.ended ? "done with this set: " : "") +
                            progress_words(here) + " \xC2\xB7 " + std::to_string(done) + " of " +
                            std::to_string(sets) + " sets";
        if (person.share == 0) words += " \xC2\xB7 heard, not counted";
        draw_text(ui, {in.x, y + 23}, words,
                  {.font = Font::small, .ink = here.done() ? theme.green : theme.quiet, .max_width = space});
        y += 46;
    }
    rule(ui, in.x, y + 4, in.w - 4);
    y += 16;
    const auto missing = not_done(view, group.set);
    const std::string set_name = node_name(d, group.set);
    if (missing.empty()) {
        y += draw_paragraph(ui, {in.x, y}, in.w - 4,
                            "Everybody has done with " + set_name +
                                ". Reveal shows all answers of this set, "
                                "name by name.");
    } else {
        y += draw_paragraph(ui, {in.x, y}, in.w - 4,
                            listed(missing, 6) + (missing.size() == 1 ? " has" : " have") +
                                " not done with " + set_name + " yet.");
    }
    y += 8;
    const std::string label = missing.empty() ? "Reveal" : "Reveal without " + listed(missing, 3);
    const float width = std::min(button_width(label), in.w - 4);
    if (!group.from_points &&
        button(ui, "reveal", label, {in.x, y, width, 38},
               missing.empty() ? ButtonKind::strong : ButtonKind::plain, anybody(view, group.set)))
        revealed.insert(group.set);
    y += 46;
    area.reach(y);
}

} // namespace steelyard
