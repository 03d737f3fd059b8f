#pragma once

#include <optional>

#include "tests/support/slow_solver.hpp"

namespace steelyard::testing {

/// What several judges make of a decision; none with fewer than two. Everything is found by solving edited
/// copies of the decision. `results`: of the same decision, options and sets found already.
std::optional<SlowGroup> slow_group(const Decision& decision, const SlowResults& results);

} // namespace steelyard::testing
