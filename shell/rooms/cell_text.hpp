#pragma once

#include <string>
#include <string_view>
#include <vector>

/// Cells of a spreadsheet as they pass through the clipboard.
namespace steelyard {

/// Rows of cells, parted by tabs, or by semicolons where there is no tab. A cell in quotation marks may hold
/// line ends and separators. Spaces around a cell are dropped, those that do not break a line too.
std::vector<std::vector<std::string>> read_cells(std::string_view text);

/// Without spaces at both ends.
std::string trimmed(std::string_view text);

/// A name for a cell: on one line, quoted where need be, and never taken for a formula.
std::string safe_cell(std::string_view name);

} // namespace steelyard
