#pragma once

#include <map>
#include <optional>
#include <vector>

#include "core/decision/decision.hpp"
#include "core/judgment/weights.hpp"

namespace steelyard {

/// Weights of each set of criteria by the id of its node; a set without weights counts its items equally.
using CriteriaWeights = std::map<Id, std::optional<Weights>>;

/// One node of the tree with its weights.
struct WeightedNode {
    const Node* node = nullptr;
    const Node* parent = nullptr;
    int depth = 0;     ///< The root is 0.
    double local = 1;  ///< Among its siblings.
    double weight = 1; ///< Product of the local weights from the root down.
};

/// All nodes below and with `root`, each before its children, weights relative to `root`.
std::vector<WeightedNode> weigh_tree(const Node& root, const CriteriaWeights& weights);

/// Ranks from 1: one more than the number of options better by more than 1e-9; ties share a rank.
std::vector<int> rank(const std::vector<double>& scores);

/// Index of the highest score, the first of equals; none without scores.
std::optional<std::size_t> first_of(const std::vector<double>& scores);

/// Points of 100 by which one score leads the best other one, negative where it does not; none if it is
/// alone.
std::optional<double> lead_of(std::size_t option, const std::vector<double>& scores);

/// Shares of the sum of scores; none if all are 0.
std::optional<std::vector<double>> shares_of(const std::vector<double>& scores);

} // namespace steelyard
