#include "shell/rooms/cell_ratio.hpp"

#include <algorithm>
#include <cmath>
#include <cstdlib>
#include <utility>
#include <vector>

#include "shell/rooms/cell_text.hpp"

namespace steelyard {
namespace {

bool is_digit(char c) {
    return c >= '0' && c <= '9';
}
bool is_letter(char c) {
    return (c >= 'a' && c <= 'z') || (c >= 'A' && c <= 'Z');
}

/// Digits with at most one comma or point, which is the decimal one: no ratio has thousands. A sign and an
/// exponent may stand there.
std::optional<CellRatio> read_decimal(const std::string& text) {
    std::string digits;
    int decimals = -1;
    std::size_t i = 0;
    if (i < text.size() && (text[i] == '+' || text[i] == '-')) digits += text[i++];
    bool any = false;
    for (; i < text.size() && (is_digit(text[i]) || text[i] == '.' || text[i] == ','); ++i) {
        if (is_digit(text[i])) {
            any = true;
            digits += text[i];
            if (decimals >= 0) ++decimals;
        } else {
            if (decimals >= 0) return std::nullopt;
            decimals = 0;
            digits += '.';
        }
    }
    if (!any) return std::nullopt;
    double unit = std::pow(10.0, -std::max(decimals, 0));
    if (i < text.size() && (text[i] == 'e' || text[i] == 'E')) {
        std::size_t at = i + 1;
        if (at < text.size() && (text[at] == '+' || text[at] == '-')) ++at;
        if (at == text.size() || text.size() - at > 3 ||
            !std::all_of(text.begin() + static_cast<std::ptrdiff_t>(at), text.end(), is_digit))
            return std::nullopt;
        unit *= std::pow(10.0, std::atoi(text.c_str() + i + 1));
        digits += text.substr(i);
        i = text.size();
    }
    if (i != text.size()) return std::nullopt;
    const double value = std::strtod(digits.c_str(), nullptr);
    if (!std::isfinite(value)) return std::nullopt;
    return CellRatio{value, decimals > 0 ? unit / 2 : 0, std::max(decimals, 0)};
}

/// "1/3", "1:3", "2 1/2".
std::optional<CellRatio> read_fraction(const std::string& text) {
    const auto bar = text.find_first_of("/:");
    if (bar == std::string::npos) return std::nullopt;
    std::string above = trimmed(text.substr(0, bar));
    double whole = 0;
    if (const auto space = above.find(' '); space != std::string::npos) {
        const auto before = read_decimal(above.substr(0, space));
        if (!before || before->decimals != 0) return std::nullopt;
        whole = before->value;
        above = trimmed(above.substr(space));
    }
    const auto a = read_decimal(above);
    const auto b = read_decimal(trimmed(text.substr(bar + 1)));
    if (!a || !b || b->value == 0) return std::nullopt;
    const double value = a->value / b->value;
    const double relative = a->value == 0 ? 0 : a->half / a->value + b->half / b->value;
    return CellRatio{whole + value, value * relative, 0};
}

} // namespace

std::string without_cell_marks(std::string cell) {
    while (!cell.empty() && (cell[0] == '=' || cell[0] == '\'')) cell = trimmed(cell.substr(1));
    return cell;
}

std::optional<CellRatio> read_cell_ratio(const std::string& cell) {
    const std::string text = without_cell_marks(cell);
    static const std::vector<std::pair<std::string, double>> signs{
        {"\xC2\xBD", 1.0 / 2},     {"\xE2\x85\x93", 1.0 / 3}, {"\xC2\xBC", 1.0 / 4},
        {"\xE2\x85\x95", 1.0 / 5}, {"\xE2\x85\x99", 1.0 / 6}, {"\xE2\x85\x90", 1.0 / 7},
        {"\xE2\x85\x9B", 1.0 / 8}, {"\xE2\x85\x91", 1.0 / 9}};
    for (const auto& [sign, value] : signs) {
        if (text == sign) return CellRatio{value, 0, 0};
    }
    if (const auto decimal = read_decimal(text)) return decimal;
    return read_fraction(text);
}

bool is_blank_cell(const std::string& cell) {
    return cell.empty() || cell == "-" || cell == "\xE2\x80\x93" || cell == "\xE2\x80\x94" || cell == "?";
}

bool may_be_date(const std::string& cell) {
    const auto marks =
        std::count_if(cell.begin(), cell.end(), [](char c) { return c == '.' || c == '/' || c == '-'; });
    const bool digits = std::any_of(cell.begin(), cell.end(), is_digit);
    const bool letters = std::any_of(cell.begin(), cell.end(), is_letter);
    return digits && marks > 0 && (letters || marks > 1);
}

} // namespace steelyard
