#pragma once

#include <cstddef>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

/// One line of a pasted list: its indentation, its bullet or number, its weight.
namespace steelyard {

/// How far a line is indented, with tabs taken as narrow as a space and as wide as eight. Lines that compare
/// differently in the two mix tabs and spaces in a way that can be read in two ways.
struct Indent {
    int narrow = 0;
    int wide = 0;
};

struct OutlineLine {
    std::size_t number = 0; ///< Of the line in the text, from 1.
    Indent indent;
    std::string text;        ///< What stands after the indentation; in the end the name.
    int numbering = 0;       ///< Parts of the number it begins with: 2 for "1.2"; 0 for none.
    std::size_t columns = 1; ///< Separated by tabs.
    bool last_column_is_number = false;

    std::optional<double> weight;
    bool percent = false;
    bool ends_in_number = false;
    bool may_be_name = false; ///< The number stands after nothing but a space.
    std::string with_number;  ///< The name with the number left in it.
};

/// The lines of a text, broken at line feeds, returns or both. A byte order mark is passed over.
std::vector<std::string_view> text_lines(std::string_view text);

/// Takes off the indentation and looks at what follows.
OutlineLine read_line(std::string_view text, std::size_t number);

/// Takes off a bullet or a number. `numbered`: every line of the list begins with one, so that "1.2 Price" is
/// numbering and not a measure.
void strip_marker(OutlineLine& line, bool numbered);

/// Splits the name from the weight at its end and joins columns. Without `weights` all of it is the name.
void split_weight(OutlineLine& line, bool weights);

} // namespace steelyard
