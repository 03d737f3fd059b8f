#pragma once

#include "tests/shell/support/draw_lists.hpp"
#include "tests/support/dice.hpp"

namespace steelyard::testing {

/// A drawing of everything the painter knows, over and beside the edges of a screen of this size in CSS
/// pixels: `count` shapes in random order, with clip rectangles and further lists between them. Corners lie
/// on whole 1/256 device pixels and letters on whole device pixels at densities 1, 1.25 and 2.
DrawLists random_drawing(Dice& dice, int width, int height, float density, int count);

/// A colour whose alpha is 0, 255 or anything.
ImU32 random_colour(Dice& dice);

} // namespace steelyard::testing
