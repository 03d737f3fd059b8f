#include "core/judgment/consistency.hpp"

#include <algorithm>
#include <cmath>

namespace steelyard {
namespace {

/// Ratios this close to 1 are ties: means of judges' ratios come out at 1 only up to rounding.
constexpr double tie = 1e-12;

/// Relative rounding of an eigenvalue of a consistent matrix, with room to spare.
constexpr double rounding = 1e-14;

/// 1 where the first counts more, -1 where less, 0 for a tie.
int preference(double ratio) {
    if (std::abs(ratio - 1) <= tie) return 0;
    return ratio > 1 ? 1 : -1;
}

bool fully_judged(const PairMatrix& pairs, std::size_t i, std::size_t j, std::size_t k) {
    return pairs.judged(i, j) && pairs.judged(j, k) && pairs.judged(i, k);
}

/// Calls `visit` for every fully judged triad i < j < k.
template<class Visit>
void each_triad(const PairMatrix& pairs, Visit visit) {
    for (std::size_t i = 0; i < pairs.size(); ++i) {
        for (std::size_t j = i + 1; j < pairs.size(); ++j) {
            for (std::size_t k = j + 1; k < pairs.size(); ++k) {
                if (fully_judged(pairs, i, j, k)) visit(i, j, k);
            }
        }
    }
}

} // namespace

std::optional<double> consistency_index(double lambda_max, std::size_t n) {
    if (n < 2) return std::nullopt;
    const auto size = static_cast<double>(n);
    const double excess = lambda_max - size;
    // A consistent matrix has lambda = n; what rounding leaves of it would differ from machine to machine.
    return excess < rounding * size ? 0 : excess / (size - 1);
}

double lambda_by_hand(const Eigen::MatrixXd& matrix, const Weights& weights) {
    const Eigen::Map<const Eigen::VectorXd> w(weights.data(), static_cast<Eigen::Index>(weights.size()));
    return ((matrix * w).array() / w.array()).mean();
}

std::optional<double> geometric_consistency_index(const PairMatrix& pairs) {
    const std::size_t n = pairs.size();
    if (n < 3 || !pairs.complete()) return std::nullopt;
    const Eigen::VectorXd y = log_least_squares(pairs);
    double sum = 0;
    for (std::size_t i = 0; i < n; ++i) {
        for (std::size_t j = i + 1; j < n; ++j) {
            const double e =
                std::log(pairs.at(i, j)) + y(static_cast<Eigen::Index>(j)) - y(static_cast<Eigen::Index>(i));
            sum += e * e;
        }
    }
    const double index = 2 * sum / static_cast<double>((n - 1) * (n - 2));
    return index < rounding * rounding ? 0 : index; // Squares of rounding.
}

std::optional<WorstTriad> koczkodaj_index(const PairMatrix& pairs) {
    std::optional<WorstTriad> worst;
    each_triad(pairs, [&](std::size_t i, std::size_t j, std::size_t k) {
        const double around = pairs.at(i, k) / (pairs.at(i, j) * pairs.at(j, k));
        const double index = std::min(std::abs(1 - around), std::abs(1 - 1 / around));
        if (!worst || index > worst->index + 1e-12) worst = WorstTriad{index, {i, j, k}};
    });
    return worst;
}

CircularTriads circular_triads(const PairMatrix& pairs) {
    CircularTriads result;
    each_triad(pairs, [&](std::size_t i, std::size_t j, std::size_t k) {
        const int ij = preference(pairs.at(i, j));
        const int jk = preference(pairs.at(j, k));
        const int ki = preference(pairs.at(k, i));
        const int ties = (ij == 0) + (jk == 0) + (ki == 0);
        const bool forward = ij >= 0 && jk >= 0 && ki >= 0;
        const bool backward = ij <= 0 && jk <= 0 && ki <= 0;
        if (ties == 3 || (!forward && !backward)) return;
        auto& list = ties == 0 ? result.strict : result.tied;
        list.push_back(forward ? Triad{i, j, k} : Triad{i, k, j});
    });
    std::sort(result.strict.begin(), result.strict.end());
    std::sort(result.tied.begin(), result.tied.end());

    const std::size_t n = pairs.size();
    const auto judged = pairs.judged_pairs();
    const bool tied = std::any_of(judged.begin(), judged.end(),
                                  [&](const auto& p) { return preference(pairs.at(p[0], p[1])) == 0; });
    if (n >= 3 && pairs.complete() && !tied) {
        const auto size = static_cast<double>(n);
        const double most = size * size * size - (n % 2 == 1 ? size : 4 * size);
        result.zeta = 1 - 24 * static_cast<double>(result.strict.size()) / most;
    }
    return result;
}

} // namespace steelyard
