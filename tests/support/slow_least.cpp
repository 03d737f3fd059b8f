#include "tests/support/slow_least.hpp"

#include <algorithm>
#include <cmath>
#include <limits>
#include <utility>

namespace steelyard::testing {
namespace {

/// One power step with a shift by a third of lambda, so that strongly circular matrices do not swing. Returns
/// the relative change.
double power_step(const Square& a, bool transposed, std::vector<double>& x, double& lambda) {
    const std::size_t n = x.size();
    std::vector<double> y(n, 0.0);
    for (std::size_t i = 0; i < n; ++i)
        for (std::size_t j = 0; j < n; ++j) y[i] += (transposed ? a[j][i] : a[i][j]) * x[j];
    lambda = 0;
    for (const double value : y) lambda += value;
    double sum = 0;
    for (std::size_t i = 0; i < n; ++i) sum += y[i] += lambda / 3 * x[i];
    double change = 0;
    for (std::size_t i = 0; i < n; ++i) {
        change = std::max(change, std::abs(y[i] / sum / x[i] - 1));
        x[i] = y[i] / sum;
    }
    return change;
}

double best_entry(const SlowVectors& at, const SlowFree& p) {
    const double free = std::sqrt(at.right[p.i] * at.left[p.j] / (at.right[p.j] * at.left[p.i]));
    return p.bounded ? std::clamp(free, 1. / 9, 9.) : free;
}

} // namespace

SlowVectors slow_vectors(const Square& a, const SlowVectors* from) {
    const std::size_t n = a.size();
    const std::vector<double> equal(n, 1 / static_cast<double>(n));
    SlowVectors at = from != nullptr ? *from : SlowVectors{0, equal, equal};
    const double settled = 1e-15 * static_cast<double>(n);
    for (int step = 0; step < 100000; ++step) {
        double other = 0;
        const double right = power_step(a, false, at.right, at.lambda);
        const double left = power_step(a, true, at.left, other);
        if (std::max(right, left) <= settled) break;
    }
    return at;
}

SlowLeast slow_least(Square a, const std::vector<SlowFree>& free) {
    SlowVectors at = slow_vectors(a);
    const auto put = [&](const SlowFree& p, double ratio) {
        a[p.i][p.j] = ratio;
        a[p.j][p.i] = 1 / ratio;
    };
    for (const auto& p : free) {
        if (p.bounded) put(p, std::clamp(a[p.i][p.j], 1. / 9, 9.));
    }
    at = slow_vectors(a, &at);
    for (int sweep = 0; sweep < 20000; ++sweep) {
        double change = 0;
        for (const auto& p : free) {
            const double next = best_entry(at, p);
            change = std::max(change, std::abs(std::log(next / a[p.i][p.j])));
            put(p, next);
            at = slow_vectors(a, &at);
        }
        if (change < 1e-13) break;
    }
    double steepest = 0;
    double product = 0;
    for (std::size_t i = 0; i < a.size(); ++i) product += at.left[i] * at.right[i];
    for (const auto& [i, j, bounded] : free) {
        const double slope =
            (at.left[i] * a[i][j] * at.right[j] - at.left[j] * a[j][i] * at.right[i]) / product / at.lambda;
        const bool outward = bounded && ((a[i][j] >= 9 && slope < 0) || (a[i][j] <= 1. / 9 && slope > 0));
        if (!outward) steepest = std::max(steepest, std::abs(slope));
    }
    return {std::move(a), at.lambda, steepest};
}

Square slow_square(const PairMatrix& pairs, std::vector<SlowFree>& free) {
    Square a(pairs.size(), std::vector<double>(pairs.size(), 1.0));
    for (const auto& [i, j] : pairs.judged_pairs()) {
        a[i][j] = pairs.at(i, j);
        a[j][i] = pairs.at(j, i);
    }
    for (const auto& [i, j] : pairs.missing()) free.push_back({i, j, false});
    return a;
}

std::optional<SlowFewest> slow_fewest(const PairMatrix& pairs, double lambda_limit, std::size_t most) {
    const auto judged = pairs.judged_pairs();
    std::vector<SlowFree> missing;
    const Square given = slow_square(pairs, missing);
    for (std::size_t size = 0; size <= std::min(most, judged.size()); ++size) {
        std::optional<SlowFewest> best;
        double runner_up = std::numeric_limits<double>::infinity();
        // Every choice of `size` of the judged pairs, as a row of marks.
        std::vector<bool> marks(judged.size(), false);
        std::fill(marks.begin(), marks.begin() + static_cast<std::ptrdiff_t>(size), true);
        do {
            std::vector<std::size_t> changed;
            std::vector<SlowFree> free = missing;
            for (std::size_t p = 0; p < judged.size(); ++p) {
                if (!marks[p]) continue;
                changed.push_back(p);
                free.push_back({judged[p][0], judged[p][1], true});
            }
            SlowLeast least = slow_least(given, free);
            if (!best || least.lambda < best->least.lambda - 1e-11) {
                if (best) runner_up = std::min(runner_up, best->least.lambda);
                best = SlowFewest{std::move(changed), std::move(least), 0};
            } else {
                runner_up = std::min(runner_up, least.lambda);
            }
        } while (std::prev_permutation(marks.begin(), marks.end()));
        if (best->least.lambda <= lambda_limit) {
            best->runner_up = runner_up;
            return best;
        }
    }
    return std::nullopt;
}

} // namespace steelyard::testing
