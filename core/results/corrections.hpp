#pragma once

#include <optional>

#include "core/decision/decision.hpp"
#include "core/judgment/fewest_changes.hpp"
#include "core/judgment/pair_matrix.hpp"
#include "core/results/results.hpp"

namespace steelyard {

/// Adds to every entry of judged pairs, the group's and the judges': for each misfit the value that would
/// suit it best and CR there, the misfits then sorted by that CR, lowest first (equal within 1e-12: item
/// order); and the fewest changes that bring CR to the limit. `results` must be those of this decision.
///
/// best: none where the set falls apart without the pair (no value is then better than another; CR stays as
/// it is). cr_at_best and fewest_changes: none where CR is not defined; misfits then stay worst first.
/// fewest_changes: none for a group of several judges either, whose answers are not its own to change.
void add_corrections(const Decision& decision, Results& results);

/// What the fewest changes of an entry are looked for in, for those who search in slices; none where the
/// results have none.
struct EntrySearch {
    PairMatrix pairs;
    ConsistencyLimit limit;
};
std::optional<EntrySearch> entry_search(const Decision& decision, const SetResult& entry);

/// The answer of such a search in the words of the results.
FewestChangesResult in_words(const SetResult& entry, const FewestChanges& found);

} // namespace steelyard
