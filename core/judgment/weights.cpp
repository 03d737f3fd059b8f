#include "core/judgment/weights.hpp"

#include <Eigen/Cholesky>
#include <cassert>
#include <cmath>
#include <numeric>

namespace steelyard {
namespace {

using Eigen::Index;
using Eigen::MatrixXd;
using Eigen::VectorXd;

Weights normalised(Weights w) {
    const double sum = std::accumulate(w.begin(), w.end(), 0.0);
    for (auto& x : w) x /= sum;
    return w;
}

} // namespace

VectorXd log_least_squares(const PairMatrix& pairs) {
    const std::size_t n = pairs.size();
    const auto size = static_cast<Index>(n);
    VectorXd y = VectorXd::Zero(size);
    if (n < 2) return y;
    // The last item is held at 0, which leaves a positive definite system.
    MatrixXd laplacian = MatrixXd::Zero(size, size);
    VectorXd r = VectorXd::Zero(size);
    for (std::size_t i = 0; i < n; ++i) {
        for (std::size_t j = i + 1; j < n; ++j) {
            if (!pairs.judged(i, j)) continue;
            const auto p = static_cast<Index>(i);
            const auto q = static_cast<Index>(j);
            const double ratio = std::log(pairs.at(i, j));
            r(p) += ratio;
            r(q) -= ratio;
            laplacian(p, p) += 1;
            laplacian(q, q) += 1;
            laplacian(p, q) -= 1;
            laplacian(q, p) -= 1;
        }
    }
    y.head(size - 1) = laplacian.topLeftCorner(size - 1, size - 1).llt().solve(r.head(size - 1));
    y.array() -= y.mean();
    return y;
}

std::optional<Weights> geometric_mean_weights(const PairMatrix& pairs) {
    if (!pairs.connected()) return std::nullopt;
    const VectorXd y = log_least_squares(pairs);
    Weights w(pairs.size());
    for (std::size_t i = 0; i < w.size(); ++i) w[i] = std::exp(y(static_cast<Index>(i)));
    return normalised(std::move(w));
}

Weights eigenvector_weights(const Completion& completion) {
    const auto& w = completion.principal.right;
    return normalised(Weights(w.data(), w.data() + w.size()));
}

std::optional<Weights> column_average_weights(const PairMatrix& pairs) {
    if (!pairs.complete()) return std::nullopt;
    const std::size_t n = pairs.size();
    Weights w(n, 0.0);
    for (std::size_t j = 0; j < n; ++j) {
        double sum = 0;
        for (std::size_t i = 0; i < n; ++i) sum += pairs.at(i, j);
        for (std::size_t i = 0; i < n; ++i) w[i] += pairs.at(i, j) / sum;
    }
    return normalised(std::move(w));
}

std::optional<Weights> weights_by(Method method, const PairMatrix& pairs) {
    switch (method) {
    case Method::geometric_mean: return geometric_mean_weights(pairs);
    case Method::column_average: return column_average_weights(pairs);
    case Method::eigenvector: break;
    }
    if (!pairs.connected()) return std::nullopt;
    return eigenvector_weights(complete_optimally(pairs));
}

Weights combine_weights(const std::vector<Weights>& weights, const std::vector<double>& shares,
                        bool arithmetic) {
    assert(!weights.empty() && weights.size() == shares.size());
    const double total = std::accumulate(shares.begin(), shares.end(), 0.0);
    Weights combined(weights.front().size(), 0.0);
    for (std::size_t k = 0; k < weights.size(); ++k) {
        const double share = shares[k] / total;
        for (std::size_t i = 0; i < combined.size(); ++i) {
            combined[i] += share * (arithmetic ? weights[k][i] : std::log(weights[k][i]));
        }
    }
    if (!arithmetic) {
        for (auto& x : combined) x = std::exp(x);
    }
    return normalised(std::move(combined));
}

} // namespace steelyard
