#pragma once

#include <cstdint>

#include "core/decision/decision.hpp"

namespace steelyard::testing {

/// The largest decision that is meant to stay pleasant to work with, for benchmarks: 60 leaves with figures
/// and grades under a tree of three levels whose sets hold at most 9 criteria, 40 options, and 12 judges who
/// each judge every set of criteria completely and nearly consistently and give every grade. Every seed gives
/// one as large.
Decision large_decision(std::uint64_t seed = 1);

} // namespace steelyard::testing
