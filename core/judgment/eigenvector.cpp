// Glossary: A the matrix, lambda its principal eigenvalue, w the right and v the left eigenvector with v'w =
// 1, x_p = ln a_ij the logarithm of missing entry p = (i, j), G the reduced resolvent of A at lambda.
#include "core/judgment/eigenvector.hpp"

#include <Eigen/Cholesky>
#include <Eigen/LU>
#include <algorithm>
#include <cassert>
#include <cmath>
#include <utility>
#include <vector>

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

namespace {

/// At the optimum each missing entry is s_i / s_j with s_i = sqrt(w_i / v_i), since there v_i a_ij w_j = v_j
/// a_ji w_i. So the search needs only the n logarithms y = ln s, however many pairs are missing: lambda is
/// convex in them too.
void fill_missing(MatrixXd& a, const std::vector<PairMatrix::Pair>& missing, const VectorXd& y) {
    for (const auto& [p, q] : missing) {
        const auto i = static_cast<Index>(p);
        const auto j = static_cast<Index>(q);
        a(i, j) = std::exp(y(i) - y(j));
        a(j, i) = std::exp(y(j) - y(i));
    }
}

/// Newton's step for lambda in y, from the derivatives of algebraically simple eigenvalues.
VectorXd newton_step(const MatrixXd& a, const std::vector<PairMatrix::Pair>& missing,
                     const PrincipalPair& principal, double& steepest) {
    const Index n = a.rows();
    const VectorXd& w = principal.right;
    const VectorXd& v = principal.left;
    VectorXd gradient = VectorXd::Zero(n);
    MatrixXd hessian = MatrixXd::Zero(n, n);
    MatrixXd columns = MatrixXd::Zero(n, n); // (dA/dy_k) w, column k
    MatrixXd rows = MatrixXd::Zero(n, n);    // (dA/dy_k)' v, column k
    steepest = 0;
    for (const auto& [p, q] : missing) {
        const auto i = static_cast<Index>(p);
        const auto j = static_cast<Index>(q);
        const double forth = v(i) * a(i, j) * w(j);
        const double back = v(j) * a(j, i) * w(i);
        steepest = std::max(steepest, std::abs(forth - back));
        gradient(i) += forth - back;
        gradient(j) -= forth - back;
        hessian(i, i) += forth + back;
        hessian(j, j) += forth + back;
        hessian(i, j) -= forth + back;
        hessian(j, i) -= forth + back;
        columns(i, i) += a(i, j) * w(j);
        columns(i, j) -= a(i, j) * w(j);
        columns(j, i) -= a(j, i) * w(i);
        columns(j, j) += a(j, i) * w(i);
        rows(j, i) += v(i) * a(i, j);
        rows(j, j) -= v(i) * a(i, j);
        rows(i, i) -= v(j) * a(j, i);
        rows(i, j) += v(j) * a(j, i);
    }
    // G = (lambda I - A + w v')^-1 - w v' is the reduced resolvent; second derivatives are Y'GX + (Y'GX)'.
    const MatrixXd shifted = principal.lambda * MatrixXd::Identity(n, n) - a + w * v.transpose();
    const MatrixXd solved = shifted.partialPivLu().solve(columns) - w * (v.transpose() * columns);
    const MatrixXd cross = rows.transpose() * solved;
    hessian += cross + cross.transpose();
    // Adding the same to y wherever pairs are missing changes nothing: a ridge takes that freedom out of the
    // system. It is far below the curvature, and Newton's next step corrects what it costs.
    hessian.diagonal().array() += 1e-12 * hessian.diagonal().cwiseAbs().maxCoeff();
    return -hessian.ldlt().solve(gradient);
}

} // namespace

Completion complete_optimally(const PairMatrix& pairs) {
    const auto n = static_cast<Index>(pairs.size());
    const auto missing = pairs.missing();
    MatrixXd a(n, n);
    for (Index i = 0; i < n; ++i) {
        for (Index j = 0; j < n; ++j)
            a(i, j) = pairs.at(static_cast<std::size_t>(i), static_cast<std::size_t>(j));
    }
    if (missing.empty()) {
        PrincipalPair p = principal_eigenvector(a);
        return {std::move(a), std::move(p)};
    }
    assert(pairs.connected());

    // The geometric mean's answer is near; it is exact where the judged pairs are consistent.
    VectorXd y = log_least_squares(pairs);
    fill_missing(a, missing, y);
    PrincipalPair principal = principal_eigenvector(a);

    constexpr int most_steps =
        60; // Four were the most seen for n = 9; convexity makes the halving below safe.
    constexpr double longest_step = 2; // In ln a: keeps a far start from leaping where curvature is flat.
    constexpr double level = 1e-14;    // Rounding of lambda, relative.
    constexpr double settled = 1e-12;  // In ln a: Newton's next step would be far below the last digit.
    constexpr double flat = 1e-13; // Gradient relative to lambda: rounding of the vectors is of this size.
    for (int step = 0; step < most_steps; ++step) {
        double steepest = 0;
        VectorXd direction = newton_step(a, missing, principal, steepest);
        if (steepest < flat * principal.lambda) break;
        double longest = 0;
        for (const auto& [i, j] : missing) {
            longest = std::max(longest,
                               std::abs(direction(static_cast<Index>(i)) - direction(static_cast<Index>(j))));
        }
        if (!std::isfinite(longest)) break;
        if (longest > longest_step) direction *= longest_step / longest;

        // Near the minimum lambda is level to its last digits while the steps still gain: a level step
        // counts.
        bool improved = false;
        for (int halving = 0; halving < 40 && !improved; ++halving, direction *= 0.5) {
            const VectorXd candidate = y + direction;
            fill_missing(a, missing, candidate);
            PrincipalPair next = principal_eigenvector(a, &principal);
            if (next.lambda < principal.lambda * (1 + level)) {
                y = candidate;
                principal = std::move(next);
                improved = true;
            }
        }
        if (!improved) fill_missing(a, missing, y);
        if (!improved || longest < settled) break;
    }
    return {std::move(a), std::move(principal)};
}

} // namespace steelyard
