#include "shell/rooms/text_flow.hpp"

namespace steelyard {

void TextFlow::say(std::string_view text, Font font, ImU32 ink, float gap) {
    if (text.empty()) return;
    y_ += draw_paragraph(ui_, {x_, y_}, width_, text, {.font = font, .ink = ink}) + gap;
}

Box TextFlow::next(float height, float gap) {
    const Box box{x_, y_, width_, height};
    y_ += height + gap;
    return box;
}

} // namespace steelyard
