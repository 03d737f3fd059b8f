#pragma once

#include <imgui.h>

#include <map>
#include <string>
#include <string_view>

#include "shell/fonts.hpp"
#include "shell/ledger.hpp"
#include "shell/theme.hpp"

namespace steelyard {

/// A rectangle in CSS pixels.
struct Box {
    float x = 0;
    float y = 0;
    float w = 0;
    float h = 0;

    float right() const { return x + w; }
    float bottom() const { return y + h; }
    ImVec2 at() const { return {x, y}; }
    ImVec2 end() const { return {right(), bottom()}; }
    Box inset(float by) const { return {x + by, y + by, w - 2 * by, h - 2 * by}; }
    /// Takes a strip off and leaves the rest here.
    Box take_top(float height, float gap = 0);
    Box take_bottom(float height, float gap = 0);
    Box take_left(float width, float gap = 0);
    Box take_right(float width, float gap = 0);
};

/// What every widget needs: the theme, the ledger, and where it stands. One for the whole shell.
struct Ui {
    const Theme* theme = &light_theme();
    Ledger ledger;
    ImU32 paper = 0;                           ///< The colour behind what is drawn now.
    bool scrolling = false;                    ///< Inside a scrolled area.
    std::map<std::string, std::string> drafts; ///< Half-typed texts of the active field, by item id.
    std::string focus_next;     ///< Item id that takes the keyboard focus when it is drawn next.
    bool keyboard_used = false; ///< The last input was a key: focus rings show.

    const Theme& look() const { return *theme; }
};

/// Sets the colour behind what is drawn while it lives.
class OnPaper {
public:
    OnPaper(Ui& ui, ImU32 paper) : ui_(ui), before_(ui.paper) { ui.paper = paper; }
    ~OnPaper() { ui_.paper = before_; }
    OnPaper(const OnPaper&) = delete;
    OnPaper& operator=(const OnPaper&) = delete;

private:
    Ui& ui_;
    ImU32 before_;
};

} // namespace steelyard
