#include "core/results/solve_sets.hpp"

#include <algorithm>
#include <set>
#include <utility>

#include "core/decision/lookup.hpp"

namespace steelyard {
namespace {

std::optional<Weights>& by_method(SetResult& result, Method method) {
    switch (method) {
    case Method::geometric_mean: return result.geometric_mean;
    case Method::column_average: return result.column_average;
    case Method::eigenvector: break;
    }
    return result.eigenvector;
}

constexpr std::array all_methods{Method::eigenvector, Method::geometric_mean, Method::column_average};

std::array<Id, 3> named(const std::vector<Id>& items, const Triad& t) {
    return {items[t[0]], items[t[1]], items[t[2]]};
}

/// What is known of one matrix, with the items named.
SetResult named_facts(const Id& set, const Id& by, const std::vector<Id>& items, const MatrixFacts& facts,
                      Method method) {
    SetResult result;
    result.set = set;
    result.by = by;
    result.items = items;
    for (const auto& [i, j] : facts.missing) result.missing.push_back({items[i], items[j]});
    if (facts.worst_triad) {
        result.koczkodaj = facts.worst_triad->index;
        result.worst_triad = named(items, facts.worst_triad->triad);
    }
    for (const auto& triad : facts.circular.strict) result.cycles.push_back(named(items, triad));
    for (const auto& triad : facts.circular.tied) result.tied_cycles.push_back(named(items, triad));
    result.zeta = facts.circular.zeta;
    for (const auto& part : facts.parts) {
        std::vector<Id> ids;
        for (const auto i : part) ids.push_back(items[i]);
        result.parts.push_back(std::move(ids));
    }
    result.eigenvector = facts.eigenvector;
    result.geometric_mean = facts.geometric_mean;
    result.column_average = facts.column_average;
    result.weights = by_method(result, method);
    result.lambda_max = facts.lambda_max;
    result.lambda_hand = facts.lambda_hand;
    result.ci = facts.ci;
    result.ri = facts.ri;
    result.cr = facts.cr;
    result.gci = facts.gci;
    for (const auto& m : facts.misfits)
        result.misfits.push_back({items[m.i], items[m.j], m.given, m.implied});
    return result;
}

/// The pairs of `missing` that somebody still has to answer. A pair skipped on purpose in the room, or by
/// every judge who takes part, is not open as long as the set has weights without it.
std::vector<std::array<Id, 2>> open_pairs(const Decision& decision, const SetResult& group,
                                          const JudgedSet& judged) {
    std::vector<std::array<Id, 2>> open;
    for (const auto& pair : group.missing) {
        std::set<Id> skipped_by;
        for (const auto& finished : decision.finished) {
            if (finished.set != group.set) continue;
            for (const auto& [a, b] : finished.skipped) {
                if ((a == pair[0] && b == pair[1]) || (a == pair[1] && b == pair[0]))
                    skipped_by.insert(finished.by);
            }
        }
        const bool by_all = !judged.judges.empty() &&
                            std::all_of(judged.judges.begin(), judged.judges.end(),
                                        [&](const JudgeAnswers& j) { return skipped_by.contains(j.person); });
        const bool skipped = skipped_by.contains(Id{}) || by_all;
        if (!skipped || !group.weights) open.push_back(pair);
    }
    return open;
}

std::string list_names(const Decision& decision, const Id& set, const std::vector<Id>& items) {
    std::string text;
    for (const auto& item : items) text += (text.empty() ? "" : ", ") + item_name(decision, set, item);
    return text;
}

} // namespace

SetSolver::SetSolver(const Decision& decision, SetWeights& weights, SolveCache& cache)
    : decision_(decision), weights_(weights), cache_(cache) {
    for (const auto& placed : placed_nodes(decision.criteria))
        pointers_.emplace_back(placed.node->id, placed.pointer);
}

std::string SetSolver::pointer(const Id& node) const {
    const auto found =
        std::find_if(pointers_.begin(), pointers_.end(), [&](const auto& p) { return p.first == node; });
    return found == pointers_.end() ? std::string{} : found->second;
}

SetSolution SetSolver::pairs(const Node& node, const std::vector<Id>& items) {
    const Settings& settings = decision_.settings;
    const JudgedSet& judged = weights_.judged(node, items);
    SetSolution solution;
    const std::string at = pointer(node.id);
    const std::string set_name = "\"" + node_name(decision_, node.id) + "\"";
    const auto notice = [&](const char* code, std::string text) {
        solution.notices.push_back({code, std::move(text), at});
    };

    const auto describe = [&](const Id& by, const PairMatrix& matrix) {
        const auto& facts = cache_.facts(matrix, settings.method, settings.random_index);
        solution.entries.push_back(named_facts(node.id, by, items, facts, settings.method));
    };
    describe(Id{}, group_matrix(judged));
    for (const auto& judge : judged.judges) describe(judge.person, judge_matrix(judge, judged.agreed));
    SetResult& group = solution.entries.front();

    if (settings.combine != Combine::judgments && !judged.judges.empty()) {
        const bool arithmetic = settings.combine == Combine::priorities_arithmetic;
        for (const Method method : all_methods) {
            std::vector<Weights> weights;
            std::vector<double> shares;
            for (std::size_t k = 0; k < judged.judges.size(); ++k) {
                const double share = judged.judges[k].share;
                if (share == 0) continue;
                if (const auto& own = by_method(solution.entries[k + 1], method)) {
                    weights.push_back(*own);
                    shares.push_back(share);
                } else if (method == settings.method) {
                    notice("judge-left-out",
                           "The answers of " + person_name(decision_, judged.judges[k].person) + " in " +
                               set_name + " do not give weights on their own and are left out.");
                }
            }
            if (!weights.empty()) {
                by_method(group, method) = combine_weights(weights, shares, arithmetic);
            } else if (method == settings.method) {
                notice("judgments-combined",
                       "No judge's answers in " + set_name +
                           " give weights on their own; the answers are combined pair by pair instead.");
            }
        }
        group.weights = by_method(group, settings.method);
    }
    group.open = open_pairs(decision_, group, judged);
    group.concordance = concordance(judged, solution.entries);

    if (group.parts.size() > 1) {
        std::string parts;
        for (const auto& part : group.parts) {
            parts += (parts.empty() ? "" : " / ") + list_names(decision_, node.id, part);
        }
        notice("not-connected", "No judgment in " + set_name + " links these: " + parts + ".");
    } else if (!group.weights) {
        notice("method-needs-all-pairs",
               "Averaged columns need every pair of " + set_name +
                   "; the eigenvector and the geometric mean also work with pairs missing.");
    } else if (items.size() > 2 && !group.ri) {
        const bool tree = 2 * group.missing.size() == (items.size() - 1) * (items.size() - 2);
        notice("no-ratio", tree ? "The answers in " + set_name +
                                      " are just enough to give weights, so none can contradict."
                                : "The table of random indices ends before the " +
                                      std::to_string(items.size()) + " items of " + set_name +
                                      "; the GCI speaks instead.");
    }
    for (const auto& entry : solution.entries) {
        if (entry.cr && *entry.cr > settings.limit) {
            const std::string who = entry.by.empty() ? "" : " by " + person_name(decision_, entry.by);
            notice("over-limit",
                   "The answers in " + set_name + who + " contradict each other more than the limit allows.");
        }
    }
    return solution;
}

/// Of the judges who connect the set by their own judgments and count for the group; their rankings are those
/// of their entries, agreed judgments included.
std::optional<Concordance> SetSolver::concordance(const JudgedSet& judged,
                                                  const std::vector<SetResult>& entries) {
    std::vector<std::vector<double>> ranks;
    std::vector<Id> judges;
    for (std::size_t k = 0; k < judged.judges.size(); ++k) {
        const JudgeAnswers& judge = judged.judges[k];
        const auto& weights = entries[k + 1].weights;
        if (judge.share == 0 || !weights || !judge.own.connected()) continue;
        judges.push_back(judge.person);
        ranks.push_back(mean_ranks(*weights));
    }
    const auto& found = cache_.concordance(ranks);
    if (!found) return std::nullopt;
    return Concordance{*found, std::move(judges)};
}

SetSolution SetSolver::options(const Node& leaf, const std::vector<Id>& in_play) {
    if (!weights_.needs_whole(leaf, in_play)) return pairs(leaf, in_play);
    SetSolution solution = pairs(leaf, set_items(decision_, leaf.id));
    solution.notices.push_back({"whole-set",
                                "In \"" + node_name(decision_, leaf.id) +
                                    "\" the options in play are only linked through options that "
                                    "take no part; those judgments count.",
                                pointer(leaf.id)});
    return solution;
}

SetSolution SetSolver::points(const Node& node) {
    std::vector<Id> items;
    for (const auto& child : node.children) items.push_back(child.id);
    const auto entry_of = [&](const Id& by, std::optional<Weights> weights) {
        SetResult result;
        result.set = node.id;
        result.by = by;
        result.from_points = true;
        result.items = items;
        result.weights = std::move(weights);
        return result;
    };

    const GivenPoints given = weights_.given_points(node);
    SetSolution solution;
    solution.entries.push_back(entry_of(Id{}, weights_.points(node)));
    for (const auto& [person, own] : given.own)
        solution.entries.push_back(entry_of(person->id, given.agreed ? *given.agreed : own));
    return solution;
}

} // namespace steelyard
