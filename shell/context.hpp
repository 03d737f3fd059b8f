#pragma once

struct ImGuiContext;

namespace steelyard {

/// Makes an ImGui context the way the shell needs it: our fonts at the given density (device pixels per CSS
/// pixel), no .ini file, keyboard navigation, its own window switcher off. It becomes the current one.
/// Colours and spacing are the theme's.
ImGuiContext* make_context(float density);

/// Rebuilds the fonts for another density, 0.5 to 8 (others are taken as these); call between frames, and
/// give the painter the new atlas after it. Curves are drawn as finely as device pixels ask for: a style
/// assigned anew would lose that.
void set_density(float density);

/// Makes the soft rim of what is drawn into the current window from here on one device pixel wide; ImGui
/// makes it one CSS pixel wide, which is a blur at high density. Call after each Begin and BeginChild.
void sharpen_edges();

} // namespace steelyard
