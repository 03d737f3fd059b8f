#pragma once

#include <string_view>

#include "shell/ui.hpp"

namespace steelyard {

/// A card that is as tall as what is drawn in it: draw while it lives, then say where the content ends. Not
/// to be nested, and no scrolled area inside.
class GrowingCard {
public:
    static constexpr float padding = 20;

    /// `ground` and `border` 0: those of every card.
    GrowingCard(Ui& ui, ImVec2 at, float width, ImU32 ground = 0, ImU32 border = 0);
    ~GrowingCard();
    GrowingCard(const GrowingCard&) = delete;
    GrowingCard& operator=(const GrowingCard&) = delete;

    /// Where the content may stand.
    float left() const { return at_.x + padding; }
    float width() const { return width_ - 2 * padding; }
    float right() const { return left() + width(); }

    /// Draws the heading of the card; gives where the content below it begins.
    float heading(std::string_view text);

    /// Lowest point of the content. Gives the bottom of the card, which is drawn when the card ends.
    float end(float content_bottom);

private:
    Ui& ui_;
    ImVec2 at_;
    float width_;
    float bottom_;
    ImU32 border_;
    OnPaper paper_;
};

/// The width for cards in a scrolled room: a little less than there is where a scroll bar stands beside them.
float cards_width(const Box& area, const Box& scrolled);

} // namespace steelyard
