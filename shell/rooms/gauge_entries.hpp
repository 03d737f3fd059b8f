#pragma once

#include <optional>
#include <string>
#include <vector>

#include "core/decision/edit.hpp"

/// What was entered for one place of the table, and what a new entry of it holds.
namespace steelyard::gauge {

/// The last entry of a place; null where nothing was entered.
const Figure* standing_figure(const Decision& decision, const Id& criterion, const Id& option);
const Check* standing_check(const Decision& decision, const Id& requirement, const Id& option);
/// The last grade of a person, or the agreed one where `by` is empty; null where none stands.
const GradeEntry* standing_grade(const Decision& decision, const Id& criterion, const Id& option,
                                 const Id& by);

/// The quotes that the standing one of a place superseded, latest first. Entries in which only source, status
/// or the like was put right are told once.
std::vector<const Figure*> superseded(const std::vector<const Figure*>& of_place);
std::vector<const Figure*> superseded(const Decision& decision, const Id& criterion, const Id& option);

/// A figure newly typed: the value, and the round that was going on. What was said of the figure before
/// (range, source, status) is not carried over, since nobody said it of this one. No value: the place is open
/// again.
Figure typed_figure(const Decision& decision, const Id& criterion, const Id& option,
                    std::optional<double> value);

/// A copy of the standing entry of a place, to put one thing of it right.
Figure figure_to_change(const Decision& decision, const Id& criterion, const Id& option);
Check check_to_change(const Decision& decision, const Id& requirement, const Id& option, const Id& by);
GradeEntry grade_to_change(const Decision& decision, const Id& criterion, const Id& option, const Id& by);

/// Why low, value and high cannot stand together, as a sentence; empty if they can.
std::string range_problem(const std::optional<double>& low, const std::optional<double>& value,
                          const std::optional<double>& high);

/// The kinds of curve a person chooses from.
enum class CurveKind { line, proportional, points, target };
CurveKind kind_of(const Curve& curve);

/// Figures of a leaf that are known, smallest first, each once. `computed`: of a cost sheet.
std::vector<double> known_figures(const Decision& decision, const Node& leaf,
                                  const std::vector<std::pair<Id, double>>* computed);

/// A straight line from the worst to the best of the figures known. None unless two of them differ.
std::optional<Curve> suggested_line(const std::vector<double>& figures, Better better);

/// The curve nearest to the present one of another kind. None where neither it nor the figures say enough.
std::optional<Curve> as_kind(CurveKind kind, const std::optional<Curve>& now,
                             const std::vector<double>& figures);

/// True where less of the figure is worth more under this curve.
bool less_is_better(const Curve& curve);

} // namespace steelyard::gauge
