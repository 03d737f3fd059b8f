#include <catch_amalgamated.hpp>
#include <cmath>
#include <cstddef>
#include <cstdint>
#include <numeric>
#include <vector>

#include "core/judgment/weights.hpp"
#include "tests/support/close.hpp"
#include "tests/support/pairs.hpp"

namespace steelyard {

using Catch::Matchers::WithinAbs;
using testing::check_close;
using testing::upper_triangle;

namespace {

const std::vector<Method> all_methods{Method::eigenvector, Method::geometric_mean, Method::column_average};

} // namespace

TEST_CASE("weights: no items have none, one item has it all") {
    CHECK(geometric_mean_weights(PairMatrix(0)).value().empty());
    for (const Method method : all_methods) check_close(weights_by(method, PairMatrix(1)).value(), {1}, 0);
}

TEST_CASE("weights: of two items the ratio alone decides, by every method") {
    for (const double ratio : {.01, 1. / 7, 1., 5., 100.}) {
        for (const Method method : all_methods) {
            INFO("ratio " << ratio << ", method " << static_cast<int>(method));
            check_close(weights_by(method, upper_triangle(2, {ratio})).value(),
                        {ratio / (1 + ratio), 1 / (1 + ratio)}, 1e-15);
        }
    }
}

TEST_CASE("weights: none where the judgments do not connect the items") {
    for (const Method method : all_methods) {
        INFO("method " << static_cast<int>(method));
        CHECK_FALSE(weights_by(method, PairMatrix(2)).has_value());
        CHECK_FALSE(weights_by(method, upper_triangle(3, {2, 0, 0})).has_value());
        CHECK_FALSE(weights_by(method, upper_triangle(4, {2, 0, 0, 0, 0, 3})).has_value());
    }
}

TEST_CASE("weights: averaged columns need every pair, the others do not") {
    const PairMatrix pairs = upper_triangle(3, {2, 0, 3});
    CHECK_FALSE(column_average_weights(pairs).has_value());
    CHECK_FALSE(weights_by(Method::column_average, pairs).has_value());
    check_close(geometric_mean_weights(pairs).value(), {.6, .3, .1}, 1e-15);
    check_close(weights_by(Method::eigenvector, pairs).value(), {.6, .3, .1}, 1e-14);
}

TEST_CASE("weights: averaged columns, by hand") {
    // Columns of 1 2 4 | 1/2 1 2 | 1/4 1/2 1 with the last pair judged 4 instead: sums 1.75, 3.25, 9.
    const double first = (1 / 1.75 + 2 / 3.25 + 4 / 9.) / 3;
    const double second = (.5 / 1.75 + 1 / 3.25 + 4 / 9.) / 3;
    const double third = (.25 / 1.75 + .25 / 3.25 + 1 / 9.) / 3;
    check_close(column_average_weights(upper_triangle(3, {2, 4, 4})).value(), {first, second, third}, 1e-15);
}

TEST_CASE("weights: geometric means of a complete set are those of its rows") {
    // Crawford and Williams 1985: least squares in the logarithms gives the row geometric means.
    for (std::uint64_t seed = 1; seed <= testing::cases(30); ++seed) {
        const std::size_t n = 2 + seed % 14;
        const PairMatrix pairs = testing::random_scale_pairs(n, seed);
        std::vector<double> rows;
        for (std::size_t i = 0; i < n; ++i) {
            double product = 1;
            for (std::size_t j = 0; j < n; ++j) product *= pairs.at(i, j);
            rows.push_back(std::pow(product, 1 / static_cast<double>(n)));
        }
        INFO("seed " << seed << ", n = " << n);
        check_close(geometric_mean_weights(pairs).value(), testing::normalised(rows), 1e-13);
    }
}

TEST_CASE("weights: least squares leave residuals that cancel at every item") {
    // The normal equations: the errors ln a_ij - y_i + y_j of an item's judged pairs sum to 0.
    for (std::uint64_t seed = 1; seed <= testing::cases(30); ++seed) {
        const std::size_t n = 3 + seed % 10;
        const PairMatrix pairs = testing::random_near_pairs(n, 2, 60, seed);
        const Eigen::VectorXd y = log_least_squares(pairs);
        std::vector<double> sums(n, 0);
        for (const auto& [i, j] : pairs.judged_pairs()) {
            const double error =
                std::log(pairs.at(i, j)) - y(static_cast<Eigen::Index>(i)) + y(static_cast<Eigen::Index>(j));
            sums[i] += error;
            sums[j] -= error;
        }
        INFO("seed " << seed << ", n = " << n);
        check_close(sums, std::vector<double>(n, 0), 1e-12);
        CHECK_THAT(y.sum(), WithinAbs(0, 1e-12));
    }
}

TEST_CASE("weights: forty equal items") {
    const PairMatrix pairs = testing::consistent_pairs(std::vector<double>(40, 7));
    for (const Method method : all_methods)
        check_close(weights_by(method, pairs).value(), std::vector<double>(40, 1. / 40), 1e-16);
}

TEST_CASE("weights: positive and of sum 1, whatever is judged and missing") {
    for (std::uint64_t seed = 1; seed <= testing::cases(60); ++seed) {
        const std::size_t n = 2 + seed % 20;
        const PairMatrix pairs = testing::random_near_pairs(n, 3, seed % 3 == 0 ? 0 : 70, seed);
        for (const Method method : all_methods) {
            const auto weights = weights_by(method, pairs);
            INFO("seed " << seed << ", n = " << n << ", method " << static_cast<int>(method));
            REQUIRE(weights.has_value() == (method != Method::column_average || pairs.complete()));
            if (!weights) continue;
            CHECK_THAT(std::accumulate(weights->begin(), weights->end(), 0.0), WithinAbs(1, 1e-14));
            for (const double w : *weights) {
                CHECK(std::isfinite(w));
                CHECK(w > 0);
            }
        }
    }
}

TEST_CASE("weights: the order of the items does not matter") {
    const std::vector<std::size_t> order{5, 1, 3, 0, 4, 2};
    const PairMatrix whole = testing::random_scale_pairs(6, 77);
    const PairMatrix some = testing::random_near_pairs(6, 1, 50, 78);
    for (const PairMatrix& pairs : {whole, some}) {
        for (const Method method : all_methods) {
            const auto plain = weights_by(method, pairs);
            const auto moved = weights_by(method, testing::permuted(pairs, order));
            REQUIRE(plain.has_value() == moved.has_value());
            for (std::size_t i = 0; plain && i < order.size(); ++i)
                CHECK_THAT((*moved)[order[i]], WithinAbs((*plain)[i], 1e-13));
        }
    }
}

TEST_CASE("weights: raising one judgment raises the weight of the item it favours") {
    for (const Method method : all_methods) {
        double before = 0;
        for (const double ratio : {1. / 9, 1. / 3, 1., 2., 5., 9.}) {
            PairMatrix pairs = testing::random_scale_pairs(5, 5);
            pairs.set(1, 3, ratio);
            const Weights w = weights_by(method, pairs).value();
            CHECK(w[1] / w[3] > before);
            before = w[1] / w[3];
        }
    }
}

TEST_CASE("combined weights: the geometric mean by share, normalised") {
    const Weights combined = combine_weights({{.5, .3, .2}, {.1, .6, .3}}, {2, 1}, false);
    const std::vector<double> by_hand{std::cbrt(.5 * .5 * .1), std::cbrt(.3 * .3 * .6),
                                      std::cbrt(.2 * .2 * .3)};
    check_close(combined, testing::normalised(by_hand), 1e-15);
}

TEST_CASE("combined weights: the arithmetic mean by share") {
    check_close(combine_weights({{.5, .3, .2}, {.1, .6, .3}}, {2, 1}, true), {1.1 / 3, 1.2 / 3, .7 / 3},
                1e-15);
    // An arithmetic mean may hold weights of 0.
    check_close(combine_weights({{1, 0}, {.5, .5}}, {1, 1}, true), {.75, .25}, 1e-15);
}

TEST_CASE("combined weights: only the proportion of shares counts, and one judge is himself") {
    const std::vector<Weights> judges{{.5, .3, .2}, {.1, .6, .3}};
    for (const bool arithmetic : {false, true}) {
        check_close(combine_weights(judges, {2e6, 1e6}, arithmetic),
                    combine_weights(judges, {.002, .001}, arithmetic), 1e-15);
        check_close(combine_weights({judges[0]}, {.1}, arithmetic), judges[0], 1e-15);
    }
}

} // namespace steelyard
