#include "tests/shell/support/random_drawing.hpp"

#include <algorithm>
#include <array>

namespace steelyard::testing {
namespace {

constexpr int beside = 20; // CSS pixels that corners may lie outside

class Artist {
public:
    Artist(Dice& dice, int width, int height, float density)
        : dice_(dice),
          width_(width),
          height_(height),
          density_(density),
          drawing_(static_cast<float>(width), static_cast<float>(height), density) {}

    DrawLists draw(int count) {
        for (int i = 0; i < count; ++i) add();
        return std::move(drawing_);
    }

private:
    void add() {
        switch (dice_.below(10)) {
        case 0:
        case 1: rectangle(); break;
        case 2: letter(); break;
        case 3: stretched_picture(); break;
        case 4: soft_triangle(); break;
        case 5: mixed_triangle(); break;
        case 6: textured_triangle(); break;
        case 7: fan(); break;
        case 8: clip(); break;
        default:
            if (dice_.chance(50))
                drawing_.next_list();
            else
                drawing_.offset_corners();
        }
    }

    /// 1/64 CSS pixel is 5/256 device pixel at density 1.25.
    float place(int size) {
        return static_cast<float>(dice_.between(-64 * beside, 64 * (size + beside))) / 64;
    }

    ImVec2 point() {
        const float x = place(width_);
        const float y = place(height_);
        return {x, y};
    }

    /// Some rows of corners are level or upright, as in drawings of interfaces.
    std::array<ImVec2, 3> points() {
        std::array<ImVec2, 3> found{point(), point(), point()};
        if (dice_.chance(30)) found[1].y = found[0].y;
        if (dice_.chance(30)) found[2].x = found[1].x;
        return found;
    }

    void rectangle() {
        const ImVec2 from = point();
        const ImVec2 to = point();
        drawing_.rectangle(from, to, random_colour(dice_));
    }

    ImVec2 texel() {
        const int u = dice_.below(TestAtlas::width * 4);
        const int v = dice_.below(TestAtlas::height * 4);
        return {static_cast<float>(u) / 4, static_cast<float>(v) / 4};
    }

    void letter() {
        // 4 CSS pixels are whole device pixels at all three densities.
        const int x = dice_.between(-4, width_ / 4);
        const int y = dice_.between(-4, height_ / 4);
        const int across = dice_.between(1, 6);
        const int down = dice_.between(1, 3);
        const float texels_across = 4 * static_cast<float>(across) * density_;
        const float texels_down = 4 * static_cast<float>(down) * density_;
        const auto u = static_cast<float>(dice_.below(TestAtlas::width - static_cast<int>(texels_across)));
        const auto v = static_cast<float>(dice_.below(TestAtlas::height - static_cast<int>(texels_down)));
        const ImVec2 from{4 * static_cast<float>(x), 4 * static_cast<float>(y)};
        const ImVec2 to{from.x + 4 * static_cast<float>(across), from.y + 4 * static_cast<float>(down)};
        drawing_.picture(from, to, {u, v}, {u + texels_across, v + texels_down}, random_colour(dice_));
    }

    void stretched_picture() {
        const ImVec2 from = point();
        const ImVec2 to = point();
        const ImVec2 texel_from = texel();
        const ImVec2 texel_to = texel();
        drawing_.picture(from, to, texel_from, texel_to, random_colour(dice_));
    }

    /// What ImGui's anti-aliasing draws: one colour, fading out.
    void soft_triangle() {
        const auto at = points();
        const ImU32 colour = random_colour(dice_);
        const ImU32 faded = colour & 0xFFFFFF;
        const bool two = dice_.chance(50);
        drawing_.triangle({at[0], at[1], at[2]}, {colour, two ? colour : faded, faded});
    }

    void mixed_triangle() {
        const auto at = points();
        const ImU32 a = random_colour(dice_);
        const ImU32 b = random_colour(dice_);
        const ImU32 c = random_colour(dice_);
        drawing_.triangle({at[0], at[1], at[2]}, {a, b, c});
    }

    void textured_triangle() {
        const auto at = points();
        const ImVec2 a = texel();
        // Now and then one texel for all: a plain colour, more or less transparent.
        const bool plain = dice_.chance(30);
        const ImVec2 b = plain ? a : texel();
        const ImVec2 c = plain ? a : texel();
        const ImU32 colour = random_colour(dice_);
        const ImU32 other = dice_.chance(50) ? colour : random_colour(dice_);
        drawing_.textured_triangle({at[0], at[1], at[2]}, {a, b, c}, {colour, other, colour});
    }

    /// Half of them convex, as ImGui's are; the others of any kind, overlapping themselves too.
    void fan() {
        std::vector<ImVec2> corners;
        if (dice_.chance(50)) {
            const ImVec2 middle = point();
            const int size = dice_.between(2, 40);
            // An octagon, from unit steps to eight sides.
            const int steps[][2] = {{-1, -2}, {1, -2}, {2, -1}, {2, 1}, {1, 2}, {-1, 2}, {-2, 1}, {-2, -1}};
            for (const auto& step : steps) {
                const auto x = static_cast<float>(step[0] * size) / 2;
                const auto y = static_cast<float>(step[1] * size) / 2;
                corners.push_back({middle.x + x, middle.y + y});
            }
        } else {
            const int count = dice_.between(3, 8);
            for (int i = 0; i < count; ++i) corners.push_back(point());
        }
        if (dice_.chance(50)) std::reverse(corners.begin(), corners.end());
        drawing_.fan(corners, random_colour(dice_));
    }

    void clip() {
        const ImVec2 a = point();
        const ImVec2 b = point();
        drawing_.clip(std::min(a.x, b.x), std::min(a.y, b.y), std::max(a.x, b.x) + 30,
                      std::max(a.y, b.y) + 20);
    }

    Dice& dice_;
    int width_;
    int height_;
    float density_;
    DrawLists drawing_;
};

} // namespace

ImU32 random_colour(Dice& dice) {
    const auto channels = static_cast<ImU32>(dice.below(1 << 24));
    if (dice.chance(40)) return channels | 0xFF000000U;
    if (dice.chance(10)) return channels;
    return channels | (static_cast<ImU32>(dice.below(256)) << 24);
}

DrawLists random_drawing(Dice& dice, int width, int height, float density, int count) {
    return Artist(dice, width, height, density).draw(count);
}

} // namespace steelyard::testing
