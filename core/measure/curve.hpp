#pragma once

#include <optional>

#include "core/decision/decision.hpp"

namespace steelyard {

/// The worth of a figure under a curve. Anchored curves (line, points, target) give 0 to 1. A proportional
/// curve gives the figure or its reciprocal, to be set against the other options'; none for a figure of 0 or
/// less.
std::optional<double> worth_of(const Curve& curve, double figure);

/// True where worths stand as they are, whichever options there are.
bool is_anchored(const Curve& curve);

} // namespace steelyard
