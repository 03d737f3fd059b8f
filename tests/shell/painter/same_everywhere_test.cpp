#include <catch_amalgamated.hpp>
#include <string>

#include "core/decision/sha256.hpp"
#include "shell/painter/painter.hpp"
#include "tests/shell/support/random_drawing.hpp"
#include "tests/shell/support/sample_screen.hpp"

// The same pixels natively and as WebAssembly: the digests were taken from the native build and must come out
// in both. They change with the painter's rounding, with the fonts and with the sample screen; take the new
// ones from the failure, after looking at the picture (paint_bench saves it).

namespace steelyard {
namespace {

using testing::Dice;
using testing::DrawLists;
using testing::random_drawing;
using testing::SampleScreen;
using testing::TestAtlas;

std::string digest(const Painter& painter) {
    const auto* bytes = reinterpret_cast<const char*>(painter.pixels().data());
    return sha256_hex({bytes, painter.pixels().size() * sizeof(std::uint32_t)}).substr(0, 16);
}

struct Expected {
    float density;
    std::string drawings;
    std::string screen;
};

const Expected expected[] = {
    {1.0F, "09c3e6deebb5ff25", "9dfc2fe74df31b13"},
    {1.25F, "2138fae32b4af3c2", "8a86dc1e5d8e2653"},
    {2.0F, "5d23e91264040842", "a09f899a211eeb37"},
};

TEST_CASE("random drawings have the same pixels everywhere") {
    const TestAtlas atlas;
    for (const Expected& each : expected) {
        Painter painter;
        painter.set_atlas(atlas.alpha.data(), TestAtlas::width, TestAtlas::height);
        std::string digests;
        for (std::uint64_t seed = 100; seed < 130; ++seed) {
            Dice dice(seed);
            DrawLists lists = random_drawing(dice, 400, 300, each.density, 60);
            painter.paint(lists.data(), 801, 601, 0xFF403020);
            digests += digest(painter);
        }
        INFO("density " << each.density);
        CHECK(sha256_hex(digests).substr(0, 16) == each.drawings);
    }
}

TEST_CASE("a screen drawn by ImGui in our fonts has the same pixels everywhere") {
    for (const Expected& each : expected) {
        SampleScreen screen(1366, 768, each.density);
        Painter painter;
        screen.give_atlas(painter);
        painter.paint(screen.draw(), screen.device_width(), screen.device_height(), SampleScreen::background);
        INFO("density " << each.density);
        CHECK(digest(painter) == each.screen);
    }
}

} // namespace
} // namespace steelyard
