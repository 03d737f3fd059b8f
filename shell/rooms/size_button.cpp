#include "shell/rooms/size_button.hpp"

#include <string>

#include "shell/widgets/controls.hpp"
#include "shell/widgets/text.hpp"

namespace steelyard {

bool size_button(Ui& ui, std::string_view id, std::string_view what, bool large, Box& head) {
    const char* text = large ? "Smaller" : "Larger";
    const Box place = head.take_right(text_size(Font::strong, text).x + 12, 2);
    const Box box{place.x, place.y, place.w, 26};
    const bool pressed = press_area(ui, id, (large ? "Shrink " : "Enlarge ") + std::string(what), box);
    draw_text(ui, {box.x + box.w / 2, box.y + (box.h - font_size(Font::strong)) / 2}, text,
              {.font = Font::strong, .ink = ui.look().steel, .align = Align::centre});
    return pressed;
}

} // namespace steelyard
