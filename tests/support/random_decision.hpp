#pragma once

#include <cstdint>

#include "core/decision/decision.hpp"

namespace steelyard::testing {

/// The most a random decision may hold. Every number is at least 1, but for people and requirements.
struct DecisionSize {
    int options = 9;
    int depth = 4;    ///< Levels of the tree, the root being one.
    int children = 6; ///< Of one node.
    int leaves = 14;
    int people = 5;
    int requirements = 4;
};

/// A valid decision with something of everything a decision file allows: finished and unfinished ones,
/// several judges who answer, repeat, skip and abstain, superseded and cleared figures, cost sheets, musts,
/// all settings. The same seed gives the same decision on every platform. No rule hinges on the rounding of a
/// computed number: limits on computed values and the ends of tolerances lie between the values that figures
/// can take.
Decision random_decision(std::uint64_t seed, const DecisionSize& size = {});

} // namespace steelyard::testing
