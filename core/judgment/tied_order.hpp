#pragma once

#include <algorithm>
#include <cstddef>
#include <numeric>
#include <vector>

namespace steelyard {

/// The places of `values` in ascending order, values equal within 1e-12 staying as they stand: what rounding
/// leaves between equals differs from machine to machine. A chain of such neighbours counts as equal.
inline std::vector<std::size_t> tied_order(const std::vector<double>& values) {
    constexpr double tie = 1e-12;
    std::vector<std::size_t> order(values.size());
    std::iota(order.begin(), order.end(), std::size_t{0});
    std::stable_sort(order.begin(), order.end(),
                     [&](std::size_t a, std::size_t b) { return values[a] < values[b]; });
    for (auto from = order.begin(); from != order.end();) {
        auto to = from + 1;
        while (to != order.end() && values[*to] <= values[*(to - 1)] + tie) ++to;
        std::sort(from, to);
        from = to;
    }
    return order;
}

} // namespace steelyard
