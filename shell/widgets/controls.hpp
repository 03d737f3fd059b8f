#pragma once

#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "shell/ui.hpp"

namespace steelyard {

/// All controls stand in a Box given in CSS pixels of the page, take a stable `id` (unique within the room),
/// report themselves to the ledger and show a two-colour ring when they have the keyboard focus. Targets are
/// 24 px or more.

enum class ButtonKind { plain, strong, quiet, link };

/// True when pressed by mouse, touch, Space or Enter.
bool button(Ui& ui, std::string_view id, std::string_view label, const Box& box,
            ButtonKind kind = ButtonKind::plain, bool enabled = true);

/// Width a button of this label needs at 32 px height.
float button_width(std::string_view label, ButtonKind kind = ButtonKind::plain);

/// A whole area that can be pressed; draws nothing but hover and focus. `role` as in the ledger: "button",
/// "tab", "row" …
bool press_area(Ui& ui, std::string_view id, std::string_view label, const Box& box,
                std::string_view role = "button", std::string_view value = {}, bool enabled = true);

/// A line of text. Gives the new text once it is finished (Enter, Tab or focus elsewhere), never half-typed;
/// Escape keeps the old one. `name` is what the field is called.
std::optional<std::string> text_field(Ui& ui, std::string_view id, std::string_view name,
                                      const std::string& value, const Box& box, std::string_view hint = {});

/// Several lines of text, the same rules; Ctrl+Enter finishes.
std::optional<std::string> text_area(Ui& ui, std::string_view id, std::string_view name,
                                     const std::string& value, const Box& box, std::string_view hint = {});

/// What is typed now in the field with this id, if it is active.
const std::string* draft_of(const Ui& ui, std::string_view id);

/// A few choices side by side, one chosen. Gives the index newly chosen.
std::optional<std::size_t> choice(Ui& ui, std::string_view id, std::string_view name,
                                  const std::vector<std::string>& labels, std::size_t chosen, const Box& box);

/// A list that drops down, for more choices.
std::optional<std::size_t> drop_down(Ui& ui, std::string_view id, std::string_view name,
                                     const std::vector<std::string>& labels, std::size_t chosen,
                                     const Box& box);

/// A box to tick, with its label. Gives the new state.
std::optional<bool> tick_box(Ui& ui, std::string_view id, std::string_view label, bool ticked,
                             const Box& box);

} // namespace steelyard
