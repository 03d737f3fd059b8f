#include <algorithm>

#include "core/decision/lookup.hpp"
#include "shell/app_state.hpp"
#include "shell/next_step.hpp"
#include "shell/sentences.hpp"
#include "shell/widgets/controls.hpp"
#include "shell/widgets/panels.hpp"
#include "shell/widgets/text.hpp"

namespace steelyard {
namespace {

constexpr std::array rooms{RoomId::frame,    RoomId::weigh,   RoomId::gauge,
                           RoomId::standing, RoomId::tipping, RoomId::record};

void fill(const Box& box, ImU32 colour) {
    ImGui::GetWindowDrawList()->AddRectFilled(box.at(), box.end(), colour);
}

float middle(const Box& box, Font font) {
    return box.y + (box.h - font_size(font)) / 2;
}

/// A sentence at the left of a bar, its buttons at the right.
Box bar_text(Ui& ui, const Box& box, std::string_view text, float right, ImU32 ink) {
    draw_text(ui, {box.x + 24, middle(box, Font::body)}, text, {.ink = ink, .max_width = right - box.x - 40});
    return box;
}

enum class FileAct { open, save, results, kept, empty, dark };

} // namespace

void draw_header(App::State& state, Actions& actions, Box box) {
    Ui& ui = state.ui;
    const Theme& theme = ui.look();
    const OnPaper paper(ui, theme.card);
    fill(box, theme.card);
    rule(ui, box.x, box.bottom() - 1, box.w);
    const Decision& d = state.session.decision();

    Box right = box.inset(10);
    const std::vector<std::string> labels{
        "Open a file\xE2\x80\xA6",          "Save to a file", "Save the results file",
        "Kept in this browser\xE2\x80\xA6", "Start empty",    theme.dark ? "Light" : "Dark"};
    // The list works like a menu: nothing in it stays chosen.
    const Box file = right.take_right(96, 10);
    if (const auto act = drop_down(ui, "file", "File", labels, labels.size(), file)) {
        switch (static_cast<FileAct>(*act)) {
        case FileAct::open: state.platform.pick_file(); break;
        case FileAct::save: state.save_file(); break;
        case FileAct::results: state.save_results(); break;
        case FileAct::kept: state.after_frame.emplace_back([&state] { state.show_kept(); }); break;
        case FileAct::empty: state.after_frame.emplace_back([&state] { state.start_empty(); }); break;
        case FileAct::dark:
            ui.theme = theme.dark ? &light_theme() : &dark_theme();
            apply_theme(*ui.theme);
            state.fresh_frames = 2;
            break;
        }
    }
    draw_text(ui, {file.x + 12, middle(file, Font::body)}, "File", {.ink = theme.steel});

    std::vector<std::string> answering{state.answering == Answering::alone   ? "Nobody yet"
                                       : state.answering == Answering::hands ? "Show of hands"
                                                                             : "Agreed in the room"};
    std::size_t chosen = 0;
    for (const auto& p : d.people) {
        if (p.id == state.person) chosen = answering.size();
        answering.push_back(person_name(d, p.id) + (p.role.empty() ? "" : " (" + p.role + ")"));
    }
    const float who_width = box.w >= 1000 ? 230.0f : 150.0f;
    const Box who = right.take_right(who_width, 10);
    if (const auto index = drop_down(ui, "answering", "Who answers", answering, chosen, who)) {
        actions.answer_as(*index == 0 ? Id{} : d.people[*index - 1].id);
    }
    const History& history = state.session.history();
    const Box redo = right.take_right(34, 2);
    const Box undo = right.take_right(34, 10);
    if (button(ui, "redo", "\xE2\x86\xB7", redo, ButtonKind::quiet, !history.redo_label().empty()))
        state.redo();
    if (button(ui, "undo", "\xE2\x86\xB6", undo, ButtonKind::quiet, !history.undo_label().empty()))
        state.undo();
    if (box.w < 1080 && state.room != RoomId::standing && state.answering != Answering::alone) {
        const Box toggle = right.take_right(92, 10);
        if (button(ui, "standing-toggle", "Standing", toggle, ButtonKind::quiet)) {
            state.standing_open = !state.standing_open;
            state.fresh_frames = 2;
        }
    }
    const float title_width = std::max(60.0f, right.right() - box.x - 24);
    const ImVec2 title = draw_text(ui, {box.x + 24, middle(box, Font::heading)},
                                   d.title.empty() ? "Untitled decision" : d.title,
                                   {.font = Font::heading, .max_width = std::min(title_width, 520.0f)});
    const float rest = right.right() - (box.x + 24 + title.x + 20);
    if (rest > 120) {
        draw_text(ui, {box.x + 24 + title.x + 20, middle(box, Font::small) + 1},
                  state.keeper.status(state.session),
                  {.font = Font::small, .ink = theme.quiet, .max_width = rest});
    }
}

void draw_rail(App::State& state, const RoomView& view, Box box) {
    Ui& ui = state.ui;
    const Theme& theme = ui.look();
    const OnPaper paper(ui, theme.rail);
    fill(box, theme.rail);
    const OpenCounts open = count_open(view);
    const float row = std::clamp((box.h - 12) / 6, 34.0f, 58.0f);
    float y = box.y + 12;
    const float indent = box.w >= 130 ? 24.0f : 12.0f;
    for (const RoomId room : rooms) {
        const bool here = room == state.room;
        const Box tab{box.x + 8, y, box.w - 8, std::min(row - 6, 50.0f)};
        const int count = open.of(room);
        if (here) {
            ImDrawList* list = ImGui::GetWindowDrawList();
            list->AddRectFilled(tab.at(), tab.end(), theme.paper, 8, ImDrawFlags_RoundCornersLeft);
            list->AddRectFilled({box.x, tab.y + 4}, {box.x + 4, tab.bottom() - 4}, theme.brass, 2);
        }
        const OnPaper ground(ui, here ? theme.paper : theme.rail);
        const std::string name = room_name(room);
        if (press_area(ui, "room/" + name, name, tab, "tab", here ? "true" : "false")) {
            state.room = room;
            state.handing_to.clear();
            state.opening.reset();
            state.fresh_frames = 2;
        }
        const bool two_lines = count > 0 && tab.h >= 40;
        const float x = box.x + indent;
        const float top = two_lines ? tab.y + (tab.h - 36) / 2 : middle(tab, Font::body);
        draw_text(ui, {x, top}, name,
                  {.font = here ? Font::strong : Font::body, .max_width = tab.right() - x});
        if (two_lines) {
            draw_text(ui, {x, top + 20}, std::to_string(count) + " open",
                      {.font = Font::small, .ink = theme.brass_ink});
        }
        y += row;
    }
}

void draw_example_bar(App::State& state, Box box) {
    Ui& ui = state.ui;
    const Theme& theme = ui.look();
    fill(box, theme.brass_wash);
    const OnPaper paper(ui, theme.brass_wash);
    Box right = box.inset(6);
    right.take_right(18);
    const Box open = right.take_right(button_width("Open a file"), 10);
    const Box empty = right.take_right(button_width("Start empty"), 10);
    bar_text(ui, box,
             box.w > 900
                 ? "This is an example with invented companies. Change what you like, or begin your own."
                 : "An example with invented companies.",
             right.right(), theme.brass_ink);
    if (button(ui, "start-empty", "Start empty", empty)) {
        state.after_frame.emplace_back([&state] { state.start_empty(); });
    }
    if (button(ui, "open-a-file", "Open a file", open)) state.platform.pick_file();
}

void draw_problem_bar(App::State& state, Box box) {
    Ui& ui = state.ui;
    const Theme& theme = ui.look();
    fill(box, theme.red_wash);
    const OnPaper paper(ui, theme.red_wash);
    Box right = box.inset(6);
    right.take_right(18);
    if (state.keeper.read_only()) {
        const Box take = right.take_right(button_width("Write here instead"), 10);
        bar_text(ui, box, "Another page has this decision open; here it can only be read.", right.right(),
                 theme.red);
        if (button(ui, "take-over", "Write here instead", take)) state.keeper.take_over();
        return;
    }
    const Box save = right.take_right(button_width("Save a file now"), 10);
    const Box retry = right.take_right(button_width("Try again"), 10);
    bar_text(ui, box, "Not saved in this browser: " + state.keeper.problem(), right.right(), theme.red);
    if (button(ui, "store-again", "Try again", retry)) state.keeper.flush(state.session);
    if (button(ui, "save-now", "Save a file now", save)) state.save_file();
}

void draw_line_below(App::State& state, const RoomView& view, Actions& actions, Box box) {
    Ui& ui = state.ui;
    const Theme& theme = ui.look();
    fill(box, theme.card);
    rule(ui, box.x, box.y, box.w);
    const OnPaper paper(ui, theme.card);
    if (!state.message.empty()) {
        Box right = box.inset(6);
        const Box close = right.take_right(70, 10);
        draw_text(ui, {box.x + 24, middle(box, Font::body)}, state.message,
                  {.max_width = close.x - box.x - 40});
        if (button(ui, "message-close", "Close", close, ButtonKind::quiet)) state.message.clear();
        return;
    }
    const NextStep step = next_step(view);
    const ImU32 ink = step.urgent ? theme.red : theme.brass_ink;
    const ImVec2 kind =
        draw_text(ui, {box.x + 24, middle(box, Font::strong)}, step.kind, {.font = Font::strong, .ink = ink});
    Box right = box.inset(6);
    right.take_right(12);
    float end = right.right();
    if (!step.button.empty()) {
        const Box go = right.take_right(button_width(step.button, ButtonKind::quiet), 10);
        end = go.x - 10;
        if (button(ui, "next-step", step.button, go, ButtonKind::quiet)) actions.go(step.room, step.focus);
    }
    draw_text(ui, {box.x + 24 + kind.x + 20, middle(box, Font::body)}, step.text,
              {.max_width = std::max(20.0f, end - (box.x + 44 + kind.x))});
}

} // namespace steelyard
