#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "shell/widgets/text.hpp"

namespace steelyard {

/// A sentence in the middle of a box's width, in the largest type of those down to `least` that takes one
/// line; else in `least`, broken into at most `lines` lines, the last one shortened if need be. Returns its
/// height.
float draw_sentence(Ui& ui, const Box& box, std::string_view text, Font largest, Font least,
                    std::size_t lines, ImU32 ink = 0);

/// Several such sentences below each other, all in one size.
float draw_sentences(Ui& ui, const Box& box, const std::vector<std::string>& sentences, Font largest,
                     Font least, ImU32 ink = 0);

} // namespace steelyard
