#include "core/results/field_changes.hpp"

#include <algorithm>
#include <catch_amalgamated.hpp>
#include <cstdint>

#include "core/results/solve.hpp"
#include "tests/support/random_decision.hpp"
#include "tests/support/round_trip.hpp"

namespace steelyard {

namespace {

/// Half the weight on a proportional price, half on grades; the cheapest decides what a euro is worth.
Decision tender(const std::string& price_curve) {
    return test::read(R"({"format": "steelyard-decision", "version": 1,
        "options": [{"id": "A"}, {"id": "B"}, {"id": "C"}],
        "criteria": {"id": "goal", "weights": "points", "children": [
            {"id": "price", "rate": "figure", "unit": "EUR", "curve": )" +
                      price_curve + R"(},
            {"id": "quality", "rate": "grade", "grades": [
                {"id": "good", "worth": 0.88}, {"id": "best", "worth": 0.99}, {"id": "poor", "worth": 0.20}]}]},
        "points": [{"set": "goal", "points": {"price": 50, "quality": 50}}],
        "figures": [{"criterion": "price", "option": "A", "value": 150},
                    {"criterion": "price", "option": "B", "value": 180},
                    {"criterion": "price", "option": "C", "value": 90}],
        "grades": [{"criterion": "quality", "option": "A", "grade": "good"},
                   {"criterion": "quality", "option": "B", "grade": "best"},
                   {"criterion": "quality", "option": "C", "grade": "poor"}]})");
}

const FieldChange& change(const std::vector<FieldChange>& all, FieldChange::Kind kind,
                          const Id& option = {}) {
    const auto found = std::find_if(
        all.begin(), all.end(), [&](const FieldChange& c) { return c.kind == kind && c.option == option; });
    REQUIRE(found != all.end());
    return *found;
}

} // namespace

TEST_CASE("field changes: without the cheapest a tender of lowest price over price turns round") {
    const Decision d = tender(R"({"kind": "proportional", "better": "less"})");
    const auto all = field_changes(d, solve(d));
    CHECK(all.size() == 7);
    const FieldChange& without = change(all, FieldChange::Kind::without, "C");
    REQUIRE(without.reversals.size() == 1);
    CHECK(without.reversals[0].a == "B");
    CHECK(without.reversals[0].b == "A");
    CHECK(without.reversals[0].leaves == std::vector<Id>{"price"});
    CHECK(without.first_before == "B");
    CHECK(without.first_after == "A");
}

TEST_CASE("field changes: anchored curves cure it") {
    const Decision d = tender(R"({"kind": "line", "worst": 200, "best": 50})");
    for (const auto& each : field_changes(d, solve(d))) CHECK(each.reversals.empty());
}

TEST_CASE("field changes: with everything anchored no random decision ever turns round") {
    int tried = 0;
    for (std::uint64_t seed = 1; seed <= 150; ++seed) {
        Decision d = testing::random_decision(seed);
        d.settings.synthesis = Synthesis::ideal;
        const Results results = solve(d);
        bool anchored = results.ranges.empty();
        for (const auto& node : results.leaves) {
            anchored =
                anchored && std::none_of(node.missing.begin(), node.missing.end(), [](bool m) { return m; });
        }
        const auto judged = [&](const Node& node, const auto& self) -> bool {
            if (node.is_leaf()) {
                return node.rate == RateBy::pairs ||
                       (node.curve && std::holds_alternative<ProportionalCurve>(node.curve->shape));
            }
            return std::any_of(node.children.begin(), node.children.end(),
                               [&](const Node& child) { return self(child, self); });
        };
        if (!anchored || judged(d.criteria, judged)) continue;
        ++tried;
        CAPTURE(seed);
        for (const auto& each : field_changes(d, results)) CHECK(each.reversals.empty());
    }
    CHECK(tried > 3);
}

TEST_CASE("field changes: the same as taking the option out of the file by hand") {
    for (std::uint64_t seed = 500; seed < 560; ++seed) {
        Decision d = testing::random_decision(seed);
        d.requirements.clear();
        d.checks.clear();
        const Results before = solve(d);
        for (const auto& each : field_changes(d, before)) {
            if (each.kind != FieldChange::Kind::without) continue;
            Decision without = d;
            for (auto& option : without.options)
                option.withdrawn = option.withdrawn || option.id == each.option;
            const Results then = solve(without);
            std::size_t reversed = 0;
            for (std::size_t i = 0; i < then.options.size(); ++i) {
                for (std::size_t j = 0; j < then.options.size(); ++j) {
                    const auto at = [&](const Id& id) {
                        return before.scores[static_cast<std::size_t>(
                            std::find(before.options.begin(), before.options.end(), id) -
                            before.options.begin())];
                    };
                    if (at(then.options[i]) - at(then.options[j]) > 1e-9 &&
                        then.scores[j] - then.scores[i] > 1e-9)
                        ++reversed;
                }
            }
            CAPTURE(seed, each.option);
            CHECK(each.reversals.size() == reversed);
        }
    }
}

TEST_CASE("field changes: a copy has its original's score in ideal synthesis") {
    // The newcomer's score is not told, but where it would pass its original the reversal list could not stay
    // the same: in ideal synthesis a copy moves nobody.
    for (std::uint64_t seed = 900; seed < 930; ++seed) {
        Decision d = testing::random_decision(seed);
        d.settings.synthesis = Synthesis::ideal;
        d.settings.method = Method::geometric_mean;
        d.judgments.clear();
        const Results results = solve(d);
        if (!results.ranges.empty()) continue; // Placeholders are means, which a copy shifts.
        for (const auto& each : field_changes(d, results)) {
            CAPTURE(seed, each.option);
            if (each.kind == FieldChange::Kind::copy_of) CHECK(each.reversals.empty());
        }
    }
}

} // namespace steelyard
