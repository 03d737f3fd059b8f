#pragma once

#include <imgui.h>

#include <span>

namespace steelyard {

/// A TrueType font carried in the program; see embed.py.
struct EmbeddedFont {
    std::span<const unsigned char> bytes;
    const ImWchar* ranges; ///< The characters it holds: pairs of first and last, then 0.
};

extern const EmbeddedFont text_regular;
extern const EmbeddedFont text_medium;
extern const EmbeddedFont symbols; ///< What the other two lack, for merging into them.

} // namespace steelyard
