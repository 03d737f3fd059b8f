#pragma once

#include <optional>
#include <string>
#include <string_view>

#include "core/decision/decision.hpp"

/// How the shell writes numbers and names for people.
namespace steelyard {

/// A figure with thousands separated by commas and at most `decimals` decimals, zeros at the end dropped:
/// 57,500 or 1.25.
std::string figure_text(double value, int decimals = 6);

/// Points of 100 with one decimal: 76.7.
std::string points_text(double score);

/// A ratio as people say it: "3", "1/3", "2.5", "1/2.5".
std::string ratio_text(double ratio);

/// Reads a number as typed: thousands separators, a decimal comma or point, spaces, a unit or currency sign
/// attached. None where it is no number.
std::optional<double> read_number(std::string_view text);

/// Reads a ratio as typed: 3, 0.5, 1/3, 2,5. None where it is none or not in 1/100 to 100.
std::optional<double> read_ratio(std::string_view text);

/// The middle of a sentence of comparison: "6 times as much as", or "as much as" for 1. `ratio` >= 1.
std::string times_text(double ratio);

} // namespace steelyard
