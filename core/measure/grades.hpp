#pragma once

#include <optional>
#include <vector>

#include "core/decision/decision.hpp"

namespace steelyard {

struct GradeFinding {
    bool given = false;          ///< Somebody who counts gave a grade.
    std::optional<double> worth; ///< None without a grade, or where a grade given has no worth.
};

/// The worth of one option on a leaf rated by grades: that of the agreed grade, or else the mean of the
/// persons' by share. `entered`: the grades of that place, the last of a person standing; `worths`: of the
/// leaf's grades, in their order; an entry may be unknown. Persons who abstain on the option and those with a
/// share of 0 do not count.
GradeFinding find_grade_worth(const std::vector<Person>& people, const Node& leaf, const Id& option,
                              const std::vector<const GradeEntry*>& entered,
                              const std::vector<std::optional<double>>& worths);

} // namespace steelyard
