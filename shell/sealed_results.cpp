#include "shell/sealed_results.hpp"

#include <algorithm>

#include "core/decision/lookup.hpp"

namespace steelyard {
namespace {

bool agreed(const Decision& decision, const Id& set, const Id& a, const Id& b) {
    return std::any_of(decision.judgments.begin(), decision.judgments.end(), [&](const Judgment& j) {
        return j.set == set && j.by.empty() && ((j.a == a && j.b == b) || (j.a == b && j.b == a));
    });
}

/// Requirements on a criterion's worth follow from the weights.
bool of_a_worth(const Decision& decision, const Id& requirement) {
    const Requirement* found = find_requirement(decision, requirement);
    return found == nullptr || !found->node.empty();
}

} // namespace

SetResult unanswered_entry(const SetResult& group, const Decision& decision, const Id& by) {
    SetResult result;
    result.set = group.set;
    result.by = by;
    result.from_points = group.from_points;
    result.items = group.items;
    if (result.from_points) return result;
    for (std::size_t i = 0; i < result.items.size(); ++i) {
        result.parts.push_back({result.items[i]});
        for (std::size_t j = i + 1; j < result.items.size(); ++j) {
            if (!agreed(decision, result.set, result.items[i], result.items[j]))
                result.missing.push_back({result.items[i], result.items[j]});
        }
    }
    return result;
}

Results sealed_results(const Results& results, const Decision& decision, const Id& person) {
    Results sealed;
    sealed.settings = results.settings;
    sealed.options = results.options;
    sealed.scores.assign(sealed.options.size(), 0);
    sealed.ranks.assign(sealed.options.size(), 1);
    sealed.figures = results.figures;
    for (const auto& set : results.sets) {
        if (set.by.empty()) sealed.sets.push_back(unanswered_entry(set, decision, Id{}));
        if (!set.by.empty() && set.by == person) sealed.sets.push_back(set);
    }
    for (const auto& leaf : results.leaves) {
        const Node* node = find_node(decision.criteria, leaf.leaf);
        if (node != nullptr && node->rate == RateBy::figure)
            sealed.leaves.push_back({leaf.leaf, 0, leaf.local, leaf.missing, leaf.worths});
    }
    for (const auto& must : results.musts) {
        if (!of_a_worth(decision, must.requirement)) sealed.musts.push_back(must);
    }
    for (const auto& exclusion : results.excluded) {
        if (!of_a_worth(decision, exclusion.requirement)) sealed.excluded.push_back(exclusion);
    }
    for (const auto& item : results.open) {
        if (item.kind != OpenKind::judgment && item.kind != OpenKind::points) sealed.open.push_back(item);
    }
    return sealed;
}

} // namespace steelyard
