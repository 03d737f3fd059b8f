#pragma once

#include <cstddef>
#include <cstdint>
#include <vector>

#include "core/judgment/pair_matrix.hpp"
#include "core/judgment/weights.hpp"

/// Sets of judged pairs for tests.
namespace steelyard::testing {

/// The upper triangle of n items, row by row; 0 for a missing pair. Throws std::logic_error unless the list
/// has exactly n(n-1)/2 numbers.
PairMatrix upper_triangle(std::size_t n, const std::vector<double>& ratios);

/// Every pair judged as the ratio of the weights given (any sum, all positive).
PairMatrix consistent_pairs(const std::vector<double>& weights);

/// Every pair drawn from the 17 values 1/9, 1/8 ... 1 ... 8, 9 with equal chances.
PairMatrix random_scale_pairs(std::size_t n, std::uint64_t seed);

/// Pairs near a random order of weights: consistent ratios, each off by up to a factor e^noise, `percent` of
/// the pairs that are not needed to connect the items missing.
PairMatrix random_near_pairs(std::size_t n, double noise, int percent, std::uint64_t seed);

/// A random connected graph of judgments: a random tree, and other pairs until about `pairs` are judged, each
/// 1/9 to 9 with equal chances of its logarithm. 0 pairs: any number.
PairMatrix random_graph_pairs(std::size_t n, std::size_t pairs, std::uint64_t seed);

/// The same judgments with item i standing at place order[i].
PairMatrix permuted(const PairMatrix& pairs, const std::vector<std::size_t>& order);

/// Weights scaled to sum 1.
Weights normalised(std::vector<double> weights);

/// The published sets several tests look at.
PairMatrix drinks_pairs(); ///< Source: see tests/external/drinks_test.cpp.
PairMatrix house_pairs();  ///< Source: see tests/external/house_test.cpp.

} // namespace steelyard::testing
