#include "tests/shell/support/slow_painter.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <cstdlib>

namespace steelyard::testing {
namespace {

struct Point {
    double x;
    double y;
};

using Channels = std::array<double, 4>; // red, green, blue, alpha from 0 to 255

Channels unpacked(std::uint32_t colour) {
    Channels channels{};
    for (std::size_t i = 0; i < 4; ++i) channels[i] = (colour >> (8 * i)) & 255;
    return channels;
}

double twice_area(Point a, Point b, Point c) {
    return (b.x - a.x) * (c.y - a.y) - (b.y - a.y) * (c.x - a.x);
}

/// Between the four nearest texels, held at the border.
double texel(const TestAtlas& atlas, double u, double v) {
    const auto at = [&](double x, double y) -> double {
        const int column = std::clamp(static_cast<int>(x), 0, TestAtlas::width - 1);
        const int row = std::clamp(static_cast<int>(y), 0, TestAtlas::height - 1);
        return atlas.alpha[static_cast<std::size_t>(row * TestAtlas::width + column)];
    };
    const double left = std::floor(u - 0.5);
    const double top = std::floor(v - 0.5);
    const double across = u - 0.5 - left;
    const double down = v - 0.5 - top;
    const double above = at(left, top) * (1 - across) + at(left + 1, top) * across;
    const double below = at(left, top + 1) * (1 - across) + at(left + 1, top + 1) * across;
    return above * (1 - down) + below * down;
}

class SlowPainter {
public:
    SlowPainter(const ImDrawData& data, const TestAtlas& atlas, int width, int height,
                std::uint32_t background)
        : data_(data),
          atlas_(atlas),
          width_(width),
          height_(height),
          pixels_(static_cast<std::size_t>(width * height), background | 0xFF000000U) {}

    std::vector<std::uint32_t> paint() {
        for (const ImDrawList* list : data_.CmdLists) {
            for (const ImDrawCmd& command : list->CmdBuffer) {
                if (command.UserCallback != nullptr) continue;
                for (unsigned int i = 0; i < command.ElemCount; i += 3)
                    paint_triangle(*list, command, command.IdxOffset + i);
            }
        }
        return pixels_;
    }

private:
    Point placed(double x, double y) const {
        return {(x - data_.DisplayPos.x) * data_.FramebufferScale.x,
                (y - data_.DisplayPos.y) * data_.FramebufferScale.y};
    }

    void paint_triangle(const ImDrawList& list, const ImDrawCmd& command, unsigned int index) {
        std::array<const ImDrawVert*, 3> corners{};
        std::array<Point, 3> at{};
        for (unsigned int i = 0; i < 3; ++i) {
            const unsigned int corner = list.IdxBuffer[static_cast<int>(index + i)] + command.VtxOffset;
            corners[i] = &list.VtxBuffer[static_cast<int>(corner)];
            at[i] = placed(corners[i]->pos.x, corners[i]->pos.y);
        }
        if (twice_area(at[0], at[1], at[2]) == 0) return;
        const Point clip_from = placed(command.ClipRect.x, command.ClipRect.y);
        const Point clip_to = placed(command.ClipRect.z, command.ClipRect.w);
        for (int y = 0; y < height_; ++y) {
            for (int x = 0; x < width_; ++x) {
                const Point centre{x + 0.5, y + 0.5};
                if (centre.x >= clip_from.x && centre.x < clip_to.x && centre.y >= clip_from.y &&
                    centre.y < clip_to.y && inside(at, centre))
                    blend(pixels_[static_cast<std::size_t>(y * width_ + x)], corners, at, centre);
            }
        }
    }

    /// A centre on an edge counts as a hair farther right, and a hair of that farther down. Corners lie on
    /// 1/256 pixel: nothing else comes so near an edge.
    static bool inside(const std::array<Point, 3>& at, Point centre) {
        const Point nudged{centre.x + 1e-6, centre.y + 1e-12};
        const double whole = twice_area(at[0], at[1], at[2]);
        for (std::size_t i = 0; i < 3; ++i) {
            if (twice_area(at[i], at[(i + 1) % 3], nudged) * whole <= 0) return false;
        }
        return true;
    }

    void blend(std::uint32_t& pixel, const std::array<const ImDrawVert*, 3>& corners,
               const std::array<Point, 3>& at, Point centre) const {
        const double whole = twice_area(at[0], at[1], at[2]);
        Channels ink{};
        double u = 0;
        double v = 0;
        for (std::size_t i = 0; i < 3; ++i) {
            const double share = twice_area(at[(i + 1) % 3], at[(i + 2) % 3], centre) / whole;
            const Channels colour = unpacked(corners[i]->col);
            for (std::size_t channel = 0; channel < 4; ++channel) ink[channel] += share * colour[channel];
            u += share * corners[i]->uv.x * TestAtlas::width;
            v += share * corners[i]->uv.y * TestAtlas::height;
        }
        const double alpha = ink[3] / 255 * texel(atlas_, u, v) / 255;
        const Channels before = unpacked(pixel);
        pixel = 0xFF000000U;
        for (std::size_t channel = 0; channel < 3; ++channel) {
            const double mixed = ink[channel] * alpha + before[channel] * (1 - alpha);
            pixel |= static_cast<std::uint32_t>(std::lround(mixed)) << (8 * channel);
        }
    }

    const ImDrawData& data_;
    const TestAtlas& atlas_;
    int width_;
    int height_;
    std::vector<std::uint32_t> pixels_;
};

} // namespace

std::vector<std::uint32_t> slow_paint(const ImDrawData& data, const TestAtlas& atlas, int width, int height,
                                      std::uint32_t background) {
    return SlowPainter(data, atlas, width, height, background).paint();
}

int greatest_difference(const std::vector<std::uint32_t>& a, const std::vector<std::uint32_t>& b) {
    int greatest = a.size() == b.size() ? 0 : 255;
    for (std::size_t i = 0; i < a.size() && i < b.size(); ++i) {
        const Channels one = unpacked(a[i]);
        const Channels other = unpacked(b[i]);
        for (std::size_t channel = 0; channel < 4; ++channel)
            greatest = std::max(greatest, std::abs(static_cast<int>(one[channel] - other[channel])));
    }
    return greatest;
}

} // namespace steelyard::testing
