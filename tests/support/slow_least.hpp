#pragma once

#include <cstddef>
#include <optional>
#include <vector>

#include "core/judgment/pair_matrix.hpp"

/// Making the principal eigenvalue least, slowly: one entry after the other, by power steps alone. Shares
/// nothing with the core but PairMatrix.
namespace steelyard::testing {

using Square = std::vector<std::vector<double>>;

struct SlowVectors {
    double lambda = 0;
    std::vector<double> right; ///< Both positive and of sum 1.
    std::vector<double> left;
};

/// Power steps until both vectors stand still. `from`: where they start, for speed.
SlowVectors slow_vectors(const Square& a, const SlowVectors* from = nullptr);

/// An entry that may move, its reciprocal with it.
struct SlowFree {
    std::size_t i = 0;
    std::size_t j = 0;
    bool bounded = false; ///< To 1/9 to 9.
};

struct SlowLeast {
    Square matrix;
    double lambda = 0;
    /// The largest derivative of ln lambda by a free logarithm, those left out that push against their end:
    /// as lambda is convex in the logarithms, 0 proves the minimum.
    double steepest = 0;
};

/// Each free entry in turn to sqrt(w_i v_j / (w_j v_i)), w the right and v the left eigenvector, clamped
/// where bounded, until none moves. Raising a_ij raises w_i / w_j and v_j / v_i, neither by more than itself
/// (algebra of mean passage times), so no step goes past the minimum of its entry and lambda falls with each.
SlowLeast slow_least(Square a, const std::vector<SlowFree>& free);

/// The judged pairs in place, missing ones 1 (their places in `free`).
Square slow_square(const PairMatrix& pairs, std::vector<SlowFree>& free);

/// The fewest changes by trying every subset of each size up to `most`, smallest first, all of a size.
struct SlowFewest {
    std::vector<std::size_t> changed; ///< Places in judged_pairs(); the first of the best.
    SlowLeast least;
    double runner_up = 0; ///< The second lowest lambda of that size.
};
/// None where no subset of up to `most` brings lambda to the limit.
std::optional<SlowFewest> slow_fewest(const PairMatrix& pairs, double lambda_limit, std::size_t most);

} // namespace steelyard::testing
