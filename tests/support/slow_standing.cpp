#include "tests/support/slow_standing.hpp"

#include <algorithm>

#include "tests/support/slow_sets.hpp"
#include "tests/support/slow_values.hpp"

namespace steelyard::testing {
namespace {

void list_nodes(const Node& node, std::vector<const Node*>& nodes) {
    nodes.push_back(&node);
    for (const Node& child : node.children) list_nodes(child, nodes);
}

const Node& node_named(const Decision& decision, const Id& id) {
    for (const Node* node : slow_nodes(decision))
        if (node->id == id) return *node;
    return decision.criteria; // a valid decision names no other
}

/// Gives the children their weights, and counts them equally where nothing gives any.
void weigh_below(const Decision& decision, const Node& node, SlowStanding& standing) {
    std::optional<SlowWeights> weights;
    if (node.children.size() == 1)
        weights = SlowWeights{{node.children.front().id, 1.0}};
    else if (node.children.size() > 1)
        weights = slow_criteria_weights(decision, node);
    if (node.children.size() > 1 && !weights) standing.unweighed.insert(node.id);
    for (const Node& child : node.children) {
        SlowNode& below = standing.nodes[child.id];
        below.parent = node.id;
        below.leaf = child.children.empty();
        below.local_weight = weights ? weights->at(child.id) : 1 / static_cast<double>(node.children.size());
        below.weight = standing.nodes.at(node.id).weight * below.local_weight;
        weigh_below(decision, child, standing);
    }
}

/// The node's worth to one option: weights from the node downwards, in place of missing values `instead` if
/// given.
double worth_below(const SlowStanding& standing, const Node& node, const Id& option,
                   std::optional<double> instead) {
    if (node.children.empty()) {
        const SlowLeaf& leaf = standing.leaves.at(node.id);
        return instead && leaf.missing.count(option) > 0 ? *instead : leaf.local.at(option);
    }
    double worth = 0;
    for (const Node& child : node.children)
        worth += standing.nodes.at(child.id).local_weight * worth_below(standing, child, option, instead);
    return worth;
}

bool weighed_below(const SlowStanding& standing, const Node& node) {
    std::vector<const Node*> nodes;
    list_nodes(node, nodes);
    return std::none_of(nodes.begin(), nodes.end(),
                        [&](const Node* each) { return standing.unweighed.count(each->id) > 0; });
}

struct Limits {
    std::optional<double> at_least;
    std::optional<double> at_most;
};

MustState against(const Limits& limits, double low, double high) {
    if ((limits.at_least && high < *limits.at_least) || (limits.at_most && low > *limits.at_most))
        return MustState::failed;
    if ((limits.at_least && low < *limits.at_least) || (limits.at_most && high > *limits.at_most))
        return MustState::undecided;
    return MustState::met;
}

struct Finding {
    MustState state = MustState::unchecked;
    std::optional<double> value;
};

MustState stated(const Check& check) {
    switch (check.state) {
    case CheckState::met: return MustState::met;
    case CheckState::failed: return MustState::failed;
    case CheckState::asked: return MustState::asked;
    case CheckState::unstated: break;
    }
    return MustState::unchecked;
}

/// A requirement on figures or checks, for one option.
Finding finding(const Decision& decision, const Requirement& requirement, const Id& option) {
    if (requirement.waived) return {MustState::waived, std::nullopt};
    const Limits limits{requirement.at_least, requirement.at_most};
    const bool limited = requirement.at_least || requirement.at_most;
    if (!requirement.criterion.empty()) {
        const auto figure = slow_figure(decision, node_named(decision, requirement.criterion), option);
        if (!figure || !limited) return {};
        return {against(limits, figure->low, figure->high), figure->value};
    }
    const Check* last = nullptr;
    for (const Check& check : decision.checks)
        if (check.requirement == requirement.id && check.option == option) last = &check;
    if (last == nullptr || (!requirement.yes_no && !limited)) return {};
    if (requirement.yes_no || (!last->value && !(last->low && last->high)))
        return {stated(*last), std::nullopt};
    const double low = last->low ? *last->low : *last->value;
    const double high = last->high ? *last->high : *last->value;
    return {against(limits, low, high), last->value ? *last->value : (low + high) / 2};
}

/// A requirement on a node's worth, for one option of the field.
Finding finding_at_node(const Decision& decision, const Requirement& requirement, const Id& option,
                        const SlowStanding& field) {
    if (requirement.waived) return {MustState::waived, std::nullopt};
    Limits limits{requirement.at_least, requirement.at_most};
    if (requirement.min_worth)
        limits.at_least = std::max(*requirement.min_worth, limits.at_least.value_or(0));
    if (!limits.at_least && !limits.at_most) return {};
    const Node& node = node_named(decision, requirement.node);
    const double value = worth_below(field, node, option, std::nullopt);
    if (!weighed_below(field, node)) return {MustState::undecided, value};
    return {against(limits, worth_below(field, node, option, 0.0), worth_below(field, node, option, 1.0)),
            value};
}

} // namespace

std::vector<const Node*> slow_nodes(const Decision& decision) {
    std::vector<const Node*> nodes;
    list_nodes(decision.criteria, nodes);
    return nodes;
}

SlowStanding slow_standing(const Decision& decision, const std::vector<Id>& in_play, Synthesis synthesis) {
    SlowStanding standing;
    standing.nodes[decision.criteria.id].leaf = decision.criteria.children.empty();
    weigh_below(decision, decision.criteria, standing);
    for (const Node* node : slow_nodes(decision))
        if (node->children.empty())
            standing.leaves[node->id] = slow_leaf(decision, *node, in_play, synthesis);
    for (const Node* node : slow_nodes(decision))
        for (const Id& option : in_play)
            standing.nodes[node->id].contribution[option] =
                standing.nodes.at(node->id).weight * worth_below(standing, *node, option, std::nullopt);
    for (const Id& option : in_play)
        standing.scores[option] = worth_below(standing, decision.criteria, option, std::nullopt);
    return standing;
}

SlowMusts slow_musts(const Decision& decision) {
    SlowMusts musts;
    std::map<std::array<Id, 2>, Finding> findings;
    std::vector<Id> field;
    for (const Option& option : decision.options) {
        if (option.withdrawn) continue;
        bool fails = false;
        for (const Requirement& requirement : decision.requirements) {
            Finding& found = findings[{option.id, requirement.id}];
            if (requirement.node.empty())
                found = finding(decision, requirement, option.id);
            else if (requirement.waived)
                found.state = MustState::waived;
            fails = fails || found.state == MustState::failed;
        }
        if (!fails) field.push_back(option.id);
    }
    const SlowStanding standing = slow_standing(decision, field, Synthesis::ideal);
    for (const Id& option : field) {
        bool fails = false;
        for (const Requirement& requirement : decision.requirements)
            if (!requirement.node.empty()) {
                Finding& found = findings[{option, requirement.id}];
                found = finding_at_node(decision, requirement, option, standing);
                fails = fails || found.state == MustState::failed;
            }
        if (!fails) musts.in_play.push_back(option);
    }
    for (const Option& option : decision.options)
        for (const Requirement& requirement : decision.requirements)
            if (const auto found = findings.find({option.id, requirement.id}); found != findings.end()) {
                musts.states[found->first] = found->second.state;
                if (found->second.state == MustState::failed)
                    musts.excluded.push_back({option.id, requirement.id, found->second.value});
            }
    return musts;
}

} // namespace steelyard::testing
