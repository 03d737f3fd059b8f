#pragma once

#include <string_view>

#include "shell/ui.hpp"

namespace steelyard {

/// Draws a card (rounded, bordered) and sets the paper behind what follows while it lives.
class Card {
public:
    Card(Ui& ui, const Box& box, ImU32 border = 0);

private:
    OnPaper paper_;
};

/// A scrolled area: everything drawn while it lives moves with the scroll and is clipped to the box.
/// `inner()` is where to draw, at its present scroll; call `reach(y)` with the lowest point drawn.
class ScrollArea {
public:
    ScrollArea(Ui& ui, std::string_view id, const Box& box);
    ~ScrollArea();
    ScrollArea(const ScrollArea&) = delete;
    ScrollArea& operator=(const ScrollArea&) = delete;

    Box inner() const { return inner_; }
    void reach(float bottom);
    void reach_right(float right);

private:
    Ui& ui_;
    Box inner_;
    float bottom_;
    float right_;
    bool before_;
};

/// A thin horizontal rule.
void rule(Ui& ui, float x, float y, float w);

/// An option's mark: its letter on its colour, `size` square. Grey where it takes no part.
void option_mark(Ui& ui, ImVec2 at, std::size_t index, bool in_play = true, float size = 22);

/// "A" for the first option, "AA" after "Z".
std::string option_letter(std::size_t index);

/// A horizontal bar, 0 to 1 of the box's width, rounded, on a quiet ground.
void bar(Ui& ui, const Box& box, float part, ImU32 colour);

} // namespace steelyard
