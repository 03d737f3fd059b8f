#pragma once

#include <string>
#include <vector>

#include "core/decision/decision.hpp"
#include "core/judgment/judged_set.hpp"
#include "core/results/results.hpp"

namespace steelyard {

/// What the solver says of one set: the group first, then each judge who takes part.
struct SetSolution {
    std::vector<SetResult> entries;
    std::vector<Notice> notices;

    const SetResult& group() const { return entries.front(); }
};

/// Solves the sets of one decision, which must outlive it.
class SetSolver {
public:
    explicit SetSolver(const Decision& decision);

    /// A set of pairs. `node` is the set's node; `items` at least two.
    SetSolution pairs(const Node& node, const std::vector<Id>& items) const;

    /// The set of options on a leaf rated by pairs: of `in_play`, at least two, or of all options where the
    /// judgments among those in play do not connect them but those of all do.
    SetSolution options(const Node& leaf, const std::vector<Id>& in_play) const;

    /// A set of points over the children of `node`, at least two.
    SetSolution points(const Node& node) const;

private:
    std::string pointer(const Id& node) const;

    const Decision& decision_;
    JudgmentsBySet judgments_;
    std::vector<std::pair<Id, std::string>> pointers_;
};

} // namespace steelyard
