#include <algorithm>

#include "shell/app_state.hpp"
#include "shell/context.hpp"
#include "shell/widgets/controls.hpp"
#include "shell/widgets/panels.hpp"
#include "shell/widgets/text.hpp"

namespace steelyard {
namespace {

/// A dialog in the middle of the page while it lives; the rest is dimmed.
class Dialog {
public:
    Dialog(Ui& ui, const char* name, float width, float height) : paper_(ui, ui.look().card) {
        const ImVec2 display = ImGui::GetIO().DisplaySize;
        const ImVec2 size{std::min(width, display.x - 20), std::min(height, display.y - 20)};
        if (!ImGui::IsPopupOpen(name)) ImGui::OpenPopup(name);
        ImGui::SetNextWindowPos({(display.x - size.x) / 2, (display.y - size.y) / 2});
        ImGui::SetNextWindowSize(size);
        open_ = ImGui::BeginPopupModal(name, nullptr,
                                       ImGuiWindowFlags_NoDecoration | ImGuiWindowFlags_NoMove |
                                           ImGuiWindowFlags_NoSavedSettings);
        if (open_) sharpen_edges();
        const ImVec2 at = ImGui::GetWindowPos();
        box_ = Box{at.x, at.y, size.x, size.y}.inset(22);
    }
    ~Dialog() {
        if (open_) ImGui::EndPopup();
    }
    Dialog(const Dialog&) = delete;
    Dialog& operator=(const Dialog&) = delete;

    bool open() const { return open_; }
    Box& box() { return box_; }
    bool escaped() const { return ImGui::IsKeyPressed(ImGuiKey_Escape, false); }

private:
    OnPaper paper_;
    bool open_ = false;
    Box box_;
};

void draw_asked(App::State& state) {
    Ui& ui = state.ui;
    Dialog dialog(ui, "asked", 460, 190);
    if (!dialog.open()) return;
    Box box = dialog.box();
    draw_text(ui, box.take_top(30).at(), "This takes something away", {.font = Font::heading});
    Box buttons = box.take_bottom(36);
    draw_paragraph(ui, box.at(), box.w, state.asked->losses + " It can be undone.");
    const Box keep = buttons.take_right(button_width("Keep it as it is"), 12);
    const Box go = buttons.take_right(button_width("Go on"));
    const bool cancelled = button(ui, "asked-keep", "Keep it as it is", keep) || dialog.escaped();
    if (button(ui, "asked-go", "Go on", go, ButtonKind::strong)) {
        state.after_frame.emplace_back([&state] {
            state.apply(std::move(state.asked->step)); // Asked already: applies at once.
            state.asked.reset();
        });
        ImGui::CloseCurrentPopup();
    } else if (cancelled) {
        state.asked.reset();
        ImGui::CloseCurrentPopup();
    }
}

void draw_refusal(App::State& state) {
    Ui& ui = state.ui;
    const Theme& theme = ui.look();
    Dialog dialog(ui, "refused", 640, 420);
    if (!dialog.open()) return;
    Box box = dialog.box();
    draw_text(ui, box.take_top(32).at(), state.refusal->name + " cannot be opened",
              {.font = Font::heading, .max_width = box.w});
    draw_text(ui, box.take_top(28).at(), "Nothing was changed. What is wrong with it:", {.ink = theme.quiet});
    Box buttons = box.take_bottom(36, 10);
    {
        ScrollArea area(ui, "reasons", box);
        float y = area.inner().y;
        for (const auto& reason : state.refusal->reasons) {
            y += draw_paragraph(ui, {area.inner().x, y}, area.inner().w - 8, reason) + 6;
        }
        area.reach(y);
    }
    const Box close = buttons.take_right(button_width("Close"), 12);
    if (button(ui, "refused-close", "Close", close, ButtonKind::strong) || dialog.escaped()) {
        state.refusal.reset();
        ImGui::CloseCurrentPopup();
    }
}

void draw_kept(App::State& state) {
    Ui& ui = state.ui;
    const Theme& theme = ui.look();
    Dialog dialog(ui, "kept", 640, 460);
    if (!dialog.open()) return;
    Box box = dialog.box();
    draw_text(ui, box.take_top(34).at(), "Kept in this browser", {.font = Font::heading});
    Box buttons = box.take_bottom(36, 10);
    const Box note = box.take_bottom(line_step(Font::small) * 2, 10);
    draw_paragraph(ui, note.at(), note.w,
                   "The browser's store is a convenience: clearing its data, or renaming the page, empties "
                   "it. A decision "
                   "that matters belongs in a file.",
                   {.font = Font::small, .ink = theme.quiet});
    bool close = dialog.escaped();
    {
        ScrollArea area(ui, "kept-list", box);
        const Box in = area.inner();
        float y = in.y;
        if (state.kept.empty()) draw_text(ui, {in.x, y}, "Nothing yet.", {.ink = theme.quiet});
        for (const auto& one : state.kept) {
            const Box row{in.x, y, in.w - 8, 46};
            draw_text(ui, {row.x, row.y + 3}, one.title.empty() ? "Untitled decision" : one.title,
                      {.max_width = row.w - 110});
            draw_text(ui, {row.x, row.y + 24}, "saved " + one.saved_at,
                      {.font = Font::small, .ink = theme.quiet});
            if (button(ui, "kept-open/" + one.id, "Open", {row.right() - 90, row.y + 6, 84, 32})) {
                state.after_frame.emplace_back([&state, id = one.id] { state.open_kept(id); });
                close = true;
            }
            y += 52;
        }
        area.reach(y);
    }
    const Box done = buttons.take_right(button_width("Close"), 12);
    if (button(ui, "kept-close", "Close", done) || close) {
        state.kept_open = false;
        ImGui::CloseCurrentPopup();
    }
}

} // namespace

void draw_dialogs(App::State& state) {
    if (state.asked) draw_asked(state);
    if (state.refusal) draw_refusal(state);
    if (state.kept_open) draw_kept(state);
}

} // namespace steelyard
