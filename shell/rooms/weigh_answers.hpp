#pragma once

#include <optional>
#include <string>
#include <vector>

#include "shell/rooms/room.hpp"
#include "shell/rooms/weigh_model.hpp"

/// Who has answered what in a set, what is asked next, and what was asked while other ranges stood. No
/// drawing.
namespace steelyard {

/// The judgment of a pair that stands, as `by` gave it (empty: agreed in the room); null if there is none.
const Judgment* standing_judgment(const Decision& decision, const Id& set, const Id& by, const Id& a,
                                  const Id& b);

inline bool sealed(const RoomView& view) {
    return view.sealed();
}

/// The entry of a set that the one who answers may see: the group's where nobody does, else his own, and an
/// empty one where he has not answered yet.
SetResult own_entry(const RoomView& view, const Id& set);

/// The pairs of a set that `by` is asked: all, but those with an option he abstains from.
std::vector<ItemPair> asked_pairs(const Decision& decision, const SetResult& entry, const Id& by);

/// How far one person is with a set, or the room where `by` is empty: then what anybody answered counts.
struct Progress {
    std::size_t asked = 0;
    std::vector<ItemPair> left; ///< Neither answered by him nor agreed in the room.
    bool ended = false;         ///< He said that it is enough.
    bool any = false;           ///< He has answered something himself.
    bool points = false;        ///< A set of points, which is answered as a whole.
    bool shared_out = false;

    bool done() const { return points ? shared_out : left.empty() || ended; }
};
Progress progress_of(const Decision& decision, const SetResult& entry, const Id& by);

/// "9 of 15 pairs", "all 15 pairs", "ended with 4 of 15 pairs unanswered", "nothing yet".
std::string progress_words(const Progress& progress);

/// The names of those whose answers count and who have not done with a set; with all sets where it is empty.
std::vector<std::string> not_done(const RoomView& view, const Id& set);

/// The judges of a pair in a show of hands: all people but those who abstain from one of the options.
std::vector<Id> judges_of(const Decision& decision, const SetResult& entry, const ItemPair& pair);

/// The pairs that nothing is agreed on and that a judge has not answered.
std::vector<ItemPair> left_for_hands(const Decision& decision, const SetResult& entry);

/// What is asked of whom.
struct Asking {
    Id by;                         ///< Empty: the room.
    std::vector<ItemPair> left;    ///< What can be asked.
    Id star;                       ///< Named as mattering most, or empty.
    std::vector<ItemPair> skipped; ///< For now.
};

/// The pair to ask next, by the rule of core/judgment/next_question.hpp; none where nothing is left but what
/// was skipped. `from` is the pair shown now, if there is one: answered a moment ago, or left.
std::optional<ItemPair> next_pair(const RoomView& view, const SetResult& entry, const Asking& asking,
                                  const std::optional<ItemPair>& from);

/// "2 more answers give weights; 5 more would firm them up." Empty where nothing is left.
std::string needed_sentence(const Decision& decision, const SetResult& entry, const Progress& progress,
                            const Id& by);

/// True where it is proven that nothing open in a set can change first place, and no seal keeps it secret.
bool nothing_open_matters(const RoomView& view, const SetResult& entry);

/// Whether what is open can still change first place, in words; empty where nobody asked or nothing is open.
std::string enough_sentence(const RoomView& view, const SetResult& entry);

/// "Judged while other ranges stood: price 40,000 to 90,000 EUR, now 45,000 to 80,000 EUR." Empty where the
/// ranges still stand, or were not kept.
std::string changed_ranges(const RoomView& view, const Judgment& judgment);

/// True where a judgment of the set that stands was made on other ranges: of the one who answers and of the
/// room, or of anybody where nothing is sealed.
bool ranges_changed(const RoomView& view, const SetResult& entry);

/// A judgment as it is entered now, with the ranges of today.
Judgment judgment_of(const RoomView& view, const Id& set, const Id& by, const ItemPair& pair, double ratio);

bool same_pair(const ItemPair& a, const ItemPair& b);

} // namespace steelyard
