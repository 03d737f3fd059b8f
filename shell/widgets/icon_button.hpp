#pragma once

#include <string_view>

#include "shell/ui.hpp"

namespace steelyard {

/// Signs drawn with a few lines, for acts that come with every item of a list.
enum class Icon { up, down, left, right, more, less, remove };

/// A button that shows a sign; `label` is what it is called, for tests and screen readers.
bool icon_button(Ui& ui, std::string_view id, std::string_view label, const Box& box, Icon icon,
                 bool enabled = true);

} // namespace steelyard
