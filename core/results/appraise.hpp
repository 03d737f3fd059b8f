#pragma once

#include <map>
#include <optional>
#include <utility>
#include <vector>

#include "core/decision/decision.hpp"
#include "core/measure/figures.hpp"
#include "core/measure/grades.hpp"
#include "core/measure/musts.hpp"
#include "core/results/set_weights.hpp"
#include "core/results/solve_cache.hpp"
#include "core/results/voices.hpp"
#include "core/standing/local_values.hpp"
#include "core/standing/synthesis.hpp"

namespace steelyard {

/// Who ranks where, and no more than that takes.
struct Standing {
    std::vector<Id> options; ///< In play, in the order of the file.
    CriteriaWeights criteria;
    std::vector<LeafWorths> worths;  ///< Per leaf, in the order of the tree; per option in play.
    std::vector<LocalValues> locals; ///< The same, set against each other.
    std::vector<double> scores;
    std::vector<int> ranks;
    std::optional<std::size_t> first; ///< Index in `options` of the option in first place.

    /// Of every option that is not withdrawn, by option and requirement. Empty under `Voices::only`.
    std::map<std::pair<Id, Id>, MustFinding> musts;
};

/// Ranks the options of one decision, under everybody's voices or others. What does not hinge on the judges'
/// answers is worked out once. The decision and the cache must outlive it.
class Appraiser {
public:
    Appraiser(const Decision& decision, SolveCache& cache);

    /// `voices.only` ranks the options that are in play for everybody; otherwise musts on a node's worth may
    /// let others in or out.
    Standing standing(const Voices& voices = {});

    SetWeights& sets() { return sets_; }
    const Figures& figures() const { return figures_; }
    const std::vector<const Node*>& leaves() const { return leaves_; }

    /// The grades of a leaf rated by grades, per option of the decision.
    const std::vector<StandingGrades>& grades(const Id& leaf) const { return grades_.at(leaf); }

private:
    using Worths = std::vector<std::optional<double>>;

    /// Options set against each other, by id and by their place in the decision.
    struct Field {
        std::vector<Id> ids;
        std::vector<std::size_t> places;

        void add(const Id& id, std::size_t place) {
            ids.push_back(id);
            places.push_back(place);
        }
    };

    /// What holds for every field of options under the same voices.
    struct Basis {
        const Voices& voices;
        const Person* without; ///< Null for nobody.
        const Person* only;
        CriteriaWeights criteria;
        std::map<Id, Worths> grade_worths; ///< Of the grades of each leaf rated by grades.
    };

    struct NodeWorth {
        double value = 0;
        double low = 0;  ///< With what is missing at 0.
        double high = 0; ///< With what is missing at 1.
        bool weighed = true;
    };

    Basis basis(const Voices& voices);
    Worths grade_worths(const Node& leaf, const Voices& voices);
    LeafWorths worths_on(const Node& leaf, const Field& field, const Basis& basis);
    std::vector<NodeWorth> node_worths(const Id& node, const Basis& basis);
    Field exclude(Standing& standing, const Basis& basis);

    const Decision& decision_;
    SetWeights sets_;
    Figures figures_;
    std::vector<const Node*> leaves_;
    std::map<Id, Worths> figure_worths_; ///< Of leaves rated by figures, per option.
    std::map<Id, std::vector<StandingGrades>> grades_;
    std::map<std::pair<Id, Id>, MustFinding> findings_; ///< Of all musts but those on a node's worth.
    Field present_;                                     ///< Options that are not withdrawn.
    Field field_;                                       ///< Those that fail none of `findings_`.
    std::optional<Field> in_play_;                      ///< For everybody, once found.
};

} // namespace steelyard
