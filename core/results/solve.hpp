#pragma once

#include "core/decision/decision.hpp"
#include "core/results/results.hpp"
#include "core/results/solve_cache.hpp"

namespace steelyard {

/// Solves a decision. The decision must be valid (see core/decision/check.hpp); unfinished ones are ranked
/// and say so. Pure: the same decision always gives the same results.
Results solve(const Decision& decision);

/// The same results, sooner after an edit: what the cache remembers of an earlier decision is not worked out
/// again.
Results solve(const Decision& decision, SolveCache& cache);

} // namespace steelyard
