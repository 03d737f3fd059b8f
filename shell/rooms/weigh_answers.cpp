#include "shell/rooms/weigh_answers.hpp"

#include <algorithm>

#include "core/decision/lookup.hpp"
#include "core/judgment/judged_set.hpp"
#include "core/judgment/next_question.hpp"
#include "shell/sealed_results.hpp"
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

/// Which pairs of a set somebody has answered, read in one go over the judgments.
class Said {
public:
    Said(const Decision& decision, const SetResult& entry, const Id& by)
        : items_(entry.items), own_(items_.size() * items_.size()), agreed_(own_.size()) {
        for (const auto& judgment : decision.judgments) {
            if (judgment.set != entry.set || !(judgment.by.empty() || judgment.by == by)) continue;
            const std::size_t a = index(judgment.a);
            const std::size_t b = index(judgment.b);
            if (a == items_.size() || b == items_.size()) continue;
            auto& table = judgment.by == by ? own_ : agreed_;
            table[a * items_.size() + b] = table[b * items_.size() + a] = true;
        }
    }
    bool own(const ItemPair& pair) const { return own_[at(pair)]; }
    bool agreed(const ItemPair& pair) const { return agreed_[at(pair)]; }

private:
    std::size_t index(const Id& item) const {
        return static_cast<std::size_t>(std::find(items_.begin(), items_.end(), item) - items_.begin());
    }
    std::size_t at(const ItemPair& pair) const { return index(pair[0]) * items_.size() + index(pair[1]); }

    const std::vector<Id>& items_;
    std::vector<bool> own_;
    std::vector<bool> agreed_;
};

bool of_options(const Decision& decision, const Id& set) {
    const Node* node = find_node(decision.criteria, set);
    return node != nullptr && node->is_leaf() && node->rate == RateBy::pairs;
}

/// What is known of a set to the one who is asked, as numbers.
PairMatrix known(const Decision& decision, const SetResult& entry, const Id& by) {
    const JudgedSet said =
        JudgmentsBySet(decision).gather(entry.set, entry.items, of_options(decision, entry.set));
    if (by.empty()) return group_matrix(said);
    for (const auto& judge : said.judges) {
        if (judge.person == by) return judge_matrix(judge, said.agreed);
    }
    return said.agreed;
}

PairMatrix::Pair places(const SetResult& entry, const ItemPair& pair) {
    const auto index = [&](const Id& item) {
        return static_cast<std::size_t>(std::find(entry.items.begin(), entry.items.end(), item) -
                                        entry.items.begin());
    };
    return {index(pair[0]), index(pair[1])};
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
    return unanswered_entry(shown, view.decision, view.person);
}

std::vector<ItemPair> asked_pairs(const Decision& decision, const SetResult& entry, const Id& by) {
    const Person* person = find_person(decision, by);
    const bool options = of_options(decision, entry.set);
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
    progress.points = entry.from_points;
    if (progress.points) {
        progress.shared_out =
            std::any_of(decision.points.begin(), decision.points.end(), [&](const PointsEntry& points) {
                return points.set == entry.set && (points.by.empty() || points.by == by || by.empty());
            });
        return progress;
    }
    const auto asked = asked_pairs(decision, entry, by);
    progress.asked = asked.size();
    progress.ended = finished_by(decision, entry.set, by) != nullptr;
    const Said said(decision, entry, by);
    for (const auto& pair : asked) {
        progress.any = progress.any || said.own(pair);
        const bool by_others = by.empty() && !holds(entry.missing, pair);
        if (!said.own(pair) && !said.agreed(pair) && !by_others) progress.left.push_back(pair);
    }
    return progress;
}

std::string progress_words(const Progress& progress) {
    if (progress.points) return progress.shared_out ? "shared out" : "nothing yet";
    if (progress.asked == 0) return "abstains";
    const std::string of_all = " of " + std::to_string(progress.asked) + " pairs";
    if (progress.left.empty()) return "all " + std::to_string(progress.asked) + " pairs";
    if (progress.ended) return "ended with " + std::to_string(progress.left.size()) + of_all + " unanswered";
    if (!progress.any && progress.left.size() == progress.asked) return "nothing yet";
    return std::to_string(progress.asked - progress.left.size()) + of_all;
}

std::vector<std::string> not_done(const RoomView& view, const Id& set) {
    std::vector<std::string> names;
    for (const auto& person : view.decision.people) {
        if (person.share == 0) continue;
        const bool done =
            std::all_of(view.results.sets.begin(), view.results.sets.end(), [&](const SetResult& entry) {
                if (!entry.by.empty() || (!set.empty() && entry.set != set)) return true;
                return progress_of(view.decision, entry, person.id).done();
            });
        if (!done) names.push_back(person_name(view.decision, person.id));
    }
    return names;
}

std::vector<Id> judges_of(const Decision& decision, const SetResult& entry, const ItemPair& pair) {
    std::vector<Id> judges;
    for (const auto& person : decision.people) {
        if (holds(asked_pairs(decision, entry, person.id), pair)) judges.push_back(person.id);
    }
    return judges;
}

std::vector<ItemPair> left_for_hands(const Decision& decision, const SetResult& entry) {
    std::vector<ItemPair> left;
    for (const auto& pair : asked_pairs(decision, entry, Id{})) {
        if (standing_judgment(decision, entry.set, Id{}, pair[0], pair[1]) != nullptr) continue;
        const auto judges = judges_of(decision, entry, pair);
        if (std::any_of(judges.begin(), judges.end(), [&](const Id& by) {
                return standing_judgment(decision, entry.set, by, pair[0], pair[1]) == nullptr;
            }))
            left.push_back(pair);
    }
    return left;
}

std::optional<ItemPair> next_pair(const RoomView& view, const SetResult& entry, const Asking& asking,
                                  const std::optional<ItemPair>& from) {
    PairMatrix answered = known(view.decision, entry, asking.by);
    std::vector<PairMatrix::Pair> not_now;
    for (const auto& pair : asked_pairs(view.decision, entry, Id{})) {
        const auto [i, j] = places(entry, pair);
        const bool wanted = holds(asking.left, pair);
        if (wanted) answered.clear(i, j);
        if (!wanted || holds(asking.skipped, pair) || (from && same_pair(*from, pair)))
            not_now.push_back({i, j});
    }
    std::optional<std::size_t> star;
    if (const std::size_t at = places(entry, {asking.star, asking.star})[0]; at < entry.items.size())
        star = at;
    const auto next = next_question(answered, star, not_now);
    if (!next) return std::nullopt;
    return ItemPair{entry.items[(*next)[0]], entry.items[(*next)[1]]};
}

std::string needed_sentence(const Decision& decision, const SetResult& entry, const Progress& progress,
                            const Id& by) {
    if (progress.left.empty() || progress.points) return "";
    const QuestionsNeeded needed = questions_needed(known(decision, entry, by));
    // Averaged columns need every pair.
    const bool all = decision.settings.method == Method::column_average;
    const std::size_t give = all ? progress.left.size() : needed.to_connect;
    const std::size_t firm = std::min(progress.left.size(), needed.to_firm_up);
    const std::string more = firm > give ? std::to_string(firm - give) + " more would firm them up." : "";
    if (give > 0) {
        const std::string first = answers(give) + (give == 1 ? " gives weights" : " give weights");
        return more.empty() ? first + "." : first + "; " + more;
    }
    if (!more.empty()) return "These answers give weights; " + more;
    const std::size_t left = progress.left.size();
    return "These answers give firm weights; " + std::to_string(left) +
           (left == 1 ? " pair is" : " pairs are") + " left.";
}

bool nothing_open_matters(const RoomView& view, const SetResult& entry) {
    const Examination* found = view.examination;
    return !view.sealed() && found != nullptr && found->set == entry.set && found->enough &&
           found->enough->matters == Matters::proven_no;
}

std::string enough_sentence(const RoomView& view, const SetResult& entry) {
    if (view.sealed()) return ""; // It would tell of the standing.
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
    std::vector<std::pair<Id, std::string>> today;
    for (const auto& item : entry.items)
        today.emplace_back(item, range_at_stake(view.decision, view.results, entry.set, item));
    const auto stands = [&](const Id& item, const std::string& then) {
        return then.empty() || std::any_of(today.begin(), today.end(), [&](const auto& one) {
                   return one.first == item && one.second == then;
               });
    };
    const auto& judgments = view.decision.judgments;
    for (auto j = judgments.rbegin(); j != judgments.rend(); ++j) {
        if (j->set != entry.set || (stands(j->a, j->a_range) && stands(j->b, j->b_range))) continue;
        const bool seen = j->by.empty() || j->by == view.person || (view.person.empty() && !view.sealed());
        if (!seen || standing_judgment(view.decision, j->set, j->by, j->a, j->b) != &*j) continue;
        // What is agreed stands in place of what each person said.
        if (j->by.empty() || standing_judgment(view.decision, j->set, Id{}, j->a, j->b) == nullptr)
            return true;
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
