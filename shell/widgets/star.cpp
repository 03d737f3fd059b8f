#include "shell/widgets/star.hpp"

#include <array>
#include <cmath>
#include <numbers>

namespace steelyard {

void draw_star(ImVec2 centre, float radius, ImU32 colour) {
    std::array<ImVec2, 10> points;
    constexpr float inner = 0.42f;
    for (std::size_t i = 0; i < points.size(); ++i) {
        const float angle = std::numbers::pi_v<float> * (static_cast<float>(i) / 5 - 0.5f);
        const float r = i % 2 == 0 ? radius : radius * inner;
        points[i] = {centre.x + r * std::cos(angle), centre.y + r * std::sin(angle)};
    }
    ImDrawList* list = ImGui::GetWindowDrawList();
    // Hollow between its points: five kites around the middle.
    for (std::size_t i = 0; i < points.size(); i += 2) {
        const std::array kite{centre, points[(i + 9) % 10], points[i], points[i + 1]};
        list->AddConvexPolyFilled(kite.data(), static_cast<int>(kite.size()), colour);
    }
}

} // namespace steelyard
