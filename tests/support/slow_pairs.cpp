#include "tests/support/slow_pairs.hpp"

#include <algorithm>
#include <cmath>
#include <deque>
#include <set>

namespace steelyard::testing {
namespace {

using Column = std::vector<double>;
using Square = std::vector<Column>;

Square transposed(const Square& a) {
    Square b = a;
    for (std::size_t i = 0; i < a.size(); ++i)
        for (std::size_t j = 0; j < a.size(); ++j) b[i][j] = a[j][i];
    return b;
}

Column times(const Square& a, const Column& x) {
    Column y(x.size(), 0.0);
    for (std::size_t i = 0; i < x.size(); ++i)
        for (std::size_t j = 0; j < x.size(); ++j) y[i] += a[i][j] * x[j];
    return y;
}

double sum(const Column& x) {
    double total = 0;
    for (double value : x) total += value;
    return total;
}

/// Power iteration from `x` (positive, sum 1): x becomes the principal eigenvector, the eigenvalue is
/// returned. The shift by a third of the eigenvalue keeps strongly circular matrices, whose other eigenvalues
/// are nearly as large but point backwards, from converging slowly.
double iterate(const Square& a, Column& x) {
    constexpr int most = 100000;
    // A product of n positive terms is good to about n rounding errors; more cannot be asked for.
    const double settled = 1e-15 * static_cast<double>(x.size());
    double lambda = 0;
    for (int step = 0; step < most; ++step) {
        Column y = times(a, x);
        lambda = sum(y);
        for (std::size_t i = 0; i < x.size(); ++i) y[i] += lambda / 3 * x[i];
        const double total = sum(y);
        double change = 0;
        for (std::size_t i = 0; i < x.size(); ++i) {
            y[i] /= total;
            change = std::max(change, std::abs(y[i] / x[i] - 1));
        }
        x = y;
        if (change <= settled) break;
    }
    return lambda;
}

/// Gaussian elimination with row exchanges; `a` must not be singular.
Column solve_linear(Square a, Column b) {
    const std::size_t n = b.size();
    for (std::size_t k = 0; k < n; ++k) {
        std::size_t pivot = k;
        for (std::size_t i = k + 1; i < n; ++i)
            if (std::abs(a[i][k]) > std::abs(a[pivot][k])) pivot = i;
        std::swap(a[k], a[pivot]);
        std::swap(b[k], b[pivot]);
        for (std::size_t i = k + 1; i < n; ++i) {
            const double factor = a[i][k] / a[k][k];
            for (std::size_t j = k; j < n; ++j) a[i][j] -= factor * a[k][j];
            b[i] -= factor * b[k];
        }
    }
    for (std::size_t k = n; k-- > 0;) {
        for (std::size_t j = k + 1; j < n; ++j) b[k] -= a[k][j] * b[j];
        b[k] /= a[k][k];
    }
    return b;
}

SlowWeights named(const std::vector<Id>& items, const Column& x) {
    SlowWeights weights;
    const double total = sum(x);
    for (std::size_t i = 0; i < items.size(); ++i) weights[items[i]] = x[i] / total;
    return weights;
}

} // namespace

void SlowPairs::judge(const Id& a, const Id& b, double r) {
    ratio[{a, b}] = r;
    ratio[{b, a}] = 1 / r;
}

void SlowPairs::forget(const Id& a, const Id& b) {
    ratio.erase({a, b});
    ratio.erase({b, a});
}

std::vector<std::vector<Id>> slow_parts(const SlowPairs& pairs) {
    std::vector<std::vector<Id>> parts;
    std::set<Id> seen;
    for (const Id& start : pairs.items) {
        if (seen.count(start) > 0) continue;
        std::set<Id> reached{start};
        std::deque<Id> waiting{start};
        while (!waiting.empty()) {
            const Id from = waiting.front();
            waiting.pop_front();
            for (const Id& to : pairs.items)
                if (pairs.judged(from, to) && reached.insert(to).second) waiting.push_back(to);
        }
        parts.emplace_back();
        for (const Id& item : pairs.items)
            if (reached.count(item) > 0) parts.back().push_back(item);
        seen.insert(reached.begin(), reached.end());
    }
    return parts;
}

std::vector<std::array<Id, 2>> slow_missing(const SlowPairs& pairs) {
    std::vector<std::array<Id, 2>> missing;
    for (std::size_t i = 0; i < pairs.items.size(); ++i)
        for (std::size_t j = i + 1; j < pairs.items.size(); ++j)
            if (!pairs.judged(pairs.items[i], pairs.items[j]))
                missing.push_back({pairs.items[i], pairs.items[j]});
    return missing;
}

SlowEigen slow_eigen(const SlowPairs& pairs) {
    const std::size_t n = pairs.items.size();
    const SlowWeights start = slow_geometric_mean(pairs);
    Square a(n, Column(n, 1.0));
    std::vector<std::pair<std::size_t, std::size_t>> holes;
    for (std::size_t i = 0; i < n; ++i)
        for (std::size_t j = 0; j < n; ++j) {
            const auto found = pairs.ratio.find({pairs.items[i], pairs.items[j]});
            if (found != pairs.ratio.end())
                a[i][j] = found->second;
            else if (i != j)
                a[i][j] = start.at(pairs.items[i]) / start.at(pairs.items[j]);
            if (found == pairs.ratio.end() && i < j) holes.emplace_back(i, j);
        }

    // The least eigenvalue has every missing a_ij at sqrt(w_i v_j / (w_j v_i)), w the right and v the left
    // vector: set one after the other to that value until none moves any more.
    Column w(n, 1.0 / static_cast<double>(n));
    Column v = w;
    constexpr int most_sweeps = 20000;
    for (int sweep = 0; sweep < most_sweeps; ++sweep) {
        double change = 0;
        for (const auto& [i, j] : holes) {
            iterate(a, w);
            iterate(transposed(a), v);
            const double next = std::sqrt(w[i] * v[j] / (w[j] * v[i]));
            change = std::max(change, std::abs(std::log(next / a[i][j])));
            a[i][j] = next;
            a[j][i] = 1 / next;
        }
        if (change <= 1e-13) break;
    }
    const double lambda = iterate(a, w);
    SlowEigen eigen{lambda, named(pairs.items, w), {}};
    for (const auto& [i, j] : holes) eigen.filled[{pairs.items[i], pairs.items[j]}] = a[i][j];
    return eigen;
}

SlowWeights slow_geometric_mean(const SlowPairs& pairs) {
    // The Laplacian of the judged pairs times y = sums of logarithms; the first y is set to 0.
    const std::size_t n = pairs.items.size();
    Square laplacian(n, Column(n, 0.0));
    Column logs(n, 0.0);
    for (std::size_t i = 0; i < n; ++i)
        for (std::size_t j = 0; j < n; ++j)
            if (pairs.judged(pairs.items[i], pairs.items[j])) {
                laplacian[i][i] += 1;
                laplacian[i][j] -= 1;
                logs[i] += std::log(pairs.ratio.at({pairs.items[i], pairs.items[j]}));
            }
    for (std::size_t j = 0; j < n; ++j) laplacian[0][j] = j == 0 ? 1 : 0;
    logs[0] = 0;
    Column weights = solve_linear(laplacian, logs);
    for (double& y : weights) y = std::exp(y);
    return named(pairs.items, weights);
}

SlowWeights slow_column_average(const SlowPairs& pairs) {
    SlowWeights weights;
    const auto n = static_cast<double>(pairs.items.size());
    for (const Id& column : pairs.items) {
        double total = 1;
        for (const Id& row : pairs.items)
            if (row != column) total += pairs.ratio.at({row, column});
        for (const Id& row : pairs.items)
            weights[row] += (row == column ? 1 : pairs.ratio.at({row, column})) / total / n;
    }
    return weights;
}

std::optional<SlowWeights> slow_weights(Method method, const SlowPairs& pairs) {
    if (slow_parts(pairs).size() != 1) return std::nullopt;
    switch (method) {
    case Method::eigenvector: return slow_eigen(pairs).weights;
    case Method::geometric_mean: return slow_geometric_mean(pairs);
    case Method::column_average:
        if (slow_missing(pairs).empty()) return slow_column_average(pairs);
    }
    return std::nullopt;
}

} // namespace steelyard::testing
