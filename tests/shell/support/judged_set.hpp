#pragma once

#include <string>
#include <vector>

#include "core/decision/decision.hpp"

namespace steelyard::testing {

/// A decision with one set, "goal": criteria of these names (ids c0, c1 …), each a figure on which the
/// options Brook and Alder differ. `upper`: judgments agreed in the room, row by row above the diagonal; 0
/// for a pair not judged.
Decision judged_set(const std::vector<std::string>& names, const std::vector<double>& upper = {});

/// The same judgments said by a person, who is added (ids p0, p1 …) with this name.
void add_judge(Decision& decision, const std::string& name, const std::vector<double>& upper);

/// Five criteria in which one answer contradicts the others: Floor space against Noise is 1/6. It closes a
/// circle.
Decision contradicting_set();

} // namespace steelyard::testing
