#include "core/standing/local_values.hpp"

#include <algorithm>

namespace steelyard {

LocalValues local_values(const LeafWorths& leaf, Synthesis synthesis) {
    const std::size_t m = leaf.worths.size();
    const bool distributive = synthesis == Synthesis::distributive;
    double largest = 0;
    double known = 0;
    for (const auto& worth : leaf.worths) {
        if (!worth) continue;
        largest = std::max(largest, *worth);
        known += 1;
    }
    // Against the largest first: a sum of proportional worths could leave the range of a double.
    const double unit = leaf.anchored ? 1.0 : largest;
    double sum = 0;
    for (const auto& worth : leaf.worths) {
        if (worth && unit > 0) sum += *worth / unit;
    }
    LocalValues result{std::vector<double>(m, 0.0), std::vector<bool>(m, false), known > 0 && largest == 0};
    double total = 0;
    for (std::size_t i = 0; i < m; ++i) {
        if (!leaf.worths[i]) continue;
        if (result.all_zero) {
            result.values[i] = distributive ? 1 / known : 0;
        } else {
            result.values[i] = *leaf.worths[i] / unit / (distributive ? sum : 1.0);
        }
        total += result.values[i];
    }
    const double nobody = distributive ? 1 / static_cast<double>(m) : 1.0;
    const double placeholder = known > 0 ? total / known : nobody;
    for (std::size_t i = 0; i < m; ++i) {
        if (leaf.worths[i]) continue;
        result.values[i] = placeholder;
        result.missing[i] = true;
    }
    return result;
}

} // namespace steelyard
