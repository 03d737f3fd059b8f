#include "shell/words.hpp"

#include <algorithm>
#include <cmath>
#include <cstdio>
#include <cstdlib>

namespace steelyard {
namespace {

constexpr double largest_ratio = 100;

bool is_digit(char c) {
    return c >= '0' && c <= '9';
}

std::string with_decimals(double value, int decimals) {
    char buffer[400];
    std::snprintf(buffer, sizeof buffer, "%.*f", decimals, value);
    std::string text = buffer;
    if (text.find('.') != std::string::npos) {
        while (text.back() == '0') text.pop_back();
        if (text.back() == '.') text.pop_back();
    }
    return text == "-0" ? "0" : text;
}

/// Which of comma and point are thousands marks: "1,234,567.8", "1.234,5", "1 234,5", "1,5", "1,500".
std::optional<std::string> plain_digits(const std::string& number) {
    const auto commas = std::count(number.begin(), number.end(), ',');
    const auto points = std::count(number.begin(), number.end(), '.');
    char decimal = '.';
    if (commas > 0 && points > 0) {
        decimal = number.rfind(',') > number.rfind('.') ? ',' : '.';
    } else if (commas == 1) {
        // One comma with exactly three digits behind and one to three before groups thousands; else it is a
        // decimal comma.
        const auto at = number.find(',');
        const bool grouped = number.size() - at - 1 == 3 && at >= 1 && at <= 3 && number[0] != '0';
        decimal = grouped ? '.' : ',';
    } else if (points > 1) {
        decimal = ',';
    }
    const char mark = decimal == '.' ? ',' : '.';
    if (std::count(number.begin(), number.end(), decimal) > 1) return std::nullopt;
    std::string out;
    for (const char c : number) {
        if (c == mark) continue;
        out += c == decimal ? '.' : c;
    }
    return out;
}

} // namespace

std::string figure_text(double value, int decimals) {
    // Four decimals less than the digits before the point: nobody quotes 57,500.123456.
    const double size = std::abs(value);
    const int before = size >= 1 ? static_cast<int>(std::floor(std::log10(size))) + 1 : 0;
    std::string text = with_decimals(value, std::clamp(decimals, 0, std::max(2, 8 - before)));
    const auto point = std::min(text.find('.'), text.size());
    const std::size_t first = text[0] == '-' ? 1 : 0;
    for (std::size_t i = point; i > first + 3; i -= 3) text.insert(i - 3, ",");
    if (text[0] == '-') text.replace(0, 1, "\xE2\x88\x92");
    return text;
}

std::string points_text(double score) {
    char buffer[64];
    std::snprintf(buffer, sizeof buffer, "%.1f", 100 * score);
    std::string text = buffer;
    if (text == "-0.0") text = "0.0";
    if (text[0] == '-') text.replace(0, 1, "\xE2\x88\x92");
    return text;
}

std::string ratio_text(double ratio) {
    return ratio < 1 ? "1/" + with_decimals(1 / ratio, 2) : with_decimals(ratio, 2);
}

std::string times_text(double ratio) {
    const std::string times = with_decimals(ratio, 2);
    return times == "1" ? "as much as" : times + " times as much as";
}

std::optional<double> read_number(std::string_view text) {
    std::string number;
    bool negative = false;
    bool after = false; // Something that is no part of a number came after the digits.
    for (std::size_t i = 0; i < text.size(); ++i) {
        const char c = text[i];
        const bool minus = c == '-' || text.substr(i, 3) == "\xE2\x88\x92";
        if (is_digit(c) || ((c == ',' || c == '.') && !number.empty())) {
            if (after) return std::nullopt;
            number += c;
        } else if ((c == '.' || c == ',') && i + 1 < text.size() && is_digit(text[i + 1])) {
            number += "0.";
        } else if (minus && number.empty()) {
            negative = true;
            if (c != '-') i += 2;
        } else if (minus) {
            return std::nullopt; // A range, not a number.
        } else if (c == ' ' || c == '\'' || text.substr(i, 2) == "\xC2\xA0" ||
                   text.substr(i, 3) == "\xE2\x80\xAF") {
            const bool digits_follow =
                i + 1 < text.size() &&
                std::any_of(text.begin() + static_cast<std::ptrdiff_t>(i), text.end(), is_digit);
            if (!number.empty() && !digits_follow) after = true;
        } else if (!number.empty()) {
            after = true; // A unit or a sign behind.
        }
    }
    while (!number.empty() && (number.back() == '.' || number.back() == ',')) number.pop_back();
    if (number.empty()) return std::nullopt;
    const auto digits = plain_digits(number);
    if (!digits) return std::nullopt;
    const double value = std::strtod(digits->c_str(), nullptr);
    if (!std::isfinite(value)) return std::nullopt;
    return negative ? -value : value;
}

std::optional<double> read_ratio(std::string_view text) {
    std::optional<double> ratio;
    const auto slash = text.find_first_of("/:");
    if (slash != std::string_view::npos) {
        const auto above = read_number(text.substr(0, slash));
        const auto below = read_number(text.substr(slash + 1));
        if (!above || !below || *below == 0) return std::nullopt;
        ratio = *above / *below;
    } else {
        ratio = read_number(text);
    }
    if (!ratio || !(*ratio >= 1 / largest_ratio) || *ratio > largest_ratio) return std::nullopt;
    return ratio;
}

} // namespace steelyard
