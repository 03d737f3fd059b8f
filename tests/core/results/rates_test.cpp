#include "core/results/rates.hpp"

#include <algorithm>
#include <catch_amalgamated.hpp>
#include <cmath>
#include <cstdint>

#include "core/decision/lookup.hpp"
#include "core/measure/figures.hpp"
#include "core/results/lead.hpp"
#include "core/results/solve.hpp"
#include "tests/support/random_decision.hpp"
#include "tests/support/round_trip.hpp"

namespace steelyard {

using Catch::Matchers::WithinAbs;
using Catch::Matchers::WithinRel;

namespace {

/// Two criteria beside the price, weights 50, 30 and 20.
Decision presses(const std::string& price_curve, const std::string& more = "") {
    return test::read(R"({"format": "steelyard-decision", "version": 1,
        "options": [{"id": "A"}, {"id": "B"}],
        "criteria": {"id": "goal", "weights": "points", "children": [
            {"id": "price", "rate": "figure", "unit": "EUR", "curve": )" +
                      price_curve + R"(},
            {"id": "weeks", "rate": "figure", "curve": {"kind": "line", "worst": 20, "best": 0}},
            {"id": "service", "rate": "grade", "grades": [
                {"id": "day", "worth": 1}, {"id": "week", "worth": 0.4}, {"id": "none", "worth": 0}]}]},
        "points": [{"set": "goal", "points": {"price": 50, "weeks": 30, "service": 20}}],
        "figures": [{"criterion": "price", "option": "A", "value": 60000},
                    {"criterion": "price", "option": "B", "value": 70000},
                    {"criterion": "weeks", "option": "A", "value": 8},
                    {"criterion": "weeks", "option": "B", "value": 10}],
        "grades": [{"criterion": "service", "option": "A", "grade": "week"},
                   {"criterion": "service", "option": "B", "grade": "day"}],
        "settings": {"money": "price"})" +
                      more + "}");
}

double rate_of(const Rates& rates, const Id& leaf) {
    for (const auto& rate : rates.rates) {
        if (rate.leaf == leaf) return rate.per_unit.value();
    }
    throw std::runtime_error("no rate of " + leaf);
}

/// The decision with another figure.
Decision with_figure(Decision d, const Id& leaf, const Id& option, double x) {
    Figure figure;
    figure.criterion = leaf;
    figure.option = option;
    figure.value = x;
    d.figures.push_back(std::move(figure));
    return d;
}

/// The first leaf of figures that people state, where none is chosen.
void choose_money(Decision& d) {
    if (!d.settings.money.empty()) return;
    for (const Node* leaf : leaves(d.criteria)) {
        if (leaf->rate != RateBy::figure || leaf->cost_sheet) continue;
        d.settings.money = leaf->id;
        return;
    }
}

} // namespace

// By hand: a euro is .5/50000 of a score, a week .3/20, so a week costs 1,500 EUR; a step from week to day is
// .2 * .6, that is 12,000 EUR, one from none to week 8,000 EUR, and the cheaper counts.
TEST_CASE("rates: on straight lines they are ratios of slopes") {
    const Decision d = presses(R"({"kind": "line", "worst": 90000, "best": 40000})");
    const Results results = solve(d);
    REQUIRE(results.rates);
    const Rates at_a = rates_at(d, results, "A").value();
    CHECK_THAT(rate_of(at_a, "weeks"), WithinRel(-1500, 1e-12));
    CHECK_THAT(rate_of(at_a, "service"), WithinRel(8000, 1e-12));
    CHECK_THAT(rate_of(rates_at(d, results, "B").value(), "service"), WithinRel(12000, 1e-12));
}

TEST_CASE("rates: a rate cancels: one unit worse and its price better leave the score where it was") {
    const Decision d = presses(R"({"kind": "line", "worst": 90000, "best": 40000})");
    const double before = solve(d).scores[0];
    const double rate = rate_of(rates_at(d, solve(d), "A").value(), "weeks");
    const Decision after = with_figure(with_figure(d, "weeks", "A", 9), "price", "A", 60000 + rate);
    CHECK_THAT(solve(after).scores[0], WithinAbs(before, 1e-12));
}

TEST_CASE("rates: none without a money criterion, and none where money is flat") {
    Decision d = presses(R"({"kind": "line", "worst": 90000, "best": 65000})");
    const Results flat = solve(d); // A's price is beyond the best anchor.
    const Rates at_a = rates_at(d, flat, "A").value();
    for (const auto& rate : at_a.rates) CHECK_FALSE(rate.per_unit);
    d.settings.money.clear();
    CHECK_FALSE(solve(d).rates);
    CHECK_FALSE(solve(d).lead_money);
}

TEST_CASE("rates: they are what finite differences of the solver give") {
    int compared = 0;
    for (std::uint64_t seed = 1; seed <= 400; ++seed) {
        Decision d = testing::random_decision(seed);
        choose_money(d);
        d.requirements.clear();
        d.checks.clear();
        const Results results = solve(d);
        if (!results.rates) continue;
        const Id& option = results.rates->option;
        const auto o = *results.first;
        const Node* money = find_node(d.criteria, d.settings.money);
        if (money->cost_sheet) continue;
        const Figures figures(d);
        const auto slope = [&](const Id& leaf, double side) -> double {
            const auto x = figures.of(leaf, option).value;
            const auto values = std::find_if(results.leaves.begin(), results.leaves.end(),
                                             [&](const LeafResult& l) { return l.leaf == leaf; });
            if (!x || !values->worths[o]) return 0; // None, or none that a proportional curve takes.
            const double h = side * 1e-6 * std::max(1.0, std::abs(*x));
            const Results then = solve(with_figure(d, leaf, option, *x + h));
            return (then.scores[o] - results.scores[o]) / h;
        };
        for (const auto& rate : results.rates->rates) {
            const Node* node = find_node(d.criteria, rate.leaf);
            if (node->rate != RateBy::figure || node->cost_sheet) continue;
            std::optional<double> cheapest;
            for (const double of_figure : {slope(rate.leaf, 1), slope(rate.leaf, -1)}) {
                for (const double of_money : {slope(money->id, 1), slope(money->id, -1)}) {
                    if (std::abs(of_figure) < 1e-9 || std::abs(of_money) < 1e-9) continue;
                    const double candidate = -of_figure / of_money;
                    if (!cheapest || std::abs(candidate) < std::abs(*cheapest)) cheapest = candidate;
                }
            }
            CAPTURE(seed, rate.leaf);
            if (!cheapest) continue;
            REQUIRE(rate.per_unit);
            CHECK_THAT(*rate.per_unit, WithinRel(*cheapest, 1e-3));
            ++compared;
        }
    }
    CHECK(compared > 60);
}

TEST_CASE("lead in money: at that price first place changes hands, short of it not") {
    int found = 0;
    for (std::uint64_t seed = 1; seed <= 400; ++seed) {
        Decision d = testing::random_decision(seed);
        choose_money(d);
        // A must on a worth may exclude others as this figure moves: that is not a lead.
        std::erase_if(d.requirements, [](const Requirement& r) { return !r.node.empty(); });
        std::erase_if(d.checks,
                      [&](const Check& c) { return find_requirement(d, c.requirement) == nullptr; });
        const Results results = solve(d);
        if (!results.lead_money || *results.lead_money < 1e-6) continue;
        const Node* money = find_node(d.criteria, d.settings.money);
        if (money->cost_sheet) continue;
        const Id leader = results.options[*results.first];
        const double now = Figures(d).of(money->id, leader).value.value();
        const auto leads = [&](double figure) {
            const Results then = solve(with_figure(d, money->id, leader, figure));
            const auto place = std::find(then.options.begin(), then.options.end(), leader);
            if (place == then.options.end()) return false;
            return then.ranks[static_cast<std::size_t>(place - then.options.begin())] == 1 &&
                   std::count(then.ranks.begin(), then.ranks.end(), 1) == 1;
        };
        CAPTURE(seed, now, *results.lead_money);
        const double lead = *results.lead_money;
        const double past = std::max(1e-4 * lead, 1e-6);
        // Worse is one of the two ways.
        CHECK((!leads(now + lead + past) || !leads(now - lead - past)));
        CHECK((leads(now + lead * 0.999) || leads(now - lead * 0.999)));
        ++found;
    }
    CHECK(found > 40);
}

} // namespace steelyard
