#include <algorithm>

#include "shell/rooms/growing_card.hpp"
#include "shell/rooms/room.hpp"
#include "shell/rooms/told_ahead.hpp"
#include "shell/widgets/controls.hpp"
#include "shell/widgets/panels.hpp"
#include "shell/widgets/text.hpp"

namespace steelyard {
namespace {

constexpr float widest = 820;

const Told will_hold{
    {"Weights", "How far each weight can move before another option is first."},
    {"Figures", "The price, the delivery, the measured value at which first place changes."},
    {"Judgments", "Which answer, given otherwise, would put another option first."},
    {"Trials", "How often each option comes first when what was said and quoted is varied."},
    {"Worth finding out", "Which figure still open is most likely to change first place."},
    {"Across the table",
     "What a supplier would have to offer to be first, on a page that can be turned to them."},
};

/// Says what the room will hold; it holds nothing yet.
class TippingRoom : public Room {
public:
    void draw(Ui& ui, const RoomView&, Actions& actions, Box area) override {
        ScrollArea scroll(ui, "tipping", area);
        const Box inner = scroll.inner();
        const ImVec2 at = inner.at();
        const float width = std::min(cards_width(area, inner), widest);
        float y =
            at.y + draw_paragraph(ui, at, width, "What would change first place", {.font = Font::large}) + 12;
        {
            GrowingCard card(ui, {at.x, y}, width);
            y = card.heading("Not in this version yet. This room will hold:");
            y = card.end(draw_told(ui, card, y + 4, will_hold));
        }
        y += 12;
        {
            GrowingCard card(ui, {at.x, y}, width);
            y = card.heading("Until then");
            y +=
                draw_paragraph(
                    ui, {card.left(), y}, card.width(),
                    "Change a figure in Gauge or an answer in Weigh and watch the standing at the side. Undo "
                    "takes the change back.") +
                12;
            const float gauge_width = button_width("Go to Gauge");
            if (button(ui, "tipping/gauge", "Go to Gauge", {card.left(), y, gauge_width, 32}))
                actions.go(RoomId::gauge);
            const Box weigh{card.left() + gauge_width + 10, y, button_width("Go to Weigh"), 32};
            if (button(ui, "tipping/weigh", "Go to Weigh", weigh)) actions.go(RoomId::weigh);
            y = card.end(y + 32);
        }
        scroll.reach(y);
    }
};

} // namespace

std::unique_ptr<Room> make_tipping_room() {
    return std::make_unique<TippingRoom>();
}

} // namespace steelyard
