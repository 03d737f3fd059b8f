#include "shell/rooms/growing_card.hpp"

#include "shell/widgets/text.hpp"

namespace steelyard {

GrowingCard::GrowingCard(Ui& ui, ImVec2 at, float width, ImU32 ground, ImU32 border)
    : ui_(ui),
      at_(at),
      width_(width),
      bottom_(at.y),
      border_(border != 0 ? border : ui.look().line),
      paper_(ui, ground != 0 ? ground : ui.look().card) {
    // The ground is drawn last, when its height is known, and comes first all the same.
    ImDrawList* list = ImGui::GetWindowDrawList();
    list->ChannelsSplit(2);
    list->ChannelsSetCurrent(1);
}

GrowingCard::~GrowingCard() {
    ImDrawList* list = ImGui::GetWindowDrawList();
    list->ChannelsSetCurrent(0);
    const ImVec2 end{at_.x + width_, bottom_};
    list->AddRectFilled(at_, end, ui_.paper, 8);
    list->AddRect(at_, end, border_, 8);
    list->ChannelsMerge();
}

float GrowingCard::heading(std::string_view text) {
    draw_text(ui_, {left(), at_.y + 16}, text,
              {.font = Font::strong, .ink = ui_.look().quiet, .max_width = width()});
    const float below = at_.y + 16 + line_step(Font::strong) + 8;
    end(below);
    return below;
}

float GrowingCard::end(float content_bottom) {
    bottom_ = content_bottom + padding;
    return bottom_;
}

float cards_width(const Box& area, const Box& scrolled) {
    constexpr float beside_bar = 8;
    return scrolled.w < area.w ? scrolled.w - beside_bar : scrolled.w;
}

} // namespace steelyard
