#include <algorithm>
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
    static constexpr std::string_view methods[]{"eigenvector", "geometric mean", "column average"};
    const Settings& s = d.settings;
    std::string text = synthesis_words[index_of(s.synthesis)];
    text += s.synthesis == Synthesis::ideal ? " (ideal). " : " (distributive). ";
    text += "Weights by " + std::string(methods[index_of(s.method)]) + ". ";
    text += "Consistency ratio up to " + figure_text(s.limit) + ". ";
    return text + (s.money.empty() ? "Differences are not told in money."
                                   : "Differences in money by " + node_name(d, s.money) + ".");
}

void scores_part(const Desk& desk, Column& column, Settings& s) {
    caption(desk, column, "How values become scores (synthesis)");
    if (const auto now = pick(desk, "set-synthesis", "Synthesis", synthesis_words, index_of(s.synthesis),
                              column.next(button_height)))
        s.synthesis = static_cast<Synthesis>(*now);
    remark(desk, column,
           s.synthesis == Synthesis::ideal
               ? "Ideal: each option keeps its own worth on a criterion, 1 being the best; where options are "
                 "compared in pairs the best of them gets 1. An option that is nowhere the best changes "
                 "little for the others."
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

/// A number at the right of what it means. Emptied, it is `otherwise`.
std::optional<double> number_row(const Desk& desk, Column& column, std::string_view id, std::string_view name,
                                 std::string_view meaning, double value, double otherwise) {
    constexpr float field_width = 86;
    const float width = column.w - field_width - 12;
    const float text = paragraph_height(width, meaning, Font::small);
    const Box row = column.next(std::max(field_height, text));
    draw_paragraph(desk.ui, {row.x, row.y + (row.h - text) / 2}, width, meaning,
                   {.font = Font::small, .ink = desk.look().quiet});
    const Typed typed =
        number_field(desk, id, name, value, {row.right() - field_width, row.y, field_width, field_height});
    return typed.changed ? std::optional(typed.value.value_or(otherwise)) : std::nullopt;
}

double refuse(const Desk& desk, const char* why, double unchanged) {
    desk.actions.say(why);
    return unchanged;
}

void consistency_part(const Desk& desk, Column& column, Settings& s) {
    if (const auto limit =
            number_row(desk, column, "set-limit", "Limit of the consistency ratio",
                       "Answers of a set hold together up to a consistency ratio (CR) of", s.limit, 0.1))
        s.limit = *limit > 0 ? *limit : refuse(desk, "The limit is above 0; nothing was changed.", s.limit);
    if (const auto close = number_row(desk, column, "set-close", "Lead that is too close, in points",
                                      "First place is called undecided at a lead, in points of 100, of",
                                      100 * s.too_close, 0))
        s.too_close = *close >= 0
                          ? *close / 100
                          : refuse(desk, "A lead is 0 points or more; nothing was changed.", s.too_close);
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
