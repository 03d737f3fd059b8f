#include <catch_amalgamated.hpp>
#include <cmath>

#include "core/measure/curve.hpp"

namespace steelyard {

using Catch::Matchers::WithinAbs;

namespace {

Curve curve_of(const ProportionalCurve& shape) {
    return {.shape = shape, .extras = {}};
}
Curve curve_of(const LineCurve& shape) {
    return {.shape = shape, .extras = {}};
}
Curve curve_of(const PointsCurve& shape) {
    return {.shape = shape, .extras = {}};
}
Curve curve_of(const TargetCurve& shape) {
    return {.shape = shape, .extras = {}};
}

} // namespace

TEST_CASE("curve, proportional: the figure, or one over it where less is better") {
    const Curve more = curve_of(ProportionalCurve{Better::more});
    const Curve less = curve_of(ProportionalCurve{Better::less});
    CHECK(worth_of(more, 250) == 250);
    CHECK(worth_of(less, 250) == 1. / 250);
    CHECK(worth_of(less, 0.0625) == 16);
    CHECK_FALSE(is_anchored(more));
    CHECK_FALSE(is_anchored(less));
}

TEST_CASE("curve, proportional: none for 0 and below") {
    for (const Better better : {Better::more, Better::less}) {
        for (const double figure : {0., -0., -1e-300, -5.})
            CHECK_FALSE(worth_of(curve_of(ProportionalCurve{better}), figure).has_value());
    }
}

TEST_CASE("curve, proportional: a worth is always a finite number") {
    // One over the smallest numbers a double holds is beyond the largest.
    for (const double figure : {5e-324, 1e-310, 2.3e-308, 1.7e308}) {
        for (const Better better : {Better::more, Better::less}) {
            INFO("figure " << figure);
            CHECK(std::isfinite(worth_of(curve_of(ProportionalCurve{better}), figure).value_or(0)));
        }
    }
}

TEST_CASE("curve, anchored: worths are from 0 to 1 even where differences overflow") {
    const Curve line = curve_of(LineCurve{-1.7e308, 1.7e308});
    const Curve points = curve_of(PointsCurve{{{-1.7e308, 0}, {1.7e308, 1}}});
    const Curve target = curve_of(TargetCurve{-1.7e308, 1.7e308});
    for (const Curve& curve : {line, points, target}) {
        for (const double figure : {-1.7e308, -1e308, 0., 1e308, 1.7e308}) {
            const double worth = worth_of(curve, figure).value();
            INFO("curve " << curve.shape.index() << ", figure " << figure << ", worth " << worth);
            CHECK(worth >= 0);
            CHECK(worth <= 1);
        }
    }
}

TEST_CASE("curve, line: straight from the worst to the best, held outside, either direction") {
    const Curve falling = curve_of(LineCurve{90000, 40000});
    CHECK(worth_of(falling, 90000) == 0);
    CHECK(worth_of(falling, 40000) == 1);
    CHECK_THAT(worth_of(falling, 61500).value(), WithinAbs(.57, 1e-15));
    CHECK(worth_of(falling, 1e9) == 0);
    CHECK(worth_of(falling, -5) == 1);
    const Curve rising = curve_of(LineCurve{-10, 30});
    CHECK(worth_of(rising, -10) == 0);
    CHECK(worth_of(rising, 0) == .25);
    CHECK(worth_of(rising, 31) == 1);
    CHECK(is_anchored(rising));
}

TEST_CASE("curve, points: straight between them, flat outside") {
    const Curve curve = curve_of(PointsCurve{{{10, .2}, {20, 1}, {40, .5}}});
    CHECK(worth_of(curve, -100) == .2);
    CHECK(worth_of(curve, 10) == .2);
    CHECK_THAT(worth_of(curve, 15).value(), WithinAbs(.6, 1e-15));
    CHECK(worth_of(curve, 20) == 1);
    CHECK_THAT(worth_of(curve, 25).value(), WithinAbs(.875, 1e-15));
    CHECK(worth_of(curve, 40) == .5);
    CHECK(worth_of(curve, 1e9) == .5);
    CHECK(is_anchored(curve));
}

TEST_CASE("curve, points: two points very close together make a step") {
    const Curve curve = curve_of(PointsCurve{{{0, 0}, {1, 0}, {1.0000000001, 1}}});
    CHECK(worth_of(curve, 1) == 0);
    CHECK(worth_of(curve, 1.0000000001) == 1);
    CHECK(worth_of(curve, 2) == 1);
}

TEST_CASE("curve, points: one point is worth the same everywhere") {
    const Curve curve = curve_of(PointsCurve{{{5, .3}}});
    for (const double figure : {-1., 5., 9.}) CHECK(worth_of(curve, figure) == .3);
}

TEST_CASE("curve, target: 1 at the target, 0 at the tolerance and beyond, both ways") {
    const Curve curve = curve_of(TargetCurve{50, 8});
    CHECK(worth_of(curve, 50) == 1);
    CHECK(worth_of(curve, 54) == .5);
    CHECK(worth_of(curve, 46) == .5);
    CHECK(worth_of(curve, 58) == 0);
    CHECK(worth_of(curve, 42) == 0);
    CHECK(worth_of(curve, 1e9) == 0);
    CHECK(is_anchored(curve));
}

} // namespace steelyard
