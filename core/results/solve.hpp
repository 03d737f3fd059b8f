#pragma once

#include "core/decision/decision.hpp"
#include "core/results/results.hpp"

namespace steelyard {

/// Solves a decision. The decision must be valid (see core/decision/check.hpp); unfinished ones are ranked
/// and say so. Pure: the same decision always gives the same results.
Results solve(const Decision& decision);

} // namespace steelyard
