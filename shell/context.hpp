#pragma once

struct ImGuiContext;

namespace steelyard {

/// Makes an ImGui context the way the shell needs it: our fonts at the given density (device pixels per CSS
/// pixel), our style, no .ini file, keyboard navigation, its own window switcher off. It becomes the current
/// one.
ImGuiContext* make_context(float density);

/// Rebuilds the fonts for another density; call between frames, and rebuild the painter's copy of the atlas
/// after it.
void set_density(float density);

/// Makes the soft rim of what is drawn into the current window from here on one device pixel wide; ImGui
/// makes it one CSS pixel wide, which is a blur at high density. Call after each Begin and BeginChild.
void sharpen_edges();

} // namespace steelyard
