#include <algorithm>
#include <catch_amalgamated.hpp>
#include <cmath>
#include <cstdlib>
#include <map>
#include <string>
#include <vector>

#include "core/decision/check.hpp"
#include "core/results/corrections.hpp"
#include "core/results/solve.hpp"
#include "tests/support/decision_traits.hpp"
#include "tests/support/differences.hpp"
#include "tests/support/large_decision.hpp"
#include "tests/support/random_decision.hpp"
#include "tests/support/slow_solver.hpp"

using namespace steelyard;
using namespace steelyard::testing;

namespace {

constexpr int usual_cases = 2000;

/// How many random decisions: 2000, or fewer where STEELYARD_CASES says so (tests/run sets it to 300 under
/// the sanitizers, which are an order of magnitude slower).
int cases() {
    const char* said = std::getenv("STEELYARD_CASES");
    const int count = said != nullptr ? std::atoi(said) : usual_cases;
    return count > 0 ? count : usual_cases;
}

/// Below this count the rarest kinds of thing need not turn up at all.
constexpr int fewest_for_counting = 300;

/// Kinds of thing that must turn up among 2000 random decisions, and in how many of them at least.
const std::map<std::string, int>& wanted() {
    static const std::map<std::string, int> least{
        // the frame
        {"one option", 40},
        {"nine options", 40},
        {"withdrawn option", 200},
        {"tree of 1", 100},
        {"tree of 2", 200},
        {"tree of 3", 200},
        {"tree of 4", 100},
        {"one child", 100},
        {"six children", 100},
        {"no people", 200},
        {"five people", 100},
        {"share of 0", 100},
        {"unequal shares", 400},
        {"abstention", 200},
        {"interest", 100},
        {"method eigenvector", 300},
        {"method geometric-mean", 300},
        {"method column-average", 300},
        {"synthesis ideal", 300},
        {"synthesis distributive", 300},
        {"combine judgments", 300},
        {"combine priorities", 300},
        {"combine priorities-arithmetic", 300},
        {"table alonso-lamata-2006", 300},
        {"table saaty-1980", 300},
        {"money", 100},
        // what people said
        {"weights pairs", 300},
        {"weights points", 300},
        {"agreed judgment", 300},
        {"personal judgment", 300},
        {"judged again", 200},
        {"judged again, turned", 200},
        {"ratio outside 1/9 to 9", 100},
        {"skipped pairs", 200},
        {"pairs skipped on purpose", 100},
        {"agreed points", 100},
        {"personal points", 100},
        {"points by nobody", 20},
        {"agreed grade", 200},
        {"personal grade", 200},
        {"grade taken back", 50},
        // sets
        {"group complete", 300},
        {"group incomplete", 200},
        {"group not connected", 100},
        {"judge complete", 300},
        {"judge incomplete", 200},
        {"judge not connected", 100},
        {"nine items complete", 8},
        {"spanning tree", 100},
        {"columns of an incomplete set", 50},
        {"priorities without one judge", 50},
        {"priorities of nobody", 10},
        {"whole set for the options in play", 40},
        {"whole set without columns", 10},
        {"cycle", 100},
        {"tied cycle", 100},
        {"zeta below 1", 50},
        // several judges
        {"several judges", 300},
        {"judges without a common pair", 50},
        {"spread over three", 200},
        {"sides taken", 200},
        {"equal for somebody", 200},
        {"another ranking without a judge", 200},
        {"another field without a judge", 10},
        {"first place moves without a judge", 100},
        {"judge by grades alone", 20},
        {"person who is no judge", 100},
        // figures, cost sheets, grades
        {"rate pairs", 300},
        {"rate figure", 300},
        {"rate grade", 300},
        {"worths given", 300},
        {"worths pairs", 200},
        {"no grades", 20},
        {"curve proportional", 200},
        {"curve line", 200},
        {"curve points", 200},
        {"curve target", 200},
        {"no curve", 50},
        {"figure with a range", 200},
        {"figure with one end", 200},
        {"superseded figure", 200},
        {"cleared figure", 100},
        {"figure of 0 or less, proportional", 40},
        {"figure beside a cost sheet", 20},
        {"sheet total", 100},
        {"sheet per_year", 100},
        {"sheet per_part", 100},
        {"sheet without volume", 50},
        {"no discount", 50},
        {"cost once", 200},
        {"cost per_year", 200},
        {"cost per_part", 100},
        {"cost in_year", 200},
        {"cost in year 0", 50},
        {"cost after the end", 50},
        {"cost in another currency", 100},
        {"cost per part without volume", 20},
        {"cost without a sheet", 20},
        {"superseded cost", 100},
        {"cleared cost", 100},
        // musts
        {"must on a figure", 200},
        {"must on a node", 200},
        {"must yes or no", 200},
        {"must with both limits", 100},
        {"must with two lower limits", 10},
        {"must without a limit", 30},
        {"figure must met", 100},
        {"figure must failed", 100},
        {"figure must undecided", 30},
        {"figure must unchecked", 50},
        {"figure must waived", 30},
        {"node must met", 100},
        {"node must failed", 50},
        {"node must undecided", 50},
        {"node must unchecked", 50},
        {"node must waived", 20},
        {"check must met", 100},
        {"check must failed", 100},
        {"check must undecided", 50},
        {"check must unchecked", 100},
        {"check must asked", 50},
        {"check must waived", 50},
        {"check with value and state", 30},
        {"check of a range alone", 50},
        {"check of a low end alone", 50},
        {"check of a must on a figure", 30},
        // the standing
        {"nothing in play", 20},
        {"one option in play", 50},
        {"some values missing", 200},
        {"all values missing", 100},
        {"all worth 0, ideal", 50},
        {"all worth 0, distributive", 30},
        {"all scores 0", 3},
        {"weight of 0", 50},
        {"shared rank", 100},
        {"provisional", 400},
        {"not provisional", 400},
        {"ranges", 200},
        {"open judgment", 200},
        {"open points", 20},
        {"open figure", 200},
        {"open curve", 50},
        {"open grade", 100},
        {"open worth", 50},
        {"open requirement", 200},
    };
    return least;
}

/// A judged set of items "1", "2", ...: the upper triangle row by row, 0 where a pair was not judged.
SlowPairs judged(int items, const std::vector<double>& triangle) {
    SlowPairs pairs;
    for (int i = 1; i <= items; ++i) pairs.items.push_back(std::to_string(i));
    auto ratio = triangle.begin();
    for (int i = 1; i <= items; ++i)
        for (int j = i + 1; j <= items; ++j, ++ratio)
            if (*ratio > 0) pairs.judge(std::to_string(i), std::to_string(j), *ratio);
    return pairs;
}

void check_weights(const SlowWeights& weights, const std::vector<double>& expected, double tolerance) {
    REQUIRE(weights.size() == expected.size());
    for (std::size_t i = 0; i < expected.size(); ++i) {
        CAPTURE(i);
        CHECK(std::abs(weights.at(std::to_string(i + 1)) - expected[i]) <= tolerance);
    }
}

/// Half a unit of the last of three printed digits.
constexpr double three_digits = 0.0005;

} // namespace

// A second solver that is wrong in the same way as the first would agree with it: it meets published values
// by itself.

// T. L. Saaty, "Decision making with the analytic hierarchy process", Int. J. Services Sciences 1(1), 2008,
// 83-98: the example of seven drinks, judgments and printed weights from memory of the paper.
TEST_CASE("slow solver: weights of the seven drinks") {
    const SlowPairs drinks =
        judged(7, {9,      5,      2,      1,      1,   0.5, 1 / 3., 1 / 9., 1 / 9., 1 / 9., 1 / 9.,
                   1 / 3., 1 / 4., 1 / 3., 1 / 9., 0.5, 1,   1 / 3., 2,      0.5,    1 / 3.});
    check_weights(slow_eigen(drinks).weights, {.177, .019, .042, .116, .190, .129, .327}, three_digits);
    const SlowIndices indices = slow_indices(drinks, RandomIndexTable::alonso_lamata_2006);
    CHECK(std::abs(*indices.cr - 0.022) <= three_digits);
}

// T. L. Saaty, "How to make a decision: the analytic hierarchy process", European Journal of Operational
// Research 48, 1990, 9-26: eight criteria for a house, judgments and printed digits from memory of the paper.
TEST_CASE("slow solver: weights of the eight criteria for a house") {
    const SlowPairs house = judged(
        8, {5, 3, 7, 6,      6,      1 / 3., 1 / 4., 1 / 3., 5,      3,      3,      1 / 5., 1 / 7., 6,
            3, 4, 6, 1 / 5., 1 / 3., 1 / 4., 1 / 7., 1 / 8., 1 / 2., 1 / 5., 1 / 6., 1 / 5., 1 / 6., 0.5});
    check_weights(slow_eigen(house).weights, {.173, .054, .188, .018, .031, .036, .167, .333}, three_digits);
    const SlowIndices indices = slow_indices(house, RandomIndexTable::saaty_1980);
    CHECK(std::abs(*indices.lambda_max - 9.669) <= three_digits);
    CHECK(std::abs(*indices.cr - 0.17) <= 0.005);
    CHECK(indices.cycles.size() == 1);
}

// P. T. Harker, "Incomplete pairwise comparisons in the analytic hierarchy process", Mathematical Modelling
// 9, 1987: the example with a12 = 2, a23 = 2 and a13 not judged, from memory. A chain is consistent, so the
// weights are exact.
TEST_CASE("slow solver: weights of three items with one pair not judged") {
    const SlowPairs chain = judged(3, {2, 0, 2});
    check_weights(slow_eigen(chain).weights, {4 / 7., 2 / 7., 1 / 7.}, 1e-12);
    check_weights(slow_geometric_mean(chain), {4 / 7., 2 / 7., 1 / 7.}, 1e-12);
    CHECK(std::abs(slow_eigen(chain).lambda - 3) <= 1e-12);
}

TEST_CASE("solve: agrees with a second, slow solver on random decisions of every kind") {
    const int count = cases();
    std::map<std::string, int> seen;
    int failed = 0;
    for (int seed = 1; seed <= count && failed < 10; ++seed) {
        const Decision decision = random_decision(static_cast<std::uint64_t>(seed));
        const SlowResults slow = slow_solve(decision);
        Results results = solve(decision);
        std::vector<std::string> found = differences(decision, results, slow);
        if (found.empty()) {
            add_corrections(decision, results);
            found = correction_differences(decision, results, slow);
        }
        found.resize(std::min(found.size(), std::size_t{8})); // the first ones tell enough
        CAPTURE(seed);
        CHECK(found == std::vector<std::string>());
        failed += found.empty() ? 0 : 1;
        for (const std::string& trait : traits(decision, slow)) ++seen[trait];
    }
    if (failed > 0 || count < fewest_for_counting) return;
    for (const auto& [trait, least] : wanted()) {
        CAPTURE(trait, count);
        CHECK(seen[trait] >= std::max(1, least * count / usual_cases / 2));
        if (count >= usual_cases) CHECK(seen[trait] >= least);
    }
}

TEST_CASE("random_decision and large_decision: every decision is valid") {
    for (int seed = 1; seed <= cases(); ++seed) {
        CAPTURE(seed);
        const auto problems = check(random_decision(static_cast<std::uint64_t>(seed))).problems;
        CHECK(problems.empty());
    }
    CHECK(check(large_decision()).problems.empty());
}

TEST_CASE("random_decision: keeps within the size asked for") {
    DecisionSize size;
    size.options = 2;
    size.depth = 2;
    size.children = 3;
    size.leaves = 3;
    size.people = 1;
    size.requirements = 1;
    for (int seed = 1; seed <= 200; ++seed) {
        CAPTURE(seed);
        const Decision decision = random_decision(static_cast<std::uint64_t>(seed), size);
        CHECK(decision.options.size() <= 2);
        CHECK(decision.people.size() <= 1);
        CHECK(decision.requirements.size() <= 1);
        CHECK(decision.criteria.children.size() <= 3);
        for (const Node& child : decision.criteria.children) CHECK(child.is_leaf());
    }
}
