#include <catch_amalgamated.hpp>
#include <cmath>
#include <string>
#include <vector>

#include "core/measure/cost_sheet.hpp"

// The annuity table itself is tests/external/annuity_test.cpp.
namespace steelyard {

using Catch::Matchers::WithinRel;

namespace {

constexpr double rounding = 1e-14;

Cost line(const std::string& name, CostKind kind, double value) {
    Cost cost;
    cost.line = name;
    cost.kind = kind;
    cost.value = value;
    return cost;
}

Cost in_year(int year, double value) {
    Cost cost = line("in year " + std::to_string(year), CostKind::in_year, value);
    cost.year = year;
    return cost;
}

CostSheet sheet_of(int years, double discount, CostResult result = CostResult::total) {
    CostSheet sheet;
    sheet.years = years;
    sheet.discount = discount;
    sheet.result = result;
    return sheet;
}

std::optional<double> figure(const CostSheet& sheet, const std::vector<Cost>& costs) {
    std::vector<const Cost*> entered;
    for (const Cost& cost : costs) entered.push_back(&cost);
    return cost_sheet_figure(sheet, standing_costs(entered));
}

} // namespace

TEST_CASE("cost sheet: no lines, no figure") {
    CHECK_FALSE(figure(sheet_of(10, .08), {}).has_value());
    Cost cleared = line("price", CostKind::once, 0);
    cleared.value.reset();
    CHECK_FALSE(figure(sheet_of(10, .08), {cleared}).has_value());
    CHECK_FALSE(figure(sheet_of(10, .08), {line("price", CostKind::once, 5), cleared}).has_value());
}

TEST_CASE("cost sheet: paid once, today, at its face value") {
    CHECK(figure(sheet_of(10, .08), {line("price", CostKind::once, 61500)}) == 61500);
    CHECK(figure(sheet_of(10, .08), {line("price", CostKind::once, 0)}) == 0);
}

TEST_CASE("cost sheet: yearly costs fall due at the end of each year") {
    const double expected = 100 / 1.1 + 100 / 1.21 + 100 / 1.331;
    CHECK_THAT(figure(sheet_of(3, .1), {line("energy", CostKind::per_year, 100)}).value(),
               WithinRel(expected, rounding));
}

TEST_CASE("cost sheet: without discounting years are counted") {
    CHECK(figure(sheet_of(7, 0), {line("energy", CostKind::per_year, 100)}) == 700);
    CHECK(figure(sheet_of(7, 0, CostResult::per_year), {line("price", CostKind::once, 700)}) == 100);
}

TEST_CASE("cost sheet: costs of a part fall due for a year's volume at a time") {
    CostSheet sheet = sheet_of(2, .1);
    sheet.volume = 12000;
    CHECK_THAT(figure(sheet, {line("tool", CostKind::per_part, .5)}).value(),
               WithinRel(6000 / 1.1 + 6000 / 1.21, rounding));
}

TEST_CASE("cost sheet: without a volume nothing can be told of parts") {
    const CostSheet total = sheet_of(2, .1);
    CHECK_FALSE(
        figure(total, {line("price", CostKind::once, 5), line("tool", CostKind::per_part, 1)}).has_value());
    CHECK_FALSE(
        figure(sheet_of(2, .1, CostResult::per_part), {line("price", CostKind::once, 5)}).has_value());
}

TEST_CASE("cost sheet: costs in one year are discounted to it, those after the end do not count") {
    CHECK_THAT(figure(sheet_of(5, .08), {in_year(3, 1000)}).value(),
               WithinRel(1000 / std::pow(1.08, 3), rounding));
    CHECK(figure(sheet_of(5, .08), {in_year(0, 1000)}) == 1000);
    CHECK_THAT(figure(sheet_of(5, .08), {in_year(5, 1000)}).value(),
               WithinRel(1000 / std::pow(1.08, 5), rounding));
    CHECK(figure(sheet_of(5, .08), {in_year(6, 1000)}) == 0);
    // What is paid back comes as a negative cost.
    CHECK_THAT(figure(sheet_of(5, .08), {line("price", CostKind::once, 1000), in_year(5, -200)}).value(),
               WithinRel(1000 - 200 / std::pow(1.08, 5), rounding));
}

TEST_CASE("cost sheet: a year is heeded only on costs in one year") {
    Cost price = line("price", CostKind::once, 1000);
    price.year = 4;
    CHECK(figure(sheet_of(5, .08), {price}) == 1000);
}

TEST_CASE("cost sheet: other currencies are converted") {
    Cost price = line("price", CostKind::once, 1000);
    price.currency = "USD";
    price.in_unit = .92;
    CHECK_THAT(figure(sheet_of(5, .08), {price}).value(), WithinRel(920., rounding));
}

TEST_CASE("cost sheet: the total, a year's share and a part's share, by hand") {
    // 10 years at 8 %: the annuity factor is 6.7101 (standard table), 12,000 parts a year.
    const double factor = (1 - std::pow(1.08, -10)) / .08;
    const double total = 50000 + 4150 * factor + .25 * 12000 * factor + 8000 / std::pow(1.08, 6);
    const std::vector<Cost> lines{line("price", CostKind::once, 50000),
                                  line("energy", CostKind::per_year, 4150),
                                  line("tools", CostKind::per_part, .25), in_year(6, 8000)};
    CostSheet sheet = sheet_of(10, .08);
    sheet.volume = 12000;
    CHECK_THAT(figure(sheet, lines).value(), WithinRel(total, rounding));
    sheet.result = CostResult::per_year;
    CHECK_THAT(figure(sheet, lines).value(), WithinRel(total / factor, rounding));
    sheet.result = CostResult::per_part;
    CHECK_THAT(figure(sheet, lines).value(), WithinRel(total / factor / 12000, rounding));
}

TEST_CASE("cost sheet: one year alone, two hundred years, and money that loses") {
    CHECK_THAT(figure(sheet_of(1, .25), {line("rent", CostKind::per_year, 100)}).value(),
               WithinRel(80., rounding));
    CHECK_THAT(figure(sheet_of(200, .05), {line("rent", CostKind::per_year, 100)}).value(),
               WithinRel(100 * (1 - std::pow(1.05, -200)) / .05, rounding));
    CHECK_THAT(figure(sheet_of(2, -.5), {line("rent", CostKind::per_year, 100)}).value(),
               WithinRel(200 + 400., rounding));
}

TEST_CASE("cost sheet: what no number can hold is no figure") {
    // (1 - .99)^-200 is 1e400, and a price of 1e300 in a currency of 1e300 is beyond a double too.
    const auto lost = figure(sheet_of(200, -.99), {line("rent", CostKind::per_year, 100)});
    CHECK(std::isfinite(lost.value_or(0)));
    const auto share =
        figure(sheet_of(200, -.99, CostResult::per_year), {line("price", CostKind::once, 100)});
    CHECK(std::isfinite(share.value_or(0)));
    Cost price = line("price", CostKind::once, 1e300);
    price.in_unit = 1e300;
    CHECK(std::isfinite(figure(sheet_of(5, 0), {price}).value_or(0)));
    Cost back = line("back", CostKind::once, -1e300);
    back.in_unit = 1e300;
    CHECK(std::isfinite(figure(sheet_of(5, 0), {price, back}).value_or(0)));
}

TEST_CASE("standing costs: the last entry of a line stands at the place of the first, cleared ones go") {
    const std::vector<Cost> costs{line("price", CostKind::once, 1), line("energy", CostKind::per_year, 2),
                                  line("price", CostKind::once, 3), line("service", CostKind::per_year, 4)};
    Cost cleared = line("energy", CostKind::per_year, 0);
    cleared.value.reset();
    const auto standing = standing_costs({&costs[0], &costs[1], &costs[2], &cleared, &costs[3]});
    CHECK(standing == std::vector<const Cost*>{&costs[2], &costs[3]});
    // What was cleared may come back.
    CHECK(standing_costs({&cleared, &costs[1]}) == std::vector<const Cost*>{&costs[1]});
    CHECK(standing_costs({}).empty());
}

} // namespace steelyard
