#include "core/results/open_leads.hpp"

#include <algorithm>
#include <array>
#include <cmath>
#include <iterator>
#include <map>
#include <utility>

#include "core/decision/lookup.hpp"
#include "core/judgment/judged_set.hpp"
#include "core/results/score_parts.hpp"
#include "core/results/solve.hpp"

namespace steelyard {
namespace {

using Pair = PairMatrix::Pair;

bool weighs(Method method, const PairMatrix& pairs) {
    return method == Method::column_average ? pairs.complete() : pairs.connected();
}

/// The sets of a decision in which the open pairs are answered, told apart from those that are known.
class OpenSetBuilder {
public:
    /// `answered`: the decision with any answers to the open pairs. It must outlive this.
    OpenSetBuilder(const Decision& answered, const OpenPairs& open)
        : d_(answered), open_(open), judged_(answered) {}

    /// The items of the options' set on a leaf: those in play, or all where only all of them hang together.
    std::vector<Id> options(const Node& leaf, const std::vector<Id>& in_play) const {
        const auto connected = [&](const std::vector<Id>& items) {
            return group_matrix(judged_.gather(leaf.id, items, true)).connected();
        };
        std::vector<Id> all = set_items(d_, leaf.id);
        return !connected(in_play) && connected(all) ? all : in_play;
    }

    /// None where the answers do not give weights. `who` and `turned`: see OpenLeads.
    std::optional<OpenSet> build(const std::vector<Id>& items, bool items_are_options,
                                 std::vector<std::size_t>& who, std::vector<bool>& turned) {
        const JudgedSet judged = judged_.gather(open_.set, items, items_are_options);
        answers_.clear();
        for (std::size_t p = 0; p < open_.pairs.size(); ++p) {
            const auto place = [&](const Id& id) {
                return static_cast<std::size_t>(std::find(items.begin(), items.end(), id) - items.begin());
            };
            const std::size_t a = place(open_.pairs[p][0]);
            const std::size_t b = place(open_.pairs[p][1]);
            if (a == b || std::max(a, b) >= items.size()) continue;
            if (!answers_.emplace(Pair{std::min(a, b), std::max(a, b)}, who.size()).second) continue;
            who.push_back(p);
            turned.push_back(a > b);
        }
        const Settings& settings = d_.settings;
        std::vector<OpenJudge> judges;
        if (settings.combine != Combine::judgments) {
            for (const auto& judge : judged.judges) {
                if (judge.share == 0 || !weighs(settings.method, judge_matrix(judge, judged.agreed)))
                    continue;
                judges.push_back(of_judge(judge, judged.agreed));
            }
        }
        if (judges.empty()) {
            if (!weighs(settings.method, group_matrix(judged))) return std::nullopt;
            judges.push_back(of_group(judged));
        }
        const bool arithmetic = settings.combine == Combine::priorities_arithmetic && judges.size() > 1;
        return OpenSet(settings.method, arithmetic, judges, std::vector<AnswerRange>(who.size()));
    }

private:
    /// The answer that decides this pair in what one voice says, if any does.
    std::optional<std::size_t> answer_of(const Pair& pair, const Id& voice) const {
        const auto found = answers_.find(pair);
        if (found == answers_.end() || voice != open_.by) return std::nullopt;
        return found->second;
    }

    OpenJudge of_judge(const JudgeAnswers& judge, const PairMatrix& agreed) const {
        OpenJudge open{judge.share, judge_matrix(judge, agreed), {}};
        for (const auto& pair : open.known.judged_pairs()) {
            const bool in_room = agreed.judged(pair[0], pair[1]);
            if (const auto answer = answer_of(pair, in_room ? Id{} : judge.person)) {
                open.known.clear(pair[0], pair[1]);
                open.open.push_back({pair[0], pair[1], *answer});
            }
        }
        return open;
    }

    OpenJudge of_group(const JudgedSet& judged) const {
        OpenJudge open{1, group_matrix(judged), {}};
        for (const auto& pair : open.known.judged_pairs()) {
            const std::size_t i = pair[0];
            const std::size_t j = pair[1];
            const auto place = [&](std::size_t answer, double factor, double fixed) {
                open.known.clear(i, j);
                open.open.push_back({i, j, answer, factor, fixed});
            };
            if (judged.agreed.judged(i, j)) {
                if (const auto answer = answer_of({i, j}, Id{})) place(*answer, 1, 0);
                continue;
            }
            double shares = 0;
            double fixed = 0;
            double own = 0;
            std::optional<std::size_t> answer;
            for (const auto& judge : judged.judges) {
                if (!judge.own.judged(i, j) || judge.share == 0) continue;
                shares += judge.share;
                if (const auto his = answer_of({i, j}, judge.person)) {
                    answer = his;
                    own = judge.share;
                } else {
                    fixed += judge.share * std::log(judge.own.at(i, j));
                }
            }
            if (answer) place(*answer, own / shares, fixed / shares);
        }
        return open;
    }

    const Decision& d_;
    const OpenPairs& open_;
    JudgmentsBySet judged_;
    std::map<Pair, std::size_t> answers_; ///< By places in the items.
};

/// Musts on the worth of a node that the set has a part in; a waived one or one without limits excludes
/// nobody.
std::vector<const Requirement*> musts_above(const Decision& decision, const Id& set) {
    std::vector<const Requirement*> musts;
    for (const auto& requirement : decision.requirements) {
        const bool limits = requirement.min_worth || requirement.at_least || requirement.at_most;
        if (requirement.node.empty() || requirement.waived || !limits) continue;
        const Node* node = find_node(decision.criteria, requirement.node);
        if (node != nullptr && find_node(*node, set) != nullptr) musts.push_back(&requirement);
    }
    return musts;
}

/// What kind of set the open pairs are of.
enum class SetKind { none, criteria, options, grades };

SetKind kind_of(const Node* node) {
    if (node == nullptr) return SetKind::none;
    if (!node->is_leaf())
        return node->children.size() >= 2 && node->weights == WeightsBy::pairs ? SetKind::criteria
                                                                               : SetKind::none;
    if (node->rate == RateBy::pairs) return SetKind::options;
    const bool judged =
        node->rate == RateBy::grade && node->worths == WorthsBy::pairs && node->grades.size() >= 2;
    return judged ? SetKind::grades : SetKind::none;
}

ScoreParts::Effects effects_of(const ScoreParts& parts, const Node& node, SetKind kind,
                               const std::vector<Id>& items, std::optional<double> missing_as = {}) {
    switch (kind) {
    case SetKind::options: return parts.of_options(items);
    case SetKind::grades: return parts.of_grades(node);
    case SetKind::criteria:
    case SetKind::none: break;
    }
    return parts.of_criteria(node, missing_as);
}

/// Leads that stay above 0 as long as every option stays on its side of the musts' limits. Worths of nodes
/// are those of ideal synthesis over the field, the options that meet all musts of other kinds. None where
/// the options of the set are other ones in the field than in play, so that its weights are others.
std::optional<std::vector<Lead>> guards(const Decision& decision, const Results& results, const Node& node,
                                        SetKind kind, const std::vector<Id>& items,
                                        const std::vector<const Requirement*>& musts) {
    std::vector<Lead> leads;
    if (musts.empty()) return leads;
    Decision field_of = decision;
    std::erase_if(field_of.requirements, [](const Requirement& r) { return !r.node.empty(); });
    field_of.settings.synthesis = Synthesis::ideal;
    const Results field = solve(field_of);
    if (kind == SetKind::options && field.options != results.options) return std::nullopt;
    const ScoreParts parts(field_of, field);
    const std::array effects{effects_of(parts, node, kind, items, 0),
                             effects_of(parts, node, kind, items, 1)};
    for (const Requirement* must : musts) {
        const Node& of = *find_node(decision.criteria, must->node);
        // While some other set has no weights the must is undecided, whatever the answers are.
        if (!parts.weighed(of, node.id)) continue;
        const double share = parts.share(of, node.id);
        // An option fails below the lower limit with what is missing at 1, above the upper one with it at 0.
        const auto guard = [&](std::size_t o, double limit, bool lower, bool fails) {
            const double missing = lower ? 1 : 0;
            const double side = lower == fails ? -1 : 1;
            const auto& here = effects[lower ? 1 : 0];
            double rest = parts.value(of, missing)[o] - share * parts.value(node, missing)[o] - limit;
            if (here.missing[o]) rest += share * missing;
            Lead lead{side * rest, {}, here.part, here.largest};
            for (const double value : here.values[o])
                lead.effect.push_back(here.missing[o] ? 0 : side * share * value);
            leads.push_back(std::move(lead));
        };
        std::optional<double> least = must->at_least;
        if (must->min_worth) least = std::max(*must->min_worth, least.value_or(*must->min_worth));
        for (std::size_t o = 0; o < field.options.size(); ++o) {
            const auto state =
                std::find_if(results.musts.begin(), results.musts.end(), [&](const MustResult& m) {
                    return m.requirement == must->id && m.option == field.options[o];
                });
            if (state->state != MustState::failed) {
                if (least) guard(o, *least, true, false);
                if (must->at_most) guard(o, *must->at_most, false, false);
            } else if (least && parts.value(of, 1)[o] < *least) {
                guard(o, *least, true, true);
            } else {
                guard(o, *must->at_most, false, true);
            }
        }
    }
    return leads;
}

} // namespace

Decision with_answers(const Decision& decision, const OpenPairs& open, const std::vector<double>& ratios) {
    Decision answered = decision;
    for (std::size_t p = 0; p < open.pairs.size(); ++p) {
        Judgment judgment;
        judgment.set = open.set;
        judgment.by = open.by;
        judgment.a = open.pairs[p][0];
        judgment.b = open.pairs[p][1];
        judgment.ratio = ratios[p];
        answered.judgments.push_back(std::move(judgment));
    }
    return answered;
}

OpenLeadsFinding find_open_leads(const Decision& decision, const Results& results, const OpenPairs& open) {
    OpenLeadsFinding finding;
    const Node* node = find_node(decision.criteria, open.set);
    const SetKind kind = kind_of(node);
    const auto musts = musts_above(decision, open.set);
    if (kind == SetKind::none) {
        finding.why = "This is not a set of pairs.";
    } else if (!open.by.empty() && find_person(decision, open.by) == nullptr) {
        finding.why = "There is no such person.";
    } else if (!results.first) {
        finding.why = "No option is in play.";
    } else if (musts.empty() && results.options.size() == 1) {
        finding.nothing_changes = true;
        finding.why = "Only one option is in play.";
    }
    if (!finding.why.empty()) return finding;

    const Decision answered = with_answers(decision, open, std::vector<double>(open.pairs.size(), 1.0));
    OpenSetBuilder builder(answered, open);
    std::vector<Id> items = set_items(decision, node->id);
    if (kind == SetKind::options) items = builder.options(*node, results.options);
    std::vector<std::size_t> who;
    std::vector<bool> turned;
    auto set = builder.build(items, kind == SetKind::options, who, turned);
    if (!set) {
        finding.why =
            "With these answers \"" + node_name(decision, node->id) + "\" would still give no weights.";
        return finding;
    }
    if (!musts.empty()) {
        finding.try_out = true;
        finding.why =
            "A must on the worth of \"" + node_name(decision, musts.front()->node) +
            "\" hangs on these answers; trying found no change of first place, but none is ruled out.";
    }
    auto more = guards(decision, results, *node, kind, items, musts);
    if (!more) return finding;

    OpenLeads leads{std::move(*set), {}, std::move(who), std::move(turned)};
    const ScoreParts parts(decision, results);
    const auto effects = effects_of(parts, *node, kind, items);
    const auto rest = parts.rest(*node);
    const double weight = parts.weight(node->id);
    const std::size_t first = *results.first;
    for (std::size_t o = 0; o < results.options.size(); ++o) {
        if (o == first) continue;
        Lead lead{rest[first] - rest[o], {}, effects.part, effects.largest};
        for (std::size_t i = 0; i < items.size(); ++i)
            lead.effect.push_back(weight * (effects.values[first][i] - effects.values[o][i]));
        leads.leads.push_back(std::move(lead));
    }
    leads.leads.insert(leads.leads.end(), std::make_move_iterator(more->begin()),
                       std::make_move_iterator(more->end()));
    finding.leads = std::move(leads);
    return finding;
}

} // namespace steelyard
