#pragma once

#include <imgui.h>

namespace steelyard {

/// The type sizes of the shell, in the order of the atlas.
enum class Font {
    body,    ///< Regular, 16 CSS pixels.
    small,   ///< Regular, 13.5.
    strong,  ///< Medium, 16.
    heading, ///< Medium, 20.
    large,   ///< Medium, 28.
    huge,    ///< Medium, 40: for numbers and names that are read across a room.
};
inline constexpr int font_count = 6;

/// The font of the current context, for ImGui::PushFont.
ImFont* font(Font which);

/// What ImDrawList::AddText and ImFont::CalcTextSizeA take as its size: the height of the face's own line in
/// CSS pixels, a whole number of device pixels. Any other size is stretched and blurred.
float font_size(Font which);

/// The size as CSS and WCAG count it, the em: Roboto's line is 2400/2048 of it.
constexpr float em_of(float size) {
    return size * 2048 / 2400;
}

/// Rasterises the fonts into the current context's atlas for a density (device pixels per CSS pixel), in
/// place of those there.
void build_fonts(float density);

} // namespace steelyard
