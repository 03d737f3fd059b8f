#pragma once

#include <cstddef>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

/// Reading an indented list of criteria, as it comes from a mail, a text editor or a spreadsheet.
namespace steelyard {

/// One line of the list.
struct OutlineItem {
    std::string name;
    std::size_t depth = 0;        ///< 0 for the outermost lines.
    std::size_t line = 0;         ///< Which line of the text it came from, from 1.
    std::optional<double> weight; ///< Only where every item of the same group has one; 0 or more.
    bool percent = false;         ///< The weight was written with a percent sign.
};

struct Outline {
    std::vector<OutlineItem> items; ///< Each before those below it. Empty if there is a problem.
    std::string problem;            ///< A sentence naming the line that could not be read; empty if none.
    std::vector<std::string> notes; ///< Sentences about what was read otherwise than it stands there.
    bool has_numbers = false;       ///< Some line ends in a number, so that `LineEnds` makes a difference.
};

/// What a number at the end of a line is.
enum class LineEnds { weights, names };

/// Lines become items, depth comes from tabs or spaces, or from numbering ("1", "1.1") where no line is
/// indented. Bullets and numbering are taken off. A weight may stand at the end: "Price 40", "Price: 40 %",
/// "Price (0.4)", or in the last column of a spreadsheet; decimals with a point or a comma. A number after
/// nothing but a space is a weight only where every other item of its group has one too, since names may end
/// in numbers. Empty lines are passed over, and so is a first line of column headings.
/// Refused, with the line: an indentation that matches no line before it or mixes tabs and spaces in two
/// ways, a line without a name, a negative weight, weights of a group that add up to 0 or mix percents with
/// fractions, a name over 200 characters, more than 1,000 lines.
Outline read_outline(std::string_view text, LineEnds ends = LineEnds::weights);

/// The index of the item each item stands under; the number of items for the outermost ones.
std::vector<std::size_t> outline_parents(const std::vector<OutlineItem>& items);

} // namespace steelyard
