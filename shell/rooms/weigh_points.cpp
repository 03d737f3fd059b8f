#include "shell/rooms/weigh_points.hpp"

#include <algorithm>
#include <cmath>
#include <utility>

#include "core/decision/lookup.hpp"
#include "shell/rooms/share_out.hpp"
#include "shell/rooms/weigh_answers.hpp"
#include "shell/rooms/weigh_hold_words.hpp"
#include "shell/sentences.hpp"
#include "shell/widgets/controls.hpp"
#include "shell/widgets/panels.hpp"
#include "shell/widgets/slider.hpp"
#include "shell/widgets/text.hpp"
#include "shell/words.hpp"

namespace steelyard {
namespace {

constexpr float field_width = 76;
constexpr float slider_height = 40;
constexpr float button_height = 32;

const PointsEntry* last_points(const Decision& d, const Id& set, const Id& by) {
    const auto found = std::find_if(d.points.rbegin(), d.points.rend(),
                                    [&](const PointsEntry& p) { return p.set == set && p.by == by; });
    return found == d.points.rend() ? nullptr : &*found;
}

std::vector<double> in_order(const PointsEntry& entry, const std::vector<Id>& items) {
    std::vector<double> points;
    for (const auto& item : items) {
        const auto found = std::find_if(entry.points.begin(), entry.points.end(),
                                        [&](const auto& p) { return p.first == item; });
        points.push_back(found == entry.points.end() ? 0 : found->second);
    }
    return points;
}

} // namespace

PointsCard::Standing PointsCard::standing(const RoomView& view, const SetResult& entry) const {
    Standing now;
    const Decision& d = view.decision;
    now.own = last_points(d, entry.set, view.person);
    const SetResult* group = group_entry(view.results, entry.set);
    if (!view.sealed() && group != nullptr && group->weights) {
        now.together.emplace();
        for (const double weight : *group->weights) now.together->push_back(all_points * weight);
    }
    if (now.own != nullptr) {
        now.points = as_hundred(in_order(*now.own, entry.items), false);
        now.given = true;
    } else if (view.person.empty() && now.together) {
        now.points = as_hundred(*now.together, true);
    } else {
        now.points = as_hundred(std::vector<double>(entry.items.size(), 0), true);
    }
    return now;
}

void PointsCard::draw(Ui& ui, const RoomView& view, Actions& actions, const SetResult& entry, Box box) {
    if (set_ != entry.set || person_ != view.person || held_.size() != entry.items.size()) {
        reset();
        set_ = entry.set;
        person_ = view.person;
        held_.assign(entry.items.size(), false);
    }
    const Standing now = standing(view, entry);
    const Card card(ui, box);
    const Box inside = box.inset(16);
    ScrollArea area(ui, "points", inside);
    const Box in = area.inner();
    TextFlow flow(ui, in.x + 4, in.y, inside.w - ImGui::GetStyle().ScrollbarSize - 10);
    draw_head(ui, view, entry, now, flow);
    for (std::size_t i = 0; i < entry.items.size(); ++i) draw_row(ui, view, actions, entry, now, i, flow);
    draw_foot(ui, view, actions, entry, now, flow);
    area.reach(flow.y());
}

void PointsCard::draw_head(Ui& ui, const RoomView& view, const SetResult& entry, const Standing& now,
                           TextFlow& flow) const {
    const Theme& theme = ui.look();
    const Decision& d = view.decision;
    draw_text(ui, flow.next(30, 2).at(), "100 points for " + node_name(d, entry.set),
              {.font = Font::heading, .max_width = flow.width()});
    const std::string whose =
        view.person.empty() ? "Agreed in the room" : "Answering as " + person_name(d, view.person);
    flow.say(whose + ". What one item takes, the others give in proportion.", Font::body, theme.quiet);
    const bool agreed = last_points(d, entry.set, Id{}) != nullptr;
    if (!view.person.empty() && agreed) {
        flow.say("Points were agreed in the room; they stand in place of these.", Font::small,
                 theme.brass_ink);
    } else if (now.own == nullptr) {
        flow.say(view.person.empty() && now.together ? "The sliders stand where the judges' points lie "
                                                       "together; moving one agrees on points in their place."
                                                     : "Nothing is shared out yet: the sliders stand level.",
                 Font::small, theme.brass_ink);
    }
    flow.space(6);
}

void PointsCard::draw_row(Ui& ui, const RoomView& view, Actions& actions, const SetResult& entry,
                          const Standing& now, std::size_t at, TextFlow& flow) {
    const Theme& theme = ui.look();
    const Id& item = entry.items[at];
    const std::string name = item_name(view.decision, entry.set, item);
    const std::string range = range_at_stake(view.decision, view.results, entry.set, item);
    const bool narrow = flow.width() < 520;
    const float name_width = narrow ? flow.width() : std::clamp(flow.width() * 0.34F, 150.0F, 280.0F);
    Box row = flow.next(narrow ? slider_height + 58 : slider_height + 14, 4);
    Box names = row;
    Box work = row;
    if (narrow) {
        names = work.take_top(42);
    } else {
        names = work.take_left(name_width, 12);
        work = {work.x, work.y, work.w, slider_height + 6};
    }
    draw_text(ui, {names.x, names.y + 2}, name, {.font = Font::strong, .max_width = names.w - 10});
    draw_text(ui, {names.x, names.y + 23}, range,
              {.font = Font::small, .ink = theme.quiet, .max_width = names.w - 10});

    // A copy: the preview goes when the gesture ends, in the middle of this.
    const std::vector<double> points = preview_.empty() ? now.points : preview_;
    const Box field = work.take_right(field_width, 12);
    SliderState state;
    state.value = points[at];
    state.set = now.given || !preview_.empty();
    state.enabled = !view.read_only;
    if (const double left = left_by_held(now.points, held_, at); left < all_points) state.limit = left;
    if (now.together && (now.own != nullptr || !view.person.empty())) state.other = (*now.together)[at];
    const std::string id = "slide/" + item;
    const SliderAnswer answer =
        slider(ui, id, "Points of " + name, state, {work.x, work.y, work.w, slider_height});
    if (answer.preview) preview_ = share_out(now.points, held_, at, *answer.preview);
    if (answer.value) {
        held_[at] = false; // Moved by hand: no longer typed.
        const auto next = share_out(now.points, held_, at, *answer.value);
        if (!now.given || next != now.points) enter(view, actions, entry, next, now);
        preview_.clear();
    }
    const std::string shown = state.set ? figure_text(points[at]) : "";
    if (view.read_only) {
        draw_text(ui, {field.right() - 10, field.y + 10}, shown, {.align = Align::right});
    } else if (const auto typed = text_field(ui, "points/" + item, "Points for " + name, shown,
                                             {field.x, field.y + 3, field.w, 34}, figure_text(points[at]))) {
        type(view, actions, entry, now, at, *typed);
    }
    if (state.other) {
        draw_text(ui, {work.x + 9, work.y + slider_height - 4},
                  "together " + points_text(*state.other / all_points),
                  {.font = Font::small, .ink = theme.quiet, .max_width = work.w - 18});
    }
    if (held_[at]) {
        const Box hold{field.right() - 60, field.y + 34, 60, 24};
        if (button(ui, "hold/" + item, "held", {hold.x, narrow ? names.y + 8 : hold.y, hold.w, hold.h},
                   ButtonKind::quiet))
            held_[at] = false;
    }
}

void PointsCard::type(const RoomView& view, Actions& actions, const SetResult& entry, const Standing& now,
                      std::size_t at, const std::string& typed) {
    const auto value = read_number(typed);
    if (!value || *value < 0 || *value > all_points) {
        actions.say("\"" + typed + "\" is no number of points from 0 to 100.");
        return;
    }
    std::vector<std::string> holding;
    double rest = all_points;
    for (std::size_t i = 0; i < held_.size(); ++i) {
        if (i == at || !held_[i]) continue;
        rest -= now.points[i];
        holding.push_back(item_name(view.decision, entry.set, entry.items[i]));
    }
    const bool all_held = holding.size() + 1 == held_.size();
    if (*value > rest + 1e-9 || (all_held && std::abs(*value - rest) > 1e-9)) {
        actions.say(listed(holding) + (holding.size() == 1 ? " is" : " are") + " held, which leaves " +
                    figure_text(rest) + " points here. Press \"held\" to let one give.");
        return;
    }
    const auto next = share_out(now.points, held_, at, *value);
    held_[at] = held_.size() > 2; // Of two, the other one follows in any case.
    if (!now.given || next != now.points) enter(view, actions, entry, next, now);
}

void PointsCard::enter(const RoomView& view, Actions& actions, const SetResult& entry,
                       const std::vector<double>& points, const Standing& now) const {
    PointsEntry next;
    next.set = entry.set;
    next.by = view.person;
    next.note = now.own != nullptr ? now.own->note : remark_;
    for (std::size_t i = 0; i < points.size(); ++i) next.points.emplace_back(entry.items[i], points[i]);
    actions.edit(Enter<PointsEntry>{std::move(next)});
}

void PointsCard::draw_foot(Ui& ui, const RoomView& view, Actions& actions, const SetResult& entry,
                           const Standing& now, TextFlow& flow) {
    const Theme& theme = ui.look();
    const Decision& d = view.decision;
    flow.space(8);
    const std::string note = now.own != nullptr ? now.own->note : remark_;
    if (view.read_only) {
        flow.say(note, Font::small, theme.quiet);
    } else if (const Box box = flow.next(34, 8);
               auto typed = text_field(ui, "points-remark", "Remark", note,
                                       {box.x + 2, box.y, box.w - 4, box.h}, "Remark (may be left empty)")) {
        remark_ = *typed;
        if (now.own != nullptr) {
            PointsEntry next = *now.own;
            next.note = std::move(*typed);
            next.at.clear();
            actions.edit({Enter<PointsEntry>{std::move(next)}},
                         "Remark on the points of \"" + node_name(d, entry.set) + "\"");
        }
    }
    Box row = flow.next(button_height, 8);
    const char* back = "Take back";
    if (button(ui, "points-back", back, row.take_left(button_width(back), 10), ButtonKind::plain,
               now.own != nullptr && !view.read_only)) {
        actions.edit(ClearPoints{entry.set, view.person});
        held_.assign(held_.size(), false);
    }
    const char* pairs = "Weigh in pairs instead";
    if (button(ui, "points-to-pairs", pairs, row.take_left(button_width(pairs, ButtonKind::link) + 8),
               ButtonKind::quiet))
        actions.go(RoomId::frame, entry.set);

    if (view.person.empty() && !view.sealed()) {
        for (const auto& person : d.people) {
            const PointsEntry* said = last_points(d, entry.set, person.id);
            if (said == nullptr) continue;
            const auto points = in_order(*said, entry.items);
            std::vector<std::string> parts;
            for (std::size_t i = 0; i < points.size(); ++i)
                parts.push_back(item_name(d, entry.set, entry.items[i]) + " " + figure_text(points[i]));
            flow.say(person_name(d, person.id) + ": " + listed(parts, parts.size()) +
                         (said->note.empty() ? "." : ". \"" + said->note + "\""),
                     Font::small, theme.quiet, 2);
        }
        flow.space(6);
    }
    if (!now.together) return;
    flow.say("What counts in the standing", Font::strong, theme.quiet);
    const float name_width = std::min(flow.width() * 0.46F, 260.0F);
    for (std::size_t i = 0; i < entry.items.size(); ++i) {
        const Box line = flow.next(25, 0);
        const double part = (*now.together)[i] / all_points;
        draw_text(ui, line.at(), item_name(d, entry.set, entry.items[i]), {.max_width = name_width - 8});
        bar(ui, {line.x + name_width, line.y + 6, line.w - name_width - 68, 8}, static_cast<float>(part),
            theme.steel);
        draw_text(ui, {line.right(), line.y}, percent_text(part), {.align = Align::right});
    }
    flow.space(6);
}

} // namespace steelyard
