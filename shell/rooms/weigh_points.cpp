#include "shell/rooms/weigh_points.hpp"

#include <algorithm>
#include <cmath>
#include <cstdio>

#include "core/decision/lookup.hpp"
#include "shell/widgets/controls.hpp"
#include "shell/widgets/panels.hpp"
#include "shell/widgets/text.hpp"
#include "shell/words.hpp"

namespace steelyard {
namespace {

std::string percent(double weight) {
    char buffer[32];
    std::snprintf(buffer, sizeof buffer, "%.1f %%", 100 * weight);
    return buffer;
}

} // namespace

void PointsCard::draw(Ui& ui, const RoomView& view, Actions& actions, const SetResult& entry, Box box) {
    const Theme& theme = ui.look();
    const Decision& d = view.decision;
    const Card card(ui, box);
    Box inside = box.inset(20);
    const std::string who = view.person.empty() ? "agreed in the room" : person_name(d, view.person);
    draw_text(ui, inside.take_top(30).at(), "Points for " + node_name(d, entry.set),
              {.font = Font::heading, .max_width = inside.w});
    draw_text(ui, inside.take_top(34).at(),
              "Share out as many as you like; only their proportions count. These are " + who + ".",
              {.ink = theme.quiet, .max_width = inside.w});
    const PointsEntry* last = nullptr;
    for (const auto& p : d.points) {
        if (p.set == entry.set && p.by == view.person) last = &p;
    }
    const auto points_of = [&](const Id& id) {
        if (last == nullptr) return 0.0;
        for (const auto& [item, value] : last->points) {
            if (item == id) return value;
        }
        return 0.0;
    };
    ScrollArea area(ui, "points", inside);
    const Box in = area.inner();
    float y = in.y;
    double sum = 0;
    for (const auto& item : entry.items) sum += points_of(item);
    const float name_width = std::clamp(in.w * 0.34f, 120.0f, 260.0f);
    for (std::size_t i = 0; i < entry.items.size(); ++i) {
        const Id& item = entry.items[i];
        const std::string name = item_name(d, entry.set, item);
        draw_text(ui, {in.x, y + 2}, name, {.font = Font::strong, .max_width = name_width - 10});
        draw_text(ui, {in.x, y + 23}, range_at_stake(d, view.results, entry.set, item),
                  {.font = Font::small, .ink = theme.quiet, .max_width = name_width - 10});
        const std::string value = last == nullptr ? "" : figure_text(points_of(item));
        if (const auto typed = text_field(ui, "points/" + item, "Points for " + name, value,
                                          {in.x + name_width, y + 4, 84, 34}, "0")) {
            const auto number = read_number(*typed);
            if (!number || *number < 0) {
                actions.say("\"" + *typed + "\" is no number of points.");
            } else {
                PointsEntry next;
                next.set = entry.set;
                next.by = view.person;
                for (const auto& other : entry.items)
                    next.points.emplace_back(other, other == item ? *number : points_of(other));
                actions.edit(Enter<PointsEntry>{std::move(next)});
            }
        }
        const double share = sum > 0 ? points_of(item) / sum : 0;
        bar(ui, {in.x + name_width + 100, y + 17, std::max(20.0f, in.w - name_width - 180), 8},
            static_cast<float>(share), theme.steel);
        draw_text(ui, {in.right() - 4, y + 11}, percent(share), {.align = Align::right});
        y += 54;
    }
    rule(ui, in.x, y, in.w);
    draw_text(ui, {in.x, y + 10}, "Together", {.font = Font::strong});
    draw_text(ui, {in.x + name_width + 10, y + 10}, figure_text(sum), {.font = Font::strong});
    y += 44;
    if (entry.weights && (last == nullptr || !view.person.empty())) {
        draw_text(ui, {in.x, y},
                  view.person.empty() ? "What the judges' points give together"
                                      : "What counts in the standing",
                  {.font = Font::strong, .ink = theme.quiet});
        y += 26;
        const SetResult& group = *group_entry(view.results, entry.set);
        for (std::size_t i = 0; group.weights && i < group.items.size(); ++i) {
            draw_text(ui, {in.x, y}, item_name(d, entry.set, group.items[i]), {.max_width = name_width - 10});
            draw_text(ui, {in.x + name_width + 84, y}, percent((*group.weights)[i]), {.align = Align::right});
            y += 25;
        }
    }
    area.reach(y + 6);
}

} // namespace steelyard
