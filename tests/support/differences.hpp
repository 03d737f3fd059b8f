#pragma once

#include <string>
#include <vector>

#include "core/decision/decision.hpp"
#include "core/results/results.hpp"
#include "tests/support/slow_solver.hpp"

namespace steelyard::testing {

/// Where the core's results differ from the slow solver's, each place with both values; empty if nowhere.
/// Numbers may differ by 1e-9 of their size (of 1 if smaller), or by 1e-8 where a set was completed: the
/// minimum is flat, so that two ways of finding it agree less closely in the place than in the eigenvalue.
/// Ids and lists must be the same.
std::vector<std::string> differences(const Decision& decision, const Results& core, const SlowResults& slow);

/// The same for the corrections added to the core's results: best values with the CR they give, their order,
/// and where fewest changes are told and where none are needed. Which they are is tested by itself.
std::vector<std::string> correction_differences(const Decision& decision, const Results& core,
                                                const SlowResults& slow);

} // namespace steelyard::testing
