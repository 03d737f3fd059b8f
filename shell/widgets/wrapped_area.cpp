#include "shell/widgets/wrapped_area.hpp"

#include <imgui.h>

#include <algorithm>
#include <utility>

#include "shell/widgets/grid.hpp"
#include "shell/widgets/soft_wrap.hpp"
#include "shell/widgets/text.hpp"

namespace steelyard {
namespace {

constexpr float side_padding = 10;
constexpr float top_padding = 7;

float text_width(float box_width) {
    return box_width - 2 * side_padding - ImGui::GetStyle().ScrollbarSize;
}

std::string wrapped(std::string_view text, float width) {
    return soft_wrap(text, width, [](std::string_view part) { return text_size(Font::body, part).x; });
}

/// True for a key pressed together with Ctrl, or Cmd on a Mac.
bool command(ImGuiKey key) {
    const ImGuiIO& io = ImGui::GetIO();
    return (io.KeyCtrl || io.KeySuper) && ImGui::IsKeyPressed(key);
}

struct Editing {
    std::string* text;  ///< ImGui's buffer.
    std::string before; ///< The wrapped text before this frame's edit.
    float width;
    bool select_all; ///< It has just become active, and what is typed shall take the place of all.
};

void rewrap(ImGuiInputTextCallbackData& data, const Editing& editing) {
    const std::string_view now(data.Buf, static_cast<std::size_t>(data.BufTextLen));
    const Erased erased = ImGui::IsKeyPressed(ImGuiKey_Backspace) ? Erased::before
                          : ImGui::IsKeyPressed(ImGuiKey_Delete)  ? Erased::after
                                                                  : Erased::nothing;
    const PlainEdit plain =
        edit_of_wrapped(editing.before, now, static_cast<std::size_t>(data.CursorPos), erased);
    const std::string again = wrapped(plain.text, editing.width);
    if (again == now) return;
    data.DeleteChars(0, data.BufTextLen);
    data.InsertChars(0, again.data(), again.data() + again.size());
    data.CursorPos = static_cast<int>(wrapped_place(again, plain.cursor));
    data.SelectionStart = data.SelectionEnd = data.CursorPos;
}

/// What was copied leaves without the breaks that are only shown.
void copy_plain(const ImGuiInputTextCallbackData& data) {
    const auto [first, last] = std::minmax(data.SelectionStart, data.SelectionEnd);
    if (first == last) return;
    const std::string_view chosen(data.Buf + first, static_cast<std::size_t>(last - first));
    ImGui::SetClipboardText(without_soft_breaks(chosen).c_str());
}

/// The same for what was cut: it stood in the text before where the cursor is now.
void cut_plain(const ImGuiInputTextCallbackData& data, std::string_view before) {
    const auto left = static_cast<std::size_t>(data.BufTextLen);
    if (left >= before.size()) return;
    const std::string_view gone =
        before.substr(static_cast<std::size_t>(data.CursorPos), before.size() - left);
    ImGui::SetClipboardText(without_soft_breaks(gone).c_str());
}

int handle(ImGuiInputTextCallbackData* data) {
    auto& editing = *static_cast<Editing*>(data->UserData);
    if (data->EventFlag == ImGuiInputTextFlags_CallbackResize) {
        editing.text->resize(static_cast<std::size_t>(data->BufTextLen));
        data->Buf = editing.text->data();
    } else if (data->EventFlag == ImGuiInputTextFlags_CallbackEdit) {
        if (command(ImGuiKey_X)) cut_plain(*data, editing.before);
        // An undone step stands as it was: breaking it anew would be a step that is undone next, for ever.
        if (!command(ImGuiKey_Z) && !command(ImGuiKey_Y)) rewrap(*data, editing);
    } else if (editing.select_all) {
        data->SelectAll();
    } else if (command(ImGuiKey_C) || command(ImGuiKey_Insert)) {
        copy_plain(*data);
    }
    return 0;
}

} // namespace

std::optional<std::string> wrapped_area(Ui& ui, std::string_view id, std::string_view name,
                                        const std::string& value, const Box& box, EnterKey enter,
                                        std::string_view hint) {
    const std::string key(id);
    const auto draft = ui.drafts.find(key);
    const float width = text_width(box.w);
    std::string text = draft != ui.drafts.end() ? draft->second : wrapped(value, width);

    ImGui::SetCursorScreenPos(box.at());
    ImGui::PushID(id.data(), id.data() + id.size());
    ImGui::PushFont(font(Font::body));
    ImGui::PushStyleVar(ImGuiStyleVar_FramePadding, {side_padding, top_padding});
    if (ui.focus_next == id) {
        ImGui::SetKeyboardFocusHere();
        ui.focus_next.clear();
    }
    const bool one = enter == EnterKey::finishes;
    Editing editing{&text, text, width, one && draft == ui.drafts.end()};
    const ImGuiInputTextFlags flags = ImGuiInputTextFlags_CallbackResize | ImGuiInputTextFlags_CallbackEdit |
                                      ImGuiInputTextFlags_CallbackAlways |
                                      (one ? ImGuiInputTextFlags_CtrlEnterForNewLine : 0);
    ImGui::InputTextMultiline("##text", text.data(), text.capacity() + 1, {box.w, box.h}, flags, handle,
                              &editing);
    ImGui::PopStyleVar();
    ImGui::PopFont();
    const bool active = ImGui::IsItemActive();
    const bool finished = ImGui::IsItemDeactivatedAfterEdit();
    const bool focused = ImGui::IsItemFocused();
    ImGui::PopID();

    std::string plain = without_soft_breaks(text);
    if (one) std::replace(plain.begin(), plain.end(), '\n', ' '); // Pasted ones.
    if (active)
        ui.drafts[key] = text;
    else
        ui.drafts.erase(key);
    if (focused && (active || ui.keyboard_used)) cell_ring(ui, box);
    if (text.empty() && !hint.empty() && !active) {
        const OnPaper paper(ui, ui.look().card);
        draw_text(ui, {box.x + side_padding, box.y + top_padding}, hint,
                  {.ink = ui.look().quiet, .max_width = box.w - 2 * side_padding});
    }
    LedgerItem item;
    item.id = key;
    item.label = std::string(name);
    item.role = "textbox";
    item.value = plain;
    item.at = box.at();
    item.size = {box.w, box.h};
    item.focused = active || focused;
    item.may_scroll = ui.scrolling;
    ui.ledger.add(std::move(item));
    if (finished && plain != value && text != wrapped(value, width)) return plain;
    return std::nullopt;
}

float wrapped_height(std::string_view text, float width, int least, int most) {
    const std::string shown = wrapped(text, text_width(width));
    const auto lines = static_cast<int>(std::count(shown.begin(), shown.end(), '\n')) + 1;
    return static_cast<float>(std::clamp(lines, least, most)) * font_size(Font::body) + 2 * top_padding + 2;
}

} // namespace steelyard
