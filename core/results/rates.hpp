#pragma once

#include <optional>

#include "core/decision/decision.hpp"
#include "core/results/results.hpp"

namespace steelyard {

/// What the judgments pay at one option in play, in the money criterion of the settings: for every other leaf
/// rated by figures or grades -(dS/dx)/(dS/dmoney), S the option's score. At a kink the one-sided value that
/// costs less; 0 on one side of a kink does not count. None where no money criterion is chosen. `results`:
/// those of `decision`, up to its scores and leaves.
std::optional<Rates> rates_at(const Decision& decision, const Results& results, const Id& option);

} // namespace steelyard
