#pragma once

#include <optional>

#include "core/results/appraise.hpp"
#include "core/results/results.hpp"

namespace steelyard {

/// What several judges make of a decision; none with fewer than two. `results`: of the same decision, with
/// options, sets and the option in first place found already.
std::optional<GroupResult> describe_group(const Decision& decision, Appraiser& appraiser, SolveCache& cache,
                                          const Results& results);

/// Whether the option in first place of `results` no longer has rank 1 in another standing.
bool first_moves(const Results& results, const Standing& other);

} // namespace steelyard
