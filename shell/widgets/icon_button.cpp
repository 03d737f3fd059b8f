#include "shell/widgets/icon_button.hpp"

#include <array>

#include "shell/widgets/controls.hpp"

namespace steelyard {
namespace {

/// The points of a sign in a square of 10, y downwards.
std::array<ImVec2, 3> chevron(Icon icon) {
    switch (icon) {
    case Icon::up:
    case Icon::less: return {{{1, 7}, {5, 3}, {9, 7}}};
    case Icon::left: return {{{7, 1}, {3, 5}, {7, 9}}};
    case Icon::right: return {{{3, 1}, {7, 5}, {3, 9}}};
    default: return {{{1, 3}, {5, 7}, {9, 3}}};
    }
}

/// Up, down, left and right move something: they have a shaft. More and less open and close: they have none.
bool has_shaft(Icon icon) {
    return icon == Icon::up || icon == Icon::down || icon == Icon::left || icon == Icon::right;
}

void draw_icon(ImDrawList& list, const Box& box, Icon icon, ImU32 ink) {
    const float x = box.x + box.w / 2 - 5;
    const float y = box.y + box.h / 2 - 5;
    const auto at = [&](float px, float py) { return ImVec2{x + px, y + py}; };
    constexpr float thickness = 1.8f;
    if (icon == Icon::remove) {
        list.AddLine(at(1, 1), at(9, 9), ink, thickness);
        list.AddLine(at(9, 1), at(1, 9), ink, thickness);
        return;
    }
    auto points = chevron(icon);
    if (has_shaft(icon)) {
        const bool upright = icon == Icon::up || icon == Icon::down;
        const float tip = icon == Icon::up || icon == Icon::left ? -2.0f : 2.0f;
        for (auto& point : points) (upright ? point.y : point.x) += tip;
        list.AddLine(upright ? at(5, 0) : at(0, 5), upright ? at(5, 10) : at(10, 5), ink, thickness);
    }
    for (auto& point : points) point = at(point.x, point.y);
    list.AddPolyline(points.data(), 3, ink, 0, thickness);
}

} // namespace

bool icon_button(Ui& ui, std::string_view id, std::string_view label, const Box& box, Icon icon,
                 bool enabled) {
    const bool pressed = press_area(ui, id, label, box, "button", {}, enabled);
    draw_icon(*ImGui::GetWindowDrawList(), box, icon, enabled ? ui.look().steel : ui.look().line);
    return pressed;
}

} // namespace steelyard
