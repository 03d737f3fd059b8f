#include <array>
#include <catch_amalgamated.hpp>
#include <cmath>
#include <string>
#include <vector>

#include "core/decision/json_value.hpp"
#include "core/results/solve.hpp"
#include "core/results/write_results.hpp"
#include "tests/support/close.hpp"
#include "tests/support/find_results.hpp"
#include "tests/support/judged_decisions.hpp"
#include "tests/support/round_trip.hpp"

// What several judges make of a decision.
namespace steelyard {

using Catch::Matchers::WithinAbs;
using testing::check_close;
using testing::judgment;
using testing::judgments;
using testing::set_of;
using Ids = std::vector<Id>;

namespace {

constexpr double rounding = 1e-14;

/// Three options on one leaf of pairs "goal"; people as given.
Decision on_one_leaf(const std::string& people, const std::string& more) {
    return test::read(R"({"format": "steelyard-decision", "version": 1,
        "options": [{"id": "o1"}, {"id": "o2"}, {"id": "o3"}], "people": [)" +
                      people + R"(], "criteria": {"id": "goal"}, )" + more + "}");
}

const std::string three_people = R"({"id": "p1"}, {"id": "p2", "share": 2}, {"id": "p3"})";

/// One person's consistent answers to all three pairs.
std::vector<std::string> answers(const std::string& by, double w1, double w2, double w3) {
    return {judgment("goal", by, "o1", "o2", std::to_string(w1 / w2)),
            judgment("goal", by, "o1", "o3", std::to_string(w1 / w3)),
            judgment("goal", by, "o2", "o3", std::to_string(w2 / w3))};
}

std::string together(const std::vector<std::vector<std::string>>& lists) {
    std::vector<std::string> all;
    for (const auto& list : lists) all.insert(all.end(), list.begin(), list.end());
    return judgments(all);
}

const Spread* spread_of(const Results& results, const Id& set, const Id& a, const Id& b) {
    for (const auto& spread : results.group->spreads) {
        if (spread.set == set && spread.a == a && spread.b == b) return &spread;
    }
    return nullptr;
}

const WithoutJudge& without(const Results& results, const Id& person) {
    for (const auto& one : results.group->without) {
        if (one.person == person) return one;
    }
    throw std::logic_error("nobody is left out: " + person);
}

const JudgeRanking& ranking_of(const Results& results, const Id& person) {
    for (const auto& one : results.group->rankings) {
        if (one.person == person) return one;
    }
    throw std::logic_error("no ranking of " + person);
}

} // namespace

TEST_CASE("group: there is none with fewer than two judges") {
    CHECK_FALSE(solve(on_one_leaf(three_people, judgments({}))).group.has_value());
    CHECK_FALSE(solve(on_one_leaf(three_people, together({answers("p2", 4, 2, 1)}))).group.has_value());
    CHECK_FALSE(solve(on_one_leaf(three_people, together({answers("", 4, 2, 1)}))).group.has_value());
}

TEST_CASE("group: judges are the persons with a share and an answer of their own, in order") {
    const Results two =
        solve(on_one_leaf(three_people, together({answers("p3", 4, 2, 1), answers("p1", 1, 2, 4)})));
    CHECK(two.group->judges == Ids{"p1", "p3"});
    // A share of 0 counts for nothing, an abstention on all he judged neither.
    const std::string shares =
        R"({"id": "p1", "share": 0}, {"id": "p2", "abstains": ["o1", "o2"]}, {"id": "p3"}, {"id": "p4"})";
    const Results others =
        solve(on_one_leaf(shares, together({answers("p1", 4, 2, 1), answers("p2", 4, 2, 1),
                                            answers("p3", 4, 2, 1), answers("p4", 1, 1, 1)})));
    CHECK(others.group->judges == Ids{"p3", "p4"});
    CHECK(others.group->spreads.size() == 3);
    CHECK(spread_of(others, "goal", "o1", "o2")->furthest == std::array<Id, 2>{"p3", "p4"});
}

TEST_CASE("group: points and grades make judges too") {
    const Results results = solve(test::read(R"({"format": "steelyard-decision", "version": 1,
        "options": [{"id": "o1"}, {"id": "o2"}],
        "people": [{"id": "p1"}, {"id": "p2", "abstains": ["o2"]}, {"id": "p3"}, {"id": "p4"}],
        "criteria": {"id": "goal", "weights": "points", "children": [
            {"id": "look", "rate": "grade", "grades": [{"id": "g1", "worth": 1}, {"id": "g2", "worth": 0.5}]},
            {"id": "feel", "rate": "grade", "grades": [{"id": "g1", "worth": 1}, {"id": "g2", "worth": 0}]}]},
        "points": [{"set": "goal", "by": "p1", "points": {"look": 80, "feel": 20}}],
        "grades": [{"criterion": "look", "option": "o1", "by": "p3", "grade": "g1"},
                   {"criterion": "look", "option": "o2", "by": "p3", "grade": "g2"},
                   {"criterion": "feel", "option": "o1", "by": "p1", "grade": "g2"},
                   {"criterion": "feel", "option": "o2", "by": "p2", "grade": "g1"},
                   {"criterion": "feel", "option": "o2", "grade": "g1"},
                   {"criterion": "look", "option": "o1", "by": "p4", "grade": "g2"},
                   {"criterion": "look", "option": "o1", "by": "p4"}]})"));
    // p2 abstains on the only option he graded; p4 took his grade back.
    CHECK(results.group->judges == Ids{"p1", "p3"});
    // p1 alone: points 80 and 20; the group's grades on look, his own on feel, the agreed one of o2.
    check_close(ranking_of(results, "p1").scores, {.8, .4 + .2}, rounding);
    // Without p1 nobody gave points: the criteria count equally, and o1 takes o2's grade on feel.
    check_close(ranking_of(results, "p3").scores, {.8, .4 + .2}, rounding);
    CHECK(without(results, "p1").ranks == std::vector<int>{1, 2});
    CHECK_FALSE(without(results, "p1").first_moves);
    // Without p3 nobody graded look: both are placed alike there, and o2 leads by feel.
    CHECK(without(results, "p3").ranks == std::vector<int>{2, 1});
    CHECK(without(results, "p3").first_moves);
    CHECK(without(results, "p3").first == "o2");
    CHECK(results.group->spreads.empty());
}

// Ratios 9, 1 and 1/9: logarithms 1, 0, -1 times ln 9, whose deviation is sqrt(2/3) ln 9.
TEST_CASE("group: the spread of a pair and the sides taken, by hand") {
    const Results results = solve(on_one_leaf(
        three_people,
        judgments({judgment("goal", "p1", "o1", "o2", "9"), judgment("goal", "p2", "o2", "o1", "9"),
                   judgment("goal", "p3", "o2", "o1", "1"), judgment("goal", "p1", "o2", "o3", "3"),
                   judgment("goal", "p2", "o3", "o2", "2"),
                   judgment("goal", "p2", "o2", "o3", "3"), // Takes its place.
                   judgment("goal", "p3", "o1", "o3", "3")})));
    REQUIRE(results.group->spreads.size() == 2); // o1 and o3 were judged by one person only.
    const Spread& wide = *spread_of(results, "goal", "o1", "o2");
    CHECK_THAT(wide.gsd, WithinAbs(std::pow(9, std::sqrt(2. / 3)), 1e-13));
    CHECK(std::array{wide.in_favour, wide.equal, wide.against} == std::array{1, 1, 1});
    CHECK(wide.furthest == std::array<Id, 2>{"p1", "p2"});
    CHECK(wide.furthest_ratios == std::array{9., 1. / 9});
    const Spread& none = *spread_of(results, "goal", "o2", "o3");
    CHECK(none.gsd == 1);
    CHECK(std::array{none.in_favour, none.equal, none.against} == std::array{2, 0, 0});
    CHECK(none.furthest == std::array<Id, 2>{"p1", "p2"});
}

TEST_CASE("group: of judges equally far apart the first in order are named") {
    const Results results = solve(on_one_leaf(
        R"({"id": "p4"}, {"id": "p3"}, {"id": "p2"}, {"id": "p1"})",
        judgments({judgment("goal", "p1", "o1", "o2", "4"), judgment("goal", "p2", "o1", "o2", "1"),
                   judgment("goal", "p3", "o1", "o2", "4"), judgment("goal", "p4", "o1", "o2", "2")})));
    CHECK(spread_of(results, "goal", "o1", "o2")->furthest == std::array<Id, 2>{"p3", "p2"});
}

TEST_CASE("group: what was agreed on is no disagreement any more") {
    const Results results = solve(on_one_leaf(
        three_people,
        together({answers("p1", 4, 2, 1), answers("p2", 1, 2, 4), {judgment("goal", "", "o3", "o1", "2")}})));
    CHECK(results.group->spreads.size() == 2);
    CHECK(spread_of(results, "goal", "o1", "o3") == nullptr);
}

// Rankings 1 2 3, 1 3 2, 1 2 3: W = 7/9 and p = 7/36, as in tests/core/judgment/concordance_test.cpp.
TEST_CASE("group: concordance of a set and of the whole") {
    const Results results = solve(on_one_leaf(
        three_people, together({answers("p1", 4, 2, 1), answers("p2", 4, 1, 2), answers("p3", 9, 3, 1)})));
    const auto& set = set_of(results, "goal").concordance;
    REQUIRE(set.has_value());
    CHECK_THAT(set->w, WithinAbs(7. / 9, rounding));
    CHECK_THAT(set->chi2, WithinAbs(14. / 3, rounding));
    CHECK_THAT(set->p, WithinAbs(7. / 36, rounding));
    CHECK(set->exact);
    CHECK(set->judges == Ids{"p1", "p2", "p3"});
    for (const Id person : {"p1", "p2", "p3"})
        CHECK_FALSE(set_of(results, "goal", person).concordance.has_value());
    REQUIRE(results.group->concordance.has_value());
    CHECK_THAT(results.group->concordance->w, WithinAbs(7. / 9, rounding));
    CHECK(ranking_of(results, "p2").ranks == std::vector<int>{1, 3, 2});
}

TEST_CASE("group: concordance leaves out who does not connect the set by himself") {
    // p3 judged one pair; agreed judgments connect the rest of his matrix.
    const std::vector<std::string> one{judgment("goal", "p3", "o1", "o2", "2")};
    const std::vector<std::string> agreed{judgment("goal", "", "o2", "o3", "2")};
    const Results results = solve(
        on_one_leaf(three_people, together({answers("p1", 4, 2, 1), answers("p2", 4, 1, 2), one, agreed})));
    CHECK(set_of(results, "goal", "p3").weights.has_value());
    CHECK(set_of(results, "goal").concordance->judges == Ids{"p1", "p2"});
    // With two of them left there is none for the set, though the whole still has one.
    const Results two = solve(on_one_leaf(three_people, together({answers("p1", 4, 2, 1), one, agreed})));
    CHECK_FALSE(set_of(two, "goal").concordance.has_value());
    CHECK(two.group->concordance.has_value());
    // A share of 0 takes no part.
    const Results unheard = solve(
        on_one_leaf(R"({"id": "p1"}, {"id": "p2", "share": 0}, {"id": "p3"})",
                    together({answers("p1", 4, 2, 1), answers("p2", 1, 2, 4), answers("p3", 4, 2, 1)})));
    CHECK(set_of(unheard, "goal").concordance->judges == Ids{"p1", "p3"});
    CHECK_THAT(set_of(unheard, "goal").concordance->w, WithinAbs(1, rounding));
}

TEST_CASE("group: no concordance where each judge ties all items") {
    const Results results =
        solve(on_one_leaf(three_people, together({answers("p1", 1, 1, 1), answers("p2", 1, 1, 1)})));
    CHECK_FALSE(set_of(results, "goal").concordance.has_value());
    CHECK_FALSE(results.group->concordance.has_value());
    CHECK(results.group->spreads.size() == 3);
}

TEST_CASE("group: the standing without each judge, in every way of combining") {
    for (const char* combine : {"judgments", "priorities", "priorities-arithmetic"}) {
        INFO(combine);
        const std::string settings = R"("settings": {"combine": ")" + std::string(combine) + R"("}, )";
        // p2, who counts twice, puts o3 first against the two others.
        const Results results = solve(on_one_leaf(
            three_people,
            settings + together({answers("p1", 3, 2, 1), answers("p2", 1, 2, 8), answers("p3", 4, 3, 2)})));
        CHECK(results.options[*results.first] == "o3");
        CHECK(without(results, "p2").first_moves);
        CHECK(without(results, "p2").first == "o1");
        CHECK(without(results, "p2").ranks == std::vector<int>{1, 2, 3});
        CHECK_FALSE(without(results, "p1").first_moves);
        CHECK(without(results, "p1").first == "o3");
    }
}

TEST_CASE("group: without the only judge who connects, the others' answers are combined pair by pair") {
    const Results results = solve(on_one_leaf(
        three_people,
        R"("settings": {"combine": "priorities"}, )" +
            together({answers("p1", 1, 2, 4),
                      {judgment("goal", "p2", "o1", "o2", "3"), judgment("goal", "p3", "o2", "o3", "3")}})));
    CHECK(results.ranks == std::vector<int>{3, 2, 1}); // p1 alone has weights of his own.
    CHECK(without(results, "p1").ranks == std::vector<int>{1, 2, 3});
    // p2's own answers give no weights: where he would stand alone, the group's stand.
    CHECK(ranking_of(results, "p2").ranks == results.ranks);
}

TEST_CASE("group: without a judge a must on a node may let other options in") {
    const Results results = solve(on_one_leaf(
        three_people, together({answers("p1", 4, 2, 1), answers("p2", 8, 8, 1)}) +
                          R"(, "requirements": [{"id": "r", "node": "goal", "min_worth": 0.2}])"));
    CHECK(results.options == Ids{"o1", "o2"});
    CHECK(without(results, "p2").options == Ids{"o1", "o2", "o3"});
    CHECK(without(results, "p2").ranks == std::vector<int>{1, 2, 3});
    CHECK(without(results, "p1").options == Ids{"o1", "o2"});
    CHECK(without(results, "p1").ranks == std::vector<int>{1, 1});
    CHECK_FALSE(without(results, "p1").first_moves); // Still first, with another.
    // Alone he ranks the options in play for all.
    CHECK(ranking_of(results, "p1").ranks == std::vector<int>{1, 2});
}

TEST_CASE("group: as the results file has it") {
    const Decision decision =
        on_one_leaf(three_people, together({answers("p1", 4, 2, 1),
                                            answers("p2", 4, 1, 2),
                                            {judgment("goal", "p3", "o1", "o2", "1")}}));
    const ParsedJson parsed = parse_json(write_results(decision, solve(decision)));
    const auto text = [](const JsonValue& value) { return write_json_compact(value); };
    const JsonValue& concordance = *parsed.value.find("sets")->items[0].find("concordance");
    CHECK(text(*concordance.find("w")) == "0.75");
    CHECK(text(*concordance.find("chi2")) == "3");
    CHECK(text(*concordance.find("p_by")) == R"("exact")");
    CHECK(text(*concordance.find("judges")) == R"(["p1","p2"])");
    CHECK(concordance.members.size() == 5);
    CHECK(parsed.value.find("sets")->items[1].find("concordance") == nullptr);

    const JsonValue& group = *parsed.value.find("group");
    CHECK(text(*group.find("judges")) == R"(["p1","p2","p3"])");
    CHECK(group.find("kendall_w")->kind == JsonValue::Kind::number);
    const JsonValue& spread = group.find("spreads")->items[1];
    CHECK(text(spread) == R"({"set":"goal","a":"o1","b":"o3","gsd":)" + text(*spread.find("gsd")) +
                              R"(,"for":2,"equal":0,"against":0,"furthest":["p1","p2"]})");
    CHECK(text(group.find("without")->items[0]).find(R"({"person":"p1","ranks":{"o1":1,"o2":3,"o3":2}})") ==
          0);
    CHECK(group.find("without")->items.size() == 3);
    CHECK(group.members.size() == 4);
}

} // namespace steelyard
