#include <catch_amalgamated.hpp>
#include <cmath>
#include <string>
#include <vector>

#include "core/judgment/judged_set.hpp"
#include "tests/support/round_trip.hpp"

namespace steelyard {

using Catch::Matchers::WithinRel;

namespace {

/// Four options on one leaf, judged; two criteria; three people.
Decision with_judgments(const std::string& judgments, const std::string& people = R"(
        {"id": "p1", "share": 1}, {"id": "p2", "share": 3}, {"id": "p3", "share": 0})") {
    return test::read(R"({"format": "steelyard-decision", "version": 1, "people": [)" + people +
                      R"(], "options": [{"id": "a"}, {"id": "b"}, {"id": "c"}, {"id": "d"}],
        "criteria": {"id": "goal", "children": [{"id": "leaf"}, {"id": "other"}]},
        "judgments": [)" +
                      judgments + "]}");
}

JudgedSet gathered(const Decision& decision, const std::vector<Id>& items = {"a", "b", "c", "d"}) {
    return JudgmentsBySet(decision).gather("leaf", items, true);
}

} // namespace

TEST_CASE("judged set: nobody has said anything") {
    const JudgedSet set = gathered(with_judgments(""));
    CHECK(set.agreed.judged_pairs().empty());
    CHECK(set.judges.empty());
    CHECK(group_matrix(set).judged_pairs().empty());
    CHECK(gathered(with_judgments(""), {}).agreed.size() == 0);
}

TEST_CASE("judged set: the last judgment of a pair and person stands, in whichever orientation") {
    const JudgedSet set = gathered(with_judgments(R"(
        {"set": "leaf", "by": "p1", "a": "a", "b": "b", "ratio": 2},
        {"set": "leaf", "by": "p2", "a": "a", "b": "b", "ratio": 7},
        {"set": "leaf", "by": "p1", "a": "b", "b": "a", "ratio": 4},
        {"set": "leaf", "a": "c", "b": "d", "ratio": 5},
        {"set": "leaf", "by": null, "a": "d", "b": "c", "ratio": 5},
        {"set": "other", "by": "p1", "a": "a", "b": "b", "ratio": 9})"));
    REQUIRE(set.judges.size() == 2);
    CHECK(set.judges[0].person == "p1");
    CHECK(set.judges[0].share == 1);
    CHECK(set.judges[0].own.at(0, 1) == .25);
    CHECK(set.judges[0].own.judged_pairs().size() == 1);
    CHECK(set.judges[1].own.at(0, 1) == 7);
    CHECK(set.agreed.at(2, 3) == .2);
}

TEST_CASE("judged set: judges stand in the order of the people, those with a share of 0 too") {
    const JudgedSet set = gathered(with_judgments(R"(
        {"set": "leaf", "by": "p3", "a": "a", "b": "b", "ratio": 2},
        {"set": "leaf", "by": "p1", "a": "a", "b": "b", "ratio": 3})"));
    REQUIRE(set.judges.size() == 2);
    CHECK(set.judges[0].person == "p1");
    CHECK(set.judges[1].person == "p3");
    CHECK(set.judges[1].share == 0);
}

TEST_CASE("judged set: judgments of items not asked for do not count, nor do those who have no others") {
    const Decision decision = with_judgments(R"(
        {"set": "leaf", "by": "p1", "a": "a", "b": "b", "ratio": 2},
        {"set": "leaf", "by": "p2", "a": "b", "b": "d", "ratio": 3})");
    const JudgedSet set = gathered(decision, {"d", "b", "c"});
    REQUIRE(set.judges.size() == 1);
    CHECK(set.judges[0].person == "p2");
    CHECK(set.judges[0].own.at(0, 1) == 1. / 3);
}

TEST_CASE("judged set: a person's pairs with an option he abstains on are dropped, agreed ones stay") {
    const Decision decision =
        with_judgments(R"(
        {"set": "leaf", "by": "p1", "a": "a", "b": "b", "ratio": 2},
        {"set": "leaf", "by": "p1", "a": "c", "b": "d", "ratio": 3},
        {"set": "leaf", "by": "p2", "a": "b", "b": "d", "ratio": 4},
        {"set": "leaf", "a": "b", "b": "c", "ratio": 5})",
                       R"({"id": "p1", "abstains": ["b"]}, {"id": "p2", "abstains": ["d", "a"]})");
    const JudgedSet set = gathered(decision);
    // All that p2 said holds an option he abstains on: he takes no part.
    REQUIRE(set.judges.size() == 1);
    CHECK(set.judges[0].own.judged_pairs() == std::vector<PairMatrix::Pair>{{2, 3}});
    CHECK(set.agreed.judged(1, 2));
    // The same ids as items that are no options are not dropped.
    CHECK(JudgmentsBySet(decision).gather("leaf", {"a", "b", "c", "d"}, false).judges.size() == 2);
}

TEST_CASE("a judge's matrix: agreed judgments stand in place of his own and fill his gaps") {
    const JudgedSet set = gathered(with_judgments(R"(
        {"set": "leaf", "by": "p1", "a": "a", "b": "b", "ratio": 2},
        {"set": "leaf", "by": "p1", "a": "b", "b": "c", "ratio": 3},
        {"set": "leaf", "a": "b", "b": "a", "ratio": 5},
        {"set": "leaf", "a": "c", "b": "d", "ratio": 6})"));
    REQUIRE(set.judges.size() == 1);
    const PairMatrix matrix = judge_matrix(set.judges[0], set.agreed);
    CHECK(matrix.at(1, 0) == 5);
    CHECK(matrix.at(1, 2) == 3);
    CHECK(matrix.at(2, 3) == 6);
    CHECK(matrix.judged_pairs().size() == 3);
    CHECK(set.judges[0].own.at(0, 1) == 2); // What he said himself is kept apart.
}

TEST_CASE("the group's matrix: geometric means by share, over those who judged the pair") {
    const PairMatrix group = group_matrix(gathered(with_judgments(R"(
        {"set": "leaf", "by": "p1", "a": "a", "b": "b", "ratio": 2},
        {"set": "leaf", "by": "p2", "a": "b", "b": "a", "ratio": 4},
        {"set": "leaf", "by": "p3", "a": "a", "b": "b", "ratio": 9},
        {"set": "leaf", "by": "p2", "a": "b", "b": "c", "ratio": 3},
        {"set": "leaf", "by": "p3", "a": "c", "b": "d", "ratio": 9})")));
    // Shares 1 and 3: (2 * 4^-3)^(1/4).
    CHECK_THAT(group.at(0, 1), WithinRel(std::pow(2. / 64, .25), 1e-14));
    CHECK_THAT(group.at(0, 1) * group.at(1, 0), WithinRel(1., 1e-15));
    CHECK(group.at(1, 2) == 3);      // One judge's ratio, as typed.
    CHECK_FALSE(group.judged(2, 3)); // Judged by nobody whose share counts.
}

TEST_CASE("the group's matrix: an agreed judgment stands in place of all persons'") {
    const PairMatrix group = group_matrix(gathered(with_judgments(R"(
        {"set": "leaf", "by": "p1", "a": "a", "b": "b", "ratio": 2},
        {"set": "leaf", "by": "p2", "a": "a", "b": "b", "ratio": 8},
        {"set": "leaf", "a": "b", "b": "a", "ratio": 5})")));
    CHECK(group.at(1, 0) == 5);
}

TEST_CASE("the group's matrix: the proportion of shares alone counts") {
    const std::string judgments = R"({"set": "leaf", "by": "p1", "a": "a", "b": "b", "ratio": 2},
        {"set": "leaf", "by": "p2", "a": "a", "b": "b", "ratio": 8})";
    const double small =
        group_matrix(gathered(with_judgments(judgments,
                                             R"({"id": "p1", "share": 1e-6}, {"id": "p2", "share": 2e-6})")))
            .at(0, 1);
    const double large =
        group_matrix(
            gathered(with_judgments(judgments, R"({"id": "p1", "share": 1e6}, {"id": "p2", "share": 2e6})")))
            .at(0, 1);
    CHECK_THAT(small, WithinRel(std::cbrt(2. * 64), 1e-14));
    CHECK_THAT(large, WithinRel(small, 1e-14));
}

TEST_CASE("the group's matrix: judges who contradict each other exactly cancel to 1") {
    const PairMatrix group = group_matrix(gathered(with_judgments(
        R"({"set": "leaf", "by": "p1", "a": "a", "b": "b", "ratio": 7}, {"set": "leaf", "by": "p2", "a": "b", "b": "a", "ratio": 7})",
        R"({"id": "p1"}, {"id": "p2"})")));
    CHECK_THAT(group.at(0, 1), WithinRel(1., 1e-15));
}

} // namespace steelyard
