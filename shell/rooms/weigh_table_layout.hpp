#pragma once

#include <cstddef>
#include <optional>
#include <string>
#include <vector>

#include "shell/ui.hpp"

namespace steelyard {

/// A cell of the table of a set: places of two items.
struct CellPlace {
    std::size_t row = 0;
    std::size_t column = 0;
    bool operator==(const CellPlace&) const = default;
};

/// Where the cells of a table of n by n stand, and the names above and at the left, which stay in sight.
struct TableLayout {
    std::size_t n = 0;
    Box origin; ///< Where the table begins, scrolled.
    Box sight;
    float names = 0; ///< Width of the names at the left.
    float head = 0;  ///< Height of the names above.
    float cell_w = 0;
    float cell_h = 0;
    bool roomy = false;    ///< Words stand in the cells.
    bool numbered = false; ///< Some name is too long to stand whole above its column.

    Box cell(const CellPlace& at) const;
    Box body() const { return {sight.x + names, sight.y + head, sight.w - names, sight.h - head}; }
    bool row_in_sight(std::size_t row) const;
    bool column_in_sight(std::size_t column) const;

    /// The cell under a point; none on the diagonal.
    std::optional<CellPlace> place(ImVec2 point) const;
};

TableLayout lay_out(const std::vector<std::string>& names, const Box& origin, const Box& sight);

/// The next cell (`step` 1) or the one before (-1) in the same half, row by row; the same one at the end.
CellPlace next_cell(std::size_t n, const CellPlace& at, int step);

/// By arrow keys, over the diagonal; the same one at the edge.
CellPlace moved_cell(std::size_t n, const CellPlace& at, int right, int down);

} // namespace steelyard
