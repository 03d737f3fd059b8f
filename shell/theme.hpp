#pragma once

#include <imgui.h>

#include <cstddef>

namespace steelyard {

/// Every colour the shell draws with. Pairs of ink and paper keep a contrast of 4.5:1 or better; tests check
/// it.
struct Theme {
    bool dark = false;
    ImU32 paper;      ///< Behind everything.
    ImU32 card;       ///< What is worked on.
    ImU32 rail;       ///< The rail, section heads, quiet fills.
    ImU32 ink;        ///< Text.
    ImU32 quiet;      ///< Text in second place.
    ImU32 line;       ///< Rules and borders.
    ImU32 edge;       ///< Borders of fields and boxes, 3:1 on card and paper.
    ImU32 steel;      ///< Structure and links.
    ImU32 on_steel;   ///< Text on steel.
    ImU32 brass;      ///< The poise; what is chosen.
    ImU32 brass_ink;  ///< Text about what is open.
    ImU32 brass_wash; ///< Behind what is chosen.
    ImU32 red;        ///< Contradictions and refusals.
    ImU32 red_wash;
    ImU32 green; ///< What holds.
    ImU32 hover; ///< Laid over what the pointer is on, mostly transparent.
    ImU32 focus; ///< Outer ring of keyboard focus; the inner one is `card`.
};

const Theme& light_theme();
const Theme& dark_theme();

/// Colour of an option's mark and bars, by its place in the file, and the letter's colour on it.
ImU32 option_colour(const Theme& theme, std::size_t index);
ImU32 option_letter_colour(const Theme& theme);

/// Fills for parts of a stack (criteria), by place, and the text colour that reads on each.
struct Fill {
    ImU32 fill;
    ImU32 ink;
};
Fill part_fill(const Theme& theme, std::size_t index);

/// Puts the theme into ImGui's style: spacing, rounding, colours of its own widgets.
void apply_theme(const Theme& theme);

} // namespace steelyard
