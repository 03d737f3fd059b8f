#pragma once

#include <algorithm>
#include <cstddef>

#include "shell/painter/scene.hpp"

namespace steelyard::painting {

/// Texels in 1/65536, as sample() takes them; kept where texels can be.
inline std::int64_t texel_place(double texels) {
    constexpr double most = 1 << 20;
    return static_cast<std::int64_t>((texels > -most ? texels < most ? texels : most : -most) * 65536);
}

/// The atlas's alpha at a place in 1/65536 texel, between the four nearest texels, held at the border. White
/// without an atlas.
inline Colour sample(const Atlas& atlas, std::int64_t u, std::int64_t v) {
    if (atlas.alpha.empty()) return 255;
    const auto index = [](std::int64_t place, int size) {
        return static_cast<std::size_t>(std::clamp<std::int64_t>(place, 0, size - 1));
    };
    // Texel centres lie at halves; weights are rounded to 1/256.
    u -= 32768 - 128;
    v -= 32768 - 128;
    const auto width = static_cast<std::size_t>(atlas.width);
    const std::size_t left = index(u >> 16, atlas.width);
    const std::size_t right = index((u >> 16) + 1, atlas.width);
    const unsigned char* upper = atlas.alpha.data() + index(v >> 16, atlas.height) * width;
    const unsigned char* lower = atlas.alpha.data() + index((v >> 16) + 1, atlas.height) * width;
    const auto across = static_cast<Colour>((u >> 8) & 255);
    const auto down = static_cast<Colour>((v >> 8) & 255);
    const Colour above = upper[left] * (256 - across) + upper[right] * across;
    const Colour below = lower[left] * (256 - across) + lower[right] * across;
    return (above * (256 - down) + below * down + 32768) >> 16;
}

} // namespace steelyard::painting
