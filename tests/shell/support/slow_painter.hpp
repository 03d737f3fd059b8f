#pragma once

#include <imgui.h>

#include <cstdint>
#include <vector>

#include "tests/shell/support/draw_lists.hpp"

namespace steelyard::testing {

/// The painter's obvious double: asks for every pixel and every triangle whether the centre lies inside, and
/// mixes in floating point. Takes corners as they are; letters must lie on whole pixels to come out alike.
std::vector<std::uint32_t> slow_paint(const ImDrawData& data, const TestAtlas& atlas, int width, int height,
                                      std::uint32_t background);

/// The greatest difference of a channel between two pictures of one size, 0 to 255.
int greatest_difference(const std::vector<std::uint32_t>& a, const std::vector<std::uint32_t>& b);

} // namespace steelyard::testing
