#include "core/results/score_parts.hpp"

#include <algorithm>
#include <set>

#include "core/decision/lookup.hpp"
#include "core/measure/by_place.hpp"
#include "core/measure/grades.hpp"

namespace steelyard {

ScoreParts::ScoreParts(const Decision& decision, const Results& results) : d_(decision), r_(results) {
    for (const auto& set : results.sets) {
        if (set.by.empty()) weights_[set.set] = set.weights;
    }
    for (const auto& leaf : results.leaves) leaf_[leaf.leaf] = &leaf;
}

ScoreParts::Effects ScoreParts::no_effects(std::size_t items) const {
    const std::size_t m = r_.options.size();
    return {{m, std::vector<double>(items, 0.0)},
            std::vector<double>(items, 0.0),
            false,
            std::vector<bool>(m, false)};
}

std::vector<double> ScoreParts::rest(const Node& node) const {
    std::set<Id> below;
    for (const Node* leaf : leaves(node)) below.insert(leaf->id);
    std::vector<double> sum(r_.options.size(), 0.0);
    for (const auto& leaf : r_.leaves) {
        if (below.contains(leaf.leaf)) continue;
        for (std::size_t o = 0; o < sum.size(); ++o) sum[o] += leaf.weight * leaf.local[o];
    }
    return sum;
}

std::vector<double> ScoreParts::value(const Node& node, std::optional<double> missing_as) const {
    std::vector<double> sum(r_.options.size(), 0.0);
    for (const auto& at : weigh_tree(node, weights_)) {
        if (!at.node->is_leaf()) continue;
        const LeafResult& leaf = *leaf_.at(at.node->id);
        for (std::size_t o = 0; o < sum.size(); ++o)
            sum[o] += at.weight * (missing_as && leaf.missing[o] ? *missing_as : leaf.local[o]);
    }
    return sum;
}

double ScoreParts::weight(const Id& node) const {
    const auto found =
        std::find_if(r_.nodes.begin(), r_.nodes.end(), [&](const NodeResult& n) { return n.node == node; });
    return found->weight;
}

double ScoreParts::share(const Node& node, const Id& below) const {
    const auto tree = weigh_tree(node, weights_);
    const auto found =
        std::find_if(tree.begin(), tree.end(), [&](const WeightedNode& at) { return at.node->id == below; });
    return found->weight;
}

bool ScoreParts::weighed(const Node& node, const Id& except) const {
    if (node.children.size() >= 2 && node.id != except && !weights_.at(node.id)) return false;
    return std::all_of(node.children.begin(), node.children.end(),
                       [&](const Node& child) { return weighed(child, except); });
}

ScoreParts::Effects ScoreParts::of_criteria(const Node& node, std::optional<double> missing_as) const {
    const std::size_t n = node.children.size();
    Effects effects = no_effects(n);
    effects.part.assign(n, 1.0);
    for (std::size_t i = 0; i < n; ++i) {
        const auto of_child = value(node.children[i], missing_as);
        for (std::size_t o = 0; o < of_child.size(); ++o) effects.values[o][i] = of_child[o];
    }
    return effects;
}

ScoreParts::Effects ScoreParts::of_options(const std::vector<Id>& items) const {
    Effects effects = no_effects(items.size());
    effects.largest = r_.settings.synthesis == Synthesis::ideal;
    for (std::size_t o = 0; o < r_.options.size(); ++o) {
        const auto at = std::find(items.begin(), items.end(), r_.options[o]) - items.begin();
        effects.values[o][static_cast<std::size_t>(at)] = 1;
        effects.part[static_cast<std::size_t>(at)] = 1;
    }
    return effects;
}

ScoreParts::Effects ScoreParts::of_grades(const Node& leaf) const {
    const std::size_t n = leaf.grades.size();
    Effects effects = no_effects(n);
    effects.largest = r_.settings.synthesis == Synthesis::ideal;
    const ByPlace<GradeEntry> entries(d_.grades);
    std::vector<double> sum(n, 0.0);
    double known = 0;
    for (std::size_t o = 0; o < r_.options.size(); ++o) {
        const StandingGrades grades =
            standing_grades(d_.people, leaf, r_.options[o], entries.at(leaf.id, r_.options[o]));
        for (std::size_t g = 0; g < n; ++g) {
            // An option's worth is linear in those of the grades: each alone gives its coefficient.
            std::vector<std::optional<double>> one(n, 0.0);
            one[g] = 1;
            const auto finding = find_grade_worth(grades, one);
            effects.missing[o] = !finding.given;
            effects.values[o][g] = finding.worth.value_or(0);
            sum[g] += effects.values[o][g];
        }
        known += effects.missing[o] ? 0 : 1;
    }
    // Where nobody has a grade all are alike, and nothing hangs on the set.
    effects.part.assign(n, 1.0);
    if (!effects.largest && known > 0) effects.part = sum;
    for (std::size_t o = 0; o < r_.options.size(); ++o) {
        for (std::size_t g = 0; g < n && effects.missing[o] && known > 0; ++g)
            effects.values[o][g] = sum[g] / known;
    }
    return effects;
}

} // namespace steelyard
