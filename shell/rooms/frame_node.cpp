#include <string>
#include <utility>

#include "core/decision/lookup.hpp"
#include "shell/rooms/frame_edits.hpp"
#include "shell/rooms/frame_parts.hpp"
#include "shell/widgets/text.hpp"
#include "shell/words.hpp"

/// What can be changed of one criterion.
namespace steelyard::frame {
namespace {

void change(const Desk& desk, Node changed) {
    changed.children.clear(); // An edit of a criterion leaves what is below it.
    desk.actions.edit(ChangeNode{std::move(changed)});
}

/// "Counts 23.1 % of the whole, 60.0 % of Whole-life cost."
std::string weight_sentence(const Desk& desk, const Node& node) {
    const Node* parent = find_parent(desk.decision().criteria, node.id);
    if (parent == nullptr) return {};
    for (const auto& one : desk.view.results.nodes) {
        if (one.node != node.id) continue;
        std::string text = "Counts " + points_text(one.weight) + " % of the whole";
        if (parent != &desk.decision().criteria) {
            text += ", " + points_text(one.local_weight) + " % of " +
                    (parent->name.empty() ? parent->id : parent->name);
        }
        return text + ".";
    }
    return {};
}

void grades_part(const Desk& desk, Column& column, const Node& leaf) {
    std::string names;
    for (const auto& grade : leaf.grades)
        names += (names.empty() ? "" : " \xC2\xB7 ") + (grade.name.empty() ? grade.id : grade.name);
    remark(desk, column, names.empty() ? "No grades yet." : "Grades: " + names);
    remark(desk, column, "They are named, and given their worth, in Gauge.");
}

void figure_part(const Desk& desk, Column& column, const Node& leaf) {
    Column half{column.x, column.y, std::min(column.w, 200.0f)};
    if (auto unit = captioned_line(desk, half, "node-unit/" + leaf.id, "Unit", leaf.unit, "EUR, kg, weeks")) {
        Node changed = leaf;
        changed.unit = std::move(*unit);
        change(desk, std::move(changed));
    }
    column.y = half.y;
    if (leaf.cost_sheet) remark(desk, column, "The figure is computed from a cost sheet.");
    if (!leaf.curve)
        remark(desk, column, "What a figure is worth is not said yet: choose a curve in Gauge.",
               desk.look().brass_ink);
}

void leaf_part(const Desk& desk, Column& column, const Node& leaf) {
    caption(desk, column, "How the options are rated on it");
    const auto rate =
        pick(desk, "node-rate/" + leaf.id, "How the options are rated", {"In pairs", "Figures", "Grades"},
             static_cast<std::size_t>(leaf.rate), column.next(button_height));
    if (rate) change(desk, rated_by(leaf, static_cast<RateBy>(*rate)));
    if (leaf.rate == RateBy::figure) figure_part(desk, column, leaf);
    if (leaf.rate == RateBy::grade) grades_part(desk, column, leaf);
}

void group_part(const Desk& desk, Column& column, const Node& group) {
    caption(desk, column, "How what is in it is weighed");
    const auto weights =
        pick(desk, "node-weights/" + group.id, "How its criteria are weighed", {"In pairs", "By points"},
             static_cast<std::size_t>(group.weights), column.next(button_height));
    if (!weights) return;
    Node changed = group;
    changed.weights = static_cast<WeightsBy>(*weights);
    change(desk, std::move(changed));
}

/// The room in which a criterion is answered.
void link_part(const Desk& desk, ButtonRow& row, const Node& node) {
    const bool in_gauge = node.is_leaf() && node.rate != RateBy::pairs;
    const char* label = in_gauge ? "Enter in Gauge" : node.is_leaf() ? "Compare in Weigh" : "Weigh them";
    if (row.link("node-go/" + node.id, label))
        desk.actions.go(in_gauge ? RoomId::gauge : RoomId::weigh, node.id);
}

void move_part(const Desk& desk, ButtonRow& row, const Node& node) {
    const auto moved = [&](Way way) { return node_move(desk.decision().criteria, node.id, way); };
    const auto up = moved(Way::up);
    const auto down = moved(Way::down);
    const auto out = moved(Way::out);
    const auto in = moved(Way::in);
    if (row.up("node-up/" + node.id, "Move criterion up", up.has_value())) desk.actions.edit(*up);
    if (row.down("node-down/" + node.id, "Move criterion down", down.has_value())) desk.actions.edit(*down);
    if (row.left("node-out/" + node.id, "Move criterion out of its group", out.has_value()))
        desk.actions.edit(*out);
    if (row.right("node-in/" + node.id, "Move criterion under the one above", in.has_value()))
        desk.actions.edit(*in);
}

} // namespace

void node_panel(const Desk& desk, Column& column, const Node& node) {
    const Node* parent = find_parent(desk.decision().criteria, node.id);
    const char* what = parent == nullptr ? "Name of the goal" : "Name of the criterion";
    if (auto name = captioned_line(desk, column, "node-name/" + node.id, what, node.name)) {
        Node changed = node;
        changed.name = std::move(*name);
        change(desk, std::move(changed));
        // Back to the row, where a key adds the next one.
        if (ImGui::IsKeyPressed(ImGuiKey_Enter) || ImGui::IsKeyPressed(ImGuiKey_KeypadEnter))
            desk.ui.focus_next = row_id(node.id);
    }
    if (!node.is_leaf())
        group_part(desk, column, node);
    else if (parent != nullptr)
        leaf_part(desk, column, node);
    if (auto note = captioned_lines(desk, column, "node-note/" + node.id, "Note", node.note)) {
        Node changed = node;
        changed.note = std::move(*note);
        change(desk, std::move(changed));
    }
    if (const std::string sentence = weight_sentence(desk, node); !sentence.empty())
        remark(desk, column, sentence);

    ButtonRow row(desk, column);
    if (row.button("node-below/" + node.id, parent == nullptr ? "Add criterion" : "Add below it"))
        add_criterion(desk, node.id);
    if (parent != nullptr) {
        const auto behind = static_cast<std::size_t>(&node - parent->children.data()) + 1;
        if (row.button("node-beside/" + node.id, "Add beside it")) add_criterion(desk, parent->id, behind);
        move_part(desk, row, node);
        if (row.button("node-delete/" + node.id, "Delete criterion")) {
            desk.actions.edit(RemoveNode{node.id});
            desk.state.node.clear();
        }
    }
    if (parent != nullptr || !node.is_leaf()) link_part(desk, row, node);
}

} // namespace steelyard::frame
