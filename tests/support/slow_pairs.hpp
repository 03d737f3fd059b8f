#pragma once

#include <array>
#include <map>
#include <optional>
#include <utility>
#include <vector>

#include "core/decision/decision.hpp"

/// The slow solver's mathematics of pairwise judgments: plain loops over maps, nothing shared with the core.
namespace steelyard::testing {

using SlowWeights = std::map<Id, double>;
using SlowPair = std::pair<Id, Id>;

/// Judged pairs of a list of items. Every judged pair stands in both orientations, r and 1/r.
struct SlowPairs {
    std::vector<Id> items;
    std::map<SlowPair, double> ratio;

    bool judged(const Id& a, const Id& b) const { return ratio.count({a, b}) > 0; }
    void judge(const Id& a, const Id& b, double r);
    void forget(const Id& a, const Id& b);
};

/// The principal eigenvalue and right eigenvector (sum 1) of the pairs, missing ones completed so that the
/// eigenvalue is least (Bozóki, Fülöp & Rónyai 2010).
struct SlowEigen {
    double lambda = 0;
    SlowWeights weights;
    std::map<SlowPair, double> filled; ///< The missing ratios, the earlier item first.
};

/// What the consistency of one matrix comes to; methods and sources as each function of slow_pairs.cpp says.
struct SlowIndices {
    std::optional<double> lambda_max, ci, ri, cr, gci, koczkodaj, zeta;
    std::optional<std::array<Id, 3>> worst_triad;
    std::vector<std::array<Id, 3>> cycles, tied_cycles;
};

/// A judged pair, a before b in the items: what was given, what the rest implies, and how far the weights are
/// off.
struct SlowMisfit {
    double given = 1;
    std::optional<double> implied;
    double size = 0;
    /// The ratio at which the eigenvalue is least, the other judged pairs held, and that eigenvalue; none
    /// where the set falls apart without the pair.
    std::optional<double> best, lambda_at_best;
};

/// The items linked by judgments, part by part.
std::vector<std::vector<Id>> slow_parts(const SlowPairs& pairs);
/// Unjudged pairs in the order of the items, the earlier item first.
std::vector<std::array<Id, 2>> slow_missing(const SlowPairs& pairs);

/// Needs pairs that connect at least one item.
SlowEigen slow_eigen(const SlowPairs& pairs);
/// Logarithmic least squares (Crawford & Williams 1985; incomplete: Bozóki, Fülöp & Rónyai 2010). Needs
/// connected pairs.
SlowWeights slow_geometric_mean(const SlowPairs& pairs);
/// Each column divided by its sum, then the mean of each row (common practice). Needs complete pairs.
SlowWeights slow_column_average(const SlowPairs& pairs);
/// Weights by a method, none where the items do not connect or, for columns, where a pair is missing.
std::optional<SlowWeights> slow_weights(Method method, const SlowPairs& pairs);

SlowIndices slow_indices(const SlowPairs& pairs, RandomIndexTable table);
/// Every judged pair of a connected set; empty for one that is not connected.
std::map<SlowPair, SlowMisfit> slow_misfits(const SlowPairs& pairs, Method method);

} // namespace steelyard::testing
