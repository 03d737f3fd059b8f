#pragma once

#include <array>
#include <memory>
#include <string>
#include <vector>

#include "core/decision/decision.hpp"
#include "core/results/results.hpp"

namespace steelyard {

/// An answer to a pair: `a` counts `ratio` times as much as `b`.
struct PairAnswer {
    Id a;
    Id b;
    double ratio = 1;
};

/// Whether answers to some pairs of one set can change first place.
struct EnoughAnswer {
    enum class Verdict {
        proven_no, ///< No answers from 1/9 to 9 can: the option in first place stays ahead by more than 1e-9.
        found_yes, ///< `answers` do, entered and solved; another option is ahead by more than 1e-9.
        not_known
    };
    Verdict verdict = Verdict::not_known;
    std::vector<PairAnswer> answers; ///< Where found: one for each of the pairs.
    Id first_then;                   ///< Where found: the option then in first place.
    std::string why; ///< A plain sentence, where there is something to say; always if not known.
};

/// The pairs of a set that are not answered, in the order of its items. For the group (`by` empty) those
/// missing in its matrix; for a person those that he has not answered, that are not agreed, and that hold no
/// option he abstains on. Empty where `set` is not a set of pairs.
std::vector<std::array<Id, 2>> unanswered_pairs(const Decision& decision, const Results& results,
                                                const Id& set, const Id& by);

/// Looks for answers to the pairs of one set that change first place, all else as it is: the other sets, the
/// figures, what other persons said. The pairs may be judged already: their answers are then taken as not
/// given ("however this is corrected"). `by`: the person whose answers are free; empty: answers agreed in the
/// room, which stand in place of what persons said.
///
/// All the pairs are taken to be answered, with ratios from 1/9 to 9. A pair left out counts as the ratio
/// that the others imply; where that lies outside, a proof does not speak of it. What is open in other sets
/// is not part of the question.
///
/// A job in slices. What is exact, bounded or only searched: see LeadSearch (core/judgment/lead_search.hpp).
class EnoughSearch {
public:
    /// Keeps copies; `results` are those of `decision`, which is valid. Pairs that repeat or are none of the
    /// set are dropped.
    EnoughSearch(const Decision& decision, const Results& results, const Id& set, const Id& by,
                 std::vector<std::array<Id, 2>> unanswered);
    ~EnoughSearch();
    EnoughSearch(EnoughSearch&&) noexcept;
    EnoughSearch& operator=(EnoughSearch&&) noexcept;

    /// One slice, about a millisecond natively, or one solution of the decision where answers are tried out;
    /// true while there is more to do.
    bool step();

    /// 0 to 1, never falling.
    double progress() const;

    /// What is known so far: final once step() has returned false.
    const EnoughAnswer& answer() const;

private:
    struct Work;
    std::unique_ptr<Work> work_;
};

/// The same, run to its end.
EnoughAnswer enough(const Decision& decision, const Results& results, const Id& set, const Id& by,
                    std::vector<std::array<Id, 2>> unanswered);

} // namespace steelyard
