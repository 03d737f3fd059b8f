#pragma once

#include <cstddef>
#include <optional>
#include <vector>

/// Sharing out 100 points over the items of a set. No drawing.
namespace steelyard {

inline constexpr double all_points = 100;

/// Any points, none negative, as points of 100: whole ones where they are whole already or `whole` is asked
/// for, else in tenths. The sum is 100. Equal ones where all are 0.
std::vector<double> as_hundred(const std::vector<double>& points, bool whole);

/// `points` (of 100) with item `at` moved to `value`; the others that are not held give or take in proportion
/// to what they have (equally where they have nothing), never below 0. In steps of 1 where `value` and all
/// points are whole, else of 0.1, finer where `value` is; the moved one is met exactly. Held to what the held
/// ones leave. With every other one held, none is.
std::vector<double> share_out(const std::vector<double>& points, const std::vector<bool>& held,
                              std::size_t at, double value);

/// How many points the held ones leave for `at`; 100 where every other one is held.
double left_by_held(const std::vector<double>& points, const std::vector<bool>& held, std::size_t at);

} // namespace steelyard
