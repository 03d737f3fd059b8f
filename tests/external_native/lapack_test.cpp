#include <Eigen/Core>
#include <catch_amalgamated.hpp>
#include <cmath>
#include <cstddef>
#include <cstdint>
#include <lapacke.h>
#include <string>
#include <vector>

#include "core/judgment/eigenvector.hpp"
#include "tests/support/close.hpp"
#include "tests/support/dice.hpp"
#include "tests/support/pairs.hpp"

// LAPACK's dgeev (E. Anderson and others, LAPACK Users' Guide, 3rd edition, SIAM 1999), called through
// LAPACKE as Debian 12 ships it, is the independent reference: it shares neither method nor code with the
// core. It works by the QR algorithm on the whole spectrum, so its vectors are good to about 1e-16 times the
// size of the matrix over the gap to the next eigenvalue; 1e-10 leaves room for that and nothing else.
namespace steelyard {

using Catch::Matchers::WithinAbs;
using Catch::Matchers::WithinRel;

namespace {

using Eigen::Index;
using Eigen::MatrixXd;
using Eigen::VectorXd;

MatrixXd dense(const PairMatrix& pairs) {
    const auto n = static_cast<Index>(pairs.size());
    MatrixXd a(n, n);
    for (Index i = 0; i < n; ++i) {
        for (Index j = 0; j < n; ++j)
            a(i, j) = pairs.at(static_cast<std::size_t>(i), static_cast<std::size_t>(j));
    }
    return a;
}

PrincipalPair by_lapack(MatrixXd a) {
    const auto n = static_cast<lapack_int>(a.rows());
    VectorXd real(n);
    VectorXd imaginary(n);
    MatrixXd left(n, n);
    MatrixXd right(n, n);
    const lapack_int info = LAPACKE_dgeev(LAPACK_COL_MAJOR, 'V', 'V', n, a.data(), n, real.data(),
                                          imaginary.data(), left.data(), n, right.data(), n);
    REQUIRE(info == 0);
    // The principal eigenvalue of a positive matrix is real, simple and larger than any other's modulus
    // (Perron).
    Index largest = 0;
    for (Index k = 1; k < n; ++k) {
        if (real(k) > real(largest)) largest = k;
    }
    REQUIRE(imaginary(largest) == 0);
    PrincipalPair p;
    p.lambda = real(largest);
    p.right = right.col(largest) / right.col(largest).sum();
    p.left = left.col(largest) / left.col(largest).dot(p.right);
    return p;
}

void compare(const PairMatrix& pairs) {
    const MatrixXd a = dense(pairs);
    const PrincipalPair ours = principal_eigenvector(a);
    const PrincipalPair theirs = by_lapack(a);
    CHECK_THAT(ours.lambda, WithinRel(theirs.lambda, 1e-10));
    CHECK_THAT(ours.right.sum(), WithinAbs(1, 1e-14));
    CHECK_THAT(ours.left.dot(ours.right), WithinAbs(1, 1e-14));
    CHECK(ours.right.minCoeff() > 0);
    CHECK(ours.left.minCoeff() > 0);
    CHECK_THAT((ours.right - theirs.right).cwiseAbs().maxCoeff(), WithinAbs(0, 1e-10));
    // Left vectors are not of size 1 (v'w = 1 with w of sum 1): relative to their largest entry.
    CHECK_THAT((ours.left - theirs.left).cwiseAbs().maxCoeff() / theirs.left.maxCoeff(), WithinAbs(0, 1e-10));
}

/// Any ratio from 1/100 to 100, even in the logarithm.
PairMatrix wild_pairs(std::size_t n, std::uint64_t seed) {
    testing::Dice dice(seed);
    PairMatrix pairs(n);
    for (std::size_t i = 0; i < n; ++i) {
        for (std::size_t j = i + 1; j < n; ++j)
            pairs.set(i, j, std::pow(100.0, dice.between(-1000, 1000) / 1000.0));
    }
    return pairs;
}

} // namespace

TEST_CASE("LAPACK: random judgments on the scale, n = 3 to 15") {
    for (std::size_t n = 3; n <= 15; ++n) {
        for (std::uint64_t seed = 1; seed <= testing::cases(40); ++seed) {
            INFO("n = " << n << ", seed " << seed);
            compare(testing::random_scale_pairs(n, seed));
        }
    }
}

TEST_CASE("LAPACK: nearly consistent judgments, n = 3 to 15") {
    for (std::size_t n = 3; n <= 15; ++n) {
        for (std::uint64_t seed = 1; seed <= testing::cases(20); ++seed) {
            for (const double noise : {1e-12, 1e-6, .3}) {
                INFO("n = " << n << ", seed " << seed << ", noise " << noise);
                compare(testing::random_near_pairs(n, noise, 0, seed));
            }
        }
    }
}

TEST_CASE("LAPACK: ratios from 1/100 to 100, n = 3 to 15") {
    for (std::size_t n = 3; n <= 15; ++n) {
        for (std::uint64_t seed = 1; seed <= testing::cases(40); ++seed) {
            INFO("n = " << n << ", seed " << seed);
            compare(wild_pairs(n, seed));
        }
    }
}

// The worst a set can be: each item counts 100 times the next one around a circle. The next eigenvalues come
// within a few per cent of the first in modulus, so power steps alone would crawl.
TEST_CASE("LAPACK: a circle of ratios of 100, where other eigenvalues are nearly as large") {
    for (std::size_t n = 3; n <= 15; ++n) {
        PairMatrix circle(n);
        for (std::size_t i = 0; i < n; ++i) {
            for (std::size_t j = i + 1; j < n; ++j) circle.set(i, j, 1);
        }
        for (std::size_t i = 0; i + 1 < n; ++i) circle.set(i, i + 1, 100);
        circle.set(n - 1, 0, 100);
        INFO("n = " << n);
        compare(circle);
    }
}

// Two groups, each a circle of 100, that count alike: two real eigenvalues lie close together at the top,
// about 101 +- 3 for groups of three, and one group's vector is the other's negative in the lower of them.
TEST_CASE("LAPACK: two equal groups, nearly degenerate at the top") {
    for (const std::size_t half : {std::size_t{3}, std::size_t{5}, std::size_t{7}}) {
        PairMatrix pairs(2 * half);
        for (std::size_t i = 0; i < 2 * half; ++i) {
            for (std::size_t j = i + 1; j < 2 * half; ++j) {
                const std::size_t apart = j - i;
                const bool together = (i < half) == (j < half);
                double ratio = 1;
                if (together && apart == 1) ratio = 100;
                if (together && apart == half - 1) ratio = .01;
                pairs.set(i, j, ratio);
            }
        }
        INFO("groups of " << half);
        compare(pairs);
    }
}

// Weights that differ by 100 between neighbours and 1e8 in all, each ratio within 1/100 to 100 cut to that.
TEST_CASE("LAPACK: a ladder of weights over eight powers of ten") {
    PairMatrix ladder(5);
    for (std::size_t i = 0; i < 5; ++i) {
        for (std::size_t j = i + 1; j < 5; ++j)
            ladder.set(i, j, std::fmin(100, std::pow(100.0, static_cast<double>(j - i))));
    }
    compare(ladder);
    PairMatrix uncut(5);
    for (std::size_t i = 0; i < 5; ++i) {
        for (std::size_t j = i + 1; j < 5; ++j) uncut.set(i, j, std::pow(100.0, static_cast<double>(j - i)));
    }
    compare(uncut);
}

// The start is only a start: a poor one leads to the same vectors.
TEST_CASE("LAPACK: the answer does not depend on the start given") {
    for (std::uint64_t seed = 1; seed <= testing::cases(20); ++seed) {
        const std::size_t n = 3 + seed % 13;
        const MatrixXd a = dense(testing::random_scale_pairs(n, seed));
        const PrincipalPair start = by_lapack(dense(testing::random_scale_pairs(n, seed + 1000)));
        const PrincipalPair ours = principal_eigenvector(a, &start);
        const PrincipalPair theirs = by_lapack(a);
        INFO("n = " << n << ", seed " << seed);
        CHECK_THAT(ours.lambda, WithinRel(theirs.lambda, 1e-10));
        CHECK_THAT((ours.right - theirs.right).cwiseAbs().maxCoeff(), WithinAbs(0, 1e-10));
    }
}

} // namespace steelyard
