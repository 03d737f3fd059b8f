#include "shell/widgets/grid.hpp"

#include <imgui_internal.h>

#include <algorithm>
#include <array>

#include "shell/widgets/controls.hpp"
#include "shell/widgets/text.hpp"

namespace steelyard {
namespace {

constexpr int page_of_cells = 8;
constexpr int all_cells = 100000;

bool pressed_again(ImGuiKey key) {
    return ImGui::IsKeyPressed(key, true);
}
bool pressed_once(ImGuiKey key) {
    return ImGui::IsKeyPressed(key, false);
}

/// The sign of a number that a key stands for.
char sign_pressed() {
    for (int i = 0; i < 10; ++i) {
        if (pressed_once(static_cast<ImGuiKey>(ImGuiKey_0 + i)) ||
            pressed_once(static_cast<ImGuiKey>(ImGuiKey_Keypad0 + i)))
            return static_cast<char>('0' + i);
    }
    if (pressed_once(ImGuiKey_Minus) || pressed_once(ImGuiKey_KeypadSubtract)) return '-';
    if (pressed_once(ImGuiKey_Period) || pressed_once(ImGuiKey_KeypadDecimal)) return '.';
    return pressed_once(ImGuiKey_Comma) ? ',' : '\0';
}

/// Takes the text that arrived in this frame.
std::string take_typed_text() {
    std::string text;
    for (const ImWchar c : ImGui::GetIO().InputQueueCharacters) {
        std::array<char, 5> utf8{};
        ImTextCharToUtf8(utf8.data(), c);
        if (c >= 0x20 && c != 0x7f) text += utf8.data();
    }
    ImGui::GetIO().InputQueueCharacters.resize(0);
    return text;
}

/// The browser may deliver the sign whose key opened the cell as text too, once the field has the keyboard.
/// It is dropped unless another key was pressed since.
void drop_echo(CellEdit& edit) {
    if (edit.echo.empty()) return;
    auto& queue = ImGui::GetIO().InputQueueCharacters;
    if (sign_pressed() != '\0') {
        edit.echo.clear();
    } else if (!queue.empty()) {
        if (queue[0] == static_cast<ImWchar>(edit.echo[0])) queue.erase(queue.begin());
        edit.echo.clear();
    }
}

void read_keys(GridInput& input, ImGuiID id) {
    static constexpr std::array keys{ImGuiKey_LeftArrow, ImGuiKey_RightArrow, ImGuiKey_UpArrow,
                                     ImGuiKey_DownArrow, ImGuiKey_Home,       ImGuiKey_End,
                                     ImGuiKey_PageUp,    ImGuiKey_PageDown};
    // Owned from frame to frame, or ImGui would move its own focus as well.
    for (const ImGuiKey key : keys) ImGui::SetKeyOwner(key, id);
    const ImGuiIO& io = ImGui::GetIO();
    input.copy = (io.ConfigMacOSXBehaviors ? io.KeySuper : io.KeyCtrl) && pressed_once(ImGuiKey_C);
    if (io.KeyAlt || io.KeySuper) return;
    if (!io.KeyCtrl) {
        input.right = int(pressed_again(ImGuiKey_RightArrow)) - int(pressed_again(ImGuiKey_LeftArrow));
        input.down = int(pressed_again(ImGuiKey_DownArrow)) - int(pressed_again(ImGuiKey_UpArrow));
        input.down +=
            page_of_cells * (int(pressed_again(ImGuiKey_PageDown)) - int(pressed_again(ImGuiKey_PageUp)));
    }
    const bool home = pressed_once(ImGuiKey_Home);
    const bool end = pressed_once(ImGuiKey_End);
    if (home || end) {
        input.right = end ? all_cells : -all_cells;
        if (io.KeyCtrl) input.down = input.right;
    }
    if (io.KeyCtrl) return;
    input.clear = pressed_once(ImGuiKey_Delete) || pressed_once(ImGuiKey_Backspace);
    input.edit = pressed_once(ImGuiKey_F2) || pressed_once(ImGuiKey_Enter) ||
                 pressed_once(ImGuiKey_KeypadEnter) || pressed_once(ImGuiKey_Space);
    if (input.edit || input.clear) return;
    input.typed = take_typed_text();
    if (input.typed.empty() && !io.KeyShift) {
        if (const char sign = sign_pressed(); sign != '\0') {
            input.typed = sign;
            input.echo_due = true;
        }
    }
}

int grow(ImGuiInputTextCallbackData* data) {
    auto& edit = *static_cast<CellEdit*>(data->UserData);
    if (data->EventFlag == ImGuiInputTextFlags_CallbackResize) {
        edit.text.resize(static_cast<std::size_t>(data->BufTextLen));
        data->Buf = edit.text.data();
    } else if (data->EventFlag == ImGuiInputTextFlags_CallbackAlways && !edit.open) {
        edit.open = true;
        if (edit.caret_at_end) data->CursorPos = data->SelectionStart = data->SelectionEnd = data->BufTextLen;
    }
    return 0;
}

CellLeft how_left() {
    const bool shift = ImGui::GetIO().KeyShift;
    if (pressed_once(ImGuiKey_Escape)) return CellLeft::cancelled;
    if (pressed_once(ImGuiKey_Enter) || pressed_once(ImGuiKey_KeypadEnter))
        return shift ? CellLeft::up : CellLeft::down;
    if (pressed_once(ImGuiKey_Tab)) return shift ? CellLeft::left : CellLeft::right;
    return CellLeft::away;
}

} // namespace

void cell_ring(const Ui& ui, const Box& box) {
    ImDrawList* list = ImGui::GetWindowDrawList();
    list->AddRect({box.x - 1, box.y - 1}, {box.right() + 1, box.bottom() + 1}, ui.look().focus, 7, 0, 2);
    list->AddRect({box.x + 1, box.y + 1}, {box.right() - 1, box.bottom() - 1}, ui.look().card, 5, 0, 2);
}

GridInput grid_input(Ui& ui, std::string_view id, const Box& box, bool focus) {
    ImGuiWindow* window = ImGui::GetCurrentWindow();
    const ImGuiID item = window->GetID(id.data(), id.data() + id.size());
    const ImRect rect(box.at(), box.end());
    GridInput input;
    ImGui::SetCursorScreenPos(box.at());
    if (!ImGui::ItemAdd(rect, item)) return input;
    const ImGuiContext& g = *GImGui;
    if (focus || ui.focus_next == id) {
        ui.focus_next.clear();
        ImGui::SetFocusID(item, window);
    }
    bool hovered = false;
    bool held = false;
    const bool pressed = ImGui::ButtonBehavior(rect, item, &hovered, &held);
    const ImVec2 pointer = g.IO.MousePos;
    if (hovered) input.hovered = pointer;
    // ButtonBehavior counts Space and Enter as presses too; those are keys here.
    if (pressed && ImGui::IsMouseReleased(ImGuiMouseButton_Left)) {
        input.pressed = pointer;
        input.began = g.IO.MouseClickedPos[0];
    }
    input.focused = g.NavId == item && g.NavWindow == window;
    // The key that ended the editing of a cell is no key of the table.
    if (input.focused && !focus && (g.ActiveId == 0 || g.ActiveId == item)) read_keys(input, item);
    return input;
}

void begin_cell_edit(CellEdit& edit) {
    ImGui::PushID(edit.id.data(), edit.id.data() + edit.id.size());
    // Known to ImGui before the field is first drawn, so that the page learns in the same event that text is
    // wanted.
    GImGui->NavNextActivateId = ImGui::GetID("##text");
    GImGui->NavNextActivateFlags = ImGuiActivateFlags_PreferInput;
    ImGui::PopID();
    edit.open = false;
}

CellLeft cell_editor(Ui& ui, CellEdit& edit, std::string_view name, const Box& box) {
    ImGui::SetCursorScreenPos(box.at());
    ImGui::PushID(edit.id.data(), edit.id.data() + edit.id.size());
    const ImGuiID item = ImGui::GetID("##text");
    const bool had_it = GImGui->ActiveId == item;
    if (!had_it && !edit.open && GImGui->NavActivateId != item) ImGui::SetKeyboardFocusHere();
    drop_echo(edit);
    // Typed before the field had the keyboard.
    if (!had_it && !edit.open) edit.text += take_typed_text();

    ImGui::PushFont(font(Font::strong));
    const float padding = std::max(2.0F, (box.h - font_size(Font::strong)) / 2);
    ImGui::PushStyleVar(ImGuiStyleVar_FramePadding, {11, padding});
    ImGui::SetNextItemWidth(box.w);
    ImGui::InputText("##text", edit.text.data(), edit.text.capacity() + 1,
                     ImGuiInputTextFlags_CallbackResize | ImGuiInputTextFlags_CallbackAlways, grow, &edit);
    ImGui::PopStyleVar();
    ImGui::PopFont();
    const bool active = ImGui::IsItemActive();
    const bool left = ImGui::IsItemDeactivated();
    ImGui::PopID();

    CellLeft result = CellLeft::not_yet;
    if (active) {
        ImGui::SetKeyOwner(ImGuiKey_Tab, item); // ImGui itself would go to its next item.
        if (pressed_once(ImGuiKey_Tab)) {
            result = how_left();
            ImGui::ClearActiveID();
        }
    } else if (left) {
        result = how_left();
    }
    cell_ring(ui, box);
    if (edit.wrong) ImGui::GetWindowDrawList()->AddRect(box.at(), box.end(), ui.look().red, 6, 0, 3);
    LedgerItem report;
    report.id = edit.id;
    report.label = std::string(name);
    report.role = "textbox";
    report.value = edit.text;
    report.at = box.at();
    report.size = {box.w, box.h};
    report.focused = active;
    report.may_scroll = ui.scrolling;
    ui.ledger.add(std::move(report));
    return result;
}

std::optional<std::size_t> cell_choices(Ui& ui, std::string_view id, const std::vector<std::string>& labels,
                                        std::optional<std::size_t> chosen, const Box& cell, bool& open) {
    constexpr float row = 32;
    constexpr float tallest = 340;
    const std::string name(id);
    ImGui::PushID(id.data(), id.data() + id.size());
    if (open) ImGui::OpenPopup("answers");
    open = false;
    float width = cell.w;
    for (const auto& label : labels) width = std::max(width, text_size(Font::body, label).x + 32);
    const ImVec2 display = ImGui::GetIO().DisplaySize;
    width = std::min(width, display.x - 8);
    const float height = std::min(row * static_cast<float>(labels.size()) + 12, tallest);
    const bool above = cell.bottom() + 4 + height > display.y && cell.y - 4 - height > 0;
    ImGui::SetNextWindowPos({std::clamp(cell.x, 4.0F, std::max(4.0F, display.x - width - 4)),
                             above ? cell.y - 4 - height : cell.bottom() + 4});
    ImGui::SetNextWindowSize({width, height});
    std::optional<std::size_t> result;
    if (ImGui::BeginPopup("answers", ImGuiWindowFlags_NoMove)) {
        const bool scrolling_before = ui.scrolling;
        ui.scrolling = true;
        const ImVec2 origin = ImGui::GetCursorScreenPos();
        for (std::size_t i = 0; i < labels.size(); ++i) {
            const Box part{origin.x + 4, origin.y + 6 + row * static_cast<float>(i), width - 8, row};
            const bool on = chosen == i;
            const ImU32 ground = on ? ui.look().brass_wash : ui.look().card;
            ImGui::GetWindowDrawList()->AddRectFilled(part.at(), part.end(), ground, 6);
            const OnPaper paper(ui, ground);
            const std::string part_id = name + "/" + std::to_string(i);
            if (ImGui::IsWindowAppearing() && i == chosen.value_or(0)) ui.focus_next = part_id;
            if (press_area(ui, part_id, labels[i], part, "option", on ? "true" : "false")) {
                result = i;
                ImGui::CloseCurrentPopup();
            }
            draw_text(ui, {part.x + 10, part.y + (row - font_size(Font::body)) / 2}, labels[i],
                      {.max_width = part.w - 20});
        }
        ImGui::SetCursorScreenPos({origin.x, origin.y + 11 + row * static_cast<float>(labels.size())});
        ImGui::Dummy({1, 1});
        ui.scrolling = scrolling_before;
        ImGui::EndPopup();
    }
    ImGui::PopID();
    return result;
}

Box area_in_sight() {
    const ImRect inner = ImGui::GetCurrentWindow()->InnerRect;
    return {inner.Min.x, inner.Min.y, inner.GetWidth(), inner.GetHeight()};
}

void scroll_into_sight(const Box& wanted, float covered_left, float covered_top, bool page_too) {
    const Box sight = area_in_sight();
    const float left = wanted.x - (sight.x + covered_left);
    const float right = wanted.right() - sight.right();
    const float top = wanted.y - (sight.y + covered_top);
    const float bottom = wanted.bottom() - sight.bottom();
    const float by_x = left < 0 ? left : std::clamp(right, 0.0F, left);
    const float by_y = top < 0 ? top : std::clamp(bottom, 0.0F, top);
    if (by_x != 0) ImGui::SetScrollX(ImGui::GetScrollX() + by_x);
    if (by_y != 0) ImGui::SetScrollY(ImGui::GetScrollY() + by_y);
    if (!page_too) return;
    // On a small page this area stands in another one that is scrolled too. It is shown whole if it fits
    // there, so that what is covered by heads is seen with them.
    ImGuiWindow* around = ImGui::GetCurrentWindow()->ParentWindow;
    if (around == nullptr || (around->Flags & ImGuiWindowFlags_ChildWindow) == 0) return;
    const bool fits = sight.h <= around->InnerRect.GetHeight();
    const ImVec2 at = fits ? sight.at() : ImVec2{wanted.x - by_x, wanted.y - by_y};
    const ImVec2 end = fits ? sight.end() : ImVec2{at.x + wanted.w, at.y + wanted.h};
    ImGui::ScrollToRect(around, {at, end},
                        ImGuiScrollFlags_KeepVisibleEdgeX | ImGuiScrollFlags_KeepVisibleEdgeY);
}

} // namespace steelyard
