#include "core/judgment/least_sum.hpp"

#include <algorithm>
#include <cmath>
#include <utility>

namespace steelyard {
namespace {

using Eigen::Index;
using Eigen::VectorXd;

constexpr std::size_t most_in_order = 11;
constexpr double rounding = 1e-13; // Of the sum of absolute terms.

/// The shifts among items of one sign, and the items in groups that hang together by them.
struct Side {
    std::vector<std::size_t> shifts;
    std::vector<std::vector<std::size_t>> groups;
};

Side side_of(const std::vector<LogShift>& shifts, const std::vector<bool>& member) {
    Side side;
    std::vector<std::size_t> root(member.size());
    for (std::size_t i = 0; i < root.size(); ++i) root[i] = i;
    const auto find = [&](std::size_t i) {
        while (root[i] != i) i = root[i];
        return i;
    };
    for (std::size_t p = 0; p < shifts.size(); ++p) {
        if (!member[shifts[p].i] || !member[shifts[p].j]) continue;
        side.shifts.push_back(p);
        root[find(shifts[p].j)] = find(shifts[p].i);
    }
    std::vector<std::vector<std::size_t>> by_root(member.size());
    for (std::size_t i = 0; i < member.size(); ++i) {
        if (member[i]) by_root[find(i)].push_back(i);
    }
    for (auto& group : by_root) {
        if (!group.empty()) side.groups.push_back(std::move(group));
    }
    return side;
}

/// The largest sum of |d| exp(y) over one group of negative items; sets `at` of its shifts.
double largest_in_order(const VectorXd& y, const std::vector<LogShift>& shifts, const Side& side,
                        const std::vector<std::size_t>& group, const VectorXd& d, std::vector<double>& at) {
    struct Edge {
        std::size_t shift, a, b; // a and b: places in the group of its items i and j.
    };
    std::vector<Edge> edges;
    const auto place = [&](std::size_t item) {
        const auto found = std::find(group.begin(), group.end(), item);
        return static_cast<std::size_t>(found - group.begin());
    };
    for (const auto p : side.shifts) {
        const std::size_t a = place(shifts[p].i);
        if (a < group.size()) edges.push_back({p, a, place(shifts[p].j)});
    }
    // best[T]: the largest sum of the terms of T, T standing before all others; last[T]: who stands last in
    // it.
    const std::size_t sets = std::size_t{1} << group.size();
    std::vector<double> best(sets, 0.0);
    std::vector<std::size_t> last(sets, 0);
    for (std::size_t t = 1; t < sets; ++t) {
        best[t] = -1;
        for (std::size_t a = 0; a < group.size(); ++a) {
            if ((t >> a & 1) == 0) continue;
            const auto item = static_cast<Index>(group[a]);
            double log = y(item);
            for (const auto& edge : edges) {
                // The one that stands before wins.
                if (edge.a == a)
                    log += (t >> edge.b & 1) != 0 ? shifts[edge.shift].low : shifts[edge.shift].high;
                if (edge.b == a)
                    log -= (t >> edge.a & 1) != 0 ? shifts[edge.shift].high : shifts[edge.shift].low;
            }
            const double sum = best[t & ~(std::size_t{1} << a)] - d(item) * std::exp(log);
            if (sum <= best[t]) continue;
            best[t] = sum;
            last[t] = a;
        }
    }
    std::size_t behind = 0;
    for (std::size_t t = sets - 1; t != 0; t &= ~(std::size_t{1} << last[t])) {
        const std::size_t a = last[t];
        for (const auto& edge : edges) {
            const LogShift& shift = shifts[edge.shift];
            if (edge.a == a && (behind >> edge.b & 1) == 0) at[edge.shift] = shift.low;
            if (edge.b == a && (behind >> edge.a & 1) == 0) at[edge.shift] = shift.high;
        }
        behind |= std::size_t{1} << a;
    }
    return best[sets - 1];
}

/// Minimises the sum over the positive items and gives its lower bound; sets `at` of their shifts.
double least_convex(VectorXd y, const std::vector<LogShift>& shifts, const Side& side,
                    const std::vector<bool>& member, const VectorXd& d, std::vector<double>& at) {
    for (const auto p : side.shifts) {
        at[p] = std::clamp(0.0, shifts[p].low, shifts[p].high);
        y(static_cast<Index>(shifts[p].i)) += at[p];
        y(static_cast<Index>(shifts[p].j)) -= at[p];
    }
    const auto term = [&](std::size_t i) {
        return d(static_cast<Index>(i)) * std::exp(y(static_cast<Index>(i)));
    };
    const auto sum_and_bound = [&] {
        double sum = 0;
        for (std::size_t i = 0; i < member.size(); ++i) sum += member[i] ? term(i) : 0;
        double bound = sum;
        for (const auto p : side.shifts) {
            const double slope = term(shifts[p].i) - term(shifts[p].j);
            bound += std::min(slope * (shifts[p].low - at[p]), slope * (shifts[p].high - at[p]));
        }
        return std::pair{sum, bound};
    };
    constexpr int most_rounds = 400;
    constexpr double close = 1e-11; // Relative; the bound is valid however far the minimisation got.
    auto [sum, bound] = sum_and_bound();
    for (int round = 0; round < most_rounds && sum - bound > close * sum; ++round) {
        for (const auto p : side.shifts) {
            const auto i = static_cast<Index>(shifts[p].i);
            const auto j = static_cast<Index>(shifts[p].j);
            // The least for this shift alone makes its two terms equal.
            const double wanted = at[p] + (std::log(d(j)) + y(j) - std::log(d(i)) - y(i)) / 2;
            const double next = std::clamp(wanted, shifts[p].low, shifts[p].high);
            y(i) += next - at[p];
            y(j) -= next - at[p];
            at[p] = next;
        }
        std::tie(sum, bound) = sum_and_bound();
    }
    return bound;
}

} // namespace

std::optional<LeastSum> least_sum(const VectorXd& y, const std::vector<LogShift>& shifts, const VectorXd& d) {
    const auto n = static_cast<std::size_t>(d.size());
    LeastSum result{0, std::vector<double>(shifts.size(), 0.0)};
    std::vector<bool> positive(n);
    std::vector<bool> negative(n);
    for (std::size_t i = 0; i < n; ++i) {
        positive[i] = d(static_cast<Index>(i)) > 0;
        negative[i] = d(static_cast<Index>(i)) < 0;
    }
    VectorXd settled = y;
    for (std::size_t p = 0; p < shifts.size(); ++p) {
        const auto& [i, j, low, high] = shifts[p];
        if (positive[i] == positive[j] && negative[i] == negative[j]) {
            // Both of one sign: below. Both 0: it does not matter.
            if (!positive[i] && !negative[i]) result.at[p] = std::clamp(0.0, low, high);
            continue;
        }
        const bool down = positive[i] || negative[j];
        result.at[p] = down ? low : high;
        settled(static_cast<Index>(i)) += result.at[p];
        settled(static_cast<Index>(j)) -= result.at[p];
    }
    const Side losing = side_of(shifts, negative);
    const Side winning = side_of(shifts, positive);
    double largest = 0;
    for (const auto& group : losing.groups) {
        if (group.size() > most_in_order) return std::nullopt;
        largest += largest_in_order(settled, shifts, losing, group, d, result.at);
    }
    const double least = least_convex(settled, shifts, winning, positive, d, result.at);
    result.bound = least - largest - rounding * (std::abs(least) + largest);
    return result;
}

double linear_bound(const AffineLogs& logs, const std::vector<double>& low, const std::vector<double>& high,
                    const VectorXd& d) {
    const Index answers = logs.columns.cols();
    VectorXd middle(answers);
    VectorXd half(answers);
    for (Index p = 0; p < answers; ++p) {
        const auto q = static_cast<std::size_t>(p);
        middle(p) = (low[q] + high[q]) / 2;
        half(p) = (high[q] - low[q]) / 2;
    }
    const VectorXd centre = logs.start + logs.columns * middle;
    const VectorXd reach = logs.columns.cwiseAbs() * half;
    VectorXd slope(d.size());
    double bound = 0;
    double size = 0;
    for (Index i = 0; i < d.size(); ++i) {
        const double term = d(i) * std::exp(centre(i));
        const double r = reach(i);
        const bool chord = term < 0 && r > 1e-9;
        slope(i) = chord ? term * std::sinh(r) / r : term;
        bound += term < 0 ? term * std::cosh(r) : term;
        size += std::abs(term) * std::cosh(r);
    }
    for (Index p = 0; p < answers; ++p) bound -= half(p) * std::abs(slope.dot(logs.columns.col(p)));
    return bound - rounding * size;
}

} // namespace steelyard
