#include "core/results/solve.hpp"

#include <algorithm>
#include <map>
#include <utility>

#include "core/decision/lookup.hpp"
#include "core/measure/curve.hpp"
#include "core/results/appraise.hpp"
#include "core/results/group.hpp"
#include "core/results/lead.hpp"
#include "core/results/rates.hpp"
#include "core/results/solve_sets.hpp"
#include "core/standing/local_values.hpp"
#include "core/standing/synthesis.hpp"

namespace steelyard {
namespace {

/// Solves one decision, part by part: first who ranks where, then all there is to say of it.
class Solver {
public:
    Solver(const Decision& decision, SolveCache& cache)
        : d_(decision),
          appraiser_(decision, cache),
          sets_(decision, appraiser_.sets(), cache),
          cache_(cache),
          standing_(appraiser_.standing()) {}

    Results run() {
        results_.settings = d_.settings;
        results_.options = standing_.options;
        describe_sets();
        list_musts();
        list_nodes_and_leaves();
        list_scores();
        list_computed_figures();
        order_sets();
        list_open();
        if (results_.first) results_.rates = rates_at(d_, results_, results_.options[*results_.first]);
        results_.lead_money = lead_in_money(d_, results_);
        results_.group = describe_group(d_, appraiser_, cache_, results_);
        return std::move(results_);
    }

private:
    void keep(const Id& node, SetSolution solution) {
        std::move(solution.notices.begin(), solution.notices.end(), std::back_inserter(results_.notices));
        solved_[node] = std::move(solution.entries);
    }

    void describe_sets() {
        for (const auto& placed : placed_nodes(d_.criteria)) {
            const Node& node = *placed.node;
            const bool of_grades = node.is_leaf() && node.rate == RateBy::grade &&
                                   node.worths == WorthsBy::pairs && node.grades.size() >= 2;
            if (node.children.size() >= 2 && node.weights == WeightsBy::points) {
                keep(node.id, sets_.points(node));
            } else if (node.children.size() >= 2 || of_grades) {
                keep(node.id, sets_.pairs(node, set_items(d_, node.id)));
            }
        }
        if (results_.options.size() < 2) return;
        for (const Node* leaf : appraiser_.leaves()) {
            if (leaf->rate == RateBy::pairs) keep(leaf->id, sets_.options(*leaf, results_.options));
        }
    }

    void list_musts() {
        for (const auto& option : d_.options) {
            if (option.withdrawn) continue;
            for (const auto& requirement : d_.requirements) {
                const auto& finding = standing_.musts.at({option.id, requirement.id});
                results_.musts.push_back({requirement.id, option.id, finding.state, finding.value});
                if (finding.state == MustState::failed)
                    results_.excluded.push_back({option.id, requirement.id, finding.value});
            }
        }
    }

    void list_nodes_and_leaves() {
        const std::size_t m = results_.options.size();
        std::vector<double> low(m, 0.0);
        std::vector<double> high(m, 0.0);
        std::vector<bool> ranged(m, false);
        for (const auto& at : weigh_tree(d_.criteria, standing_.criteria)) {
            const bool unweighed = at.node->children.size() >= 2 && !standing_.criteria.at(at.node->id);
            if (unweighed && at.weight > 0) results_.provisional = true;
            results_.nodes.push_back({at.node->id, at.parent == nullptr ? Id{} : at.parent->id, at.depth,
                                      at.node->is_leaf(), at.local, at.weight, std::vector<double>(m, 0.0)});
            if (!at.node->is_leaf()) continue;

            const LocalValues& local = standing_.locals[results_.leaves.size()];
            if (local.all_zero) {
                results_.notices.push_back(
                    {"all-worth-nothing",
                     "On \"" + node_name(d_, at.node->id) + "\" every option is worth nothing.", ""});
            }
            for (std::size_t o = 0; o < m; ++o) {
                const double part = at.weight * local.values[o];
                results_.nodes.back().contribution[o] = part;
                low[o] += local.missing[o] ? 0 : part;
                high[o] += local.missing[o] ? at.weight : part;
                if (local.missing[o]) ranged[o] = true;
                if (local.missing[o] && at.weight > 0) results_.provisional = true;
            }
            results_.leaves.push_back({at.node->id, at.weight, local.values, local.missing,
                                       standing_.worths[results_.leaves.size()].worths});
        }
        for (auto node = results_.nodes.rbegin(); node != results_.nodes.rend(); ++node) {
            const auto parent = std::find_if(results_.nodes.begin(), results_.nodes.end(),
                                             [&](const NodeResult& n) { return n.node == node->parent; });
            if (parent == results_.nodes.end()) continue;
            for (std::size_t o = 0; o < m; ++o) parent->contribution[o] += node->contribution[o];
        }
        if (d_.settings.synthesis != Synthesis::ideal) return;
        for (std::size_t o = 0; o < m; ++o) {
            if (ranged[o]) results_.ranges.push_back({results_.options[o], {low[o], high[o]}});
        }
    }

    void list_scores() {
        results_.scores = standing_.scores;
        results_.ranks = standing_.ranks;
        results_.shares = shares_of(results_.scores);
        results_.first = standing_.first;
        if (results_.first) results_.lead_points = lead_of(*results_.first, results_.scores);
    }

    void list_computed_figures() {
        for (const Node* leaf : appraiser_.leaves()) {
            if (leaf->rate != RateBy::figure || !leaf->cost_sheet) continue;
            ComputedFigures computed{leaf->id, {}};
            for (const auto& option : d_.options) {
                const auto x = appraiser_.figures().of(leaf->id, option.id).value;
                if (!x) continue;
                computed.values.emplace_back(option.id, *x);
                if (leaf->curve && !worth_of(*leaf->curve, *x)) {
                    results_.notices.push_back({"not-positive",
                                                "The cost sheet of \"" + option_name(d_, option.id) +
                                                    "\" on \"" + node_name(d_, leaf->id) +
                                                    "\" comes to 0 or less, which counts as missing under a "
                                                    "proportional curve.",
                                                ""});
                }
            }
            results_.figures.push_back(std::move(computed));
        }
    }

    /// Sets in the order of the tree, whatever order they were solved in.
    void order_sets() {
        for (const auto& placed : placed_nodes(d_.criteria)) {
            const auto found = solved_.find(placed.node->id);
            if (found == solved_.end()) continue;
            std::move(found->second.begin(), found->second.end(), std::back_inserter(results_.sets));
        }
    }

    void list_open() {
        for (const auto& set : results_.sets) {
            if (!set.by.empty()) continue;
            if (set.from_points && !set.weights) {
                results_.open.push_back({.kind = OpenKind::points, .set = set.set});
            }
            for (const auto& [a, b] : set.open) {
                results_.open.push_back({.kind = OpenKind::judgment, .set = set.set, .a = a, .b = b});
            }
        }
        const auto& leaves = appraiser_.leaves();
        for (std::size_t l = 0; l < leaves.size(); ++l) list_open_on(*leaves[l], results_.leaves[l]);
        for (const auto& must : results_.musts) {
            const bool in_play = std::find(results_.options.begin(), results_.options.end(), must.option) !=
                                 results_.options.end();
            const bool open = must.state == MustState::undecided || must.state == MustState::unchecked ||
                              must.state == MustState::asked;
            if (!in_play || !open) continue;
            results_.open.push_back(
                {.kind = OpenKind::requirement, .option = must.option, .requirement = must.requirement});
        }
    }

    void list_open_on(const Node& leaf, const LeafResult& values) {
        if (leaf.rate == RateBy::pairs) return;
        if (leaf.rate == RateBy::figure && !leaf.curve) {
            results_.open.push_back({.kind = OpenKind::curve, .criterion = leaf.id});
            return;
        }
        if (leaf.rate == RateBy::grade && leaf.worths == WorthsBy::given) {
            for (const auto& grade : leaf.grades) {
                if (grade.worth) continue;
                results_.open.push_back({.kind = OpenKind::worth, .criterion = leaf.id, .grade = grade.id});
            }
        }
        const OpenKind kind = leaf.rate == RateBy::figure ? OpenKind::figure : OpenKind::grade;
        for (std::size_t o = 0; o < results_.options.size(); ++o) {
            if (!values.missing[o]) continue;
            // A grade whose worth is missing is given; what is open is its worth or the judgments behind it.
            if (kind == OpenKind::grade && graded(leaf, results_.options[o])) continue;
            results_.open.push_back({.kind = kind, .criterion = leaf.id, .option = results_.options[o]});
        }
    }

    bool graded(const Node& leaf, const Id& option) const {
        const auto at = std::find_if(d_.options.begin(), d_.options.end(),
                                     [&](const Option& candidate) { return candidate.id == option; });
        const auto& grades = appraiser_.grades(leaf.id)[static_cast<std::size_t>(at - d_.options.begin())];
        return grades.agreed || !grades.own.empty();
    }

    const Decision& d_;
    Appraiser appraiser_;
    SetSolver sets_;
    SolveCache& cache_;
    Standing standing_;
    std::map<Id, std::vector<SetResult>> solved_;
    Results results_;
};

} // namespace

Results solve(const Decision& decision, SolveCache& cache) {
    cache.next_solve();
    return Solver(decision, cache).run();
}

Results solve(const Decision& decision) {
    SolveCache cache;
    return solve(decision, cache);
}

} // namespace steelyard
