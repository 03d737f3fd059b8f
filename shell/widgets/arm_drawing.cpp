#include "shell/widgets/arm_drawing.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <numbers>

#include "shell/widgets/arm_names.hpp"
#include "shell/widgets/star.hpp"
#include "shell/words.hpp"

namespace steelyard::arm {
namespace {

constexpr int scale_end = 9;     ///< Saaty 1980.
constexpr double steepest = 7.5; ///< Degrees of tilt at the end of the graduation.
constexpr double steepest_beside_names = 4.5;
const double whole_arm = std::log(9.0); ///< ln of the ratio at either end.

constexpr float beam_beyond = 19; ///< Loads hang a little beyond the last notch.
constexpr float number_drop = 18; ///< From the beam's middle line to those numbers.
constexpr float over_poise = 4;   ///< Between a poise and what is written over it.
constexpr float flag_gap = 5;

/// Where the loads hang, on the scale of the graduation.
double end_of(const Beam& beam) {
    return 1 + static_cast<double>(beam_beyond / beam.half);
}

ImU32 faded(ImU32 colour, unsigned alpha) {
    return (colour & ~IM_COL32_A_MASK) | (alpha << IM_COL32_A_SHIFT);
}

/// A corner of a poise: to the right of its middle, and over its foot.
struct Corner {
    float right;
    float up;
};

/// A weight with a neck; the knob is a circle over it.
constexpr std::array<Corner, 8> weight_outline{
    {{-15, 0}, {-12.5f, 20}, {-4, 24}, {-4, 28}, {4, 28}, {4, 24}, {12.5f, 20}, {15, 0}}};
constexpr float knob_up = 31.5f;
constexpr float knob = 5.5f;
constexpr float small_scale = 0.62f;

/// Puts corners of a poise on the page.
struct Standing {
    ImVec2 foot;
    ImVec2 along;
    float scale;

    ImVec2 at(Corner c) const {
        const float r = c.right * scale;
        const float u = c.up * scale;
        return {foot.x + along.x * r + along.y * u, foot.y + along.y * r - along.x * u};
    }
};

void draw_weight(const Ui& ui, const Standing& stand, ImU32 fill, ImU32 edge) {
    ImDrawList* list = ImGui::GetWindowDrawList();
    std::array<ImVec2, weight_outline.size()> points;
    std::transform(weight_outline.begin(), weight_outline.end(), points.begin(),
                   [&](Corner c) { return stand.at(c); });
    // The neck makes the outline hollow: body and neck are filled one after the other.
    const std::array body{points[0], points[1], points[2], points[5], points[6], points[7]};
    const std::array neck{points[2], points[3], points[4], points[5]};
    list->AddConvexPolyFilled(body.data(), static_cast<int>(body.size()), fill);
    list->AddConvexPolyFilled(neck.data(), static_cast<int>(neck.size()), fill);
    list->AddPolyline(points.data(), static_cast<int>(points.size()), edge, ImDrawFlags_Closed, 1.5f);
    const ImVec2 top = stand.at({0, knob_up});
    list->AddCircleFilled(top, knob * stand.scale, fill);
    list->AddCircle(top, knob * stand.scale, edge, 0, 1.5f);
    // Light from the left.
    list->AddLine(stand.at({-9.5f, 3}), stand.at({-8, 17}), faded(ui.look().card, 90), 2 * stand.scale);
}

void dashed(ImVec2 a, ImVec2 b, ImU32 colour) {
    const float length = std::hypot(b.x - a.x, b.y - a.y);
    const int dashes = std::max(1, static_cast<int>(length / 6));
    for (int i = 0; i < dashes; ++i) {
        const float from = static_cast<float>(i) / static_cast<float>(dashes);
        const float to = from + 0.6f / static_cast<float>(dashes);
        ImGui::GetWindowDrawList()->AddLine({a.x + (b.x - a.x) * from, a.y + (b.y - a.y) * from},
                                            {a.x + (b.x - a.x) * to, a.y + (b.y - a.y) * to}, colour, 1.6f);
    }
}

void draw_hollow(const Ui& ui, const Standing& stand) {
    const ImU32 ink = ui.look().brass_ink;
    const std::array<Corner, 4> corners{{{-15, 1}, {-12.5f, 21}, {12.5f, 21}, {15, 1}}};
    for (std::size_t i = 0; i < corners.size(); ++i)
        dashed(stand.at(corners[i]), stand.at(corners[(i + 1) % corners.size()]), ink);
    ImGui::GetWindowDrawList()->AddCircle(stand.at({0, 28}), 5, ink, 0, 1.4f);
}

/// "Noise of the pump, 70 to 78 dB(A)" broken into at most `most` lines, the last one shortened.
std::vector<std::string> lines_of(Font font, const std::string& text, float width, std::size_t most) {
    std::vector<std::string> lines{""};
    std::size_t at = 0;
    while (at < text.size()) {
        const std::size_t end = std::min(text.find(' ', at), text.size());
        const std::string word = text.substr(at, end - at);
        at = end + 1;
        if (lines.back().empty()) {
            lines.back() = word;
        } else if (lines.size() == most || text_size(font, lines.back() + " " + word).x <= width) {
            lines.back() += " " + word;
        } else {
            lines.push_back(word);
        }
    }
    return lines;
}

/// Space for a load's name without its star.
float name_space(const Load& load, float width) {
    return load.starred ? width - 22 : width;
}

float board_height(const ArmState& state, Font font, float width, std::size_t name_lines) {
    std::size_t names = 1;
    std::size_t ranges = 0;
    for (const Load* load : {&state.left, &state.right}) {
        names = std::max(names, lines_of(font, load->name, name_space(*load, width), name_lines).size());
        if (!load->range.empty())
            ranges = std::max(ranges, lines_of(Font::small, load->range, width, 2).size());
    }
    return 14 + static_cast<float>(names) * font_size(font) +
           static_cast<float>(ranges) * line_step(Font::small);
}

float highest_number(const ArmState& state, const Layout& layout) {
    Beam beam;
    beam.scale = layout.scale;
    float need = beam.poise_height() + over_poise + font_size(layout.load);
    if (state.other) need += line_step(Font::small) + layout.drop * 0.4f; // On the rising side, perhaps.
    return need;
}

std::string times_of(double ratio) {
    return " \xC3\x97" + ratio_text(ratio >= 1 ? ratio : 1 / ratio);
}

/// The names at one place in as few lines as take no more than a width, the last one first.
void add_flags(std::vector<Flag>& flags, const std::vector<std::string>& names, double ratio, bool own,
               Font font, float width) {
    std::vector<std::string> lines{""};
    for (std::size_t i = 0; i < names.size(); ++i) {
        const std::string name = names[i] + (i + 1 < names.size() ? "," : times_of(ratio));
        if (lines.back().empty())
            lines.back() = name;
        else if (text_size(font, lines.back() + " " + name).x <= width)
            lines.back() += " " + name;
        else
            lines.push_back(name);
    }
    for (auto line = lines.rbegin(); line != lines.rend(); ++line) flags.push_back({ratio, *line, own});
}

std::vector<Flag> flags_of(const ArmState& state, const std::optional<double>& shown, Font font,
                           const Beam& beam, const Box& box) {
    std::vector<Flag> flags;
    std::vector<bool> taken(state.named.size(), false);
    for (std::size_t i = 0; i < state.named.size(); ++i) {
        if (taken[i]) continue;
        const double ratio = state.named[i].ratio;
        std::vector<std::string> names;
        for (std::size_t j = i; j < state.named.size(); ++j) {
            if (std::abs(std::log(state.named[j].ratio / ratio)) > 1e-9) continue;
            taken[j] = true;
            names.push_back(state.named[j].name);
        }
        const float x = beam.at(position_of(ratio)).x;
        const float space = x < beam.pivot.x ? x - box.x : box.right() - x;
        add_flags(flags, names, ratio, false, font, space - flag_gap);
    }
    if (shown) add_flags(flags, {state.own_name}, *shown, true, font, box.w);
    return flags;
}

std::vector<PlacedName> placed_flags(const std::vector<Flag>& flags, Font font, const Beam& beam,
                                     const Box& box) {
    std::vector<NameWish> wishes;
    for (const auto& flag : flags)
        wishes.push_back({beam.at(position_of(flag.ratio)).x, text_size(font, flag.text).x});
    return place_names(wishes, box.x, box.right(), beam.pivot.x, flag_gap);
}

} // namespace

double position_of(double ratio) {
    return std::clamp(-std::log(ratio) / whole_arm, -1.0, 1.0);
}
double ratio_at(double position) {
    return std::exp(-std::clamp(position, -1.0, 1.0) * whole_arm);
}

float Beam::thickness(double position) const {
    return scale * (6.0f - 3.2f * static_cast<float>(std::min(1.0, std::abs(position))));
}

float Beam::poise_height(PoiseLook look) const {
    const float weight = scale * (knob_up + knob);
    return thickness(0) + (look == PoiseLook::judge ? weight * small_scale : weight);
}

namespace {

/// Sizes that do not depend on how the height is shared out.
Layout widths(const ArmState& state, const Box& box) {
    Layout layout;
    layout.box = box;
    // Beside names the arm itself stands back.
    const bool several = !state.named.empty();
    layout.scale = std::clamp(std::min(box.w / 640, box.h / 215), 0.82f, several ? 1.1f : 1.5f);
    layout.steepest = several ? steepest_beside_names : steepest;
    layout.board = std::clamp(box.w * 0.28f, 112.0f, 290.0f);
    const bool large = layout.scale >= 1.25f || (several && box.w >= 1000);
    layout.load = large ? Font::heading : Font::strong;
    const float lean = static_cast<float>(std::sin(layout.steepest * std::numbers::pi / 180));
    const float whole = std::min((box.w - layout.board) / 2 - 4, 480.0f);
    layout.half = whole - beam_beyond;
    layout.drop = whole * lean;
    // Clear of the graduation's numbers, which slant over the load.
    layout.cord = number_drop + font_size(Font::small) + layout.board / 2 * lean;
    return layout;
}

float height_below(const Layout& layout) {
    return layout.drop + layout.cord + layout.board_height + 6;
}

/// Takes the largest type in which all names fit into `space`; gives the height they need, poises included.
float fit_names(Layout& layout, const ArmState& state, const std::optional<double>& shown, float space) {
    const Beam level = beam_at(layout, 0);
    float need = 0;
    for (const Font font : {Font::large, Font::heading, Font::strong, Font::small}) {
        layout.names = font;
        layout.flags = flags_of(state, shown, font, level, layout.box);
        const auto placed = placed_flags(layout.flags, font, level, layout.box);
        bool shortened = false;
        for (std::size_t i = 0; i < placed.size(); ++i)
            shortened = shortened || placed[i].width < 0.6f * text_size(font, layout.flags[i].text).x;
        need = level.poise_height() + layout.drop + 8 + static_cast<float>(rows_of(placed)) * line_step(font);
        if (need <= space && !shortened) break;
    }
    return need;
}

} // namespace

Layout lay_out(const ArmState& state, const std::optional<double>& shown, const Box& box) {
    Layout layout = widths(state, box);
    layout.pivot = {std::round(box.x + box.w / 2), box.y};
    float above = 0;
    // Names of loads take a second line only where there is room for it.
    for (layout.name_lines = 2; layout.name_lines > 0; --layout.name_lines) {
        layout.board_height = board_height(state, layout.load, layout.board - 16, layout.name_lines);
        const float space = box.h - height_below(layout);
        above = state.named.empty() ? highest_number(state, layout) : fit_names(layout, state, shown, space);
        if (above <= space || layout.name_lines == 1) break;
    }
    const float spare = std::max(0.0f, box.h - above - height_below(layout));
    layout.pivot.y = std::round(box.y + above + spare * 0.45f);
    layout.foot = std::round(layout.pivot.y + std::min(height_below(layout) - 4, 112.0f * layout.scale));
    return layout;
}

Beam beam_at(const Layout& layout, double position) {
    Beam beam;
    beam.pivot = layout.pivot;
    beam.half = layout.half;
    beam.scale = layout.scale;
    const double angle = position * layout.steepest * std::numbers::pi / 180;
    beam.along = {static_cast<float>(std::cos(angle)), static_cast<float>(std::sin(angle))};
    return beam;
}

Box load_box(const Layout& layout, const Beam& beam, bool right) {
    const ImVec2 end = beam.at(right ? end_of(beam) : -end_of(beam));
    return {end.x - layout.board / 2, end.y + layout.cord, layout.board, layout.board_height};
}

void draw_stand(Ui& ui, const Layout& layout, const Beam& beam) {
    const Theme& theme = ui.look();
    ImDrawList* list = ImGui::GetWindowDrawList();
    const ImVec2 p = beam.pivot;
    const float foot = layout.foot;
    const float tall = foot - p.y;
    const float spread = 42 * layout.scale;
    list->AddRectFilled({p.x - spread - 24, foot - 1}, {p.x + spread + 24, foot + 3}, theme.steel, 2);
    for (const float side : {-1.0f, 1.0f})
        list->AddLine({p.x + side * 2, p.y}, {p.x + side * spread, foot}, theme.steel, 3.5f);
    draw_text(ui, {p.x, foot - font_size(Font::small) - 4}, "equal",
              {.font = Font::small, .ink = theme.quiet, .align = Align::centre});
    // The tongue: it shows a small tilt twice as large, against a mark over the word.
    const float length = tall - font_size(Font::small) - 22;
    if (length < 18) return;
    const float lean = beam.along.y * 2;
    const float down = std::sqrt(1 - lean * lean);
    list->AddLine(p, {p.x - lean * length, p.y + down * length}, theme.steel, 2);
    list->AddTriangleFilled({p.x, p.y + length + 5}, {p.x - 4, p.y + length + 13},
                            {p.x + 4, p.y + length + 13}, theme.edge);
}

void draw_beam(Ui& ui, const Layout&, const Beam& beam) {
    const Theme& theme = ui.look();
    ImDrawList* list = ImGui::GetWindowDrawList();
    for (int k = 2; k <= scale_end; ++k) {
        const bool named = k % 2 == 1;
        for (const double side : {-1.0, 1.0}) {
            const double t = side * std::log(static_cast<double>(k)) / whole_arm;
            list->AddLine(beam.at(t, 0), beam.at(t, named ? -14.0f : -10.0f), theme.steel,
                          named ? 2.0f : 1.5f);
            if (!named || (k == 7 && beam.half < 190)) continue;
            const ImVec2 at = beam.at(t, -number_drop + 2);
            draw_text(ui, {at.x, at.y}, "\xC3\x97" + std::to_string(k),
                      {.font = Font::small, .ink = theme.quiet, .align = Align::centre});
        }
    }
    const float thin = beam.thickness(1);
    const float thick = beam.thickness(0);
    const double end = end_of(beam);
    const std::array outline{beam.at(-end, thin), beam.at(0, thick),  beam.at(end, thin),
                             beam.at(end, -thin), beam.at(0, -thick), beam.at(-end, -thin)};
    list->AddConvexPolyFilled(outline.data(), static_cast<int>(outline.size()), theme.steel);
    list->AddCircleFilled(beam.pivot, 9 * beam.scale, theme.card);
    list->AddCircle(beam.pivot, 9 * beam.scale, theme.steel, 0, 3 * beam.scale);
    list->AddCircleFilled(beam.pivot, 3 * beam.scale, theme.steel);
}

void draw_load(Ui& ui, const Load& load, const Layout& layout, const Beam& beam, bool right, bool chosen) {
    const Theme& theme = ui.look();
    ImDrawList* list = ImGui::GetWindowDrawList();
    const ImVec2 end = beam.at(right ? end_of(beam) : -end_of(beam));
    const Box board = load_box(layout, beam, right);
    list->AddLine(end, {end.x, board.y - 6}, theme.steel, 1.8f);
    list->AddLine({end.x, board.y - 7}, {end.x - 12, board.y + 1}, theme.steel, 1.8f);
    list->AddLine({end.x, board.y - 7}, {end.x + 12, board.y + 1}, theme.steel, 1.8f);
    list->AddCircleFilled(end, 5, theme.card);
    list->AddCircle(end, 5, theme.steel, 0, 2);
    list->AddRectFilled({board.x + 2, board.y + 3}, {board.right() + 2, board.bottom() + 3},
                        faded(theme.ink, theme.dark ? 60 : 22), 7);
    list->AddRectFilled(board.at(), board.end(), theme.rail, 7);
    list->AddRect(board.at(), board.end(), chosen ? theme.brass : theme.steel, 7, 0, chosen ? 3.0f : 1.5f);
    const OnPaper paper(ui, theme.rail);
    const float middle = board.x + board.w / 2;
    const float width = board.w - 16;
    const float space = name_space(load, width);
    const auto names = lines_of(layout.load, load.name, space, layout.name_lines);
    const auto ranges =
        load.range.empty() ? std::vector<std::string>{} : lines_of(Font::small, load.range, width, 2);
    const float tall = static_cast<float>(names.size()) * font_size(layout.load) +
                       static_cast<float>(ranges.size()) * line_step(Font::small);
    const float first = std::round(board.y + (board.h - tall) / 2);
    float y = first;
    for (const auto& line : names) {
        const float name_width = std::min(text_size(layout.load, line).x, space);
        if (load.starred && y == first)
            draw_star({middle - name_width / 2 - 3, y + font_size(layout.load) / 2}, 8, theme.brass);
        draw_text(ui, {middle + (width - space) / 2, y}, line,
                  {.font = layout.load, .max_width = space, .align = Align::centre});
        y += font_size(layout.load);
    }
    y += 1;
    for (const auto& line : ranges) {
        draw_text(ui, {middle, y}, line,
                  {.font = Font::small, .ink = theme.quiet, .max_width = width, .align = Align::centre});
        y += line_step(Font::small);
    }
}

void draw_poise(const Ui& ui, const Beam& beam, double position, PoiseLook look) {
    const Theme& theme = ui.look();
    const float scale = look == PoiseLook::judge ? small_scale : 1.0f;
    const Standing stand{beam.at(position, beam.thickness(position)), beam.along, scale * beam.scale};
    switch (look) {
    case PoiseLook::own: draw_weight(ui, stand, theme.brass, theme.brass_ink); break;
    case PoiseLook::judge: draw_weight(ui, stand, theme.steel, theme.card); break;
    case PoiseLook::empty: draw_hollow(ui, stand); break;
    }
}

void draw_loose_poise(const Ui& ui, ImVec2 foot) {
    const Theme& theme = ui.look();
    draw_weight(ui, {foot, {1, 0}, 1}, faded(theme.brass, 150), theme.brass_ink);
}

void draw_named(Ui& ui, const ArmState& state, const Layout& layout, const Beam& beam) {
    const Theme& theme = ui.look();
    ImDrawList* list = ImGui::GetWindowDrawList();
    const auto placed = placed_flags(layout.flags, layout.names, beam, layout.box);
    const float step = line_step(layout.names);
    const auto top_of = [&](const Flag& flag) {
        const PoiseLook look = flag.own ? PoiseLook::own : PoiseLook::judge;
        return beam.at(position_of(flag.ratio), beam.poise_height(look) - 1);
    };
    float bottom = layout.pivot.y;
    for (const auto& flag : layout.flags) bottom = std::min(bottom, top_of(flag).y - 5);
    const auto row_top = [&](const PlacedName& name) {
        return std::round(bottom) - step * static_cast<float>(name.row + 1);
    };
    for (std::size_t i = 0; i < placed.size(); ++i) {
        const Flag& flag = layout.flags[i];
        const ImVec2 top = top_of(flag);
        const ImU32 colour = flag.own ? theme.brass : theme.edge;
        const float x = beam.at(position_of(flag.ratio)).x;
        list->AddLine({x, row_top(placed[i]) + 3}, {x, bottom}, colour, 1.5f);
        list->AddLine({x, bottom}, top, colour, 1.5f);
    }
    for (const auto& one : state.named) draw_poise(ui, beam, position_of(one.ratio), PoiseLook::judge);
    for (std::size_t i = 0; i < placed.size(); ++i) {
        const Flag& flag = layout.flags[i];
        if (flag.own) draw_poise(ui, beam, position_of(flag.ratio), PoiseLook::own);
        const float at = placed[i].to_left ? placed[i].left + placed[i].width : placed[i].left;
        draw_text(ui, {at, row_top(placed[i])}, flag.text,
                  {.font = layout.names,
                   .ink = flag.own ? theme.brass_ink : theme.ink,
                   .max_width = placed[i].width + 0.5f,
                   .align = placed[i].to_left ? Align::right : Align::left});
    }
}

} // namespace steelyard::arm
