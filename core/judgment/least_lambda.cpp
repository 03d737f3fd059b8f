// Glossary: A the matrix, lambda its principal eigenvalue, w the right and v the left eigenvector with v'w =
// 1, x_p = ln a_ij the logarithm of entry p = (i, j), G the reduced resolvent of A at lambda.
#include "core/judgment/least_lambda.hpp"

#include <Eigen/Cholesky>
#include <Eigen/Eigenvalues>
#include <Eigen/LU>
#include <algorithm>
#include <cassert>
#include <cmath>
#include <utility>

namespace steelyard {
namespace {

using Eigen::Index;
using Eigen::MatrixXd;
using Eigen::VectorXd;

constexpr double scale_end = 9;

/// One free entry and its reciprocal.
struct Entry {
    Index i;
    Index j;

    explicit Entry(const PairMatrix::Pair& p) : i(static_cast<Index>(p[0])), j(static_cast<Index>(p[1])) {}
};

std::vector<Entry> entries(const std::vector<PairMatrix::Pair>& pairs) {
    return {pairs.begin(), pairs.end()};
}

/// The search: a point, and what is needed to move it. At the optimum each missing entry is s_i / s_j with
/// s_i = sqrt(w_i / v_i), since there v_i a_ij w_j = v_j a_ji w_i. So missing pairs need only the n
/// logarithms y = ln s, however many they are: lambda is convex in them too. The unknowns are y (nothing
/// without missing pairs), then the x of those bounded pairs that are not held.
class Search {
public:
    Search(MatrixXd a, const FreePairs& free, VectorXd y, const PrincipalPair* guess)
        : a_(std::move(a)),
          missing_(entries(free.missing)),
          bounded_(entries(free.bounded)),
          may_be_level_(free.may_be_level),
          y_(std::move(y)),
          x_(bounded_.size()),
          held_(bounded_.size()) {
        for (std::size_t p = 0; p < x_.size(); ++p) x_[p] = std::log(a_(bounded_[p].i, bounded_[p].j));
        fill(a_, y_, x_);
        principal_ = principal_eigenvector(a_, guess);
    }

    void run(const SearchEnd& end) {
        constexpr int most_steps =
            60; // Four were the most seen for n = 9; convexity makes the halving below safe.
        constexpr double longest_step = 2; // In ln a: keeps a far start from leaping where curvature is flat.
        // Gradient relative to lambda: rounding of the vectors is of this size. Newton's next step would be
        // about as long as the gradient is steep.
        const double flat = std::max(2e-15, end.settled * end.settled);
        for (int step = 0; step < most_steps; ++step) {
            measure();
            if (steepest_ < flat * principal_.lambda || hopeless(end)) break;
            VectorXd direction = newton_step();
            const double longest = length(direction);
            if (!std::isfinite(longest)) break;
            if (longest > longest_step) direction *= longest_step / longest;
            if (!move(direction) || longest < end.settled) break;
        }
    }

    Completion result() { return {std::move(a_), std::move(principal_)}; }

private:
    /// Puts the free entries into `a`; brings x within the ends of the scale, where the entries are exact.
    void fill(MatrixXd& a, const VectorXd& y, std::vector<double>& x) const {
        static const double furthest = std::log(scale_end);
        for (const auto& [i, j] : missing_) {
            a(i, j) = std::exp(y(i) - y(j));
            a(j, i) = std::exp(y(j) - y(i));
        }
        for (std::size_t p = 0; p < x.size(); ++p) {
            x[p] = std::clamp(x[p], -furthest, furthest);
            const bool at_end = std::abs(x[p]) == furthest;
            const double up = at_end ? scale_end : std::exp(std::abs(x[p]));
            a(bounded_[p].i, bounded_[p].j) = x[p] < 0 ? 1 / up : up;
            a(bounded_[p].j, bounded_[p].i) = x[p] < 0 ? up : 1 / up;
        }
    }

    double forth(const Entry& p) const { return principal_.left(p.i) * a_(p.i, p.j) * principal_.right(p.j); }
    double back(const Entry& p) const { return principal_.left(p.j) * a_(p.j, p.i) * principal_.right(p.i); }

    /// Which bounded pairs are held at their end, and the steepest derivative of lambda by the others.
    void measure() {
        static const double furthest = std::log(scale_end);
        steepest_ = 0;
        outlook_ = 0;
        for (const auto& p : missing_) steepest_ = std::max(steepest_, std::abs(forth(p) - back(p)));
        for (std::size_t p = 0; p < bounded_.size(); ++p) {
            const double slope = forth(bounded_[p]) - back(bounded_[p]);
            held_[p] = (x_[p] >= furthest && slope <= 0) || (x_[p] <= -furthest && slope >= 0);
            if (held_[p]) continue;
            steepest_ = std::max(steepest_, std::abs(slope));
            outlook_ += std::min(slope * (furthest - x_[p]), slope * (-furthest - x_[p]));
        }
    }

    /// ln lambda is convex: it stays above its tangent plane, whose lowest value within the ends is known.
    bool hopeless(const SearchEnd& end) const {
        return missing_.empty() &&
               principal_.lambda * std::exp(outlook_ / principal_.lambda) > end.give_up_above;
    }

    /// Newton's step for lambda in the unknowns, from the derivatives of algebraically simple eigenvalues.
    VectorXd newton_step() const {
        const Index n = a_.rows();
        const Index potentials = missing_.empty() ? 0 : n;
        const Index size = potentials + std::count(held_.begin(), held_.end(), false);
        const VectorXd& w = principal_.right;
        const VectorXd& v = principal_.left;
        VectorXd gradient = VectorXd::Zero(size);
        MatrixXd hessian = MatrixXd::Zero(size, size);
        MatrixXd columns = MatrixXd::Zero(n, size); // (dA/dz_k) w, column k
        MatrixXd rows = MatrixXd::Zero(n, size);    // (dA/dz_k)' v, column k
        for (const auto& p : missing_) {
            const auto [i, j] = p;
            const double f = forth(p);
            const double b = back(p);
            gradient(i) += f - b;
            gradient(j) -= f - b;
            hessian(i, i) += f + b;
            hessian(j, j) += f + b;
            hessian(i, j) -= f + b;
            hessian(j, i) -= f + b;
            columns(i, i) += a_(i, j) * w(j);
            columns(i, j) -= a_(i, j) * w(j);
            columns(j, i) -= a_(j, i) * w(i);
            columns(j, j) += a_(j, i) * w(i);
            rows(j, i) += v(i) * a_(i, j);
            rows(j, j) -= v(i) * a_(i, j);
            rows(i, i) -= v(j) * a_(j, i);
            rows(i, j) += v(j) * a_(j, i);
        }
        Index k = potentials;
        for (std::size_t p = 0; p < bounded_.size(); ++p) {
            if (held_[p]) continue;
            const auto [i, j] = bounded_[p];
            gradient(k) = forth(bounded_[p]) - back(bounded_[p]);
            hessian(k, k) = forth(bounded_[p]) + back(bounded_[p]);
            columns(i, k) = a_(i, j) * w(j);
            columns(j, k) = -a_(j, i) * w(i);
            rows(j, k) = v(i) * a_(i, j);
            rows(i, k) = -v(j) * a_(j, i);
            ++k;
        }
        // G = (lambda I - A + w v')^-1 - w v' is the reduced resolvent; second derivatives are Y'GX +
        // (Y'GX)'.
        MatrixXd shifted = w * v.transpose() - a_;
        shifted.diagonal().array() += principal_.lambda;
        MatrixXd solved = shifted.partialPivLu().solve(columns);
        solved.noalias() -= w * (v.transpose() * columns);
        const MatrixXd cross = rows.transpose() * solved;
        hessian += cross + cross.transpose();
        if (may_be_level_) return level_step(hessian, gradient);
        // Adding the same to y wherever pairs are missing changes nothing: a ridge takes that freedom out of
        // the system. It is far below the curvature, and Newton's next step corrects what it costs.
        hessian.diagonal().array() += 1e-12 * hessian.diagonal().cwiseAbs().maxCoeff();
        return -hessian.ldlt().solve(gradient);
    }

    /// The same without any move along directions in which lambda is level.
    static VectorXd level_step(const MatrixXd& hessian, const VectorXd& gradient) {
        // The smallest curvature seen where there is any is 1e-3 of the largest, rounding 1e-15 of it.
        constexpr double level = 1e-8;
        const Eigen::SelfAdjointEigenSolver<MatrixXd> solver(hessian);
        const double least = level * solver.eigenvalues().cwiseAbs().maxCoeff();
        VectorXd parts = solver.eigenvectors().transpose() * gradient;
        for (Index k = 0; k < parts.size(); ++k)
            parts(k) = solver.eigenvalues()(k) > least ? -parts(k) / solver.eigenvalues()(k) : 0;
        return solver.eigenvectors() * parts;
    }

    /// The largest change of a free entry's logarithm.
    double length(const VectorXd& direction) const {
        double longest = 0;
        for (const auto& [i, j] : missing_)
            longest = std::max(longest, std::abs(direction(i) - direction(j)));
        for (Index k = missing_.empty() ? 0 : a_.rows(); k < direction.size(); ++k)
            longest = std::max(longest, std::abs(direction(k)));
        return longest;
    }

    /// Goes along the direction, less far until lambda falls. False where it does not.
    bool move(VectorXd direction) {
        // Near the minimum lambda is level to its last digits while the steps still gain: a level step
        // counts.
        constexpr double level = 1e-14; // Rounding of lambda, relative.
        const Index potentials = missing_.empty() ? 0 : a_.rows();
        for (int halving = 0; halving < 40; ++halving, direction *= 0.5) {
            const VectorXd y = missing_.empty() ? y_ : VectorXd(y_ + direction.head(potentials));
            std::vector<double> x = x_;
            Index k = potentials;
            for (std::size_t p = 0; p < x.size(); ++p) {
                if (!held_[p]) x[p] += direction(k++);
            }
            fill(a_, y, x);
            PrincipalPair next = principal_eigenvector(a_, &principal_);
            if (next.lambda < principal_.lambda * (1 + level)) {
                y_ = y;
                x_ = std::move(x);
                principal_ = std::move(next);
                return true;
            }
        }
        fill(a_, y_, x_);
        return false;
    }

    MatrixXd a_;
    std::vector<Entry> missing_;
    std::vector<Entry> bounded_;
    bool may_be_level_;
    VectorXd y_;
    std::vector<double> x_;
    std::vector<bool> held_;
    PrincipalPair principal_;
    double steepest_ = 0;
    double outlook_ = 0; ///< The most that the tangent plane falls within the ends.
};

} // namespace

Completion least_lambda(MatrixXd a, const FreePairs& free, VectorXd y, const SearchEnd& end,
                        const PrincipalPair* guess) {
    assert(free.missing.empty() || y.size() == a.rows());
    Search search(std::move(a), free, std::move(y), guess);
    search.run(end);
    return search.result();
}

VectorXd potentials(const PrincipalPair& principal) {
    return 0.5 * (principal.right.array() / principal.left.array()).log();
}

double slope(const Completion& at, Index i, Index j) {
    const auto& [lambda, w, v] = at.principal;
    return (v(i) * at.matrix(i, j) * w(j) - v(j) * at.matrix(j, i) * w(i)) / lambda;
}

} // namespace steelyard
