#include <array>
#include <catch_amalgamated.hpp>
#include <cmath>
#include <string>
#include <vector>

#include "core/judgment/random_index.hpp"
#include "core/results/solve.hpp"
#include "tests/support/close.hpp"
#include "tests/support/find_results.hpp"
#include "tests/support/judged_decisions.hpp"
#include "tests/support/pairs.hpp"
#include "tests/support/round_trip.hpp"

// What the results say of sets of pairs: judges, combination, methods, indices, what is open.
namespace steelyard {

using Catch::Matchers::WithinAbs;
using testing::check_close;
using testing::criteria;
using testing::judgment;
using testing::judgments;
using testing::leaf_of;
using testing::noticed_at;
using testing::open_words;
using testing::options;
using testing::set_of;
using Pairs = std::vector<std::array<Id, 2>>;
using Words = std::vector<std::string>;

namespace {

constexpr double rounding = 1e-14;

const std::string full_p1 = judgment("goal", "p1", "a", "b", "2") + ", " +
                            judgment("goal", "p1", "b", "c", "3") + ", " +
                            judgment("goal", "p1", "a", "c", "6");

const std::vector<double> w_p1{.6, .3, .1};

} // namespace

TEST_CASE("sets: an entry for the group first, then one for each judge who takes part") {
    const Results results = criteria(judgments({judgment("goal", "p3", "a", "b", "5"), full_p1}));
    REQUIRE(results.sets.size() == 3);
    CHECK(results.sets[0].by.empty());
    CHECK(results.sets[1].by == "p1");
    CHECK(results.sets[2].by == "p3");
    // The share of p3 is 0: he has an entry, the group does not hear him.
    check_close(results.sets[0].weights.value(), w_p1, rounding);
    CHECK_FALSE(results.sets[2].weights.has_value());
    CHECK(results.sets[2].missing == Pairs{{"a", "c"}, {"b", "c"}});
}

TEST_CASE("sets: agreed judgments alone make one entry") {
    const Results results =
        criteria(judgments({judgment("goal", "", "a", "b", "2"), judgment("goal", "", "b", "c", "3")}));
    REQUIRE(results.sets.size() == 1);
    check_close(results.sets[0].weights.value(), w_p1, rounding);
    CHECK(results.sets[0].missing == Pairs{{"a", "c"}});
}

TEST_CASE("sets: agreed judgments stand in a judge's entry in place of his own") {
    const Results results = criteria(judgments({full_p1, judgment("goal", "", "b", "a", "2")}));
    const SetResult& own = set_of(results, "goal", "p1");
    CHECK(own.missing.empty());
    check_close(own.weights.value(), set_of(results, "goal").weights.value(), 0);
    REQUIRE(own.misfits.size() == 3);
    for (const auto& misfit : own.misfits) {
        if (misfit.a == "a" && misfit.b == "b") CHECK(misfit.given == .5);
    }
    // Overridden in everything he said, he still takes part.
    CHECK(set_of(criteria(
                     judgments({judgment("goal", "p1", "a", "b", "4"), judgment("goal", "", "a", "b", "2")})),
                 "goal", "p1")
              .by == "p1");
}

TEST_CASE("sets: combined judgments weigh by share, pair by pair") {
    const Results results = criteria(judgments({full_p1, judgment("goal", "p2", "a", "b", "4")}));
    // a:b is (2 * 4^3)^(1/4), the others are p1's alone.
    const PairMatrix pairs = testing::upper_triangle(3, {std::pow(128, .25), 6, 3});
    check_close(set_of(results, "goal").weights.value(), weights_by(Method::eigenvector, pairs).value(),
                rounding);
    CHECK(set_of(results, "goal").missing.empty());
    CHECK_FALSE(set_of(results, "goal", "p2").weights.has_value());
}

TEST_CASE("sets: combined priorities are the weighted geometric mean of the judges' weights") {
    const std::string p2 = judgment("goal", "p2", "b", "a", "2") + ", " +
                           judgment("goal", "p2", "b", "c", "1") + ", " +
                           judgment("goal", "p2", "c", "a", "2");
    const std::vector<double> w_p2{.2, .4, .4};
    const Results geometric = criteria(judgments({full_p1, p2}), R"("combine": "priorities")");
    std::vector<double> expected;
    for (std::size_t i = 0; i < 3; ++i)
        expected.push_back(std::pow(w_p1[i] * w_p2[i] * w_p2[i] * w_p2[i], .25));
    check_close(set_of(geometric, "goal").weights.value(), testing::normalised(expected), rounding);
    const Results arithmetic = criteria(judgments({full_p1, p2}), R"("combine": "priorities-arithmetic")");
    check_close(set_of(arithmetic, "goal").weights.value(), {.3, .375, .325}, rounding);
    // Indices are those of the combined judgments in every mode.
    const Results combined = criteria(judgments({full_p1, p2}));
    CHECK(set_of(arithmetic, "goal").cr == set_of(combined, "goal").cr);
    CHECK(set_of(arithmetic, "goal").lambda_max == set_of(combined, "goal").lambda_max);
    CHECK_THAT(set_of(combined, "goal").koczkodaj.value(),
               WithinAbs(set_of(arithmetic, "goal").koczkodaj.value(), 0));
    CHECK(leaf_of(arithmetic, "a").weight == set_of(arithmetic, "goal").weights->at(0));
}

TEST_CASE("sets: combining priorities, every method is combined likewise") {
    const std::string wild = judgment("goal", "p2", "a", "b", "9") + ", " +
                             judgment("goal", "p2", "b", "c", "9") + ", " +
                             judgment("goal", "p2", "c", "a", "9");
    const Results results =
        criteria(judgments({full_p1, wild}), R"("combine": "priorities", "method": "geometric-mean")");
    const SetResult& group = set_of(results, "goal");
    CHECK(group.weights == group.geometric_mean);
    const SetResult& one = set_of(results, "goal", "p1");
    const SetResult& other = set_of(results, "goal", "p2");
    check_close(group.eigenvector.value(),
                combine_weights({one.eigenvector.value(), other.eigenvector.value()}, {1, 3}, false),
                rounding);
    check_close(group.column_average.value(),
                combine_weights({one.column_average.value(), other.column_average.value()}, {1, 3}, false),
                rounding);
}

TEST_CASE("sets: combining priorities, a judge whose own answers do not connect is left out, with a notice") {
    const Results results =
        criteria(judgments({full_p1, judgment("goal", "p2", "a", "b", "9")}), R"("combine": "priorities")");
    check_close(set_of(results, "goal").weights.value(), w_p1, rounding);
    CHECK(noticed_at(results, "judge-left-out") == Words{"/criteria"});
    CHECK(noticed_at(results, "judgments-combined").empty());
}

TEST_CASE("sets: combining priorities, a judge with a share of 0 is not counted and not missed") {
    const Results results =
        criteria(judgments({full_p1, judgment("goal", "p3", "a", "b", "9")}), R"("combine": "priorities")");
    check_close(set_of(results, "goal").weights.value(), w_p1, rounding);
    CHECK(noticed_at(results, "judge-left-out").empty());
}

TEST_CASE("sets: combining priorities, where no judge is left the judgments are combined, with a notice") {
    const Results results =
        criteria(judgments({judgment("goal", "p1", "a", "b", "2"), judgment("goal", "p2", "b", "c", "3")}),
                 R"("combine": "priorities")");
    check_close(set_of(results, "goal").weights.value(), w_p1, rounding);
    CHECK(noticed_at(results, "judge-left-out").size() == 2);
    CHECK(noticed_at(results, "judgments-combined") == Words{"/criteria"});
}

TEST_CASE("sets: combining priorities, agreed judgments complete each judge's own") {
    const Results results =
        criteria(judgments({judgment("goal", "p1", "a", "b", "2"), judgment("goal", "p2", "a", "b", "1"),
                            judgment("goal", "", "b", "c", "1")}),
                 R"("combine": "priorities-arithmetic")");
    // .5 .25 .25 of share 1 and thirds of share 3.
    check_close(set_of(results, "goal").weights.value(), {.375, .3125, .3125}, rounding);
    // Agreed judgments alone are one matrix whatever the mode.
    const Results agreed =
        criteria(judgments({judgment("goal", "", "a", "b", "2"), judgment("goal", "", "b", "c", "3")}),
                 R"("combine": "priorities")");
    check_close(set_of(agreed, "goal").weights.value(), w_p1, rounding);
    CHECK(agreed.sets.size() == 1);
}

TEST_CASE("sets: averaged columns on an incomplete set give no weights, a notice, and equal criteria") {
    const Results results =
        criteria(judgments({judgment("goal", "", "a", "b", "2"), judgment("goal", "", "b", "c", "3")}),
                 R"("method": "column-average")");
    const SetResult& group = set_of(results, "goal");
    CHECK_FALSE(group.weights.has_value());
    CHECK_FALSE(group.column_average.has_value());
    check_close(group.eigenvector.value(), w_p1, rounding);
    CHECK(group.cr == std::nullopt); // A tree cannot contradict itself.
    CHECK(group.lambda_max.has_value());
    CHECK_THAT(leaf_of(results, "a").weight, WithinAbs(1. / 3, rounding));
    CHECK(results.provisional);
    CHECK(noticed_at(results, "method-needs-all-pairs") == Words{"/criteria"});
    CHECK(open_words(results) == Words{"judgment goal a c"});
}

TEST_CASE("sets: averaged columns on options leave nobody with a value") {
    const Results results = options(
        R"({"id": "o1"}, {"id": "o2"}, {"id": "o3"})",
        R"("settings": {"method": "column-average"}, )" +
            judgments({judgment("goal", "", "o1", "o2", "2"), judgment("goal", "", "o2", "o3", "2")}));
    CHECK(leaf_of(results, "goal").missing == std::vector<bool>(3, true));
    CHECK(results.provisional);
}

TEST_CASE("sets: weights are those of the method chosen") {
    const std::string wild =
        judgments({judgment("goal", "", "a", "b", "9"), judgment("goal", "", "b", "c", "5"),
                   judgment("goal", "", "a", "c", "2")});
    for (const char* method : {"eigenvector", "geometric-mean", "column-average"}) {
        const Results results = criteria(wild, R"("method": ")" + std::string(method) + "\"");
        const SetResult& group = set_of(results, "goal");
        const auto& expected = std::string(method) == "eigenvector"      ? group.eigenvector
                               : std::string(method) == "geometric-mean" ? group.geometric_mean
                                                                         : group.column_average;
        INFO(method);
        CHECK(group.weights == expected);
        CHECK_THAT(leaf_of(results, "b").weight, WithinAbs(expected->at(1), 0));
    }
}

TEST_CASE("sets: HOUSE, told by its items") {
    // The values and their sources: tests/external/house_test.cpp.
    const PairMatrix pairs = testing::house_pairs();
    Decision decision =
        test::read(R"({"format": "steelyard-decision", "version": 1, "options": [{"id": "o1"}],
        "criteria": {"id": "goal", "children": [{"id": "h1"}, {"id": "h2"}, {"id": "h3"}, {"id": "h4"}, {"id": "h5"},
            {"id": "h6"}, {"id": "h7"}, {"id": "h8"}]}, "settings": {"method": "column-average"}})");
    for (const auto& [i, j] : pairs.judged_pairs()) {
        Judgment said;
        said.set = "goal";
        said.a = "h" + std::to_string(i + 1);
        said.b = "h" + std::to_string(j + 1);
        said.ratio = pairs.at(i, j);
        decision.judgments.push_back(said);
    }
    const Results results = solve(decision);
    const SetResult& house = set_of(results, "goal");
    CHECK_THAT(house.lambda_max.value(), WithinAbs(9.669, .0005));
    CHECK_THAT(house.lambda_hand.value(), WithinAbs(9.618, .0005));
    CHECK_THAT(house.cr.value(), WithinAbs(.17, .005));
    CHECK_THAT(house.gci.value(), WithinAbs(.5292, .00005));
    CHECK_THAT(house.koczkodaj.value(), WithinAbs(.98148, .000005));
    CHECK(house.worst_triad == std::array<Id, 3>{"h1", "h3", "h7"});
    CHECK(house.cycles == std::vector<std::array<Id, 3>>{{"h1", "h3", "h7"}});
    CHECK(house.tied_cycles.empty());
    CHECK(house.misfits.at(0).a == "h3");
    CHECK(house.misfits.at(0).b == "h7");
    CHECK(house.misfits.at(0).given == 6);
    CHECK_THAT(house.misfits.at(0).implied.value(),
               WithinAbs(.4595, .00005)); // Columns need all: by eigenvector.
    CHECK(noticed_at(results, "over-limit") == Words{"/criteria"});
}

TEST_CASE("sets: two items have an index of 0, no random index and no ratio") {
    const Results results =
        options(R"({"id": "o1"}, {"id": "o2"})", judgments({judgment("goal", "", "o1", "o2", "3")}));
    const SetResult& pair = set_of(results, "goal");
    CHECK(pair.ci == 0);
    CHECK_FALSE(pair.ri.has_value());
    CHECK_FALSE(pair.cr.has_value());
    CHECK_FALSE(pair.gci.has_value());
    CHECK_FALSE(pair.koczkodaj.has_value());
    REQUIRE(pair.misfits.size() == 1);
    CHECK_FALSE(pair.misfits[0].implied.has_value());
    CHECK(noticed_at(results, "no-ratio").empty()); // Nobody expects one.
}

TEST_CASE("sets: a set that does not connect has no index but those of its full triads") {
    const Results results =
        options(R"({"id": "o1"}, {"id": "o2"}, {"id": "o3"}, {"id": "o4"})",
                judgments({judgment("goal", "", "o1", "o2", "2"), judgment("goal", "", "o2", "o3", "2"),
                           judgment("goal", "", "o3", "o1", "2")}));
    const SetResult& set = set_of(results, "goal");
    CHECK_FALSE(set.weights.has_value());
    CHECK_FALSE(set.eigenvector.has_value());
    CHECK_FALSE(set.geometric_mean.has_value());
    CHECK_FALSE(set.column_average.has_value());
    CHECK_FALSE(set.lambda_max.has_value());
    CHECK_FALSE(set.ci.has_value());
    CHECK_FALSE(set.ri.has_value());
    CHECK_FALSE(set.cr.has_value());
    CHECK_FALSE(set.gci.has_value());
    CHECK(set.misfits.empty());
    CHECK(set.koczkodaj.has_value());
    CHECK(set.cycles == std::vector<std::array<Id, 3>>{{"o1", "o2", "o3"}});
}

TEST_CASE("sets: the random index of an incomplete set is reduced, and none at a spanning tree") {
    std::vector<std::string> list{judgment("goal", "", "o1", "o2", "2"),
                                  judgment("goal", "", "o2", "o3", "2"),
                                  judgment("goal", "", "o3", "o4", "2")};
    const std::string four = R"({"id": "o1"}, {"id": "o2"}, {"id": "o3"}, {"id": "o4"})";
    const Results tree = options(four, judgments(list));
    CHECK_FALSE(set_of(tree, "goal").ri.has_value());
    CHECK_FALSE(set_of(tree, "goal").cr.has_value());
    CHECK_THAT(set_of(tree, "goal").ci.value(), WithinAbs(0, rounding));
    CHECK(noticed_at(tree, "no-ratio") == Words{"/criteria"});
    list.push_back(judgment("goal", "", "o1", "o3", "2"));
    const Results more = options(four, judgments(list));
    CHECK_THAT(set_of(more, "goal").ri.value(), WithinAbs(.8815 / 3, rounding));
    CHECK(set_of(more, "goal").cr == set_of(more, "goal").ci.value() / set_of(more, "goal").ri.value());
    CHECK_FALSE(set_of(more, "goal").gci.has_value());
    CHECK(noticed_at(more, "no-ratio").empty());
}

TEST_CASE("sets: beyond the older table there is no ratio, and a notice says so") {
    std::string items;
    for (int i = 0; i < 11; ++i)
        items += std::string(i == 0 ? "" : ", ") + R"({"id": "o)" + std::to_string(i) + "\"}";
    std::vector<std::string> list;
    for (int i = 0; i < 11; ++i) {
        for (int j = i + 1; j < 11; ++j)
            list.push_back(judgment("goal", "", "o" + std::to_string(i), "o" + std::to_string(j), "1"));
    }
    const Results older = options(items, R"("settings": {"random_index": "saaty-1980"}, )" + judgments(list));
    CHECK_FALSE(set_of(older, "goal").ri.has_value());
    CHECK_FALSE(set_of(older, "goal").cr.has_value());
    CHECK(set_of(older, "goal").gci == 0);
    CHECK(noticed_at(older, "no-ratio") == Words{"/criteria"});
    const Results newer = options(items, judgments(list));
    CHECK(set_of(newer, "goal").ri == random_index(RandomIndexTable::alonso_lamata_2006, 11));
}

TEST_CASE("sets: pairs skipped in the room, or by every judge, are not open while the set has weights") {
    const std::string both = judgment("goal", "p1", "a", "b", "2") + ", " +
                             judgment("goal", "p1", "b", "c", "3") + ", " +
                             judgment("goal", "p2", "a", "b", "2");
    const auto open_with = [&](const std::string& finished) {
        return open_words(criteria(judgments({both}) + R"(, "finished": [)" + finished + "]"));
    };
    const std::string p1 = R"({"set": "goal", "by": "p1", "skipped": [["c", "a"]]})";
    const std::string p2 = R"({"set": "goal", "by": "p2", "skipped": [["b", "c"], ["a", "c"]]})";
    CHECK(open_with("") == Words{"judgment goal a c"});
    CHECK(open_with(R"({"set": "goal", "skipped": [["a", "c"]]})").empty());
    CHECK(open_with(p1) == Words{"judgment goal a c"});
    CHECK(open_with(p1 + ", " + p2).empty());
    CHECK(open_with(R"({"set": "goal", "skipped": []})") == Words{"judgment goal a c"});
    // Somebody who takes no part cannot skip.
    CHECK(open_with(R"({"set": "goal", "by": "p3", "skipped": [["a", "c"]]})") == Words{"judgment goal a c"});
}

TEST_CASE("sets: a skipped pair is open after all where the set has no weights") {
    const Results results =
        criteria(judgments({judgment("goal", "p1", "a", "b", "2")}) +
                 R"(, "finished": [{"set": "goal", "skipped": [["a", "c"], ["b", "c"]]}])");
    CHECK(open_words(results) == Words{"judgment goal a c", "judgment goal b c"});
}

TEST_CASE("sets: in the order of the tree, whatever kind they are") {
    const Results results = solve(test::read(R"({"format": "steelyard-decision", "version": 1,
        "options": [{"id": "o1"}, {"id": "o2"}], "criteria": {"id": "goal", "children": [
            {"id": "x"}, {"id": "y", "weights": "points", "children": [
                {"id": "z", "rate": "grade", "worths": "pairs", "grades": [{"id": "g1"}, {"id": "g2"}]},
                {"id": "u"}]}]}})"));
    std::vector<Id> order;
    for (const auto& set : results.sets) order.push_back(set.set);
    CHECK(order == std::vector<Id>{"goal", "x", "y", "z", "u"});
}

} // namespace steelyard
