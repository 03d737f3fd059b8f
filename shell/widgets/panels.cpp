#include "shell/widgets/panels.hpp"

#include <algorithm>
#include <cmath>

#include "shell/context.hpp"
#include "shell/widgets/text.hpp"

namespace steelyard {

Card::Card(Ui& ui, const Box& box, ImU32 border) : paper_(ui, ui.look().card) {
    ImDrawList* list = ImGui::GetWindowDrawList();
    list->AddRectFilled(box.at(), box.end(), ui.look().card, 8);
    list->AddRect(box.at(), box.end(), border != 0 ? border : ui.look().line, 8);
}

ScrollArea::ScrollArea(Ui& ui, std::string_view id, const Box& box)
    : ui_(ui), inner_(box), bottom_(box.y), right_(box.x), before_(ui.scrolling) {
    ImGui::SetCursorScreenPos(box.at());
    ImGui::PushID(id.data(), id.data() + id.size());
    ImGui::BeginChild("area", {box.w, box.h}, ImGuiChildFlags_None,
                      ImGuiWindowFlags_NavFlattened | ImGuiWindowFlags_HorizontalScrollbar);
    sharpen_edges();
    const ImVec2 origin = ImGui::GetCursorScreenPos();
    inner_ = {origin.x, origin.y, box.w, box.h};
    if (ImGui::GetScrollMaxY() > 0) inner_.w -= ImGui::GetStyle().ScrollbarSize;
    bottom_ = inner_.y;
    right_ = inner_.x;
    ui_.scrolling = true;
}

ScrollArea::~ScrollArea() {
    // Tells ImGui how far the content reaches, so that it scrolls.
    ImGui::SetCursorScreenPos({std::max(inner_.x, right_ - 1), std::max(inner_.y, bottom_ - 1)});
    ImGui::Dummy({1, 1});
    ImGui::EndChild();
    ImGui::PopID();
    ui_.scrolling = before_;
}

void ScrollArea::reach(float bottom) {
    bottom_ = std::max(bottom_, bottom);
}
void ScrollArea::reach_right(float right) {
    right_ = std::max(right_, right);
}

void rule(Ui& ui, float x, float y, float w) {
    ImGui::GetWindowDrawList()->AddRectFilled({x, y}, {x + w, y + 1}, ui.look().line);
}

std::string option_letter(std::size_t index) {
    std::string letters;
    for (std::size_t i = index + 1; i > 0; i = (i - 1) / 26) {
        letters.insert(letters.begin(), static_cast<char>('A' + (i - 1) % 26));
    }
    return letters;
}

void option_mark(Ui& ui, ImVec2 at, std::size_t index, bool in_play, float size) {
    const Theme& theme = ui.look();
    const ImU32 colour =
        in_play ? option_colour(theme, index) : (theme.dark ? theme.quiet : IM_COL32(0x5E, 0x66, 0x6D, 255));
    at = {std::round(at.x), std::round(at.y)};
    ImGui::GetWindowDrawList()->AddRectFilled(at, {at.x + size, at.y + size}, colour, 4);
    const OnPaper paper(ui, colour);
    const Font which = size >= 20 ? Font::strong : Font::small;
    draw_text(ui, {at.x + size / 2, at.y + (size - font_size(which)) / 2}, option_letter(index),
              {.font = which, .ink = option_letter_colour(theme), .align = Align::centre});
}

void bar(Ui& ui, const Box& box, float part, ImU32 colour) {
    ImDrawList* list = ImGui::GetWindowDrawList();
    const float rounding = box.h / 2;
    list->AddRectFilled(box.at(), box.end(), ui.look().rail, rounding);
    const float width = std::clamp(part, 0.0f, 1.0f) * box.w;
    if (width >= 1) {
        list->AddRectFilled(box.at(), {box.x + std::max(width, box.h), box.bottom()}, colour, rounding);
    }
}

} // namespace steelyard
