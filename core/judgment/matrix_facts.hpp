#pragma once

#include <optional>
#include <vector>

#include "core/judgment/consistency.hpp"
#include "core/judgment/misfits.hpp"
#include "core/judgment/pair_matrix.hpp"
#include "core/judgment/weights.hpp"

namespace steelyard {

/// All that follows from one matrix and two settings alone; items by their index. What needs weights is empty
/// where the judgments do not connect the items.
struct MatrixFacts {
    std::vector<PairMatrix::Pair> missing;
    std::vector<std::vector<std::size_t>> parts;
    std::optional<WorstTriad> worst_triad;
    CircularTriads circular;
    std::optional<Weights> eigenvector;
    std::optional<Weights> geometric_mean;
    std::optional<Weights> column_average;
    std::optional<double> lambda_max;
    std::optional<double> lambda_hand; ///< For the weights by the method asked for.
    std::optional<double> ci;
    std::optional<double> ri;
    std::optional<double> cr;
    std::optional<double> gci;
    std::vector<PairMisfit> misfits;

    const std::optional<Weights>& by_method(Method method) const {
        switch (method) {
        case Method::geometric_mean: return geometric_mean;
        case Method::column_average: return column_average;
        case Method::eigenvector: break;
        }
        return eigenvector;
    }
};

/// Describes a matrix. Misfits go by the errors of `method`, the eigenvector standing in for averaged
/// columns.
MatrixFacts matrix_facts(const PairMatrix& pairs, Method method, RandomIndexTable table);

} // namespace steelyard
