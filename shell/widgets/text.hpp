#pragma once

#include <string>
#include <string_view>

#include "shell/ui.hpp"

namespace steelyard {

enum class Align { left, centre, right };

struct TextLook {
    Font font = Font::body;
    ImU32 ink = 0;             ///< 0: the theme's ink.
    float max_width = 0;       ///< Above 0: a longer text is shortened with an ellipsis.
    Align align = Align::left; ///< Where `at` is: the left end, the middle or the right end.
};

/// Size of one line in CSS pixels.
ImVec2 text_size(Font font, std::string_view text);

/// From one line of a paragraph to the next.
float line_step(Font font);

/// Draws one line of text with its top at `at` and reports it. Returns its drawn size.
ImVec2 draw_text(Ui& ui, ImVec2 at, std::string_view text, const TextLook& look = {});

/// Draws a text broken into lines of `width`. Returns its height.
float draw_paragraph(Ui& ui, ImVec2 at, float width, std::string_view text, const TextLook& look = {});
float paragraph_height(float width, std::string_view text, Font font);

} // namespace steelyard
