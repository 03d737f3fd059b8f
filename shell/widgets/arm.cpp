#include "shell/widgets/arm.hpp"

#include <imgui_internal.h>

#include <algorithm>
#include <cmath>

#include "shell/widgets/arm_drawing.hpp"
#include "shell/widgets/controls.hpp"
#include "shell/words.hpp"

namespace steelyard {
namespace {

using arm::Beam;
using arm::position_of;
using arm::ratio_at;

constexpr int scale_end = 9;       ///< Saaty 1980.
constexpr float settle_within = 7; ///< CSS pixels around a notch.
constexpr float grab_above = 52;   ///< Where a press takes hold of the poise, from the beam's middle line.
constexpr float grab_below = 36;
constexpr float pulled_off = 84; ///< From where on letting go takes the poise off.

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

bool once(ImGuiKey key) {
    return ImGui::IsKeyPressed(key, false);
}
bool again(ImGuiKey key) {
    return ImGui::IsKeyPressed(key, true);
}

/// The other load counts as much more; on a fresh or equal pair, the next digit counts for the other one.
void turn(const ArmState& state, ArmMemory& memory, ArmAnswer& answer) {
    memory.typed.clear();
    if (state.ratio && *state.ratio != 1) {
        answer.ratio = 1 / *state.ratio;
    } else {
        memory.right_side = !memory.right_side;
    }
}

void type_digit(int digit, const ArmState& state, ArmMemory& memory, ArmAnswer& answer) {
    const bool right = state.ratio && *state.ratio != 1 ? *state.ratio < 1 : memory.right_side;
    const auto sign = memory.typed.find_first_of("./");
    if (sign == std::string::npos) {
        if (digit == 0) return;
        memory.typed = std::to_string(digit);
        memory.right_side = right;
        answer.ratio = right ? 1.0 / digit : digit;
        return;
    }
    memory.typed += std::to_string(digit);
    const auto typed = read_ratio(memory.typed);
    if (!typed) return;
    // A fraction says itself which side it means.
    const bool fraction = memory.typed[sign] == '/';
    answer.ratio = memory.right_side && !fraction ? 1 / *typed : *typed;
}

void read_signs(const ArmState& state, ArmMemory& memory, ArmAnswer& answer) {
    for (int k = 0; k <= scale_end; ++k) {
        if (once(static_cast<ImGuiKey>(ImGuiKey_0 + k)) || once(static_cast<ImGuiKey>(ImGuiKey_Keypad0 + k)))
            type_digit(k, state, memory, answer);
    }
    const bool point = once(ImGuiKey_Period) || once(ImGuiKey_Comma) || once(ImGuiKey_KeypadDecimal);
    const bool slash = once(ImGuiKey_Slash) || once(ImGuiKey_KeypadDivide);
    const bool number = !memory.typed.empty() && memory.typed.find_first_of("./") == std::string::npos;
    if (number && (point || slash)) memory.typed += point ? '.' : '/';
    if (once(ImGuiKey_X) || once(ImGuiKey_Minus) || once(ImGuiKey_KeypadSubtract))
        turn(state, memory, answer);
}

void read_keys(const ArmState& state, ArmMemory& memory, ArmAnswer& answer) {
    const ImGuiIO& io = ImGui::GetIO();
    if (io.WantTextInput || io.KeyCtrl || io.KeyAlt || io.KeySuper) return;
    const ImGuiID owner = ImGui::GetItemID();
    for (const ImGuiKey key :
         {ImGuiKey_LeftArrow, ImGuiKey_RightArrow, ImGuiKey_Enter, ImGuiKey_KeypadEnter}) {
        ImGui::SetKeyOwner(key, owner); // Else they would move the focus or press things.
    }
    read_signs(state, memory, answer);
    const double now = state.ratio.value_or(1);
    const int steps = int(again(ImGuiKey_LeftArrow)) - int(again(ImGuiKey_RightArrow));
    if (steps != 0) answer.ratio = stepped_ratio(now, steps, io.KeyShift);
    answer.skip = once(ImGuiKey_S);
    answer.next = once(ImGuiKey_Enter) || once(ImGuiKey_KeypadEnter);
    answer.take_back = state.ratio && (once(ImGuiKey_Delete) || once(ImGuiKey_Backspace));
    if (steps != 0 || answer.skip || answer.next || answer.take_back) memory.typed.clear();
}

/// What the pointer does while it holds the poise.
struct Hand {
    bool active = false;
    bool released = false;
};

void read_hand(const Hand& hand, const ArmState& state, ArmMemory& memory, const arm::Layout& layout,
               const Beam& beam, ArmAnswer& answer) {
    const ImGuiIO& io = ImGui::GetIO();
    if (!state.enabled || !ImGui::IsMousePosValid()) return;
    if (hand.active && ImGui::IsMouseClicked(ImGuiMouseButton_Left)) {
        const float x = (io.MousePos.x - beam.pivot.x) / beam.half;
        const float above = beam.at(std::clamp(x, -1.0f, 1.0f)).y - io.MousePos.y;
        memory.grabbed = above > -grab_below && above < grab_above;
    }
    if (!memory.grabbed) return;
    // The drag goes by the page's x alone, so that the tilt under the pointer does not pull at it.
    double dragged = ratio_at(static_cast<double>((io.MousePos.x - layout.pivot.x) / layout.half));
    const double notch = nearest_notch(dragged);
    const double away = std::abs(position_of(notch) - position_of(dragged));
    if (!io.KeyShift && away * static_cast<double>(layout.half) < static_cast<double>(settle_within))
        dragged = notch;
    const bool off = std::abs(io.MousePos.y - layout.pivot.y) > pulled_off + layout.drop;
    if (hand.active && io.MouseDown[0]) {
        answer.off = off;
        if (!off) answer.preview = dragged;
        memory.typed.clear();
    }
    if (hand.released && io.MouseReleased[0]) {
        memory.grabbed = false;
        if (off)
            answer.take_back = state.ratio.has_value();
        else
            answer.ratio = dragged;
    }
}

/// A press on a load says that it counts more.
void press_load(Ui& ui, std::string_view id, const ArmState& state, ArmMemory& memory, const Box& box,
                bool right, ArmAnswer& answer) {
    const Load& load = right ? state.right : state.left;
    const bool on = state.ratio ? (right ? *state.ratio < 1 : *state.ratio > 1) : memory.right_side == right;
    if (!press_area(ui, std::string(id) + (right ? "/right" : "/left"), load.name + " counts more", box,
                    "button", on ? "true" : "false", state.enabled))
        return;
    if (!on) turn(state, memory, answer);
    ui.focus_next = std::string(id);
}

void report(Ui& ui, std::string_view id, std::string_view label, const ArmState& state,
            const std::optional<double>& shown, const Box& box, ImVec2 poise, bool focused) {
    LedgerItem item;
    item.id = std::string(id);
    item.label = std::string(label);
    item.role = "slider";
    item.value = shown ? ratio_text(*shown) : "";
    item.at = box.at();
    item.size = {box.w, box.h};
    item.enabled = state.enabled;
    item.focused = focused;
    item.may_scroll = ui.scrolling;
    ui.ledger.add(item);
    // The poise itself, where a hand takes it.
    item.id += "/poise";
    item.label = "Poise";
    item.role = "img";
    item.at = {poise.x - 17, poise.y - 36};
    item.size = {34, 40};
    ui.ledger.add(std::move(item));
}

/// The empty poise, and what it is.
void draw_other(Ui& ui, const ArmState& state, const std::optional<double>& shown, const arm::Layout& layout,
                const Beam& beam, const std::string& own_number) {
    const double position = position_of(*state.other);
    const double own = shown ? position_of(*shown) : 0;
    if (shown && std::abs(position - own) < 0.06) return;
    arm::draw_poise(ui, beam, position, arm::PoiseLook::empty);
    const float width = text_size(Font::small, state.other_name).x;
    const ImVec2 top = beam.at(position, beam.poise_height());
    const float x = std::clamp(top.x, layout.box.x + width / 2, layout.box.right() - width / 2);
    float y = top.y - 2 - font_size(Font::small);
    if (shown) {
        // Clear of the poise's own number where the two stand close.
        const ImVec2 number = beam.at(own, beam.poise_height());
        const float reach = width / 2 + text_size(layout.load, own_number).x / 2 + 8;
        if (std::abs(number.x - x) < reach)
            y = std::min(y, number.y - 4 - font_size(layout.load) - 2 - font_size(Font::small));
    }
    draw_text(ui, {x, y}, state.other_name,
              {.font = Font::small, .ink = ui.look().brass_ink, .align = Align::centre});
}

/// Where the beam leans to: the poise, or with several judges and none agreed their mean.
double tilt_of(const ArmState& state, const std::optional<double>& shown) {
    if (shown) return position_of(*shown);
    return !state.named.empty() && state.other ? position_of(*state.other) : 0.0;
}

/// The poise with its number, or an empty one that says why.
void draw_own(Ui& ui, const ArmState& state, const std::optional<double>& shown, bool off,
              const arm::Layout& layout, const Beam& beam) {
    const std::string number =
        shown ? "\xC3\x97" + ratio_text(*shown >= 1 ? *shown : 1 / *shown) : std::string();
    if (state.other) draw_other(ui, state, shown, layout, beam, number);
    const double position = shown ? position_of(*shown) : 0;
    const ImVec2 top = beam.at(position, beam.poise_height() + 4);
    if (shown) {
        arm::draw_poise(ui, beam, position, arm::PoiseLook::own);
        draw_text(ui, {top.x, top.y - font_size(layout.load)}, number,
                  {.font = layout.load, .align = Align::centre});
    } else if (!state.other && !off) {
        arm::draw_poise(ui, beam, 0, arm::PoiseLook::empty);
        draw_text(ui, {top.x, top.y - font_size(Font::small)}, "not judged",
                  {.font = Font::small, .ink = ui.look().brass_ink, .align = Align::centre});
    }
}

/// Two colours, as around every control.
void draw_ring(const Ui& ui, const Beam& beam, double position) {
    ImDrawList* list = ImGui::GetWindowDrawList();
    const ImVec2 middle = beam.at(position, beam.poise_height() / 2 + 2);
    const float tall = beam.poise_height() / 2 + 1;
    const float wide = 22 * beam.scale;
    list->AddRect({middle.x - wide, middle.y - tall}, {middle.x + wide, middle.y + tall}, ui.look().focus, 8,
                  0, 2);
    list->AddRect({middle.x - wide + 2, middle.y - tall + 2}, {middle.x + wide - 2, middle.y + tall - 2},
                  ui.look().card, 6, 0, 2);
}

/// Everything there is to see; gives the beam as it leans. `off`: the poise is in the hand.
Beam picture(Ui& ui, const ArmState& state, const std::optional<double>& shown, bool right_side, bool off,
             const Box& box) {
    const arm::Layout layout = arm::lay_out(state, shown, box);
    const Beam beam = arm::beam_at(layout, tilt_of(state, shown));
    arm::draw_stand(ui, layout, beam);
    arm::draw_beam(ui, layout, beam);
    for (const bool right : {false, true})
        arm::draw_load(ui, right ? state.right : state.left, layout, beam, right, right_side && right);
    if (state.named.empty()) {
        draw_own(ui, state, shown, off, layout, beam);
        return beam;
    }
    if (state.other && !shown) arm::draw_poise(ui, beam, position_of(*state.other), arm::PoiseLook::empty);
    arm::draw_named(ui, state, layout, beam);
    return beam;
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

void show_arm(Ui& ui, const ArmState& state, bool right_side, const Box& box) {
    picture(ui, state, state.ratio, right_side, false, box);
}

ArmAnswer draw_arm(Ui& ui, std::string_view id, std::string_view label, const ArmState& state,
                   ArmMemory& memory, const Box& box) {
    ArmAnswer answer;
    const arm::Layout before = arm::lay_out(state, state.ratio, box);
    const Beam stood = arm::beam_at(before, tilt_of(state, state.ratio));

    // The loads come first: what is drawn first has the pointer.
    for (const bool right : {false, true})
        press_load(ui, id, state, memory, arm::load_box(before, stood, right), right, answer);
    ImGui::SetCursorScreenPos(box.at());
    ImGui::PushID(id.data(), id.data() + id.size());
    ImGui::BeginDisabled(!state.enabled);
    ImGui::InvisibleButton("arm", {box.w, box.h});
    if (ui.focus_next == id) {
        // At once: a request for the next frame is dropped where what has the focus now is drawn after this,
        // in a scrolled area.
        ImGui::SetFocusID(ImGui::GetItemID(), ImGui::GetCurrentWindow());
        if (memory.bring_in) ImGui::ScrollToItem(ImGuiScrollFlags_KeepVisibleEdgeY);
        memory.bring_in = false;
        ui.focus_next.clear();
    }
    const Hand hand{ImGui::IsItemActive(), ImGui::IsItemDeactivated()};
    const bool focused = ImGui::IsItemFocused();
    if (state.enabled && focused) read_keys(state, memory, answer);
    ImGui::EndDisabled();
    ImGui::PopID();
    read_hand(hand, state, memory, before, stood, answer);
    if (answer.take_back) memory = {};

    std::optional<double> shown = answer.preview ? answer.preview : answer.ratio ? answer.ratio : state.ratio;
    if (answer.off || answer.take_back) shown.reset();
    const bool fresh = !state.ratio || *state.ratio == 1;
    const Beam beam = picture(ui, state, shown, fresh && memory.right_side, answer.off, box);
    if (answer.off) {
        const ImVec2 mouse = ImGui::GetIO().MousePos;
        arm::draw_loose_poise(ui, {mouse.x, mouse.y + 16});
    }
    if (focused && ui.keyboard_used && !answer.off && shown) draw_ring(ui, beam, position_of(*shown));
    const double position = shown ? position_of(*shown) : 0;
    report(ui, id, label, state, shown, box, beam.at(position, beam.thickness(position)), focused);
    return answer;
}

} // namespace steelyard
