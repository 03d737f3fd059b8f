#include "shell/rooms/share_out.hpp"

#include <algorithm>
#include <cmath>
#include <numeric>

namespace steelyard {
namespace {

constexpr double rounding = 1e-9;

bool on_grid(double value, double units) {
    return std::abs(value * units - std::round(value * units)) < rounding;
}

/// `amount` shared out in proportion to `parts`, in units of 1/`units`, those left over going to the largest
/// remainders, equal ones in order.
std::vector<double> in_units(const std::vector<double>& parts, double amount, double units) {
    const double sum = std::accumulate(parts.begin(), parts.end(), 0.0);
    const auto all = std::llround(amount * units);
    std::vector<long long> whole;
    std::vector<double> left;
    long long given = 0;
    for (const double part : parts) {
        const double exact =
            static_cast<double>(all) * (sum > 0 ? part / sum : 1 / static_cast<double>(parts.size()));
        whole.push_back(static_cast<long long>(std::floor(exact + rounding)));
        left.push_back(exact - static_cast<double>(whole.back()));
        given += whole.back();
    }
    for (; given < all; ++given) {
        std::size_t best = 0;
        for (std::size_t i = 1; i < left.size(); ++i) {
            if (left[i] > left[best] + rounding) best = i;
        }
        ++whole[best];
        left[best] -= 1;
    }
    std::vector<double> result;
    for (const long long count : whole) result.push_back(static_cast<double>(count) / units);
    return result;
}

std::vector<std::size_t> others(const std::vector<double>& points, const std::vector<bool>& held,
                                std::size_t at) {
    std::vector<std::size_t> all;
    std::vector<std::size_t> free;
    for (std::size_t i = 0; i < points.size(); ++i) {
        if (i == at) continue;
        all.push_back(i);
        if (!held[i]) free.push_back(i);
    }
    return free.empty() ? all : free;
}

} // namespace

std::vector<double> as_hundred(const std::vector<double>& points, bool whole) {
    const double sum = std::accumulate(points.begin(), points.end(), 0.0);
    const bool already = std::abs(sum - all_points) < rounding;
    if (already && !whole) return points;
    return in_units(points, all_points, whole ? 1 : 10);
}

double left_by_held(const std::vector<double>& points, const std::vector<bool>& held, std::size_t at) {
    const auto free = others(points, held, at);
    double left = points[at];
    for (const std::size_t i : free) left += points[i];
    return std::round(left * 1e9) / 1e9;
}

std::vector<double> share_out(const std::vector<double>& points, const std::vector<bool>& held,
                              std::size_t at, double value) {
    std::vector<double> result = points;
    const auto free = others(points, held, at);
    if (free.empty()) return result;
    const double left = left_by_held(points, held, at);
    result[at] = std::clamp(value, 0.0, left);
    double units = 1;
    for (const double point : result) {
        while (units < 1e6 && !on_grid(point, units)) units *= 10;
    }
    std::vector<double> parts;
    for (const std::size_t i : free) parts.push_back(points[i]);
    const auto shared = in_units(parts, left - result[at], units);
    for (std::size_t k = 0; k < free.size(); ++k) result[free[k]] = shared[k];
    return result;
}

} // namespace steelyard
