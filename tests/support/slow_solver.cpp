#include "tests/support/slow_solver.hpp"

#include <algorithm>

#include "tests/support/slow_group.hpp"
#include "tests/support/slow_sets.hpp"
#include "tests/support/slow_standing.hpp"
#include "tests/support/slow_values.hpp"

namespace steelyard::testing {
namespace {

std::vector<SlowSet> entries_of(const Decision& decision, const Node& node, const std::vector<Id>& in_play) {
    if (node.children.size() >= 2 && node.weights == WeightsBy::points)
        return slow_point_entries(decision, node);
    if (node.children.size() >= 2)
        return slow_pair_entries(decision, node.id,
                                 slow_judged(decision, node.id, slow_children(node), SlowKind::criteria));
    if (!node.children.empty()) return {};
    if (node.rate == RateBy::pairs && in_play.size() >= 2)
        return slow_pair_entries(decision, node.id, slow_judged_options(decision, node.id, in_play));
    if (node.rate == RateBy::grade && node.worths == WorthsBy::pairs && node.grades.size() >= 2) {
        std::vector<Id> ids;
        for (const Grade& grade : node.grades) ids.push_back(grade.id);
        return slow_pair_entries(decision, node.id, slow_judged(decision, node.id, ids, SlowKind::grades));
    }
    return {};
}

void open_on_leaf(const Decision& decision, const Node& leaf, const SlowResults& results,
                  std::vector<OpenItem>& open) {
    OpenItem item;
    item.criterion = leaf.id;
    if (leaf.rate == RateBy::figure && !leaf.curve) {
        item.kind = OpenKind::curve;
        open.push_back(item);
    }
    for (const Id& option : results.options) {
        item.option = option;
        if (leaf.rate == RateBy::figure && leaf.curve &&
            results.leaves.at(leaf.id).missing.count(option) > 0) {
            item.kind = OpenKind::figure;
            open.push_back(item);
        }
        if (leaf.rate == RateBy::grade && slow_grades(decision, leaf, option).empty()) {
            item.kind = OpenKind::grade;
            open.push_back(item);
        }
    }
    item.option.clear();
    if (leaf.rate == RateBy::grade && leaf.worths == WorthsBy::given)
        for (const Grade& grade : leaf.grades)
            if (!grade.worth) {
                item.kind = OpenKind::worth;
                item.grade = grade.id;
                open.push_back(item);
            }
}

void list_open(const Decision& decision, SlowResults& results) {
    for (const SlowSet& entry : results.sets) {
        if (!entry.by.empty()) continue;
        OpenItem item;
        item.set = entry.set;
        if (entry.from_points && !entry.weights) {
            item.kind = OpenKind::points;
            results.open.push_back(item);
        }
        for (const auto& [a, b] : entry.open) {
            item.kind = OpenKind::judgment;
            item.a = a;
            item.b = b;
            results.open.push_back(item);
        }
    }
    for (const Node* node : slow_nodes(decision))
        if (node->children.empty()) open_on_leaf(decision, *node, results, results.open);
    for (const Id& option : results.options)
        for (const Requirement& requirement : decision.requirements) {
            const MustState state = results.musts.at({option, requirement.id});
            if (state != MustState::unchecked && state != MustState::asked && state != MustState::undecided)
                continue;
            OpenItem item;
            item.kind = OpenKind::requirement;
            item.requirement = requirement.id;
            item.option = option;
            results.open.push_back(item);
        }
}

void rank(SlowResults& results) {
    double total = 0;
    for (const auto& [option, score] : results.scores) {
        total += score;
        int better = 0;
        for (const auto& [other, theirs] : results.scores) better += theirs > score + 1e-9 ? 1 : 0;
        results.ranks[option] = 1 + better;
    }
    if (total > 0) {
        results.shares.emplace();
        for (const auto& [option, score] : results.scores) (*results.shares)[option] = score / total;
    }
    std::vector<double> sorted;
    for (const auto& [option, score] : results.scores) sorted.push_back(score);
    std::sort(sorted.rbegin(), sorted.rend());
    if (sorted.size() >= 2) results.lead_points = 100 * (sorted[0] - sorted[1]);
}

/// Scores with what is missing worth nothing, and worth most.
void find_ranges(SlowResults& results) {
    for (const Id& option : results.options) {
        bool any = false;
        double low = 0;
        double high = 0;
        for (const auto& [id, leaf] : results.leaves) {
            const double weight = results.nodes.at(id).weight;
            const bool missing = leaf.missing.count(option) > 0;
            any = any || missing;
            low += weight * (missing ? 0 : leaf.local.at(option));
            high += weight * (missing ? 1 : leaf.local.at(option));
        }
        if (any) results.ranges[option] = {low, high};
    }
}

} // namespace

SlowResults slow_solve(const Decision& decision) {
    SlowResults results;
    const SlowMusts musts = slow_musts(decision);
    results.options = musts.in_play;
    results.musts = musts.states;
    results.excluded = musts.excluded;

    const SlowStanding standing = slow_standing(decision, results.options, decision.settings.synthesis);
    results.nodes = standing.nodes;
    results.leaves = standing.leaves;
    results.scores = standing.scores;
    for (const Node* node : slow_nodes(decision)) {
        for (const SlowSet& entry : entries_of(decision, *node, results.options))
            results.sets.push_back(entry);
        if (node->children.empty() && node->cost_sheet)
            for (const Option& option : decision.options)
                if (const auto computed = slow_computed_figure(decision, *node, option.id))
                    results.figures[node->id][option.id] = *computed;
    }
    for (const Id& unweighed : standing.unweighed)
        results.provisional = results.provisional || results.nodes.at(unweighed).weight > 0;
    for (const auto& [id, leaf] : results.leaves)
        results.provisional =
            results.provisional || (results.nodes.at(id).weight > 0 && !leaf.missing.empty());

    rank(results);
    if (decision.settings.synthesis == Synthesis::ideal) find_ranges(results);
    list_open(decision, results);
    results.group = slow_group(decision, results);
    return results;
}

} // namespace steelyard::testing
