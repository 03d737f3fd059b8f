#pragma once

#include <string>
#include <vector>

#include "shell/rooms/room.hpp"

/// What the table of the room Gauge says, as plain values: no drawing here.
namespace steelyard::gauge {

enum class RowKind {
    section,    ///< The head of a group of criteria, or of the musts.
    figure,     ///< A leaf with figures, typed.
    sheet,      ///< A leaf whose figures come from a cost sheet.
    grade,      ///< A leaf with grades, picked.
    pairs,      ///< A leaf on which the options are compared in the room Weigh.
    must_limit, ///< A must on a value of its own, typed.
    must_read,  ///< A must on the figures of a leaf.
    must_node,  ///< A must on the worth of a criterion.
    must_yes_no ///< A must that is met or not, picked.
};

/// How a text is coloured. What it means always stands in the words as well.
enum class Tone { plain, quiet, open, good, bad };

struct Words {
    std::string text;
    Tone tone = Tone::plain;
    bool operator==(const Words&) const = default;
};

/// One option in one row.
struct Cell {
    Words main;
    std::string change; ///< Against the figure superseded.
    std::string range;
    Words small;
    bool open = false; ///< Something is to be entered here.
};

struct Row {
    RowKind kind = RowKind::section;
    Id id; ///< The leaf or the must.
    std::string title;
    Words detail;            ///< Unit and curve, or the limit.
    std::vector<Cell> cells; ///< One for each option of the decision; none in a section.
    bool has_ranges = false;

    bool is_must() const { return kind >= RowKind::must_limit; }
    /// True where cells are typed into.
    bool typed() const { return kind == RowKind::figure || kind == RowKind::must_limit; }
    /// True where one of a few answers is picked.
    bool picked() const { return kind == RowKind::grade || kind == RowKind::must_yes_no; }
};

/// Why an option's column is greyed; empty while it takes part.
struct Column {
    std::string out;
};

struct Model {
    std::vector<Row> rows;
    std::vector<Column> columns; ///< One for each option.
};

/// The whole table. Computed once for each state of the decision and each person who answers.
Model make_model(const RoomView& view);

/// "Purchase price of Brook".
std::string cell_name(const Row& row, const Decision& decision, const Id& option);

/// "none at 90,000, full at 40,000", "less is better", "full at 900, none 200 away".
std::string curve_words(const Curve& curve);

/// "at most 78", "at least 3 and at most 5"; empty without a limit.
std::string limit_words(const Requirement& requirement);

/// A worth with two decimals: 0.60.
std::string worth_text(double worth);

/// A change against an earlier figure: "−3.1 %", "+0.4 %". Empty where the earlier one is 0.
std::string change_text(double before, double now);

/// How a must stands, in one word or two.
std::string must_words(MustState state);
Tone must_tone(MustState state);

} // namespace steelyard::gauge
