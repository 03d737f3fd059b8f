#include <imgui_internal.h>

#include <algorithm>
#include <cmath>
#include <string>
#include <utility>
#include <vector>

#include "core/decision/lookup.hpp"
#include "shell/rooms/frame_edits.hpp"
#include "shell/rooms/frame_parts.hpp"
#include "shell/rooms/growing_card.hpp"
#include "shell/widgets/grid.hpp"
#include "shell/widgets/panels.hpp"
#include "shell/widgets/text.hpp"
#include "shell/words.hpp"

/// The card with the tree of criteria.
namespace steelyard::frame {
namespace {

constexpr float row_height = 32;
constexpr float step = 20; ///< Indentation of one level.
constexpr float weight_width = 64;

std::string shown_name(const Node& node) {
    return node.name.empty() ? node.id : node.name;
}

/// How a criterion is weighed or rated, in a word or two.
std::string kind_words(const Node& node, const Node* parent) {
    if (node.is_leaf() && parent == nullptr) return "no criteria yet";
    if (!node.is_leaf()) return node.weights == WeightsBy::points ? "by points" : "in pairs";
    switch (node.rate) {
    case RateBy::figure: return node.unit.empty() ? "figures" : node.unit;
    case RateBy::grade: return "grades";
    default: return "compared";
    }
}

std::optional<double> weight_of(const Results& results, const Id& node) {
    for (const auto& one : results.nodes) {
        if (one.node == node) return one.weight;
    }
    return std::nullopt;
}

bool alt_pressed(ImGuiKey key) {
    return ImGui::GetIO().KeyAlt && ImGui::IsKeyPressed(key);
}
bool plain_pressed(ImGuiKey key) {
    const ImGuiIO& io = ImGui::GetIO();
    return !io.KeyAlt && !io.KeyCtrl && !io.KeyShift && ImGui::IsKeyPressed(key, false);
}

/// What the keys do to the criterion that has the keyboard.
void row_keys(const Desk& desk, const Node& node, const Node* parent) {
    if (!desk.may_edit()) return;
    static constexpr std::pair<ImGuiKey, Way> ways[]{{ImGuiKey_UpArrow, Way::up},
                                                     {ImGuiKey_DownArrow, Way::down},
                                                     {ImGuiKey_RightArrow, Way::in},
                                                     {ImGuiKey_LeftArrow, Way::out}};
    for (const auto& [key, way] : ways) {
        if (!alt_pressed(key)) continue;
        // The arrow also moves the keyboard on; it shall stay with the criterion.
        desk.ui.focus_next = row_id(node.id);
        if (const auto move = node_move(desk.decision().criteria, node.id, way)) desk.actions.edit(*move);
    }
    if (plain_pressed(ImGuiKey_F2)) {
        desk.state.node = node.id;
        desk.ui.focus_next = "node-name/" + node.id;
    } else if (plain_pressed(ImGuiKey_Insert)) {
        if (parent == nullptr)
            add_criterion(desk, node.id);
        else
            add_criterion(desk, parent->id, static_cast<std::size_t>(&node - parent->children.data()) + 1);
    } else if (plain_pressed(ImGuiKey_Delete) && parent != nullptr) {
        desk.actions.edit(RemoveNode{node.id});
        desk.ui.focus_next = row_id(parent->id);
    }
}

/// Opens a criterion, or closes it if it is open. `panel_above`: the height of the panel that closes above
/// it; the row shall stay where it was pressed.
void open_or_close(const Desk& desk, const Id& node, float panel_above) {
    if (desk.state.node == node) {
        desk.state.node.clear();
        return;
    }
    desk.state.node = node;
    desk.state.reveal = node;
    desk.state.reveal_in = 2;
    if (panel_above > 0) ImGui::SetScrollY(ImGui::GetScrollY() - panel_above);
}

void draw_row(const Desk& desk, const PlacedNode& placed, const Box& row, float panel_above) {
    Ui& ui = desk.ui;
    const Node& node = *placed.node;
    const bool opened = desk.state.node == node.id;
    if (opened) ImGui::GetWindowDrawList()->AddRectFilled(row.at(), row.end(), desk.look().brass_wash, 6);
    const OnPaper paper(ui, opened ? desk.look().brass_wash : ui.paper);
    const auto weight = weight_of(desk.view.results, node.id);
    const std::string percent = weight ? points_text(*weight) + " %" : std::string{};
    const std::string name = shown_name(node);
    const bool pressed = press_area(ui, row_id(node.id), name, row, "treeitem", percent);
    const bool focused = ImGui::IsItemFocused();
    // Alt moves criteria here; ImGui would take the keyboard to another window when it is let go.
    if (focused) ImGui::SetKeyOwner(ImGuiMod_Alt, ImGui::GetItemID());
    if (pressed) {
        const bool twice = ImGui::GetIO().MouseClickedLastCount[0] == 2 && ImGui::IsMouseReleased(0);
        if (twice) {
            desk.state.node = node.id;
            ui.focus_next = "node-name/" + node.id;
        } else {
            open_or_close(desk, node.id, panel_above);
        }
    }

    Box inside{row.x + 8, row.y, row.w - 16, row.h};
    inside.take_left(step * static_cast<float>(placed.depth - 1));
    const Font face = node.is_leaf() && placed.parent != nullptr ? Font::body : Font::strong;
    const float y = row.y + (row.h - text_size(face, name).y) / 2;
    const float small_y = row.y + (row.h - text_size(Font::small, name).y) / 2 + 1;
    const Box numbers = inside.take_right(weight_width, 6);
    draw_text(ui, {numbers.right(), y}, percent, {.font = face, .align = Align::right});
    const std::string kind = kind_words(node, placed.parent);
    const float kind_width = std::min(text_size(Font::small, kind).x, inside.w * 0.4f);
    const Box kinds = inside.take_right(kind_width, 10);
    draw_text(
        ui, {kinds.right(), small_y}, kind,
        {.font = Font::small, .ink = desk.look().quiet, .max_width = kinds.w + 1, .align = Align::right});
    draw_text(ui, {inside.x, y}, name, {.font = face, .max_width = inside.w});
    if (focused && !ImGui::GetIO().WantTextInput) row_keys(desk, node, placed.parent);
}

/// Lines that lead from a group to what is in it. `lasts`: for the criterion and each above it but the goal,
/// from the top, whether it is the last of its group.
void draw_branches(const Desk& desk, const std::vector<bool>& lasts, const Box& row) {
    ImDrawList* list = ImGui::GetWindowDrawList();
    const float middle = std::round(row.y + row.h / 2);
    for (std::size_t level = 0; level < lasts.size(); ++level) {
        const bool own = level + 1 == lasts.size();
        if (lasts[level] && !own) continue;
        const float x = std::round(row.x + 8 + step * static_cast<float>(level) + 6);
        list->AddRectFilled({x, row.y}, {x + 1, lasts[level] ? middle : row.bottom()}, desk.look().line);
        if (own) list->AddRectFilled({x, middle}, {x + 9, middle + 1}, desk.look().line);
    }
}

} // namespace

std::string row_id(const Id& node) {
    return "node/" + node;
}

void add_criterion(const Desk& desk, const Id& parent, std::size_t at) {
    Node node;
    node.name = "New criterion";
    node.id = node_id_for(desk.decision(), node.name);
    desk.state.node = node.id;
    desk.state.reveal = node.id;
    desk.state.reveal_in = 1;
    desk.ui.focus_next = "node-name/" + node.id;
    desk.actions.edit(AddNode{parent, std::move(node), at});
}

float criteria_card(const Desk& desk, ImVec2 at, float width) {
    GrowingCard card(desk.ui, at, width);
    const float top = card.heading("Criteria");
    Column column{card.left(), top, card.width()};
    draw_text(desk.ui, {card.right(), at.y + 18}, "share of the whole",
              {.font = Font::small, .ink = desk.look().quiet, .align = Align::right});
    column.x -= 8; // The rows' ground reaches a little beyond their text.
    column.w += 16;
    std::vector<bool> lasts;
    float panel_above = 0;
    for (const auto& placed : placed_nodes(desk.decision().criteria)) {
        const Box row = column.next(row_height, 0);
        lasts.resize(static_cast<std::size_t>(std::max(placed.depth - 2, 0)));
        if (placed.parent != nullptr) lasts.push_back(placed.node == &placed.parent->children.back());
        draw_row(desk, placed, row, panel_above);
        draw_branches(desk, lasts, row);
        if (desk.state.node != placed.node->id) continue;
        const float begin = column.y;
        Column panel{column.x + 8, column.y + 8, column.w - 16};
        node_panel(desk, panel, *placed.node);
        column.y = panel.y + 4;
        ImGui::GetWindowDrawList()->AddRect({column.x, begin - row_height}, {column.x + column.w, column.y},
                                            desk.look().brass, 8, 0, 1.5f);
        if (desk.state.reveal == placed.node->id && --desk.state.reveal_in <= 0) {
            scroll_into_sight({column.x, begin - row_height, column.w, column.y - begin + row_height}, 0, 0);
            desk.state.reveal.clear();
        }
        column.y += 6;
        panel_above = column.y - begin;
    }
    column.x += 8;
    column.w -= 16;
    column.y += 8;
    if (desk.decision().criteria.is_leaf())
        remark(desk, column, "What the options are judged by. Add the first, or paste an indented list.");
    {
        ButtonRow row(desk, column);
        if (row.button("node-add", "Add criterion")) {
            const Node* chosen = find_node(desk.decision().criteria, desk.state.node);
            const Node* parent = find_parent(desk.decision().criteria, desk.state.node);
            if (chosen != nullptr && parent != nullptr && chosen->is_leaf())
                add_criterion(desk, parent->id,
                              static_cast<std::size_t>(chosen - parent->children.data()) + 1);
            else
                add_criterion(desk, chosen != nullptr ? chosen->id : desk.decision().criteria.id);
        }
        if (row.button("paste-open", "Paste a list")) {
            open_paste(desk.state, desk.decision(), {});
            desk.ui.focus_next = "paste-text";
        }
    }
    if (desk.may_edit()) {
        remark(desk, column,
               "Press a criterion to change it. Keys: Alt with the arrows moves it, F2 names it, Insert adds "
               "one behind it, Delete takes it away. Ctrl+V adds a list copied elsewhere.");
    }
    return card.end(column.y - 8);
}

} // namespace steelyard::frame
