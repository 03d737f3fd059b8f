#pragma once

#include <string>
#include <vector>

#include "core/decision/decision.hpp"
#include "core/results/results.hpp"
#include "shell/rooms/room.hpp"

/// What the results say, in sentences for people. Pure: the same decision and results give the same text.
namespace steelyard {

/// What is open, as one sentence: "Cove has no figure for Residual dirt yet."
std::string open_sentence(const Decision& decision, const OpenItem& item);

/// The room in which an open item is answered, and what that room is to show.
RoomId room_of(const OpenItem& item);
Id focus_of(const OpenItem& item);

/// What a room is called on the rail.
std::string room_name(RoomId room);

/// Why an option is out: "Dune does not meet the must "Noise": 81 dB(A), at most 78 allowed."
std::string exclusion_sentence(const Decision& decision, const Exclusion& exclusion);

/// The same where the option's name already stands there: "Noise: 81 dB(A), at most 78 allowed".
std::string exclusion_reason(const Decision& decision, const Exclusion& exclusion);

/// Who is first and by how much: "Brook is first, 1.2 points of 100 ahead of Alder". Says so where nobody is
/// in play, where several share first place and where the lead is too close by the decision's own settings.
std::string standing_sentence(const Decision& decision, const Results& results);

/// "worth about 1,400 EUR", the lead in money; empty where there is none to tell.
std::string lead_in_money_words(const Decision& decision, const Results& results);

/// What the judgments pay for a unit of one criterion.
struct RateWords {
    std::string amount; ///< "1,800 EUR".
    std::string what;   ///< "for 1 week less in Delivery".
};
std::vector<RateWords> rate_words(const Decision& decision, const Results& results);

/// What stands in for each missing answer that has weight, so that there can be a ranking at all.
std::vector<std::string> stand_in_sentences(const Decision& decision, const Results& results);

/// "Cove: 41.5 to 68.7 points, depending on what is still open", for each option with missing values.
std::vector<std::string> range_sentences(const Decision& decision, const Results& results);

/// "A", "A and B", "A, B and C"; of more than `most` (at least 1) the first, "and 4 more".
std::string listed(const std::vector<std::string>& names, std::size_t most = 3);

} // namespace steelyard
