#pragma once

#include <string>
#include <vector>

#include "core/decision/decision.hpp"
#include "core/judgment/judged_set.hpp"
#include "core/results/results.hpp"
#include "core/results/set_weights.hpp"
#include "core/results/solve_cache.hpp"

namespace steelyard {

/// What the solver says of one set: the group first, then each judge who takes part.
struct SetSolution {
    std::vector<SetResult> entries;
    std::vector<Notice> notices;

    const SetResult& group() const { return entries.front(); }
};

/// Describes the sets of one decision. The decision, the weights and the cache must outlive it.
class SetSolver {
public:
    SetSolver(const Decision& decision, SetWeights& weights, SolveCache& cache);

    /// A set of pairs. `node` is the set's node; `items` at least two.
    SetSolution pairs(const Node& node, const std::vector<Id>& items);

    /// The set of options on a leaf rated by pairs: of `in_play`, at least two, or of all options where the
    /// judgments among those in play do not connect them but those of all do.
    SetSolution options(const Node& leaf, const std::vector<Id>& in_play);

    /// A set of points over the children of `node`, at least two.
    SetSolution points(const Node& node);

private:
    std::string pointer(const Id& node) const;
    std::optional<Concordance> concordance(const JudgedSet& judged, const std::vector<SetResult>& entries);

    const Decision& decision_;
    SetWeights& weights_;
    SolveCache& cache_;
    std::vector<std::pair<Id, std::string>> pointers_;
};

} // namespace steelyard
