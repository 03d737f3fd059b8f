#pragma once

#include <map>
#include <optional>
#include <utility>
#include <vector>

#include "core/decision/decision.hpp"
#include "core/judgment/judged_set.hpp"
#include "core/judgment/weights.hpp"
#include "core/results/solve_cache.hpp"
#include "core/results/voices.hpp"

namespace steelyard {

/// The points given in one set, normalised to sum 1, in the order of the node's children.
struct GivenPoints {
    struct Own {
        const Person* person;
        Weights weights;
    };
    std::optional<Weights> agreed;
    std::vector<Own> own; ///< In the order of the people, shares of 0 included.
};

/// The group's weights of the sets of one decision, under whosever voices, and nothing else of them. The
/// decision and the cache must outlive it.
class SetWeights {
public:
    SetWeights(const Decision& decision, SolveCache& cache)
        : decision_(decision), cache_(cache), judgments_(decision) {}

    /// What was said in a set of pairs, gathered once. The answer stays where it is.
    const JudgedSet& judged(const Node& node, const std::vector<Id>& items) {
        return said(node, items).judged;
    }

    /// Weights of a set of pairs by the decision's method and way of combining judges. `items` at least two.
    std::optional<Weights> pairs(const Node& node, const std::vector<Id>& items, const Voices& voices = {});

    struct OfOptions {
        std::vector<Id> items;
        std::optional<Weights> weights; ///< Per item.
    };
    /// The set of options on a leaf rated by pairs: of `in_play`, at least two, or of all options where the
    /// judgments among those in play do not connect them but those of all do.
    OfOptions options(const Node& leaf, const std::vector<Id>& in_play, const Voices& voices = {});

    /// Whether the options in play are only linked through others, so that the whole set has to speak.
    bool needs_whole(const Node& leaf, const std::vector<Id>& in_play, const Voices& voices = {});

    GivenPoints given_points(const Node& node) const;

    /// Weights of a set of points over the children of `node`; none where nobody who counts gave any.
    std::optional<Weights> points(const Node& node, const Voices& voices = {}) const;

private:
    struct Said {
        JudgedSet judged;
        bool weighed = false;
        std::optional<Weights> by_everybody; ///< Once weighed.
    };

    Said& said(const Node& node, const std::vector<Id>& items);
    JudgedSet heard(const Node& node, const std::vector<Id>& items, const Voices& voices);
    std::optional<Weights> weigh(const JudgedSet& set, const Id& only);

    const Decision& decision_;
    SolveCache& cache_;
    JudgmentsBySet judgments_;
    std::map<std::pair<Id, std::vector<Id>>, Said> said_;
};

} // namespace steelyard
