#pragma once

#include <array>
#include <cstddef>
#include <functional>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

/// A set of judgments as a block of cells, from and to a spreadsheet. No drawing.
namespace steelyard {

/// An answer read from a block: item i counts `ratio` times as much as item j; i < j, by place in the set.
struct ReadAnswer {
    std::size_t i = 0;
    std::size_t j = 0;
    double ratio = 1;
    bool operator==(const ReadAnswer&) const = default;
};

struct ReadMatrix {
    std::string problem; ///< Which cell, and why it is refused; empty for a block that can be entered.
    std::vector<ReadAnswer> answers; ///< In item order.
    std::vector<std::array<std::size_t, 2>>
        blank;         ///< Pairs of items of the block that it leaves blank in both halves.
    std::string notes; ///< What was read as something else: "0.33 is taken as 1/3."
};

/// Reads a block for a set whose items have these names. Cells are parted by tabs, or else by semicolons.
/// Names may stand above, at the left, at both or nowhere; where they stand they may come in any order, and
/// items may be left out. One half is enough; the diagonal is 1 or blank. Ratios are 3, 2.5, 2,5, 1/3 or
/// 0.333, from 1/100 to 100. Both halves must be reciprocal within the rounding of the digits given; the more
/// exact of the two counts. A decimal of at least two places that can only be one of 1/2 to 1/9 is taken as
/// that.
ReadMatrix read_matrix(std::string_view text, const std::vector<std::string>& names);

/// The whole matrix, both halves, with names above and at the left; blank where `ratio` (of one item against
/// another) gives none.
std::string matrix_text(const std::vector<std::string>& names,
                        const std::function<std::optional<double>(std::size_t, std::size_t)>& ratio);

/// The shortest of "3", "2.5" or "1/3" that reads back as the same double.
std::string exact_ratio(double ratio);

} // namespace steelyard
