#include "shell/rooms/gauge_look.hpp"

#include "shell/widgets/controls.hpp"
#include "shell/widgets/panels.hpp"
#include "shell/widgets/text.hpp"
#include "shell/words.hpp"

namespace steelyard::gauge {
namespace {

constexpr float field_height = 32;
constexpr float label_height = 18;
constexpr float gap = 8;

} // namespace

ImU32 ink_of(const Theme& theme, Tone tone) {
    switch (tone) {
    case Tone::quiet: return theme.quiet;
    case Tone::open: return theme.brass_ink;
    case Tone::good: return theme.green;
    case Tone::bad: return theme.red;
    case Tone::plain: break;
    }
    return theme.ink;
}

std::array<std::string, 2> two_lines(Font font, const std::string& text, float width) {
    if (text_size(font, text).x <= width) return {text, {}};
    for (std::size_t space = text.rfind(' '); space != std::string::npos && space > 0;
         space = text.rfind(' ', space - 1)) {
        if (text_size(font, std::string_view(text).substr(0, space)).x <= width)
            return {text.substr(0, space), text.substr(space + 1)};
    }
    return {text, {}};
}

void draw_cell_text(Ui& ui, const Cell& cell, const CellLook& look) {
    const Theme& theme = ui.look();
    const bool plain = cell.main.tone == Tone::plain;
    const TextLook main{.font = look.strong || !plain ? Font::strong : Font::body,
                        .ink = look.greyed && plain ? theme.quiet : ink_of(theme, cell.main.tone),
                        .max_width = look.width};
    const TextLook small{.font = Font::small, .ink = theme.quiet, .max_width = look.width};
    const auto lines = look.two_lines ? two_lines(main.font, cell.main.text, look.width)
                                      : std::array<std::string, 2>{cell.main.text, {}};
    const float line = font_size(Font::body);
    const float height = line + (lines[1].empty() ? 0 : line - 1) + (cell.range.empty() ? 0 : third_line) +
                         (cell.small.text.empty() ? 0 : third_line + 1);
    const float x = look.frame.x + 8;
    float y = look.frame.y + (look.frame.h - height) / 2;
    const ImVec2 first = draw_text(ui, {x, y}, lines[0], main);
    if (first.x + 8 + text_size(Font::small, cell.change).x <= look.width)
        draw_text(ui, {x + first.x + 8, y + 3}, cell.change, small);
    y += line + 1;
    if (!lines[1].empty()) {
        draw_text(ui, {x, y - 2}, lines[1], main);
        y += line - 1;
    }
    if (!cell.range.empty()) {
        draw_text(ui, {x, y}, cell.range, small);
        y += third_line;
    }
    draw_text(ui, {x, y}, cell.small.text,
              {.font = Font::small, .ink = ink_of(theme, cell.small.tone), .max_width = look.width});
}

Box Form::place(std::string_view label, int part, int parts) {
    const float width = (box_.w - gap * static_cast<float>(parts - 1)) / static_cast<float>(parts);
    const float x = box_.x + (width + gap) * static_cast<float>(part);
    draw_text(ui_, {x, y_}, label, {.font = Font::small, .ink = ui_.look().quiet, .max_width = width});
    const Box field{x, y_ + label_height, width, field_height};
    if (part + 1 == parts) y_ += label_height + field_height + gap;
    return field;
}

std::optional<std::string> Form::text(std::string_view id, std::string_view label, std::string_view name,
                                      const std::string& value, int part, int parts) {
    const Box field = place(label, part, parts);
    if (!view_.read_only) return text_field(ui_, id, name, value, field);
    draw_text(ui_, {field.x, field.y + 6}, value, {.max_width = field.w});
    return std::nullopt;
}

std::optional<std::optional<double>> Form::number(std::string_view id, std::string_view label,
                                                  std::string_view name, std::optional<double> value,
                                                  int part, int parts) {
    const auto typed = text(id, label, name, value ? figure_text(*value) : "", part, parts);
    if (!typed) return std::nullopt;
    if (typed->find_first_not_of(" \t") == std::string::npos) return std::optional<double>{};
    const auto number = read_number(*typed);
    if (!number) {
        actions_.say("\xE2\x80\x9C" + *typed +
                     "\xE2\x80\x9D is not a number. Type one like 61,500 or 61500 EUR.");
        return std::nullopt;
    }
    return number;
}

std::optional<std::size_t> Form::pick(std::string_view id, std::string_view label, std::string_view name,
                                      const std::vector<std::string>& labels, std::size_t chosen, int part,
                                      int parts) {
    const Box field = place(label, part, parts);
    if (!view_.read_only) return drop_down(ui_, id, name, labels, chosen, field);
    draw_text(ui_, {field.x, field.y + 6}, labels[chosen], {.max_width = field.w});
    return std::nullopt;
}

void Form::fact(std::string_view name, std::string_view value, Tone tone) {
    const float step = line_step(Font::body) + 3;
    const float width = text_size(Font::body, name).x;
    const bool one_line = width + 12 + text_size(Font::strong, value).x <= box_.w;
    draw_text(ui_, {box_.x, y_}, name, {.ink = ui_.look().quiet, .max_width = box_.w});
    if (!one_line) y_ += step - 3;
    draw_text(
        ui_, {box_.x + box_.w, y_}, value,
        {.font = Font::strong, .ink = ink_of(ui_.look(), tone), .max_width = box_.w, .align = Align::right});
    y_ += step;
}

void Form::sentence(std::string_view text, Tone tone) {
    y_ += draw_paragraph(ui_, {box_.x, y_}, box_.w, text,
                         {.font = Font::small, .ink = ink_of(ui_.look(), tone)}) +
          4;
}

bool Form::link(std::string_view id, std::string_view label) {
    const Box box{box_.x - 4, y_, std::min(button_width(label, ButtonKind::link), box_.w + 4), 28};
    y_ += 32;
    return button(ui_, id, label, box, ButtonKind::link);
}

bool Form::press(std::string_view id, std::string_view label) {
    const Box box{box_.x, y_, std::min(button_width(label), box_.w), field_height};
    y_ += field_height + gap;
    return button(ui_, id, label, box, ButtonKind::plain, !view_.read_only);
}

Box card_title(Ui& ui, Box card, std::string_view title, const TitleLook& look) {
    Box inside = card.inset(16);
    const Box line = inside.take_top(24, 8);
    float x = line.x;
    if (look.mark) {
        option_mark(ui, {x, line.y + 1}, *look.mark, look.in_play);
        x += 22 + 8;
    }
    const ImVec2 right =
        draw_text(ui, {line.right(), line.y + 2}, look.right.text,
                  {.font = Font::strong, .ink = ink_of(ui.look(), look.right.tone), .align = Align::right});
    const float end = line.right() - (right.x > 0 ? right.x + 12 : 0);
    draw_text(ui, {x, line.y + 2}, title,
              {.font = Font::strong, .ink = ui.look().quiet, .max_width = end - x});
    return inside;
}

} // namespace steelyard::gauge
