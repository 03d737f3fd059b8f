#include "tests/support/pairs.hpp"

#include <cmath>
#include <numeric>
#include <stdexcept>

#include "tests/support/dice.hpp"

namespace steelyard::testing {

PairMatrix upper_triangle(std::size_t n, const std::vector<double>& ratios) {
    if (ratios.size() != n * (n - 1) / 2) throw std::logic_error("an upper triangle needs n(n-1)/2 numbers");
    PairMatrix pairs(n);
    std::size_t next = 0;
    for (std::size_t i = 0; i < n; ++i) {
        for (std::size_t j = i + 1; j < n; ++j, ++next) {
            if (ratios[next] != 0) pairs.set(i, j, ratios[next]);
        }
    }
    return pairs;
}

PairMatrix consistent_pairs(const std::vector<double>& weights) {
    PairMatrix pairs(weights.size());
    for (std::size_t i = 0; i < weights.size(); ++i) {
        for (std::size_t j = i + 1; j < weights.size(); ++j) pairs.set(i, j, weights[i] / weights[j]);
    }
    return pairs;
}

PairMatrix random_scale_pairs(std::size_t n, std::uint64_t seed) {
    Dice dice(seed);
    PairMatrix pairs(n);
    for (std::size_t i = 0; i < n; ++i) {
        for (std::size_t j = i + 1; j < n; ++j) {
            const int step = dice.between(-8, 8);
            pairs.set(i, j, step >= 0 ? 1 + step : 1.0 / (1 - step));
        }
    }
    return pairs;
}

PairMatrix random_near_pairs(std::size_t n, double noise, int percent, std::uint64_t seed) {
    Dice dice(seed);
    std::vector<double> weights;
    for (std::size_t i = 0; i < n; ++i) weights.push_back(dice.between(10, 90));
    PairMatrix pairs(n);
    for (std::size_t i = 0; i < n; ++i) {
        for (std::size_t j = i + 1; j < n; ++j) {
            const double off = noise * dice.between(-1000, 1000) / 1000;
            const bool missing = dice.chance(percent);
            // Neighbours stay: they connect the items.
            if (j == i + 1 || !missing) pairs.set(i, j, weights[i] / weights[j] * std::exp(off));
        }
    }
    return pairs;
}

PairMatrix random_graph_pairs(std::size_t n, std::size_t pairs, std::uint64_t seed) {
    Dice dice(seed);
    const int all = static_cast<int>(n * (n - 1) / 2);
    const int tree = static_cast<int>(n) - 1;
    int wanted = pairs == 0 ? dice.between(tree, all) : static_cast<int>(pairs);
    PairMatrix graph(n);
    const auto judge = [&](std::size_t i, std::size_t j) {
        graph.set(i, j, std::exp(std::log(9) * dice.between(-1000, 1000) / 1000));
        --wanted;
    };
    for (std::size_t i = 1; i < n; ++i) judge(i, static_cast<std::size_t>(dice.below(static_cast<int>(i))));
    while (wanted > 0) {
        const auto open = graph.missing();
        if (open.empty()) break;
        const auto [i, j] = dice.pick(open);
        judge(i, j);
    }
    return graph;
}

PairMatrix permuted(const PairMatrix& pairs, const std::vector<std::size_t>& order) {
    PairMatrix result(pairs.size());
    for (const auto& [i, j] : pairs.judged_pairs()) result.set(order[i], order[j], pairs.at(i, j));
    return result;
}

Weights normalised(std::vector<double> weights) {
    const double sum = std::accumulate(weights.begin(), weights.end(), 0.0);
    for (double& weight : weights) weight /= sum;
    return weights;
}

PairMatrix drinks_pairs() {
    return upper_triangle(7, {9,      5,      2,      1,      1,      1. / 2, //
                              1. / 3, 1. / 9, 1. / 9, 1. / 9, 1. / 9,         //
                              1. / 3, 1. / 4, 1. / 3, 1. / 9,                 //
                              1. / 2, 1,      1. / 3,                         //
                              2,      1. / 2,                                 //
                              1. / 3});
}

PairMatrix house_pairs() {
    return upper_triangle(8, {5,      3,      7,      6,      6,      1. / 3, 1. / 4, //
                              1. / 3, 5,      3,      3,      1. / 5, 1. / 7,         //
                              6,      3,      4,      6,      1. / 5,                 //
                              1. / 3, 1. / 4, 1. / 7, 1. / 8,                         //
                              1. / 2, 1. / 5, 1. / 6,                                 //
                              1. / 5, 1. / 6,                                         //
                              1. / 2});
}

} // namespace steelyard::testing
