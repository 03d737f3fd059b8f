#pragma once

#include <string_view>

#include "shell/ui.hpp"

namespace steelyard {

/// "Larger" or "Smaller" at the right end of a card's head, from which it takes its place. `what`: "the
/// grid", for its name. True when pressed.
bool size_button(Ui& ui, std::string_view id, std::string_view what, bool large, Box& head);

} // namespace steelyard
