#pragma once

#include <string>
#include <vector>

#include "core/decision/decision.hpp"
#include "core/decision/edit.hpp"
#include "core/decision/problem.hpp"

namespace steelyard {

/// How many entries an edit takes away because they no longer fit.
struct Losses {
    std::size_t judgments = 0;
    std::size_t points = 0;
    std::size_t figures = 0;
    std::size_t costs = 0;
    std::size_t grades = 0;
    std::size_t checks = 0;
    std::size_t requirements = 0;
    bool operator==(const Losses&) const = default;
    Losses& operator+=(const Losses& other);
    bool any() const { return *this != Losses{}; }
};

/// "3 judgments and 1 figure go with it."; empty where nothing goes.
std::string sentence(const Losses& losses);

struct Applied {
    Decision decision; ///< Meaningful only if there is no problem.
    Losses losses;
    std::vector<Problem> problems;
};

/// The decision after the edits, as one step: what no longer fits is removed, and the result is checked
/// whole. The decision given is not touched. To say first what an act would take away, apply it and look at
/// the losses. Refused: ids that lead nowhere, what `check` refuses, moving a criterion below itself,
/// removing the root, removing an option or person that the outcome, the fixed rules, a waiver or a signature
/// names.
Applied apply(const Decision& decision, const std::vector<Edit>& edits);

} // namespace steelyard
