#include "core/results/solve_sets.hpp"

#include <algorithm>
#include <set>
#include <utility>

#include "core/decision/lookup.hpp"
#include "core/judgment/consistency.hpp"
#include "core/judgment/misfits.hpp"
#include "core/judgment/random_index.hpp"

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

/// All that follows from one matrix.
SetResult describe_matrix(const Id& set, const Id& by, const std::vector<Id>& items, const PairMatrix& pairs,
                          const Settings& settings) {
    SetResult result;
    result.set = set;
    result.by = by;
    result.items = items;
    const std::size_t n = items.size();
    for (const auto& [i, j] : pairs.missing()) result.missing.push_back({items[i], items[j]});
    if (const auto worst = koczkodaj_index(pairs)) {
        result.koczkodaj = worst->index;
        result.worst_triad = named(items, worst->triad);
    }
    const CircularTriads circular = circular_triads(pairs);
    for (const auto& triad : circular.strict) result.cycles.push_back(named(items, triad));
    for (const auto& triad : circular.tied) result.tied_cycles.push_back(named(items, triad));
    result.zeta = circular.zeta;

    const auto parts = pairs.parts();
    for (const auto& part : parts) {
        std::vector<Id> ids;
        for (const auto i : part) ids.push_back(items[i]);
        result.parts.push_back(std::move(ids));
    }
    if (parts.size() > 1) return result;

    const Completion completion = complete_optimally(pairs);
    result.eigenvector = eigenvector_weights(completion);
    result.geometric_mean = geometric_mean_weights(pairs);
    result.column_average = column_average_weights(pairs);
    result.weights = by_method(result, settings.method);
    result.lambda_max = completion.principal.lambda;
    if (result.weights) result.lambda_hand = lambda_by_hand(completion.matrix, *result.weights);
    result.ci = consistency_index(completion.principal.lambda, n);
    result.ri = random_index(settings.random_index, n, result.missing.size());
    if (result.ri) result.cr = *result.ci / *result.ri;
    result.gci = geometric_consistency_index(pairs);
    const Method error_method =
        settings.method == Method::column_average ? Method::eigenvector : settings.method;
    for (const auto& m : misfits(pairs, settings.method, *by_method(result, error_method))) {
        result.misfits.push_back({items[m.i], items[m.j], m.given, m.implied});
    }
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

SetSolver::SetSolver(const Decision& decision) : decision_(decision), judgments_(decision) {
    for (const auto& placed : placed_nodes(decision.criteria))
        pointers_.emplace_back(placed.node->id, placed.pointer);
}

std::string SetSolver::pointer(const Id& node) const {
    const auto found =
        std::find_if(pointers_.begin(), pointers_.end(), [&](const auto& p) { return p.first == node; });
    return found == pointers_.end() ? std::string{} : found->second;
}

SetSolution SetSolver::pairs(const Node& node, const std::vector<Id>& items) const {
    const Settings& settings = decision_.settings;
    const JudgedSet judged = judgments_.gather(node.id, items, node.is_leaf() && node.rate == RateBy::pairs);
    SetSolution solution;
    const std::string at = pointer(node.id);
    const std::string set_name = "\"" + node_name(decision_, node.id) + "\"";
    const auto notice = [&](const char* code, std::string text) {
        solution.notices.push_back({code, std::move(text), at});
    };

    const PairMatrix combined = group_matrix(judged);
    solution.entries.push_back(describe_matrix(node.id, Id{}, items, combined, settings));
    for (const auto& judge : judged.judges) {
        solution.entries.push_back(
            describe_matrix(node.id, judge.person, items, judge_matrix(judge, judged.agreed), settings));
    }
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

SetSolution SetSolver::options(const Node& leaf, const std::vector<Id>& in_play) const {
    if (in_play.size() < decision_.options.size()) {
        const auto connected = [&](const std::vector<Id>& items) {
            return group_matrix(judgments_.gather(leaf.id, items, true)).connected();
        };
        const std::vector<Id> all = set_items(decision_, leaf.id);
        if (!connected(in_play) && connected(all)) {
            SetSolution solution = pairs(leaf, all);
            solution.notices.push_back({"whole-set",
                                        "In \"" + node_name(decision_, leaf.id) +
                                            "\" the options in play are only linked through options that "
                                            "take no part; those judgments count.",
                                        pointer(leaf.id)});
            return solution;
        }
    }
    return pairs(leaf, in_play);
}

SetSolution SetSolver::points(const Node& node) const {
    std::vector<Id> items;
    for (const auto& child : node.children) items.push_back(child.id);
    const PointsEntry* agreed = nullptr;
    std::vector<std::pair<const Person*, const PointsEntry*>> own;
    for (const auto& entry : decision_.points) {
        if (entry.set == node.id && entry.by.empty()) agreed = &entry;
    }
    for (const auto& person : decision_.people) {
        const PointsEntry* last = nullptr;
        for (const auto& entry : decision_.points) {
            if (entry.set == node.id && entry.by == person.id) last = &entry;
        }
        if (last != nullptr) own.emplace_back(&person, last);
    }
    const auto normalised = [&](const PointsEntry& entry) {
        Weights w(items.size(), 0.0);
        double sum = 0;
        for (const auto& [id, points] : entry.points) {
            const auto at = std::find(items.begin(), items.end(), id) - items.begin();
            w[static_cast<std::size_t>(at)] = points;
            sum += points;
        }
        for (auto& x : w) x /= sum;
        return w;
    };
    const auto entry_of = [&](const Id& by, std::optional<Weights> weights) {
        SetResult result;
        result.set = node.id;
        result.by = by;
        result.from_points = true;
        result.items = items;
        result.weights = std::move(weights);
        return result;
    };

    std::vector<Weights> weights;
    std::vector<double> shares;
    for (const auto& [person, entry] : own) {
        if (person->share == 0) continue;
        weights.push_back(normalised(*entry));
        shares.push_back(person->share);
    }
    std::optional<Weights> group;
    if (agreed != nullptr) {
        group = normalised(*agreed);
    } else if (!weights.empty()) {
        group = combine_weights(weights, shares, true);
    }
    SetSolution solution;
    solution.entries.push_back(entry_of(Id{}, group));
    for (const auto& [person, entry] : own) {
        solution.entries.push_back(entry_of(person->id, normalised(agreed != nullptr ? *agreed : *entry)));
    }
    return solution;
}

} // namespace steelyard
