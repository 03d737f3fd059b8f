#pragma once

#include <imgui.h>

#include <string_view>

namespace steelyard {

/// The ImGui key for a browser's key event, or ImGuiKey_None. `key` is what the layout makes of it
/// (KeyboardEvent.key), `code` the place on the keyboard. Letters go by layout, so that Ctrl+Z is where the
/// letter Z is printed; where a layout has no Latin letter there, by place.
ImGuiKey key_of(std::string_view code, std::string_view key);

} // namespace steelyard
