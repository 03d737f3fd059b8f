#pragma once

#include <cstddef>
#include <optional>

namespace steelyard {

/// The GCI that belongs to a limit of CR: .31 for n = 3, .35 for n = 4, .37 above at CR .10, in proportion
/// for other limits. None for n < 3. Source: Aguaron and Moreno-Jimenez, EJOR 147 (2003) 137-145, from
/// memory; the proportion is our own reading of it.
std::optional<double> geometric_consistency_limit(std::size_t n, double cr_limit);

} // namespace steelyard
