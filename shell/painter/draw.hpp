#pragma once

#include "shell/painter/scene.hpp"

namespace steelyard::painting {

/// An opaque picture, row by row without gaps.
struct Canvas {
    Colour* pixels = nullptr;
    int width = 0;

    Colour* row(int y) const { return pixels + static_cast<std::ptrdiff_t>(y) * width; }
};

/// Gives an area one opaque colour.
void fill(const Canvas& canvas, const PixelRect& area, Colour colour);

/// Paints what of a primitive lies in `area`, which lies on the canvas.
void draw(const Canvas& canvas, const PixelRect& area, const Scene& scene, const Primitive& primitive,
          const Atlas& atlas);

} // namespace steelyard::painting
