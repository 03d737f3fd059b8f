#include <catch_amalgamated.hpp>
#include <string>
#include <vector>

#include "tests/support/close.hpp"
#include "tests/support/find_results.hpp"
#include "tests/support/judged_decisions.hpp"

// Weights by points.
namespace steelyard {

using Catch::Matchers::WithinAbs;
using testing::check_close;
using testing::criteria;
using testing::leaf_of;
using testing::open_words;
using testing::set_of;
using Words = std::vector<std::string>;

namespace {

constexpr double rounding = 1e-14;

} // namespace

TEST_CASE("points: normalised, averaged by share; an agreed entry stands alone") {
    const std::string p1 = R"({"set": "goal", "by": "p1", "points": {"c": 10, "a": 20, "b": 10}})";
    const std::string p2 = R"({"set": "goal", "by": "p2", "points": {"a": 0, "b": 1, "c": 1}})";
    const std::string p3 = R"({"set": "goal", "by": "p3", "points": {"a": 1, "b": 0, "c": 0}})";
    const Results own = criteria(R"("points": [)" + p1 + ", " + p2 + ", " + p3 + "]", "", "points");
    REQUIRE(own.sets.size() == 4);
    check_close(own.sets[0].weights.value(), {.125, .4375, .4375}, rounding);
    check_close(set_of(own, "goal", "p1").weights.value(), {.5, .25, .25}, rounding);
    check_close(set_of(own, "goal", "p3").weights.value(), {1, 0, 0}, 0);
    CHECK(own.sets[0].from_points);
    CHECK(own.open.empty());
    CHECK_FALSE(own.provisional);

    const Results agreed = criteria(
        R"("points": [{"set": "goal", "points": {"a": 1, "b": 2, "c": 1}}, )" + p1 + "]", "", "points");
    for (const auto& entry : agreed.sets) check_close(entry.weights.value(), {.25, .5, .25}, rounding);
    CHECK(agreed.sets.size() == 2);
}

TEST_CASE("points: the last entry of a person stands") {
    const Results results = criteria(R"("points": [
        {"set": "goal", "by": "p1", "points": {"a": 1, "b": 0, "c": 0}},
        {"set": "goal", "by": "p1", "points": {"a": 0, "b": 0, "c": 1}}])",
                                     "", "points");
    check_close(set_of(results, "goal").weights.value(), {0, 0, 1}, 0);
}

TEST_CASE("points: with nobody whose share counts the criteria count equally, and the set is open") {
    for (const std::string& points :
         {std::string{}, std::string{R"({"set": "goal", "by": "p3", "points": {"a": 1, "b": 0, "c": 0}})"}}) {
        const Results results = criteria(R"("points": [)" + points + "]", "", "points");
        CHECK_FALSE(set_of(results, "goal").weights.has_value());
        CHECK_THAT(leaf_of(results, "a").weight, WithinAbs(1. / 3, rounding));
        CHECK(results.provisional);
        CHECK(open_words(results) == Words{"points goal"});
    }
}

TEST_CASE("points: such entries have no indices") {
    const Results results =
        criteria(R"("points": [{"set": "goal", "points": {"a": 1, "b": 2, "c": 1}}])", "", "points");
    const SetResult& set = set_of(results, "goal");
    CHECK(set.missing.empty());
    CHECK(set.misfits.empty());
    CHECK_FALSE(set.eigenvector.has_value());
    CHECK_FALSE(set.lambda_max.has_value());
    CHECK_FALSE(set.cr.has_value());
    CHECK_FALSE(set.koczkodaj.has_value());
}

} // namespace steelyard
