#include "shell/rooms/weigh_answers.hpp"

#include <algorithm>

#include "core/decision/lookup.hpp"
#include "shell/sentences.hpp"
#include "shell/words.hpp"

namespace steelyard {
namespace {

bool holds(const std::vector<ItemPair>& pairs, const ItemPair& pair) {
    return std::any_of(pairs.begin(), pairs.end(), [&](const ItemPair& p) { return same_pair(p, pair); });
}

const Finished* finished_by(const Decision& decision, const Id& set, const Id& by) {
    const auto found = std::find_if(decision.finished.begin(), decision.finished.end(),
                                    [&](const Finished& f) { return f.set == set && f.by == by; });
    return found == decision.finished.end() ? nullptr : &*found;
}

std::string answers(std::size_t count) {
    return std::to_string(count) + (count == 1 ? " more answer" : " more answers");
}

} // namespace

bool same_pair(const ItemPair& a, const ItemPair& b) {
    return a == b || (a[0] == b[1] && a[1] == b[0]);
}

const Judgment* standing_judgment(const Decision& decision, const Id& set, const Id& by, const Id& a,
                                  const Id& b) {
    for (auto j = decision.judgments.rbegin(); j != decision.judgments.rend(); ++j) {
        if (j->set == set && j->by == by && same_pair({j->a, j->b}, {a, b})) return &*j;
    }
    return nullptr;
}

SetResult own_entry(const RoomView& view, const Id& set) {
    const SetResult& shown = *shown_entry(view.results, set, view.person);
    if (shown.by == view.person) return shown;
    // He has answered nothing yet. What the group says is not his.
    SetResult blank;
    blank.set = set;
    blank.by = view.person;
    blank.from_points = shown.from_points;
    blank.items = shown.items;
    if (blank.from_points) return blank;
    for (std::size_t i = 0; i < blank.items.size(); ++i) {
        blank.parts.push_back({blank.items[i]});
        for (std::size_t j = i + 1; j < blank.items.size(); ++j) {
            const ItemPair pair{blank.items[i], blank.items[j]};
            if (standing_judgment(view.decision, set, Id{}, pair[0], pair[1]) == nullptr)
                blank.missing.push_back(pair);
        }
    }
    return blank;
}

std::vector<ItemPair> asked_pairs(const Decision& decision, const SetResult& entry, const Id& by) {
    const Person* person = find_person(decision, by);
    const Node* node = find_node(decision.criteria, entry.set);
    const bool options = node != nullptr && node->is_leaf() && node->rate == RateBy::pairs;
    const auto abstains = [&](const Id& item) {
        return person != nullptr && options &&
               std::find(person->abstains.begin(), person->abstains.end(), item) != person->abstains.end();
    };
    std::vector<ItemPair> pairs;
    for (std::size_t i = 0; i < entry.items.size(); ++i) {
        for (std::size_t j = i + 1; j < entry.items.size(); ++j) {
            if (!abstains(entry.items[i]) && !abstains(entry.items[j]))
                pairs.push_back({entry.items[i], entry.items[j]});
        }
    }
    return pairs;
}

Progress progress_of(const Decision& decision, const SetResult& entry, const Id& by) {
    Progress progress;
    const auto asked = asked_pairs(decision, entry, by);
    progress.asked = asked.size();
    progress.ended = finished_by(decision, entry.set, by) != nullptr;
    for (const auto& pair : asked) {
        const bool own = standing_judgment(decision, entry.set, by, pair[0], pair[1]) != nullptr;
        progress.any = progress.any || own;
        const bool agreed = standing_judgment(decision, entry.set, Id{}, pair[0], pair[1]) != nullptr;
        const bool by_others =
            by.empty() && std::none_of(entry.missing.begin(), entry.missing.end(),
                                       [&](const ItemPair& missing) { return same_pair(missing, pair); });
        if (!own && !agreed && !by_others) progress.left.push_back(pair);
    }
    return progress;
}

std::string progress_words(const Progress& progress) {
    const std::string of_all = " of " + std::to_string(progress.asked) + " pairs";
    if (progress.left.empty()) return "all " + std::to_string(progress.asked) + " pairs";
    if (progress.ended) return "ended with " + std::to_string(progress.left.size()) + of_all + " unanswered";
    if (!progress.any && progress.left.size() == progress.asked) return "nothing yet";
    return std::to_string(progress.asked - progress.left.size()) + of_all;
}

std::optional<ItemPair> next_pair(const RoomView& view, const SetResult& entry, const Id& star,
                                  const std::vector<ItemPair>& skipped, const std::optional<ItemPair>& from) {
    const Progress progress = progress_of(view.decision, entry, view.person);
    const auto wanted = [&](const ItemPair& pair) {
        return !holds(skipped, pair) && !(from && same_pair(*from, pair));
    };
    for (const auto& pair : progress.left) {
        if (!star.empty() && (pair[0] == star || pair[1] == star) && wanted(pair)) return pair;
    }
    bool passed = !from;
    std::optional<ItemPair> earlier;
    for (const auto& pair : asked_pairs(view.decision, entry, view.person)) {
        if (from && same_pair(*from, pair)) passed = true;
        if (!wanted(pair) || !holds(progress.left, pair)) continue;
        if (passed) return pair;
        if (!earlier) earlier = pair;
    }
    return earlier;
}

std::string needed_sentence(const Decision& decision, const SetResult& entry, const Progress& progress) {
    if (progress.left.empty() || entry.from_points) return "";
    const bool all = decision.settings.method == Method::column_average;
    const std::size_t links = all ? entry.missing.size() : entry.parts.size() - 1;
    const std::size_t more = progress.left.size() > links ? progress.left.size() - links : 0;
    const std::string firm = " would firm them up.";
    if (links > 0) {
        const std::string give = answers(links) + (links == 1 ? " gives weights" : " give weights");
        return more == 0 ? give + "." : give + "; " + std::to_string(more) + " more" + firm;
    }
    return "These answers give weights; " + std::to_string(more) + " more" + firm;
}

std::string enough_sentence(const RoomView& view, const SetResult& entry) {
    const Examination* found = view.examination;
    if (found == nullptr || found->set != entry.set || !found->enough) return "";
    const MattersAnswer& enough = *found->enough;
    switch (enough.matters) {
    case Matters::proven_no: return "Nothing still open in this set can change first place.";
    case Matters::not_known:
        return "Whether these answers could still change first place is not known" +
               (enough.why.empty() ? "." : ": " + enough.why);
    case Matters::found_yes: break;
    }
    std::vector<std::string> said;
    for (const auto& answer : enough.answers)
        said.push_back(pair_sentence(view.decision, entry.set, answer.a, answer.b, answer.ratio));
    return "These answers could still change first place: " + listed(said, 3) + "; then " +
           option_name(view.decision, enough.first_then) + " would be first.";
}

std::string changed_ranges(const RoomView& view, const Judgment& judgment) {
    const auto change = [&](const Id& item, const std::string& then) -> std::string {
        const std::string now = range_at_stake(view.decision, view.results, judgment.set, item);
        if (then.empty() || then == now) return "";
        return item_name(view.decision, judgment.set, item) + " " + then + ", now " +
               (now.empty() ? "none" : now);
    };
    const std::string a = change(judgment.a, judgment.a_range);
    const std::string b = change(judgment.b, judgment.b_range);
    if (a.empty() && b.empty()) return "";
    return "Judged while other ranges stood: " + a + (a.empty() || b.empty() ? "" : "; ") + b + ".";
}

bool ranges_changed(const RoomView& view, const SetResult& entry) {
    std::vector<Id> who{Id{}};
    if (!view.person.empty()) {
        who.push_back(view.person);
    } else if (!sealed(view)) {
        for (const auto& person : view.decision.people) who.push_back(person.id);
    }
    for (const auto& pair : asked_pairs(view.decision, entry, Id{})) {
        const Judgment* agreed = standing_judgment(view.decision, entry.set, Id{}, pair[0], pair[1]);
        for (const auto& by : who) {
            // What is agreed stands in place of what each person said.
            if (agreed != nullptr && !by.empty()) continue;
            const Judgment* judgment = standing_judgment(view.decision, entry.set, by, pair[0], pair[1]);
            if (judgment != nullptr && !changed_ranges(view, *judgment).empty()) return true;
        }
    }
    return false;
}

Judgment judgment_of(const RoomView& view, const Id& set, const Id& by, const ItemPair& pair, double ratio) {
    Judgment judgment;
    judgment.set = set;
    judgment.by = by;
    judgment.a = pair[0];
    judgment.b = pair[1];
    judgment.ratio = ratio;
    judgment.a_range = range_at_stake(view.decision, view.results, set, pair[0]);
    judgment.b_range = range_at_stake(view.decision, view.results, set, pair[1]);
    // The remark is about the pair; whoever changes his answer sees it and may change it too.
    if (const Judgment* before = standing_judgment(view.decision, set, by, pair[0], pair[1]))
        judgment.note = before->note;
    return judgment;
}

} // namespace steelyard
