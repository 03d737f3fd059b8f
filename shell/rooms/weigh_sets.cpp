#include "shell/rooms/weigh_sets.hpp"

#include <algorithm>
#include <cmath>
#include <cstdio>

#include "core/decision/lookup.hpp"
#include "shell/rooms/weigh_answers.hpp"
#include "shell/widgets/controls.hpp"
#include "shell/widgets/panels.hpp"
#include "shell/widgets/text.hpp"
#include "shell/words.hpp"

namespace steelyard {

namespace {

/// What a row of the list says.
struct Row {
    std::string ratio;
    std::string count;
    std::string word;
    bool contradicts = false;
    bool open = false;
};

Row own_row(const RoomView& view, const SetResult& group) {
    const SetResult entry = own_entry(view, group.set);
    const SetState state = state_of(view.decision, entry);
    Row row{state.ratio, std::to_string(state.judged) + " of " + std::to_string(state.pairs), state.word,
            state.contradicts, state.open};
    if (entry.from_points) row.count = "points";
    const Progress progress = progress_of(view.decision, entry, view.person);
    if (progress.ended && !progress.left.empty()) row.count += ", ended";
    if (!progress.done() && row.word == "consistent") {
        row.word = "nearly done";
        row.open = true;
    }
    if (ranges_changed(view, entry)) {
        row.word = "other ranges";
        row.open = true;
    }
    return row;
}

/// With nobody at the seat of a sealed set.
Row seat_row(const RoomView& view, const SetResult& group, bool revealed) {
    std::size_t all = 0;
    for (const auto& person : view.decision.people)
        if (person.share > 0) ++all;
    const std::size_t done = all - not_done(view, group.set).size();
    return {"", std::to_string(done) + " of " + std::to_string(all) + " done",
            revealed ? "revealed" : "sealed", false, done < all};
}

} // namespace

std::optional<Id> draw_set_list(Ui& ui, const RoomView& view, const Id& chosen, const std::set<Id>& revealed,
                                Box box) {
    const Theme& theme = ui.look();
    std::optional<Id> result;
    draw_text(ui, {box.x + 6, box.y + 2}, "Sets to judge", {.font = Font::strong, .ink = theme.quiet});
    box.take_top(32);
    ScrollArea area(ui, "sets", box);
    const Box in = area.inner();
    float y = in.y;
    const bool nobody = view.sealed() && view.person.empty();
    for (const auto& group : view.results.sets) {
        if (!group.by.empty()) continue;
        const Row said = nobody ? seat_row(view, group, revealed.contains(group.set)) : own_row(view, group);
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
        if (press_area(ui, "set/" + group.set, name, row, "tab", said.word)) result = group.set;
        const ImU32 ink = said.contradicts ? theme.red : theme.ink;
        const ImVec2 ratio = draw_text(
            ui, {row.right() - 10, row.y + 6}, said.ratio,
            {.font = said.contradicts ? Font::strong : Font::body, .ink = ink, .align = Align::right});
        draw_text(ui, {row.x + 10, row.y + 6}, name,
                  {.font = here ? Font::strong : Font::body, .max_width = row.w - 30 - ratio.x});
        const ImVec2 word = draw_text(ui, {row.right() - 10, row.y + 28}, said.word,
                                      {.font = Font::small,
                                       .ink = said.contradicts ? theme.red
                                              : said.open      ? theme.brass_ink
                                                               : theme.quiet,
                                       .align = Align::right});
        draw_text(ui, {row.x + 10, row.y + 28}, said.count,
                  {.font = Font::small, .ink = theme.quiet, .max_width = row.w - 28 - word.x});
        y += 56;
    }
    area.reach(y);
    return result;
}

} // namespace steelyard
