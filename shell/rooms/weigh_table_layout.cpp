#include "shell/rooms/weigh_table_layout.hpp"

#include <algorithm>
#include <cmath>

#include "shell/rooms/gauge_look.hpp"
#include "shell/widgets/text.hpp"

namespace steelyard {
namespace {

constexpr float narrowest = 46; ///< A cell: "1/2.35" in small type.
constexpr float widest = 92;
constexpr float with_word = 58; ///< From this width on a word stands under the ratio.
constexpr float low = 34;
constexpr float high = 46;
constexpr float low_table = 190;
constexpr float number_width = 34; ///< Before a name at the left.

} // namespace

TableLayout lay_out(const std::vector<std::string>& names, const Box& origin, const Box& sight) {
    TableLayout at;
    at.n = names.size();
    at.origin = origin;
    at.sight = sight;
    const auto count = static_cast<float>(at.n);
    float longest = 0;
    for (const auto& name : names) longest = std::max(longest, text_size(Font::body, name).x);
    // Names take a third, or what narrow cells leave of a small table as long as that is not much.
    const float left = std::min(150.0F, sight.w - narrowest * count);
    at.names =
        std::floor(std::clamp(longest + number_width, 60.0F, std::max({84.0F, 0.34F * sight.w, left})));
    at.cell_w = std::floor(std::clamp((sight.w - at.names) / count, narrowest, widest));
    at.numbered = std::any_of(names.begin(), names.end(), [&](const std::string& name) {
        const auto lines = gauge::two_lines(Font::small, name, at.cell_w - 6);
        return text_size(Font::small, lines[0]).x > at.cell_w - 6 ||
               text_size(Font::small, lines[1]).x > at.cell_w - 6;
    });
    // In a low table the numbers alone stand above the columns; the names are at the left.
    at.head = at.numbered && sight.h < low_table ? 20 : 38;
    const float room = (sight.h - at.head) / count;
    at.roomy = at.cell_w >= with_word && room >= 40;
    at.cell_h = at.roomy ? std::clamp(std::floor(room), 42.0F, high) : low;
    return at;
}

Box TableLayout::cell(const CellPlace& at) const {
    return {origin.x + names + cell_w * static_cast<float>(at.column),
            origin.y + head + cell_h * static_cast<float>(at.row), cell_w, cell_h};
}

bool TableLayout::row_in_sight(std::size_t row) const {
    const Box box = cell({row, 0});
    return box.y < sight.bottom() && box.bottom() > sight.y + head;
}

bool TableLayout::column_in_sight(std::size_t column) const {
    const Box box = cell({0, column});
    return box.x < sight.right() && box.right() > sight.x + names;
}

std::optional<CellPlace> TableLayout::place(ImVec2 point) const {
    const float x = point.x - origin.x - names;
    const float y = point.y - origin.y - head;
    if (x < 0 || y < 0) return std::nullopt;
    const CellPlace found{static_cast<std::size_t>(y / cell_h), static_cast<std::size_t>(x / cell_w)};
    if (found.row >= n || found.column >= n || found.row == found.column) return std::nullopt;
    return found;
}

CellPlace next_cell(std::size_t n, const CellPlace& at, int step) {
    const bool upper = at.row < at.column;
    std::size_t i = at.row * n + at.column;
    while (step > 0 ? i + 1 < n * n : i > 0) {
        i = step > 0 ? i + 1 : i - 1;
        const CellPlace place{i / n, i % n};
        if (place.row != place.column && (place.row < place.column) == upper) return place;
    }
    return at;
}

CellPlace moved_cell(std::size_t n, const CellPlace& at, int right, int down) {
    const auto last = static_cast<int>(n) - 1;
    const auto sign = [](int by) { return by > 0 ? 1 : by < 0 ? -1 : 0; };
    int row = std::clamp(static_cast<int>(at.row) + down, 0, last);
    int column = std::clamp(static_cast<int>(at.column) + right, 0, last);
    if (row == column && right != 0 && down != 0) {
        column += row == 0 ? 1 : -1; // Ctrl+Home and Ctrl+End.
    } else if (row == column) {
        const int r = row + sign(down);
        const int c = column + sign(right);
        const bool inside = r >= 0 && r <= last && c >= 0 && c <= last;
        row += inside ? sign(down) : -sign(down);
        column += inside ? sign(right) : -sign(right);
    }
    return {static_cast<std::size_t>(row), static_cast<std::size_t>(column)};
}

} // namespace steelyard
