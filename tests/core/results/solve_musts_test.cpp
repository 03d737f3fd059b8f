#include <catch_amalgamated.hpp>
#include <string>
#include <vector>

#include "core/results/solve.hpp"
#include "tests/support/close.hpp"
#include "tests/support/find_results.hpp"
#include "tests/support/round_trip.hpp"

// Musts in whole decisions; how one value stands to a limit is tests/core/measure/musts_test.cpp.
namespace steelyard {

using Catch::Matchers::WithinAbs;
using testing::check_close;
using testing::must_of;
using testing::open_words;
using Ids = std::vector<Id>;
using Words = std::vector<std::string>;

namespace {

/// Three options on a price (line from 100 to 0) and a quality (grades), half each; `more` follows.
Results with_musts(const std::string& requirements, const std::string& more = "",
                   const std::string& quality_grades = "",
                   const std::string& options = R"({"id": "o1"}, {"id": "o2"}, {"id": "o3"})") {
    return solve(
        test::read(R"({"format": "steelyard-decision", "version": 1, "people": [{"id": "p1"}],
        "options": [)" +
                   options +
                   R"(], "criteria": {"id": "goal", "weights": "points", "children": [
            {"id": "price", "rate": "figure", "unit": "EUR", "curve": {"kind": "line", "worst": 100, "best": 0}},
            {"id": "quality", "rate": "grade", "grades": [
                {"id": "good", "worth": 0.9}, {"id": "fair", "worth": 0.5}, {"id": "poor", "worth": 0.2}]}]},
        "points": [{"set": "goal", "points": {"price": 50, "quality": 50}}],
        "figures": [{"criterion": "price", "option": "o1", "value": 40}, {"criterion": "price", "option": "o2", "value": 70},
                    {"criterion": "price", "option": "o3", "value": 60, "low": 55, "high": 80}],
        "grades": [)" +
                   (quality_grades.empty() ? R"({"criterion": "quality", "option": "o1", "grade": "fair"},
                    {"criterion": "quality", "option": "o2", "grade": "good"},
                    {"criterion": "quality", "option": "o3", "grade": "poor"})"
                                           : quality_grades) +
                   R"(], "requirements": [)" + requirements + "]" + (more.empty() ? "" : ", " + more) + "}"));
}

} // namespace

TEST_CASE("musts: who fails one is excluded, with the value that says so, and takes no part") {
    const Results results = with_musts(R"({"id": "r", "criterion": "price", "at_most": 65})");
    CHECK(results.options == Ids{"o1", "o3"});
    REQUIRE(results.excluded.size() == 1);
    CHECK(results.excluded[0].option == "o2");
    CHECK(results.excluded[0].requirement == "r");
    CHECK(results.excluded[0].value == 70);
    CHECK(must_of(results, "r", "o1").state == MustState::met);
    CHECK(must_of(results, "r", "o2").state == MustState::failed);
    CHECK(must_of(results, "r", "o3").state == MustState::undecided);
    CHECK(open_words(results) == Words{"requirement r o3"});
    CHECK_FALSE(results.provisional);
    CHECK(results.ranks.size() == 2);
}

TEST_CASE("musts: a waived one excludes nobody and asks nothing") {
    const Results results = with_musts(
        R"({"id": "r", "criterion": "price", "at_most": 65, "waived": {"by": "p1", "why": "old plan"}},
                      {"id": "s", "yes_no": true, "waived": {}})");
    CHECK(results.options == Ids{"o1", "o2", "o3"});
    CHECK(results.excluded.empty());
    CHECK(results.open.empty());
    CHECK(must_of(results, "r", "o2").state == MustState::waived);
    CHECK(must_of(results, "s", "o1").state == MustState::waived);
}

TEST_CASE("musts: what is unchecked or asked is ranked, and open") {
    const Results results = with_musts(R"({"id": "r", "yes_no": true})",
                                       R"("checks": [{"requirement": "r", "option": "o1", "state": "asked"},
            {"requirement": "r", "option": "o2", "state": "met"}])");
    CHECK(results.options == Ids{"o1", "o2", "o3"});
    CHECK(must_of(results, "r", "o1").state == MustState::asked);
    CHECK(must_of(results, "r", "o2").state == MustState::met);
    CHECK(must_of(results, "r", "o3").state == MustState::unchecked);
    CHECK(open_words(results) == Words{"requirement r o1", "requirement r o3"});
}

TEST_CASE(
    "musts: every failed one is listed, by option and then by requirement; those out of play ask nothing") {
    const Results results = with_musts(
        R"({"id": "r", "yes_no": true}, {"id": "s", "at_most": 78}, {"id": "t", "yes_no": true})",
        R"("checks": [{"requirement": "s", "option": "o3", "value": 81}, {"requirement": "r", "option": "o3", "state": "failed"},
            {"requirement": "s", "option": "o1", "low": 79, "high": 83}, {"requirement": "s", "option": "o2", "value": 70},
            {"requirement": "r", "option": "o2", "state": "met"}, {"requirement": "t", "option": "o2", "state": "met"}])");
    CHECK(results.options == Ids{"o2"});
    REQUIRE(results.excluded.size() == 3);
    CHECK(results.excluded[0].option == "o1");
    CHECK(results.excluded[0].requirement == "s");
    CHECK(results.excluded[0].value == 81); // The middle of its range.
    CHECK(results.excluded[1].option == "o3");
    CHECK(results.excluded[1].requirement == "r");
    CHECK_FALSE(results.excluded[1].value.has_value());
    CHECK(results.excluded[2].requirement == "s");
    CHECK(results.open.empty());
}

TEST_CASE("musts: all options out") {
    const Results results = with_musts(R"({"id": "r", "criterion": "price", "at_most": 10})");
    CHECK(results.options.empty());
    CHECK(results.scores.empty());
    CHECK(results.excluded.size() == 3);
    CHECK_FALSE(results.first.has_value());
    CHECK_FALSE(results.provisional);
}

TEST_CASE("musts: a withdrawn option is neither judged by them nor listed") {
    const Results results = with_musts(R"({"id": "r", "criterion": "price", "at_most": 65})", "", "",
                                       R"({"id": "o1"}, {"id": "o2", "withdrawn": true}, {"id": "o3"})");
    CHECK(results.options == Ids{"o1", "o3"});
    CHECK(results.excluded.empty());
    CHECK(results.musts.size() == 2);
}

TEST_CASE("musts on a node: a leaf's worth in ideal synthesis against the limit") {
    const Results results = with_musts(R"({"id": "r", "node": "quality", "min_worth": 0.5})");
    CHECK(results.options == Ids{"o1", "o2"});
    CHECK(must_of(results, "r", "o1").state == MustState::met); // The limit itself is met.
    REQUIRE(results.excluded.size() == 1);
    CHECK(results.excluded[0].option == "o3");
    CHECK(results.excluded[0].value == .2);
}

TEST_CASE("musts on a node: its own worth counts, whatever weight it has above") {
    // Worth of the root: price and quality by half: o1 .55, o2 .6, o3 .3.
    const Results results = with_musts(R"({"id": "r", "node": "goal", "at_least": 0.58, "at_most": 0.9})");
    CHECK(results.options == Ids{"o2"});
    CHECK_THAT(must_of(results, "r", "o1").value.value(), WithinAbs(.55, 1e-14));
    CHECK_THAT(must_of(results, "r", "o3").value.value(), WithinAbs(.3, 1e-14));
    CHECK_THAT(results.scores[0], WithinAbs(.6, 1e-14));
}

TEST_CASE("musts on a node: of two least values the stricter counts, and a most value excludes too") {
    CHECK(with_musts(R"({"id": "r", "node": "quality", "min_worth": 0.1, "at_least": 0.6})").options ==
          Ids{"o2"});
    CHECK(with_musts(R"({"id": "r", "node": "quality", "min_worth": 0.6, "at_least": 0.1})").options ==
          Ids{"o2"});
    CHECK(with_musts(R"({"id": "r", "node": "quality", "at_most": 0.6})").options == Ids{"o1", "o3"});
}

TEST_CASE("musts on a node: found in ideal synthesis though the decision is distributive") {
    const Results results = with_musts(R"({"id": "r", "node": "quality", "min_worth": 0.5})",
                                       R"("settings": {"synthesis": "distributive"})");
    CHECK(results.options == Ids{"o1", "o2"});
    CHECK(must_of(results, "r", "o2").value == .9);
    check_close(testing::leaf_of(results, "quality").local, {.5 / 1.4, .9 / 1.4}, 1e-14);
}

TEST_CASE("musts on a node: found once, among those who fail no other must") {
    // Options judged o2 : o1 : o3 as 4 : 2 : 1; against the best in the field.
    const std::string text = R"({"format": "steelyard-decision", "version": 1,
        "options": [{"id": "o1"}, {"id": "o2"}, {"id": "o3"}], "criteria": {"id": "goal"},
        "judgments": [{"set": "goal", "a": "o2", "b": "o1", "ratio": 2}, {"set": "goal", "a": "o1", "b": "o3", "ratio": 2},
                      {"set": "goal", "a": "o2", "b": "o3", "ratio": 4}],
        "requirements": [{"id": "worth", "node": "goal", "min_worth": 0.5}, {"id": "guard", "yes_no": true}],
        "checks": [{"requirement": "guard", "option": "o2", "state": "GUARD"}]})";
    const auto with_guard = [&](const std::string& state) {
        std::string out = text;
        return solve(test::read(out.replace(out.find("GUARD"), 5, state)));
    };
    const Results best_in = with_guard("met");
    CHECK(best_in.options == Ids{"o1", "o2"});
    CHECK_THAT(must_of(best_in, "worth", "o3").value.value(), WithinAbs(.25, 1e-14));

    // Without o2 the third is worth half the best: the bar itself, up to rounding; hence a bar just below.
    std::string lower = text;
    lower.replace(lower.find("0.5}"), 4, "0.49}");
    lower.replace(lower.find("GUARD"), 5, "failed");
    const Results best_out = solve(test::read(lower));
    CHECK(best_out.options == Ids{"o1", "o3"});
    CHECK_THAT(must_of(best_out, "worth", "o3").value.value(), WithinAbs(.5, 1e-14));
    // Outside the field nothing is found.
    CHECK(must_of(best_out, "worth", "o2").state == MustState::unchecked);
    CHECK_FALSE(must_of(best_out, "worth", "o2").value.has_value());
    REQUIRE(best_out.excluded.size() == 1);
    CHECK(best_out.excluded[0].requirement == "guard");
}

TEST_CASE("musts on a node: two of them use the same field, though one excludes") {
    const Results results = with_musts(R"({"id": "r", "node": "quality", "min_worth": 0.3},
                                          {"id": "s", "node": "price", "min_worth": 0.35})");
    // o3 fails the first and o2 the second; both findings are made over all three.
    CHECK(results.options == Ids{"o1"});
    CHECK_THAT(must_of(results, "s", "o3").value.value(), WithinAbs(.4, 1e-14));
    CHECK(must_of(results, "s", "o3").state == MustState::met);
    CHECK(results.excluded.size() == 2);
}

TEST_CASE("musts on a node: what is missing makes a range from 0 to 1") {
    const std::string no_grade_for_o1 = R"({"criterion": "quality", "option": "o2", "grade": "good"},
                                           {"criterion": "quality", "option": "o3", "grade": "poor"})";
    // o1 on the root: .5 * .6 = .3 to .8, with the placeholder .55 in between .575.
    const Results undecided =
        with_musts(R"({"id": "r", "node": "goal", "at_least": 0.5})", "", no_grade_for_o1);
    CHECK(must_of(undecided, "r", "o1").state == MustState::undecided);
    CHECK_THAT(must_of(undecided, "r", "o1").value.value(), WithinAbs(.575, 1e-14));
    CHECK(undecided.options == Ids{"o1", "o2"});
    const Results met = with_musts(R"({"id": "r", "node": "goal", "at_least": 0.29})", "", no_grade_for_o1);
    CHECK(must_of(met, "r", "o1").state == MustState::met);
    const Results failed =
        with_musts(R"({"id": "r", "node": "goal", "at_least": 0.81})", "", no_grade_for_o1);
    CHECK(must_of(failed, "r", "o1").state == MustState::failed);
}

TEST_CASE("musts on a node: undecided while criteria under it have no weights") {
    const std::string text = R"({"format": "steelyard-decision", "version": 1,
        "options": [{"id": "o1"}], "criteria": {"id": "goal", "children": [
            {"id": "a", "rate": "figure", "curve": {"kind": "line", "worst": 0, "best": 1}},
            {"id": "b", "rate": "figure", "curve": {"kind": "line", "worst": 0, "best": 1}}]},
        "figures": [{"criterion": "a", "option": "o1", "value": 0.1}, {"criterion": "b", "option": "o1", "value": 0.1}],
        "requirements": [{"id": "r", "node": "goal", "min_worth": 0.5}, {"id": "s", "node": "a", "min_worth": 0.5}]})";
    const Results results = solve(test::read(text));
    CHECK(must_of(results, "r", "o1").state == MustState::undecided);
    CHECK(must_of(results, "s", "o1").state == MustState::failed);
}

TEST_CASE("musts on a node: without any limit there is nothing to check yet") {
    const Results results = with_musts(R"({"id": "r", "node": "quality"})");
    CHECK(results.options.size() == 3);
    CHECK(must_of(results, "r", "o1").state == MustState::unchecked);
    CHECK(open_words(results) == Words{"requirement r o1", "requirement r o2", "requirement r o3"});
}

} // namespace steelyard
