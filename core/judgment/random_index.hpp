#pragma once

#include <cstddef>
#include <optional>

#include "core/decision/decision.hpp"

namespace steelyard {

/// The mean consistency index of random matrices of n items. None for n <= 2 and beyond the table.
/// Sources: Alonso and Lamata, IJUFKS 14(4) (2006) 445-459, table and regression; Saaty, The Analytic
/// Hierarchy Process, 1980; both from memory.
std::optional<double> random_index(RandomIndexTable table, std::size_t n);

/// The same for a set with `missing` pairs: RI(n) (1 - 2k / ((n-1)(n-2))); none at a spanning tree, where no
/// contradiction is possible. Source: Agoston and Csato, Omega 111 (2022), from memory; a mean over graphs,
/// one may differ by 10 %.
std::optional<double> random_index(RandomIndexTable table, std::size_t n, std::size_t missing);

} // namespace steelyard
