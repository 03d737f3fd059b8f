#pragma once

#include <cstdint>
#include <vector>

#include "shell/painter/painter.hpp"

namespace steelyard::painting {

/// Positions are whole numbers of 1/256 device pixel. A pixel belongs to a shape if its centre does; a centre
/// on an edge belongs to the shape on its right, or below.
inline constexpr int one_pixel = 256;
inline constexpr int half_pixel = 128;

/// Positions are kept within this, so that products of two differences stay far inside 64 bits.
inline constexpr int farthest = 1 << 25;

/// The first pixel whose centre is not before `position`. Where a shape ends, it is the first pixel outside.
constexpr int first_pixel(int position) {
    return (position + half_pixel - 1) >> 8;
}

/// A colour as ImGui packs it: 0xAABBGGRR.
using Colour = std::uint32_t;
constexpr Colour alpha_of(Colour colour) {
    return colour >> 24;
}
constexpr Colour with_alpha(Colour colour, Colour alpha) {
    return (colour & 0xFFFFFF) | (alpha << 24);
}

struct Corner {
    int x = 0;
    int y = 0;
    Colour colour = 0;
    float u = 0; ///< Texels of the atlas.
    float v = 0;
};

enum class Kind : std::uint8_t {
    rectangle, ///< All of `bounds` in one colour.
    glyph,    ///< `bounds` in one colour, with the atlas's alpha from (source_x, source_y) on, one texel to a
              ///< pixel.
    polygon,  ///< One colour; each row meets it in one span.
    shaded,   ///< A triangle whose corners differ in alpha only.
    blended,  ///< A triangle whose corners differ in colour.
    textured, ///< A triangle with alpha from the atlas.
};

struct Primitive {
    PixelRect bounds; ///< Where it may touch pixels; clipped, not empty.
    Kind kind = Kind::rectangle;
    Colour colour = 0; ///< Unless the corners' colours count.
    int source_x = 0;
    int source_y = 0;
    int first_corner = 0; ///< Into Scene::corners.
    int corner_count = 0;
    std::uint64_t hash = 0; ///< Of all that decides what it looks like.
};

struct Atlas {
    std::vector<unsigned char> alpha;
    int width = 0;
    int height = 0;
};

/// A frame's drawing, in its order.
struct Scene {
    std::vector<Primitive> primitives;
    std::vector<Corner> corners;
};

/// Mixes a value into a hash; not for hostile input.
constexpr std::uint64_t mixed(std::uint64_t hash, std::uint64_t value) {
    hash = (hash ^ value) * 0x9E3779B97F4A7C15U;
    return hash ^ (hash >> 29);
}

constexpr std::uint64_t pair_of(int high, int low) {
    return (static_cast<std::uint64_t>(static_cast<std::uint32_t>(high)) << 32) |
           static_cast<std::uint32_t>(low);
}

constexpr bool is_empty(const PixelRect& rect) {
    return rect.left >= rect.right || rect.top >= rect.bottom;
}

constexpr PixelRect overlap(const PixelRect& a, const PixelRect& b) {
    return {a.left > b.left ? a.left : b.left, a.top > b.top ? a.top : b.top,
            a.right < b.right ? a.right : b.right, a.bottom < b.bottom ? a.bottom : b.bottom};
}

constexpr bool covers(const PixelRect& outer, const PixelRect& inner) {
    return outer.left <= inner.left && outer.top <= inner.top && outer.right >= inner.right &&
           outer.bottom >= inner.bottom;
}

} // namespace steelyard::painting
