#include <catch_amalgamated.hpp>
#include <string>

#include "core/results/solve.hpp"
#include "tests/support/find_results.hpp"
#include "tests/support/round_trip.hpp"

// Lowest price divided by price is common practice in tenders, no source. The case is our own and small
// enough for a sheet of paper: half the weight on the price, half on a quality rated by grades.
//   with C:    A .5 * 90/150 + .5 * .88 = .74    B .5 * 90/180 + .5 * .99 = .745    C .5 + .5 * .20 = .60
//   without C: A .5 + .5 * .88 = .94             B .5 * 150/180 + .5 * .99 = .91166...
namespace steelyard {

using Catch::Matchers::WithinAbs;
using testing::rank_of;
using testing::score_of;

namespace {

Decision tender(bool c_withdrawn) {
    Decision decision = test::read(R"({"format": "steelyard-decision", "version": 1,
        "options": [{"id": "A"}, {"id": "B"}, {"id": "C"}],
        "criteria": {"id": "goal", "weights": "points", "children": [
            {"id": "price", "rate": "figure", "unit": "EUR", "curve": {"kind": "proportional", "better": "less"}},
            {"id": "quality", "rate": "grade", "grades": [
                {"id": "good", "worth": 0.88}, {"id": "best", "worth": 0.99}, {"id": "poor", "worth": 0.20}]}]},
        "points": [{"set": "goal", "points": {"price": 50, "quality": 50}}],
        "figures": [{"criterion": "price", "option": "A", "value": 150},
                    {"criterion": "price", "option": "B", "value": 180},
                    {"criterion": "price", "option": "C", "value": 90}],
        "grades": [{"criterion": "quality", "option": "A", "grade": "good"},
                   {"criterion": "quality", "option": "B", "grade": "best"},
                   {"criterion": "quality", "option": "C", "grade": "poor"}]})");
    decision.options[2].withdrawn = c_withdrawn;
    return decision;
}

constexpr double rounding = 1e-14;

} // namespace

TEST_CASE("a tender of lowest price over price: B leads A by half a point of a hundred") {
    const Results results = solve(tender(false));
    CHECK_THAT(score_of(results, "A"), WithinAbs(.74, rounding));
    CHECK_THAT(score_of(results, "B"), WithinAbs(.745, rounding));
    CHECK_THAT(score_of(results, "C"), WithinAbs(.60, rounding));
    CHECK(rank_of(results, "B") == 1);
    CHECK_THAT(results.lead_points.value(), WithinAbs(.5, 100 * rounding));
}

TEST_CASE("a tender of lowest price over price: without the cheapest, A leads B") {
    const Results results = solve(tender(true));
    CHECK(results.options == std::vector<Id>{"A", "B"});
    CHECK_THAT(score_of(results, "A"), WithinAbs(.94, rounding));
    CHECK_THAT(score_of(results, "B"), WithinAbs(.5 * 150 / 180 + .495, rounding));
    CHECK(rank_of(results, "A") == 1);
    CHECK_THAT(results.lead_points.value(), WithinAbs(2.8, .05)); // Told to one digit.
}

} // namespace steelyard
