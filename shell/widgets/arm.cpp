#include "shell/widgets/arm.hpp"

#include <imgui_internal.h>

#include <algorithm>
#include <cmath>
#include <numbers>

#include "shell/widgets/text.hpp"
#include "shell/words.hpp"

namespace steelyard {
namespace {

constexpr int scale_end = 9;            ///< Saaty 1980.
constexpr double steepest = 7.5;        ///< Degrees of tilt at the end of the graduation.
constexpr float settle_within = 7;      ///< CSS pixels around a notch.
const double whole_arm = std::log(9.0); ///< ln of the ratio at either end.

/// Where a ratio stands on the graduation: -1 at the left end, 1 at the right end.
double position_of(double ratio) {
    return std::clamp(-std::log(ratio) / whole_arm, -1.0, 1.0);
}
double ratio_at(double position) {
    return std::exp(-std::clamp(position, -1.0, 1.0) * whole_arm);
}

/// The scale's value nearest to a ratio: 9, 8, ... 1, 1/2, ... 1/9.
double nearest_notch(double ratio) {
    double best = 1;
    for (int k = 1; k <= scale_end; ++k) {
        for (const double notch : {static_cast<double>(k), 1.0 / k}) {
            if (std::abs(std::log(notch / ratio)) < std::abs(std::log(best / ratio))) best = notch;
        }
    }
    return best;
}

/// The beam with its tilt: turns positions on the graduation into points of the page.
struct Beam {
    ImVec2 pivot;
    float half = 0; ///< Length of one side.
    ImVec2 along{1, 0};

    ImVec2 at(double position, float above = 0) const {
        const float d = static_cast<float>(position) * half;
        return {pivot.x + along.x * d + along.y * above, pivot.y + along.y * d - along.x * above};
    }
};

Beam make_beam(const Box& box, double position) {
    Beam beam;
    beam.half = std::min(box.w * 0.42f, 340.0f);
    beam.pivot = {box.x + box.w / 2, box.y + box.h * 0.42f};
    const double angle = position * steepest * std::numbers::pi / 180;
    beam.along = {static_cast<float>(std::cos(angle)), static_cast<float>(std::sin(angle))};
    return beam;
}

void draw_stand(const Ui& ui, const Beam& beam, float foot) {
    const Theme& theme = ui.look();
    ImDrawList* list = ImGui::GetWindowDrawList();
    const ImVec2 p = beam.pivot;
    list->AddTriangleFilled({p.x, p.y}, {p.x - 26, foot}, {p.x + 26, foot}, theme.rail);
    list->AddLine({p.x, p.y}, {p.x - 26, foot}, theme.steel, 2);
    list->AddLine({p.x, p.y}, {p.x + 26, foot}, theme.steel, 2);
    list->AddRectFilled({p.x - 60, foot - 1}, {p.x + 60, foot + 2}, theme.steel);
}

void draw_graduation(Ui& ui, const Beam& beam) {
    const Theme& theme = ui.look();
    ImDrawList* list = ImGui::GetWindowDrawList();
    list->AddLine(beam.at(-1.02), beam.at(1.02), theme.steel, 7);
    for (int k = 2; k <= scale_end; ++k) {
        const bool named = k % 2 == 1;
        for (const double side : {-1.0, 1.0}) {
            const double t = side * std::log(static_cast<double>(k)) / whole_arm;
            list->AddLine(beam.at(t, -4), beam.at(t, named ? -13.0f : -9.0f), theme.steel,
                          named ? 2.0f : 1.5f);
            if (!named) continue;
            const ImVec2 at = beam.at(t, -17);
            draw_text(ui, {at.x, at.y}, "\xC3\x97" + std::to_string(k),
                      {.font = Font::small, .ink = theme.quiet, .align = Align::centre});
        }
    }
}

/// The poise: a cup hung on the beam, its hook through it.
void draw_poise(const Ui& ui, const Beam& beam, double position, bool solid) {
    const Theme& theme = ui.look();
    ImDrawList* list = ImGui::GetWindowDrawList();
    const ImVec2 foot = beam.at(position, 5);
    const ImVec2 cup[4] = {{foot.x - 17, foot.y - 34},
                           {foot.x + 17, foot.y - 34},
                           {foot.x + 11, foot.y - 8},
                           {foot.x - 11, foot.y - 8}};
    if (solid) {
        list->AddLine({foot.x, foot.y - 10}, beam.at(position, -12), theme.brass, 3);
        list->AddConvexPolyFilled(cup, 4, theme.brass);
        list->AddPolyline(cup, 4, theme.brass_ink, ImDrawFlags_Closed, 2);
        return;
    }
    // An empty one, in dashes.
    for (int side = 0; side < 4; ++side) {
        const ImVec2 a = cup[side];
        const ImVec2 b = cup[(side + 1) % 4];
        constexpr int dashes = 4;
        for (int i = 0; i < dashes; ++i) {
            const float from = static_cast<float>(i) / dashes;
            const float to = from + 0.6f / dashes;
            list->AddLine({a.x + (b.x - a.x) * from, a.y + (b.y - a.y) * from},
                          {a.x + (b.x - a.x) * to, a.y + (b.y - a.y) * to}, theme.brass_ink, 1.6f);
        }
    }
}

void draw_load(Ui& ui, const Load& load, const ImVec2& at, Align align, float width) {
    draw_text(ui, at, load.name, {.font = Font::strong, .max_width = width, .align = align});
    draw_text(ui, {at.x, at.y + 22}, load.range,
              {.font = Font::small, .ink = ui.look().quiet, .max_width = width, .align = align});
}

bool pressed(ImGuiKey key) {
    return ImGui::IsKeyPressed(key, true);
}

/// What the keys say. Digits keep the side the poise is on; on a fresh pair they count for the left load.
void read_keys(const ArmState& state, bool focused, ArmAnswer& answer) {
    const ImGuiIO& io = ImGui::GetIO();
    if (io.WantTextInput || io.KeyCtrl || io.KeyAlt || io.KeySuper) return;
    const double now = state.ratio.value_or(1);
    const bool right_side = now < 1;
    for (int k = 1; k <= scale_end; ++k) {
        const auto row = static_cast<ImGuiKey>(ImGuiKey_0 + k);
        const auto pad = static_cast<ImGuiKey>(ImGuiKey_Keypad0 + k);
        if (ImGui::IsKeyPressed(row, false) || ImGui::IsKeyPressed(pad, false))
            answer.ratio = right_side ? 1.0 / k : k;
    }
    if (ImGui::IsKeyPressed(ImGuiKey_X, false)) answer.ratio = 1 / now;
    if (ImGui::IsKeyPressed(ImGuiKey_S, false)) answer.skip = true;
    if (!focused) return;
    const ImGuiID owner = ImGui::GetItemID();
    for (const ImGuiKey key :
         {ImGuiKey_LeftArrow, ImGuiKey_RightArrow, ImGuiKey_Enter, ImGuiKey_KeypadEnter}) {
        ImGui::SetKeyOwner(key, owner); // Else they would move the focus or press things.
    }
    if (pressed(ImGuiKey_LeftArrow)) answer.ratio = stepped_ratio(now, 1, io.KeyShift);
    if (pressed(ImGuiKey_RightArrow)) answer.ratio = stepped_ratio(now, -1, io.KeyShift);
    if (ImGui::IsKeyPressed(ImGuiKey_Enter, false) || ImGui::IsKeyPressed(ImGuiKey_KeypadEnter, false))
        answer.next = true;
}

} // namespace

double stepped_ratio(double ratio, int steps, bool fine) {
    // Signed steps from equal: 0 at 1, 8 at 9, -8 at 1/9; a step is one value of the scale.
    double step = ratio >= 1 ? ratio - 1 : 1 - 1 / ratio;
    step = fine ? std::round(step * 10 + steps) / 10
                : (steps > 0 ? std::floor(step + 1e-9) + steps : std::ceil(step - 1e-9) + steps);
    step = std::clamp(step, -8.0, 8.0);
    return step >= 0 ? 1 + step : 1 / (1 - step);
}

ArmAnswer draw_arm(Ui& ui, std::string_view id, std::string_view label, const ArmState& state,
                   const Box& box) {
    const Theme& theme = ui.look();
    ArmAnswer answer;

    ImGui::SetCursorScreenPos(box.at());
    ImGui::PushID(id.data(), id.data() + id.size());
    ImGui::BeginDisabled(!state.enabled);
    if (ui.focus_next == id) {
        ImGui::SetKeyboardFocusHere();
        ui.focus_next.clear();
    }
    ImGui::InvisibleButton("arm", {box.w, box.h});
    const bool active = ImGui::IsItemActive();
    const bool released = ImGui::IsItemDeactivated();
    const bool item_focused = ImGui::IsItemFocused();
    if (state.enabled) read_keys(state, item_focused, answer);
    ImGui::EndDisabled();
    ImGui::PopID();

    // The drag goes by the page's x alone, so that the tilt under the pointer does not pull at it.
    const ImGuiIO& io = ImGui::GetIO();
    const Beam level = make_beam(box, 0);
    const double under = static_cast<double>((io.MousePos.x - level.pivot.x) / level.half);
    double dragged = ratio_at(under);
    const double notch = nearest_notch(dragged);
    if (!io.KeyShift &&
        std::abs(position_of(notch) - position_of(dragged)) * static_cast<double>(level.half) <
            static_cast<double>(settle_within)) {
        dragged = notch;
    }
    const bool by_pointer = state.enabled && (active || released) && ImGui::IsMousePosValid();
    if (by_pointer && active && io.MouseDown[0]) answer.preview = dragged;
    if (by_pointer && released && io.MouseReleased[0]) answer.ratio = dragged;

    const std::optional<double> shown = answer.preview ? answer.preview
                                        : answer.ratio ? answer.ratio
                                                       : state.ratio;
    const double position = shown ? position_of(*shown) : 0;
    const Beam beam = make_beam(box, position);
    const float foot = std::min(box.bottom() - 8, beam.pivot.y + 74);
    draw_stand(ui, beam, foot);
    draw_graduation(ui, beam);
    draw_text(ui, {beam.pivot.x, beam.pivot.y + 20}, "equal",
              {.font = Font::small, .ink = theme.quiet, .align = Align::centre});
    ImDrawList* list = ImGui::GetWindowDrawList();
    list->AddCircleFilled(beam.pivot, 8, theme.card);
    list->AddCircle(beam.pivot, 8, theme.steel, 0, 3);

    if (state.other) {
        const double p = position_of(*state.other);
        if (!shown || std::abs(p - position) > 0.06) {
            draw_poise(ui, beam, p, false);
            // Clear of the poise's own number where the two stand close.
            const float lift = shown && std::abs(p - position) < 0.3 ? 76.0f : 56.0f;
            const ImVec2 top = beam.at(p, 5);
            draw_text(ui, {top.x, top.y - lift}, state.other_name,
                      {.font = Font::small, .ink = theme.brass_ink, .align = Align::centre});
        }
    }
    const ImVec2 at = beam.at(position, 5);
    if (shown) {
        draw_poise(ui, beam, position, true);
        const std::string times = "\xC3\x97" + ratio_text(*shown >= 1 ? *shown : 1 / *shown);
        draw_text(ui, {at.x, at.y - 58}, times, {.font = Font::strong, .align = Align::centre});
    } else if (!state.other) {
        draw_poise(ui, beam, 0, false);
        draw_text(ui, {at.x, at.y - 58}, "not judged",
                  {.font = Font::small, .ink = theme.brass_ink, .align = Align::centre});
    }
    const float load_width = box.w / 2 - 80;
    const float load_y = beam.pivot.y + 40;
    draw_load(ui, state.left, {box.x + 12, std::max(load_y, beam.at(-1).y + 36)}, Align::left, load_width);
    draw_load(ui, state.right, {box.right() - 12, std::max(load_y, beam.at(1).y + 36)}, Align::right,
              load_width);

    const bool ring = item_focused && ui.keyboard_used;
    if (ring) {
        list->AddRect({at.x - 24, at.y - 62}, {at.x + 24, at.y + 8}, theme.focus, 8, 0, 2);
    }
    LedgerItem item;
    item.id = std::string(id);
    item.label = std::string(label);
    item.role = "slider";
    item.value = shown ? ratio_text(*shown) : "";
    item.at = box.at();
    item.size = {box.w, box.h};
    item.enabled = state.enabled;
    item.focused = item_focused;
    item.may_scroll = ui.scrolling;
    ui.ledger.add(item);
    // The poise itself, where a hand takes it.
    item.id += "/poise";
    item.label = "Poise";
    item.role = "img";
    item.at = {at.x - 17, at.y - 34};
    item.size = {34, 40};
    ui.ledger.add(std::move(item));
    return answer;
}

} // namespace steelyard
