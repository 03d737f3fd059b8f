#pragma once

#include <cstddef>
#include <optional>
#include <vector>

#include "core/decision/decision.hpp"
#include "core/judgment/pair_matrix.hpp"
#include "core/judgment/weights.hpp"

namespace steelyard {

/// A judged pair i < j and what the other answers say of it.
struct PairMisfit {
    std::size_t i = 0;
    std::size_t j = 0;
    double given = 1;
    std::optional<double> implied; ///< None where the set falls apart without the pair.
};

/// All judged pairs of a connected set, worst first by |ln(a_ij w_j / w_i)|; equal ones (within 1e-12) in
/// item order. `method`: how weights are re-derived without the pair; column averages need every pair, so the
/// eigenvector stands in. `weights`: those of the whole set by that method.
std::vector<PairMisfit> misfits(const PairMatrix& pairs, Method method, const Weights& weights);

} // namespace steelyard
