#include "shell/painter/painter.hpp"

#include <catch_amalgamated.hpp>
#include <cmath>
#include <limits>

#include "tests/shell/support/random_drawing.hpp"
#include "tests/shell/support/slow_painter.hpp"

namespace steelyard {
namespace {

using testing::Dice;
using testing::DrawLists;
using testing::greatest_difference;
using testing::random_drawing;
using testing::slow_paint;
using testing::TestAtlas;

constexpr std::uint32_t ground = 0xFF403020;
constexpr std::uint32_t red = 0xFF0000FF;
constexpr std::uint32_t half_red = 0x800000FF;

const TestAtlas& atlas() {
    static const TestAtlas made;
    return made;
}

std::vector<std::uint32_t> painted(DrawLists& lists, int width, int height) {
    Painter painter;
    painter.set_atlas(atlas().alpha.data(), TestAtlas::width, TestAtlas::height);
    painter.paint(lists.data(), width, height, ground);
    return painter.pixels();
}

/// A picture of one row per line and one letter per pixel: '.' is the ground, '#' the other colour.
std::vector<std::uint32_t> drawn(const std::vector<std::string>& lines, std::uint32_t colour) {
    std::vector<std::uint32_t> pixels;
    for (const std::string& line : lines) {
        for (const char c : line) pixels.push_back(c == '#' ? colour : ground);
    }
    return pixels;
}

TEST_CASE("an empty drawing is the ground, made opaque") {
    DrawLists lists(3, 2, 1);
    Painter painter;
    painter.paint(lists.data(), 3, 2, 0x00403020);
    CHECK(painter.pixels() == std::vector<std::uint32_t>(6, ground));
    CHECK(painter.width() == 3);
    CHECK(painter.height() == 2);
}

TEST_CASE("a screen without pixels is painted without a word") {
    DrawLists lists(0, 0, 1);
    lists.rectangle({0, 0}, {5, 5}, red);
    Painter painter;
    CHECK(painter.paint(lists.data(), 0, 0, ground).empty());
    CHECK(painter.paint(lists.data(), -3, 7, ground).empty());
    CHECK(painter.pixels().empty());
}

TEST_CASE("a rectangle takes the pixels whose centres it holds, those on its left and upper edge too") {
    DrawLists lists(6, 4, 1);
    lists.rectangle({1.5F, 0.5F}, {4.5F, 2.51F}, red);
    CHECK(painted(lists, 6, 4) == drawn({".###..", //
                                         ".###..", //
                                         ".###..", //
                                         "......"},
                                        red));
}

TEST_CASE("a rectangle given from its lower right corner is the same") {
    DrawLists lists(4, 3, 1);
    lists.rectangle({3, 2}, {1, 1}, red);
    CHECK(painted(lists, 4, 3) == drawn({"....", ".##.", "...."}, red));
}

TEST_CASE("an opaque rectangle has its exact colour, one half transparent is mixed and rounded") {
    DrawLists lists(2, 1, 1);
    lists.rectangle({0, 0}, {1, 1}, 0xFF7B3D11);
    lists.rectangle({1, 0}, {2, 1}, half_red);
    // 128/255 of 255 and 127/255 of 0x20; 127/255 of 0x30; 127/255 of 0x40: 143.94, 23.91, 31.87.
    CHECK(painted(lists, 2, 1) == std::vector<std::uint32_t>{0xFF7B3D11, 0xFF201890});
}

TEST_CASE("rectangles are scaled by the density") {
    DrawLists lists(4, 2, 1.25F);
    lists.rectangle({0.8F, 0}, {3.2F, 1.6F}, red);
    CHECK(painted(lists, 5, 3) == drawn({".###.", ".###.", "....."}, red));
}

TEST_CASE("the display's position is taken off") {
    DrawLists lists(3, 1, 1);
    lists.data().DisplayPos = {100, 50};
    lists.clip(100, 50, 103, 51);
    lists.rectangle({101, 50}, {102, 51}, red);
    CHECK(painted(lists, 3, 1) == drawn({".#."}, red));
}

TEST_CASE("what lies outside its clip rectangle or the screen is left out") {
    DrawLists lists(6, 3, 1);
    lists.clip(2, 1, 5, 100);
    lists.rectangle({-50, -50}, {50, 50}, red);
    lists.clip(4, 2, 4, 2);
    lists.rectangle({-50, -50}, {50, 50}, 0xFF00FF00);
    CHECK(painted(lists, 6, 3) == drawn({"......", "..###.", "..###."}, red));
}

TEST_CASE("a letter is the atlas's alpha, texel by pixel") {
    DrawLists lists(8, 4, 1);
    lists.picture({2, 1}, {6, 3}, {10, 5}, {14, 7}, 0xFFFFFFFF);
    Painter painter;
    painter.set_atlas(atlas().alpha.data(), TestAtlas::width, TestAtlas::height);
    painter.paint(lists.data(), 8, 4, 0xFF000000);
    for (int y = 0; y < 4; ++y) {
        for (int x = 0; x < 8; ++x) {
            const bool inside = x >= 2 && x < 6 && y >= 1 && y < 3;
            const std::uint32_t alpha =
                inside ? atlas().alpha[static_cast<std::size_t>((y + 4) * TestAtlas::width + x + 8)] : 0;
            INFO("pixel " << x << ", " << y);
            CHECK(painter.pixels()[static_cast<std::size_t>(y * 8 + x)] == 0xFF000000U + alpha * 0x010101U);
        }
    }
}

TEST_CASE("letters between pixels go to the nearest, all of a line to the same side") {
    // At density 1.25 a line that begins at 2 lies at half a pixel; a float's error must not part its
    // letters.
    const auto picture = [](float error) {
        DrawLists lists(32, 8, 1.25F);
        lists.picture({2 + error, 0.1F}, {6 + error, 4.1F}, {10, 5}, {15, 10}, 0xFFFFFFFF);
        return painted(lists, 40, 10);
    };
    DrawLists whole(40, 10, 1);
    whole.picture({3, 0}, {8, 5}, {10, 5}, {15, 10}, 0xFFFFFFFF);
    const auto expected = painted(whole, 40, 10);
    CHECK(picture(0) == expected);
    CHECK(picture(0.005F) == expected);
    CHECK(picture(-0.005F) == expected);
}

TEST_CASE("a letter cut by a clip rectangle keeps its place") {
    DrawLists whole(8, 4, 1);
    whole.picture({1, 0}, {7, 4}, {10, 5}, {16, 9}, 0xFFFFFFFF);
    const auto expected = painted(whole, 8, 4);
    // ImGui cuts letters itself, too: at any place, with the texels cut in proportion.
    DrawLists cut(8, 4, 1);
    cut.picture({2.25F, 0}, {5.5F, 4}, {11.25F, 5}, {14.5F, 9}, 0xFFFFFFFF);
    DrawLists clipped(8, 4, 1);
    clipped.clip(2, 0, 5, 4);
    clipped.picture({1, 0}, {7, 4}, {10, 5}, {16, 9}, 0xFFFFFFFF);
    const auto a = painted(cut, 8, 4);
    const auto b = painted(clipped, 8, 4);
    CHECK(a == b);
    for (std::size_t i = 0; i < a.size(); ++i)
        CHECK(a[i] == (i % 8 >= 2 && i % 8 < 5 ? expected[i] : ground));
}

TEST_CASE("triangles that share an edge neither overlap nor leave a gap") {
    DrawLists lists(40, 30, 1);
    const ImVec2 corners[] = {{0, 0}, {40, 0}, {40, 30}, {0, 30}};
    const ImVec2 middle{17.3125F, 11.6875F};
    for (int i = 0; i < 4; ++i)
        lists.triangle({middle, corners[i], corners[(i + 1) % 4]}, {half_red, half_red, half_red});
    DrawLists once(40, 30, 1);
    once.rectangle({0, 0}, {40, 30}, half_red);
    CHECK(painted(lists, 40, 30) == painted(once, 40, 30));
}

TEST_CASE("a half transparent fan that overlaps itself is mixed twice there, as its triangles are") {
    DrawLists lists(32, 32, 1);
    // A five-pointed star drawn in one line.
    const std::vector<ImVec2> star{{16, 1}, {25, 28}, {2, 11}, {30, 11}, {7, 28}};
    lists.fan(star, half_red);
    DrawLists apart(32, 32, 1);
    for (std::size_t i = 2; i < star.size(); ++i)
        apart.triangle({star[0], star[i - 1], star[i]}, {half_red, half_red, half_red});
    CHECK(painted(lists, 32, 32) == painted(apart, 32, 32));
}

TEST_CASE("user callbacks are passed over") {
    DrawLists lists(2, 1, 1);
    lists.user_callback([](const ImDrawList*, const ImDrawCmd*) { FAIL("called"); });
    lists.rectangle({0, 0}, {1, 1}, red);
    lists.user_callback(ImDrawCallback_ResetRenderState);
    CHECK(painted(lists, 2, 1) == drawn({"#."}, red));
}

TEST_CASE("corners far out and corners that are no numbers do no harm") {
    const float nan = std::numeric_limits<float>::quiet_NaN();
    const float far = 3.0e38F;
    DrawLists lists(6, 3, 1);
    lists.rectangle({-far, 1}, {far, 2}, red);
    lists.triangle({{nan, 0}, {nan, nan}, {-far, 5}}, {red, 0, half_red});
    lists.triangle({{-far, -far}, {-far, far}, {-5, far}}, {red, 0, half_red});
    lists.picture({nan, nan}, {far, far}, {0, 0}, {nan, far}, half_red);
    lists.clip(nan, nan, nan, nan);
    lists.rectangle({0, 0}, {6, 3}, 0xFF00FF00);
    const auto pixels = painted(lists, 6, 3);
    for (std::size_t x = 0; x < 6; ++x) CHECK((pixels[6 + x] & 0xFF) > 0x80);
}

TEST_CASE("without an atlas everything is plain") {
    DrawLists lists(4, 1, 1);
    lists.rectangle({0, 0}, {1, 1}, red);
    lists.picture({2, 0}, {3, 1}, {10, 5}, {11, 6}, red);
    Painter painter;
    painter.paint(lists.data(), 4, 1, ground);
    CHECK(painter.pixels() == drawn({"#.#."}, red));
}

TEST_CASE("random drawings come out as the slow painter paints them") {
    const float density = GENERATE(1.0F, 1.25F, 2.0F);
    constexpr int width = 96;
    constexpr int height = 72;
    const int device_width = static_cast<int>(width * density);
    const int device_height = static_cast<int>(height * density);
    // Each layer may round the other way once; what lies below counts less with each layer above it.
    constexpr int tolerance = 2;
    for (std::uint64_t seed = 1; seed <= 40; ++seed) {
        Dice dice(seed);
        DrawLists lists = random_drawing(dice, width, height, density, 16);
        const auto slow = slow_paint(lists.data(), atlas(), device_width, device_height, ground);
        INFO("seed " << seed << " density " << density);
        CHECK(greatest_difference(painted(lists, device_width, device_height), slow) <= tolerance);
    }
}

} // namespace
} // namespace steelyard
