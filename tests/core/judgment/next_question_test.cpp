#include "core/judgment/next_question.hpp"

#include <Eigen/Core>
#include <Eigen/SVD>
#include <algorithm>
#include <catch_amalgamated.hpp>
#include <cmath>
#include <optional>
#include <vector>

#include "core/judgment/weights.hpp"
#include "tests/support/close.hpp"
#include "tests/support/dice.hpp"
#include "tests/support/pairs.hpp"

using namespace steelyard;
using namespace steelyard::testing;

namespace {

using Eigen::Index;
using Eigen::MatrixXd;
using Eigen::VectorXd;
using Pair = PairMatrix::Pair;

/// The pseudo-inverse of the graph's Laplacian by singular values.
MatrixXd slow_inverse(const PairMatrix& pairs) {
    const auto n = static_cast<Index>(pairs.size());
    MatrixXd laplacian = MatrixXd::Zero(n, n);
    for (const auto& [i, j] : pairs.judged_pairs()) {
        VectorXd e = VectorXd::Zero(n);
        e(static_cast<Index>(i)) = 1;
        e(static_cast<Index>(j)) = -1;
        laplacian += e * e.transpose();
    }
    const Eigen::JacobiSVD<MatrixXd> svd(laplacian, Eigen::ComputeFullU | Eigen::ComputeFullV);
    VectorXd inverted = svd.singularValues();
    for (Index k = 0; k < n; ++k) inverted(k) = inverted(k) > 1e-9 ? 1 / inverted(k) : 0;
    return svd.matrixV() * inverted.asDiagonal() * svd.matrixU().transpose();
}

/// The summed variance of the weights w where every answer has variance 1 in its logarithm.
double summed_variance(const PairMatrix& pairs, const Weights& w) {
    const auto n = static_cast<Index>(w.size());
    const VectorXd v = Eigen::Map<const VectorXd>(w.data(), n);
    const MatrixXd slope = MatrixXd(v.asDiagonal()) - v * v.transpose();
    return (slope * slow_inverse(pairs) * slope.transpose()).trace();
}

/// What the summed variance loses by an answer to the pair, by inverting anew.
double slow_gain(const PairMatrix& pairs, const Pair& pair) {
    const Weights w = *geometric_mean_weights(pairs);
    PairMatrix more = pairs;
    more.set(pair[0], pair[1], 1);
    return summed_variance(pairs, w) - summed_variance(more, w);
}

std::size_t degree(const PairMatrix& pairs, std::size_t i) {
    std::size_t count = 0;
    for (std::size_t j = 0; j < pairs.size(); ++j) count += i != j && pairs.judged(i, j);
    return count;
}

/// Asks until nothing is left; every answer fits `weights`.
std::vector<Pair> asked(PairMatrix pairs, std::optional<std::size_t> star, const std::vector<double>& weights,
                        const std::vector<Pair>& skipped = {}) {
    std::vector<Pair> order;
    while (const auto pair = next_question(pairs, star, skipped)) {
        order.push_back(*pair);
        pairs.set((*pair)[0], (*pair)[1], weights[(*pair)[0]] / weights[(*pair)[1]]);
    }
    return order;
}

} // namespace

TEST_CASE("next question: each item against the one named, in item order, before any other pair") {
    const std::vector<double> weights{3, 1, 2, 5, 4};
    const auto order = asked(PairMatrix(5), 2, weights);
    REQUIRE(order.size() == 10);
    CHECK(std::vector<Pair>(order.begin(), order.begin() + 4) ==
          std::vector<Pair>{{0, 2}, {1, 2}, {2, 3}, {2, 4}});
    // Also where other answers link the items already.
    PairMatrix chain(5);
    for (std::size_t i = 0; i + 1 < 5; ++i) chain.set(i, i + 1, 2);
    CHECK(next_question(chain, 0, {}) == Pair{0, 2});
}

TEST_CASE("next question: without a star one grows from the first item") {
    const std::vector<double> weights{3, 1, 2, 5};
    const auto order = asked(PairMatrix(4), std::nullopt, weights);
    REQUIRE(order.size() == 6);
    CHECK(std::vector<Pair>(order.begin(), order.begin() + 3) == std::vector<Pair>{{0, 1}, {0, 2}, {0, 3}});
}

TEST_CASE("next question: the largest groups are linked first, from the item with the most answers") {
    PairMatrix pairs(7); // Groups {0, 1, 2} around 1, {3, 4} and 5, 6 alone.
    pairs.set(0, 1, 2);
    pairs.set(1, 2, 2);
    pairs.set(3, 4, 2);
    CHECK(next_question(pairs, std::nullopt, {}) == Pair{1, 3});
    CHECK(next_question(pairs, std::nullopt, {{3, 1}}) == Pair{1, 4});
    pairs.set(1, 3, 1);
    CHECK(next_question(pairs, std::nullopt, {}) == Pair{1, 5});
    // A star whose pairs are skipped leaves the linking to others.
    CHECK(next_question(pairs, 5, {{0, 5}, {1, 5}, {2, 5}, {3, 5}, {4, 5}, {5, 6}}) == Pair{1, 6});
}

TEST_CASE("next question: nothing is asked twice, skipped pairs never") {
    const std::vector<double> weights{3, 1, 2, 5, 4, 2};
    const std::vector<Pair> skipped{{4, 0}, {1, 3}, {2, 5}};
    for (const std::optional<std::size_t> star : {std::optional<std::size_t>{}, {std::size_t{3}}}) {
        auto order = asked(PairMatrix(6), star, weights, skipped);
        CHECK(order.size() == 12);
        std::sort(order.begin(), order.end());
        CHECK(std::unique(order.begin(), order.end()) == order.end());
        for (const auto& [i, j] : skipped)
            CHECK(std::find(order.begin(), order.end(), Pair{std::min(i, j), std::max(i, j)}) == order.end());
    }
}

TEST_CASE("next question: sets of no, one, two and three items") {
    CHECK_FALSE(next_question(PairMatrix(0), std::nullopt, {}));
    CHECK_FALSE(next_question(PairMatrix(1), std::nullopt, {}));
    CHECK(next_question(PairMatrix(2), std::nullopt, {}) == Pair{0, 1});
    CHECK(next_question(PairMatrix(2), 1, {}) == Pair{0, 1});
    CHECK_FALSE(next_question(PairMatrix(2), std::nullopt, {{1, 0}}));
    CHECK_FALSE(next_question(upper_triangle(2, {3}), std::nullopt, {}));
    CHECK(asked(PairMatrix(3), 1, {1, 2, 3}) == std::vector<Pair>{{0, 1}, {1, 2}, {0, 2}});
    CHECK(asked(PairMatrix(3), std::nullopt, {1, 2, 3}) == std::vector<Pair>{{0, 1}, {0, 2}, {1, 2}});
}

TEST_CASE("next question: it lowers the summed variance as no other, by inverting anew for each pair") {
    const std::size_t sets = cases(200);
    int single = 0;
    for (std::size_t seed = 0; seed < sets; ++seed) {
        Dice dice(seed);
        const auto n = static_cast<std::size_t>(dice.between(4, 9));
        const PairMatrix pairs = random_near_pairs(n, .6, dice.between(20, 90), seed);
        std::vector<Pair> skipped;
        for (const auto& pair : pairs.missing()) {
            if (dice.chance(15)) skipped.push_back(pair);
        }
        CAPTURE(seed, n, skipped.size());
        const auto next = next_question(pairs, std::nullopt, skipped);
        std::vector<Pair> left;
        for (const auto& pair : pairs.missing()) {
            if (std::find(skipped.begin(), skipped.end(), pair) == skipped.end()) left.push_back(pair);
        }
        REQUIRE(next.has_value() == !left.empty());
        if (left.empty()) continue;
        REQUIRE(std::find(left.begin(), left.end(), *next) != left.end());
        const double gain = slow_gain(pairs, *next);
        for (const auto& other : left) {
            const double others = slow_gain(pairs, other);
            CHECK(others <= gain * (1 + 2e-9));
            single += others < gain * (1 - 1e-6);
        }
    }
    CHECK(single > static_cast<int>(sets));
}

TEST_CASE("next question: of equal gains fewer answers decide, then item order") {
    // A ring of six equal items: across lie three pairs of equal gain and degree.
    PairMatrix ring(6);
    for (std::size_t i = 0; i < 6; ++i) ring.set(i, (i + 1) % 6, 1);
    CHECK_THAT(slow_gain(ring, {0, 3}), Catch::Matchers::WithinRel(slow_gain(ring, {2, 5}), 1e-12));
    CHECK(next_question(ring, std::nullopt, {}) == Pair{0, 3});
    CHECK(next_question(ring, std::nullopt, {{0, 3}}) == Pair{1, 4});

    // Two blocks that hang together by nothing, all links between them skipped: a path of four and a ring
    // with one chord. Resistances count within a group alone, so 0-3 of the path is first (its gain is the
    // largest).
    PairMatrix apart(8);
    for (std::size_t i = 0; i < 3; ++i) apart.set(i, i + 1, 1);
    for (std::size_t i = 4; i < 7; ++i) apart.set(i, i + 1, 1);
    apart.set(4, 7, 1);
    std::vector<Pair> links;
    for (std::size_t i = 0; i < 4; ++i) {
        for (std::size_t j = 4; j < 8; ++j) links.push_back({i, j});
    }
    CHECK(next_question(apart, std::nullopt, links) == Pair{0, 3});
    apart.set(0, 3, 1); // Now both are rings: all four diagonals gain the same.
    CHECK(next_question(apart, std::nullopt, links) == Pair{0, 2});
}

TEST_CASE("next question: equal gains with unequal degrees go to the pair with fewer answers") {
    // Items of one star with a chord more: searched, so that the test is about a true tie of gains.
    int ties = 0;
    for (int graph = 0; graph < 1024; ++graph) {
        PairMatrix pairs(5);
        int bit = 0;
        for (std::size_t i = 0; i < 5; ++i) {
            for (std::size_t j = i + 1; j < 5; ++j, ++bit) {
                if ((graph >> bit & 1) != 0) pairs.set(i, j, 1);
            }
        }
        if (!pairs.connected() || pairs.complete()) continue;
        const auto next = next_question(pairs, std::nullopt, {});
        REQUIRE(next);
        const double gain = slow_gain(pairs, *next);
        const std::size_t answers = degree(pairs, (*next)[0]) + degree(pairs, (*next)[1]);
        for (const auto& other : pairs.missing()) {
            const double others = slow_gain(pairs, other);
            if (std::abs(others - gain) > 1e-11 * gain) continue;
            const std::size_t other_answers = degree(pairs, other[0]) + degree(pairs, other[1]);
            CAPTURE(graph);
            CHECK(answers <= other_answers);
            if (answers == other_answers) CHECK(*next <= other);
            ties += other != *next;
        }
    }
    CHECK(ties > 100);
}

TEST_CASE("questions needed: to connect, and to firm up by 2(n-1) answers or all there are") {
    const auto needed = [](const PairMatrix& pairs) {
        const QuestionsNeeded q = questions_needed(pairs);
        return std::vector<std::size_t>{q.to_connect, q.to_firm_up};
    };
    CHECK(needed(PairMatrix(0)) == std::vector<std::size_t>{0, 0});
    CHECK(needed(PairMatrix(1)) == std::vector<std::size_t>{0, 0});
    CHECK(needed(PairMatrix(2)) == std::vector<std::size_t>{1, 1});
    CHECK(needed(PairMatrix(3)) == std::vector<std::size_t>{2, 3});
    CHECK(needed(PairMatrix(6)) == std::vector<std::size_t>{5, 10});
    CHECK(needed(house_pairs()) == std::vector<std::size_t>{0, 0});
    PairMatrix some(6);
    some.set(0, 1, 2);
    some.set(1, 2, 2);
    some.set(0, 2, 2);
    CHECK(needed(some) == std::vector<std::size_t>{3, 7});
    // A block of six judged throughout and four items apart: linking them takes more than the rule asks for.
    PairMatrix block(10);
    for (std::size_t i = 0; i < 6; ++i) {
        for (std::size_t j = i + 1; j < 6; ++j) block.set(i, j, 1);
    }
    CHECK(needed(block) == std::vector<std::size_t>{4, 4});
}

TEST_CASE("next question: a hundred items are a size like any other") {
    const PairMatrix pairs = random_near_pairs(100, .5, 90, 1);
    const auto next = next_question(pairs, std::nullopt, {});
    REQUIRE(next);
    CHECK_FALSE(pairs.judged((*next)[0], (*next)[1]));
    const double gain = slow_gain(pairs, *next);
    Dice dice(1);
    const auto left = pairs.missing();
    for (int k = 0; k < 3; ++k) CHECK(slow_gain(pairs, dice.pick(left)) <= gain);
}

TEST_CASE("next question: the order of questions leaves smaller errors than the other pairs at random") {
    // The same comparison as the simulation behind the rule, made anew: noise e^.4 on each answer, weights by
    // geometric mean, error = sum of |differences| to the full set's weights.
    const std::size_t sets = cases(150);
    double planned = 0;
    double random = 0;
    double star_alone = 0;
    for (std::size_t seed = 0; seed < sets; ++seed) {
        const std::size_t n = 6;
        const PairMatrix full = random_near_pairs(n, .7, 0, seed);
        const Weights truth = *geometric_mean_weights(full);
        const auto error = [&](const PairMatrix& pairs) {
            const Weights w = *geometric_mean_weights(pairs);
            double sum = 0;
            for (std::size_t i = 0; i < n; ++i) sum += std::abs(w[i] - truth[i]);
            return sum;
        };
        Dice dice(seed);
        PairMatrix by_rule(n);
        PairMatrix by_chance(n);
        for (int k = 0; k < 10; ++k) {
            const auto next = next_question(by_rule, 0, {});
            by_rule.set((*next)[0], (*next)[1], full.at((*next)[0], (*next)[1]));
            const auto left = by_chance.missing();
            const Pair other = k < 5 ? Pair{0, static_cast<std::size_t>(k + 1)} : dice.pick(left);
            by_chance.set(other[0], other[1], full.at(other[0], other[1]));
            if (k == 4) star_alone += error(by_rule);
        }
        planned += error(by_rule);
        random += error(by_chance);
    }
    CHECK(planned < .9 * random);
    CHECK(planned < .5 * star_alone); // What questions_needed calls firm.
}
