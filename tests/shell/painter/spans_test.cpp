#include "shell/painter/spans.hpp"

#include <catch_amalgamated.hpp>

#include "tests/support/dice.hpp"

namespace steelyard::painting {
namespace {

using testing::Dice;

/// The first pixel of a row whose centre is not left of a line, by asking one pixel after the other. Whole
/// numbers only.
int asked_one_by_one(const Corner& top, const Corner& bottom, int row) {
    const std::int64_t y = std::int64_t{row} * one_pixel + half_pixel;
    for (int pixel = -100;; ++pixel) {
        const std::int64_t x = std::int64_t{pixel} * one_pixel + half_pixel;
        // The line's x at y is top.x + width * (y - top.y) / height.
        if ((x - top.x) * (bottom.y - top.y) >= (bottom.x - top.x) * (y - top.y)) return pixel;
    }
}

TEST_CASE("a side gives every row's first pixel exactly") {
    Dice dice(7);
    for (int i = 0; i < 2000; ++i) {
        Corner top;
        Corner bottom;
        top.x = dice.between(-2000, 4000);
        top.y = dice.between(-1000, 1000);
        bottom.x = dice.chance(20) ? top.x + dice.between(-2, 2) : dice.between(-2000, 4000);
        bottom.y = top.y + dice.between(1, dice.chance(50) ? 300 : 3000);
        const int first = first_pixel(top.y);
        const int start = first + dice.below(3);
        Side side;
        side.start(top, bottom, start);
        for (int row = start; row < first_pixel(bottom.y); ++row) {
            INFO("corners " << top.x << ", " << top.y << " and " << bottom.x << ", " << bottom.y << ", row "
                            << row);
            REQUIRE(side.pixel() == asked_one_by_one(top, bottom, row));
            side.next_row();
        }
    }
}

TEST_CASE("a side whose remainder comes out even steps over to the next pixel") {
    // Found by search: in its third row the line lies a hair right of a pixel's centre, by the smallest step
    // there is.
    Corner top;
    Corner bottom;
    top.x = -940;
    top.y = 211;
    bottom.x = -2259;
    bottom.y = 942;
    Side side;
    side.start(top, bottom, 1);
    side.next_row();
    side.next_row();
    CHECK(side.pixel() == asked_one_by_one(top, bottom, 3));
}

TEST_CASE("the first pixel is the first whose centre is not before the place") {
    CHECK(first_pixel(0) == 0);
    CHECK(first_pixel(half_pixel) == 0);
    CHECK(first_pixel(half_pixel + 1) == 1);
    CHECK(first_pixel(one_pixel) == 1);
    CHECK(first_pixel(-half_pixel) == -1);
    CHECK(first_pixel(-half_pixel + 1) == 0);
}

} // namespace
} // namespace steelyard::painting
