#pragma once

#include <cstddef>
#include <memory>
#include <vector>

#include "core/judgment/pair_matrix.hpp"

namespace steelyard {

/// A judged pair i < j and the ratio it is to have instead.
struct PairChange {
    std::size_t i = 0;
    std::size_t j = 0;
    double to = 1; ///< 1/9 to 9.
};

/// A way to bring a set of judgments within its limit by changing few of them.
struct FewestChanges {
    /// Whether no smaller number would do, and no other choice of as many reaches a lower lambda.
    bool proven = false;
    std::vector<PairChange> changes; ///< In item order; none for a set within its limit.
    double lambda = 0;               ///< Lambda max with them.
};

/// What a set has to come down to.
struct ConsistencyLimit {
    double random_index = 0; ///< That of the set as it stands, above 0; it is kept.
    double ratio = 0.1;      ///< The limit of CR, above 0; met up to 1e-9.
};

/// The search for the fewest changes, in slices: a smallest choice of judgments which, given new values from
/// 1/9 to 9, bring CR to the limit; of several as small, the one that reaches the lowest lambda max (equal
/// within 1e-12: the first in item order), at its minimum. Missing pairs take what values they like.
/// Cycles are not looked at. Exact up to three changes of sets of up to ten items. Beyond that an answer
/// found by adding one change after the other, which need not be the smallest; of more than ten items only
/// that one change is enough, or that none is needed, is proven. Source: Bozoki, Fulop, Poesz, On reducing
/// inconsistency of pairwise comparison matrices below an acceptance threshold, Central European Journal of
/// Operations Research 23 (2015) 849-866, from memory, for the question; the search is our own: by size,
/// leaving out what convexity proves to stay above the limit.
class FewestChangesSearch {
public:
    /// `pairs`: connected, at least three items.
    FewestChangesSearch(const PairMatrix& pairs, ConsistencyLimit limit);
    ~FewestChangesSearch();
    FewestChangesSearch(FewestChangesSearch&&) noexcept;
    FewestChangesSearch& operator=(FewestChangesSearch&&) noexcept;

    /// Does one slice, about one minimisation of lambda. True while there is more to do.
    bool step();

    /// 0 to 1, never falling; 1 when finished.
    double progress() const;

    /// Once step() has returned false.
    const FewestChanges& answer() const;

private:
    class Work;
    std::unique_ptr<Work> work_;
};

/// The same in one go.
FewestChanges fewest_changes(const PairMatrix& pairs, ConsistencyLimit limit);

} // namespace steelyard
