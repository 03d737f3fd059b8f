#include "shell/painter/draw.hpp"

#include <algorithm>
#include <array>
#include <cstddef>

#include "shell/painter/blend.hpp"
#include "shell/painter/sample.hpp"
#include "shell/painter/spans.hpp"

namespace steelyard::painting {
namespace {

void fill_span(Colour* pixels, int count, Colour colour) {
    const Colour alpha = alpha_of(colour);
    if (alpha == 255) {
        std::fill_n(pixels, count, colour);
        return;
    }
    for (int i = 0; i < count; ++i) pixels[i] = over(pixels[i], colour, alpha);
}

void draw_glyph(const Canvas& canvas, const PixelRect& area, const Primitive& glyph, const Atlas& atlas) {
    const int count = area.right - area.left;
    const Colour colour = glyph.colour;
    const Colour alpha = alpha_of(colour);
    const int source_x = glyph.source_x + area.left - glyph.bounds.left;
    const int source_y = glyph.source_y + area.top - glyph.bounds.top;
    const unsigned char* texels =
        atlas.alpha.data() + static_cast<std::ptrdiff_t>(source_y) * atlas.width + source_x;
    for (int y = area.top; y < area.bottom; ++y) {
        Colour* pixels = canvas.row(y) + area.left;
        if (alpha == 255) {
            for (int i = 0; i < count; ++i) pixels[i] = over(pixels[i], colour, texels[i]);
        } else {
            for (int i = 0; i < count; ++i) pixels[i] = over(pixels[i], colour, times255(texels[i], alpha));
        }
        texels += atlas.width;
    }
}

/// A quantity that changes evenly over a triangle: plane through its values at the corners.
class Slope {
public:
    Slope(const Corner* corners, double at0, double at1, double at2) : at0_(at0) {
        const double x1 = corners[1].x - corners[0].x;
        const double y1 = corners[1].y - corners[0].y;
        const double x2 = corners[2].x - corners[0].x;
        const double y2 = corners[2].y - corners[0].y;
        const double area = x1 * y2 - x2 * y1;
        per_x_ = ((at1 - at0) * y2 - (at2 - at0) * y1) / area;
        per_y_ = ((at2 - at0) * x1 - (at1 - at0) * x2) / area;
        x_ = corners[0].x;
        y_ = corners[0].y;
    }

    double at(int column, int row) const {
        const double x = column * double{one_pixel} + half_pixel - x_;
        const double y = row * double{one_pixel} + half_pixel - y_;
        return at0_ + per_x_ * x + per_y_ * y;
    }

    double per_pixel() const { return per_x_ * one_pixel; }

private:
    double at0_;
    double per_x_;
    double per_y_;
    double x_;
    double y_;
};

/// A channel from 0 to 255 along a span, in 1/65536, ready to be cut off.
struct Run {
    std::int32_t start;
    std::int32_t step;

    Run(const Slope& slope, int row, int left, int right) {
        start = fixed(std::clamp(slope.at(left, row), 0.0, 255.0)) + 32768;
        // Within a triangle a channel stays within 0 to 255, so only the step of a single pixel can be out of
        // range.
        step = right - left > 1 ? fixed(std::clamp(slope.per_pixel(), -255.0, 255.0)) : 0;
    }

    Colour at(int i) const { return static_cast<Colour>(start + step * i) >> 16; }

private:
    static std::int32_t fixed(double value) { return static_cast<std::int32_t>(value * 65536); }
};

Slope channel_slope(const Corner* corners, int shift) {
    const auto value = [&](int i) { return double((corners[i].colour >> shift) & 255); };
    return {corners, value(0), value(1), value(2)};
}

void draw_shaded(const Canvas& canvas, const PixelRect& area, const Corner* corners) {
    const Colour colour = corners[0].colour;
    const Slope slope = channel_slope(corners, 24);
    scan(corners, 3, area, [&](int row, int left, int right) {
        const Run alpha(slope, row, left, right);
        Colour* pixels = canvas.row(row) + left;
        const int count = right - left;
        for (int i = 0; i < count; ++i) pixels[i] = over(pixels[i], colour, alpha.at(i));
    });
}

using Slopes = std::array<Slope, 4>;

Slopes channel_slopes(const Corner* corners) {
    return {channel_slope(corners, 0), channel_slope(corners, 8), channel_slope(corners, 16),
            channel_slope(corners, 24)};
}

/// Blends a span; `cover(alpha, i)` gives the alpha that counts at its i-th pixel.
template<class Cover>
void blend_span(Colour* pixels, const Slopes& slopes, int row, int left, int right, const Cover& cover) {
    const Run red(slopes[0], row, left, right);
    const Run green(slopes[1], row, left, right);
    const Run blue(slopes[2], row, left, right);
    const Run alpha(slopes[3], row, left, right);
    for (int i = 0; i < right - left; ++i) {
        const Colour ink = red.at(i) | (green.at(i) << 8) | (blue.at(i) << 16);
        pixels[i] = over(pixels[i], ink, cover(alpha.at(i), i));
    }
}

void draw_blended(const Canvas& canvas, const PixelRect& area, const Corner* corners) {
    const Slopes slopes = channel_slopes(corners);
    scan(corners, 3, area, [&](int row, int left, int right) {
        blend_span(canvas.row(row) + left, slopes, row, left, right, [](Colour alpha, int) { return alpha; });
    });
}

void draw_textured(const Canvas& canvas, const PixelRect& area, const Corner* corners, const Atlas& atlas) {
    const Slopes slopes = channel_slopes(corners);
    const Slope across(corners, double{corners[0].u}, double{corners[1].u}, double{corners[2].u});
    const Slope down(corners, double{corners[0].v}, double{corners[1].v}, double{corners[2].v});
    scan(corners, 3, area, [&](int row, int left, int right) {
        const std::int64_t u = texel_place(across.at(left, row));
        const std::int64_t v = texel_place(down.at(left, row));
        const std::int64_t u_step = texel_place(across.per_pixel());
        const std::int64_t v_step = texel_place(down.per_pixel());
        const auto cover = [&](Colour alpha, int i) {
            return times255(alpha, sample(atlas, u + u_step * i, v + v_step * i));
        };
        blend_span(canvas.row(row) + left, slopes, row, left, right, cover);
    });
}

} // namespace

void fill(const Canvas& canvas, const PixelRect& area, Colour colour) {
    for (int y = area.top; y < area.bottom; ++y)
        std::fill_n(canvas.row(y) + area.left, area.right - area.left, colour);
}

void draw(const Canvas& canvas, const PixelRect& area, const Scene& scene, const Primitive& primitive,
          const Atlas& atlas) {
    const PixelRect part = overlap(area, primitive.bounds);
    if (is_empty(part)) return;
    const Corner* corners = scene.corners.data() + primitive.first_corner;
    switch (primitive.kind) {
    case Kind::rectangle:
        for (int y = part.top; y < part.bottom; ++y)
            fill_span(canvas.row(y) + part.left, part.right - part.left, primitive.colour);
        break;
    case Kind::glyph: draw_glyph(canvas, part, primitive, atlas); break;
    case Kind::polygon:
        scan(corners, primitive.corner_count, part, [&](int row, int left, int right) {
            fill_span(canvas.row(row) + left, right - left, primitive.colour);
        });
        break;
    case Kind::shaded: draw_shaded(canvas, part, corners); break;
    case Kind::blended: draw_blended(canvas, part, corners); break;
    case Kind::textured: draw_textured(canvas, part, corners, atlas); break;
    }
}

} // namespace steelyard::painting
