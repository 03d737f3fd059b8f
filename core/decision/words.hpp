#pragma once

#include <array>
#include <cstddef>
#include <string_view>

#include "core/decision/decision.hpp"

namespace steelyard {

/// The words a decision file uses for each list of choices, in the order of the enum. An empty word is the
/// "unstated" value that is never written.
template<class Enum>
struct Words;

template<>
struct Words<WeightsBy> {
    static constexpr std::array<std::string_view, 2> list{"pairs", "points"};
};
template<>
struct Words<RateBy> {
    static constexpr std::array<std::string_view, 3> list{"pairs", "figure", "grade"};
};
template<>
struct Words<WorthsBy> {
    static constexpr std::array<std::string_view, 2> list{"given", "pairs"};
};
template<>
struct Words<Better> {
    static constexpr std::array<std::string_view, 2> list{"more", "less"};
};
template<>
struct Words<CostResult> {
    static constexpr std::array<std::string_view, 3> list{"total", "per_year", "per_part"};
};
template<>
struct Words<QuoteStatus> {
    static constexpr std::array<std::string_view, 6> list{"",       "budget",    "quoted",
                                                          "spoken", "confirmed", "measured"};
};
template<>
struct Words<CostKind> {
    static constexpr std::array<std::string_view, 4> list{"once", "per_year", "per_part", "in_year"};
};
template<>
struct Words<CheckState> {
    static constexpr std::array<std::string_view, 4> list{"", "met", "failed", "asked"};
};
template<>
struct Words<Method> {
    static constexpr std::array<std::string_view, 3> list{"eigenvector", "geometric-mean", "column-average"};
};
template<>
struct Words<Synthesis> {
    static constexpr std::array<std::string_view, 2> list{"distributive", "ideal"};
};
template<>
struct Words<Combine> {
    static constexpr std::array<std::string_view, 3> list{"judgments", "priorities", "priorities-arithmetic"};
};
template<>
struct Words<RandomIndexTable> {
    static constexpr std::array<std::string_view, 2> list{"alonso-lamata-2006", "saaty-1980"};
};
template<>
struct Words<TrialKind> {
    static constexpr std::array<std::string_view, 3> list{"weights", "judgments", "figures"};
};

template<class Enum>
constexpr std::string_view word(Enum value) {
    return Words<Enum>::list[static_cast<std::size_t>(value)];
}

} // namespace steelyard
