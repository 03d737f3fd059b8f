#include "shell/rooms/weigh_sets.hpp"

#include <algorithm>
#include <cmath>
#include <cstdio>

#include "core/decision/lookup.hpp"
#include "shell/widgets/controls.hpp"
#include "shell/widgets/panels.hpp"
#include "shell/widgets/text.hpp"
#include "shell/words.hpp"

namespace steelyard {

std::optional<Id> draw_set_list(Ui& ui, const RoomView& view, const Id& chosen, Box box) {
    const Theme& theme = ui.look();
    std::optional<Id> result;
    draw_text(ui, {box.x + 6, box.y + 2}, "Sets to judge", {.font = Font::strong, .ink = theme.quiet});
    box.take_top(32);
    ScrollArea area(ui, "sets", box);
    const Box in = area.inner();
    float y = in.y;
    for (const auto& group : view.results.sets) {
        if (!group.by.empty()) continue;
        const SetResult& entry = *shown_entry(view.results, group.set, view.person);
        const SetState state = state_of(view.decision, entry);
        const Box row{in.x + 1, y, in.w - 6, 50};
        const bool here = group.set == chosen;
        const OnPaper paper(ui, here ? theme.card : theme.paper);
        if (here) {
            ImDrawList* list = ImGui::GetWindowDrawList();
            list->AddRectFilled(row.at(), row.end(), theme.card, 8);
            list->AddRect(row.at(), row.end(), theme.brass, 8, 0, 2);
        }
        const Node* node = find_node(view.decision.criteria, group.set);
        std::string name = node_name(view.decision, group.set);
        if (node->is_leaf()) name += node->rate == RateBy::grade ? ": grades" : ": options";
        if (press_area(ui, "set/" + group.set, name, row, "tab", state.word)) result = group.set;
        const ImU32 ink = state.contradicts ? theme.red : theme.ink;
        const ImVec2 ratio = draw_text(
            ui, {row.right() - 10, row.y + 6}, state.ratio,
            {.font = state.contradicts ? Font::strong : Font::body, .ink = ink, .align = Align::right});
        draw_text(ui, {row.x + 10, row.y + 6}, name,
                  {.font = here ? Font::strong : Font::body, .max_width = row.w - 30 - ratio.x});
        const std::string count = entry.from_points
                                      ? "points"
                                      : std::to_string(state.judged) + " of " + std::to_string(state.pairs);
        draw_text(ui, {row.x + 10, row.y + 28}, count, {.font = Font::small, .ink = theme.quiet});
        draw_text(ui, {row.right() - 10, row.y + 28}, state.word,
                  {.font = Font::small,
                   .ink = state.contradicts ? theme.red
                          : state.open      ? theme.brass_ink
                                            : theme.quiet,
                   .align = Align::right});
        y += 56;
    }
    area.reach(y);
    return result;
}

} // namespace steelyard
