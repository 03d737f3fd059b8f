#pragma once

#include <map>
#include <optional>
#include <utility>
#include <vector>

#include "tests/support/slow_solver.hpp"

/// From figures, cost lines and grades to what each option is worth on one leaf of the slow solver.
namespace steelyard::testing {

/// A figure with the range it was quoted in; both ends are the value where none was.
struct SlowFigure {
    double value = 0;
    double low = 0;
    double high = 0;
};

/// The figure a cost sheet comes to, none where no line is valued or a volume is needed and not given.
std::optional<double> slow_computed_figure(const Decision& decision, const Node& leaf, const Id& option);
/// What stands for an option on a figure leaf: the computed figure, or the last one entered.
std::optional<SlowFigure> slow_figure(const Decision& decision, const Node& leaf, const Id& option);

/// Worths of the grades of a leaf, without those that have none.
std::map<Id, double> slow_grade_worths(const Decision& decision, const Node& leaf);
/// The grades that count for an option, each with its share.
std::vector<std::pair<double, Id>> slow_grades(const Decision& decision, const Node& leaf, const Id& option);

/// Local values of a leaf for the options in play.
SlowLeaf slow_leaf(const Decision& decision, const Node& leaf, const std::vector<Id>& in_play,
                   Synthesis synthesis);

} // namespace steelyard::testing
