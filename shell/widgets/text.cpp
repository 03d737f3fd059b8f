#include "shell/widgets/text.hpp"

#include <cmath>
#include <cstring>

namespace steelyard {
namespace {

constexpr std::string_view ellipsis = "\xE2\x80\xA6";

/// Control and direction marks change how a name reads; they are shown as visible marks instead.
std::string made_visible(std::string_view text) {
    std::string shown;
    shown.reserve(text.size());
    for (std::size_t i = 0; i < text.size(); ++i) {
        const auto c = static_cast<unsigned char>(text[i]);
        if (c < 0x20 || c == 0x7f) {
            shown += "\xC2\xB7";
            continue;
        }
        // U+200B..U+200F, U+202A..U+202E, U+2060..U+2069: three bytes beginning E2 80 or E2 81.
        if (c == 0xE2 && i + 2 < text.size()) {
            const auto second = static_cast<unsigned char>(text[i + 1]);
            const auto third = static_cast<unsigned char>(text[i + 2]);
            const bool mark =
                (second == 0x80 && ((third >= 0x8B && third <= 0x8F) || (third >= 0xAA && third <= 0xAE))) ||
                (second == 0x81 && third >= 0xA0 && third <= 0xA9);
            if (mark) {
                shown += "\xC2\xB7";
                i += 2;
                continue;
            }
        }
        shown += text[i];
    }
    return shown;
}

float width_of(Font which, std::string_view text) {
    ImFont* face = font(which);
    return face->CalcTextSizeA(font_size(which), 3.0e38f, 0, text.data(), text.data() + text.size()).x;
}

/// The longest beginning of a text that fits with an ellipsis.
std::string shortened(Font which, std::string_view text, float width) {
    std::size_t end = text.size();
    while (end > 0) {
        --end;
        while (end > 0 && (static_cast<unsigned char>(text[end]) & 0xc0) == 0x80) --end;
        std::string candidate(text.substr(0, end));
        while (!candidate.empty() && candidate.back() == ' ') candidate.pop_back();
        candidate += ellipsis;
        if (width_of(which, candidate) <= width) return candidate;
    }
    return std::string(ellipsis);
}

} // namespace

ImVec2 text_size(Font which, std::string_view text) {
    return {width_of(which, text), font_size(which)};
}

float line_step(Font which) {
    return std::ceil(font_size(which) * 1.14f);
}

ImVec2 draw_text(Ui& ui, ImVec2 at, std::string_view text, const TextLook& look) {
    if (text.empty()) return {0, font_size(look.font)};
    const std::string whole = made_visible(text);
    const float full = width_of(look.font, whole);
    const bool cut = look.max_width > 0 && full > look.max_width;
    const std::string shown = cut ? shortened(look.font, whole, look.max_width) : whole;
    const float width = cut ? width_of(look.font, shown) : full;
    if (look.align == Align::centre) at.x -= width / 2;
    if (look.align == Align::right) at.x -= width;
    at = {std::round(at.x), std::round(at.y)};

    const ImU32 ink = look.ink != 0 ? look.ink : ui.look().ink;
    const float height = font_size(look.font);
    ImGui::GetWindowDrawList()->AddText(font(look.font), height, at, ink, shown.data(),
                                        shown.data() + shown.size());

    LedgerItem item;
    item.label = whole;
    item.role = "text";
    item.at = at;
    item.size = {width, height};
    item.needs = {width, height};
    item.shortened = cut;
    item.may_scroll = ui.scrolling;
    item.ink = ink;
    item.paper = ui.paper;
    item.font_size = em_of(font_size(look.font));
    ui.ledger.add(std::move(item));
    return {width, height};
}

namespace {

/// Calls `each` with every line of a text broken to a width.
template<class Each>
void each_line(Font which, float width, std::string_view text, Each each) {
    ImFont* face = font(which);
    const float scale = font_size(which) / face->FontSize;
    const char* line = text.data();
    const char* end = line + text.size();
    while (line < end) {
        const auto* stop =
            static_cast<const char*>(std::memchr(line, '\n', static_cast<std::size_t>(end - line)));
        const char* paragraph_end = stop != nullptr ? stop : end;
        do {
            const char* wrap = face->CalcWordWrapPositionA(scale, line, paragraph_end, width);
            // It also breaks after commas and points, which would cut numbers apart.
            if (wrap < paragraph_end && wrap > line && *wrap != ' ' && wrap[-1] != ' ') {
                const std::string_view fits(line, static_cast<std::size_t>(wrap - line));
                const auto space = fits.rfind(' ');
                if (space != std::string_view::npos && space > 0) wrap = line + space;
            }
            if (wrap == line && wrap < paragraph_end)
                ++wrap; // One glyph wider than the column still takes a line.
            each(std::string_view(line, static_cast<std::size_t>(wrap - line)));
            line = wrap;
            while (line < paragraph_end && *line == ' ') ++line;
        } while (line < paragraph_end);
        line = paragraph_end + (stop != nullptr ? 1 : 0);
    }
}

} // namespace

float draw_paragraph(Ui& ui, ImVec2 at, float width, std::string_view text, const TextLook& look) {
    TextLook one = look;
    one.max_width = 0;
    float y = at.y;
    each_line(look.font, width, text, [&](std::string_view line) {
        draw_text(ui, {at.x, y}, line, one);
        y += line_step(look.font);
    });
    return y - at.y;
}

float paragraph_height(float width, std::string_view text, Font which) {
    float height = 0;
    each_line(which, width, text, [&](std::string_view) { height += line_step(which); });
    return height;
}

} // namespace steelyard
