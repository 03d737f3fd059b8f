#pragma once

#include "core/decision/decision.hpp"

namespace steelyard::testing {

/// The set HOUSE (see tests/external/house_test.cpp) as a decision: its eight criteria "c1" to "c8" judged by
/// nobody in particular, three options graded on each, of which "B" is first.
Decision house_decision();

} // namespace steelyard::testing
