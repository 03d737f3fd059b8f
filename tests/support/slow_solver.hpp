#pragma once

#include <array>
#include <map>
#include <optional>
#include <set>
#include <string>
#include <vector>

#include "core/decision/decision.hpp"
#include "core/results/results.hpp"
#include "tests/support/slow_pairs.hpp"

/// A second solver, written from the description of the decision file alone and sharing nothing with the core
/// but the types: obvious methods, plain maps, no speed. Tests compare the core with it.
namespace steelyard::testing {

struct SlowSet {
    Id set;
    Id by; ///< Empty for the group.
    bool from_points = false;
    std::vector<Id> items;
    std::vector<std::array<Id, 2>> missing;
    std::vector<std::array<Id, 2>> open; ///< Of the group: missing and not skipped on purpose.
    std::optional<SlowWeights> weights, eigenvector, geometric_mean, column_average;
    std::optional<double> lambda_hand; ///< Only where the weights come from this one complete matrix.
    SlowIndices indices;
    std::map<SlowPair, SlowMisfit> misfits;
    std::vector<std::vector<Id>> parts; ///< Empty where the items hang together.
    bool whole = false;                 ///< Solved with all options because those in play do not connect.
    bool column_less = false;           ///< Connects, but weights by columns would need every pair.
    bool own_left_out = false;          ///< Of the group: priorities of at least one judge could not be used.
    bool fell_back = false;             ///< Of the group: priorities of no judge could be used.
};

struct SlowNode {
    Id parent; ///< Empty for the root.
    bool leaf = true;
    double local_weight = 1;
    double weight = 1;
    std::map<Id, double> contribution; ///< By option in play.
};

struct SlowLeaf {
    std::map<Id, double> local; ///< By option in play, placeholders included.
    std::set<Id> missing;       ///< Options whose local value is a placeholder.
    bool all_zero = false;      ///< Everything that has a worth here is worth 0.
};

/// What two or more judges said of one pair on which nothing was agreed; a before b in the items.
struct SlowSpread {
    Id set, a, b;
    std::map<Id, double> ratios; ///< By judge.
    double gsd = 1;
    int in_favour = 0, equal = 0, against = 0;
};

/// What several judges make of a decision.
struct SlowGroup {
    std::vector<Id> judges;
    std::map<Id, std::map<Id, double>> scores; ///< By judge and option: with the judge's answers alone.
    std::vector<SlowSpread> spreads;
    std::map<Id, std::map<Id, int>> without; ///< By judge and option: ranks without the judge's answers.
};

struct SlowResults {
    std::vector<Id> options;   ///< In play.
    std::vector<SlowSet> sets; ///< In tree order, each with its group first and then the judges.
    std::map<Id, SlowNode> nodes;
    std::map<Id, SlowLeaf> leaves;
    std::map<Id, std::map<Id, double>> figures; ///< Computed ones: leaf, option.
    std::map<Id, double> scores;
    std::optional<std::map<Id, double>> shares;
    std::map<Id, int> ranks;
    std::optional<double> lead_points;
    bool provisional = false;
    std::map<Id, std::array<double, 2>> ranges;
    std::map<std::array<Id, 2>, MustState> musts; ///< Option, requirement.
    std::vector<Exclusion> excluded;
    std::vector<OpenItem> open;
    std::optional<SlowGroup> group; ///< Where there are two or more judges.
};

/// The decision must be valid.
SlowResults slow_solve(const Decision& decision);

} // namespace steelyard::testing
