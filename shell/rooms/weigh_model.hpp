#pragma once

#include <array>
#include <optional>
#include <string>
#include <vector>

#include "core/results/results.hpp"

/// What the room Weigh reads out of a decision and its results. No drawing.
namespace steelyard {

/// A pair of items of a set.
using ItemPair = std::array<Id, 2>;

/// The entry of a set that is shown to `person`: his own where he takes part, else the group's.
const SetResult* shown_entry(const Results& results, const Id& set, const Id& person);
const SetResult* group_entry(const Results& results, const Id& set);

/// The ratio of a to b that stands, as `by` said it (empty: agreed in the room).
std::optional<double> said_ratio(const Decision& decision, const Id& set, const Id& by, const Id& a,
                                 const Id& b);

/// The ratio that stands in an entry's matrix for a judged pair: one person's, the agreed one, or a mean.
std::optional<double> group_ratio(const SetResult& entry, const Id& a, const Id& b);

/// What the other answers of an entry say of a pair.
std::optional<double> implied_ratio(const SetResult& entry, const Id& a, const Id& b);

/// How far a judgment stands from what the others say: "", "a little off", "far off".
std::string misfit_words(const SetResult& entry, const Id& a, const Id& b);

/// "70 to 78 dB(A)": what is at stake on an item of a set.
std::string range_at_stake(const Decision& decision, const Results& results, const Id& set, const Id& item);

/// "For Fit to the cell, Noise counts 6 times as much as Floor space."
std::string judgment_sentence(const Decision& decision, const Id& set, const Id& a, const Id& b,
                              double ratio);

/// The same without "For ...": "Noise counts 6 times as much as Floor space".
std::string pair_sentence(const Decision& decision, const Id& set, const Id& a, const Id& b, double ratio);

/// How a set stands, in a word: "open", "contradicts", "consistent" …
struct SetState {
    std::string word;
    std::string ratio; ///< CR with two decimals, or a dash.
    bool contradicts = false;
    bool open = false;
    int judged = 0;
    int pairs = 0;
};
SetState state_of(const Decision& decision, const SetResult& entry);

} // namespace steelyard
