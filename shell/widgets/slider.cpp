#include "shell/widgets/slider.hpp"

#include <imgui_internal.h>

#include <algorithm>
#include <array>
#include <cmath>

#include "shell/widgets/text.hpp"
#include "shell/words.hpp"

namespace steelyard {
namespace {

constexpr float knob = 9; ///< Half the width of the weight.

double rounded(double value, bool fine) {
    return fine ? std::round(value * 10) / 10 : std::round(value);
}

std::optional<double> read_keys(const SliderState& state, ImGuiID id) {
    static constexpr std::array keys{ImGuiKey_LeftArrow, ImGuiKey_RightArrow, ImGuiKey_UpArrow,
                                     ImGuiKey_DownArrow, ImGuiKey_Home,       ImGuiKey_End,
                                     ImGuiKey_PageUp,    ImGuiKey_PageDown};
    // Owned from frame to frame, or ImGui would move its own focus as well.
    for (const ImGuiKey key : keys) ImGui::SetKeyOwner(key, id);
    const ImGuiIO& io = ImGui::GetIO();
    if (io.KeyCtrl || io.KeyAlt || io.KeySuper) return std::nullopt;
    const auto pressed = [](ImGuiKey key) { return ImGui::IsKeyPressed(key, true) ? 1 : 0; };
    const int steps = pressed(ImGuiKey_RightArrow) + pressed(ImGuiKey_UpArrow) - pressed(ImGuiKey_LeftArrow) -
                      pressed(ImGuiKey_DownArrow);
    const int tens = pressed(ImGuiKey_PageUp) - pressed(ImGuiKey_PageDown);
    std::optional<double> next;
    if (steps != 0) {
        // To the next whole number, from between two.
        const double from = io.KeyShift ? state.value
                            : steps > 0 ? std::floor(state.value + 1e-9)
                                        : std::ceil(state.value - 1e-9);
        next = rounded(from + (io.KeyShift ? 0.1 : 1) * steps, io.KeyShift);
    }
    if (tens != 0) next = state.value + 10 * tens;
    if (ImGui::IsKeyPressed(ImGuiKey_Home, false)) next = 0;
    if (ImGui::IsKeyPressed(ImGuiKey_End, false)) next = state.most;
    return next;
}

} // namespace

SliderAnswer slider(Ui& ui, std::string_view id, std::string_view label, const SliderState& state,
                    const Box& box) {
    const Theme& theme = ui.look();
    ImGui::SetCursorScreenPos(box.at());
    ImGui::PushID(id.data(), id.data() + id.size());
    ImGui::BeginDisabled(!state.enabled);
    if (ui.focus_next == id) {
        ImGui::SetKeyboardFocusHere();
        ui.focus_next.clear();
    }
    ImGui::InvisibleButton("slide", {box.w, box.h});
    const bool active = ImGui::IsItemActive();
    const bool activated = ImGui::IsItemActivated();
    const bool released = ImGui::IsItemDeactivated();
    const bool focused = ImGui::IsItemFocused();
    const bool hovered = ImGui::IsItemHovered();
    const ImGuiID item_id = ImGui::GetItemID();
    ImGui::EndDisabled();
    ImGui::PopID();
    if (hovered && state.enabled) ImGui::SetMouseCursor(ImGuiMouseCursor_Hand);

    const double end = std::clamp(state.limit.value_or(state.most), 0.0, state.most);
    SliderAnswer answer;
    if (state.enabled && focused && !active) {
        answer.value = read_keys(state, item_id);
        if (answer.value) answer.value = std::clamp(*answer.value, 0.0, end);
        if (answer.value == state.value) answer.value.reset();
    }
    const ImGuiIO& io = ImGui::GetIO();
    const Box track{box.x + knob, box.y + box.h / 2 - 4, box.w - 2 * knob, 8};
    const double under =
        rounded(static_cast<double>((io.MousePos.x - track.x) / track.w) * state.most, io.KeyShift);
    if (state.enabled && ImGui::IsMousePosValid()) {
        answer.grabbed = activated && io.MouseDown[0];
        if (active && io.MouseDown[0]) answer.preview = std::clamp(under, 0.0, end);
        if (released && io.MouseReleased[0]) answer.value = std::clamp(under, 0.0, end);
    }

    const double shown = answer.preview ? *answer.preview : answer.value ? *answer.value : state.value;
    const auto at = [&](double value) {
        return track.x + track.w * static_cast<float>(std::clamp(value / state.most, 0.0, 1.0));
    };
    ImDrawList* list = ImGui::GetWindowDrawList();
    list->AddRectFilled(track.at(), track.end(), theme.rail, 4);
    if (state.set) list->AddRectFilled(track.at(), {at(shown), track.bottom()}, theme.steel, 4);
    for (int tenth = 0; tenth <= 10; ++tenth) {
        const float x = at(state.most * tenth / 10);
        list->AddLine({x, track.bottom() + 3}, {x, track.bottom() + (tenth % 5 == 0 ? 8.0F : 6.0F)},
                      theme.edge);
    }
    if (state.limit && end < state.most)
        list->AddLine({at(end), track.y - 5}, {at(end), track.bottom() + 5}, theme.brass_ink, 2);
    if (state.other) {
        const float x = at(*state.other);
        list->AddTriangle({x, track.y - 2}, {x + 6, track.y - 11}, {x - 6, track.y - 11}, theme.brass_ink,
                          1.6F);
    }
    // The weight hangs on the bar by its hook.
    const float x = at(shown);
    const ImVec2 cup[4] = {{x - knob, track.y - 5},
                           {x + knob, track.y - 5},
                           {x + 6, track.bottom() + 7},
                           {x - 6, track.bottom() + 7}};
    list->AddConvexPolyFilled(cup, 4, !state.set ? theme.card : state.enabled ? theme.brass : theme.rail);
    list->AddPolyline(cup, 4, theme.brass_ink, ImDrawFlags_Closed, 1.6F);
    if (focused && ui.keyboard_used) {
        list->AddRect({x - 13, track.y - 10}, {x + 13, track.bottom() + 12}, theme.focus, 6, 0, 2);
        list->AddRect({x - 11, track.y - 8}, {x + 11, track.bottom() + 10}, theme.card, 4, 0, 1.5F);
    }

    LedgerItem item;
    item.id = std::string(id);
    item.label = std::string(label);
    item.role = "slider";
    item.value = state.set || answer.preview ? figure_text(shown) : "";
    item.at = box.at();
    item.size = {box.w, box.h};
    item.enabled = state.enabled;
    item.focused = focused;
    item.may_scroll = ui.scrolling;
    ui.ledger.add(std::move(item));
    return answer;
}

} // namespace steelyard
