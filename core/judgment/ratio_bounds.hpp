#pragma once

#include <Eigen/Core>
#include <cstddef>
#include <vector>

#include "core/judgment/open_set.hpp"

namespace steelyard {

/// Row by row, as bounds are read.
using Grid = Eigen::Matrix<double, Eigen::Dynamic, Eigen::Dynamic, Eigen::RowMajor>;

/// A reciprocal matrix of which each entry is only known to lie in a range: low_ij = 1 / high_ji.
struct EntryBounds {
    Grid low;
    Grid high;
    /// The matrix seen from its left eigenvector.
    EntryBounds transposed() const { return {low.transpose(), high.transpose()}; }
};

/// Upper bounds u_ij of w_i / w_j, w the principal eigenvector of any matrix in the bounds. Rounded outward.
///
/// w_i / w_j is a mean of the ratios a_ik / a_jk, hence at most the largest of them: the start.
Grid first_ratio_bounds(const EntryBounds& entries);

/// One round of tightening in place: since w = A w / lambda,
///   u_ij <= max over t of (sum_k high_ik t_k) / (sum_k low_jk t_k), t_h = 1, 1/u_hk <= t_k <= u_kh
/// for every anchor h, and u_ij <= u_ik u_kj. All anchors up to 12 items, i and j alone beyond. Returns the
/// largest relative gain.
double tighten_ratio_bounds(Grid& u, const EntryBounds& entries);

/// u_ij <- the least product along a way from i to j.
void close_ratio_bounds(Grid& u);

/// First bounds where pairs are missing and completed optimally (low 0 and high infinite there), for the
/// right eigenvector: from lambda w_k >= w_k + a_ki w_i for known pairs, and lambda at most that of any other
/// completion, here by the potentials y: a_ij = exp(y_i - y_j). The known pairs connect the items.
Grid far_ratio_bounds(const EntryBounds& entries, const Eigen::VectorXd& y);

/// The bounds of exp(y_i - y_j) over a box of answers; exact.
Grid ratio_bounds(const AffineLogs& logs, const std::vector<double>& low, const std::vector<double>& high);

/// A lower bound of sum f_i w_i / sum w_i where w_i / w_j <= u_ij: the best over anchors h of the least over
/// w_h = 1, 1/u_hi <= w_i <= u_ih.
double least_mean(const std::vector<double>& f, const Grid& u);

} // namespace steelyard
