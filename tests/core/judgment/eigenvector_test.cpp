#include <Eigen/Core>
#include <catch_amalgamated.hpp>
#include <cmath>
#include <cstddef>
#include <cstdint>
#include <utility>
#include <vector>

#include "core/judgment/eigenvector.hpp"
#include "tests/support/close.hpp"
#include "tests/support/dice.hpp"
#include "tests/support/pairs.hpp"
#include "tests/support/slow_least.hpp"

namespace steelyard {

using Catch::Matchers::WithinAbs;
using Catch::Matchers::WithinRel;
using Eigen::Index;
using Eigen::MatrixXd;
using Eigen::VectorXd;

namespace {

MatrixXd dense(const PairMatrix& pairs) {
    return complete_optimally(pairs).matrix;
}

/// The slow and obvious way: power steps until the Collatz-Wielandt bounds meet.
double lambda_by_power(const MatrixXd& a) {
    VectorXd w = VectorXd::Ones(a.rows());
    for (int step = 0; step < 100000; ++step) {
        const VectorXd next = a * w;
        const VectorXd ratio = next.cwiseQuotient(w);
        if (ratio.maxCoeff() - ratio.minCoeff() < 4e-15 * ratio.maxCoeff()) return ratio.mean();
        w = next / next.sum();
    }
    return (a * w).sum() / w.sum();
}

/// The largest partial derivative of ln lambda by the logarithm of a missing entry, v_i a_ij w_j - v_j a_ji
/// w_i over lambda: 0 at the minimum.
double steepest_slope(const PairMatrix& pairs, const Completion& whole) {
    const auto& [lambda, w, v] = whole.principal;
    double steepest = 0;
    for (const auto& [p, q] : pairs.missing()) {
        const auto i = static_cast<Index>(p);
        const auto j = static_cast<Index>(q);
        const double slope = v(i) * whole.matrix(i, j) * w(j) - v(j) * whole.matrix(j, i) * w(i);
        steepest = std::fmax(steepest, std::abs(slope) / lambda);
    }
    return steepest;
}

/// Lambda with the pair (i, j) of a complete matrix at e^x.
double lambda_at(MatrixXd a, Index i, Index j, double x) {
    a(i, j) = std::exp(x);
    a(j, i) = std::exp(-x);
    return lambda_by_power(a);
}

/// Minimises lambda over the missing pairs one at a time, each by golden section: slow, needs no derivative.
MatrixXd by_coordinates(const PairMatrix& pairs) {
    MatrixXd a(static_cast<Index>(pairs.size()), static_cast<Index>(pairs.size()));
    for (Index i = 0; i < a.rows(); ++i) {
        for (Index j = 0; j < a.cols(); ++j) {
            const double ratio = pairs.at(static_cast<std::size_t>(i), static_cast<std::size_t>(j));
            a(i, j) = ratio == 0 ? 1 : ratio;
        }
    }
    const double golden = (std::sqrt(5.0) - 1) / 2;
    double before = lambda_by_power(a);
    for (int round = 0; round < 200; ++round) {
        for (const auto& [p, q] : pairs.missing()) {
            const auto i = static_cast<Index>(p);
            const auto j = static_cast<Index>(q);
            double low = -12;
            double high = 12;
            while (high - low > 1e-9) {
                const double one = high - golden * (high - low);
                const double two = low + golden * (high - low);
                if (lambda_at(a, i, j, one) < lambda_at(a, i, j, two))
                    high = two;
                else
                    low = one;
            }
            a(i, j) = std::exp((low + high) / 2);
            a(j, i) = 1 / a(i, j);
        }
        const double now = lambda_by_power(a);
        if (before - now < 1e-14 * now) break;
        before = now;
    }
    return a;
}

} // namespace

TEST_CASE("principal eigenvector: one item and two items") {
    const PrincipalPair one = principal_eigenvector(MatrixXd::Ones(1, 1));
    CHECK(one.lambda == 1);
    CHECK(one.right(0) == 1);
    CHECK(one.left(0) == 1);
    for (const double ratio : {.01, 1. / 9, 1., 3., 100.}) {
        PairMatrix pairs(2);
        pairs.set(0, 1, ratio);
        const PrincipalPair two = principal_eigenvector(dense(pairs));
        INFO("ratio " << ratio);
        CHECK_THAT(two.lambda, WithinAbs(2, 1e-13));
        CHECK_THAT(two.right(0), WithinAbs(ratio / (1 + ratio), 1e-15));
    }
}

TEST_CASE("principal eigenvector: forty equal items") {
    const PrincipalPair p = principal_eigenvector(MatrixXd::Ones(40, 40));
    CHECK_THAT(p.lambda, WithinAbs(40, 1e-12));
    CHECK_THAT(p.right.maxCoeff(), WithinAbs(1. / 40, 1e-16));
    CHECK_THAT(p.right.minCoeff(), WithinAbs(1. / 40, 1e-16));
}

TEST_CASE("principal eigenvector: forty items at random satisfy the definition on both sides") {
    for (std::uint64_t seed = 1; seed <= 5; ++seed) {
        const MatrixXd a = dense(testing::random_scale_pairs(40, seed));
        const PrincipalPair p = principal_eigenvector(a);
        INFO("seed " << seed);
        CHECK_THAT((a * p.right - p.lambda * p.right).cwiseAbs().maxCoeff(), WithinAbs(0, 1e-13));
        CHECK_THAT((a.transpose() * p.left - p.lambda * p.left).cwiseAbs().maxCoeff() / p.left.maxCoeff(),
                   WithinAbs(0, 1e-12));
        CHECK_THAT(p.lambda, WithinRel(lambda_by_power(a), 1e-13));
    }
}

TEST_CASE("principal eigenvector: a permutation of the items permutes the weights") {
    const PairMatrix pairs = testing::random_scale_pairs(7, 4);
    const std::vector<std::size_t> order{3, 0, 6, 2, 5, 1, 4};
    const PrincipalPair plain = principal_eigenvector(dense(pairs));
    const PrincipalPair moved = principal_eigenvector(dense(testing::permuted(pairs, order)));
    CHECK_THAT(moved.lambda, WithinRel(plain.lambda, 1e-14));
    for (std::size_t i = 0; i < order.size(); ++i)
        CHECK_THAT(moved.right(static_cast<Index>(order[i])),
                   WithinAbs(plain.right(static_cast<Index>(i)), 1e-14));
}

TEST_CASE("principal eigenvector: items counted in units a million times larger keep lambda") {
    // a_ij c_i / c_j has the same lambda, and the weights c_i w_i.
    const PairMatrix pairs = testing::random_scale_pairs(5, 9);
    const std::vector<double> unit{1, 1e6, 1e3, 1e-6, 1};
    MatrixXd scaled = dense(pairs);
    for (Index i = 0; i < 5; ++i) {
        for (Index j = 0; j < 5; ++j)
            scaled(i, j) *= unit[static_cast<std::size_t>(i)] / unit[static_cast<std::size_t>(j)];
    }
    const PrincipalPair plain = principal_eigenvector(dense(pairs));
    const PrincipalPair large = principal_eigenvector(scaled);
    CHECK_THAT(large.lambda, WithinRel(plain.lambda, 1e-12));
    for (Index i = 1; i < 5; ++i) {
        const double expected = plain.right(i) / plain.right(0) * unit[static_cast<std::size_t>(i)];
        CHECK_THAT(large.right(i) / large.right(0), WithinRel(expected, 1e-11));
    }
}

TEST_CASE("completion: a complete set is taken as it is") {
    const PairMatrix pairs = testing::house_pairs();
    const Completion whole = complete_optimally(pairs);
    for (const auto& [i, j] : pairs.judged_pairs()) {
        CHECK(whole.matrix(static_cast<Index>(i), static_cast<Index>(j)) == pairs.at(i, j));
        CHECK(whole.matrix(static_cast<Index>(j), static_cast<Index>(i)) == pairs.at(j, i));
    }
}

TEST_CASE("completion: judged pairs stay, filled ones are reciprocal") {
    const PairMatrix pairs = testing::random_near_pairs(8, 1, 50, 12);
    REQUIRE(pairs.missing().size() > 5);
    const Completion whole = complete_optimally(pairs);
    for (const auto& [i, j] : pairs.judged_pairs())
        CHECK(whole.matrix(static_cast<Index>(i), static_cast<Index>(j)) == pairs.at(i, j));
    for (const auto& [i, j] : pairs.missing()) {
        const auto p = static_cast<Index>(i);
        const auto q = static_cast<Index>(j);
        CHECK_THAT(whole.matrix(p, q) * whole.matrix(q, p), WithinAbs(1, 1e-14));
    }
}

TEST_CASE("completion: a tree, and any gap in a consistent set, is filled consistently") {
    const std::vector<double> weights{5, 1, 9, 2, 7, 3, 4};
    PairMatrix pairs = testing::consistent_pairs(weights);
    for (std::size_t i = 0; i < weights.size(); ++i) {
        for (std::size_t j = i + 2; j < weights.size(); ++j) {
            pairs.clear(i, j);
            const Completion whole = complete_optimally(pairs);
            INFO("without " << i << ", " << j);
            CHECK_THAT(whole.principal.lambda, WithinAbs(7, 1e-12));
            for (std::size_t k = 0; k < weights.size(); ++k)
                CHECK_THAT(whole.principal.right(static_cast<Index>(k)), WithinAbs(weights[k] / 31, 1e-13));
        }
    }
    CHECK(pairs.judged_pairs().size() == weights.size() - 1);
}

// Bozoki, Fulop, Ronyai 2010: lambda max is convex in the logarithms of the missing entries, so a point where
// every partial derivative is 0 is the minimum. The derivatives here are central differences of plain power
// steps; a step of 1e-4 leaves an error near 1e-8 from the third derivative and 1e-11 from rounding.
TEST_CASE("completion: no missing pair can be changed to lower lambda") {
    for (std::uint64_t seed = 1; seed <= testing::cases(40); ++seed) {
        const std::size_t n = 4 + seed % 6;
        const PairMatrix pairs = testing::random_near_pairs(n, 1.5, 60, seed);
        const Completion whole = complete_optimally(pairs);
        INFO("seed " << seed << ", " << n << " items, " << pairs.missing().size() << " missing");
        CHECK_THAT(whole.principal.lambda, WithinRel(lambda_by_power(whole.matrix), 1e-13));
        for (const auto& [p, q] : pairs.missing()) {
            const auto i = static_cast<Index>(p);
            const auto j = static_cast<Index>(q);
            const double x = std::log(whole.matrix(i, j));
            const double up = lambda_at(whole.matrix, i, j, x + 1e-4);
            const double down = lambda_at(whole.matrix, i, j, x - 1e-4);
            INFO("pair " << p << ", " << q);
            CHECK_THAT((up - down) / 2e-4, WithinAbs(0, 1e-7));
            CHECK(lambda_at(whole.matrix, i, j, x + .1) > whole.principal.lambda);
            CHECK(lambda_at(whole.matrix, i, j, x - .1) > whole.principal.lambda);
        }
        CHECK(steepest_slope(pairs, whole) < 1e-12);
    }
}

TEST_CASE("completion: moving all missing pairs together does not lower lambda either") {
    for (std::uint64_t seed = 1; seed <= testing::cases(20); ++seed) {
        const PairMatrix pairs = testing::random_near_pairs(7, 1.5, 70, seed);
        const Completion whole = complete_optimally(pairs);
        testing::Dice dice(seed);
        for (int k = 0; k < 20; ++k) {
            MatrixXd other = whole.matrix;
            for (const auto& [p, q] : pairs.missing()) {
                const double factor = std::exp(dice.between(-100, 100) / 100.0);
                other(static_cast<Index>(p), static_cast<Index>(q)) *= factor;
                other(static_cast<Index>(q), static_cast<Index>(p)) /= factor;
            }
            INFO("seed " << seed << ", direction " << k);
            CHECK(lambda_by_power(other) >= whole.principal.lambda * (1 - 1e-14));
        }
    }
}

// Golden section finds a minimum only to the square root of rounding, about 1e-7 in a logarithm.
TEST_CASE("completion: the same as minimising one pair after the other") {
    for (std::uint64_t seed = 1; seed <= testing::cases(6); ++seed) {
        const std::size_t n = 4 + seed % 2;
        const PairMatrix pairs = testing::random_near_pairs(n, 2, 60, 100 + seed);
        const Completion whole = complete_optimally(pairs);
        const MatrixXd slow = by_coordinates(pairs);
        INFO("seed " << 100 + seed << ", " << n << " items, " << pairs.missing().size() << " missing");
        CHECK_THAT(whole.principal.lambda, WithinRel(lambda_by_power(slow), 1e-10));
        for (const auto& [p, q] : pairs.missing()) {
            const double ratio = whole.matrix(static_cast<Index>(p), static_cast<Index>(q)) /
                                 slow(static_cast<Index>(p), static_cast<Index>(q));
            CHECK_THAT(std::log(ratio), WithinAbs(0, 1e-5));
        }
    }
}

TEST_CASE("completion: a slow minimiser finds the same on random connected graphs of up to nine items") {
    std::size_t with_gaps = 0;
    for (std::uint64_t seed = 1; seed <= testing::slow_cases(300); ++seed) {
        const std::size_t n = 3 + seed % 7;
        const PairMatrix pairs = testing::random_graph_pairs(n, 0, seed);
        std::vector<testing::SlowFree> missing;
        const testing::Square square = testing::slow_square(pairs, missing);
        const testing::SlowLeast slow = testing::slow_least(square, missing);
        const Completion whole = complete_optimally(pairs);
        INFO("seed " << seed << ", " << n << " items, " << missing.size() << " missing");
        with_gaps += missing.empty() ? 0 : 1;
        CHECK_THAT(whole.principal.lambda, WithinRel(slow.lambda, 1e-10));
        for (std::size_t i = 0; i < n; ++i) {
            for (std::size_t j = 0; j < n; ++j)
                CHECK_THAT(whole.matrix(static_cast<Index>(i), static_cast<Index>(j)),
                           WithinRel(slow.matrix[i][j], 1e-8));
        }
    }
    CHECK(5 * with_gaps >= 4 * testing::slow_cases(300));
}

TEST_CASE("completion: extreme contradictions with most pairs missing") {
    // A ring of judgments of 100, each item counting 100 times the next: as contradictory as a file may be.
    for (const std::size_t n : {std::size_t{3}, std::size_t{4}, std::size_t{9}, std::size_t{40}}) {
        PairMatrix ring(n);
        for (std::size_t i = 0; i < n; ++i) ring.set(i, (i + 1) % n, 100);
        const Completion whole = complete_optimally(ring);
        INFO("n = " << n);
        CHECK(whole.matrix.allFinite());
        CHECK(whole.principal.lambda > static_cast<double>(n));
        for (std::size_t i = 0; i < n; ++i) // By symmetry all count alike.
            CHECK_THAT(whole.principal.right(static_cast<Index>(i)),
                       WithinRel(1 / static_cast<double>(n), 1e-9));
        CHECK(steepest_slope(ring, whole) < 1e-11);
    }
}

TEST_CASE("completion: ratios from 1/100 to 100 at random, most pairs missing, still reach the minimum") {
    // Ratios off by up to e^4.6 = 100 from any consistent order.
    for (std::uint64_t seed = 1; seed <= testing::cases(300); ++seed) {
        const std::size_t n = 4 + seed % 9;
        const PairMatrix pairs = testing::random_near_pairs(n, 4.6, 60, seed);
        INFO("seed " << seed << ", " << n << " items, " << pairs.missing().size() << " missing");
        CHECK(steepest_slope(pairs, complete_optimally(pairs)) < 1e-11);
    }
}

TEST_CASE("completion: forty items, hundreds of pairs missing") {
    const PairMatrix pairs = testing::random_near_pairs(40, 1.5, 50, 1);
    REQUIRE(pairs.missing().size() > 300);
    CHECK(steepest_slope(pairs, complete_optimally(pairs)) < 1e-11);
}

TEST_CASE("completion: forty items in a chain are filled along it") {
    PairMatrix chain(40);
    for (std::size_t i = 0; i + 1 < 40; ++i) chain.set(i, i + 1, i % 2 == 0 ? 2 : .5);
    const Completion whole = complete_optimally(chain);
    CHECK_THAT(whole.principal.lambda, WithinAbs(40, 1e-10));
    CHECK_THAT(whole.matrix(0, 39), WithinRel(2, 1e-10));
}

TEST_CASE("completion: a permutation of the items permutes it") {
    const PairMatrix pairs = testing::random_near_pairs(6, 1.5, 60, 33);
    REQUIRE_FALSE(pairs.missing().empty());
    const std::vector<std::size_t> order{4, 2, 0, 5, 1, 3};
    const Completion plain = complete_optimally(pairs);
    const Completion moved = complete_optimally(testing::permuted(pairs, order));
    CHECK_THAT(moved.principal.lambda, WithinRel(plain.principal.lambda, 1e-13));
    for (std::size_t i = 0; i < order.size(); ++i) {
        for (std::size_t j = 0; j < order.size(); ++j) {
            CHECK_THAT(moved.matrix(static_cast<Index>(order[i]), static_cast<Index>(order[j])),
                       WithinRel(plain.matrix(static_cast<Index>(i), static_cast<Index>(j)), 1e-10));
        }
    }
}

} // namespace steelyard
