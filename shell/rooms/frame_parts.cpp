#include "shell/rooms/frame_parts.hpp"

#include <algorithm>

#include "core/decision/lookup.hpp"
#include "shell/widgets/icon_button.hpp"
#include "shell/widgets/text.hpp"
#include "shell/widgets/wrapped_area.hpp"
#include "shell/words.hpp"

namespace steelyard::frame {

Box Column::next(float height, float gap) {
    const Box box{x, y, w, height};
    y += height + gap;
    return box;
}

void caption(const Desk& desk, Column& column, std::string_view text) {
    column.y += draw_paragraph(desk.ui, {column.x, column.y}, column.w, text,
                               {.font = Font::small, .ink = desk.look().quiet}) +
                2;
}

void remark(const Desk& desk, Column& column, std::string_view text, ImU32 ink) {
    const TextLook look{.font = Font::small, .ink = ink != 0 ? ink : desk.look().quiet};
    column.y += draw_paragraph(desk.ui, {column.x, column.y}, column.w, text, look) + 8;
}

std::optional<std::string> line_field(const Desk& desk, std::string_view id, std::string_view name,
                                      const std::string& value, const Box& box, std::string_view hint) {
    if (desk.may_edit()) return text_field(desk.ui, id, name, value, box, hint);
    const float y = box.y + (box.h - text_size(Font::body, value).y) / 2;
    draw_text(desk.ui, {box.x, y}, value, {.max_width = box.w});
    return std::nullopt;
}

std::optional<std::string> captioned_line(const Desk& desk, Column& column, std::string_view id,
                                          std::string_view name, const std::string& value,
                                          std::string_view hint) {
    caption(desk, column, name);
    return line_field(desk, id, name, value, column.next(field_height), hint);
}

std::optional<std::string> lines_field(const Desk& desk, Column& column, std::string_view id,
                                       std::string_view name, const std::string& value, int most) {
    if (!desk.may_edit()) {
        column.y += draw_paragraph(desk.ui, {column.x, column.y}, column.w, value) + 8;
        return std::nullopt;
    }
    const std::string* draft = draft_of(desk.ui, id);
    const float height = wrapped_height(draft != nullptr ? *draft : value, column.w, 2, most);
    return wrapped_area(desk.ui, id, name, value, column.next(height));
}

std::optional<std::string> captioned_lines(const Desk& desk, Column& column, std::string_view id,
                                           std::string_view name, const std::string& value, int most) {
    caption(desk, column, name);
    return lines_field(desk, column, id, name, value, most);
}

std::optional<std::string> name_field(const Desk& desk, Column& column, std::string_view id,
                                      std::string_view name, const std::string& value) {
    if (!desk.may_edit()) {
        column.y += draw_paragraph(desk.ui, {column.x, column.y}, column.w, value) + 4;
        return std::nullopt;
    }
    const std::string* draft = draft_of(desk.ui, id);
    const float height = wrapped_height(draft != nullptr ? *draft : value, column.w, 1, 4);
    return wrapped_area(desk.ui, id, name, value, column.next(height, 2), EnterKey::finishes, "Name");
}

Typed number_field(const Desk& desk, std::string_view id, std::string_view name,
                   const std::optional<double>& value, const Box& box, std::string_view hint) {
    const auto text = line_field(desk, id, name, value ? figure_text(*value) : "", box, hint);
    if (!text) return {};
    if (text->find_first_not_of(" \t") == std::string::npos) return {value.has_value(), std::nullopt};
    const auto number = read_number(*text);
    if (!number) {
        desk.actions.say("\xE2\x80\x9C" + *text +
                         "\xE2\x80\x9D is not a number that can be read; nothing was changed.");
        return {};
    }
    return {number != value, number};
}

std::optional<std::size_t> pick(const Desk& desk, std::string_view id, std::string_view name,
                                const std::vector<std::string>& labels, std::size_t chosen, const Box& box) {
    if (desk.may_edit()) return choice(desk.ui, id, name, labels, chosen, box);
    line_field(desk, id, name, labels[chosen], box);
    return std::nullopt;
}

std::optional<std::size_t> pick_from_list(const Desk& desk, std::string_view id, std::string_view name,
                                          const std::vector<std::string>& labels, std::size_t chosen,
                                          const Box& box) {
    if (desk.may_edit()) return drop_down(desk.ui, id, name, labels, chosen, box);
    line_field(desk, id, name, chosen < labels.size() ? labels[chosen] : std::string{}, box);
    return std::nullopt;
}

std::optional<bool> tick(const Desk& desk, std::string_view id, std::string_view label, bool ticked,
                         const Box& box) {
    if (desk.may_edit()) return tick_box(desk.ui, id, label, ticked, box);
    line_field(desk, id, label, (ticked ? "\xE2\x9C\x93 " : "\xE2\x80\x93 ") + std::string(label), box);
    return std::nullopt;
}

ButtonRow::~ButtonRow() {
    if (x_ > column_.x) column_.y += button_height + 8;
}

Box ButtonRow::place(float width, float gap) {
    if (x_ > column_.x && x_ + width > column_.x + column_.w) {
        x_ = column_.x;
        column_.y += button_height + 8;
    }
    const Box box{x_, column_.y, std::min(width, column_.w), button_height};
    x_ += width + gap;
    return box;
}

bool ButtonRow::button(std::string_view id, std::string_view label, bool enabled, ButtonKind kind) {
    return steelyard::button(desk_.ui, id, label, place(button_width(label, kind), 8), kind,
                             enabled && desk_.may_edit());
}
bool ButtonRow::link(std::string_view id, std::string_view label) {
    return steelyard::button(desk_.ui, id, label, place(button_width(label, ButtonKind::link), 8),
                             ButtonKind::link);
}
bool ButtonRow::up(std::string_view id, std::string_view label, bool enabled) {
    return icon_button(desk_.ui, id, label, place(button_height, 2), Icon::up, enabled && desk_.may_edit());
}
bool ButtonRow::down(std::string_view id, std::string_view label, bool enabled) {
    return icon_button(desk_.ui, id, label, place(button_height, 8), Icon::down, enabled && desk_.may_edit());
}
bool ButtonRow::left(std::string_view id, std::string_view label, bool enabled) {
    return icon_button(desk_.ui, id, label, place(button_height, 2), Icon::left, enabled && desk_.may_edit());
}
bool ButtonRow::right(std::string_view id, std::string_view label, bool enabled) {
    return icon_button(desk_.ui, id, label, place(button_height, 8), Icon::right,
                       enabled && desk_.may_edit());
}

void more_button(const Desk& desk, std::string_view id, const std::string& item, const Box& box, Id& opened,
                 const Id& own) {
    const bool open = opened == own;
    if (icon_button(desk.ui, id, (open ? "Less about " : "More about ") + item, box,
                    open ? Icon::less : Icon::more))
        opened = open ? Id{} : own;
}

std::vector<std::string> names_of(const std::vector<const Node*>& nodes) {
    std::vector<std::string> names;
    for (const Node* node : nodes) names.push_back(node->name.empty() ? node->id : node->name);
    return names;
}

std::vector<const Node*> figure_leaves(const Decision& decision) {
    auto found = leaves(decision.criteria);
    std::erase_if(found, [](const Node* leaf) { return leaf->rate != RateBy::figure; });
    return found;
}

} // namespace steelyard::frame
