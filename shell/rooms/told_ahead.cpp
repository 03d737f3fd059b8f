#include "shell/rooms/told_ahead.hpp"

#include <algorithm>

#include "shell/widgets/text.hpp"

namespace steelyard {

float draw_told(Ui& ui, const GrowingCard& card, float y, const Told& told) {
    float names = 0;
    for (const auto& [name, text] : told) names = std::max(names, text_size(Font::strong, name).x);
    const bool beside = card.width() - names >= 280;
    for (const auto& [name, text] : told) {
        draw_text(ui, {card.left(), y}, name, {.font = Font::strong});
        const float x = beside ? card.left() + names + 20 : card.left();
        if (!beside) y += line_step(Font::strong);
        y += draw_paragraph(ui, {x, y}, card.right() - x, text, {.ink = ui.look().quiet}) + 10;
    }
    return y - 10;
}

} // namespace steelyard
