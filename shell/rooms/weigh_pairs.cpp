#include "shell/rooms/weigh_pairs.hpp"

#include <algorithm>
#include <map>

#include "core/decision/lookup.hpp"
#include "shell/rooms/weigh_answers.hpp"
#include "shell/sentences.hpp"
#include "shell/words.hpp"

namespace steelyard {
namespace {

const char* const dash = "\xE2\x80\x94";

bool abstains(const Person* person, const Id& item) {
    return person != nullptr &&
           std::find(person->abstains.begin(), person->abstains.end(), item) != person->abstains.end();
}

std::string times(std::size_t count, const char* one, const char* many) {
    return std::to_string(count) + " " + (count == 1 ? one : many);
}

} // namespace

PairTable::PairTable(const RoomView& view, const SetResult& entry) : view_(view), entry_(entry) {
    for (const auto& item : entry.items) names_.push_back(item_name(view.decision, entry.set, item));
    cells_.resize(size() * size());
    marks_ = entry.by == view.person && !(view.sealed() && view.person.empty());
    gather_answers();
    if (!marks_) return;
    mark_misfits();
    mark_circles();
}

std::optional<std::size_t> PairTable::place(const Id& item) const {
    const auto found = std::find(entry_.items.begin(), entry_.items.end(), item);
    if (found == entry_.items.end()) return std::nullopt;
    return static_cast<std::size_t>(found - entry_.items.begin());
}

void PairTable::gather_answers() {
    const Decision& d = view_.decision;
    const Node* node = find_node(d.criteria, entry_.set);
    const bool options = node != nullptr && node->is_leaf() && node->rate == RateBy::pairs;
    // By pair, the last answer of everybody; one walk over the judgments, of which there may be thousands.
    std::map<Id, std::size_t> places;
    for (std::size_t i = 0; i < size(); ++i) places[entry_.items[i]] = i;
    std::vector<std::map<Id, const Judgment*>> last(size() * size());
    for (const auto& j : d.judgments) {
        if (j.set != entry_.set) continue;
        const auto a = places.find(j.a);
        const auto b = places.find(j.b);
        if (a == places.end() || b == places.end() || a == b) continue;
        const auto [low, high] = std::minmax(a->second, b->second);
        last[low * size() + high][j.by] = &j;
    }
    std::vector<std::string> now;
    for (const auto& item : entry_.items) now.push_back(range_at_stake(d, view_.results, entry_.set, item));
    const auto ranges_then = [&](const Judgment& j) {
        const auto other = [&](const Id& item, const std::string& then) {
            return !then.empty() && then != now[places.at(item)];
        };
        return other(j.a, j.a_range) || other(j.b, j.b_range) ? changed_ranges(view_, j) : std::string{};
    };
    bool any_agreed = false;
    bool any_person = false;
    for (std::size_t i = 0; i < size(); ++i) {
        for (std::size_t j = i + 1; j < size(); ++j) {
            PairCell& cell = cells_[i * size() + j];
            const auto& given = last[i * size() + j];
            const auto ratio = [&](const Judgment& judgment) {
                return judgment.a == entry_.items[i] ? judgment.ratio : 1 / judgment.ratio;
            };
            const auto find = [&](const Id& by) {
                const auto found = given.find(by);
                return found == given.end() ? nullptr : found->second;
            };
            const Judgment* agreed = find(Id{});
            const Judgment* own = view_.person.empty() ? nullptr : find(view_.person);
            any_agreed = any_agreed || agreed != nullptr;
            any_person = any_person || given.size() > (agreed != nullptr ? 1U : 0U);
            const Judgment* shown = nullptr;
            if (own != nullptr && (agreed == nullptr || view_.sealed())) {
                cell.source = PairSource::own;
                shown = own;
            } else if (agreed != nullptr && !(view_.sealed() && !view_.person.empty())) {
                cell.source = PairSource::agreed;
                if (own != nullptr) cell.own = ratio(*own);
                shown = agreed;
            }
            if (shown != nullptr) {
                cell.ratio = ratio(*shown);
                cell.ranges = ranges_then(*shown);
            } else if (const Person* person = find_person(d, view_.person);
                       options && (abstains(person, entry_.items[i]) || abstains(person, entry_.items[j]))) {
                cell.source = PairSource::abstained;
            } else if (view_.person.empty() && !view_.sealed()) {
                for (const auto& one : d.people) {
                    const Judgment* judgment = find(one.id);
                    if (judgment == nullptr ||
                        (options && (abstains(&one, entry_.items[i]) || abstains(&one, entry_.items[j]))))
                        continue;
                    cell.said.emplace_back(one.id, ratio(*judgment));
                    if (cell.ranges.empty()) cell.ranges = ranges_then(*judgment);
                }
                if (!cell.said.empty()) cell.source = PairSource::others;
                if (cell.said.size() == 1) cell.ratio = cell.said.front().second;
            }
        }
    }
    mixed_ = any_agreed && any_person;
}

void PairTable::mark_misfits() {
    for (const auto& misfit : entry_.misfits) {
        const auto i = place(misfit.a);
        const auto j = place(misfit.b);
        if (!i || !j || *i >= *j) continue;
        PairCell& c = cell(*i, *j);
        if (c.source == PairSource::others) c.ratio = misfit.given;
        c.implied = misfit.implied;
        const std::string words = misfit_words(entry_, misfit.a, misfit.b);
        c.off = words.empty() ? PairOff::none : words == "far off" ? PairOff::far : PairOff::little;
    }
}

void PairTable::mark_circles() {
    for (const auto& circle : entry_.cycles) {
        for (std::size_t k = 0; k < 3; ++k) {
            const auto i = place(circle[k]);
            const auto j = place(circle[(k + 1) % 3]);
            if (i && j) cell(std::min(*i, *j), std::max(*i, *j)).circles.push_back(circle[(k + 2) % 3]);
        }
    }
}

std::optional<double> PairTable::ratio(std::size_t i, std::size_t j) const {
    const auto& value = pair(i, j).ratio;
    return value && i > j ? std::optional(1 / *value) : value;
}

std::string PairTable::why_not(std::size_t i, std::size_t j) const {
    if (view_.read_only) return "Another page writes this decision; here it can only be read.";
    const PairCell& c = pair(i, j);
    if (c.source == PairSource::abstained) {
        return person_name(view_.decision, view_.person) + " takes no part where one of these is judged.";
    }
    if (c.mean()) {
        return c.said.size() == 1
                   ? "This is the answer of " + person_name(view_.decision, c.said.front().first) +
                         ". Choose who answers above, or agree on one answer on the arm."
                   : "This is the mean of " + std::to_string(c.said.size()) +
                         " answers. Choose who answers above, or agree on one answer on the arm.";
    }
    return {};
}

std::string PairTable::text(std::size_t i, std::size_t j) const {
    if (i == j) return "1";
    if (const auto value = ratio(i, j)) return ratio_text(*value);
    const PairCell& c = pair(i, j);
    return c.mean() ? times(c.said.size(), "answer", "answers") : dash;
}

std::string PairTable::word(std::size_t i, std::size_t j) const {
    const PairCell& c = pair(i, j);
    if (c.off == PairOff::far) return "far off";
    if (!c.circles.empty()) return "in a circle";
    if (c.off == PairOff::little) return "a little off";
    if (!c.ranges.empty()) return "other ranges";
    if (marked_agreed(i, j)) return "agreed";
    if (c.mean() && c.ratio)
        return c.said.size() == 1 ? "one answer" : "mean of " + std::to_string(c.said.size());
    return {};
}

std::string PairTable::all_words(std::size_t i, std::size_t j) const {
    const PairCell& c = pair(i, j);
    std::string words = c.source == PairSource::missing     ? "open"
                        : c.source == PairSource::abstained ? "takes no part"
                                                            : text(i, j);
    const auto add = [&](const std::string& more) { words += ", " + more; };
    if (marked_agreed(i, j)) add("agreed");
    if (c.mean() && c.ratio)
        add(c.said.size() == 1 ? "one answer" : "mean of " + times(c.said.size(), "answer", "answers"));
    if (c.off == PairOff::far) add("far off");
    if (c.off == PairOff::little) add("a little off");
    if (!c.circles.empty()) add("in a circle");
    if (!c.ranges.empty()) add("judged on other ranges");
    return words;
}

std::string PairTable::sentences(std::size_t i, std::size_t j) const {
    const Decision& d = view_.decision;
    const PairCell& c = pair(i, j);
    const auto sentence = [&](double value) {
        return pair_sentence(d, entry_.set, item(i), item(j), i < j ? value : 1 / value);
    };
    const auto text_of = [&](double value) { return ratio_text(i < j ? value : 1 / value); };
    std::string out;
    const auto add = [&](const std::string& more) { out += (out.empty() ? "" : " ") + more; };
    if (c.ratio) add(sentence(*c.ratio) + ".");
    if (c.off != PairOff::none && c.implied) {
        add(std::string(c.off == PairOff::far ? "Far off" : "A little off") + ": the other answers say " +
            sentence(*c.implied) + ".");
    }
    if (!c.circles.empty()) {
        std::vector<std::string> names;
        for (const auto& id : c.circles) names.push_back(item_name(d, entry_.set, id));
        add("Runs in a circle with " + listed(names) + ".");
    }
    switch (c.source) {
    case PairSource::missing: add(names_[i] + " against " + names_[j] + ": not answered."); break;
    case PairSource::abstained: add(why_not(i, j)); break;
    case PairSource::own: break;
    case PairSource::agreed:
        if (marked_agreed(i, j))
            add(c.own ? "Agreed in the room; the own answer is " + text_of(*c.own) + "."
                      : "Agreed in the room.");
        break;
    case PairSource::others: {
        std::vector<std::string> who;
        for (const auto& [person, value] : c.said)
            who.push_back(person_name(d, person) + " " + text_of(value));
        add((c.said.size() == 1 ? "One answer: "
                                : "Mean of " + times(c.said.size(), "answer", "answers") + ": ") +
            listed(who, who.size()) + ".");
        break;
    }
    }
    if (!c.ranges.empty()) add(c.ranges);
    return out;
}

} // namespace steelyard
