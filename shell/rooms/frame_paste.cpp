#include <algorithm>
#include <string>
#include <utility>

#include "core/decision/lookup.hpp"
#include "shell/rooms/frame_edits.hpp"
#include "shell/rooms/frame_parts.hpp"
#include "shell/widgets/panels.hpp"
#include "shell/widgets/text.hpp"
#include "shell/words.hpp"

/// A pasted list, and what would be made of it.
namespace steelyard::frame {
namespace {

constexpr std::string_view text_id = "paste-text";
constexpr float row_height = 27;
constexpr float step = 20;
constexpr float enough_height = 480;
constexpr float side_by_side = 620; ///< From this width on, text and preview stand beside each other.

/// What a group's weights come from, beside its name.
bool weighed_by_points(const std::vector<OutlineItem>& items, const ListPlan& plan, std::size_t i) {
    return i + 1 < items.size() && items[i + 1].depth > items[i].depth && plan.shares[i + 1].has_value();
}

void preview_row(const Desk& desk, const OutlineItem& item, const std::optional<double>& share, bool group,
                 bool points, Box row) {
    Ui& ui = desk.ui;
    row.take_left(step * static_cast<float>(item.depth));
    const Font face = group ? Font::strong : Font::body;
    const float y = row.y + 3;
    const Box shares = row.take_right(72, 8);
    if (share) {
        draw_text(ui, {shares.right(), y}, points_text(*share) + " %",
                  {.font = Font::strong, .align = Align::right});
        const std::string typed = figure_text(*item.weight) + (item.percent ? " %" : "");
        const Box box = row.take_right(72, 8);
        draw_text(ui, {box.right(), y + 2}, typed,
                  {.font = Font::small, .ink = desk.look().quiet, .align = Align::right});
    }
    const std::string kind = !group ? "" : points ? "by points" : "in pairs";
    const ImVec2 name = draw_text(ui, {row.x, y}, item.name, {.font = face, .max_width = row.w});
    if (row.w - name.x > 90) {
        draw_text(ui, {row.x + name.x + 10, y + 2}, kind, {.font = Font::small, .ink = desk.look().quiet});
    }
}

void preview(const Desk& desk, const Outline& outline, const ListPlan& plan, const Box& box) {
    Card card(desk.ui, box);
    ScrollArea area(desk.ui, "paste-preview", box.inset(1));
    const Box in = area.inner();
    Column column{in.x + 16, in.y + 14, in.w - 32};
    const auto& items = outline.items;
    const std::string problem = outline.problem.empty() ? plan.problem : outline.problem;
    if (!problem.empty()) {
        column.y += draw_paragraph(desk.ui, {column.x, column.y}, column.w, problem,
                                   {.font = Font::strong, .ink = desk.look().red}) +
                    8;
        remark(desk, column, "Nothing is added until this is put right in the text.");
    } else if (items.empty()) {
        remark(desk, column,
               "What would be added shows here. One criterion a line, parts indented under their group with "
               "tabs or spaces. A weight may stand at the end of a line: Price 40, Price: 40 %, or in the "
               "last column of a spreadsheet.");
    } else {
        const bool weighed = std::any_of(plan.shares.begin(), plan.shares.end(),
                                         [](const auto& share) { return share.has_value(); });
        if (weighed) {
            draw_text(desk.ui, {column.x + column.w, column.y}, "part of its group",
                      {.font = Font::small, .ink = desk.look().quiet, .align = Align::right});
            column.y += line_step(Font::small) + 4;
        }
        for (const auto& note : plan.notes) remark(desk, column, note, desk.look().brass_ink);
        for (std::size_t i = 0; i < items.size(); ++i) {
            const bool group = i + 1 < items.size() && items[i + 1].depth > items[i].depth;
            preview_row(desk, items[i], plan.shares[i], group, weighed_by_points(items, plan, i),
                        column.next(row_height, 0));
        }
    }
    area.reach(column.y + 10);
}

/// Under which criterion the list goes, and what numbers at the end of lines are.
void choices(const Desk& desk, Column& column, const Outline& outline) {
    State::Paste& paste = desk.state.paste;
    const auto placed = placed_nodes(desk.decision().criteria);
    std::vector<std::string> labels;
    std::size_t chosen = 0;
    for (const auto& one : placed) {
        if (one.node->id == paste.parent) chosen = labels.size();
        const std::string name = one.node->name.empty() ? one.node->id : one.node->name;
        labels.push_back(std::string(3 * static_cast<std::size_t>(one.depth - 1), ' ') + name);
    }
    caption(desk, column, "Added under");
    const bool wide = column.w >= side_by_side;
    Box row = column.next(field_height, wide ? 10.0f : 4.0f);
    const Box under = wide ? row.take_left((column.w - 12) / 2, 12) : row;
    if (const auto now = drop_down(desk.ui, "paste-parent", "Added under", labels, chosen, under))
        paste.parent = placed[*now].node->id;
    if (!outline.has_numbers) return;
    const Box box = wide ? row : column.next(30, 6);
    if (const auto weights = tick_box(desk.ui, "paste-weights", "Numbers at the end are weights",
                                      paste.ends == LineEnds::weights, box))
        paste.ends = *weights ? LineEnds::weights : LineEnds::names;
}

/// The list as text and what would be made of it, beside each other or, in a narrow room, one below the
/// other.
void list_and_preview(const Desk& desk, const Box& box, const Outline& outline, const ListPlan& plan) {
    State::Paste& paste = desk.state.paste;
    ScrollArea scroll(desk.ui, "paste", box);
    const Box in = scroll.inner();
    // Where the box may be too low for all of it, the place of the scroll bar is kept free beforehand.
    const float bar = box.h < enough_height ? ImGui::GetStyle().ScrollbarSize + 8 : 0.0f;
    Column column{in.x, in.y, box.w - bar};
    draw_text(desk.ui, {column.x, column.y}, "Add a list of criteria", {.font = Font::heading});
    column.y += line_step(Font::heading) + 8;
    choices(desk, column, outline);

    const bool beside = column.w >= side_by_side;
    const float least = beside ? 200.0f : 320.0f; // Less is too little to read: then it is scrolled.
    Box work{column.x, column.y, column.w, std::max(in.y + box.h - column.y, least)};
    const Box typed =
        beside ? work.take_left((work.w - 12) / 2, 12) : work.take_top((work.h - 10) * 0.4f, 10);
    if (auto text = text_area(desk.ui, text_id, "The list", paste.text, typed)) paste.text = std::move(*text);
    preview(desk, outline, plan, work);
    scroll.reach(work.bottom());
}

std::string add_label(std::size_t count) {
    if (count == 0) return "Add";
    return count == 1 ? "Add 1 criterion" : "Add " + std::to_string(count) + " criteria";
}

} // namespace

void open_paste(State& state, const Decision& decision, const std::string& text) {
    const bool found = find_node(decision.criteria, state.node) != nullptr;
    state.paste = {true, text, found ? state.node : decision.criteria.id, LineEnds::weights, {}};
}

void close_added_paste(const Desk& desk) {
    const Id& added = desk.state.paste.added;
    if (added.empty() || find_node(desk.decision().criteria, added) == nullptr) return;
    desk.ui.focus_next = row_id(added);
    desk.state.paste = {};
}

void paste_panel(const Desk& desk, const Box& area) {
    State::Paste& paste = desk.state.paste;
    const std::string* draft = draft_of(desk.ui, text_id);
    const Outline outline = read_outline(draft != nullptr ? *draft : paste.text, paste.ends);
    const ListPlan plan = plan_list(desk.decision(), paste.parent, outline);

    Box rest = area;
    const Box buttons = rest.take_bottom(36, 12);
    list_and_preview(desk, rest, outline, plan);

    const std::string label = add_label(plan.edits.empty() ? 0 : outline.items.size());
    Box row = buttons;
    const Box add = row.take_right(button_width(label, ButtonKind::strong), 12);
    const Box cancel = row.take_right(button_width("Cancel"));
    if (button(desk.ui, "paste-add", label, add, ButtonKind::strong,
               !plan.edits.empty() && desk.may_edit())) {
        paste.added = plan.first;
        desk.actions.edit(plan.edits, plan.label);
    }
    const bool escaped = draft == nullptr && ImGui::IsKeyPressed(ImGuiKey_Escape, false) &&
                         !ImGui::IsPopupOpen("", ImGuiPopupFlags_AnyPopupId | ImGuiPopupFlags_AnyPopupLevel);
    if (button(desk.ui, "paste-cancel", "Cancel", cancel) || escaped) paste = {};
}

} // namespace steelyard::frame
