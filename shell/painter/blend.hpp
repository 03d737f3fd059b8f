#pragma once

#include <cstdint>

#include "shell/painter/scene.hpp"

namespace steelyard::painting {

/// a * b / 255, rounded to nearest; both 0 to 255.
constexpr Colour times255(Colour a, Colour b) {
    const Colour product = a * b + 128;
    return (product + (product >> 8)) >> 8;
}

/// `ink` with this alpha (0 to 255) over an opaque pixel, each channel rounded to nearest. Two channels go in
/// one word.
constexpr Colour over(Colour pixel, Colour ink, Colour alpha) {
    const Colour rest = 255 - alpha;
    Colour red_blue = (ink & 0xFF00FF) * alpha + (pixel & 0xFF00FF) * rest + 0x800080;
    red_blue = ((red_blue + ((red_blue >> 8) & 0xFF00FF)) >> 8) & 0xFF00FF;
    Colour green = ((ink >> 8) & 0xFF) * alpha + ((pixel >> 8) & 0xFF) * rest + 0x80;
    green = (green + (green >> 8)) & 0xFF00;
    return 0xFF000000U | red_blue | green;
}

} // namespace steelyard::painting
