#include <catch_amalgamated.hpp>
#include <cmath>
#include <limits>
#include <string>
#include <vector>

#include "core/results/disagreements.hpp"
#include "core/results/solve.hpp"
#include "tests/support/close.hpp"
#include "tests/support/judged_decisions.hpp"
#include "tests/support/random_decision.hpp"
#include "tests/support/round_trip.hpp"

namespace steelyard {

using Catch::Matchers::WithinAbs;
using testing::judgment;
using testing::judgments;

namespace {

/// Two criteria and their figures; o1 is worth .9 and .1, o2 .2 and .6 on them. p1 and p2 differ on how much
/// more the first one counts.
Decision two_criteria(const std::string& people, const std::string& list, const std::string& more = "") {
    return test::read(R"({"format": "steelyard-decision", "version": 1,
        "options": [{"id": "o1"}, {"id": "o2"}], "people": [)" +
                      people +
                      R"(], "criteria": {"id": "goal", "children": [
            {"id": "a", "rate": "figure", "curve": {"kind": "line", "worst": 0, "best": 1}},
            {"id": "b", "rate": "figure", "curve": {"kind": "line", "worst": 0, "best": 1}}]},
        "figures": [{"criterion": "a", "option": "o1", "value": 0.9}, {"criterion": "b", "option": "o1", "value": 0.1},
                    {"criterion": "a", "option": "o2", "value": 0.2}, {"criterion": "b", "option": "o2", "value": 0.6}],
        )" + list + more +
                      "}");
}

const std::string two_people = R"({"id": "p1"}, {"id": "p2"})";

std::vector<Disagreement> found(const Decision& decision) {
    SolveCache cache;
    return disagreements(decision, solve(decision, cache), cache);
}

} // namespace

// The lead of o1 at weights w and 1 - w is .7 w - .5 (1 - w) = 1.2 w - .5. The group's ratio sqrt(9/4) = 1.5
// gives w = .6 and a lead of 22 points; p1's 9 w = .9 and 58; p2's 1/4 w = .2 and -26.
TEST_CASE("disagreements: what either side does to the standing, by hand") {
    for (const char* combine : {"judgments", "priorities"}) { // The same for two items.
        INFO(combine);
        const Decision decision = two_criteria(
            two_people,
            judgments({judgment("goal", "p1", "a", "b", "9"), judgment("goal", "p2", "b", "a", "4")}),
            R"(, "settings": {"combine": ")" + std::string(combine) + "\"}");
        const auto list = found(decision);
        REQUIRE(list.size() == 1);
        const auto& [first, second] = list[0].sides;
        CHECK(list[0].spread == 0);
        CHECK(list[0].moves_first());
        CHECK(first.judge == "p1");
        CHECK(first.ratio == 9);
        CHECK(first.first == "o1");
        CHECK_FALSE(first.first_moves);
        CHECK_THAT(first.lead_moves.value(), WithinAbs(58 - 22, 1e-12));
        CHECK(second.judge == "p2");
        CHECK(second.ratio == .25);
        CHECK(second.first == "o2");
        CHECK(second.first_moves);
        CHECK_THAT(second.lead_moves.value(), WithinAbs(-26 - 22, 1e-12));
        CHECK_THAT(list[0].lead_movement(), WithinAbs(48, 1e-12));
    }
}

TEST_CASE("disagreements: where it does not matter, and where there is none") {
    const Decision slight = two_criteria(two_people, judgments({judgment("goal", "p1", "a", "b", "2"),
                                                                judgment("goal", "p2", "a", "b", "1")}));
    const auto list = found(slight);
    REQUIRE(list.size() == 1);
    CHECK_FALSE(list[0].moves_first());
    CHECK(list[0].lead_movement() > 0);
    CHECK(found(two_criteria(two_people, judgments({judgment("goal", "p1", "a", "b", "2"),
                                                    judgment("goal", "p2", "a", "b", "2")})))
              .empty());
    CHECK(found(two_criteria(two_people, judgments({judgment("goal", "p1", "a", "b", "2")}))).empty());
}

TEST_CASE("disagreements: an option that a side would exclude loses first place, and more than any lead") {
    // With p2's ratio o1 is worth .2 * .9 + .8 * .1 = .26, under the must.
    const Decision decision = two_criteria(
        two_people, judgments({judgment("goal", "p1", "a", "b", "9"), judgment("goal", "p2", "b", "a", "4")}),
        R"(, "requirements": [{"id": "r", "node": "goal", "min_worth": 0.3}])");
    const auto list = found(decision);
    REQUIRE(list.size() == 1);
    CHECK(list[0].sides[1].first_moves);
    CHECK(list[0].sides[1].first == "o2");
    CHECK_FALSE(list[0].sides[1].lead_moves.has_value());
    CHECK(list[0].lead_movement() == std::numeric_limits<double>::infinity());
    // With p1's ratio o2 is out and o1 alone.
    CHECK_FALSE(list[0].sides[0].first_moves);
    CHECK_FALSE(list[0].sides[0].lead_moves.has_value());
}

TEST_CASE(
    "disagreements: every one is what an agreed judgment would do, the weightiest first, step by step") {
    int looked_at = 0;
    int moving = 0;
    for (std::uint64_t seed = 1; seed <= testing::cases(150); ++seed) {
        INFO("seed " << seed);
        const Decision decision = testing::random_decision(seed);
        SolveCache cache;
        const Results results = solve(decision, cache);
        DisagreementSearch search(decision, results, cache);
        std::size_t steps = 0;
        double before = -1;
        while (search.progress() < 1) {
            CHECK(search.progress() > before);
            before = search.progress();
            CHECK(search.step());
            CHECK(search.found().size() == ++steps);
        }
        CHECK_FALSE(search.step());
        const auto& list = search.found();
        for (std::size_t k = 0; k < list.size(); ++k) {
            const Spread& spread = results.group->spreads[list[k].spread];
            CHECK(spread.gsd > 1);
            if (k > 0) {
                CHECK(list[k - 1].moves_first() >= list[k].moves_first());
                if (list[k - 1].moves_first() == list[k].moves_first())
                    CHECK(list[k - 1].lead_movement() >= list[k].lead_movement() - 1e-9);
            }
            if (k >= 3) continue; // Solving anew takes longer.
            for (const auto& side : list[k].sides) {
                Decision agreed = decision;
                agreed.judgments.push_back(
                    {.set = spread.set, .a = spread.a, .b = spread.b, .ratio = side.ratio});
                const Results then = solve(agreed);
                CHECK(then.first.has_value() == side.first.has_value());
                if (then.first) CHECK(then.options[*then.first] == *side.first);
                ++looked_at;
                moving += side.first_moves ? 1 : 0;
                if (side.first_moves || !side.lead_moves) continue;
                CHECK_THAT(*then.lead_points - *results.lead_points, WithinAbs(*side.lead_moves, 1e-6));
            }
        }
    }
    if (testing::cases(150) == 150) {
        CHECK(looked_at > 200);
        CHECK(moving > 10);
    }
}

} // namespace steelyard
