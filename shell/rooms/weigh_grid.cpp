#include "shell/rooms/weigh_grid.hpp"

#include <algorithm>

#include "shell/rooms/size_button.hpp"
#include "shell/rooms/weigh_answers.hpp"
#include "shell/rooms/weigh_matrix_plan.hpp"
#include "shell/rooms/weigh_table.hpp"
#include "shell/widgets/controls.hpp"
#include "shell/widgets/panels.hpp"
#include "shell/widgets/text.hpp"

namespace steelyard {
namespace {

constexpr float head_height = 30;
constexpr float text_button = 26;

/// The entry whose answers `person` gives in a set of pairs; none for a set from points.
std::optional<SetResult> paired_entry(const RoomView& view, const Id& set) {
    if (group_entry(view.results, set) == nullptr) return std::nullopt;
    SetResult entry = own_entry(view, set);
    if (entry.from_points || entry.items.size() < 2) return std::nullopt;
    return entry;
}

} // namespace

bool PairGrid::paste(const std::string& text, const RoomView& view, Actions& actions, const Id& set) {
    const auto entry = paired_entry(view, set);
    if (!entry || view.read_only) return false;
    const MatrixPlan plan = plan_matrix(view, *entry, text, false);
    paste_.open(text, set, view.person);
    actions.say(plan.problem.empty() ? "Pasted, not entered yet: " + plan.words
                                     : "Nothing was changed. " + plan.problem);
    return true;
}

std::optional<ItemPair> PairGrid::draw(Ui& ui, const RoomView& view, Actions& actions, const SetResult& entry,
                                       const ItemPair& chosen, Box box) {
    const Theme& theme = ui.look();
    if (set_ != entry.set) table_ = {};
    set_ = entry.set;
    const Card card(ui, box);
    Box inside = box.inset(14);
    if (paste_.is_open(entry.set, view.person)) {
        table_.has_keyboard = true;
        if (!paste_.draw(ui, view, actions, entry, inside)) table_.take_keyboard = true;
        return std::nullopt;
    }
    const bool same = (table_.row == chosen[0] && table_.column == chosen[1]) ||
                      (table_.row == chosen[1] && table_.column == chosen[0]);
    if (!same) {
        table_.row = chosen[0];
        table_.column = chosen[1];
        table_.reveal = true;
        table_.editing = false;
    }
    const PairTable table(view, entry);
    draw_head(ui, view, actions, table, inside.take_top(head_height, 4));

    // What the chosen cell says stands below; it takes from the table only what it needs.
    const auto place = [&](const Id& item) {
        return static_cast<std::size_t>(std::find(entry.items.begin(), entry.items.end(), item) -
                                        entry.items.begin());
    };
    const std::size_t i = place(table_.row);
    const std::size_t j = place(table_.column);
    const bool known = i < entry.items.size() && j < entry.items.size() && i != j;
    const std::string words = known ? table.sentences(i, j) : std::string{};
    const float text_height = paragraph_height(inside.w - 10, words, Font::small);
    const float most = std::max(2 * line_step(Font::small), inside.h * 0.26F);
    Box below = inside.take_bottom(std::clamp(text_height, 2 * line_step(Font::small), most), 6);
    const float legend = draw_mark_legend(ui, table, inside, false);
    if (legend > 0) draw_mark_legend(ui, table, inside.take_bottom(legend, 6), true);

    const auto picked = draw_pair_table(ui, view, actions, entry, table, table_, inside);
    if (text_height <= below.h + 1) {
        draw_paragraph(ui, below.at(), below.w - 10, words, {.font = Font::small, .ink = theme.quiet});
    } else {
        ScrollArea area(ui, "pair-words", below);
        const Box in = area.inner();
        const float h =
            draw_paragraph(ui, in.at(), below.w - 16, words, {.font = Font::small, .ink = theme.quiet});
        area.reach(in.y + h);
    }
    return picked;
}

void PairGrid::draw_head(Ui& ui, const RoomView& view, Actions& actions, const PairTable& table, Box head) {
    const auto act = [&](const char* id, const char* label, bool enabled = true) {
        const Box box = head.take_right(button_width(label, ButtonKind::link) + 4, 2);
        return button(ui, id, label, {box.x, box.y, box.w, text_button}, ButtonKind::quiet, enabled);
    };
    if (size_button(ui, "grid-large", "the grid", large_, head)) large_ = !large_;
    if (act("grid-paste", "Paste", !view.read_only)) paste_.open({}, set_, view.person);
    if (act("grid-copy", "Copy")) copy_matrix(actions, table);
    const char* title = "All pairs of this set";
    const char* brief = "All pairs";
    draw_text(ui, {head.x, head.y + 4}, text_size(Font::strong, title).x <= head.w ? title : brief,
              {.font = Font::strong, .ink = ui.look().quiet, .max_width = head.w});
}

} // namespace steelyard
