#include "core/decision/number_text.hpp"

#include <cmath>
#include <cstdio>
#include <cstdlib>
#include <optional>

namespace steelyard {
namespace {

/// Decimal digits d1 d2 ... dk and the exponent of ten of the first one.
struct Digits {
    std::string digits;
    int exponent = 0;
};

Digits digits_of(double positive, int count) {
    char buffer[40];
    std::snprintf(buffer, sizeof buffer, "%.*e", count - 1, positive);
    Digits result;
    const char* p = buffer;
    for (; *p != '\0' && *p != 'e'; ++p) {
        if (*p >= '0' && *p <= '9') result.digits += *p;
    }
    result.exponent = std::atoi(p + 1);
    return result;
}

double value_of(const Digits& d) {
    const std::string text =
        d.digits.substr(0, 1) + "." + d.digits.substr(1) + "e" + std::to_string(d.exponent);
    return std::strtod(text.c_str(), nullptr);
}

/// The next larger number with as many digits.
Digits next_up(Digits d) {
    for (auto i = d.digits.size(); i-- > 0;) {
        if (d.digits[i] != '9') {
            ++d.digits[i];
            return d;
        }
        d.digits[i] = '0';
    }
    d.digits.insert(d.digits.begin(), '1');
    d.digits.pop_back();
    ++d.exponent;
    return d;
}

/// Correctly rounded digits come first. Just above a power of two the doubles below are twice as dense, so
/// that the nearest decimal of that length can miss while the next one up still reads back; it is tried as
/// well.
std::optional<Digits> reading_back(double positive, int count) {
    const Digits rounded = digits_of(positive, count);
    if (value_of(rounded) == positive) return rounded;
    const Digits up = next_up(rounded);
    if (value_of(up) == positive) return up;
    return std::nullopt;
}

Digits shortest(double positive) {
    // Any decimal of up to 15 digits survives a normal double, so 15 digits that read back end in the zeros
    // to drop. Subnormal numbers carry fewer digits and are searched from one digit up.
    const int from = positive < 2.3e-308 ? 1 : 15;
    for (int count = from; count < 17; ++count) {
        if (auto found = reading_back(positive, count)) {
            while (found->digits.size() > 1 && found->digits.back() == '0') found->digits.pop_back();
            return *found;
        }
    }
    return digits_of(positive, 17);
}

} // namespace

std::string shortest_number(double number) {
    if (number == 0) return "0";
    const Digits d = shortest(std::abs(number));
    const int k = static_cast<int>(d.digits.size());
    const int n = d.exponent + 1; // The decimal point stands after the n-th digit.
    std::string text = number < 0 ? "-" : "";
    if (n > 21 || n <= -6) {
        text += d.digits.substr(0, 1);
        if (k > 1) text += "." + d.digits.substr(1);
        text += n - 1 < 0 ? "e-" : "e+";
        text += std::to_string(std::abs(n - 1));
    } else if (n >= k) {
        text += d.digits + std::string(static_cast<std::size_t>(n - k), '0');
    } else if (n > 0) {
        text += d.digits.substr(0, static_cast<std::size_t>(n)) + "." +
                d.digits.substr(static_cast<std::size_t>(n));
    } else {
        text += "0." + std::string(static_cast<std::size_t>(-n), '0') + d.digits;
    }
    return text;
}

} // namespace steelyard
