#include <algorithm>
#include <catch_amalgamated.hpp>
#include <cmath>
#include <cstddef>
#include <cstdint>
#include <numeric>
#include <vector>

#include "core/judgment/weights.hpp"
#include "tests/support/close.hpp"
#include "tests/support/pairs.hpp"

// S. Bozoki, V. Tsyganok, The (logarithmic) least squares optimality of the arithmetic (geometric) mean of
// weight vectors calculated from all spanning trees for incomplete additive (multiplicative) pairwise
// comparison matrices, International Journal of General Systems 48(4) (2019) 362-381, from memory: the
// geometric mean of the weights over all spanning trees of the judged pairs is the least squares solution.
// Here every tree of a small graph is walked; Cayley's formula, n^(n-2) trees of a complete graph (1889),
// checks that none is lost.
namespace steelyard {

namespace {

/// Logarithms of the weights along one tree, the first item being 0. False unless the pairs are a tree.
bool along_tree(const PairMatrix& pairs, const std::vector<PairMatrix::Pair>& edges,
                std::vector<double>& logs) {
    PairMatrix tree(pairs.size());
    for (const auto& [i, j] : edges) tree.set(i, j, pairs.at(i, j));
    if (!tree.connected()) return false;
    logs.assign(pairs.size(), 0);
    std::vector<bool> known(pairs.size(), false);
    known[0] = true;
    for (std::size_t round = 1; round < pairs.size(); ++round) {
        for (const auto& [i, j] : edges) {
            if (known[i] == known[j]) continue;
            const double step = std::log(pairs.at(i, j));
            if (known[i])
                logs[j] = logs[i] - step;
            else
                logs[i] = logs[j] + step;
            known[i] = known[j] = true;
        }
    }
    return true;
}

struct TreeMean {
    Weights weights;
    int trees = 0;
};

TreeMean mean_over_trees(const PairMatrix& pairs) {
    const auto edges = pairs.judged_pairs();
    const std::size_t n = pairs.size();
    std::vector<double> sum(n, 0);
    TreeMean result;
    for (std::uint32_t mask = 0; mask < (1U << edges.size()); ++mask) {
        std::vector<PairMatrix::Pair> chosen;
        for (std::size_t e = 0; e < edges.size(); ++e) {
            if ((mask >> e & 1U) != 0) chosen.push_back(edges[e]);
        }
        std::vector<double> logs;
        if (chosen.size() + 1 != n || !along_tree(pairs, chosen, logs)) continue;
        ++result.trees;
        for (std::size_t i = 0; i < n; ++i) sum[i] += logs[i];
    }
    for (double& x : sum) x = std::exp(x / result.trees);
    result.weights = testing::normalised(std::move(sum));
    return result;
}

} // namespace

TEST_CASE("spanning trees: a complete graph has as many as Cayley's formula says") {
    const int cayley[] = {0, 0, 1, 3, 16, 125, 1296};
    for (std::size_t n = 2; n <= 6; ++n)
        CHECK(mean_over_trees(testing::random_scale_pairs(n, n)).trees == cayley[n]);
}

TEST_CASE("spanning trees: the geometric mean over all of them is the geometric mean weights") {
    for (std::uint64_t seed = 1; seed <= testing::cases(60); ++seed) {
        const std::size_t n = 2 + seed % 5;
        const PairMatrix pairs = testing::random_near_pairs(n, 1.5, 40, seed);
        INFO("seed " << seed << ", " << n << " items, " << pairs.missing().size() << " missing");
        // Rounding of a mean over at most 1296 trees.
        testing::check_close(geometric_mean_weights(pairs).value(), mean_over_trees(pairs).weights, 1e-12);
    }
}

TEST_CASE("spanning trees: the same on random connected graphs of up to nine items") {
    // Few pairs more than a tree has: the trees of nine items with every pair judged are 4,782,969.
    for (std::uint64_t seed = 1; seed <= testing::slow_cases(300); ++seed) {
        const std::size_t n = 3 + seed % 7;
        const std::size_t more = seed / 7 % 6;
        const std::size_t judged = std::min(n * (n - 1) / 2, n - 1 + more);
        const PairMatrix pairs = testing::random_graph_pairs(n, judged, seed);
        INFO("seed " << seed << ", " << n << " items, " << judged << " judged");
        testing::check_close(geometric_mean_weights(pairs).value(), mean_over_trees(pairs).weights, 1e-12);
    }
}

} // namespace steelyard
