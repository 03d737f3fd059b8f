#include <catch_amalgamated.hpp>
#include <string>
#include <vector>

#include "core/results/solve.hpp"
#include "tests/support/close.hpp"
#include "tests/support/find_results.hpp"
#include "tests/support/round_trip.hpp"

// Whole decisions, small enough to follow on paper. Sets and judges are in solve_sets_test.cpp, musts in
// solve_musts_test.cpp.
namespace steelyard {

using Catch::Matchers::WithinAbs;
using testing::check_close;
using testing::leaf_of;
using testing::local_of;
using testing::missing_on;
using testing::noticed_at;
using testing::open_words;
using testing::rank_of;
using testing::score_of;
using testing::set_of;
using Words = std::vector<std::string>;

namespace {

constexpr double rounding = 1e-14;

Results solved(const std::string& options, const std::string& criteria, const std::string& more) {
    return solve(test::read(R"({"format": "steelyard-decision", "version": 1, "options": [)" + options +
                            R"(], "criteria": )" + criteria + (more.empty() ? "" : ", " + more) + "}"));
}

const std::string two = R"({"id": "o1"}, {"id": "o2"})";
const std::string three = R"({"id": "o1"}, {"id": "o2"}, {"id": "o3"})";

const std::string distributive = R"("settings": {"synthesis": "distributive"})";

/// Two leaves with figures that are worths already (a line from 0 to 1), weights by points.
const std::string two_lines = R"({"id": "goal", "weights": "points", "children": [
    {"id": "a", "rate": "figure", "curve": {"kind": "line", "worst": 0, "best": 1}},
    {"id": "b", "rate": "figure", "curve": {"kind": "line", "worst": 0, "best": 1}}]})";

std::string points(double a, double b) {
    return R"("points": [{"set": "goal", "points": {"a": )" + std::to_string(a) + R"(, "b": )" +
           std::to_string(b) + "}}]";
}

std::string figure(const std::string& leaf, const std::string& option, const std::string& value) {
    return R"({"criterion": ")" + leaf + R"(", "option": ")" + option + R"(", "value": )" + value + "}";
}

std::string figures(const std::vector<std::string>& entries) {
    std::string text;
    for (const auto& entry : entries) text += (text.empty() ? "" : ", ") + entry;
    return R"("figures": [)" + text + "]";
}

} // namespace

TEST_CASE("solving: no options") {
    const Results results = solved("", two_lines, points(1, 1));
    CHECK(results.options.empty());
    CHECK(results.scores.empty());
    CHECK(results.ranks.empty());
    CHECK_FALSE(results.shares.has_value());
    CHECK_FALSE(results.first.has_value());
    CHECK_FALSE(results.lead_points.has_value());
    CHECK(leaf_of(results, "a").weight == .5);
}

TEST_CASE("solving: one option, one leaf of pairs") {
    const Results results = solved(R"({"id": "o1"})", R"({"id": "goal"})", "");
    CHECK(results.sets.empty());
    CHECK(score_of(results, "o1") == 1);
    CHECK(rank_of(results, "o1") == 1);
    CHECK(results.first == 0);
    CHECK_FALSE(results.provisional);
    CHECK_FALSE(results.lead_points.has_value());
    CHECK(results.open.empty());
    CHECK(solved(R"({"id": "o1"})", R"({"id": "goal"})", distributive).scores == std::vector<double>{1});
}

TEST_CASE("solving: scores are sums of leaf weight times local value") {
    const Results results = solved(two, two_lines,
                                   points(3, 1) + ", " +
                                       figures({figure("a", "o1", "0.8"), figure("b", "o1", "0.4"),
                                                figure("a", "o2", "0.2"), figure("b", "o2", "1")}));
    CHECK_THAT(score_of(results, "o1"), WithinAbs(.75 * .8 + .25 * .4, rounding));
    CHECK_THAT(score_of(results, "o2"), WithinAbs(.75 * .2 + .25, rounding));
    CHECK_THAT(results.lead_points.value(), WithinAbs(30, 100 * rounding));
    check_close(results.shares.value(), {.7 / 1.1, .4 / 1.1}, rounding);
    CHECK_FALSE(results.provisional);
    CHECK(results.open.empty());
    CHECK(results.ranges.empty());
}

TEST_CASE("solving: what each node adds to a score sums up the tree") {
    const Results results =
        solved(two, R"({"id": "goal", "weights": "points", "children": [
        {"id": "in", "weights": "points", "children": [
            {"id": "x", "rate": "figure", "curve": {"kind": "line", "worst": 0, "best": 1}},
            {"id": "y", "rate": "figure", "curve": {"kind": "line", "worst": 0, "best": 1}}]},
        {"id": "z", "rate": "figure", "curve": {"kind": "line", "worst": 0, "best": 1}}]})",
               R"("points": [{"set": "goal", "points": {"in": 60, "z": 40}},
                                                 {"set": "in", "points": {"x": 1, "y": 4}}], )" +
                   figures({figure("x", "o1", "1"), figure("y", "o1", "0.5"), figure("z", "o1", "0.25"),
                            figure("x", "o2", "0"), figure("y", "o2", "1"), figure("z", "o2", "1")}));
    REQUIRE(results.nodes.size() == 5);
    CHECK(results.nodes[0].node == "goal");
    CHECK(results.nodes[1].node == "in");
    CHECK(results.nodes[1].parent == "goal");
    CHECK_THAT(results.nodes[1].weight, WithinAbs(.6, rounding));
    CHECK(results.nodes[3].local_weight == .8);
    check_close(results.nodes[1].contribution, {.12 + .24, .48}, rounding);
    check_close(results.nodes[0].contribution, results.scores, rounding);
    double weights = 0;
    for (const auto& leaf : results.leaves) weights += leaf.weight;
    CHECK_THAT(weights, WithinAbs(1, rounding));
}

TEST_CASE("solving: a criterion with one child gives it everything and asks nothing") {
    const Results results = solved(two, R"({"id": "goal", "children": [{"id": "only", "children": [
        {"id": "leaf", "rate": "figure", "curve": {"kind": "line", "worst": 0, "best": 1}}]}]})",
                                   figures({figure("leaf", "o1", "0.3"), figure("leaf", "o2", "0.6")}));
    CHECK(leaf_of(results, "leaf").weight == 1);
    CHECK(results.sets.empty());
    CHECK(results.open.empty());
    CHECK_FALSE(results.provisional);
}

TEST_CASE(
    "solving: criteria whose judgments do not connect them count equally, and the answer is provisional") {
    const Results results =
        solved(two, R"({"id": "goal", "children": [
        {"id": "a", "rate": "figure", "curve": {"kind": "line", "worst": 0, "best": 1}},
        {"id": "b", "rate": "figure", "curve": {"kind": "line", "worst": 0, "best": 1}},
        {"id": "c", "rate": "figure", "curve": {"kind": "line", "worst": 0, "best": 1}}]})",
               R"("judgments": [{"set": "goal", "a": "a", "b": "b", "ratio": 5}], )" +
                   figures({figure("a", "o1", "0.9"), figure("b", "o1", "0.3"), figure("c", "o1", "0.6"),
                            figure("a", "o2", "0"), figure("b", "o2", "1"), figure("c", "o2", "1")}));
    for (const char* leaf : {"a", "b", "c"})
        CHECK_THAT(leaf_of(results, leaf).weight, WithinAbs(1. / 3, rounding));
    CHECK_THAT(score_of(results, "o1"), WithinAbs(.6, rounding));
    CHECK(results.provisional);
    CHECK_FALSE(set_of(results, "goal").weights.has_value());
    CHECK(set_of(results, "goal").parts == Parts{{"a", "b"}, {"c"}});
    CHECK(noticed_at(results, "not-connected") == Words{"/criteria"});
    CHECK(open_words(results) == Words{"judgment goal a c", "judgment goal b c"});
}

TEST_CASE("solving: a missing judgment in a set that connects is open, not provisional") {
    const Results results =
        solved(two, R"({"id": "goal", "children": [
        {"id": "a", "rate": "figure", "curve": {"kind": "line", "worst": 0, "best": 1}},
        {"id": "b", "rate": "figure", "curve": {"kind": "line", "worst": 0, "best": 1}},
        {"id": "c", "rate": "figure", "curve": {"kind": "line", "worst": 0, "best": 1}}]})",
               R"("judgments": [{"set": "goal", "a": "a", "b": "b", "ratio": 2},
                                                    {"set": "goal", "a": "b", "b": "c", "ratio": 2}], )" +
                   figures({figure("a", "o1", "1"), figure("b", "o1", "1"), figure("c", "o1", "1"),
                            figure("a", "o2", "0"), figure("b", "o2", "0"), figure("c", "o2", "0")}));
    CHECK_FALSE(results.provisional);
    CHECK(open_words(results) == Words{"judgment goal a c"});
    CHECK_THAT(leaf_of(results, "a").weight, WithinAbs(4. / 7, rounding));
}

TEST_CASE("solving: an option without a figure takes the mean of the others, with its range") {
    const Results results =
        solved(three, two_lines,
               points(3, 1) + ", " +
                   figures({figure("a", "o1", "0.8"), figure("a", "o2", "0.2"), figure("b", "o1", "0.4"),
                            figure("b", "o2", "0.6"), figure("b", "o3", "1")}));
    CHECK_THAT(local_of(results, "a", "o3"), WithinAbs(.5, rounding));
    CHECK(missing_on(results, "a", "o3"));
    CHECK_FALSE(missing_on(results, "a", "o1"));
    CHECK_THAT(score_of(results, "o3"), WithinAbs(.75 * .5 + .25, rounding));
    CHECK(results.provisional);
    CHECK(open_words(results) == Words{"figure a o3"});
    REQUIRE(results.ranges.size() == 1);
    CHECK(results.ranges[0].first == "o3");
    CHECK_THAT(results.ranges[0].second[0], WithinAbs(.25, rounding));
    CHECK_THAT(results.ranges[0].second[1], WithinAbs(1, rounding));
}

TEST_CASE("solving: in distributive synthesis the placeholder is the mean share, and there are no ranges") {
    const Results results =
        solved(three, two_lines,
               points(3, 1) + ", " + distributive + ", " +
                   figures({figure("a", "o1", "0.9"), figure("a", "o2", "0.3"), figure("b", "o1", "0.4"),
                            figure("b", "o2", "0.6"), figure("b", "o3", "1")}));
    check_close(leaf_of(results, "a").local, {.75, .25, .5}, rounding);
    check_close(leaf_of(results, "b").local, {.2, .3, .5}, rounding);
    // Plain sums: nothing is scaled back to 1.
    CHECK_THAT(results.scores[0] + results.scores[1] + results.scores[2],
               WithinAbs(.75 * 1.5 + .25, rounding));
    CHECK(results.ranges.empty());
    CHECK(results.provisional);
}

TEST_CASE("solving: what is missing at no weight is open but not provisional") {
    const Results results =
        solved(two, two_lines,
               points(0, 1) + ", " +
                   figures({figure("a", "o1", "0.8"), figure("b", "o1", "0.4"), figure("b", "o2", "0.6")}));
    CHECK_FALSE(results.provisional);
    CHECK(open_words(results) == Words{"figure a o2"});
    CHECK(leaf_of(results, "a").weight == 0);
    CHECK_THAT(score_of(results, "o2"), WithinAbs(.6, rounding));
    // Its range is a point.
    REQUIRE(results.ranges.size() == 1);
    CHECK(results.ranges[0].second[0] == results.ranges[0].second[1]);
}

TEST_CASE("solving: unweighed criteria below a node of no weight are not provisional") {
    const Results results =
        solved(two, R"({"id": "goal", "weights": "points", "children": [
        {"id": "a", "children": [
            {"id": "x", "rate": "figure", "curve": {"kind": "line", "worst": 0, "best": 1}},
            {"id": "y", "rate": "figure", "curve": {"kind": "line", "worst": 0, "best": 1}}]},
        {"id": "b", "rate": "figure", "curve": {"kind": "line", "worst": 0, "best": 1}}]})",
               R"("points": [{"set": "goal", "points": {"a": 0, "b": 1}}], )" +
                   figures({figure("x", "o1", "1"), figure("x", "o2", "1"), figure("y", "o1", "1"),
                            figure("y", "o2", "1"), figure("b", "o1", "1"), figure("b", "o2", "0")}));
    CHECK_FALSE(results.provisional);
    CHECK(open_words(results) == Words{"judgment a x y"});
}

TEST_CASE("solving: a leaf on which nobody has a value leaves all equal") {
    const Results ideal = solved(
        two, two_lines, points(1, 1) + ", " + figures({figure("b", "o1", "0.4"), figure("b", "o2", "0.6")}));
    check_close(leaf_of(ideal, "a").local, {1, 1}, 0);
    CHECK(leaf_of(ideal, "a").missing == std::vector<bool>{true, true});
    CHECK(ideal.provisional);
    CHECK(open_words(ideal) == Words{"figure a o1", "figure a o2"});
    const Results shares = solved(two, two_lines,
                                  points(1, 1) + ", " + distributive + ", " +
                                      figures({figure("b", "o1", "0.4"), figure("b", "o2", "0.6")}));
    check_close(leaf_of(shares, "a").local, {.5, .5}, 0);
}

TEST_CASE("solving: options that no judgment links have no value on that leaf") {
    const Results results = solved(three, R"({"id": "goal"})",
                                   R"("judgments": [{"set": "goal", "a": "o1", "b": "o2", "ratio": 3}])");
    check_close(results.scores, {1, 1, 1}, 0);
    CHECK(leaf_of(results, "goal").missing == std::vector<bool>(3, true));
    CHECK(results.provisional);
    CHECK(open_words(results) == Words{"judgment goal o1 o3", "judgment goal o2 o3"});
    CHECK(noticed_at(results, "not-connected") == Words{"/criteria"});
    CHECK(results.ranges.size() == 3);
}

TEST_CASE("solving: a leaf without a curve is open as such, not figure by figure") {
    const Results results =
        solved(two, R"({"id": "goal", "rate": "figure"})", figures({figure("goal", "o1", "7")}));
    CHECK(open_words(results) == Words{"curve goal"});
    CHECK(leaf_of(results, "goal").missing == std::vector<bool>{true, true});
    CHECK(results.provisional);
}

TEST_CASE(
    "solving: a leaf on which all are worth nothing counts 0 in ideal and equal shares in distributive") {
    const std::string zeros = figures({figure("a", "o1", "0"), figure("a", "o2", "-3"),
                                       figure("b", "o1", "0.4"), figure("b", "o2", "0.6")});
    const Results ideal = solved(two, two_lines, points(1, 1) + ", " + zeros);
    check_close(leaf_of(ideal, "a").local, {0, 0}, 0);
    CHECK(noticed_at(ideal, "all-worth-nothing").size() == 1);
    CHECK_FALSE(ideal.provisional);
    const Results shares = solved(two, two_lines, points(1, 1) + ", " + distributive + ", " + zeros);
    check_close(leaf_of(shares, "a").local, {.5, .5}, 0);
    CHECK(noticed_at(shares, "all-worth-nothing").size() == 1);
}

TEST_CASE("solving: all scores 0 have no shares, and the first in the file comes first") {
    const Results results = solved(two, two_lines,
                                   points(1, 1) + ", " +
                                       figures({figure("a", "o1", "0"), figure("a", "o2", "0"),
                                                figure("b", "o1", "0"), figure("b", "o2", "0")}));
    check_close(results.scores, {0, 0}, 0);
    CHECK_FALSE(results.shares.has_value());
    CHECK(results.ranks == std::vector<int>{1, 1});
    CHECK(results.first == 0);
    CHECK(results.lead_points == 0);
}

TEST_CASE("solving: under a proportional curve a figure of 0 or less is missing") {
    for (const char* better : {"more", "less"}) {
        const std::string criteria =
            R"({"id": "goal", "rate": "figure", "curve": {"kind": "proportional", "better": ")" +
            std::string(better) + R"("}})";
        const Results results = solved(
            three, criteria,
            figures({figure("goal", "o1", "4"), figure("goal", "o2", "0"), figure("goal", "o3", "2")}));
        INFO(better);
        CHECK(missing_on(results, "goal", "o2"));
        CHECK_THAT(score_of(results, "o2"), WithinAbs(.75, rounding));
        CHECK(results.provisional);
        CHECK(open_words(results) == Words{"figure goal o2"});
    }
}

TEST_CASE("solving: proportional figures are set against the best in play") {
    const std::string criteria =
        R"({"id": "goal", "rate": "figure", "curve": {"kind": "proportional", "better": "less"}})";
    const std::string prices =
        figures({figure("goal", "o1", "100"), figure("goal", "o2", "200"), figure("goal", "o3", "50")});
    check_close(solved(three, criteria, prices).scores, {.5, .25, 1}, rounding);
    check_close(
        solved(R"({"id": "o1"}, {"id": "o2"}, {"id": "o3", "withdrawn": true})", criteria, prices).scores,
        {1, .5}, rounding);
    check_close(solved(three, criteria, distributive + ", " + prices).scores, {2. / 7, 1. / 7, 4. / 7},
                rounding);
}

TEST_CASE("solving: judged options are divided by the best in ideal, as they are in distributive") {
    const std::string judged = R"("judgments": [{"set": "goal", "a": "o1", "b": "o2", "ratio": 2},
        {"set": "goal", "a": "o2", "b": "o3", "ratio": 2}, {"set": "goal", "a": "o1", "b": "o3", "ratio": 4}])";
    check_close(solved(three, R"({"id": "goal"})", judged).scores, {1, .5, .25}, rounding);
    check_close(solved(three, R"({"id": "goal"})", distributive + ", " + judged).scores,
                {4. / 7, 2. / 7, 1. / 7}, rounding);
}

TEST_CASE("solving: grades stand as they are in ideal, and as shares in distributive") {
    const std::string criteria = R"({"id": "goal", "rate": "grade", "grades": [
        {"id": "g1", "worth": 0.9}, {"id": "g2", "worth": 0.6}]})";
    const std::string grades = R"("grades": [{"criterion": "goal", "option": "o1", "grade": "g2"},
                                             {"criterion": "goal", "option": "o2", "grade": "g1"}])";
    check_close(solved(two, criteria, grades).scores, {.6, .9}, 0);
    check_close(solved(two, criteria, distributive + ", " + grades).scores, {.4, .6}, rounding);
}

TEST_CASE("solving: grades worth what their pairwise judgments say, divided by the largest") {
    const std::string criteria = R"({"id": "goal", "rate": "grade", "worths": "pairs", "grades": [
        {"id": "g1"}, {"id": "g2"}, {"id": "g3"}]})";
    const std::string grades = R"("grades": [{"criterion": "goal", "option": "o1", "grade": "g2"},
                                             {"criterion": "goal", "option": "o2", "grade": "g3"}])";
    const Results results = solved(two, criteria,
                                   R"("judgments": [{"set": "goal", "a": "g1", "b": "g2", "ratio": 2},
        {"set": "goal", "a": "g2", "b": "g3", "ratio": 2}, {"set": "goal", "a": "g1", "b": "g3", "ratio": 4}], )" +
                                       grades);
    check_close(results.scores, {.5, .25}, rounding);
    CHECK(set_of(results, "goal").items == std::vector<Id>{"g1", "g2", "g3"});

    // Grades that no judgment links have no worth; what is open is the judgments, not the grades given.
    const Results open = solved(two, criteria, grades);
    CHECK(leaf_of(open, "goal").missing == std::vector<bool>{true, true});
    CHECK(open.provisional);
    CHECK(open_words(open) == Words{"judgment goal g1 g2", "judgment goal g1 g3", "judgment goal g2 g3"});
}

TEST_CASE("solving: a single grade worth its pairs is worth everything") {
    const Results results =
        solved(two, R"({"id": "goal", "rate": "grade", "worths": "pairs", "grades": [{"id": "g"}]})",
               R"("grades": [{"criterion": "goal", "option": "o1", "grade": "g"}])");
    CHECK(score_of(results, "o1") == 1);
    CHECK(open_words(results) == Words{"grade goal o2"});
}

TEST_CASE("solving: a grade without a worth is open, and options that have it miss a value") {
    const Results results = solved(three, R"({"id": "goal", "rate": "grade", "grades": [
        {"id": "g1", "worth": 0.5}, {"id": "g2"}]})",
                                   R"("grades": [{"criterion": "goal", "option": "o1", "grade": "g1"},
                                                 {"criterion": "goal", "option": "o2", "grade": "g2"}])");
    CHECK(results.leaves[0].missing == std::vector<bool>{false, true, true});
    CHECK(open_words(results) == Words{"worth goal g2", "grade goal o3"});
    CHECK_THAT(score_of(results, "o2"), WithinAbs(.5, rounding));
}

TEST_CASE("solving: withdrawn options take no part") {
    const Results results =
        solved(R"({"id": "o1"}, {"id": "o2", "withdrawn": true}, {"id": "o3"})", two_lines,
               points(1, 1) + ", " +
                   figures({figure("a", "o1", "0.8"), figure("b", "o1", "0.4"), figure("a", "o3", "0.3"),
                            figure("b", "o3", "0.3")}));
    CHECK(results.options == std::vector<Id>{"o1", "o3"});
    CHECK_FALSE(results.provisional);
    CHECK(results.open.empty());
    CHECK(results.musts.empty());
    CHECK(results.excluded.empty());
}

TEST_CASE("solving: computed figures are given for every option that has one, in play or not") {
    const Results results =
        solved(R"({"id": "o1"}, {"id": "o2", "withdrawn": true}, {"id": "o3"})",
               R"({"id": "cost", "rate": "figure", "curve": {"kind": "line", "worst": 900, "best": 100},
            "cost_sheet": {"years": 2, "discount": 0}})",
               R"("costs": [
            {"criterion": "cost", "option": "o2", "line": "rent", "kind": "per_year", "value": 200},
            {"criterion": "cost", "option": "o1", "line": "price", "kind": "once", "value": 500}])");
    REQUIRE(results.figures.size() == 1);
    CHECK(results.figures[0].leaf == "cost");
    CHECK(results.figures[0].values == std::vector<std::pair<Id, double>>{{"o1", 500}, {"o2", 400}});
    CHECK_THAT(score_of(results, "o1"), WithinAbs(.5, rounding));
    CHECK(open_words(results) == Words{"figure cost o3"});
}

TEST_CASE("solving: what is open comes set by set, then leaf by leaf, then must by must") {
    const Results results =
        solved(two, R"({"id": "goal", "children": [
        {"id": "a", "rate": "figure"}, {"id": "b"},
        {"id": "c", "weights": "points", "children": [
            {"id": "d", "rate": "grade", "grades": [{"id": "g"}]},
            {"id": "e", "rate": "figure", "curve": {"kind": "target", "target": 1, "tolerance": 1}}]}]})",
               R"("requirements": [{"id": "r1", "yes_no": true}, {"id": "r2", "at_most": 5}],
            "checks": [{"requirement": "r1", "option": "o2", "state": "asked"},
                       {"requirement": "r2", "option": "o1", "value": 4}])");
    CHECK(open_words(results) == Words{"judgment goal a b", "judgment goal a c", "judgment goal b c",
                                       "judgment b o1 o2", "points c", "curve a", "worth d g", "grade d o1",
                                       "grade d o2", "figure e o1", "figure e o2", "requirement r1 o1",
                                       "requirement r1 o2", "requirement r2 o2"});
}

TEST_CASE("solving: numbers at the ends of what a file may hold give no result that is no number") {
    const std::vector<std::string> extremes{"5e-324", "1e-310", "-1.7e308", "1.7e308", "0", "1e300"};
    const std::vector<std::string> curves{R"({"kind": "proportional", "better": "less"})",
                                          R"({"kind": "proportional", "better": "more"})",
                                          R"({"kind": "line", "worst": -1.7e308, "best": 1.7e308})",
                                          R"({"kind": "line", "worst": 1e-310, "best": 0})",
                                          R"({"kind": "points", "at": [[-1.7e308, 0.5], [1.7e308, 1]]})",
                                          R"({"kind": "target", "target": 1.7e308, "tolerance": 5e-324})"};
    for (const auto& curve : curves) {
        std::string bad; // The first figures and synthesis that go wrong.
        for (const auto& one : extremes) {
            for (const auto& other : extremes) {
                for (const std::string& settings : {std::string{}, distributive + ", "}) {
                    const Results results =
                        solved(three, R"({"id": "goal", "rate": "figure", "curve": )" + curve + "}",
                               settings + figures({figure("goal", "o1", one), figure("goal", "o2", other)}));
                    for (const double score : results.scores) {
                        if (bad.empty() && !(score >= 0 && score <= 1)) // NaN is neither.
                            bad = one + " and " + other + " " + settings;
                    }
                }
            }
        }
        INFO(curve);
        CHECK(bad == "");
    }
}

} // namespace steelyard
