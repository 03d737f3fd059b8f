#pragma once

#include <string>
#include <vector>

#include "tests/support/slow_solver.hpp"

/// From what people said to the weights of one set of the slow solver.
namespace steelyard::testing {

/// Whose judgments of options are taken: abstaining is from options, so it plays no part in other sets.
enum class SlowKind { criteria, options, grades };

/// One judge who takes part in a set, with his own judgments and the agreed ones.
struct SlowJudge {
    Id by;
    double share = 1;
    SlowPairs own;
};

struct SlowJudged {
    SlowPairs group;
    std::vector<SlowJudge> judges; ///< In the order of the decision's people.
    bool whole = false;            ///< Holds all options although fewer are in play.
};

/// Everything said in one set about the items.
SlowJudged slow_judged(const Decision& decision, const Id& set, const std::vector<Id>& items, SlowKind kind);
/// The same for a leaf of pairs: the options in play, or all of them where only all of them connect.
SlowJudged slow_judged_options(const Decision& decision, const Id& leaf, const std::vector<Id>& in_play);

/// Weights of the group by a method, with the decision's way of combining judges.
std::optional<SlowWeights> slow_group_weights(const Decision& decision, const SlowJudged& judged,
                                              Method method);
/// Weights of a set of points: the agreed ones, else the mean by share.
std::optional<SlowWeights> slow_points(const Decision& decision, const Node& node);
/// Weights of a node's children (two or more); none where nothing gives any.
std::optional<SlowWeights> slow_criteria_weights(const Decision& decision, const Node& node);

/// The entries of a set of pairs, the group's first.
std::vector<SlowSet> slow_pair_entries(const Decision& decision, const Id& set, const SlowJudged& judged);
/// The entries of a set of points, the group's first.
std::vector<SlowSet> slow_point_entries(const Decision& decision, const Node& node);

std::vector<Id> slow_children(const Node& node);

} // namespace steelyard::testing
