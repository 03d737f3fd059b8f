#include "core/judgment/ratio_bounds.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

namespace steelyard {
namespace {

using Eigen::Index;
using Eigen::VectorXd;

constexpr double outward = 1 + 1e-12;
constexpr Index all_anchors = 12;
constexpr int most_rises = 100;
constexpr double unbounded = std::numeric_limits<double>::infinity();

/// max over t of (sum_k high_k t_k) / (sum_k low_k t_k), t_k in [least_k, most_k]. A threshold rule: t_k is
/// at its end for c, the maximum, and c is raised to a fixed point. Infinite if the rounds run out, which
/// leaves any bound valid.
double largest_ratio(const double* high, const double* low, const double* least, const double* most, Index n,
                     double c) {
    for (int rise = 0; rise < most_rises; ++rise) {
        double above = 0;
        double below = 0;
        for (Index k = 0; k < n; ++k) {
            const double t = high[k] > c * low[k] ? most[k] : least[k];
            above += high[k] * t;
            below += low[k] * t;
        }
        const double next = above / below;
        // The first step may fall, since c starts anywhere; from then on it rises to the fixed point.
        if (rise > 0 && next <= c * (1 + 1e-15)) return std::max(next, c);
        c = next;
    }
    return unbounded;
}

} // namespace

Grid first_ratio_bounds(const EntryBounds& entries) {
    const Index n = entries.high.rows();
    Grid u = Grid::Ones(n, n);
    for (Index i = 0; i < n; ++i) {
        for (Index j = 0; j < n; ++j) {
            if (i == j) continue;
            double most = 0;
            for (Index k = 0; k < n; ++k) most = std::max(most, entries.high(i, k) / entries.low(j, k));
            u(i, j) = most * outward;
        }
    }
    return u;
}

void close_ratio_bounds(Grid& u) {
    const Index n = u.rows();
    for (Index k = 0; k < n; ++k) {
        for (Index i = 0; i < n; ++i) {
            const double through = u(i, k) * outward;
            for (Index j = 0; j < n; ++j) {
                if (i != j) u(i, j) = std::min(u(i, j), through * u(k, j));
            }
        }
    }
}

double tighten_ratio_bounds(Grid& u, const EntryBounds& entries) {
    const Index n = u.rows();
    double gain = 0;
    VectorXd least(n);
    VectorXd most(n);
    for (Index h = 0; h < n; ++h) {
        for (Index k = 0; k < n; ++k) {
            least(k) = 1 / u(h, k);
            most(k) = u(k, h);
        }
        const auto improve = [&](Index i, Index j) {
            if (i == j) return;
            const double ratio = largest_ratio(entries.high.row(i).data(), entries.low.row(j).data(),
                                               least.data(), most.data(), n, u(i, j)) *
                                 outward;
            if (!(ratio < u(i, j))) return;
            gain = std::max(gain, 1 - ratio / u(i, j));
            u(i, j) = ratio;
        };
        for (Index i = 0; i < n; ++i) {
            if (n <= all_anchors) {
                for (Index j = 0; j < n; ++j) improve(i, j);
            } else {
                improve(i, h);
                improve(h, i);
            }
        }
    }
    close_ratio_bounds(u);
    return gain;
}

Grid far_ratio_bounds(const EntryBounds& entries, const VectorXd& y) {
    const Index n = entries.high.rows();
    const auto known = [&](Index i, Index j) { return std::isfinite(entries.high(i, j)); };
    double lambda = 0;
    for (Index i = 0; i < n; ++i) {
        double sum = 0;
        for (Index j = 0; j < n; ++j) sum += known(i, j) ? entries.high(i, j) * std::exp(y(j) - y(i)) : 1;
        lambda = std::max(lambda, sum);
    }
    Grid u = Grid::Constant(n, n, unbounded);
    for (Index i = 0; i < n; ++i) {
        for (Index j = 0; j < n; ++j) {
            if (known(i, j)) u(i, j) = i == j ? 1 : (lambda - 1) * entries.high(i, j) * outward;
        }
    }
    close_ratio_bounds(u);
    return u;
}

Grid ratio_bounds(const AffineLogs& logs, const std::vector<double>& low, const std::vector<double>& high) {
    const Index n = logs.start.size();
    Grid u = Grid::Ones(n, n);
    for (Index i = 0; i < n; ++i) {
        for (Index j = 0; j < n; ++j) {
            if (i == j) continue;
            double most = logs.start(i) - logs.start(j);
            for (Index p = 0; p < logs.columns.cols(); ++p) {
                const double slope = logs.columns(i, p) - logs.columns(j, p);
                const auto q = static_cast<std::size_t>(p);
                most += slope * (slope > 0 ? high[q] : low[q]);
            }
            u(i, j) = std::exp(most) * outward;
        }
    }
    return u;
}

double least_mean(const std::vector<double>& f, const Grid& u) {
    const Index n = u.rows();
    double best = *std::min_element(f.begin(), f.end());
    double size = 0;
    for (const double x : f) size = std::max(size, std::abs(x));
    for (Index h = 0; h < n; ++h) {
        // The threshold rule of largest_ratio, downward from the largest mean.
        double c = *std::max_element(f.begin(), f.end());
        bool settled = false;
        for (int fall = 0; fall < most_rises && !settled; ++fall) {
            double above = 0;
            double below = 0;
            for (Index i = 0; i < n; ++i) {
                const double t = i == h ? 1 : f[static_cast<std::size_t>(i)] < c ? u(i, h) : 1 / u(h, i);
                above += f[static_cast<std::size_t>(i)] * t;
                below += t;
            }
            const double next = above / below;
            settled = next >= c - 1e-15 * size;
            c = std::min(c, next);
        }
        if (settled) best = std::max(best, c - 1e-12 * size);
    }
    return best;
}

} // namespace steelyard
