#pragma once

#include <cstddef>
#include <vector>

#include "core/judgment/eigenvector.hpp"
#include "core/judgment/least_lambda.hpp"
#include "core/judgment/pair_matrix.hpp"

namespace steelyard {

/// A set with some of its judgments changed so that lambda max is least.
struct ChangedSet {
    std::vector<std::size_t> changed; ///< Places in ChangeableSet::judged, ascending.
    Completion whole;                 ///< The matrix with the changes, missing pairs filled.

    /// The least ln lambda can be with these changed, whatever their values: ln lambda there, or less where
    /// the search gave up.
    double floor = 0;

    /// Per judged pair, 0 or less mostly: what must be added to the floor to have a floor for those and this
    /// one changed; of several pairs together the sum of theirs. Above 0 where the given ratio is outside the
    /// scale and lambda rises on the way into it.
    std::vector<double> further;
};

/// Changes of the judgments of one set, each to a value from 1/9 to 9, missing pairs following freely.
class ChangeableSet {
public:
    /// `pairs` must be connected.
    explicit ChangeableSet(const PairMatrix& pairs);

    std::size_t size() const { return pairs_.size(); }
    const std::vector<PairMatrix::Pair>& judged() const { return judged_; }
    const ChangedSet& unchanged() const { return unchanged_; }

    /// The pairs of `changed` changed. `from`: where the search starts, the same or fewer pairs changed;
    /// what is changed there but not in `changed` is as given.
    ChangedSet change(const std::vector<std::size_t>& changed, const ChangedSet& from,
                      const SearchEnd& end) const;

    /// The same with only `moving`, one of the changed pairs, moving on from where they stand.
    ChangedSet change_one(const ChangedSet& from, std::size_t moving, const SearchEnd& end) const;

    /// Per judged pair, how far lambda falls when it alone is changed further, by its curvature here: 0 or
    /// less. Of pairs given outside the scale, none is told to rise.
    std::vector<double> outlook(const ChangedSet& at) const;

private:
    ChangedSet look_around(std::vector<std::size_t> changed, Completion whole) const;
    bool may_be_level(const std::vector<std::size_t>& changed) const;

    PairMatrix pairs_;
    std::vector<PairMatrix::Pair> judged_;
    std::vector<PairMatrix::Pair> missing_;
    ChangedSet unchanged_;
};

} // namespace steelyard
