#include "core/judgment/consistency_limit.hpp"

namespace steelyard {

std::optional<double> geometric_consistency_limit(std::size_t n, double cr_limit) {
    if (n < 3) return std::nullopt;
    const double at_tenth = n == 3 ? .31 : n == 4 ? .35 : .37;
    return at_tenth * cr_limit / .10;
}

} // namespace steelyard
