#include "core/judgment/misfits.hpp"

#include <Eigen/Cholesky>
#include <cmath>

#include "core/judgment/best_value.hpp"
#include "core/judgment/tied_order.hpp"

namespace steelyard {
namespace {

using Eigen::Index;
using Eigen::MatrixXd;

/// What the least squares weights without a pair imply of it, for all pairs from one factorisation: with e
/// the pair's residual and R the resistance between its items (judged pairs being wires of one ohm), taking
/// it out moves y_i - y_j by -e R / (1 - R) (Sherman, Morrison 1950). R is 1 where nothing else links them.
class LeastSquaresWithout {
public:
    explicit LeastSquaresWithout(const PairMatrix& pairs) : pairs_(pairs), y_(log_least_squares(pairs)) {
        const auto n = static_cast<Index>(pairs.size());
        // The Laplacian with all its entries raised by 1/n is regular and has the same resistances.
        MatrixXd raised = MatrixXd::Constant(n, n, 1 / static_cast<double>(n));
        for (const auto& [i, j] : pairs.judged_pairs()) {
            const auto p = static_cast<Index>(i);
            const auto q = static_cast<Index>(j);
            raised(p, p) += 1;
            raised(q, q) += 1;
            raised(p, q) -= 1;
            raised(q, p) -= 1;
        }
        inverse_ = raised.llt().solve(MatrixXd::Identity(n, n));
    }

    std::optional<double> implied(std::size_t i, std::size_t j) const {
        const auto p = static_cast<Index>(i);
        const auto q = static_cast<Index>(j);
        const double loose = 1 - (inverse_(p, p) + inverse_(q, q) - 2 * inverse_(p, q));
        // Another way between the items has at most n - 1 wires: R is then 1 - 1/n at most.
        if (loose < 0.5 / static_cast<double>(pairs_.size())) return std::nullopt;
        const double given = std::log(pairs_.at(i, j));
        return std::exp(given - (given - (y_(p) - y_(q))) / loose);
    }

private:
    const PairMatrix& pairs_;
    Eigen::VectorXd y_;
    MatrixXd inverse_;
};

} // namespace

std::vector<PairMisfit> misfits(const PairMatrix& pairs, Method method, const Weights& weights) {
    std::vector<PairMisfit> list;
    for (const auto& [i, j] : pairs.judged_pairs()) list.push_back({i, j, pairs.at(i, j), std::nullopt});
    if (method == Method::geometric_mean) {
        const LeastSquaresWithout without(pairs);
        for (auto& misfit : list) misfit.implied = without.implied(misfit.i, misfit.j);
    } else {
        BestValues values(pairs);
        for (auto& misfit : list) {
            if (const auto best = values.of(misfit.i, misfit.j)) misfit.implied = best->implied;
        }
    }
    std::vector<double> fit;
    for (const auto& misfit : list)
        fit.push_back(-std::abs(std::log(misfit.given * weights[misfit.j] / weights[misfit.i])));
    std::vector<PairMisfit> sorted;
    for (const auto place : tied_order(fit)) sorted.push_back(list[place]);
    return sorted;
}

} // namespace steelyard
