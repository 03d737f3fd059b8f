#include <algorithm>
#include <catch_amalgamated.hpp>

#include "shell/painter/painter.hpp"
#include "tests/shell/support/random_drawing.hpp"
#include "tests/shell/support/sample_screen.hpp"

namespace steelyard {
namespace {

using testing::Dice;
using testing::DrawLists;
using testing::random_colour;
using testing::random_drawing;
using testing::SampleScreen;
using testing::TestAtlas;

constexpr std::uint32_t ground = 0xFF403020;
constexpr int width = 300;
constexpr int height = 200;

class NewPainter : public Painter {
public:
    NewPainter() {
        const TestAtlas atlas;
        set_atlas(atlas.alpha.data(), TestAtlas::width, TestAtlas::height);
    }
};

bool holds(const std::vector<PixelRect>& rects, int x, int y) {
    for (const PixelRect& rect : rects) {
        if (x >= rect.left && x < rect.right && y >= rect.top && y < rect.bottom) return true;
    }
    return false;
}

std::int64_t area(const std::vector<PixelRect>& rects) {
    std::int64_t sum = 0;
    for (const PixelRect& rect : rects)
        sum += std::int64_t{rect.right - rect.left} * (rect.bottom - rect.top);
    return sum;
}

/// Pixels that differ although no rectangle holds them.
int differing_outside(const std::vector<std::uint32_t>& before, const Painter& painter,
                      const std::vector<PixelRect>& changed) {
    int found = 0;
    for (int y = 0; y < painter.height(); ++y) {
        for (int x = 0; x < painter.width(); ++x) {
            const auto at = static_cast<std::size_t>(y * painter.width() + x);
            if (before[at] != painter.pixels()[at] && !holds(changed, x, y)) ++found;
        }
    }
    return found;
}

TEST_CASE("the first frame, a new size, a new ground and a new atlas change everything; nothing else does") {
    DrawLists lists(width, height, 1);
    lists.rectangle({10, 10}, {20, 20}, 0xFF0000FF);
    NewPainter painter;
    const std::int64_t all = std::int64_t{width} * height;
    CHECK(area(painter.paint(lists.data(), width, height, ground)) == all);
    CHECK(painter.paint(lists.data(), width, height, ground).empty());
    CHECK(area(painter.paint(lists.data(), width, height, 0xFF000000)) == all);
    CHECK(area(painter.paint(lists.data(), width, height - 1, 0xFF000000)) == all - width);
    CHECK(painter.paint(lists.data(), width, height - 1, 0xFF000000).empty());
    const TestAtlas atlas;
    painter.set_atlas(atlas.alpha.data(), TestAtlas::width, TestAtlas::height);
    CHECK(area(painter.paint(lists.data(), width, height - 1, 0xFF000000)) == all - width);
}

TEST_CASE("a small change is reported as a small rectangle on the screen") {
    NewPainter painter;
    DrawLists before(width, height, 1);
    before.rectangle({290, 190}, {295, 195}, 0xFF0000FF);
    painter.paint(before.data(), width, height, ground);
    DrawLists after(width, height, 1);
    after.rectangle({291, 190}, {296, 195}, 0xFF0000FF);
    const auto& changed = painter.paint(after.data(), width, height, ground);
    REQUIRE(changed.size() == 1);
    CHECK(changed[0].right == width);
    CHECK(changed[0].bottom == height);
    CHECK(area(changed) <= 64 * 64);
}

TEST_CASE("what changes wholly behind an opaque rectangle is not painted again") {
    NewPainter painter;
    for (int frame = 0; frame < 2; ++frame) {
        DrawLists lists(width, height, 1);
        lists.rectangle({0, 0}, {width, height}, frame == 0 ? 0xFF0000FF : 0xFF00FF00);
        lists.rectangle({0, 0}, {width, height}, 0xFFFFFFFF);
        lists.rectangle({5, 5}, {9, 9}, 0xFF0000FF);
        CHECK(painter.paint(lists.data(), width, height, ground).empty() == (frame == 1));
    }
}

TEST_CASE("a long slanted line touches few tiles") {
    NewPainter painter;
    const auto line = [](float shift) {
        DrawLists lists(1280, 1280, 1);
        const ImU32 colour = 0xFF0000FF;
        lists.triangle({{0, shift}, {1280, 1280}, {1280, 1279}}, {colour, colour, colour});
        return lists;
    };
    DrawLists before = line(0);
    painter.paint(before.data(), 1280, 1280, ground);
    DrawLists after = line(1);
    const auto tiles = area(painter.paint(after.data(), 1280, 1280, ground)) / (64 * 64);
    CHECK(tiles >= 20);
    CHECK(tiles <= 60); // of 400
}

TEST_CASE("frames painted one after another are the frames painted afresh") {
    int partial = 0;
    for (std::uint64_t seed = 1; seed <= 12; ++seed) {
        NewPainter painter;
        std::vector<std::uint32_t> before(std::size_t{width} * height, 0);
        for (std::uint64_t frame = 0; frame < 6; ++frame) {
            // The same drawing every time, with a few more shapes in each frame.
            Dice dice(seed);
            DrawLists lists = random_drawing(dice, width, height, 1, 20 + 2 * static_cast<int>(frame));
            const auto& changed = painter.paint(lists.data(), width, height, ground);
            NewPainter afresh;
            afresh.paint(lists.data(), width, height, ground);
            INFO("seed " << seed << " frame " << frame);
            CHECK(painter.pixels() == afresh.pixels());
            CHECK(differing_outside(before, painter, changed) == 0);
            CHECK(area(changed) <= std::int64_t{width} * height);
            before = painter.pixels();
            if (frame > 0 && area(changed) < std::int64_t{width} * height) ++partial;
        }
    }
    // Else the test would not have met what it is about.
    CHECK(partial > 30);
}

/// Changes one thing about a drawing: a corner's place, colour or texel, a rectangle's place or colour, a
/// clip rectangle.
void change_something(Dice& dice, ImDrawData& data) {
    ImDrawList& list = *data.CmdLists[dice.below(data.CmdLists.Size)];
    const int corners = list.VtxBuffer.Size;
    if (corners == 0 || dice.chance(10)) {
        ImVec4& clip = list.CmdBuffer[dice.below(list.CmdBuffer.Size)].ClipRect;
        (dice.chance(50) ? clip.x : clip.w) += static_cast<float>(dice.between(1, 8));
        return;
    }
    const int first = dice.below(corners);
    // Shapes have three to eight corners; four are a rectangle.
    const int last = std::min(corners, first + dice.between(1, 4));
    const int what = dice.below(4);
    const auto by = static_cast<float>(dice.between(1, 40)) / 4;
    const ImU32 colour = random_colour(dice);
    for (int i = first; i < last; ++i) {
        ImDrawVert& corner = list.VtxBuffer[i];
        if (what == 0) corner.pos.x += by;
        if (what == 1) corner.pos.y -= by;
        if (what == 2) corner.col = colour;
        if (what == 3) corner.uv.x = std::min(corner.uv.x + by / TestAtlas::width, 1.0F);
    }
}

TEST_CASE("whatever changes in a drawing, the frame is the one painted afresh") {
    int differing = 0;
    for (std::uint64_t seed = 200; seed < 212; ++seed) {
        Dice dice(seed);
        DrawLists lists = random_drawing(dice, width, height, 1, 30);
        NewPainter painter;
        painter.paint(lists.data(), width, height, ground);
        for (int change = 0; change < 60; ++change) {
            const auto before = painter.pixels();
            change_something(dice, lists.data());
            painter.paint(lists.data(), width, height, ground);
            NewPainter afresh;
            afresh.paint(lists.data(), width, height, ground);
            INFO("seed " << seed << " change " << change);
            REQUIRE(painter.pixels() == afresh.pixels());
            if (before != painter.pixels()) ++differing;
        }
    }
    CHECK(differing > 200);
}

TEST_CASE("a letter that becomes another in the same place is painted again") {
    NewPainter painter;
    for (const float texel : {4.0F, 5.0F}) {
        DrawLists lists(width, height, 1);
        lists.picture({70, 10}, {78, 20}, {texel, 3}, {texel + 8, 13}, 0xFFFFFFFF);
        const std::int64_t all = std::int64_t{width} * height;
        CHECK(area(painter.paint(lists.data(), width, height, ground)) == (texel < 5 ? all : 64 * 64));
    }
}

TEST_CASE("a rectangle over whole tiles that changes its colour is painted again") {
    NewPainter painter;
    for (const ImU32 colour : {0xFF0000FFU, 0xFF00FF00U, 0xFF00FF01U}) {
        DrawLists lists(width, height, 1);
        lists.rectangle({0, 0}, {width, height}, colour);
        CHECK(area(painter.paint(lists.data(), width, height, ground)) == std::int64_t{width} * height);
        CHECK(painter.pixels().front() == colour);
    }
}

TEST_CASE("on a real screen a bar that grows repaints little, and the picture is that painted afresh") {
    const float density = GENERATE(1.0F, 1.25F, 2.0F);
    SampleScreen screen(1366, 768, density);
    Painter painter;
    screen.give_atlas(painter);
    const int screen_width = screen.device_width();
    const int screen_height = screen.device_height();
    painter.paint(screen.draw(0), screen_width, screen_height, SampleScreen::background);
    const auto before = painter.pixels();
    const auto& changed =
        painter.paint(screen.draw(30), screen_width, screen_height, SampleScreen::background);
    CHECK(before != painter.pixels());
    CHECK(differing_outside(before, painter, changed) == 0);
    CHECK(area(changed) <= 12 * 64 * 64);
    Painter afresh;
    screen.give_atlas(afresh);
    afresh.paint(screen.draw(30), screen_width, screen_height, SampleScreen::background);
    CHECK(painter.pixels() == afresh.pixels());
}

} // namespace
} // namespace steelyard
