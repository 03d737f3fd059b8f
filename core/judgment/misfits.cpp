#include "core/judgment/misfits.hpp"

#include <algorithm>
#include <cmath>

namespace steelyard {

std::vector<PairMisfit> misfits(const PairMatrix& pairs, Method method, const Weights& weights) {
    const Method way = method == Method::column_average ? Method::eigenvector : method;
    struct Sortable {
        PairMisfit misfit;
        double error;
    };
    std::vector<Sortable> list;
    for (const auto& [i, j] : pairs.judged_pairs()) {
        PairMatrix rest = pairs;
        rest.clear(i, j);
        PairMisfit misfit{i, j, pairs.at(i, j), std::nullopt};
        if (const auto w = weights_by(way, rest)) misfit.implied = (*w)[i] / (*w)[j];
        list.push_back({misfit, std::abs(std::log(misfit.given * weights[j] / weights[i]))});
    }
    // Insertion by "clearly worse" keeps item order among equals, which a comparison with a tolerance would
    // not.
    std::vector<PairMisfit> sorted;
    std::vector<double> errors;
    for (const auto& entry : list) {
        std::size_t at = errors.size();
        while (at > 0 && entry.error > errors[at - 1] + 1e-12) --at;
        errors.insert(errors.begin() + static_cast<std::ptrdiff_t>(at), entry.error);
        sorted.insert(sorted.begin() + static_cast<std::ptrdiff_t>(at), entry.misfit);
    }
    return sorted;
}

} // namespace steelyard
