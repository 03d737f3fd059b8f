#pragma once

#include <imgui.h>

#include "shell/painter/scene.hpp"

namespace steelyard::painting {

/// Turns a frame's draw lists into primitives of a screen of this size, in place of those in `scene`. Keeps
/// the drawing order; leaves out what nobody would see; user callbacks are skipped.
void collect(const ImDrawData& data, const Atlas& atlas, int width, int height, Scene& scene);

} // namespace steelyard::painting
