#include <string>
#include <utility>

#include "core/decision/lookup.hpp"
#include "shell/rooms/frame_parts.hpp"
#include "shell/rooms/growing_card.hpp"
#include "shell/widgets/controls.hpp"
#include "shell/widgets/icon_button.hpp"
#include "shell/widgets/text.hpp"
#include "shell/words.hpp"

/// The card of the settings: how answers become numbers. Plain words first, the trade's behind them.
namespace steelyard::frame {
namespace {

const std::vector<std::string> synthesis_words{"Shared out", "Against the best"};
const std::vector<std::string> method_words{"All chains of answers (eigenvector)",
                                            "Rows multiplied (geometric mean)",
                                            "Columns averaged (complete sets only)"};
const std::vector<std::string> combine_words{"Answer by answer", "Each one's weights, multiplied",
                                             "Each one's weights, averaged"};
const std::vector<std::string> table_words{"Alonso and Lamata, 2006", "Saaty, 1980"};

template<class Enum>
std::size_t index_of(Enum value) {
    return static_cast<std::size_t>(value);
}

std::string summary(const Decision& d) {
    const Settings& s = d.settings;
    std::string text = synthesis_words[index_of(s.synthesis)];
    text += s.synthesis == Synthesis::ideal ? " (ideal)" : " (distributive)";
    text += "; weights from pairs: " + method_words[index_of(s.method)];
    text += "; consistency ratio up to " + figure_text(s.limit);
    text += s.money.empty() ? "; differences not told in money" : "; money is " + node_name(d, s.money);
    return text + ".";
}

void scores_part(const Desk& desk, Column& column, Settings& s) {
    caption(desk, column, "How values become scores (synthesis)");
    if (const auto now = pick(desk, "set-synthesis", "Synthesis", synthesis_words, index_of(s.synthesis),
                              column.next(button_height)))
        s.synthesis = static_cast<Synthesis>(*now);
    remark(desk, column,
           s.synthesis == Synthesis::ideal
               ? "Ideal: the best option on a criterion gets its whole weight, the others a part of it. "
                 "Another option changes the order of the rest only if it becomes the best on something."
               : "Distributive: the options share the weight of each criterion. Every option that comes or "
                 "goes changes what the others get.");
}

void pairs_part(const Desk& desk, Column& column, Settings& s) {
    caption(desk, column, "How weights come from pairs (method)");
    if (const auto now = pick_from_list(desk, "set-method", "Method", method_words, index_of(s.method),
                                        column.next(field_height)))
        s.method = static_cast<Method>(*now);
    caption(desk, column, "Several judges: what is combined");
    if (const auto now = pick_from_list(desk, "set-combine", "Combine", combine_words, index_of(s.combine),
                                        column.next(field_height)))
        s.combine = static_cast<Combine>(*now);
    remark(desk, column,
           s.combine == Combine::judgments
               ? "Of each pair the judges' answers are combined (weighted geometric mean), then weighed."
               : "Each judge's answers are weighed on their own, then the weights are combined.");
}

void consistency_part(const Desk& desk, Column& column, Settings& s) {
    Column left{column.x, column.y, (column.w - 12) / 2};
    Column right{column.x + left.w + 12, column.y, left.w};
    caption(desk, left, "Answers hold together up to");
    const Typed limit = number_field(desk, "set-limit", "Limit of the consistency ratio", s.limit,
                                     left.next(field_height), "0.1");
    if (limit.changed && limit.value.value_or(0.1) > 0)
        s.limit = limit.value.value_or(0.1);
    else if (limit.changed)
        desk.actions.say("The limit is above 0; nothing was changed.");
    caption(desk, right, "Too close: a lead up to");
    const Typed close = number_field(desk, "set-close", "Lead that is too close, in points",
                                     100 * s.too_close, right.next(field_height), "0");
    if (close.changed && close.value.value_or(0) >= 0)
        s.too_close = close.value.value_or(0) / 100;
    else if (close.changed)
        desk.actions.say("A lead is 0 points or more; nothing was changed.");
    column.y = left.y;
    remark(desk, column,
           "Left: consistency ratio (CR), 0.1 by common practice. Right: points of 100; with a smaller lead "
           "first place is called undecided.");
    caption(desk, column, "What random answers would give, to compare with (random index)");
    if (const auto now = pick_from_list(desk, "set-table", "Random index table", table_words,
                                        index_of(s.random_index), column.next(field_height)))
        s.random_index = static_cast<RandomIndexTable>(*now);
}

void money_part(const Desk& desk, Column& column, Settings& s) {
    const auto nodes = figure_leaves(desk.decision());
    std::vector<std::string> labels{"Not told in money"};
    std::size_t chosen = 0;
    for (const auto& name : names_of(nodes)) {
        if (nodes[labels.size() - 1]->id == s.money) chosen = labels.size();
        labels.push_back(name);
    }
    caption(desk, column, "The criterion in which differences are told in money");
    if (const auto now =
            pick_from_list(desk, "set-money", "Money criterion", labels, chosen, column.next(field_height)))
        s.money = *now == 0 ? Id{} : nodes[*now - 1]->id;
}

} // namespace

float settings_card(const Desk& desk, ImVec2 at, float width) {
    GrowingCard card(desk.ui, at, width);
    Column column{card.left(), card.heading("Settings"), card.width()};
    bool& open = desk.state.settings_open;
    if (icon_button(desk.ui, "settings-more", open ? "Close the settings" : "Open the settings",
                    {card.right() - 30, at.y + 10, 30, 32}, open ? Icon::less : Icon::more))
        open = !open;
    if (!open) {
        remark(desk, column, summary(desk.decision()));
        return card.end(column.y - 8);
    }
    Settings changed = desk.decision().settings;
    scores_part(desk, column, changed);
    pairs_part(desk, column, changed);
    consistency_part(desk, column, changed);
    money_part(desk, column, changed);
    if (changed != desk.decision().settings) desk.actions.edit(ChangeSettings{std::move(changed)});
    return card.end(column.y - 8);
}

} // namespace steelyard::frame
