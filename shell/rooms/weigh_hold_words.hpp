#pragma once

#include <string>
#include <vector>

#include "shell/rooms/room.hpp"
#include "shell/rooms/weigh_model.hpp"

/// Whether the answers of a set hold together, in words. No drawing.
namespace steelyard {

enum class HoldTone { holds, open, contradicts };

struct HoldWords {
    std::string headline;
    std::string more; ///< A sentence below it; may be empty.
    HoldTone tone = HoldTone::holds;
};

/// What a board needs to know first.
HoldWords hold_words(const RoomView& view, const SetResult& entry);

/// "Noise over Floor space, Floor space over Drying, yet Drying over Noise." for each circle. Of more than
/// `most` the first ones, and how many more.
std::vector<std::string> circle_sentences(const Decision& decision, const SetResult& entry, std::size_t most);

/// The same for circles in which one or two answers are ties.
std::vector<std::string> tied_circle_sentences(const Decision& decision, const SetResult& entry,
                                               std::size_t most);

/// A term of the trade with its figure, and what it is. Without a figure a dash stands there, and why.
struct HoldTerm {
    std::string name;
    std::string value;
    std::string meaning;
};
std::vector<HoldTerm> hold_terms(const Decision& decision, const SetResult& entry);

/// The answers of the three items that contradict each other most, a sentence each; empty where there are
/// none.
std::vector<std::string> worst_triad_sentences(const RoomView& view, const SetResult& entry);

/// What the weights come from: "eigenvector".
std::string method_name(Method method);
std::string table_name(RandomIndexTable table);

/// A figure with so many decimals.
std::string decimals_text(double value, int decimals);

/// "41.4 %"
std::string percent_text(double part);

/// A set over its limit.
bool over_limit(const Decision& decision, const SetResult& entry);

/// True where nothing may be said of the set: the group's answers while all answer alone.
bool hidden_while_sealed(const RoomView& view, const SetResult& entry);

} // namespace steelyard
