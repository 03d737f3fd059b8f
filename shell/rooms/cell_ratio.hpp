#pragma once

#include <optional>
#include <string>

namespace steelyard {

/// A ratio as it stands in a cell of a spreadsheet.
struct CellRatio {
    double value = 0;
    double half =
        0; ///< Half a unit of the last digit given: how far the value may be rounded. 0 for whole numbers.
    int decimals = 0;
};

/// Reads 3, 2.5, 2,5 (a ratio has no thousands), 1/3, 2 1/2, =1/3, 3.3E-01 or a sign for a fraction. None
/// where it is none of these. The value may be 0, below 0 or huge.
std::optional<CellRatio> read_cell_ratio(const std::string& cell);

/// Nothing, a dash or a question mark.
bool is_blank_cell(const std::string& cell);

/// "1-Mar" or "01.03.2026": what spreadsheets make of fractions.
bool may_be_date(const std::string& cell);

/// Without the "=" or "'" that spreadsheets put before what they would read otherwise.
std::string without_cell_marks(std::string cell);

} // namespace steelyard
