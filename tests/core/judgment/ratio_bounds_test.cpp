#include "core/judgment/ratio_bounds.hpp"

#include <catch_amalgamated.hpp>
#include <cmath>
#include <limits>
#include <numeric>
#include <random>
#include <vector>

#include "core/judgment/eigenvector.hpp"
#include "tests/support/close.hpp"
#include "tests/support/dice.hpp"
#include "tests/support/pairs.hpp"

using namespace steelyard;
using namespace steelyard::testing;

namespace {

using Eigen::Index;
using Eigen::MatrixXd;

double uniform(std::mt19937_64& engine) {
    return static_cast<double>(engine() >> 11) * 0x1p-53;
}

/// A box around a random matrix: some entries wide (the whole scale), some narrow, some a point.
EntryBounds random_box(std::size_t n, std::uint64_t seed) {
    Dice dice(seed);
    const PairMatrix middle = random_near_pairs(n, .5, 0, seed);
    const auto size = static_cast<Index>(n);
    EntryBounds box{Grid::Ones(size, size), Grid::Ones(size, size)};
    for (Index i = 0; i < size; ++i) {
        for (Index j = i + 1; j < size; ++j) {
            const double at = middle.at(static_cast<std::size_t>(i), static_cast<std::size_t>(j));
            const int kind = dice.below(3);
            const double factor = 1 + dice.below(100) / 100.0;
            box.low(i, j) = kind == 0 ? 1.0 / 9 : kind == 1 ? at / factor : at;
            box.high(i, j) = kind == 0 ? 9 : kind == 1 ? at * factor : at;
            box.low(j, i) = 1 / box.high(i, j);
            box.high(j, i) = 1 / box.low(i, j);
        }
    }
    return box;
}

/// A matrix of the box; every other one a corner.
MatrixXd pick(const EntryBounds& box, std::mt19937_64& engine, bool corner) {
    const Index n = box.low.rows();
    MatrixXd a = MatrixXd::Ones(n, n);
    for (Index i = 0; i < n; ++i) {
        for (Index j = i + 1; j < n; ++j) {
            double part = uniform(engine);
            if (corner) part = part < .5 ? 0 : 1;
            a(i, j) = box.low(i, j) * std::pow(box.high(i, j) / box.low(i, j), part);
            a(j, i) = 1 / a(i, j);
        }
    }
    return a;
}

/// How far, relative, the largest sampled w_i / w_j lies above its bound.
double excess(const Grid& u, const EntryBounds& box, int tries, bool left, std::uint64_t seed) {
    std::mt19937_64 engine(seed);
    double worst = 0;
    for (int k = 0; k < tries; ++k) {
        const PrincipalPair p = principal_eigenvector(pick(box, engine, k % 2 == 1));
        const Eigen::VectorXd& w = left ? p.left : p.right;
        for (Index i = 0; i < u.rows(); ++i) {
            for (Index j = 0; j < u.rows(); ++j) worst = std::max(worst, w(i) / w(j) / u(i, j) - 1);
        }
    }
    return worst;
}

double widest(const Grid& u) {
    double most = 0;
    for (Index i = 0; i < u.rows(); ++i) {
        for (Index j = 0; j < u.rows(); ++j) most = std::max(most, u(i, j) * u(j, i));
    }
    return most;
}

} // namespace

TEST_CASE("ratio bounds: no matrix of the box goes beyond them, before and after tightening") {
    const std::size_t boxes = cases(120);
    for (std::size_t seed = 0; seed < boxes; ++seed) {
        Dice dice(seed);
        const auto n = static_cast<std::size_t>(dice.between(2, 8));
        const EntryBounds box = random_box(n, seed);
        Grid u = first_ratio_bounds(box);
        const Grid first = u;
        CAPTURE(seed, n);
        constexpr double rounding = 1e-11;
        CHECK(excess(u, box, 300, false, seed) < rounding);
        for (int round = 0; round < 12; ++round) tighten_ratio_bounds(u, box);
        CHECK((u.array() <= first.array() * (1 + 1e-11)).all());
        CHECK(excess(u, box, 300, false, seed) < rounding);
        Grid v = first_ratio_bounds(box.transposed());
        for (int round = 0; round < 12; ++round) tighten_ratio_bounds(v, box.transposed());
        CHECK(excess(v, box, 300, true, seed) < rounding);
    }
}

TEST_CASE("ratio bounds: many items, for which fewer anchors are looked at") {
    const EntryBounds box = random_box(15, 3);
    Grid u = first_ratio_bounds(box);
    const double before = widest(u);
    for (int round = 0; round < 5; ++round) tighten_ratio_bounds(u, box);
    CHECK(widest(u) < before);
    CHECK(excess(u, box, 100, false, 3) < 1e-11);
}

TEST_CASE("ratio bounds: over a single matrix they close in on its weights") {
    for (std::size_t n = 2; n <= 8; ++n) {
        const PairMatrix pairs = random_scale_pairs(n, n);
        const auto size = static_cast<Index>(n);
        EntryBounds box{Grid(size, size), Grid(size, size)};
        for (Index i = 0; i < size; ++i) {
            for (Index j = 0; j < size; ++j)
                box.low(i, j) = box.high(i, j) =
                    pairs.at(static_cast<std::size_t>(i), static_cast<std::size_t>(j));
        }
        Grid u = first_ratio_bounds(box);
        for (int round = 0; round < 200; ++round) tighten_ratio_bounds(u, box);
        CAPTURE(n);
        CHECK(widest(u) < 1 + 1e-8);
        CHECK(excess(u, box, 1, false, 1) < 1e-11);
    }
}

TEST_CASE("ratio bounds: optimal completions stay within the far bounds") {
    const std::size_t sets = cases(150);
    for (std::size_t seed = 0; seed < sets; ++seed) {
        Dice dice(seed);
        const auto n = static_cast<std::size_t>(dice.between(3, 8));
        const PairMatrix pairs = random_near_pairs(n, 1.5, 60, seed);
        const auto size = static_cast<Index>(n);
        constexpr double infinity = std::numeric_limits<double>::infinity();
        EntryBounds box{Grid::Zero(size, size), Grid::Constant(size, size, infinity)};
        for (Index i = 0; i < size; ++i) {
            for (Index j = 0; j < size; ++j) {
                const double at = pairs.at(static_cast<std::size_t>(i), static_cast<std::size_t>(j));
                if (at > 0) box.low(i, j) = box.high(i, j) = at;
            }
        }
        const Eigen::VectorXd y = log_least_squares(pairs);
        const Grid right = far_ratio_bounds(box, y);
        const Grid left = far_ratio_bounds(box.transposed(), -y);
        const PrincipalPair p = complete_optimally(pairs).principal;
        CAPTURE(seed, n);
        for (Index i = 0; i < size; ++i) {
            for (Index j = 0; j < size; ++j) {
                CHECK(p.right(i) / p.right(j) <= right(i, j) * (1 + 1e-9));
                CHECK(p.left(i) / p.left(j) <= left(i, j) * (1 + 1e-9));
            }
        }
    }
}

TEST_CASE("ratio bounds: those of affine logarithms are reached at corners and never passed") {
    for (std::size_t seed = 0; seed < 30; ++seed) {
        const PairMatrix known = random_near_pairs(5, .5, 0, seed);
        OpenJudge judge{1, known, {}};
        judge.known.clear(0, 3);
        judge.known.clear(1, 4);
        judge.open = {{0, 3, 0}, {1, 4, 1, .5, .2}};
        if (seed % 2 == 1) judge.known.clear(2, 4);
        const AffineLogs logs = affine_logs(judge, 2);
        CHECK(logs.by_pairs == (seed % 2 == 0));
        const std::vector<double> low{-1, -.5};
        const std::vector<double> high{1.5, 2};
        const Grid u = ratio_bounds(logs, low, high);
        Grid seen = Grid::Zero(5, 5);
        for (int k = 0; k <= 20; ++k) {
            for (int l = 0; l <= 20; ++l) {
                PairMatrix pairs = judge.known;
                pairs.set(0, 3, std::exp(low[0] + (high[0] - low[0]) * k / 20));
                pairs.set(1, 4, std::exp(.2 + .5 * (low[1] + (high[1] - low[1]) * l / 20)));
                const Weights w = *geometric_mean_weights(pairs);
                for (std::size_t i = 0; i < 5; ++i) {
                    for (std::size_t j = 0; j < 5; ++j) {
                        double& most = seen(static_cast<Index>(i), static_cast<Index>(j));
                        most = std::max(most, w[i] / w[j]);
                    }
                }
            }
        }
        CHECK(((seen.array() / u.array() - 1).abs() < 1e-9).all());
    }
}

TEST_CASE("ratio bounds: the least mean is below every mean within the ratios, and near the least for two") {
    std::mt19937_64 engine(5);
    for (int k = 0; k < 200; ++k) {
        const Index n = 2 + k % 5;
        Grid u = Grid::Ones(n, n);
        std::vector<double> w;
        std::vector<double> f;
        for (Index i = 0; i < n; ++i) {
            w.push_back(.1 + uniform(engine));
            f.push_back(2 * uniform(engine) - 1);
        }
        const double sum = std::accumulate(w.begin(), w.end(), 0.0);
        double mean = 0;
        for (std::size_t i = 0; i < w.size(); ++i) mean += f[i] * w[i] / sum;
        for (Index i = 0; i < n; ++i) {
            for (Index j = 0; j < n; ++j) {
                if (i != j) u(i, j) = w[static_cast<std::size_t>(i)] / w[static_cast<std::size_t>(j)];
            }
        }
        // Exact ratios give the mean itself, looser ones something below it.
        CHECK_THAT(least_mean(f, u), Catch::Matchers::WithinAbs(mean, 1e-11));
        for (Index i = 0; i < n; ++i) {
            for (Index j = 0; j < n; ++j) u(i, j) *= i == j ? 1 : 1 + uniform(engine);
        }
        CHECK(least_mean(f, u) <= mean);
        if (n == 2) {
            const double low = f[0] < f[1] ? u(0, 1) : 1 / u(1, 0);
            CHECK_THAT(least_mean(f, u), Catch::Matchers::WithinAbs((f[0] * low + f[1]) / (low + 1), 1e-11));
        }
    }
}
