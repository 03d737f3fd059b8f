#include "core/tipping/one_figure.hpp"

#include <algorithm>
#include <catch_amalgamated.hpp>
#include <cmath>
#include <cstdint>

#include "core/measure/curve.hpp"
#include "tests/support/dice.hpp"

namespace steelyard {

using testing::Dice;

namespace {

double part(Dice& dice) {
    return dice.between(1, 9999) / 10000.0;
}

Curve random_curve(Dice& dice) {
    switch (dice.below(5)) {
    case 0: return {ProportionalCurve{Better::more}, {}};
    case 1: return {ProportionalCurve{Better::less}, {}};
    case 2: {
        const double worst = dice.between(1, 20);
        return {LineCurve{worst, dice.chance(50) ? worst + 7 : worst - 9}, {}};
    }
    case 3: {
        PointsCurve points;
        double x = dice.between(0, 4);
        const int n = dice.between(2, 5);
        for (int i = 0; i < n; ++i, x += dice.between(1, 5)) points.at.push_back({x, dice.below(11) / 10.0});
        return {points, {}};
    }
    default:
        return {
            TargetCurve{static_cast<double>(dice.between(3, 15)), static_cast<double>(dice.between(1, 6))},
            {}};
    }
}

MovingFigure random_case(std::uint64_t seed) {
    Dice dice(seed);
    MovingFigure leaf;
    leaf.curve = random_curve(dice);
    leaf.synthesis = dice.chance(50) ? Synthesis::ideal : Synthesis::distributive;
    leaf.weight = part(dice);
    const int m = dice.between(2, 8);
    leaf.option = static_cast<std::size_t>(dice.below(m));
    for (int k = 0; k < m; ++k) {
        const double x = dice.between(1, 180) / 10.0;
        leaf.worths.push_back(dice.chance(12) ? std::nullopt : worth_of(leaf.curve, x));
        leaf.rest.push_back((1 - leaf.weight) * part(dice));
        leaf.without.push_back(part(dice));
    }
    if (dice.chance(30)) leaf.at_most = dice.between(5, 20);
    if (dice.chance(20)) leaf.at_least = dice.between(1, 4);
    return leaf;
}

std::vector<std::size_t> first_at(const MovingFigure& leaf, double x) {
    const auto scores = scores_at(leaf, x);
    const double best = *std::max_element(scores.begin(), scores.end());
    std::vector<std::size_t> out;
    for (std::size_t k = 0; k < scores.size(); ++k) {
        if (scores[k] >= best - 1e-9) out.push_back(k);
    }
    return out;
}

} // namespace

TEST_CASE(
    "one figure: first place differs on the two sides of every change, and a dense scan finds no other") {
    int changes_found = 0;
    for (std::uint64_t seed = 1; seed <= 1500; ++seed) {
        const MovingFigure leaf = random_case(seed);
        const auto changes = first_place_changes(leaf);
        CAPTURE(seed);
        changes_found += static_cast<int>(changes.size());
        for (std::size_t i = 0; i < changes.size(); ++i) {
            const double at = changes[i].at;
            // Half-way to the neighbours, or a little off: far enough for differences beyond a tie.
            const double step = std::abs(at) * 0.05 + 1e-6;
            const double below = i > 0 ? std::min(step, (at - changes[i - 1].at) / 2) : step;
            const double above = i + 1 < changes.size() ? std::min(step, (changes[i + 1].at - at) / 2) : step;
            if (below > 1e-4) CHECK(first_at(leaf, at - below) == changes[i].below);
            if (above > 1e-4) CHECK(first_at(leaf, at + above) == changes[i].above);
        }
        // Between two changes first place never differs.
        std::size_t next = 0;
        for (int step = 1; step <= 4000; ++step) {
            const double x = step * 0.0061;
            while (next < changes.size() && changes[next].at < x) ++next;
            const bool near = (next < changes.size() && std::abs(changes[next].at - x) < 1e-4) ||
                              (next > 0 && std::abs(changes[next - 1].at - x) < 1e-4);
            if (near) continue;
            const auto expected = next < changes.size() ? changes[next].below
                                  : changes.empty()     ? first_at(leaf, 50)
                                                        : changes.back().above;
            const auto seen = first_at(leaf, x);
            if (seen != expected) FAIL_CHECK("another change near " << x);
        }
    }
    CHECK(changes_found > 700);
}

TEST_CASE("one figure: a must's limit is a change of its own, told exactly") {
    MovingFigure leaf;
    leaf.curve = {LineCurve{100, 0}, {}};
    leaf.weight = .5;
    leaf.worths = {.5, .2};
    leaf.rest = {.3, .3};
    leaf.without = {0, .4};
    leaf.at_most = 60;
    // First until its figure is 80 by score alone; the limit is earlier.
    const auto changes = first_place_changes(leaf);
    REQUIRE(changes.size() == 1);
    CHECK(changes[0].at == 60);
    CHECK(changes[0].by_limit);
    CHECK(changes[0].below == std::vector<std::size_t>{0});
    CHECK(changes[0].above == std::vector<std::size_t>{1});
}

TEST_CASE("one figure: no figure does it where the lead is larger than the leaf's weight") {
    MovingFigure leaf;
    leaf.curve = {LineCurve{100, 0}, {}};
    leaf.weight = .2;
    leaf.worths = {1.0, .0};
    leaf.rest = {.7, .3};
    CHECK(first_place_changes(leaf).empty());
}

} // namespace steelyard
