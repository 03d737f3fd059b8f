#include <catch_amalgamated.hpp>
#include <cmath>
#include <cstddef>
#include <cstdint>
#include <vector>

#include "core/judgment/best_value.hpp"
#include "tests/support/close.hpp"
#include "tests/support/pairs.hpp"
#include "tests/support/slow_least.hpp"

namespace steelyard {

using Catch::Matchers::WithinAbs;
using Catch::Matchers::WithinRel;
using testing::SlowFree;
using testing::upper_triangle;

namespace {

struct Slow {
    double ratio;
    double lambda;
};

/// Golden section on ln a, missing pairs minimised at every point. It finds a minimum to the square root of
/// rounding only, about 1e-7 in a logarithm.
Slow by_golden_section(const PairMatrix& pairs, std::size_t i, std::size_t j) {
    std::vector<SlowFree> missing;
    testing::Square a = testing::slow_square(pairs, missing);
    const auto lambda_at = [&](double x) {
        a[i][j] = std::exp(x);
        a[j][i] = std::exp(-x);
        return testing::slow_least(a, missing).lambda;
    };
    const double golden = (std::sqrt(5.0) - 1) / 2;
    double low = -12;
    double high = 12;
    double one = high - golden * (high - low);
    double two = low + golden * (high - low);
    double at_one = lambda_at(one);
    double at_two = lambda_at(two);
    while (high - low > 1e-8) {
        if (at_one < at_two) {
            high = two;
            two = one;
            at_two = at_one;
            at_one = lambda_at(one = high - golden * (high - low));
        } else {
            low = one;
            one = two;
            at_one = at_two;
            at_two = lambda_at(two = low + golden * (high - low));
        }
    }
    return {std::exp((low + high) / 2), at_one};
}

/// Complete and incomplete sets, mild and wild ones.
PairMatrix any_pairs(std::size_t n, std::uint64_t seed) {
    switch (seed % 4) {
    case 0: return testing::random_scale_pairs(n, seed);
    case 1: return testing::random_near_pairs(n, .7, 0, seed);
    case 2: return testing::random_near_pairs(n, 1.5, 40, seed);
    default: return testing::random_graph_pairs(n, 0, seed);
    }
}

/// The same by the definition: the completion without the pair.
void check_against_completion(const PairMatrix& pairs, double tolerance) {
    BestValues values(pairs);
    for (const auto& [i, j] : pairs.judged_pairs()) {
        PairMatrix rest = pairs;
        rest.clear(i, j);
        INFO("pair " << i << ", " << j);
        const auto best = values.of(i, j);
        REQUIRE(best.has_value() == rest.connected());
        if (!best) continue;
        const Completion without = complete_optimally(rest);
        const auto p = static_cast<Eigen::Index>(i);
        const auto q = static_cast<Eigen::Index>(j);
        CHECK_THAT(best->lambda, WithinRel(without.principal.lambda, 1e-12));
        CHECK_THAT(best->ratio, WithinRel(without.matrix(p, q), tolerance));
        CHECK_THAT(best->implied,
                   WithinRel(without.principal.right(p) / without.principal.right(q), tolerance));
    }
}

} // namespace

TEST_CASE("best value: golden section finds the same, complete and incomplete sets") {
    for (std::uint64_t seed = 1; seed <= testing::slow_cases(28); ++seed) {
        const std::size_t n = 3 + seed % 7;
        const PairMatrix pairs = any_pairs(n, seed);
        BestValues values(pairs);
        std::size_t looked_at = 0;
        for (const auto& [i, j] : pairs.judged_pairs()) {
            const auto best = values.of(i, j);
            if (!best || looked_at == 4) continue; // A few of each set: this way is slow.
            ++looked_at;
            const Slow slow = by_golden_section(pairs, i, j);
            INFO("seed " << seed << ", " << n << " items, pair " << i << ", " << j);
            CHECK_THAT(std::log(best->ratio / slow.ratio), WithinAbs(0, 1e-5));
            CHECK_THAT(best->lambda, WithinRel(slow.lambda, 1e-10));
        }
    }
}

TEST_CASE("best value: the completion without the pair says the same") {
    for (std::uint64_t seed = 1; seed <= testing::cases(120); ++seed) {
        const std::size_t n = 3 + seed % 7;
        INFO("seed " << seed << ", " << n << " items");
        check_against_completion(any_pairs(n, seed), 1e-10);
    }
}

TEST_CASE("best value: the completion without the pair says the same, forty items") {
    check_against_completion(testing::random_scale_pairs(40, 3), 1e-10);
}

TEST_CASE("best value: ratios off by up to 100 from any order") {
    // Curvature may be 1e-4 of what it is on the scale: the slow way loses as many digits.
    for (std::uint64_t seed = 1; seed <= testing::cases(60); ++seed) {
        const std::size_t n = 3 + seed % 7;
        INFO("seed " << seed << ", " << n << " items");
        check_against_completion(testing::random_near_pairs(n, 4.6, seed % 2 == 0 ? 0 : 40, seed), 1e-8);
    }
}

TEST_CASE("best value: in a triad the product of the others, whatever was given") {
    for (const double given : {.01, 1. / 9, 1., 6., 100.}) {
        BestValues values(upper_triangle(3, {2, given, 3}));
        INFO("given " << given);
        const BestValue best = values.of(0, 2).value();
        CHECK_THAT(best.ratio, WithinRel(6, 1e-12));
        CHECK_THAT(best.implied, WithinRel(6, 1e-12));
        CHECK_THAT(best.lambda, WithinAbs(3, 1e-12));
        // The same pair told the other way round.
        CHECK_THAT(values.of(2, 0).value().ratio, WithinRel(1. / 6, 1e-12));
    }
    // As contradictory as a file may be: 100 times, 100 times, and back 100 times.
    BestValues wild(upper_triangle(3, {100, .01, 100}));
    CHECK_THAT(wild.of(0, 2).value().ratio, WithinRel(1e4, 1e-10));
}

TEST_CASE("best value: where nothing else links the items no value is better") {
    BestValues two(upper_triangle(2, {7}));
    CHECK_FALSE(two.of(0, 1).has_value());
    // A triad and a fourth item that hangs on by one pair.
    BestValues hanging(upper_triangle(4, {2, 8, 0, 2, 0, 3}));
    CHECK_FALSE(hanging.of(2, 3).has_value());
    CHECK_THAT(hanging.of(0, 2).value().ratio, WithinRel(4, 1e-12));
    CHECK_THAT(hanging.lambda_at(2, 3, 100), WithinRel(hanging.whole().principal.lambda, 1e-13));
}

TEST_CASE("best value: of a consistent set what was given") {
    for (std::size_t n = 3; n <= 12; ++n) {
        std::vector<double> weights;
        for (std::size_t i = 0; i < n; ++i) weights.push_back(1 + std::fmod(static_cast<double>(i) * 2.7, 8));
        const PairMatrix pairs = testing::consistent_pairs(weights);
        BestValues values(pairs);
        for (const auto& [i, j] : pairs.judged_pairs()) {
            INFO(n << " items, pair " << i << ", " << j);
            const BestValue best = values.of(i, j).value();
            CHECK_THAT(best.ratio, WithinRel(pairs.at(i, j), 1e-12));
            CHECK_THAT(best.lambda, WithinAbs(static_cast<double>(n), 1e-12));
        }
    }
}

TEST_CASE("best value: lambda at another value, complete and incomplete") {
    for (std::uint64_t seed = 1; seed <= testing::cases(20); ++seed) {
        const PairMatrix pairs = any_pairs(4 + seed % 4, seed);
        const BestValues values(pairs);
        const auto [i, j] = pairs.judged_pairs()[seed % pairs.judged_pairs().size()];
        PairMatrix changed = pairs;
        changed.set(i, j, .5);
        std::vector<SlowFree> missing;
        const testing::Square square = testing::slow_square(changed, missing);
        INFO("seed " << seed << ", pair " << i << ", " << j);
        CHECK_THAT(values.lambda_at(i, j, .5), WithinRel(testing::slow_least(square, missing).lambda, 1e-12));
    }
}

TEST_CASE("nearest on the scale: by the logarithm, its ends for what lies beyond") {
    const double values[] = {1. / 9, 1. / 8, 1. / 7, 1. / 6, 1. / 5, 1. / 4, 1. / 3, 1. / 2, 1,
                             2,      3,      4,      5,      6,      7,      8,      9};
    for (const double value : values) {
        CHECK(nearest_on_scale(value) == value);
        CHECK(nearest_on_scale(value * 1.02) == value);
        CHECK(nearest_on_scale(value / 1.02) == value);
    }
    CHECK(nearest_on_scale(100) == 9);
    CHECK(nearest_on_scale(.01) == 1. / 9);
    // Between 1 and 2 the middle is sqrt 2, not 1.5; between 1/3 and 1/2 it is 1/sqrt 6.
    CHECK(nearest_on_scale(1.45) == 2);
    CHECK(nearest_on_scale(1.40) == 1);
    CHECK(nearest_on_scale(.4625) == .5);
    CHECK(nearest_on_scale(.409) == .5);
    CHECK(nearest_on_scale(.407) == 1. / 3);
}

} // namespace steelyard
