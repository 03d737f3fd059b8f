#pragma once

#include <array>
#include <optional>
#include <vector>

#include "core/decision/decision.hpp"
#include "core/judgment/concordance.hpp"

/// The part of the results that is about the judges.
namespace steelyard {

/// How far judges rank alike, and who they are.
struct Concordance : KendallW {
    std::vector<Id> judges;
};

/// A pair on which two or more judges with a share answered, and nothing was agreed. `a` comes before `b` in
/// the set's items.
struct Spread {
    Id set;
    Id a;
    Id b;
    double gsd = 1;    ///< Geometric standard deviation of the judges' ratios: of these judges, divided by J.
    int in_favour = 0; ///< Judges for whom a counts more.
    int equal = 0;
    int against = 0;
    std::array<Id, 2> furthest{}; ///< The two judges furthest apart, in the order of the people.
    std::array<double, 2> furthest_ratios{1, 1}; ///< What these two said, a to b.
};

/// One judge's own ranking of the options in play: where he takes part, his answers and the agreed ones
/// alone; the group's elsewhere, and where his do not give weights.
struct JudgeRanking {
    Id person;
    std::vector<double> scores; ///< As `Results::options`, like the ranks.
    std::vector<int> ranks;
};

/// The standing with all answers of one judge taken out.
struct WithoutJudge {
    Id person;
    std::vector<Id> options; ///< In play then: a must on a node's worth may come out otherwise.
    std::vector<int> ranks;  ///< Per option.
    std::optional<Id> first;
    bool first_moves = false; ///< The option in first place now does not have rank 1 then.
};

/// What several judges make of the decision: the persons with a share and an answer of their own that counts.
struct GroupResult {
    std::vector<Id> judges;                 ///< In the order of the people, two or more.
    std::vector<JudgeRanking> rankings;     ///< One for each judge.
    std::optional<Concordance> concordance; ///< Of those rankings; none with fewer than two options in play.
    std::vector<Spread> spreads;            ///< Sets in the order of the tree, pairs in that of the items.
    std::vector<WithoutJudge> without;      ///< One for each judge.
};

} // namespace steelyard
