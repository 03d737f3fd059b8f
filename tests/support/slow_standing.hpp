#pragma once

#include <map>
#include <set>
#include <string>
#include <vector>

#include "tests/support/slow_solver.hpp"

/// The slow solver's synthesis for a given field of options, and its musts.
namespace steelyard::testing {

struct SlowStanding {
    std::map<Id, SlowNode> nodes;
    std::map<Id, SlowLeaf> leaves;
    std::set<Id> unweighed; ///< Nodes with two or more children and no weights for them.
    std::map<Id, double> scores;
};

SlowStanding slow_standing(const Decision& decision, const std::vector<Id>& in_play, Synthesis synthesis);

struct SlowMusts {
    std::vector<Id> in_play;
    std::map<std::array<Id, 2>, MustState> states; ///< Option, requirement.
    std::vector<Exclusion> excluded;
};

SlowMusts slow_musts(const Decision& decision);

/// All nodes, depth first, root first.
std::vector<const Node*> slow_nodes(const Decision& decision);

} // namespace steelyard::testing
