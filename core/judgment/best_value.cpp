// Glossary: A the complete matrix, scaled so that its principal eigenvector is all ones; lambda its principal
// eigenvalue; p the left eigenvector, p'1 = 1; S the reduced resolvent at lambda; C the matrix without items
// i and j, R = (mu I - C)^-1; B, D the blocks A[{i,j}, rest], A[rest, {i,j}]; K = B R D.
//
// With the pair (i, j) at a, mu is an eigenvalue where (mu - 1 - K11)(mu - 1 - K22) = (a + K12)(1/a + K21).
// The right side is least at a = sqrt(K12 / K21), so the least lambda is the root of
//   f(mu) = sqrt((mu - 1 - K11)(mu - 1 - K22)) - 1 - sqrt(K12 K21),
// concave and rising above the eigenvalues of C. K is not computed from C: the block {i, j} of (mu I - A)^-1
// is the inverse of mu I - A[{i,j},{i,j}] - K (Schur's complement), and with d = lambda - mu
//   (mu I - A)^-1 = -1 p'/d + T,   T = S + d S^2 + d^2 S^3 + ...
// whose powers serve all pairs of the set.
#include "core/judgment/best_value.hpp"

#include <Eigen/LU>
#include <cassert>
#include <cmath>
#include <utility>

namespace steelyard {

using Eigen::Index;
using Eigen::Matrix2d;
using Eigen::MatrixXd;
using Eigen::Vector2d;
using Eigen::VectorXd;

namespace {

/// More powers than this, and finding the completion without the pair is no more work.
constexpr std::size_t most_powers = 40;

/// Below this part of lambda the change of the eigenvector is below 1e-4, and no entry can have turned.
constexpr double slight_fall = 1e-9;

} // namespace

BestValues::BestValues(const PairMatrix& pairs)
    : pairs_(pairs), whole_(complete_optimally(pairs)), complete_(pairs.complete() && pairs.size() > 2) {
    if (!complete_) return;
    const auto& [lambda, w, v] = whole_.principal;
    scaled_ = w.cwiseInverse().asDiagonal() * whole_.matrix * w.asDiagonal();
    shares_ = v.cwiseProduct(w);
    const Index n = scaled_.rows();
    MatrixXd shifted = VectorXd::Ones(n) * shares_.transpose() - scaled_;
    shifted.diagonal().array() += lambda;
    powers_.emplace_back(shifted.inverse());
    powers_.front().rowwise() -= shares_.transpose();
    sizes_.push_back(powers_.front().cwiseAbs().maxCoeff());
}

void BestValues::add_power() {
    powers_.emplace_back(powers_.back() * powers_.front());
    sizes_.push_back(powers_.back().cwiseAbs().maxCoeff());
}

/// The two-by-two problem at mu = lambda - fall.
struct BestValues::Reduced {
    Matrix2d rest; ///< mu I - A[{i,j},{i,j}] - K.
    double forth;  ///< K12.
    double back;   ///< K21.
    double f;
    double slope; ///< df/dmu.
};

/// False where mu is too low: no sum of the series, or entries of the wrong sign.
bool BestValues::reduce(Index i, Index j, double fall, Reduced& out) {
    Matrix2d t = Matrix2d::Zero();
    Matrix2d t_slope = Matrix2d::Zero(); // By mu.
    double power = 1;                    // fall^k
    double before = 0;                   // fall^(k - 1)
    for (std::size_t k = 0;; ++k) {
        if (k == most_powers) return false;
        if (k == powers_.size()) add_power();
        const MatrixXd& s = powers_[k];
        Matrix2d block;
        block << s(i, i), s(i, j), s(j, i), s(j, j);
        t += power * block;
        t_slope -= static_cast<double>(k) * before * block;
        // A relative 1e-17 of the diagonal is beyond rounding.
        if (k > 0 && before * static_cast<double>(k) * sizes_[k] * (1 + fall) <
                         1e-17 * t.diagonal().cwiseAbs().maxCoeff())
            break;
        before = power;
        power *= fall;
        if (k == 1 && fall == 0) break;
    }
    if (!(std::abs(t.determinant()) > 0)) return false;
    const Matrix2d m = t.inverse();
    const Matrix2d m_slope = -m * t_slope * m;
    const Eigen::RowVector2d p(shares_(i), shares_(j));
    const Vector2d ones = Vector2d::Ones();
    const double c = p * m * ones - fall;
    const double c_slope = 1 + p * m_slope * ones;
    const Matrix2d dyad = (m * ones) * (p * m);
    out.rest = m - dyad / c;
    const Matrix2d rest_slope =
        m_slope - ((m_slope * ones) * (p * m) + (m * ones) * (p * m_slope)) / c + dyad * (c_slope / (c * c));
    out.forth = -out.rest(0, 1) - scaled_(i, j);
    out.back = -out.rest(1, 0) - scaled_(j, i);
    if (!(out.rest(0, 0) > 0 && out.rest(1, 1) > 0 && out.forth > 0 && out.back > 0)) return false;
    const double left = std::sqrt(out.rest(0, 0) * out.rest(1, 1));
    const double right = std::sqrt(out.forth * out.back);
    out.f = left - 1 - right;
    out.slope = (rest_slope(0, 0) * out.rest(1, 1) + out.rest(0, 0) * rest_slope(1, 1)) / (2 * left) +
                (rest_slope(0, 1) * out.back + out.forth * rest_slope(1, 0)) / (2 * right);
    return std::isfinite(out.f) && out.slope > 0;
}

/// Whether the eigenvector that belongs to mu = lambda - fall with the pair at `ratio` (scaled) is positive:
/// only the principal one is. `weight_ratio`: w_i / w_j in it.
bool BestValues::positive_vector(Index i, Index j, double fall, double ratio, double weight_ratio) const {
    if (fall < slight_fall * whole_.principal.lambda) return true;
    // (mu I - A) w = what the changed pair adds to A w; so w is made of columns i and j of the resolvent.
    const double at_i = ratio - scaled_(i, j);
    const double at_j = (1 / ratio - scaled_(j, i)) * weight_ratio;
    VectorXd w = VectorXd::Constant(scaled_.rows(), -(shares_(i) * at_i + shares_(j) * at_j) / fall);
    double power = 1;
    for (const MatrixXd& s : powers_) {
        w += power * (at_i * s.col(i) + at_j * s.col(j));
        power *= fall;
    }
    return w.minCoeff() > 0;
}

std::optional<BestValue> BestValues::by_series(Index i, Index j) {
    const double lambda = whole_.principal.lambda;
    constexpr int most_steps = 100; // Five are usual; going half-way back takes more.
    double good = 0;
    double fall = 0;
    Reduced at;
    for (int step = 0; step < most_steps; ++step) {
        if (!reduce(i, j, fall, at)) {
            if (fall == good) return std::nullopt;
            fall = (fall + good) / 2;
            continue;
        }
        good = fall;
        const double next = std::max(0.0, fall + at.f / at.slope);
        if (std::abs(next - fall) > 1e-15 * lambda) {
            fall = next;
            continue;
        }
        const double ratio = std::sqrt(at.forth / at.back);
        const double weight_ratio = (ratio + at.forth) / at.rest(0, 0);
        if (!positive_vector(i, j, fall, ratio, weight_ratio)) return std::nullopt;
        const double unscale = whole_.principal.right(i) / whole_.principal.right(j);
        return BestValue{ratio * unscale, lambda - fall, weight_ratio * unscale};
    }
    return std::nullopt;
}

std::optional<BestValue> BestValues::of(std::size_t i, std::size_t j) {
    assert(i != j && pairs_.judged(i, j));
    const auto p = static_cast<Index>(i);
    const auto q = static_cast<Index>(j);
    if (complete_) {
        if (const auto found = by_series(p, q)) return found;
    }
    PairMatrix rest = pairs_;
    rest.clear(i, j);
    if (!rest.connected()) return std::nullopt;
    // Started from the whole set's vectors it would not end sooner: they have the pair's own error in them.
    const Completion without = complete_optimally(rest);
    const VectorXd& w = without.principal.right;
    return BestValue{without.matrix(p, q), without.principal.lambda, w(p) / w(q)};
}

double BestValues::lambda_at(std::size_t i, std::size_t j, double ratio) const {
    PairMatrix changed = pairs_;
    changed.set(i, j, ratio);
    return complete_optimally(changed).principal.lambda;
}

double nearest_on_scale(double ratio) {
    const double size = std::abs(std::log(ratio));
    int nearest = 1;
    for (int value = 2; value <= 9; ++value) {
        if (std::abs(std::log(value) - size) < std::abs(std::log(nearest) - size)) nearest = value;
    }
    return ratio < 1 ? 1.0 / nearest : nearest;
}

} // namespace steelyard
