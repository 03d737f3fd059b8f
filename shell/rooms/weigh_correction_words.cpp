#include "shell/rooms/weigh_correction_words.hpp"

#include <array>

#include "core/decision/lookup.hpp"
#include "shell/rooms/weigh_answers.hpp"
#include "shell/rooms/weigh_hold_words.hpp"
#include "shell/sentences.hpp"
#include "shell/words.hpp"

namespace steelyard {
namespace {

constexpr std::size_t most_named = 6; ///< Pairs in one sentence.

std::string number_word(std::size_t n) {
    static constexpr std::array words{"No",   "One", "Two",   "Three", "Four",
                                      "Five", "Six", "Seven", "Eight", "Nine"};
    return n < words.size() ? words[n] : std::to_string(n);
}

Id first_now(const RoomView& view) {
    const auto& first = view.results.first;
    return first ? view.results.options[*first] : Id{};
}

} // namespace

std::string brief_pair(const Decision& decision, const Id& set, const Id& a, const Id& b, double ratio) {
    const Id& more = ratio >= 1 ? a : b;
    const Id& less = ratio >= 1 ? b : a;
    const std::string times = ratio_text(ratio >= 1 ? ratio : 1 / ratio);
    return item_name(decision, set, more) + (times == "1" ? " as much as " : " " + times + " times ") +
           item_name(decision, set, less);
}

std::string given_sentence(const RoomView& view, const SetResult& entry, const PairCorrection& pair,
                           bool mean) {
    const std::string said = pair_sentence(view.decision, entry.set, pair.a, pair.b, pair.given) + ".";
    if (mean) return "The judges together say " + said;
    if (pair.said_by.empty()) return "It was agreed that " + said;
    return (pair.said_by == view.person ? "You" : person_name(view.decision, pair.said_by)) + " said " + said;
}

std::string implied_sentence(const RoomView& view, const SetResult& entry, const PairCorrection& pair) {
    const std::string whose = view.person.empty() ? "The other answers say " : "Your other answers say ";
    if (!pair.implied) return whose + "nothing of this pair: without it the set falls apart.";
    return whose + pair_sentence(view.decision, entry.set, pair.a, pair.b, *pair.implied) + ".";
}

std::string ratio_then(const Decision& decision, const std::optional<double>& cr) {
    if (!cr) return "no CR";
    std::string text = "CR " + decimals_text(*cr, 2);
    // What the search leaves at the limit is within it.
    if (*cr > decision.settings.limit + 1e-9) text += ", over " + decimals_text(decision.settings.limit, 2);
    return text;
}

std::string first_then(const RoomView& view, const StandingThen& then) {
    if (view.sealed()) return {};
    if (then.first.empty()) return "nobody would be first";
    return option_name(view.decision, then.first) +
           (then.first == first_now(view) ? " stays first" : " would be first");
}

std::string lead_then(const RoomView& view, const StandingThen& then) {
    if (view.sealed() || !then.lead_points) return {};
    const std::string ahead = "Ahead by " + decimals_text(*then.lead_points, 1) + " points of 100 then";
    if (then.first != first_now(view) || !view.results.lead_points) return ahead + ".";
    return ahead + ", by " + decimals_text(*view.results.lead_points, 1) + " as it is.";
}

std::string matters_sentence(const RoomView& view, const Id& set, const MattersAnswer& matters,
                             bool several) {
    const Id first = first_now(view);
    if (view.sealed() || first.empty()) return {};
    const std::string corrected = several ? "However these are corrected, " : "However this is corrected, ";
    switch (matters.matters) {
    case Matters::proven_no: return corrected + option_name(view.decision, first) + " stays first.";
    case Matters::not_known:
        return "Whether " +
               (several ? "other answers to these " + std::to_string(matters.pairs.size()) + " pairs"
                        : std::string("another answer to this pair")) +
               " could change first place is not known." + (matters.why.empty() ? "" : " " + matters.why);
    case Matters::found_yes: break;
    }
    std::vector<std::string> with;
    for (const auto& answer : matters.answers)
        with.push_back(brief_pair(view.decision, set, answer.a, answer.b, answer.ratio));
    return std::string(several ? "Together they matter: with " : "It matters who is right: with ") +
           listed(with, most_named) + ", " + option_name(view.decision, matters.first_then) +
           " would be first.";
}

std::string fewest_sentence(const FewestCorrections& fewest) {
    const std::size_t n = fewest.changes.size();
    if (n == 0) return {};
    const std::string changes = number_word(n) + (n == 1 ? " change" : " changes");
    if (!fewest.proven) return changes + " found; fewer may do.";
    return changes + (n == 1 ? " is" : " are") + " enough, and no fewer.";
}

std::vector<Edit> correction_edits(const RoomView& view, const Id& set, const Id& by,
                                   const std::vector<AnswerChange>& changes, const std::string& remark) {
    std::vector<Edit> edits;
    for (const auto& change : changes) {
        const Judgment* before = standing_judgment(view.decision, set, by, change.a, change.b);
        const bool turned = before != nullptr && before->a == change.b;
        const ItemPair pair = turned ? ItemPair{change.b, change.a} : ItemPair{change.a, change.b};
        // Kept to the bit where it is not changed.
        const bool kept = before != nullptr && change.to == change.given;
        const double ratio = kept ? before->ratio : turned ? 1 / change.to : change.to;
        Judgment judgment = judgment_of(view, set, by, pair, ratio);
        if (!remark.empty()) judgment.note = remark;
        edits.emplace_back(Enter<Judgment>{std::move(judgment)});
    }
    return edits;
}

std::string correction_label(const Decision& decision, const Id& set, const Id& by,
                             const std::vector<AnswerChange>& changes) {
    std::vector<std::string> what;
    for (const auto& change : changes) {
        what.push_back(item_name(decision, set, change.a) + " against " + item_name(decision, set, change.b) +
                       ": " + ratio_text(change.given) + " to " + ratio_text(change.to));
    }
    return "Corrected " + listed(what, most_named) +
           (by.empty() ? "" : " (" + person_name(decision, by) + ")");
}

std::string best_sentence(const PairCorrection& pair) {
    if (!pair.best || !pair.cr_at_best) return {};
    return "The value that fits best, with the others as they are: " + figure_text(*pair.best, 4) +
           ", with which CR is " + figure_text(*pair.cr_at_best, 4) + ".";
}

} // namespace steelyard
