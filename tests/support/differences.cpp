#include "tests/support/differences.hpp"

#include <algorithm>
#include <cmath>
#include <sstream>

#include "tests/support/slow_standing.hpp"

namespace steelyard::testing {
namespace {

constexpr double exact_tolerance = 1e-9;
constexpr double completed_tolerance = 1e-8;

std::string shown(double value) {
    std::ostringstream out;
    out.precision(17);
    out << value;
    return out.str();
}

std::string shown(const std::string& value) {
    return value;
}
std::string shown(bool value) {
    return value ? "yes" : "no";
}
std::string shown(int value) {
    return std::to_string(value);
}
std::string shown(std::size_t value) {
    return std::to_string(value);
}
template<class T>
std::string shown(const T& list) {
    std::string text = "[";
    for (const auto& each : list) text += shown(each) + " ";
    return text + "]";
}

class Comparison {
public:
    void number(const std::string& what, double core, double slow, double tolerance) {
        const double size = std::max({1.0, std::abs(core), std::abs(slow)});
        if (!std::isfinite(core) || !(std::abs(core - slow) <= tolerance * size))
            found.push_back(what + ": " + shown(core) + ", slow solver " + shown(slow));
    }
    void maybe(const std::string& what, const std::optional<double>& core, const std::optional<double>& slow,
               double tolerance) {
        same(what + " exists", core.has_value(), slow.has_value());
        if (core && slow) number(what, *core, *slow, tolerance);
    }
    template<class T>
    void same(const std::string& what, const T& core, const T& slow) {
        if (core != slow) found.push_back(what + ": " + shown(core) + ", slow solver " + shown(slow));
    }
    std::vector<std::string> found;
};

void compare_weights(Comparison& compare, const std::string& what, const std::vector<Id>& items,
                     const std::optional<std::vector<double>>& core, const std::optional<SlowWeights>& slow,
                     double tolerance) {
    compare.same(what + " exists", core.has_value(), slow.has_value());
    if (!core || !slow) return;
    compare.same(what + " size", core->size(), items.size());
    for (std::size_t i = 0; i < std::min(core->size(), items.size()); ++i)
        compare.number(what + " of " + items[i], (*core)[i], slow->at(items[i]), tolerance);
}

void compare_misfits(Comparison& compare, const std::string& where, const SetResult& core,
                     const SlowSet& slow) {
    compare.same(where + "misfits", core.misfits.size(), slow.misfits.size());
    double before = 0;
    for (std::size_t i = 0; i < core.misfits.size(); ++i) {
        const Misfit& misfit = core.misfits[i];
        const std::string what = where + misfit.a + "-" + misfit.b;
        const auto other = slow.misfits.find({misfit.a, misfit.b});
        if (other == slow.misfits.end()) {
            compare.found.push_back(what + " is no misfit of the slow solver's");
            continue;
        }
        compare.number(what + " given", misfit.given, other->second.given, exact_tolerance);
        // Without its pair every set is an incomplete one.
        compare.maybe(what + " implied", misfit.implied, other->second.implied, completed_tolerance);
        if (i > 0 && other->second.size > before + 10 * completed_tolerance)
            compare.found.push_back(what + " stands after a smaller misfit");
        before = other->second.size;
    }
}

void compare_set(Comparison& compare, const SetResult& core, const SlowSet& slow, double tolerance) {
    const std::string where = "set " + slow.set + " by '" + slow.by + "' ";
    compare.same(where + "from points", core.from_points, slow.from_points);
    compare.same(where + "items", core.items, slow.items);
    if (core.items != slow.items) return;
    compare.same(where + "missing", core.missing, slow.missing);
    if (slow.by.empty()) compare.same(where + "open", core.open, slow.open);
    compare_weights(compare, where + "weights", slow.items, core.weights, slow.weights, tolerance);
    compare_weights(compare, where + "eigenvector", slow.items, core.eigenvector, slow.eigenvector,
                    tolerance);
    compare_weights(compare, where + "geometric mean", slow.items, core.geometric_mean, slow.geometric_mean,
                    exact_tolerance);
    compare_weights(compare, where + "columns", slow.items, core.column_average, slow.column_average,
                    exact_tolerance);

    const SlowIndices& indices = slow.indices;
    compare.maybe(where + "lambda_max", core.lambda_max, indices.lambda_max, exact_tolerance);
    if (slow.lambda_hand)
        compare.maybe(where + "lambda by hand", core.lambda_hand, slow.lambda_hand, exact_tolerance);
    compare.maybe(where + "ci", core.ci, indices.ci, exact_tolerance);
    compare.maybe(where + "ri", core.ri, indices.ri, exact_tolerance);
    compare.maybe(where + "cr", core.cr, indices.cr, exact_tolerance);
    compare.maybe(where + "gci", core.gci, indices.gci, exact_tolerance);
    compare.maybe(where + "koczkodaj", core.koczkodaj, indices.koczkodaj, exact_tolerance);
    // Where every triad agrees there is no worst one to name.
    if (indices.koczkodaj.value_or(0) > 1e-9)
        compare.same(where + "worst triad", core.worst_triad.value_or(std::array<Id, 3>()),
                     *indices.worst_triad);
    compare.same(where + "cycles", core.cycles, indices.cycles);
    compare.same(where + "tied cycles", core.tied_cycles, indices.tied_cycles);
    compare.maybe(where + "zeta", core.zeta, indices.zeta, exact_tolerance);
    if (!slow.parts.empty()) compare.same(where + "parts", core.parts, slow.parts);
    compare_misfits(compare, where, core, slow);
}

bool completed(const SlowSet& entry) {
    return !entry.missing.empty();
}

void compare_sets(Comparison& compare, const Results& core, const SlowResults& slow) {
    std::map<SlowPair, const SetResult*> by_place;
    for (const SetResult& entry : core.sets) by_place[{entry.set, entry.by}] = &entry;
    compare.same("entries of sets", core.sets.size(), slow.sets.size());
    for (const SlowSet& entry : slow.sets) {
        const auto found = by_place.find({entry.set, entry.by});
        if (found == by_place.end()) {
            compare.found.push_back("set " + entry.set + " by '" + entry.by + "' is not there");
            continue;
        }
        // The group's weights may come from judges whose sets were completed although the group's is
        // complete.
        const bool any = std::any_of(slow.sets.begin(), slow.sets.end(), [&](const SlowSet& other) {
            return other.set == entry.set && completed(other) && (entry.by.empty() || other.by == entry.by);
        });
        compare_set(compare, *found->second, entry, any ? completed_tolerance : exact_tolerance);
        const bool told = std::any_of(core.notices.begin(), core.notices.end(),
                                      [](const Notice& notice) { return notice.code == "whole-set"; });
        if (entry.whole && !told)
            compare.found.push_back("set " + entry.set + ": no notice that all options were used");
    }
}

void list_depths(const Node& node, int depth, std::map<Id, int>& depths) {
    depths[node.id] = depth;
    for (const Node& child : node.children) list_depths(child, depth + 1, depths);
}

void compare_nodes(Comparison& compare, const Decision& decision, const Results& core,
                   const SlowResults& slow, double tolerance) {
    std::vector<Id> order;
    for (const Node* node : slow_nodes(decision)) order.push_back(node->id);
    std::vector<Id> listed;
    for (const NodeResult& node : core.nodes) listed.push_back(node.node);
    compare.same("nodes", listed, order);
    if (listed != order) return;
    // The root may count as 0 or as 1: what matters is that each level counts one more.
    std::map<Id, int> depths;
    list_depths(decision.criteria, core.nodes.front().depth, depths);
    for (const NodeResult& node : core.nodes) {
        const SlowNode& other = slow.nodes.at(node.node);
        const std::string where = "node " + node.node + " ";
        compare.same(where + "parent", node.parent, other.parent);
        compare.same(where + "depth", node.depth, depths.at(node.node));
        compare.same(where + "leaf", node.leaf, other.leaf);
        compare.number(where + "local weight", node.local_weight, other.local_weight, tolerance);
        compare.number(where + "weight", node.weight, other.weight, tolerance);
        compare.same(where + "contributions", node.contribution.size(), slow.options.size());
        for (std::size_t i = 0; i < std::min(node.contribution.size(), slow.options.size()); ++i)
            compare.number(where + "contribution to " + slow.options[i], node.contribution[i],
                           other.contribution.at(slow.options[i]), tolerance);
    }
}

void compare_leaves(Comparison& compare, const Results& core, const SlowResults& slow, double tolerance) {
    compare.same("leaves", core.leaves.size(), slow.leaves.size());
    for (const LeafResult& leaf : core.leaves) {
        const std::string where = "leaf " + leaf.leaf + " ";
        const auto other = slow.leaves.find(leaf.leaf);
        if (other == slow.leaves.end() || leaf.local.size() != slow.options.size() ||
            leaf.missing.size() != slow.options.size()) {
            compare.found.push_back(where + "is unknown or of another size");
            continue;
        }
        compare.number(where + "weight", leaf.weight, slow.nodes.at(leaf.leaf).weight, tolerance);
        for (std::size_t i = 0; i < slow.options.size(); ++i) {
            const Id& option = slow.options[i];
            compare.number(where + "local value of " + option, leaf.local[i], other->second.local.at(option),
                           tolerance);
            const bool missing = leaf.missing[i];
            compare.same(where + "missing " + option, missing, other->second.missing.count(option) > 0);
        }
    }
    std::size_t computed = 0;
    for (const ComputedFigures& figures : core.figures)
        for (const auto& [option, value] : figures.values) {
            ++computed;
            const std::string what = "figure " + figures.leaf + " of " + option;
            const auto leaf = slow.figures.find(figures.leaf);
            if (leaf == slow.figures.end() || leaf->second.count(option) == 0)
                compare.found.push_back(what + " cannot be computed");
            else
                compare.number(what, value, leaf->second.at(option), exact_tolerance);
        }
    std::size_t expected = 0;
    for (const auto& [leaf, values] : slow.figures) expected += values.size();
    compare.same("computed figures", computed, expected);
}

void compare_scores(Comparison& compare, const Results& core, const SlowResults& slow, double tolerance) {
    const std::size_t count = slow.options.size();
    compare.same("scores", core.scores.size(), count);
    compare.same("ranks", core.ranks.size(), count);
    if (count > 0) compare.same("shares exist", core.shares.has_value(), slow.shares.has_value());
    if (core.scores.size() != count || core.ranks.size() != count) return;
    double best = 0;
    for (std::size_t i = 0; i < count; ++i) {
        const Id& option = slow.options[i];
        best = std::max(best, slow.scores.at(option));
        compare.number("score of " + option, core.scores[i], slow.scores.at(option), tolerance);
        compare.same("rank of " + option, core.ranks[i], slow.ranks.at(option));
        if (core.shares && slow.shares)
            compare.number("share of " + option, core.shares->at(i), slow.shares->at(option), tolerance);
    }
    compare.same("first exists", core.first.has_value(), count > 0);
    // Which of two equals comes first may hinge on the last bit.
    if (core.first && (*core.first >= count || slow.scores.at(slow.options[*core.first]) < best - tolerance))
        compare.found.push_back("first place goes to number " + std::to_string(*core.first));
    compare.maybe("lead", core.lead_points, slow.lead_points, 100 * tolerance);
    compare.same("provisional", core.provisional, slow.provisional);
    compare.same("ranges", core.ranges.size(), slow.ranges.size());
    for (const auto& [option, range] : core.ranges) {
        const auto other = slow.ranges.find(option);
        if (other == slow.ranges.end()) {
            compare.found.push_back("range of " + option + " is one too many");
            continue;
        }
        compare.number("low end of " + option, range[0], other->second[0], tolerance);
        compare.number("high end of " + option, range[1], other->second[1], tolerance);
    }
}

void compare_musts(Comparison& compare, const Results& core, const SlowResults& slow) {
    compare.same("musts", core.musts.size(), slow.musts.size());
    for (const MustResult& must : core.musts) {
        const std::string what = "must " + must.requirement + " of " + must.option;
        const auto other = slow.musts.find({must.option, must.requirement});
        if (other == slow.musts.end())
            compare.found.push_back(what + " is one too many");
        else
            compare.same(what, static_cast<int>(must.state), static_cast<int>(other->second));
    }
    compare.same("excluded", core.excluded.size(), slow.excluded.size());
    for (std::size_t i = 0; i < std::min(core.excluded.size(), slow.excluded.size()); ++i) {
        const std::string what = "exclusion " + std::to_string(i);
        compare.same(what + " option", core.excluded[i].option, slow.excluded[i].option);
        compare.same(what + " requirement", core.excluded[i].requirement, slow.excluded[i].requirement);
        // A node's worth comes from sets of more options than are in play at last; those may have been
        // completed.
        compare.maybe(what + " value", core.excluded[i].value, slow.excluded[i].value, completed_tolerance);
    }
}

/// An open item in words, so that lists of them can be compared and shown.
std::string told(const OpenItem& item) {
    return std::to_string(static_cast<int>(item.kind)) + " set " + item.set + " a " + item.a + " b " +
           item.b + " criterion " + item.criterion + " option " + item.option + " grade " + item.grade +
           " requirement " + item.requirement;
}

/// Open items are listed by sets, then by leaves, then by requirements.
int phase_of(OpenKind kind) {
    if (kind == OpenKind::judgment || kind == OpenKind::points) return 0;
    return kind == OpenKind::requirement ? 2 : 1;
}

void compare_open(Comparison& compare, const Results& core, const SlowResults& slow) {
    // Sets are in tree order and their pairs in item order; within the other phases no order is laid down.
    const auto listed = [](const std::vector<OpenItem>& items, int phase) {
        std::vector<std::string> texts;
        for (const OpenItem& item : items)
            if (phase_of(item.kind) == phase) texts.push_back(told(item));
        if (phase > 0) std::sort(texts.begin(), texts.end());
        return texts;
    };
    for (int phase = 0; phase < 3; ++phase)
        compare.same("open", listed(core.open, phase), listed(slow.open, phase));
    for (std::size_t i = 1; i < core.open.size(); ++i)
        if (phase_of(core.open[i].kind) < phase_of(core.open[i - 1].kind))
            compare.found.push_back("open: " + told(core.open[i]) + " stands too late");
}

void compare_spread(Comparison& compare, const Spread& core, const SlowSpread& slow) {
    const std::string where = "spread " + slow.set + " " + slow.a + "-" + slow.b + " ";
    compare.same(where + "place", std::vector<Id>{core.set, core.a, core.b},
                 std::vector<Id>{slow.set, slow.a, slow.b});
    compare.number(where + "gsd", core.gsd, slow.gsd, exact_tolerance);
    compare.same(where + "sides", std::vector<int>{core.in_favour, core.equal, core.against},
                 std::vector<int>{slow.in_favour, slow.equal, slow.against});
    const auto logarithm = [&](const Id& judge) { return std::log(slow.ratios.at(judge)); };
    double furthest = 0;
    for (const auto& [p, r] : slow.ratios)
        for (const auto& [q, s] : slow.ratios)
            furthest = std::max(furthest, std::abs(logarithm(p) - logarithm(q)));
    compare.number(where + "furthest", std::abs(logarithm(core.furthest[0]) - logarithm(core.furthest[1])),
                   furthest, exact_tolerance);
    compare.same(where + "two judges", core.furthest[0] < core.furthest[1], true); // p1, p2 and so on.
}

void compare_group(Comparison& compare, const Results& core, const SlowResults& slow) {
    compare.same("group exists", core.group.has_value(), slow.group.has_value());
    if (!core.group || !slow.group) return;
    compare.same("judges", core.group->judges, slow.group->judges);
    compare.same("spreads", core.group->spreads.size(), slow.group->spreads.size());
    if (core.group->judges != slow.group->judges || core.group->spreads.size() != slow.group->spreads.size())
        return;
    for (std::size_t i = 0; i < slow.group->spreads.size(); ++i)
        compare_spread(compare, core.group->spreads[i], slow.group->spreads[i]);
    // With fewer answers more sets are incomplete.
    for (const JudgeRanking& ranking : core.group->rankings)
        for (std::size_t o = 0; o < slow.options.size(); ++o)
            compare.number("score of " + slow.options[o] + " by " + ranking.person, ranking.scores[o],
                           slow.group->scores.at(ranking.person).at(slow.options[o]), completed_tolerance);
    for (const WithoutJudge& without : core.group->without) {
        std::map<Id, int> ranks;
        for (std::size_t o = 0; o < without.options.size(); ++o) ranks[without.options[o]] = without.ranks[o];
        const std::map<Id, int>& expected = slow.group->without.at(without.person);
        compare.same("ranks without " + without.person, ranks == expected, true);
        bool moves = !expected.empty();
        if (core.first) {
            const auto rank = expected.find(core.options[*core.first]);
            moves = rank == expected.end() || rank->second != 1;
        }
        compare.same("first place moves without " + without.person, without.first_moves, moves);
    }
}

} // namespace

std::vector<std::string> differences(const Decision& decision, const Results& core, const SlowResults& slow) {
    Comparison compare;
    compare.same("settings kept", core.settings == decision.settings, true);
    compare.same("options in play", core.options, slow.options);
    compare_sets(compare, core, slow);
    const bool any_completed = std::any_of(slow.sets.begin(), slow.sets.end(), completed);
    const double tolerance = any_completed ? completed_tolerance : exact_tolerance;
    if (core.options == slow.options) {
        compare_nodes(compare, decision, core, slow, tolerance);
        compare_leaves(compare, core, slow, tolerance);
        compare_scores(compare, core, slow, tolerance);
        compare_group(compare, core, slow);
    }
    compare_musts(compare, core, slow);
    compare_open(compare, core, slow);
    return compare.found;
}

std::vector<std::string> correction_differences(const Decision& decision, const Results& core,
                                                const SlowResults& slow) {
    Comparison compare;
    std::map<Id, int> judges;
    for (const SlowSet& entry : slow.sets) judges[entry.set] += entry.by.empty() ? 0 : 1;
    for (std::size_t k = 0; k < std::min(core.sets.size(), slow.sets.size()); ++k) {
        const SetResult& entry = core.sets[k];
        const SlowSet& other = slow.sets[k];
        const SlowIndices& indices = other.indices;
        const std::string where = "set " + other.set + " by '" + other.by + "' ";
        compare.same(where + "entry", entry.set + "/" + entry.by, other.set + "/" + other.by);
        const auto n = static_cast<double>(other.items.size());
        double before = 0;
        for (const Misfit& misfit : entry.misfits) {
            const SlowMisfit& slow_misfit = other.misfits.at({misfit.a, misfit.b});
            const std::string what = where + misfit.a + "-" + misfit.b;
            compare.maybe(what + " best", misfit.best, slow_misfit.best, completed_tolerance);
            std::optional<double> ratio;
            if (indices.ri)
                ratio =
                    (slow_misfit.lambda_at_best.value_or(*indices.lambda_max) - n) / (n - 1) / *indices.ri;
            compare.maybe(what + " CR at best", misfit.cr_at_best, ratio, exact_tolerance);
            if (ratio && *ratio < before - exact_tolerance)
                compare.found.push_back(what + " stands too late");
            before = ratio.value_or(0);
        }
        compare.same(where + "fewest changes exist", entry.fewest_changes.has_value(),
                     indices.cr.has_value() && (!other.by.empty() || judges[other.set] < 2));
        if (entry.fewest_changes)
            compare.same(where + "changes needed", !entry.fewest_changes->changes.empty(),
                         *indices.cr > decision.settings.limit + 1e-9);
    }
    return compare.found;
}

} // namespace steelyard::testing
