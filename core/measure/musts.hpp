#pragma once

#include <optional>

#include "core/decision/decision.hpp"
#include "core/measure/figures.hpp"

namespace steelyard {

enum class MustState { met, failed, undecided, unchecked, asked, waived };

/// How one option stands to one requirement, and the value that says so.
struct MustFinding {
    MustState state = MustState::unchecked;
    std::optional<double> value;
};

/// A range against the limits of a requirement: the whole range inside is met, the whole range beyond one
/// limit failed, else undecided. A limit itself is met. Without limits there is nothing to check. low <=
/// high.
MustState against_limits(const Requirement& requirement, double low, double high);

/// The state of a requirement that is yes/no, on a figure or on checks. Those on a node's worth need the
/// other options and are found in core/results/solve.cpp.
MustFinding find_must(const Decision& decision, const Figures& figures, const Requirement& requirement,
                      const Id& option);

} // namespace steelyard
