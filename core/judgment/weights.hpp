#pragma once

#include <Eigen/Core>
#include <optional>
#include <vector>

#include "core/decision/decision.hpp"
#include "core/judgment/eigenvector.hpp"
#include "core/judgment/pair_matrix.hpp"

namespace steelyard {

/// Weights of a set's items: positive, sum 1, in the order of the items.
using Weights = std::vector<double>;

/// y with L y = r, L the graph Laplacian of the judged pairs, r_i = sum_j ln a_ij, and mean 0: the logarithms
/// of the weights by least squares. The matrix must be connected, n >= 1. Source: Bozoki, Fulop, Ronyai,
/// Mathematical and Computer Modelling 52 (2010) 318-333.
Eigen::VectorXd log_least_squares(const PairMatrix& pairs);

/// Geometric mean weights (Crawford and Williams 1985), on incomplete sets by least squares. None if not
/// connected.
std::optional<Weights> geometric_mean_weights(const PairMatrix& pairs);

/// Principal eigenvector weights (Saaty 1977) of the optimal completion.
Weights eigenvector_weights(const Completion& completion);

/// Columns normalised to 1, then averaged by row; common practice of the hand calculation, no source.
/// Complete sets only.
std::optional<Weights> column_average_weights(const PairMatrix& pairs);

/// Weights by one method; none where the method does not apply.
std::optional<Weights> weights_by(Method method, const PairMatrix& pairs);

/// Weighted means of several judges' weights, normalised: geometric (Forman and Peniwati 1998) or arithmetic.
/// `shares` positive, any sum; at least one judge.
Weights combine_weights(const std::vector<Weights>& weights, const std::vector<double>& shares,
                        bool arithmetic);

} // namespace steelyard
