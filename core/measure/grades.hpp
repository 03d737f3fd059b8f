#pragma once

#include <optional>
#include <vector>

#include "core/decision/decision.hpp"

namespace steelyard {

/// The grades that stand at one place, by their index among the leaf's grades.
struct StandingGrades {
    struct Own {
        const Person* person;
        std::size_t grade;
    };
    std::optional<std::size_t> agreed;
    std::vector<Own> own; ///< In the order of the people; those who abstain or have a share of 0 left out.
};

/// `entered`: the grades of that place, the last of a person standing, one without a grade clearing it.
/// `people` must outlive the answer.
StandingGrades standing_grades(const std::vector<Person>& people, const Node& leaf, const Id& option,
                               const std::vector<const GradeEntry*>& entered);

struct GradeFinding {
    bool given = false;          ///< Somebody who counts gave a grade.
    std::optional<double> worth; ///< None without a grade, or where a grade given has no worth.
};

/// The worth of one option on a leaf rated by grades: that of the agreed grade, or else the mean of the
/// persons' by share. `worths`: of the leaf's grades, in their order; an entry may be unknown.
/// `without`: this person does not count. `only`: where this person gave a grade, it alone counts.
GradeFinding find_grade_worth(const StandingGrades& grades, const std::vector<std::optional<double>>& worths,
                              const Person* without = nullptr, const Person* only = nullptr);

} // namespace steelyard
