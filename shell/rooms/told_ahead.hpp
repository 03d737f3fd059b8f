#pragma once

#include <string_view>
#include <utility>
#include <vector>

#include "shell/rooms/growing_card.hpp"

namespace steelyard {

/// Names with what is said about each, as a room that is yet to come tells what it will hold.
using Told = std::vector<std::pair<std::string_view, std::string_view>>;

/// Draws them one below the other in a card, from `y` on: name and text side by side where there is room for
/// it. Gives where they end.
float draw_told(Ui& ui, const GrowingCard& card, float y, const Told& told);

} // namespace steelyard
