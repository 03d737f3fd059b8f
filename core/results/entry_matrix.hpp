#pragma once

#include "core/decision/decision.hpp"
#include "core/judgment/judged_set.hpp"
#include "core/judgment/pair_matrix.hpp"
#include "core/results/results.hpp"

namespace steelyard {

/// The judged pairs behind an entry of the results: the group's matrix, or the judge's own with what was
/// agreed. Items in the order of the entry's. Of an entry of points nothing is judged.
struct EntryMatrix {
    PairMatrix pairs;
    std::size_t judges = 0; ///< People who take part in the set, whose entry this may be.
};

/// `entry` must come from this decision's results.
EntryMatrix entry_matrix(const Decision& decision, const SetResult& entry);

/// The same where several are wanted: `judgments` those of the decision.
EntryMatrix entry_matrix(const Decision& decision, const JudgmentsBySet& judgments, const SetResult& entry);

} // namespace steelyard
