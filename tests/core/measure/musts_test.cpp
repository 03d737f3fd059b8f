#include <catch_amalgamated.hpp>
#include <optional>
#include <string>

#include "core/measure/musts.hpp"
#include "tests/support/round_trip.hpp"

// Requirements on a node's worth need all options: tests/core/results/solve_musts_test.cpp.
namespace steelyard {

using Number = std::optional<double>;

namespace {

Requirement limits(Number at_least, Number at_most, Number min_worth = {}) {
    Requirement requirement;
    requirement.at_least = at_least;
    requirement.at_most = at_most;
    requirement.min_worth = min_worth;
    return requirement;
}

/// What is found of option o1 for the only requirement.
MustFinding finding(const std::string& requirement, const std::string& answers) {
    const Decision decision = test::read(R"({"format": "steelyard-decision", "version": 1,
        "options": [{"id": "o1"}, {"id": "o2"}], "people": [{"id": "p1"}, {"id": "p2"}],
        "criteria": {"id": "price", "rate": "figure", "curve": {"kind": "line", "worst": 9, "best": 1}},
        "requirements": [{"id": "r", )" + requirement +
                                         "}]" + (answers.empty() ? "" : ", " + answers) + "}");
    return find_must(decision, Figures(decision), decision.requirements[0], "o1");
}

std::string checks(const std::string& entries) {
    return R"("checks": [)" + entries + "]";
}

std::string check(const std::string& members) {
    return R"({"requirement": "r", "option": "o1", )" + members + "}";
}

} // namespace

TEST_CASE("limits: the limit itself is met") {
    CHECK(against_limits(limits({}, 80), 80, 80) == MustState::met);
    CHECK(against_limits(limits(80, {}), 80, 80) == MustState::met);
    CHECK(against_limits(limits(80, 80), 80, 80) == MustState::met);
}

TEST_CASE("limits: a value beyond either one fails") {
    CHECK(against_limits(limits({}, 80), 80.000001, 80.000001) == MustState::failed);
    CHECK(against_limits(limits(80, {}), 79.999999, 79.999999) == MustState::failed);
    CHECK(against_limits(limits(10, 20), 9, 9) == MustState::failed);
    CHECK(against_limits(limits(10, 20), 21, 21) == MustState::failed);
    CHECK(against_limits(limits(10, 20), 15, 15) == MustState::met);
}

TEST_CASE("limits: a range inside is met, one beyond fails, one across is undecided") {
    CHECK(against_limits(limits({}, 80), 70, 80) == MustState::met);
    CHECK(against_limits(limits({}, 80), 70, 81) == MustState::undecided);
    CHECK(against_limits(limits({}, 80), 81, 90) == MustState::failed);
    CHECK(against_limits(limits({}, 80), 80, 90) == MustState::undecided);
    CHECK(against_limits(limits(80, {}), 70, 79) == MustState::failed);
    CHECK(against_limits(limits(80, {}), 70, 80) == MustState::undecided);
    CHECK(against_limits(limits(10, 20), 5, 25) == MustState::undecided);
    CHECK(against_limits(limits(10, 20), 10, 20) == MustState::met);
    CHECK(against_limits(limits(10, 20), 1, 9) == MustState::failed);
    CHECK(against_limits(limits(10, 20), 21, 30) == MustState::failed);
}

TEST_CASE("limits: without any there is nothing to check") {
    CHECK(against_limits(limits({}, {}), 1, 1) == MustState::unchecked);
}

TEST_CASE("limits: of a least worth and a least value the stricter counts") {
    CHECK(against_limits(limits({}, {}, .6), .6, .6) == MustState::met);
    CHECK(against_limits(limits({}, {}, .6), .5, .5) == MustState::failed);
    CHECK(against_limits(limits(.7, {}, .6), .65, .65) == MustState::failed);
    CHECK(against_limits(limits(.5, {}, .6), .55, .55) == MustState::failed);
    CHECK(against_limits(limits({}, .8, .6), .9, .9) == MustState::failed);
}

TEST_CASE("musts on a figure: its value and range are those of the leaf") {
    const std::string price = R"("criterion": "price", "at_most": 80)";
    CHECK(finding(price, "").state == MustState::unchecked);
    const MustFinding met =
        finding(price, R"("figures": [{"criterion": "price", "option": "o1", "value": 61}])");
    CHECK(met.state == MustState::met);
    CHECK(met.value == 61);
    const MustFinding across = finding(
        price, R"("figures": [{"criterion": "price", "option": "o1", "value": 79, "low": 70, "high": 81}])");
    CHECK(across.state == MustState::undecided);
    CHECK(across.value == 79);
    const MustFinding failed =
        finding(price, R"("figures": [{"criterion": "price", "option": "o1", "value": 79},
                                              {"criterion": "price", "option": "o1", "value": 90}])");
    CHECK(failed.state == MustState::failed);
    CHECK(failed.value == 90);
}

TEST_CASE("musts on a figure: one end of the range may be all that is beyond the value") {
    const std::string price = R"("criterion": "price", "at_most": 80)";
    CHECK(finding(price, R"("figures": [{"criterion": "price", "option": "o1", "value": 79, "high": 81}])")
              .state == MustState::undecided);
    CHECK(finding(price, R"("figures": [{"criterion": "price", "option": "o1", "value": 81, "low": 79}])")
              .state == MustState::undecided);
    CHECK(finding(price, R"("figures": [{"criterion": "price", "option": "o1", "value": 81, "high": 90}])")
              .state == MustState::failed);
}

TEST_CASE("musts on a figure: a range without a value counts by its middle, half a range not at all") {
    const std::string price = R"("criterion": "price", "at_most": 80)";
    const MustFinding range =
        finding(price, R"("figures": [{"criterion": "price", "option": "o1", "low": 82, "high": 90}])");
    CHECK(range.state == MustState::failed);
    CHECK(range.value == 86);
    const MustFinding half =
        finding(price, R"("figures": [{"criterion": "price", "option": "o1", "low": 82}])");
    CHECK(half.state == MustState::unchecked);
    CHECK_FALSE(half.value.has_value());
}

TEST_CASE("musts on a figure: checks are not looked at") {
    CHECK(finding(R"("criterion": "price", "at_most": 80)", checks(check(R"("value": 5, "state": "met")")))
              .state == MustState::unchecked);
}

TEST_CASE("musts on checks: the last one stands, whoever made it") {
    const std::string noise = R"("at_most": 78)";
    CHECK(finding(noise,
                  checks(check(R"("value": 81, "by": "p1")") + ", " + check(R"("value": 74, "by": "p2")")))
              .state == MustState::met);
    const MustFinding failed =
        finding(noise, checks(check(R"("value": 74)") + ", " + check(R"("value": 81)")));
    CHECK(failed.state == MustState::failed);
    CHECK(failed.value == 81);
    CHECK(finding(noise, checks(R"({"requirement": "r", "option": "o2", "value": 81})")).state ==
          MustState::unchecked);
}

TEST_CASE("musts on checks: numbers speak before a stated state, which speaks where there are none") {
    const std::string noise = R"("at_most": 78)";
    CHECK(finding(noise, checks(check(R"("value": 81, "state": "met")"))).state == MustState::failed);
    CHECK(finding(noise, checks(check(R"("state": "met")"))).state == MustState::met);
    CHECK(finding(noise, checks(check(R"("state": "failed")"))).state == MustState::failed);
    CHECK(finding(noise, checks(check(R"("state": "asked")"))).state == MustState::asked);
    CHECK(finding(noise, checks(check(R"("source": "a letter")"))).state == MustState::unchecked);
    CHECK(finding(noise, checks(check(R"("low": 70, "state": "asked")"))).state == MustState::asked);
    // The last entry alone counts, though it says less.
    CHECK(finding(noise, checks(check(R"("value": 81)") + ", " + check(R"("state": "asked")"))).state ==
          MustState::asked);
}

TEST_CASE("musts of yes or no: the state of the last check, numbers are not looked at") {
    const std::string guard = R"("yes_no": true)";
    CHECK(finding(guard, "").state == MustState::unchecked);
    CHECK(finding(guard, checks(check(R"("state": "met")"))).state == MustState::met);
    CHECK(finding(guard, checks(check(R"("state": "met")") + ", " + check(R"("state": "failed")"))).state ==
          MustState::failed);
    CHECK(finding(guard, checks(check(R"("state": "asked")"))).state == MustState::asked);
    const MustFinding number = finding(guard, checks(check(R"("value": 3)")));
    CHECK(number.state == MustState::unchecked);
    CHECK_FALSE(number.value.has_value());
}

TEST_CASE("musts without a limit: nothing to check yet, whatever was stated") {
    CHECK(finding(R"("name": "to be settled")", checks(check(R"("value": 3)"))).state ==
          MustState::unchecked);
    CHECK(finding(R"("name": "to be settled")", checks(check(R"("state": "failed")"))).state ==
          MustState::unchecked);
    CHECK(finding(R"("criterion": "price")",
                  R"("figures": [{"criterion": "price", "option": "o1", "value": 61}])")
              .state == MustState::unchecked);
}

} // namespace steelyard
