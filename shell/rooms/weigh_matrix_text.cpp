#include "shell/rooms/weigh_matrix_text.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

#include "core/decision/number_text.hpp"
#include "shell/rooms/cell_ratio.hpp"
#include "shell/rooms/cell_text.hpp"

namespace steelyard {
namespace {

constexpr double largest_ratio = 100;
constexpr double equal_within = 1e-9; ///< Relative, on top of the rounding of the digits given.
constexpr std::size_t none = std::numeric_limits<std::size_t>::max();

/// A name without regard to capitals and spaces.
std::string plain(const std::string& name) {
    std::string result;
    for (const char c : without_cell_marks(trimmed(name))) {
        const bool space = c == ' ' || c == '\t' || c == '\n' || c == '\r';
        if (space && (result.empty() || result.back() == ' ')) continue;
        result += space ? ' ' : c >= 'A' && c <= 'Z' ? static_cast<char>(c - 'A' + 'a') : c;
    }
    return result;
}

std::string quoted(const std::string& text) {
    return "\"" + text + "\"";
}

class Reader {
public:
    Reader(std::string_view text, const std::vector<std::string>& names)
        : names_(names), cells_(read_cells(text)) {
        for (const auto& name : names) plain_.push_back(plain(name));
    }

    ReadMatrix read() {
        if (find_block() && find_items() && read_values()) match_halves();
        if (!result_.problem.empty()) return {result_.problem, {}, {}, {}};
        return std::move(result_);
    }

private:
    std::size_t n() const { return names_.size(); }

    bool refuse(std::string why) {
        result_.problem = std::move(why);
        return false;
    }

    const std::string& cell(std::size_t row, std::size_t column) const {
        static const std::string empty;
        return row < cells_.size() && column < cells_[row].size() ? cells_[row][column] : empty;
    }

    bool blank_row(std::size_t row) const {
        return std::all_of(cells_[row].begin(), cells_[row].end(), is_blank_cell);
    }
    bool blank_column(std::size_t column) const {
        for (std::size_t r = 0; r < cells_.size(); ++r) {
            if (!is_blank_cell(cell(r, column))) return false;
        }
        return true;
    }

    bool is_name(const std::string& text) const {
        return std::find(plain_.begin(), plain_.end(), plain(text)) != plain_.end();
    }
    /// A row or column is one of names: where there is one more than items, where an item is named, or where
    /// nothing in it is a ratio.
    bool of_names(const std::vector<std::string>& line, bool one_more) const {
        std::size_t texts = 0;
        std::size_t ratios = 0;
        bool named = false;
        for (const auto& text : line) {
            if (is_blank_cell(text)) continue;
            const bool ratio = read_cell_ratio(text).has_value();
            ratios += ratio ? 1 : 0;
            texts += ratio ? 0 : 1;
            named = named || (!ratio && is_name(text));
        }
        return one_more || named || (texts > 1 && ratios == 0);
    }

    /// How far the block reaches, and whether names stand above and at the left.
    bool find_block() {
        while (!cells_.empty() && cells_.size() > n() && blank_row(cells_.size() - 1)) cells_.pop_back();
        while (!cells_.empty() && cells_.size() > n() && blank_row(0)) cells_.erase(cells_.begin());
        if (cells_.empty()) return refuse("Nothing was pasted.");
        for (const auto& row : cells_) columns_ = std::max(columns_, row.size());
        while (columns_ > n() && blank_column(columns_ - 1)) --columns_;
        while (columns_ > n() && blank_column(0)) {
            --columns_;
            for (auto& row : cells_) {
                if (!row.empty()) row.erase(row.begin());
            }
        }
        if (cells_.size() == 1 || columns_ == 1) {
            return refuse("This is no block of several rows and columns. Mark the whole matrix in the "
                          "spreadsheet and copy it; its cells arrive parted by tabs or semicolons.");
        }
        std::vector<std::string> top;
        std::vector<std::string> left;
        for (std::size_t c = 1; c < columns_; ++c) top.push_back(cell(0, c));
        for (std::size_t r = 1; r < cells_.size(); ++r) left.push_back(cell(r, 0));
        named_above_ = of_names(top, cells_.size() == n() + 1);
        named_left_ = of_names(left, columns_ == n() + 1);
        return true;
    }

    std::string size_problem() const {
        const std::string wanted = std::to_string(n());
        return "The block has " + std::to_string(cells_.size()) + " rows and " + std::to_string(columns_) +
               " columns; this set has " + wanted + " items, so it takes " + wanted + " rows and " + wanted +
               " columns, and one more of each for names.";
    }

    /// The item with this name that is not taken yet.
    bool take(const std::string& name, const char* line, std::vector<std::size_t>& items) {
        const std::string wanted = plain(name);
        std::size_t found = none;
        for (std::size_t i = 0; i < n(); ++i) {
            if (plain_[i] != wanted) continue;
            found = i;
            if (std::find(items.begin(), items.end(), i) == items.end()) {
                items.push_back(i);
                return true;
            }
        }
        const std::string what = std::string(line) + " " + quoted(without_cell_marks(name));
        return found == none ? refuse("The " + what + " is no item of this set.")
                             : refuse("The " + what + " stands there twice.");
    }

    bool find_items() {
        const std::size_t first_row = named_above_ ? 1 : 0;
        const std::size_t first_column = named_left_ ? 1 : 0;
        if (named_above_) {
            for (std::size_t c = first_column; c < columns_; ++c) {
                if (is_blank_cell(cell(0, c)))
                    return refuse("Column " + std::to_string(c + 1) + " has no name above it.");
                if (!take(cell(0, c), "column", column_items_)) return false;
            }
        }
        if (named_left_) {
            for (std::size_t r = first_row; r < cells_.size(); ++r) {
                if (is_blank_cell(cell(r, 0)))
                    return refuse("Row " + std::to_string(r + 1) + " has no name at its left.");
                if (!take(cell(r, 0), "row", row_items_)) return false;
            }
        }
        if (!named_above_ && !named_left_) {
            if (cells_.size() > n() || columns_ > n() || std::max(cells_.size(), columns_) < n())
                return refuse(size_problem());
            for (std::size_t i = 0; i < n(); ++i) row_items_.push_back(i);
            column_items_ = row_items_;
        }
        // With names on one side only, the other one is in the same order.
        if (!named_left_) row_items_ = column_items_;
        if (!named_above_) column_items_ = row_items_;
        if (cells_.size() - first_row > row_items_.size() || columns_ - first_column > column_items_.size())
            return refuse(size_problem());
        return true;
    }

    std::string place(std::size_t row, std::size_t column) const {
        return "Row " + quoted(names_[row]) + ", column " + quoted(names_[column]) + ": ";
    }

    bool read_values() {
        values_.assign(n(), std::vector<std::optional<CellRatio>>(n()));
        texts_.assign(n(), std::vector<std::string>(n()));
        in_block_.assign(n(), false);
        const std::size_t first_row = named_above_ ? 1 : 0;
        const std::size_t first_column = named_left_ ? 1 : 0;
        for (const std::size_t i : row_items_) in_block_[i] = true;
        for (const std::size_t i : column_items_) in_block_[i] = true;
        for (std::size_t r = 0; first_row + r < cells_.size(); ++r) {
            for (std::size_t c = 0; first_column + c < columns_; ++c) {
                const std::string& text = cell(first_row + r, first_column + c);
                if (!is_blank_cell(text) && !read_value(text, row_items_[r], column_items_[c])) return false;
            }
        }
        return true;
    }

    bool read_value(const std::string& text, std::size_t row, std::size_t column) {
        const auto given = read_cell_ratio(text);
        if (!given) {
            return refuse(place(row, column) + quoted(text) +
                          (may_be_date(text) ? " is no ratio; the spreadsheet may have made a date of a "
                                               "fraction. Set its cells to text and type it again."
                                             : " is no ratio. It takes 3, 2.5 or 1/3."));
        }
        if (row == column) {
            return std::abs(given->value - 1) <= given->half + equal_within ||
                   refuse(place(row, column) + "an item against itself is 1 or left blank, not " + text +
                          ".");
        }
        const double value = given->value;
        if (!(value >= 1 / largest_ratio * (1 - equal_within)) || value > largest_ratio)
            return refuse(place(row, column) + text + " is not between 1/100 and 100.");
        values_[row][column] = given;
        texts_[row][column] = text;
        return true;
    }

    static bool reciprocal(const CellRatio& x, const CellRatio& y) {
        const double low = 1 / (y.value + y.half);
        const double high = y.value > y.half ? 1 / (y.value - y.half) : std::numeric_limits<double>::max();
        return x.value + x.half >= low * (1 - equal_within) && x.value - x.half <= high * (1 + equal_within);
    }

    /// The one of 1/2 to 1/9 that a rounded decimal can only mean.
    double without_rounding(const CellRatio& given, const std::string& text) {
        if (given.decimals < 2) return given.value;
        int meant = 0;
        for (int k = 2; k <= 9; ++k) {
            if (std::abs(given.value - 1.0 / k) > given.half * (1 + equal_within)) continue;
            if (meant != 0) return given.value;
            meant = k;
        }
        if (meant == 0) return given.value;
        const std::string fraction = "1/" + std::to_string(meant);
        const bool exact = given.value == 1.0 / meant;
        const std::string said = text + (notes_.empty() ? " is taken as " : " as ") + fraction;
        if (!exact && std::find(notes_.begin(), notes_.end(), fraction) == notes_.end()) {
            notes_.push_back(fraction);
            result_.notes += (result_.notes.empty() ? "" : ", ") + said;
        }
        return 1.0 / meant;
    }

    void match_halves() {
        for (std::size_t i = 0; i < n(); ++i) {
            for (std::size_t j = i + 1; j < n(); ++j) {
                const auto& upper = values_[i][j];
                const auto& lower = values_[j][i];
                if (!upper && !lower) {
                    if (in_block_[i] && in_block_[j]) result_.blank.push_back({i, j});
                    continue;
                }
                if (upper && lower && !reciprocal(*upper, *lower)) {
                    refuse(place(i, j) + texts_[i][j] + " and, the other way round, " + texts_[j][i] +
                           " are not reciprocal.");
                    return;
                }
                const bool from_upper =
                    upper && (!lower || upper->half * lower->value <= lower->half * upper->value);
                result_.answers.push_back({i, j,
                                           from_upper ? without_rounding(*upper, texts_[i][j])
                                                      : 1 / without_rounding(*lower, texts_[j][i])});
            }
        }
        if (result_.answers.empty()) refuse("There is no answer in the block.");
        if (!result_.notes.empty()) result_.notes += ".";
    }

    const std::vector<std::string>& names_;
    std::vector<std::string> plain_;
    std::vector<std::vector<std::string>> cells_;
    std::size_t columns_ = 0;
    bool named_above_ = false;
    bool named_left_ = false;
    std::vector<std::size_t> row_items_;
    std::vector<std::size_t> column_items_;
    std::vector<bool> in_block_;
    std::vector<std::vector<std::optional<CellRatio>>> values_;
    std::vector<std::vector<std::string>> texts_;
    std::vector<std::string> notes_;
    ReadMatrix result_;
};

} // namespace

ReadMatrix read_matrix(std::string_view text, const std::vector<std::string>& names) {
    return Reader(text, names).read();
}

std::string exact_ratio(double ratio) {
    const std::string decimal = shortest_number(ratio);
    const double inverse = 1 / ratio;
    if (ratio >= 1 || 1 / inverse != ratio) return decimal;
    const std::string fraction = "1/" + shortest_number(inverse);
    return fraction.size() <= decimal.size() ? fraction : decimal;
}

std::string matrix_text(const std::vector<std::string>& names,
                        const std::function<std::optional<double>(std::size_t, std::size_t)>& ratio) {
    std::string text;
    for (const auto& name : names) text += "\t" + safe_cell(name);
    text += "\n";
    for (std::size_t i = 0; i < names.size(); ++i) {
        text += safe_cell(names[i]);
        for (std::size_t j = 0; j < names.size(); ++j) {
            const auto value = i == j ? std::optional(1.0) : ratio(i, j);
            text += "\t" + (value ? exact_ratio(*value) : std::string{});
        }
        text += "\n";
    }
    return text;
}

} // namespace steelyard
