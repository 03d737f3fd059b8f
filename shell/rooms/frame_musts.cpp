#include <algorithm>
#include <string>
#include <utility>

#include "core/decision/lookup.hpp"
#include "shell/rooms/frame_edits.hpp"
#include "shell/rooms/frame_parts.hpp"
#include "shell/rooms/growing_card.hpp"
#include "shell/widgets/panels.hpp"
#include "shell/widgets/text.hpp"
#include "shell/words.hpp"

/// The card of the musts.
namespace steelyard::frame {
namespace {

constexpr std::string_view dot = " \xC2\xB7 ";

std::string unit_of(const Decision& decision, const Requirement& must) {
    const Node* leaf = find_node(decision.criteria, must.criterion);
    return must.unit.empty() && leaf != nullptr ? leaf->unit : must.unit;
}

std::string limits(const Decision& decision, const Requirement& must) {
    const std::string unit = unit_of(decision, must);
    std::string text;
    const auto add = [&](const char* words, const std::optional<double>& limit) {
        if (limit) text += (text.empty() ? "" : ", ") + std::string(words) + figure_text(*limit);
    };
    add("at least ", must.at_least ? must.at_least : must.min_worth);
    add("at most ", must.at_most);
    if (text.empty()) return "no limit yet";
    return unit.empty() ? text : text + " " + unit;
}

/// "Noise: at most 78 dB(A) · safety".
std::string summary(const Decision& decision, const Requirement& must) {
    std::string text;
    switch (kind_of(must)) {
    case MustKind::yes_no: text = "yes or no"; break;
    case MustKind::own_limit: text = limits(decision, must); break;
    case MustKind::figures: text = node_name(decision, must.criterion) + ": " + limits(decision, must); break;
    case MustKind::worth:
        text = "worth of " + node_name(decision, must.node) + " " + limits(decision, must);
        break;
    }
    return must.safety ? text + std::string(dot) + "safety" : text;
}

void change(const Desk& desk, Requirement changed) {
    desk.actions.edit(Change<Requirement>{std::move(changed)});
}

/// The criteria a must of a kind can look at.
std::vector<const Node*> nodes_for(const Decision& decision, MustKind kind) {
    if (kind == MustKind::figures) return figure_leaves(decision);
    std::vector<const Node*> nodes;
    if (kind == MustKind::worth) {
        for (const auto& placed : placed_nodes(decision.criteria)) nodes.push_back(placed.node);
    }
    return nodes;
}

void kind_part(const Desk& desk, Column& column, const Requirement& must) {
    caption(desk, column, "What it looks at");
    const auto kind = kind_of(must);
    const auto chosen = pick_from_list(
        desk, "must-kind/" + must.id, "What the must looks at",
        {"Yes or no", "A value of its own", "The figures of a criterion", "The worth of a criterion"},
        static_cast<std::size_t>(kind), column.next(field_height));
    if (chosen) {
        const auto wanted = static_cast<MustKind>(*chosen);
        const auto nodes = nodes_for(desk.decision(), wanted);
        if (wanted == MustKind::figures && nodes.empty()) {
            desk.actions.say("No criterion is rated by figures yet.");
        } else {
            change(desk, of_kind(must, wanted, nodes.empty() ? Id{} : nodes.front()->id));
        }
    }
    const auto nodes = nodes_for(desk.decision(), kind);
    if (nodes.empty()) return;
    const Id& now = kind == MustKind::figures ? must.criterion : must.node;
    const auto found =
        std::find_if(nodes.begin(), nodes.end(), [&](const Node* node) { return node->id == now; });
    const auto node =
        pick_from_list(desk, "must-criterion/" + must.id, "Criterion of the must", names_of(nodes),
                       static_cast<std::size_t>(found - nodes.begin()), column.next(field_height));
    if (node) change(desk, of_kind(must, kind, nodes[*node]->id));
}

/// One limit in its half of the line. True where it was changed to something a file may hold.
bool limit_part(const Desk& desk, Column& column, const std::string& id, const std::string& name,
                const std::string& unit, std::optional<double>& limit) {
    caption(desk, column, unit.empty() ? name : name + ", " + unit);
    const Typed typed = number_field(desk, id, name, limit, column.next(field_height), "no limit");
    if (typed.changed) limit = typed.value;
    return typed.changed;
}

void limits_part(const Desk& desk, Column& column, const Requirement& must) {
    Requirement changed = must;
    Column left{column.x, column.y, (column.w - 12) / 2};
    Column right{column.x + left.w + 12, column.y, left.w};
    const std::string unit = unit_of(desk.decision(), must);
    bool any = false;
    if (kind_of(must) == MustKind::worth) {
        any =
            limit_part(desk, left, "must-worth/" + must.id, "Worth of at least", "0 to 1", changed.min_worth);
        if (any && changed.min_worth && (*changed.min_worth < 0 || *changed.min_worth > 1)) {
            desk.actions.say("A worth is from 0 to 1; nothing was changed.");
            any = false;
        }
    } else {
        any = limit_part(desk, left, "must-least/" + must.id, "At least", unit, changed.at_least);
        any = limit_part(desk, right, "must-most/" + must.id, "At most", unit, changed.at_most) || any;
        if (any && changed.at_least && changed.at_most && *changed.at_least > *changed.at_most) {
            desk.actions.say("The lower limit is above the upper one; nothing was changed.");
            any = false;
        }
    }
    if (any) change(desk, std::move(changed));
    column.y = left.y;
    if (kind_of(must) == MustKind::own_limit) {
        Column half{column.x, column.y, left.w};
        if (auto text = captioned_line(desk, half, "must-unit/" + must.id, "Unit", must.unit)) {
            changed = must;
            changed.unit = std::move(*text);
            change(desk, std::move(changed));
        }
        column.y = half.y;
    }
}

void details(const Desk& desk, Column& column, std::size_t index) {
    const Requirement& must = desk.decision().requirements[index];
    const std::string number = std::to_string(index + 1);
    kind_part(desk, column, must);
    if (kind_of(must) != MustKind::yes_no) limits_part(desk, column, must);
    if (const auto safety =
            tick(desk, "must-safety/" + must.id, "For safety's sake", must.safety, column.next(28))) {
        Requirement changed = must;
        changed.safety = *safety;
        change(desk, std::move(changed));
    }
    if (auto note = captioned_lines(desk, column, "must-note/" + must.id, "Note on the must", must.note)) {
        Requirement changed = must;
        changed.note = std::move(*note);
        change(desk, std::move(changed));
    }
    ButtonRow row(desk, column);
    if (row.up("must-up/" + must.id, "Move must " + number + " up", index > 0))
        desk.actions.edit(Move<Requirement>{must.id, index - 1});
    if (row.down("must-down/" + must.id, "Move must " + number + " down",
                 index + 1 < desk.decision().requirements.size()))
        desk.actions.edit(Move<Requirement>{must.id, index + 1});
    if (row.button("must-delete/" + must.id, "Delete must")) {
        desk.actions.edit(Remove<Requirement>{must.id});
        desk.state.must.clear();
    }
}

void must_row(const Desk& desk, Column& column, std::size_t index) {
    const Decision& d = desk.decision();
    const Requirement& must = d.requirements[index];
    const std::string number = std::to_string(index + 1);
    const Box more{column.x + column.w - 30, column.y, 30, field_height};
    Column row{column.x, column.y, column.w - 34};
    if (auto name = name_field(desk, row, "must-name/" + must.id, "Name of must " + number, must.name)) {
        Requirement changed = must;
        changed.name = std::move(*name);
        change(desk, std::move(changed));
    }
    more_button(desk, "must-more/" + must.id, "must " + number, more, desk.state.must, must.id);
    const bool opened = desk.state.must == must.id;
    Column below{row.x + 10, row.y, row.w - 10};
    if (!opened) {
        draw_text(desk.ui, {below.x, below.y}, summary(d, must),
                  {.font = Font::small, .ink = desk.look().quiet, .max_width = below.w});
        below.y += line_step(Font::small) + 8;
    } else {
        below.y += 6;
    }
    if (must.waived) {
        std::string text = "waived";
        if (!must.waived->by.empty()) text += " by " + person_name(d, must.waived->by);
        if (!must.waived->at.empty()) text += ", " + must.waived->at.substr(0, 10);
        if (!must.waived->why.empty()) text += ": " + must.waived->why;
        remark(desk, below, text, desk.look().brass_ink);
    }
    column.y = below.y;
    if (!opened) return;
    details(desk, column, index);
    if (index + 1 < d.requirements.size()) {
        rule(desk.ui, column.x, column.y, column.w);
        column.y += 9;
    }
}

} // namespace

float musts_card(const Desk& desk, ImVec2 at, float width) {
    GrowingCard card(desk.ui, at, width);
    Column column{card.left(), card.heading("Musts"), card.width()};
    remark(desk, column,
           "An option that fails a must takes no part in the ranking, whatever else it has to offer.");
    const auto& musts = desk.decision().requirements;
    for (std::size_t i = 0; i < musts.size(); ++i) must_row(desk, column, i);
    {
        ButtonRow row(desk, column);
        if (row.button("must-add", "Add must")) {
            Requirement must;
            must.name = "New must";
            must.id = requirement_id_for(desk.decision(), must.name);
            must.yes_no = true;
            desk.state.must = must.id;
            desk.ui.focus_next = "must-name/" + must.id;
            desk.actions.edit(Add<Requirement>{std::move(must)});
        }
    }
    remark(desk, column,
           "Ranks preferences; what must be met for safety is decided by licensed people under local codes.");
    return card.end(column.y - 8);
}

} // namespace steelyard::frame
