#pragma once

#include <imgui.h>

namespace steelyard {

/// A five-pointed star: the mark of what is named as mattering most.
void draw_star(ImVec2 centre, float radius, ImU32 colour);

} // namespace steelyard
