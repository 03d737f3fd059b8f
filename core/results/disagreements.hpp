#pragma once

#include <array>
#include <cstddef>
#include <optional>
#include <vector>

#include "core/results/appraise.hpp"
#include "core/results/results.hpp"
#include "core/results/solve_cache.hpp"

namespace steelyard {

/// What it does to the standing to take one judge's ratio of a pair as agreed in the room.
struct TakenSide {
    Id judge;
    double ratio = 1; ///< a to b.
    std::optional<Id> first;
    bool first_moves = false; ///< The option in first place now does not have rank 1 then.

    /// By how many points of 100 the lead of the option in first place now grows (or falls, below 0). None
    /// where it is alone in play, or not in play then.
    std::optional<double> lead_moves;
};

/// A pair on which judges differ, and whether that matters.
struct Disagreement {
    std::size_t spread = 0;         ///< Index among the spreads of the group.
    std::array<TakenSide, 2> sides; ///< Of the two judges furthest apart, in the order of the people.

    /// First place goes to another option by one side's ratio at least. Where not, first place does not hinge
    /// on who of the two is right.
    bool moves_first() const { return sides[0].first_moves || sides[1].first_moves; }

    /// The larger movement of the lead by either side, without sign; infinite where the option in first place
    /// is excluded then.
    double lead_movement() const;
};

/// Finds what each disagreement of a group does to the standing, two standings for each pair: some hundred
/// microseconds a pair, so it works in steps. The decision, its results and the cache must outlive it.
class DisagreementSearch {
public:
    DisagreementSearch(const Decision& decision, const Results& results, SolveCache& cache);

    /// Looks at the next pair. False when there is none left.
    bool step();

    /// The part that is done, 0 to 1.
    double progress() const;

    /// What was found so far: first those that move first place, then by how far the lead moves, widest
    /// first; equal ones (within 1e-9) in the order of the spreads. A pair on which all who judged it said
    /// the same is left out.
    const std::vector<Disagreement>& found() const { return found_; }

private:
    TakenSide take(const Spread& spread, std::size_t which);

    const Results& results_;
    Appraiser appraiser_;
    std::vector<std::size_t> spreads_; ///< Those to look at.
    std::size_t next_ = 0;
    std::vector<Disagreement> found_;
};

/// All of them at once.
std::vector<Disagreement> disagreements(const Decision& decision, const Results& results, SolveCache& cache);

} // namespace steelyard
