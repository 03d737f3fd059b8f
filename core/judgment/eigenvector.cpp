#include "core/judgment/eigenvector.hpp"

#include <Eigen/LU>
#include <algorithm>
#include <cassert>
#include <cmath>
#include <utility>

#include "core/judgment/least_lambda.hpp"
#include "core/judgment/weights.hpp"

namespace steelyard {
namespace {

using Eigen::Index;
using Eigen::MatrixXd;
using Eigen::VectorXd;

void normalise(PrincipalPair& p) {
    p.right /= p.right.sum();
    p.left /= p.left.dot(p.right);
}

void power_step(const MatrixXd& a, PrincipalPair& p) {
    p.right = (a * p.right).eval();
    p.left = (a.transpose() * p.left).eval();
    normalise(p);
}

/// One step of two-sided Rayleigh quotient iteration (Ostrowski 1959; Parlett 1974). False where the shifted
/// matrix is singular to working precision or the step left the positive vectors: the pair is then as good as
/// it was.
bool rayleigh_step(const MatrixXd& a, PrincipalPair& p) {
    const double mu = p.left.dot(a * p.right);
    const MatrixXd shifted = a - mu * MatrixXd::Identity(a.rows(), a.cols());
    const Eigen::PartialPivLU<MatrixXd> lu(shifted);
    PrincipalPair next{mu, lu.solve(p.right), lu.transpose().solve(p.left)};
    if (!next.right.allFinite() || !next.left.allFinite()) return false;
    next.right /= next.right.sum();
    const double product = next.left.dot(next.right);
    if (!(std::abs(product) > 0)) return false;
    next.left /= product;
    if (!next.right.allFinite() || !next.left.allFinite()) return false;
    if (next.right.minCoeff() <= 0 || next.left.minCoeff() <= 0) return false;
    p = std::move(next);
    return true;
}

double change(const VectorXd& from, const VectorXd& to) {
    return ((to - from).array() / to.array()).abs().maxCoeff();
}

} // namespace

PrincipalPair principal_eigenvector(const MatrixXd& a, const PrincipalPair* start) {
    const Index n = a.rows();
    PrincipalPair p;
    if (start != nullptr) {
        p = *start;
    } else {
        p.right = a.rowwise().sum();
        p.left = a.colwise().sum().transpose();
        normalise(p);
    }
    // A few power steps bring the vectors near; Rayleigh steps then converge cubically. Where one fails, more
    // power steps help; they alone always converge for a positive matrix.
    constexpr int most_rounds = 200;
    constexpr double settled = 1e-14;
    for (int i = 0; i < 3; ++i) power_step(a, p);
    for (int round = 0; round < most_rounds; ++round) {
        const VectorXd before = p.right;
        if (!rayleigh_step(a, p)) {
            for (int i = 0; i < 10; ++i) power_step(a, p);
        }
        if (change(before, p.right) < settled * static_cast<double>(n)) break;
    }
    power_step(a, p); // Takes the last rounding of a nearly singular solve out of the vectors.
    p.lambda = p.left.dot(a * p.right);
    return p;
}

Completion complete_optimally(const PairMatrix& pairs) {
    const auto n = static_cast<Index>(pairs.size());
    MatrixXd a(n, n);
    for (Index i = 0; i < n; ++i) {
        for (Index j = 0; j < n; ++j)
            a(i, j) = pairs.at(static_cast<std::size_t>(i), static_cast<std::size_t>(j));
    }
    const FreePairs free{pairs.missing(), {}};
    if (free.missing.empty()) {
        PrincipalPair p = principal_eigenvector(a);
        return {std::move(a), std::move(p)};
    }
    assert(pairs.connected());
    // The geometric mean's answer is near; it is exact where the judged pairs are consistent.
    return least_lambda(std::move(a), free, log_least_squares(pairs));
}

} // namespace steelyard
