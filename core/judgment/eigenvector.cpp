// Glossary: A the matrix, lambda its principal eigenvalue, w the right and v the left eigenvector with v'w =
// 1, x_p = ln a_ij the logarithm of missing entry p = (i, j), G the reduced resolvent of A at lambda.
#include "core/judgment/eigenvector.hpp"

#include <Eigen/LU>
#include <algorithm>
#include <cassert>
#include <cmath>
#include <utility>

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
    if (!next.right.allFinite() || !next.left.allFinite())
        return false;
    next.right /= next.right.sum();
    const double product = next.left.dot(next.right);
    if (!(std::abs(product) > 0))
        return false;
    next.left /= product;
    if (!next.right.allFinite() || !next.left.allFinite())
        return false;
    if (next.right.minCoeff() <= 0 || next.left.minCoeff() <= 0)
        return false;
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
    for (int i = 0; i < 3; ++i)
        power_step(a, p);
    for (int round = 0; round < most_rounds; ++round) {
        const VectorXd before = p.right;
        if (!rayleigh_step(a, p)) {
            for (int i = 0; i < 10; ++i)
                power_step(a, p);
        }
        if (change(before, p.right) < settled * static_cast<double>(n))
            break;
    }
    power_step(a, p); // Takes the last rounding of a nearly singular solve out of the vectors.
    p.lambda = p.left.dot(a * p.right);
    return p;
}

Completion complete_optimally(const PairMatrix& pairs) {
    const auto n = static_cast<Index>(pairs.size());
    const auto missing = pairs.missing();
    const auto k = static_cast<Index>(missing.size());
    MatrixXd a(n, n);
    for (Index i = 0; i < n; ++i) {
        for (Index j = 0; j < n; ++j)
            a(i, j) = pairs.at(static_cast<std::size_t>(i), static_cast<std::size_t>(j));
    }
    if (k == 0) {
        PrincipalPair p = principal_eigenvector(a);
        return {std::move(a), std::move(p)};
    }
    assert(pairs.connected());

    const auto fill = [&](MatrixXd& into, const VectorXd& x) {
        for (Index p = 0; p < k; ++p) {
            const auto i = static_cast<Index>(missing[static_cast<std::size_t>(p)][0]);
            const auto j = static_cast<Index>(missing[static_cast<std::size_t>(p)][1]);
            into(i, j) = std::exp(x(p));
            into(j, i) = std::exp(-x(p));
        }
    };

    // The geometric mean's answer is near; it is exact where the judged pairs are consistent.
    const VectorXd y = log_least_squares(pairs);
    VectorXd x(k);
    for (Index p = 0; p < k; ++p) {
        const auto [i, j] = missing[static_cast<std::size_t>(p)];
        x(p) = y(static_cast<Index>(i)) - y(static_cast<Index>(j));
    }
    fill(a, x);
    PrincipalPair principal = principal_eigenvector(a);

    constexpr int most_steps =
        60; // Four were the most seen for n = 9; convexity makes the halving below safe.
    constexpr double longest_step = 2; // In ln a: keeps a far start from leaping where curvature is flat.
    constexpr double level = 1e-14;    // Rounding of lambda, relative.
    constexpr double settled = 1e-12;  // In ln a: Newton's next step would be far below the last digit.
    constexpr double flat = 1e-13; // Gradient relative to lambda: rounding of the vectors is of this size.
    for (int step = 0; step < most_steps; ++step) {
        const VectorXd& w = principal.right;
        const VectorXd& v = principal.left;
        const double lambda = principal.lambda;

        VectorXd gradient(k);
        MatrixXd columns(n, k); // X_p
        MatrixXd rows(n, k);    // Y_p
        columns.setZero();
        rows.setZero();
        VectorXd curvature(k);
        for (Index p = 0; p < k; ++p) {
            const auto i = static_cast<Index>(missing[static_cast<std::size_t>(p)][0]);
            const auto j = static_cast<Index>(missing[static_cast<std::size_t>(p)][1]);
            const double forth = v(i) * a(i, j) * w(j);
            const double back = v(j) * a(j, i) * w(i);
            gradient(p) = forth - back;
            curvature(p) = forth + back;
            columns(i, p) = a(i, j) * w(j);
            columns(j, p) = -a(j, i) * w(i);
            rows(j, p) = v(i) * a(i, j);
            rows(i, p) = -v(j) * a(j, i);
        }
        if (gradient.cwiseAbs().maxCoeff() < flat * lambda)
            break;

        const MatrixXd resolvent_matrix = lambda * MatrixXd::Identity(n, n) - a + w * v.transpose();
        const MatrixXd solved =
            resolvent_matrix.partialPivLu().solve(columns) - w * (v.transpose() * columns);
        const MatrixXd cross = rows.transpose() * solved; // Y_p' G X_q
        MatrixXd hessian = cross + cross.transpose();
        hessian.diagonal() += curvature;
        VectorXd direction = -hessian.partialPivLu().solve(gradient);
        const double longest = direction.cwiseAbs().maxCoeff();
        if (!std::isfinite(longest))
            break;
        if (longest > longest_step)
            direction *= longest_step / longest;

        // Near the minimum lambda is flat to its last digits while the steps still gain: a step that leaves
        // it level counts.
        bool improved = false;
        for (int halving = 0; halving < 40 && !improved; ++halving, direction *= 0.5) {
            const VectorXd candidate = x + direction;
            fill(a, candidate);
            PrincipalPair next = principal_eigenvector(a, &principal);
            if (next.lambda < principal.lambda * (1 + level)) {
                x = candidate;
                principal = std::move(next);
                improved = true;
            }
        }
        if (!improved) {
            fill(a, x);
            break;
        }
        if (longest < settled)
            break;
    }
    return {std::move(a), std::move(principal)};
}

} // namespace steelyard
