#include "core/results/solve.hpp"

#include <algorithm>
#include <map>
#include <utility>

#include "core/decision/fingerprint.hpp"
#include "core/decision/lookup.hpp"
#include "core/measure/by_place.hpp"
#include "core/measure/curve.hpp"
#include "core/measure/figures.hpp"
#include "core/measure/grades.hpp"
#include "core/results/lead.hpp"
#include "core/results/rates.hpp"
#include "core/results/solve_sets.hpp"
#include "core/standing/local_values.hpp"
#include "core/standing/synthesis.hpp"

namespace steelyard {
namespace {

/// The largest of some weights becomes 1.
std::vector<std::optional<double>> against_largest(const std::optional<Weights>& weights, std::size_t n) {
    std::vector<std::optional<double>> worths(n);
    if (!weights) return worths;
    const double largest = *std::max_element(weights->begin(), weights->end());
    for (std::size_t i = 0; i < n; ++i) worths[i] = (*weights)[i] / largest;
    return worths;
}

/// Solves one decision, part by part. Parts that do not depend on which options are in play are solved once.
class Solver {
public:
    explicit Solver(const Decision& decision)
        : d_(decision),
          sets_(decision),
          figures_(decision),
          grade_entries_(decision.grades),
          leaves_(leaves(decision.criteria)) {}

    Results run() {
        results_.decision_sha256 = decision_sha256(d_);
        results_.settings = d_.settings;
        solve_criteria_and_grades();
        exclude();
        solve_option_sets();
        synthesise();
        order_sets();
        list_open();
        if (results_.first) results_.rates = rates_at(d_, results_, results_.options[*results_.first]);
        results_.lead_money = lead_in_money(d_, results_);
        return std::move(results_);
    }

private:
    void keep(const Id& node, SetSolution solution) {
        std::move(solution.notices.begin(), solution.notices.end(), std::back_inserter(results_.notices));
        solved_[node] = std::move(solution.entries);
    }

    void solve_criteria_and_grades() {
        for (const auto& placed : placed_nodes(d_.criteria)) {
            const Node& node = *placed.node;
            if (node.children.size() >= 2) {
                SetSolution solution = node.weights == WeightsBy::points
                                           ? sets_.points(node)
                                           : sets_.pairs(node, set_items(d_, node.id));
                criteria_weights_[node.id] = solution.group().weights;
                keep(node.id, std::move(solution));
            } else if (node.is_leaf() && node.rate == RateBy::grade) {
                solve_grades(node);
            }
        }
    }

    void solve_grades(const Node& leaf) {
        auto& worths = grade_worths_[leaf.id];
        if (leaf.worths == WorthsBy::given) {
            for (const auto& grade : leaf.grades) worths.push_back(grade.worth);
        } else if (leaf.grades.size() >= 2) {
            SetSolution solution = sets_.pairs(leaf, set_items(d_, leaf.id));
            worths = against_largest(solution.group().weights, leaf.grades.size());
            keep(leaf.id, std::move(solution));
        } else {
            worths.assign(leaf.grades.size(), 1.0);
        }
    }

    GradeFinding grade_of(const Node& leaf, const Id& option) const {
        return find_grade_worth(d_.people, leaf, option, grade_entries_.at(leaf.id, option),
                                grade_worths_.at(leaf.id));
    }

    /// Worths of the options on a leaf. `pairs`: the solution of the leaf's own set, where it has one.
    LeafWorths worths_on(const Node& leaf, const std::vector<Id>& options, const SetResult* pairs) const {
        LeafWorths out;
        out.worths.resize(options.size());
        switch (leaf.rate) {
        case RateBy::pairs:
            for (std::size_t o = 0; o < options.size(); ++o) {
                if (pairs == nullptr) {
                    out.worths[o] = 1; // Alone on the leaf.
                } else if (pairs->weights) {
                    const auto at = std::find(pairs->items.begin(), pairs->items.end(), options[o]);
                    out.worths[o] = (*pairs->weights)[static_cast<std::size_t>(at - pairs->items.begin())];
                }
            }
            break;
        case RateBy::figure:
            if (!leaf.curve) break;
            out.anchored = is_anchored(*leaf.curve);
            for (std::size_t o = 0; o < options.size(); ++o) {
                if (const auto x = figures_.of(leaf.id, options[o]).value)
                    out.worths[o] = worth_of(*leaf.curve, *x);
            }
            break;
        case RateBy::grade:
            out.anchored = true;
            for (std::size_t o = 0; o < options.size(); ++o) {
                out.worths[o] = grade_of(leaf, options[o]).worth;
            }
            break;
        }
        return out;
    }

    LocalValues locals_on(const Node& leaf, const std::vector<Id>& options, Synthesis synthesis) const {
        if (leaf.rate == RateBy::pairs && options.size() >= 2) {
            const SetSolution solution = sets_.options(leaf, options);
            return local_values(worths_on(leaf, options, &solution.group()), synthesis);
        }
        return local_values(worths_on(leaf, options, nullptr), synthesis);
    }

    void note_must(const Requirement& requirement, const Id& option, const MustFinding& finding) {
        findings_[{option, requirement.id}] =
            requirement.waived ? MustFinding{MustState::waived, finding.value} : finding;
    }

    /// Finds how each option stands to each requirement, and who is left in play.
    void exclude() {
        std::vector<Id> present;
        for (const auto& option : d_.options) {
            if (!option.withdrawn) present.push_back(option.id);
        }
        std::vector<Id> field; // Those that meet all requirements but the ones on a node's worth.
        for (const auto& option : present) {
            bool failed = false;
            for (const auto& requirement : d_.requirements) {
                if (!requirement.node.empty()) continue;
                note_must(requirement, option, find_must(d_, figures_, requirement, option));
                failed = failed || findings_.at({option, requirement.id}).state == MustState::failed;
            }
            if (!failed) field.push_back(option);
        }
        for (const auto& requirement : d_.requirements) {
            if (requirement.node.empty()) continue;
            for (const auto& option : present) note_must(requirement, option, {});
            const auto worths = node_worths(requirement.node, field);
            for (std::size_t o = 0; o < field.size(); ++o) {
                const auto& w = worths[o];
                MustState state = against_limits(requirement, w.low, w.high);
                if (!w.weighed && state != MustState::unchecked) state = MustState::undecided;
                note_must(requirement, field[o], {state, w.value});
            }
        }
        for (const auto& option : present) {
            bool failed = false;
            for (const auto& requirement : d_.requirements) {
                const auto& finding = findings_.at({option, requirement.id});
                results_.musts.push_back({requirement.id, option, finding.state, finding.value});
                if (finding.state != MustState::failed) continue;
                results_.excluded.push_back({option, requirement.id, finding.value});
                failed = true;
            }
            if (!failed) results_.options.push_back(option);
        }
    }

    struct NodeWorth {
        double value = 0;
        double low = 0;  ///< With what is missing at 0.
        double high = 0; ///< With what is missing at 1.
        bool weighed = true;
    };

    /// The worth of a node for each option of the field, in ideal synthesis.
    std::vector<NodeWorth> node_worths(const Id& id, const std::vector<Id>& field) const {
        std::vector<NodeWorth> worths(field.size());
        for (const auto& at : weigh_tree(*find_node(d_.criteria, id), criteria_weights_)) {
            if (at.node->children.size() >= 2 && !criteria_weights_.at(at.node->id)) {
                for (auto& worth : worths) worth.weighed = false;
            }
            if (!at.node->is_leaf()) continue;
            const LocalValues local = locals_on(*at.node, field, Synthesis::ideal);
            for (std::size_t o = 0; o < field.size(); ++o) {
                worths[o].value += at.weight * local.values[o];
                worths[o].low += at.weight * (local.missing[o] ? 0 : local.values[o]);
                worths[o].high += at.weight * (local.missing[o] ? 1 : local.values[o]);
            }
        }
        return worths;
    }

    void solve_option_sets() {
        if (results_.options.size() < 2) return;
        for (const Node* leaf : leaves_) {
            if (leaf->rate == RateBy::pairs) keep(leaf->id, sets_.options(*leaf, results_.options));
        }
    }

    void synthesise() {
        const std::size_t m = results_.options.size();
        const bool ideal = d_.settings.synthesis == Synthesis::ideal;
        const auto tree = weigh_tree(d_.criteria, criteria_weights_);
        results_.scores.assign(m, 0.0);
        std::vector<double> low(m, 0.0);
        std::vector<double> high(m, 0.0);
        std::vector<bool> ranged(m, false);
        for (const auto& at : tree) {
            const bool unweighed = at.node->children.size() >= 2 && !criteria_weights_.at(at.node->id);
            if (unweighed && at.weight > 0) results_.provisional = true;
            results_.nodes.push_back({at.node->id, at.parent == nullptr ? Id{} : at.parent->id, at.depth,
                                      at.node->is_leaf(), at.local, at.weight, std::vector<double>(m, 0.0)});
            if (!at.node->is_leaf()) continue;

            const auto set = solved_.find(at.node->id);
            const SetResult* pairs =
                at.node->rate == RateBy::pairs && set != solved_.end() ? &set->second.front() : nullptr;
            LeafWorths worths = worths_on(*at.node, results_.options, pairs);
            const LocalValues local = local_values(worths, d_.settings.synthesis);
            if (local.all_zero) {
                results_.notices.push_back(
                    {"all-worth-nothing",
                     "On \"" + node_name(d_, at.node->id) + "\" every option is worth nothing.", ""});
            }
            for (std::size_t o = 0; o < m; ++o) {
                const double part = at.weight * local.values[o];
                results_.scores[o] += part;
                results_.nodes.back().contribution[o] = part;
                low[o] += local.missing[o] ? 0 : part;
                high[o] += local.missing[o] ? at.weight : part;
                if (local.missing[o]) ranged[o] = true;
                if (local.missing[o] && at.weight > 0) results_.provisional = true;
            }
            results_.leaves.push_back(
                {at.node->id, at.weight, local.values, local.missing, std::move(worths.worths)});
        }
        for (auto node = results_.nodes.rbegin(); node != results_.nodes.rend(); ++node) {
            const auto parent = std::find_if(results_.nodes.begin(), results_.nodes.end(),
                                             [&](const NodeResult& n) { return n.node == node->parent; });
            if (parent == results_.nodes.end()) continue;
            for (std::size_t o = 0; o < m; ++o) parent->contribution[o] += node->contribution[o];
        }
        for (std::size_t o = 0; ideal && o < m; ++o) {
            if (ranged[o]) results_.ranges.push_back({results_.options[o], {low[o], high[o]}});
        }
        results_.ranks = rank(results_.scores);
        results_.shares = shares_of(results_.scores);
        if (m > 0) {
            const auto best = std::max_element(results_.scores.begin(), results_.scores.end());
            results_.first = static_cast<std::size_t>(best - results_.scores.begin());
        }
        if (m > 1) {
            std::vector<double> sorted = results_.scores;
            std::partial_sort(sorted.begin(), sorted.begin() + 2, sorted.end(), std::greater<>());
            results_.lead_points = 100 * (sorted[0] - sorted[1]);
        }
        for (const Node* leaf : leaves_) {
            if (leaf->rate != RateBy::figure || !leaf->cost_sheet) continue;
            ComputedFigures computed{leaf->id, {}};
            for (const auto& option : d_.options) {
                const auto x = figures_.of(leaf->id, option.id).value;
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
        for (std::size_t l = 0; l < leaves_.size(); ++l) list_open_on(*leaves_[l], results_.leaves[l]);
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
            if (kind == OpenKind::grade && grade_of(leaf, results_.options[o]).given) continue;
            results_.open.push_back({.kind = kind, .criterion = leaf.id, .option = results_.options[o]});
        }
    }

    const Decision& d_;
    SetSolver sets_;
    Figures figures_;
    ByPlace<GradeEntry> grade_entries_;
    std::vector<const Node*> leaves_;
    CriteriaWeights criteria_weights_;
    std::map<Id, std::vector<std::optional<double>>> grade_worths_;
    std::map<std::pair<Id, Id>, MustFinding> findings_; ///< By option and requirement.
    std::map<Id, std::vector<SetResult>> solved_;
    Results results_;
};

} // namespace

Results solve(const Decision& decision) {
    return Solver(decision).run();
}

} // namespace steelyard
