#pragma once

#include "shell/rooms/gauge_model.hpp"

/// The two cards below the table: what the chosen row is worth, and the chosen cell in full.
namespace steelyard::gauge {

/// A leaf with figures: its curve with the options on it, its kind and anchors.
void draw_curve_card(Ui& ui, const RoomView& view, Actions& actions, const Node& leaf, const Id& option,
                     Box box);

/// A leaf with grades: their names and worths, and the options at each.
void draw_grades_card(Ui& ui, const RoomView& view, Actions& actions, const Node& leaf, Box box);

/// A leaf on which options are compared in pairs: the worths that follow.
void draw_pairs_card(Ui& ui, const RoomView& view, Actions& actions, const Node& leaf, Box box);

/// A must: the options against its limit.
void draw_must_card(Ui& ui, const RoomView& view, Actions& actions, const Requirement& must, const Id& option,
                    Box box);

/// Everything about one cell. `option`: its place in the decision.
void draw_detail_card(Ui& ui, const RoomView& view, Actions& actions, const Row& row, std::size_t option,
                      Box box);

/// The figure of an option on a leaf as the solver takes it: entered, or computed from its cost sheet.
std::optional<double> figure_of(const RoomView& view, const Node& leaf, const Id& option);

/// The local value of an option on a leaf, and whether it stands in for a missing one. None where it is not
/// in play.
struct LocalWorth {
    double worth = 0;
    bool stand_in = false;
    bool nobody_known = false; ///< No option in play has one of its own: all count alike.
};
std::optional<LocalWorth> local_worth(const Results& results, const Id& leaf, const Id& option);

bool in_play(const Results& results, const Id& option);

} // namespace steelyard::gauge
