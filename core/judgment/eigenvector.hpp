#pragma once

#include <Eigen/Core>

#include "core/judgment/pair_matrix.hpp"

namespace steelyard {

/// The principal eigenvalue of a positive matrix with its vectors: A right = lambda right, left' A = lambda
/// left'.
struct PrincipalPair {
    double lambda = 0;
    Eigen::VectorXd right; ///< Positive, sums to 1.
    Eigen::VectorXd left;  ///< Positive, left' right = 1.
};

/// Principal eigenvalue and vectors of a square matrix with positive entries, n >= 1 (Perron 1907), by power
/// steps and two-sided Rayleigh quotient iteration. `start` may hold a guess of both vectors. Relative
/// accuracy about 1e-14.
PrincipalPair principal_eigenvector(const Eigen::MatrixXd& a, const PrincipalPair* start = nullptr);

/// A matrix of pairs with its missing entries filled so that the principal eigenvalue is least.
struct Completion {
    Eigen::MatrixXd matrix;
    PrincipalPair principal;
};

/// Fills the missing pairs of a connected matrix with the values that minimise lambda max, by Newton's method
/// in the logarithms of the missing entries, in which lambda max is convex. A complete matrix is taken as it
/// is. Source: Bozoki, Fulop, Ronyai, On optimal completion of incomplete pairwise comparison matrices,
/// Mathematical and Computer Modelling 52 (2010) 318-333; derivatives of the eigenvalue by perturbation
/// theory.
Completion complete_optimally(const PairMatrix& pairs);

} // namespace steelyard
