#include "core/standing/synthesis.hpp"

#include <algorithm>
#include <numeric>

namespace steelyard {
namespace {

void weigh(const WeightedNode& at, const CriteriaWeights& weights, std::vector<WeightedNode>& out) {
    out.push_back(at);
    const auto& children = at.node->children;
    const auto found = weights.find(at.node->id);
    const bool weighted = found != weights.end() && found->second;
    for (std::size_t i = 0; i < children.size(); ++i) {
        const double local = weighted ? (*found->second)[i] : 1 / static_cast<double>(children.size());
        weigh({&children[i], at.node, at.depth + 1, local, at.weight * local}, weights, out);
    }
}

} // namespace

std::vector<WeightedNode> weigh_tree(const Node& root, const CriteriaWeights& weights) {
    std::vector<WeightedNode> out;
    weigh({&root, nullptr, 0, 1, 1}, weights, out);
    return out;
}

std::vector<int> rank(const std::vector<double>& scores) {
    constexpr double tie = 1e-9;
    std::vector<int> ranks;
    for (const double score : scores) {
        const auto better =
            std::count_if(scores.begin(), scores.end(), [&](double s) { return s > score + tie; });
        ranks.push_back(1 + static_cast<int>(better));
    }
    return ranks;
}

std::optional<std::size_t> first_of(const std::vector<double>& scores) {
    if (scores.empty()) return std::nullopt;
    return static_cast<std::size_t>(std::max_element(scores.begin(), scores.end()) - scores.begin());
}

std::optional<double> lead_of(std::size_t option, const std::vector<double>& scores) {
    std::optional<double> best_other;
    for (std::size_t o = 0; o < scores.size(); ++o) {
        if (o != option && (!best_other || scores[o] > *best_other)) best_other = scores[o];
    }
    if (!best_other) return std::nullopt;
    return 100 * (scores[option] - *best_other);
}

std::optional<std::vector<double>> shares_of(const std::vector<double>& scores) {
    const double sum = std::accumulate(scores.begin(), scores.end(), 0.0);
    if (!(sum > 0)) return std::nullopt;
    std::vector<double> shares = scores;
    for (auto& share : shares) share /= sum;
    return shares;
}

} // namespace steelyard
