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

constexpr int scale_end = 9;            ///< Saaty 1980.
constexpr double steepest = 7.5;        ///< Degrees of tilt at the end of the graduation.
const double whole_arm = std::log(9.0); ///< ln of the ratio at either end.

constexpr float beam_beyond = 19; ///< Loads hang a little beyond the last notch.
constexpr float number_drop = 18; ///< From the beam's middle line to those numbers.
constexpr float over_poise = 4;   ///< Between a poise and what is written over it.
constexpr float flag_gap = 5;

float tangent() {
    return static_cast<float>(std::sin(steepest * std::numbers::pi / 180));
}

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

float highest_number(const ArmState& state, const std::optional<double>& shown, const Layout& layout) {
    Beam beam;
    beam.scale = layout.scale;
    float need = beam.poise_height() + over_poise + font_size(layout.load);
    if (state.other || !shown) need += line_step(Font::small);
    return need;
}

std::vector<NameWish> wishes_of(const ArmState& state, const std::optional<double>& shown, const Beam& beam,
                                const std::vector<std::string>& flags, Font font) {
    std::vector<NameWish> wishes;
    for (std::size_t i = 0; i < flags.size(); ++i) {
        const double ratio = i < state.named.size() ? state.named[i].ratio : shown.value_or(1);
        wishes.push_back({beam.at(position_of(ratio)).x, text_size(font, flags[i]).x});
    }
    return wishes;
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

Layout lay_out(const ArmState& state, const std::optional<double>& shown, const Box& box) {
    Layout layout;
    layout.box = box;
    layout.scale = std::clamp(std::min(box.w / 640, box.h / 215), 0.82f, 1.5f);
    layout.board = std::clamp(box.w * 0.28f, 112.0f, 290.0f);
    layout.load = layout.scale >= 1.25f ? Font::heading : Font::strong;
    const float whole = std::min((box.w - layout.board) / 2 - 4, 480.0f);
    layout.half = whole - beam_beyond;
    layout.drop = whole * tangent();
    // Clear of the graduation's numbers, which slant over the load.
    layout.cord = number_drop + font_size(Font::small) + layout.board / 2 * tangent();
    float above = highest_number(state, shown, layout);
    for (layout.name_lines = 2;; layout.name_lines = 1) {
        layout.board_height = board_height(state, layout.load, layout.board - 16, layout.name_lines);
        if (layout.name_lines == 1 || above + layout.drop + layout.cord + layout.board_height + 2 <= box.h)
            break;
    }
    const float below = layout.drop + layout.cord + layout.board_height + 2;

    if (!state.named.empty()) {
        for (const auto& named : state.named) {
            const double times = named.ratio >= 1 ? named.ratio : 1 / named.ratio;
            layout.flags.push_back(named.name + " \xC3\x97" + ratio_text(times));
        }
        layout.own_flag = shown.has_value();
        if (shown)
            layout.flags.push_back(state.own_name + " \xC3\x97" +
                                   ratio_text(*shown >= 1 ? *shown : 1 / *shown));
        Beam beam;
        beam.pivot = {box.x + box.w / 2, 0};
        beam.half = layout.half;
        beam.scale = layout.scale;
        const float left = box.h - below - beam.poise_height() - layout.drop - 8;
        for (const Font font : {Font::large, Font::heading, Font::strong, Font::small}) {
            layout.names = font;
            const auto placed = place_names(wishes_of(state, shown, beam, layout.flags, font), box.x,
                                            box.right(), beam.pivot.x, flag_gap);
            const bool shortened = std::any_of(placed.begin(), placed.end(), [&](const PlacedName& name) {
                const auto i = static_cast<std::size_t>(&name - placed.data());
                return name.width < text_size(font, layout.flags[i]).x;
            });
            const float rows = static_cast<float>(rows_of(placed)) * line_step(font);
            above = beam.poise_height() + layout.drop + 8 + rows;
            if (rows <= left && (!shortened || font == Font::small)) break;
        }
    } else {
        above += state.other ? layout.drop * 0.5f : 0;
    }
    const float spare = std::max(0.0f, box.h - above - below);
    layout.pivot = {std::round(box.x + box.w / 2), std::round(box.y + above + spare * 0.45f)};
    layout.foot = std::round(layout.pivot.y + std::min(below - 4, 112.0f * layout.scale));
    return layout;
}

Beam beam_at(const Layout& layout, double position) {
    Beam beam;
    beam.pivot = layout.pivot;
    beam.half = layout.half;
    beam.scale = layout.scale;
    const double angle = position * steepest * std::numbers::pi / 180;
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
    float y = board.y + 7;
    for (const auto& line : lines_of(layout.load, load.name, space, layout.name_lines)) {
        const float name_width = std::min(text_size(layout.load, line).x, space);
        if (load.starred && y < board.y + 8)
            draw_star({middle - name_width / 2 - 3, y + font_size(layout.load) / 2}, 8, theme.brass);
        draw_text(ui, {middle + (width - space) / 2, y}, line,
                  {.font = layout.load, .max_width = space, .align = Align::centre});
        y += font_size(layout.load);
    }
    y += 1;
    if (load.range.empty()) return;
    for (const auto& line : lines_of(Font::small, load.range, width, 2)) {
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

void draw_named(Ui& ui, const ArmState& state, const std::optional<double>& shown, const Layout& layout,
                const Beam& beam) {
    const Theme& theme = ui.look();
    ImDrawList* list = ImGui::GetWindowDrawList();
    const auto wishes = wishes_of(state, shown, beam, layout.flags, layout.names);
    const auto placed = place_names(wishes, layout.box.x, layout.box.right(), layout.pivot.x, flag_gap);
    const float bottom = layout.pivot.y - beam.poise_height() - layout.drop - 4;
    const float step = line_step(layout.names);
    for (std::size_t i = 0; i < placed.size(); ++i) {
        const bool own = layout.own_flag && i + 1 == placed.size();
        const float y = bottom - step * static_cast<float>(placed[i].row + 1);
        const double position = position_of(own ? shown.value_or(1) : state.named[i].ratio);
        const PoiseLook look = own ? PoiseLook::own : PoiseLook::judge;
        const ImVec2 top = beam.at(position, beam.poise_height(look) - 2);
        list->AddLine({wishes[i].x, y + 3}, {wishes[i].x, bottom}, own ? theme.brass : theme.edge, 1.5f);
        list->AddLine({wishes[i].x, bottom}, top, own ? theme.brass : theme.edge, 1.5f);
    }
    for (std::size_t i = 0; i < placed.size(); ++i) {
        const bool own = layout.own_flag && i + 1 == placed.size();
        const double position = position_of(own ? shown.value_or(1) : state.named[i].ratio);
        draw_poise(ui, beam, position, own ? PoiseLook::own : PoiseLook::judge);
        const float y = bottom - step * static_cast<float>(placed[i].row + 1);
        const float at = placed[i].to_left ? placed[i].left + placed[i].width : placed[i].left;
        draw_text(ui, {at, y}, layout.flags[i],
                  {.font = layout.names,
                   .ink = own ? theme.brass_ink : theme.ink,
                   .max_width = placed[i].width + 0.5f,
                   .align = placed[i].to_left ? Align::right : Align::left});
    }
}

} // namespace steelyard::arm
