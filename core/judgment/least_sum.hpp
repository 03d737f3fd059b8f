#pragma once

#include <Eigen/Core>
#include <cstddef>
#include <optional>
#include <vector>

#include "core/judgment/open_set.hpp"

namespace steelyard {

/// Adds x to y_i and takes it from y_j, low <= x <= high.
struct LogShift {
    std::size_t i = 0;
    std::size_t j = 0;
    double low = 0;
    double high = 0;
};

struct LeastSum {
    double bound = 0;       ///< No smaller value exists.
    std::vector<double> at; ///< Per shift, where the least value was found.
};

/// The least sum_i d_i exp(y_i) over all shifts, each pair of items shifted at most once: exact but for the
/// rounding of a convex minimisation, by which `bound` lies below it.
///
/// A shift between d_i > 0 and d_j <= 0 (or 0 and less) acts one way and goes to its end. What is left falls
/// into two parts without items in common. The negative items: the largest sum of |d_j| exp(y_j) is convex,
/// so at corners, where each shift has a winner; at the best corner winners have the larger term, so it is an
/// order, found by going through the sets of items that stand before. The positive items: convex, minimised
/// pair by pair, with the bound F(z) + sum_p min of g_p (low - z_p) and g_p (high - z_p).
///
/// None where more than 11 negative items hang together by shifts, whose orders are too many.
std::optional<LeastSum> least_sum(const Eigen::VectorXd& y, const std::vector<LogShift>& shifts,
                                  const Eigen::VectorXd& d);

/// A lower bound of sum_i d_i exp(y_i), y = logs.start + logs.columns x, over the box low <= x <= high:
/// tangents at the middle for positive terms, chords for negative ones, the least of the linear sum. Its
/// distance from the least value falls with the square of the box's size.
double linear_bound(const AffineLogs& logs, const std::vector<double>& low, const std::vector<double>& high,
                    const Eigen::VectorXd& d);

} // namespace steelyard
