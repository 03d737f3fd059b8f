#include <catch_amalgamated.hpp>
#include <cmath>
#include <cstddef>
#include <cstdint>
#include <vector>

#include "core/judgment/consistency.hpp"
#include "tests/support/close.hpp"
#include "tests/support/dice.hpp"
#include "tests/support/pairs.hpp"

namespace steelyard {

using Catch::Matchers::WithinAbs;
using testing::upper_triangle;

namespace {

/// Who beats whom, without ties: `ratio` to 1 for the winner.
PairMatrix tournament(std::size_t n, std::uint64_t seed) {
    testing::Dice dice(seed);
    PairMatrix pairs(n);
    for (std::size_t i = 0; i < n; ++i) {
        for (std::size_t j = i + 1; j < n; ++j) pairs.set(i, j, dice.chance(50) ? 3 : 1. / 3);
    }
    return pairs;
}

/// Each item beats the next half of a circle; n odd: as many cycles as there can be.
PairMatrix circle(std::size_t n) {
    PairMatrix pairs(n);
    for (std::size_t i = 0; i < n; ++i) {
        for (std::size_t step = 1; step <= (n - 1) / 2; ++step) pairs.set(i, (i + step) % n, 2);
    }
    return pairs;
}

} // namespace

TEST_CASE("consistency index: none below two items, 0 for two, never below 0") {
    CHECK_FALSE(consistency_index(0, 0).has_value());
    CHECK_FALSE(consistency_index(1, 1).has_value());
    CHECK(consistency_index(2, 2) == 0);
    CHECK(consistency_index(3 - 1e-15, 3) == 0);
    CHECK(consistency_index(4.5, 4).value() == .5 / 3);
}

TEST_CASE("hand estimate of lambda: the mean of (A w)_i / w_i") {
    Eigen::MatrixXd a(2, 2);
    a << 1, 4, .25, 1;
    // (.5 + 2) / .5 = 5 and (.125 + .5) / .5 = 1.25.
    CHECK_THAT(lambda_by_hand(a, {.5, .5}), WithinAbs(3.125, 1e-15));
    CHECK_THAT(lambda_by_hand(a, {.8, .2}), WithinAbs(2, 1e-15));
}

TEST_CASE("geometric consistency index: three items by hand") {
    // a13 is twice what the others imply: each of three errors is ln 2 / 3, so GCI = (ln 2)^2 / 3.
    const double expected = std::log(2) * std::log(2) / 3;
    CHECK_THAT(geometric_consistency_index(upper_triangle(3, {2, 8, 2})).value(), WithinAbs(expected, 1e-15));
    // Halved instead of doubled is as bad.
    CHECK_THAT(geometric_consistency_index(upper_triangle(3, {2, 2, 2})).value(), WithinAbs(expected, 1e-15));
}

TEST_CASE("geometric consistency index: none below three items or with a pair missing") {
    CHECK_FALSE(geometric_consistency_index(PairMatrix(0)).has_value());
    CHECK_FALSE(geometric_consistency_index(PairMatrix(1)).has_value());
    CHECK_FALSE(geometric_consistency_index(upper_triangle(2, {5})).has_value());
    CHECK_FALSE(geometric_consistency_index(upper_triangle(3, {2, 0, 2})).has_value());
}

TEST_CASE("worst triad: a factor of two either way gives one half") {
    for (const double ratio : {8., 2.}) {
        const WorstTriad worst = koczkodaj_index(upper_triangle(3, {2, ratio, 2})).value();
        CHECK_THAT(worst.index, WithinAbs(.5, 1e-15));
        CHECK(worst.triad == Triad{0, 1, 2});
    }
}

TEST_CASE("worst triad: none without three items judged in full") {
    CHECK_FALSE(koczkodaj_index(PairMatrix(0)).has_value());
    CHECK_FALSE(koczkodaj_index(upper_triangle(2, {5})).has_value());
    CHECK_FALSE(koczkodaj_index(upper_triangle(3, {2, 0, 2})).has_value());
    // A ring of four holds no triad.
    CHECK_FALSE(koczkodaj_index(upper_triangle(4, {2, 0, 3, 5, 0, 7})).has_value());
}

TEST_CASE("worst triad: among missing pairs and parts that do not connect, full triads still count") {
    // Items 1, 2, 3 of five are judged in full; 0 and 4 by nobody.
    const WorstTriad worst = koczkodaj_index(upper_triangle(5, {0, 0, 0, 0, 2, 8, 0, 2, 0, 0})).value();
    CHECK_THAT(worst.index, WithinAbs(.5, 1e-15));
    CHECK(worst.triad == Triad{1, 2, 3});
}

TEST_CASE("worst triad: the order of the items changes only the names") {
    const std::vector<std::size_t> order{6, 2, 0, 4, 7, 1, 5, 3};
    const double expected = koczkodaj_index(testing::house_pairs()).value().index;
    const WorstTriad moved = koczkodaj_index(testing::permuted(testing::house_pairs(), order)).value();
    CHECK_THAT(moved.index, WithinAbs(expected, 1e-12));
    CHECK(moved.triad == Triad{0, 5, 6}); // Items 2, 6 and 0 where they stand now.
}

TEST_CASE("circular triads: named from their first item on, in the order of who counts more") {
    // 0 > 1 > 2 > 0 and the other way round.
    CHECK(circular_triads(upper_triangle(3, {2, .5, 2})).strict == std::vector<Triad>{{0, 1, 2}});
    CHECK(circular_triads(upper_triangle(3, {.5, 2, .5})).strict == std::vector<Triad>{{0, 2, 1}});
    CHECK(circular_triads(upper_triangle(3, {2, 4, 2})).strict.empty());
}

TEST_CASE("circular triads: listed by first, second and third item") {
    const CircularTriads found = circular_triads(circle(5));
    CHECK(found.strict == std::vector<Triad>{{0, 1, 3}, {0, 2, 3}, {0, 2, 4}, {1, 2, 4}, {1, 3, 4}});
}

TEST_CASE("circular triads: one or two ties are listed apart, three are none") {
    const CircularTriads one = circular_triads(upper_triangle(3, {1, .5, 2}));
    CHECK(one.strict.empty());
    CHECK(one.tied == std::vector<Triad>{{0, 1, 2}});
    const CircularTriads two = circular_triads(upper_triangle(3, {1, .5, 1}));
    CHECK(two.tied == std::vector<Triad>{{0, 1, 2}});
    const CircularTriads back = circular_triads(upper_triangle(3, {1, 2, 1}));
    CHECK(back.tied == std::vector<Triad>{{0, 2, 1}});
    const CircularTriads three = circular_triads(upper_triangle(3, {1, 1, 1}));
    CHECK(three.strict.empty());
    CHECK(three.tied.empty());
    // A tie against a clear order is no circle: 0 = 1, 1 > 2, 0 > 2.
    CHECK(circular_triads(upper_triangle(3, {1, 2, 2})).tied.empty());
}

TEST_CASE("circular triads: a mean that comes out at 1 up to rounding is a tie") {
    CHECK(circular_triads(upper_triangle(3, {1 + 2e-16, .5, 2})).strict.empty());
    CHECK(circular_triads(upper_triangle(3, {1 + 2e-16, .5, 2})).tied.size() == 1);
    CHECK(circular_triads(upper_triangle(3, {1 + 1e-9, .5, 2})).strict.size() == 1);
}

TEST_CASE("circular triads: only fully judged triads count, and there is no coefficient then") {
    const CircularTriads found = circular_triads(upper_triangle(4, {2, .5, 0, 2, 0, 0}));
    CHECK(found.strict == std::vector<Triad>{{0, 1, 2}});
    CHECK_FALSE(found.zeta.has_value());
}

// Kendall and Babington Smith 1940, from memory: 0 where there are as many circular triads as can be, 1
// without.
TEST_CASE("coefficient of consistence: from 0 to 1, none with ties or below three items") {
    for (const std::size_t n : {std::size_t{3}, std::size_t{5}, std::size_t{7}, std::size_t{9}})
        CHECK_THAT(circular_triads(circle(n)).zeta.value(), WithinAbs(0, 1e-15));
    // Four items: at most two circular triads, 0 > 1 > 2 > 0 and 0 > 1 > 3 > 0.
    const CircularTriads four = circular_triads(upper_triangle(4, {2, .5, .5, 2, 2, 2}));
    CHECK(four.strict.size() == 2);
    CHECK_THAT(four.zeta.value(), WithinAbs(0, 1e-15));
    CHECK(circular_triads(testing::consistent_pairs({5, 4, 3, 2, 1})).zeta == 1);
    CHECK_FALSE(circular_triads(testing::consistent_pairs({5, 4, 3, 2, 2})).zeta.has_value());
    CHECK_FALSE(circular_triads(upper_triangle(2, {3})).zeta.has_value());
    CHECK_FALSE(circular_triads(PairMatrix(0)).zeta.has_value());
}

// The same source: without ties d = n(n-1)(2n-1)/12 - sum of s_i^2 / 2, s_i the number of items that i beats.
TEST_CASE("circular triads: as many as the wins of each item say") {
    for (std::uint64_t seed = 1; seed <= testing::cases(60); ++seed) {
        const std::size_t n = 3 + seed % 10;
        const PairMatrix pairs = tournament(n, seed);
        double squares = 0;
        for (std::size_t i = 0; i < n; ++i) {
            double wins = 0;
            for (std::size_t j = 0; j < n; ++j) wins += pairs.at(i, j) > 1 ? 1 : 0;
            squares += wins * wins;
        }
        const auto size = static_cast<double>(n);
        INFO("seed " << seed << ", n = " << n);
        CHECK(static_cast<double>(circular_triads(pairs).strict.size()) ==
              size * (size - 1) * (2 * size - 1) / 12 - squares / 2);
    }
}

} // namespace steelyard
