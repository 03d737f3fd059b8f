#pragma once

#include <optional>
#include <string>
#include <string_view>

#include "shell/ui.hpp"

namespace steelyard {

/// What Enter does in a field: it begins a new line, or it finishes and no line feed gets in.
enum class EnterKey { new_line, finishes };

/// As text_area or text_field (controls.hpp), with long lines broken at the box's width. The breaks are shown
/// only: they are part neither of the text nor of what is copied.
std::optional<std::string> wrapped_area(Ui& ui, std::string_view id, std::string_view name,
                                        const std::string& value, const Box& box,
                                        EnterKey enter = EnterKey::new_line, std::string_view hint = {});

/// Height of a box in which a text stands whole, between `least` and `most` lines.
float wrapped_height(std::string_view text, float width, int least, int most);

} // namespace steelyard
