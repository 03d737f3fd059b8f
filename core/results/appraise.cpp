#include "core/results/appraise.hpp"

#include <algorithm>

#include "core/decision/lookup.hpp"
#include "core/measure/by_place.hpp"
#include "core/measure/curve.hpp"

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

MustFinding unless_waived(const Requirement& requirement, const MustFinding& finding) {
    return requirement.waived ? MustFinding{MustState::waived, finding.value} : finding;
}

} // namespace

Appraiser::Appraiser(const Decision& decision, SolveCache& cache)
    : decision_(decision),
      sets_(decision, cache),
      figures_(decision),
      leaves_(steelyard::leaves(decision.criteria)) {
    const ByPlace<GradeEntry> entries(decision.grades);
    for (const Node* leaf : leaves_) {
        for (const auto& option : decision.options) {
            if (leaf->rate == RateBy::grade) {
                grades_[leaf->id].push_back(
                    standing_grades(decision.people, *leaf, option.id, entries.at(leaf->id, option.id)));
            } else if (leaf->rate == RateBy::figure) {
                const auto x = figures_.of(leaf->id, option.id).value;
                figure_worths_[leaf->id].push_back(x && leaf->curve ? worth_of(*leaf->curve, *x)
                                                                    : std::nullopt);
            }
        }
    }
    for (std::size_t o = 0; o < decision.options.size(); ++o) {
        const Option& option = decision.options[o];
        if (option.withdrawn) continue;
        present_.add(option.id, o);
        bool failed = false;
        for (const auto& requirement : decision.requirements) {
            if (!requirement.node.empty()) continue;
            const auto finding =
                unless_waived(requirement, find_must(decision, figures_, requirement, option.id));
            findings_[{option.id, requirement.id}] = finding;
            failed = failed || finding.state == MustState::failed;
        }
        if (!failed) field_.add(option.id, o);
    }
}

Standing Appraiser::standing(const Voices& voices) {
    Standing standing;
    const Basis with = basis(voices);
    standing.criteria = with.criteria;
    Field in_play;
    if (voices.only.empty()) {
        in_play = exclude(standing, with);
        if (voices.without.empty() && !voices.agreed) in_play_ = in_play;
    } else {
        if (!in_play_) this->standing();
        in_play = *in_play_;
    }
    standing.options = in_play.ids;
    standing.scores.assign(in_play.ids.size(), 0.0);
    for (const auto& at : weigh_tree(decision_.criteria, with.criteria)) {
        if (!at.node->is_leaf()) continue;
        standing.worths.push_back(worths_on(*at.node, in_play, with));
        standing.locals.push_back(local_values(standing.worths.back(), decision_.settings.synthesis));
        for (std::size_t o = 0; o < in_play.ids.size(); ++o)
            standing.scores[o] += at.weight * standing.locals.back().values[o];
    }
    standing.ranks = rank(standing.scores);
    standing.first = first_of(standing.scores);
    return standing;
}

Appraiser::Basis Appraiser::basis(const Voices& voices) {
    Basis basis{voices, find_person(decision_, voices.without), find_person(decision_, voices.only), {}, {}};
    for (const auto& placed : placed_nodes(decision_.criteria)) {
        const Node& node = *placed.node;
        if (node.children.size() >= 2) {
            basis.criteria[node.id] = node.weights == WeightsBy::points
                                          ? sets_.points(node, voices)
                                          : sets_.pairs(node, set_items(decision_, node.id), voices);
        } else if (node.is_leaf() && node.rate == RateBy::grade) {
            basis.grade_worths[node.id] = grade_worths(node, voices);
        }
    }
    return basis;
}

Appraiser::Worths Appraiser::grade_worths(const Node& leaf, const Voices& voices) {
    Worths worths;
    if (leaf.worths == WorthsBy::given) {
        for (const auto& grade : leaf.grades) worths.push_back(grade.worth);
    } else if (leaf.grades.size() >= 2) {
        worths =
            against_largest(sets_.pairs(leaf, set_items(decision_, leaf.id), voices), leaf.grades.size());
    } else {
        worths.assign(leaf.grades.size(), 1.0);
    }
    return worths;
}

LeafWorths Appraiser::worths_on(const Node& leaf, const Field& field, const Basis& basis) {
    const std::size_t m = field.ids.size();
    LeafWorths on;
    on.worths.resize(m);
    switch (leaf.rate) {
    case RateBy::pairs: {
        if (m == 1) on.worths[0] = 1; // Alone on the leaf.
        if (m < 2) break;
        const auto set = sets_.options(leaf, field.ids, basis.voices);
        for (std::size_t o = 0; set.weights && o < m; ++o) {
            const auto at = std::find(set.items.begin(), set.items.end(), field.ids[o]);
            on.worths[o] = (*set.weights)[static_cast<std::size_t>(at - set.items.begin())];
        }
        break;
    }
    case RateBy::figure: {
        on.anchored = leaf.curve && is_anchored(*leaf.curve);
        const auto& worths = figure_worths_[leaf.id];
        for (std::size_t o = 0; o < m; ++o) on.worths[o] = worths[field.places[o]];
        break;
    }
    case RateBy::grade: {
        on.anchored = true;
        const auto& grades = grades_[leaf.id];
        const auto& worths = basis.grade_worths.at(leaf.id);
        for (std::size_t o = 0; o < m; ++o)
            on.worths[o] = find_grade_worth(grades[field.places[o]], worths, basis.without, basis.only).worth;
        break;
    }
    }
    return on;
}

/// The worth of a node for each option of the field, in ideal synthesis.
std::vector<Appraiser::NodeWorth> Appraiser::node_worths(const Id& node, const Basis& basis) {
    std::vector<NodeWorth> worths(field_.ids.size());
    for (const auto& at : weigh_tree(*find_node(decision_.criteria, node), basis.criteria)) {
        if (at.node->children.size() >= 2 && !basis.criteria.at(at.node->id)) {
            for (auto& worth : worths) worth.weighed = false;
        }
        if (!at.node->is_leaf()) continue;
        const LocalValues local = local_values(worths_on(*at.node, field_, basis), Synthesis::ideal);
        for (std::size_t o = 0; o < field_.ids.size(); ++o) {
            worths[o].value += at.weight * local.values[o];
            worths[o].low += at.weight * (local.missing[o] ? 0 : local.values[o]);
            worths[o].high += at.weight * (local.missing[o] ? 1 : local.values[o]);
        }
    }
    return worths;
}

/// Finds how each option stands to each requirement, and who is left in play.
Appraiser::Field Appraiser::exclude(Standing& standing, const Basis& basis) {
    standing.musts = findings_;
    for (const auto& requirement : decision_.requirements) {
        if (requirement.node.empty()) continue;
        for (const auto& option : present_.ids)
            standing.musts[{option, requirement.id}] = unless_waived(requirement, {});
        const auto worths = node_worths(requirement.node, basis);
        for (std::size_t o = 0; o < field_.ids.size(); ++o) {
            const auto& w = worths[o];
            MustState state = against_limits(requirement, w.low, w.high);
            if (!w.weighed && state != MustState::unchecked) state = MustState::undecided;
            standing.musts[{field_.ids[o], requirement.id}] = unless_waived(requirement, {state, w.value});
        }
    }
    Field in_play;
    for (std::size_t o = 0; o < present_.ids.size(); ++o) {
        const Id& option = present_.ids[o];
        const bool failed =
            std::any_of(decision_.requirements.begin(), decision_.requirements.end(),
                        [&](const Requirement& requirement) {
                            return standing.musts.at({option, requirement.id}).state == MustState::failed;
                        });
        if (!failed) in_play.add(option, present_.places[o]);
    }
    return in_play;
}

} // namespace steelyard
