#pragma once

#include <array>
#include <optional>
#include <string>
#include <vector>

#include "core/decision/decision.hpp"
#include "core/judgment/lead.hpp"
#include "core/judgment/open_set.hpp"
#include "core/results/results.hpp"

namespace steelyard {

/// The pairs of one set that are taken as unanswered, and whose answers they wait for.
struct OpenPairs {
    Id set;
    Id by; ///< A person; empty for agreed answers, which stand in place of what persons said.
    std::vector<std::array<Id, 2>> pairs;
};

/// The leads of the option in first place as they hang on the answers to open pairs.
struct OpenLeads {
    OpenSet set;
    /// Over each other option in play, in their order. After them leads that keep every option on its side of
    /// the musts on a node's worth that hang on the set: while they stay above 0 the same options are in
    /// play.
    std::vector<Lead> leads;
    std::vector<std::size_t> who; ///< Per answer of the set: which of the open pairs it is...
    std::vector<bool> turned;     ///< ...and whether that pair is named the other way round.
};

/// What can be said of open pairs before any search.
struct OpenLeadsFinding {
    std::optional<OpenLeads> leads; ///< None where the answers do not act by leads; `why` says why.
    bool nothing_changes = false;   ///< No answers can change first place, for the reason given.
    bool try_out = false;           ///< Where leads prove nothing, answers can still be tried out by solving.
    std::string why;                ///< What to say where nothing is found or proven.
};

/// The decision with the open pairs answered, ratios in the order of the pairs.
Decision with_answers(const Decision& decision, const OpenPairs& open, const std::vector<double>& ratios);

/// Sets up the leads. `results` are those of `decision`. All else stays as it is: the other sets, figures,
/// grades, other persons' answers.
OpenLeadsFinding find_open_leads(const Decision& decision, const Results& results, const OpenPairs& open);

} // namespace steelyard
