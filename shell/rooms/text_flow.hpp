#pragma once

#include <string_view>

#include "shell/ui.hpp"
#include "shell/widgets/text.hpp"

namespace steelyard {

/// Texts and controls one below the other in a column.
class TextFlow {
public:
    TextFlow(Ui& ui, float x, float y, float width) : ui_(ui), x_(x), y_(y), width_(width) {}

    float x() const { return x_; }
    float y() const { return y_; }
    float width() const { return width_; }
    float right() const { return x_ + width_; }

    /// A paragraph; nothing for an empty text. `ink` 0: the theme's.
    void say(std::string_view text, Font font = Font::body, ImU32 ink = 0, float gap = 4);

    /// The place of something `height` high.
    Box next(float height, float gap = 6);
    void space(float height) { y_ += height; }

private:
    Ui& ui_;
    float x_;
    float y_;
    float width_;
};

} // namespace steelyard
