#pragma once

#include <Eigen/Core>
#include <limits>
#include <vector>

#include "core/judgment/eigenvector.hpp"
#include "core/judgment/pair_matrix.hpp"

namespace steelyard {

/// The entries of a matrix that may move while its principal eigenvalue is made least; the others are held.
struct FreePairs {
    std::vector<PairMatrix::Pair> missing; ///< Take any value.
    std::vector<PairMatrix::Pair> bounded; ///< Take values from 1/9 to 9, the ends of the usual scale.
    /// Whether lambda may be level along some direction of the bounded pairs, as where the judged pairs that
    /// are held do not link the items. Such directions are then left alone; rounding would move along them.
    bool may_be_level = false;
};

/// How far a search goes.
struct SearchEnd {
    /// The last step taken is below this, in ln a. Newton's steps square: lambda is then exact to rounding
    /// from about 1e-4 on, the entries to about the square of this.
    double settled = 1e-12;
    /// Given up, without having settled, once lambda is proven to stay above this. Only without missing
    /// pairs.
    double give_up_above = std::numeric_limits<double>::infinity();
};

/// Moves the free entries of a positive reciprocal matrix to where its principal eigenvalue is least, by
/// Newton's method in their logarithms, in which it is convex; bounded pairs are clamped, and one that pushes
/// outward from its end is left out of the step. `a`: complete, the bounded pairs at their start (clamped if
/// outside). `y`: missing pairs start at e^(y_i - y_j), whatever stands in `a`; any vector without missing
/// pairs. `guess`: of the vectors, if there is one. The minimum exists where the pairs that are not missing
/// link all items.
/// Sources: convexity, Kingman 1961; completion, Bozoki, Fulop, Ronyai, Mathematical and Computer Modelling
/// 52 (2010) 318-333; derivatives of the eigenvalue by perturbation theory; projected steps, Bertsekas 1982.
/// From memory.
Completion least_lambda(Eigen::MatrixXd a, const FreePairs& free, Eigen::VectorXd y,
                        const SearchEnd& end = {}, const PrincipalPair* guess = nullptr);

/// y of a completion at its minimum: its missing entries are e^(y_i - y_j).
Eigen::VectorXd potentials(const PrincipalPair& principal);

/// How ln lambda changes with ln a_ij, the reciprocal going along: v_i a_ij w_j - v_j a_ji w_i over lambda.
double slope(const Completion& at, Eigen::Index i, Eigen::Index j);

} // namespace steelyard
