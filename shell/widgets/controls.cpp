#include "shell/widgets/controls.hpp"

#include <imgui_internal.h>

#include <algorithm>

#include "shell/context.hpp"
#include "shell/widgets/text.hpp"

namespace steelyard {
namespace {

std::string key_of(std::string_view id) {
    return std::string(id);
}

/// A ring of two colours, so that it shows on any ground.
void focus_ring(const Ui& ui, const Box& box) {
    ImDrawList* list = ImGui::GetWindowDrawList();
    const Box outer{box.x - 2, box.y - 2, box.w + 4, box.h + 4};
    list->AddRect(outer.at(), outer.end(), ui.look().focus, 8, 0, 2);
    list->AddRect(box.at(), box.end(), ui.look().card, 6, 0, 2);
}

struct Pressed {
    bool pressed = false;
    bool hovered = false;
    bool held = false;
    bool focused = false;
};

/// The invisible part of every control that is pressed.
Pressed press(Ui& ui, std::string_view id, const Box& box, bool enabled) {
    ImGui::SetCursorScreenPos(box.at());
    ImGui::PushID(id.data(), id.data() + id.size());
    ImGui::BeginDisabled(!enabled);
    if (ui.focus_next == id) {
        ImGui::SetKeyboardFocusHere();
        ui.focus_next.clear();
    }
    Pressed result;
    result.pressed = ImGui::InvisibleButton("press", {std::max(box.w, 1.0f), std::max(box.h, 1.0f)});
    result.hovered = ImGui::IsItemHovered();
    result.held = ImGui::IsItemActive();
    result.focused = ImGui::IsItemFocused() && ui.keyboard_used;
    ImGui::EndDisabled();
    ImGui::PopID();
    if (result.hovered && enabled) ImGui::SetMouseCursor(ImGuiMouseCursor_Hand);
    return result;
}

void report(Ui& ui, std::string_view id, std::string_view label, std::string_view role,
            std::string_view value, const Box& box, bool enabled, bool focused) {
    LedgerItem item;
    item.id = std::string(id);
    item.label = std::string(label);
    item.role = std::string(role);
    item.value = std::string(value);
    item.at = box.at();
    item.size = {box.w, box.h};
    item.enabled = enabled;
    item.focused = focused;
    item.may_scroll = ui.scrolling;
    ui.ledger.add(std::move(item));
}

int grow(ImGuiInputTextCallbackData* data) {
    if (data->EventFlag == ImGuiInputTextFlags_CallbackResize) {
        auto* text = static_cast<std::string*>(data->UserData);
        text->resize(static_cast<std::size_t>(data->BufTextLen));
        data->Buf = text->data();
    }
    return 0;
}

/// Both kinds of text field.
std::optional<std::string> edit_text(Ui& ui, std::string_view id, std::string_view name,
                                     const std::string& value, const Box& box, std::string_view hint,
                                     bool lines) {
    const std::string key = key_of(id);
    const auto draft = ui.drafts.find(key);
    std::string text = draft != ui.drafts.end() ? draft->second : value;

    ImGui::SetCursorScreenPos(box.at());
    ImGui::PushID(id.data(), id.data() + id.size());
    ImGui::PushFont(font(Font::body));
    if (ui.focus_next == id) {
        ImGui::SetKeyboardFocusHere();
        ui.focus_next.clear();
    }
    const float padding = std::max(2.0f, (std::min(box.h, 36.0f) - font_size(Font::body)) / 2);
    ImGui::PushStyleVar(ImGuiStyleVar_FramePadding, {10, padding});
    ImGuiInputTextFlags flags =
        ImGuiInputTextFlags_CallbackResize | (lines ? 0 : ImGuiInputTextFlags_AutoSelectAll);
    // What is pasted keeps its tabs, for rows of a spreadsheet; the key Tab goes on to the next field.
    const ImGuiIO& io = ImGui::GetIO();
    if (lines && (io.KeyCtrl || io.KeySuper) && !ImGui::IsKeyDown(ImGuiKey_Tab))
        flags |= ImGuiInputTextFlags_AllowTabInput;
    if (lines) {
        ImGui::InputTextMultiline("##text", text.data(), text.capacity() + 1, {box.w, box.h}, flags, grow,
                                  &text);
    } else {
        ImGui::SetNextItemWidth(box.w);
        ImGui::InputText("##text", text.data(), text.capacity() + 1, flags, grow, &text);
    }
    ImGui::PopStyleVar();
    ImGui::PopFont();
    const bool active = ImGui::IsItemActive();
    const bool finished = ImGui::IsItemDeactivatedAfterEdit();
    const bool focused = ImGui::IsItemFocused();
    ImGui::PopID();

    std::optional<std::string> result;
    if (finished && text != value) result = text;
    if (active) {
        ui.drafts[key] = text;
    } else {
        ui.drafts.erase(key);
    }
    if (focused && (active || ui.keyboard_used)) focus_ring(ui, box);
    if (text.empty() && !hint.empty() && !active) {
        const OnPaper paper(ui, ui.look().card);
        draw_text(ui, {box.x + 10, box.y + padding}, hint, {.ink = ui.look().quiet, .max_width = box.w - 20});
    }
    report(ui, id, name, "textbox", text, box, true, active || focused);
    return result;
}

} // namespace

float button_width(std::string_view label, ButtonKind kind) {
    const float text = text_size(Font::strong, label).x;
    return std::max(24.0f, kind == ButtonKind::link ? text + 8 : text + 28);
}

bool button(Ui& ui, std::string_view id, std::string_view label, const Box& box, ButtonKind kind,
            bool enabled) {
    const Theme& theme = ui.look();
    const Pressed state = press(ui, id, box, enabled);
    ImDrawList* list = ImGui::GetWindowDrawList();
    ImU32 ground = ui.paper;
    ImU32 ink = theme.steel;
    if (kind == ButtonKind::strong) {
        ground = enabled ? theme.steel : theme.rail;
        ink = enabled ? theme.on_steel : theme.quiet;
        list->AddRectFilled(box.at(), box.end(), ground, 6);
    } else if (kind == ButtonKind::plain) {
        ground = theme.card;
        list->AddRectFilled(box.at(), box.end(), ground, 6);
        list->AddRect(box.at(), box.end(), enabled ? theme.edge : theme.line, 6);
    }
    if (!enabled) ink = theme.quiet;
    if (state.hovered && enabled) list->AddRectFilled(box.at(), box.end(), theme.hover, 6);
    {
        const OnPaper paper(ui, ground);
        const Font which = Font::strong;
        draw_text(ui, {box.x + box.w / 2, box.y + (box.h - font_size(which)) / 2}, label,
                  {.font = which, .ink = ink, .max_width = box.w - 4, .align = Align::centre});
    }
    if (state.focused) focus_ring(ui, box);
    report(ui, id, label, kind == ButtonKind::link ? "link" : "button", {}, box, enabled, state.focused);
    return state.pressed;
}

bool press_area(Ui& ui, std::string_view id, std::string_view label, const Box& box, std::string_view role,
                std::string_view value, bool enabled) {
    const Pressed state = press(ui, id, box, enabled);
    if (state.hovered && enabled)
        ImGui::GetWindowDrawList()->AddRectFilled(box.at(), box.end(), ui.look().hover, 6);
    if (state.focused) focus_ring(ui, box);
    report(ui, id, label, role, value, box, enabled, state.focused);
    return state.pressed;
}

std::optional<std::string> text_field(Ui& ui, std::string_view id, std::string_view name,
                                      const std::string& value, const Box& box, std::string_view hint) {
    return edit_text(ui, id, name, value, box, hint, false);
}

std::optional<std::string> text_area(Ui& ui, std::string_view id, std::string_view name,
                                     const std::string& value, const Box& box, std::string_view hint) {
    return edit_text(ui, id, name, value, box, hint, true);
}

const std::string* draft_of(const Ui& ui, std::string_view id) {
    const auto found = ui.drafts.find(key_of(id));
    return found == ui.drafts.end() ? nullptr : &found->second;
}

std::optional<std::size_t> choice(Ui& ui, std::string_view id, std::string_view name,
                                  const std::vector<std::string>& labels, std::size_t chosen,
                                  const Box& box) {
    const Theme& theme = ui.look();
    std::optional<std::size_t> result;
    ImDrawList* list = ImGui::GetWindowDrawList();
    list->AddRectFilled(box.at(), box.end(), theme.rail, 6);
    const float width = box.w / static_cast<float>(std::max<std::size_t>(labels.size(), 1));
    for (std::size_t i = 0; i < labels.size(); ++i) {
        const Box part{box.x + width * static_cast<float>(i), box.y, width, box.h};
        const bool on = i == chosen;
        if (on) {
            const Box inside = part.inset(2);
            list->AddRectFilled(inside.at(), inside.end(), theme.card, 5);
            list->AddRect(inside.at(), inside.end(), theme.edge, 5);
        }
        const std::string part_id = key_of(id) + "/" + std::to_string(i);
        const Pressed state = press(ui, part_id, part, true);
        if (state.hovered && !on) list->AddRectFilled(part.at(), part.end(), theme.hover, 6);
        {
            const OnPaper paper(ui, on ? theme.card : theme.rail);
            const Font which = on ? Font::strong : Font::body;
            draw_text(ui, {part.x + part.w / 2, part.y + (part.h - font_size(which)) / 2}, labels[i],
                      {.font = which, .max_width = part.w - 8, .align = Align::centre});
        }
        if (state.focused) focus_ring(ui, part);
        report(ui, part_id, std::string(name) + ": " + labels[i], "radio", on ? "true" : "false", part, true,
               state.focused);
        if (state.pressed && !on) result = i;
    }
    return result;
}

std::optional<std::size_t> drop_down(Ui& ui, std::string_view id, std::string_view name,
                                     const std::vector<std::string>& labels, std::size_t chosen,
                                     const Box& box) {
    const Theme& theme = ui.look();
    const std::string now = chosen < labels.size() ? labels[chosen] : std::string{};
    ImDrawList* list = ImGui::GetWindowDrawList();
    list->AddRectFilled(box.at(), box.end(), theme.card, 6);
    list->AddRect(box.at(), box.end(), theme.edge, 6);
    const Pressed state = press(ui, id, box, true);
    if (state.hovered) list->AddRectFilled(box.at(), box.end(), theme.hover, 6);
    {
        const OnPaper paper(ui, theme.card);
        const float y = box.y + (box.h - font_size(Font::body)) / 2;
        draw_text(ui, {box.x + 10, y}, now, {.max_width = box.w - 34});
        draw_text(ui, {box.right() - 10, y}, "\xE2\x96\xBE", {.ink = theme.quiet, .align = Align::right});
    }
    if (state.focused) focus_ring(ui, box);
    report(ui, id, name, "combobox", now, box, true, state.focused);

    std::optional<std::size_t> result;
    ImGui::PushID(id.data(), id.data() + id.size());
    if (state.pressed) ImGui::OpenPopup("list");
    constexpr float row = 32;
    float width = box.w;
    for (const auto& label : labels) width = std::max(width, text_size(Font::body, label).x + 32);
    const float height = std::min(row * static_cast<float>(labels.size()) + 12, 340.0f);
    const ImVec2 display = ImGui::GetIO().DisplaySize;
    const bool above = box.bottom() + 4 + height > display.y && box.y - 4 - height > 0;
    const float x = std::max(4.0f, std::min(box.x, display.x - width - 4));
    ImGui::SetNextWindowPos({x, above ? box.y - 4 - height : box.bottom() + 4});
    ImGui::SetNextWindowSize({width, height});
    if (ImGui::BeginPopup("list", ImGuiWindowFlags_NoMove)) {
        sharpen_edges();
        const OnPaper paper(ui, theme.card);
        const bool before = ui.scrolling;
        ui.scrolling = true;
        const ImVec2 origin = ImGui::GetCursorScreenPos();
        for (std::size_t i = 0; i < labels.size(); ++i) {
            const Box part{origin.x + 4, origin.y + 6 + row * static_cast<float>(i), width - 8, row};
            if (i == chosen && ImGui::IsWindowAppearing())
                ui.focus_next = key_of(id) + "/" + std::to_string(i);
            if (i == chosen)
                ImGui::GetWindowDrawList()->AddRectFilled(part.at(), part.end(), theme.brass_wash, 6);
            {
                const OnPaper on(ui, i == chosen ? theme.brass_wash : theme.card);
                if (press_area(ui, key_of(id) + "/" + std::to_string(i), labels[i], part, "option",
                               i == chosen ? "true" : "false")) {
                    if (i != chosen) result = i;
                    ImGui::CloseCurrentPopup();
                }
                draw_text(ui, {part.x + 10, part.y + (row - font_size(Font::body)) / 2}, labels[i],
                          {.max_width = part.w - 20});
            }
        }
        ImGui::SetCursorScreenPos({origin.x, origin.y + 11 + row * static_cast<float>(labels.size())});
        ImGui::Dummy({1, 1});
        ui.scrolling = before;
        ImGui::EndPopup();
    }
    ImGui::PopID();
    return result;
}

std::optional<bool> tick_box(Ui& ui, std::string_view id, std::string_view label, bool ticked,
                             const Box& box) {
    const Theme& theme = ui.look();
    const Pressed state = press(ui, id, box, true);
    ImDrawList* list = ImGui::GetWindowDrawList();
    const float side = 18;
    const Box square{box.x + 3, box.y + (box.h - side) / 2, side, side};
    list->AddRectFilled(square.at(), square.end(), ticked ? theme.steel : theme.card, 4);
    list->AddRect(square.at(), square.end(), ticked ? theme.steel : theme.edge, 4, 0, 1.5f);
    if (ticked) {
        const ImVec2 points[3] = {
            {square.x + 4, square.y + 9.5f}, {square.x + 7.5f, square.y + 13}, {square.x + 14, square.y + 5}};
        list->AddPolyline(points, 3, theme.on_steel, 0, 2);
    }
    if (state.hovered) list->AddRectFilled(box.at(), box.end(), theme.hover, 6);
    draw_text(ui, {square.right() + 8, box.y + (box.h - font_size(Font::body)) / 2}, label,
              {.max_width = box.right() - square.right() - 10});
    if (state.focused) focus_ring(ui, box);
    report(ui, id, label, "checkbox", ticked ? "true" : "false", box, true, state.focused);
    return state.pressed ? std::optional(!ticked) : std::nullopt;
}

} // namespace steelyard
