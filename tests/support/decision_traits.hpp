#pragma once

#include <set>
#include <string>

#include "core/decision/decision.hpp"
#include "tests/support/slow_solver.hpp"

namespace steelyard::testing {

/// What is to be found in a decision and in its results, in words: so that a test can count whether random
/// decisions really hold every kind of thing.
std::set<std::string> traits(const Decision& decision, const SlowResults& results);

} // namespace steelyard::testing
