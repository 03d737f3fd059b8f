#include <catch_amalgamated.hpp>
#include <string>

#include "core/measure/figures.hpp"
#include "tests/support/round_trip.hpp"

namespace steelyard {

using Catch::Matchers::WithinRel;

namespace {

Decision with_answers(const std::string& members) {
    return test::read(R"({"format": "steelyard-decision", "version": 1,
        "options": [{"id": "o1"}, {"id": "o2", "withdrawn": true}],
        "criteria": {"id": "goal", "children": [
            {"id": "price", "rate": "figure", "curve": {"kind": "line", "worst": 9, "best": 1}},
            {"id": "cost", "rate": "figure", "cost_sheet": {"years": 2, "discount": 0.1}}]}, )" +
                      members + "}");
}

} // namespace

TEST_CASE("figures: none is there before it is entered") {
    const Figures figures(with_answers(R"("figures": [])"));
    for (const char* leaf : {"price", "cost"}) {
        const StandingFigure figure = figures.of(leaf, "o1");
        CHECK_FALSE(figure.value.has_value());
        CHECK_FALSE(figure.low.has_value());
        CHECK_FALSE(figure.high.has_value());
    }
}

TEST_CASE("figures: the last entry of a place stands, with its own range only") {
    const Figures figures(with_answers(R"("figures": [
        {"criterion": "price", "option": "o1", "value": 7, "low": 6, "high": 8},
        {"criterion": "price", "option": "o2", "value": 3, "low": 2},
        {"criterion": "price", "option": "o1", "value": 5}])"));
    CHECK(figures.of("price", "o1").value == 5);
    CHECK_FALSE(figures.of("price", "o1").low.has_value());
    CHECK_FALSE(figures.of("price", "o1").high.has_value());
    CHECK(figures.of("price", "o2").value == 3);
    CHECK(figures.of("price", "o2").low == 2);
}

TEST_CASE("figures: an entry without a value clears the place, and a later one fills it again") {
    const std::string cleared = R"({"criterion": "price", "option": "o1", "value": 7},
                                   {"criterion": "price", "option": "o1", "note": "withdrawn"})";
    CHECK_FALSE(Figures(with_answers(R"("figures": [)" + cleared + "]")).of("price", "o1").value.has_value());
    const Figures again(with_answers(R"("figures": [)" + cleared +
                                     R"(, {"criterion": "price", "option": "o1", "value": 6}])"));
    CHECK(again.of("price", "o1").value == 6);
}

TEST_CASE("figures: a cost sheet's are computed, for withdrawn options too") {
    const Figures figures(with_answers(R"("costs": [
        {"criterion": "cost", "option": "o1", "line": "price", "kind": "once", "value": 900},
        {"criterion": "cost", "option": "o1", "line": "price", "kind": "once", "value": 1000},
        {"criterion": "cost", "option": "o2", "line": "rent", "kind": "per_year", "value": 121}])"));
    CHECK(figures.of("cost", "o1").value == 1000);
    CHECK_THAT(figures.of("cost", "o2").value.value(), WithinRel(110. + 100, 1e-14));
}

TEST_CASE("figures: those entered on a cost sheet's leaf, and costs on another, are passed over") {
    const Figures figures(with_answers(R"("figures": [
        {"criterion": "cost", "option": "o1", "value": 5}, {"criterion": "cost", "option": "o2", "value": 5}],
        "costs": [{"criterion": "cost", "option": "o1", "line": "price", "kind": "once", "value": 1000},
                  {"criterion": "price", "option": "o1", "line": "price", "kind": "once", "value": 1000}])"));
    CHECK(figures.of("cost", "o1").value == 1000);
    CHECK_FALSE(figures.of("cost", "o2").value.has_value());
    CHECK_FALSE(figures.of("price", "o1").value.has_value());
}

} // namespace steelyard
