#pragma once

#include <map>
#include <optional>
#include <vector>

#include "core/decision/decision.hpp"
#include "core/results/results.hpp"
#include "core/standing/synthesis.hpp"

namespace steelyard {

/// The scores of a solved decision in parts: what hangs on one node, and the rest. Both must outlive this.
class ScoreParts {
public:
    ScoreParts(const Decision& decision, const Results& results);

    /// Per option in play, what comes from the leaves that are not at or below `node`.
    std::vector<double> rest(const Node& node) const;

    /// Per option in play, its value on a node. `missing_as`: in place of local values that are placeholders.
    std::vector<double> value(const Node& node, std::optional<double> missing_as = {}) const;

    /// Of a node in all the tree.
    double weight(const Id& node) const;

    /// The part of a node's weight that comes to the one below it.
    double share(const Node& node, const Id& below) const;

    /// Whether every set of criteria at or below the node but `except` has weights.
    bool weighed(const Node& node, const Id& except) const;

    /// How the options' values on a node hang on the weights w of its set once it has them: (sum_i
    /// values[option][i] w_i) / divisor, `part` and `largest` as in Lead.
    struct Effects {
        std::vector<std::vector<double>> values;
        std::vector<double> part;
        bool largest = false;
        std::vector<bool>
            missing; ///< Per option: it has no value here even then; `values` are a placeholder.
    };
    Effects of_criteria(const Node& node, std::optional<double> missing_as = {}) const;

    /// `items`: the options in play, or more.
    Effects of_options(const std::vector<Id>& items) const;

    /// Worths of grades are their weights over the largest; an option's worth is linear in them. Options
    /// without a grade take the mean of the others' local values.
    Effects of_grades(const Node& leaf) const;

private:
    Effects no_effects(std::size_t items) const;

    const Decision& d_;
    const Results& r_;
    CriteriaWeights weights_;
    std::map<Id, const LeafResult*> leaf_;
};

} // namespace steelyard
