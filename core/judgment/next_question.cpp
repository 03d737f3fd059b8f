// Glossary: L the Laplacian of the graph of answered pairs, L+ its pseudo-inverse, w the weights, J = diag(w)
// - w w' their derivative by their logarithms, e_i the unit vectors, R_ij = (e_i - e_j)' L+ (e_i - e_j).
#include "core/judgment/next_question.hpp"

#include <Eigen/Cholesky>
#include <algorithm>
#include <array>
#include <cmath>

namespace steelyard {
namespace {

using Eigen::Index;
using Eigen::MatrixXd;
using Eigen::VectorXd;
using Pair = PairMatrix::Pair;

std::vector<std::size_t> degrees(const PairMatrix& answered) {
    std::vector<std::size_t> count(answered.size(), 0);
    for (const auto& [i, j] : answered.judged_pairs()) {
        ++count[i];
        ++count[j];
    }
    return count;
}

/// Unanswered pairs that nobody skipped, in item order.
std::vector<Pair> candidates(const PairMatrix& answered, const std::vector<Pair>& skipped) {
    std::vector<Pair> result;
    std::vector<bool> left_out(answered.size() * answered.size(), false);
    for (const auto& [i, j] : skipped) {
        left_out[i * answered.size() + j] = true;
        left_out[j * answered.size() + i] = true;
    }
    for (const auto& pair : answered.missing()) {
        if (!left_out[pair[0] * answered.size() + pair[1]]) result.push_back(pair);
    }
    return result;
}

/// The pair that links two groups best, if any of the candidates links two.
std::optional<Pair> linking_pair(const std::vector<std::vector<std::size_t>>& parts,
                                 const std::vector<Pair>& pairs, const std::vector<std::size_t>& degree) {
    std::vector<std::size_t> part_of(degree.size());
    for (std::size_t p = 0; p < parts.size(); ++p) {
        for (const auto i : parts[p]) part_of[i] = p;
    }
    std::optional<Pair> best;
    std::array<std::size_t, 3> best_key{};
    for (const auto& [i, j] : pairs) {
        if (part_of[i] == part_of[j]) continue;
        // Larger is better in every place.
        const std::array<std::size_t, 3> key{parts[part_of[i]].size() + parts[part_of[j]].size(),
                                             std::max(degree[i], degree[j]),
                                             degree.size() - std::min(degree[i], degree[j])};
        if (!best || key > best_key) {
            best = Pair{i, j};
            best_key = key;
        }
    }
    return best;
}

/// L+ of a graph with these parts: adding the projection onto what L sends to 0 makes L invertible.
MatrixXd laplacian_pseudo_inverse(const PairMatrix& answered,
                                  const std::vector<std::vector<std::size_t>>& parts) {
    const auto n = static_cast<Index>(answered.size());
    MatrixXd kernel = MatrixXd::Zero(n, n);
    for (const auto& part : parts) {
        for (const auto i : part) {
            for (const auto j : part)
                kernel(static_cast<Index>(i), static_cast<Index>(j)) = 1 / static_cast<double>(part.size());
        }
    }
    MatrixXd shifted = kernel;
    for (const auto& [p, q] : answered.judged_pairs()) {
        const auto i = static_cast<Index>(p);
        const auto j = static_cast<Index>(q);
        shifted(i, i) += 1;
        shifted(j, j) += 1;
        shifted(i, j) -= 1;
        shifted(j, i) -= 1;
    }
    return shifted.llt().solve(MatrixXd::Identity(n, n)) - kernel;
}

/// Weights by least squares of the logarithms, sum 1; groups that nothing links share equal means of the
/// logarithms.
VectorXd present_weights(const PairMatrix& answered, const MatrixXd& inverse) {
    const auto n = static_cast<Index>(answered.size());
    VectorXd r = VectorXd::Zero(n);
    for (const auto& [i, j] : answered.judged_pairs()) {
        const double ratio = std::log(answered.at(i, j));
        r(static_cast<Index>(i)) += ratio;
        r(static_cast<Index>(j)) -= ratio;
    }
    const VectorXd y = inverse * r;
    VectorXd w(n);
    for (Index i = 0; i < n; ++i) w(i) = std::exp(y(i) - y.maxCoeff());
    return w / w.sum();
}

/// Of pairs within the groups, the one with the largest ||J L+ (e_i - e_j)||^2 / (1 + R_ij): what the trace
/// of the weights' covariance J L+ J' loses by the answer, L+ losing u u' / (1 + R), u = L+ (e_i - e_j).
Pair most_telling_pair(const PairMatrix& answered, const std::vector<std::vector<std::size_t>>& parts,
                       const std::vector<Pair>& pairs, const std::vector<std::size_t>& degree) {
    const MatrixXd inverse = laplacian_pseudo_inverse(answered, parts);
    const VectorXd w = present_weights(answered, inverse);
    const MatrixXd weighted = w.asDiagonal() * inverse;
    const MatrixXd effect = weighted - w * weighted.colwise().sum();
    const MatrixXd squares = effect.transpose() * effect;
    const auto gain = [&](const Pair& pair) {
        const auto i = static_cast<Index>(pair[0]);
        const auto j = static_cast<Index>(pair[1]);
        const double resistance = inverse(i, i) + inverse(j, j) - 2 * inverse(i, j);
        return (squares(i, i) + squares(j, j) - 2 * squares(i, j)) / (1 + resistance);
    };
    std::vector<double> gains;
    for (const auto& pair : pairs) gains.push_back(gain(pair));
    constexpr double equal = 1e-9;
    const double enough = *std::max_element(gains.begin(), gains.end()) * (1 - equal);
    const Pair* best = nullptr;
    std::size_t fewest = 0;
    for (std::size_t p = 0; p < pairs.size(); ++p) {
        const std::size_t answers = degree[pairs[p][0]] + degree[pairs[p][1]];
        if (gains[p] < enough || (best != nullptr && answers >= fewest)) continue;
        best = &pairs[p];
        fewest = answers;
    }
    return *best;
}

} // namespace

std::optional<Pair> next_question(const PairMatrix& answered, std::optional<std::size_t> star,
                                  const std::vector<Pair>& skipped) {
    const std::vector<Pair> pairs = candidates(answered, skipped);
    if (pairs.empty()) return std::nullopt;
    if (star) {
        for (const auto& pair : pairs) {
            if (pair[0] == *star || pair[1] == *star) return pair;
        }
    }
    const auto degree = degrees(answered);
    const auto parts = answered.parts();
    if (const auto pair = linking_pair(parts, pairs, degree)) return pair;
    return most_telling_pair(answered, parts, pairs, degree);
}

QuestionsNeeded questions_needed(const PairMatrix& answered) {
    const std::size_t n = answered.size();
    QuestionsNeeded needed;
    if (n < 2) return needed;
    const std::size_t all = n * (n - 1) / 2;
    const std::size_t judged = all - answered.missing().size();
    const std::size_t firm = std::min(2 * (n - 1), all);
    needed.to_connect = answered.parts().size() - 1;
    needed.to_firm_up = std::max(needed.to_connect, firm > judged ? firm - judged : 0);
    return needed;
}

} // namespace steelyard
