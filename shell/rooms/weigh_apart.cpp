#include "shell/rooms/weigh_apart.hpp"

#include <algorithm>

#include "core/decision/lookup.hpp"
#include "shell/words.hpp"

namespace steelyard {
namespace {

/// "5 times as much", "as much".
std::string times(double ratio) {
    const double more = ratio >= 1 ? ratio : 1 / ratio;
    const std::string text = times_text(more);
    return text.substr(0, text.rfind(" as"));
}

std::string number(double ratio) {
    return ratio_text(ratio >= 1 ? ratio : 1 / ratio);
}

} // namespace

std::vector<SaidBy> said_by_each(const RoomView& view, const Id& set, const ItemPair& pair) {
    std::vector<SaidBy> said;
    for (const auto& person : view.decision.people) {
        if (const auto ratio = said_ratio(view.decision, set, person.id, pair[0], pair[1]))
            said.push_back({person.id, person_name(view.decision, person.id), *ratio});
    }
    return said;
}

double times_apart(const std::vector<SaidBy>& said) {
    if (said.size() < 2) return 1;
    const auto [least, most] = std::minmax_element(
        said.begin(), said.end(), [](const SaidBy& a, const SaidBy& b) { return a.ratio < b.ratio; });
    return most->ratio / least->ratio;
}

std::vector<std::string> apart_lines(const RoomView& view, const Id& set, const ItemPair& pair,
                                     const std::vector<SaidBy>& said) {
    const Node* node = find_node(view.decision.criteria, set);
    const std::string counts = node != nullptr && node->is_leaf() ? " is worth " : " counts ";
    const auto name = [&](double ratio) {
        return item_name(view.decision, set, ratio >= 1 ? pair[0] : pair[1]);
    };
    if (said.empty()) return {"Nobody has answered this pair for himself."};
    const auto sentence = [&](double ratio) {
        return pair_sentence(view.decision, set, pair[0], pair[1], ratio);
    };
    if (said.size() == 1) return {"Only " + said[0].name + " has answered: " + sentence(said[0].ratio) + "."};

    const auto [least, most] = std::minmax_element(
        said.begin(), said.end(), [](const SaidBy& a, const SaidBy& b) { return a.ratio < b.ratio; });
    const double apart = most->ratio / least->ratio;
    constexpr double same = 1 + 1e-9;
    if (apart < same) return {"All say the same: " + sentence(most->ratio) + "."};
    const std::string far = ratio_text(apart) + " times apart";
    if (least->ratio >= 1 || most->ratio <= 1) {
        // The one closer to equal first.
        const SaidBy& low = least->ratio >= 1 ? *least : *most;
        const SaidBy& high = least->ratio >= 1 ? *most : *least;
        const std::string more = name(high.ratio);
        const std::string less = item_name(view.decision, set, high.ratio >= 1 ? pair[1] : pair[0]);
        return {"All on one side: " + more + counts +
                    (times(low.ratio) == "as much" ? "as much" : number(low.ratio)) + " to " +
                    times(high.ratio) + " as " + less + ".",
                low.name +
                    (times(low.ratio) == "as much" ? " says equal, " : " says " + number(low.ratio) + ", ") +
                    high.name + " " + number(high.ratio) + ": " + far + "."};
    }
    int for_first = 0;
    int equal = 0;
    for (const auto& one : said) {
        if (one.ratio > same) ++for_first;
        if (one.ratio <= same && one.ratio >= 1 / same) ++equal;
    }
    const int for_second = static_cast<int>(said.size()) - for_first - equal;
    std::string sides = std::to_string(for_first) + " for " + name(2);
    if (equal > 0) sides += ", " + std::to_string(equal) + " equal";
    sides += ", " + std::to_string(for_second) + " for " + name(0.5);
    return {most->name + ": " + name(most->ratio) + counts + times(most->ratio),
            least->name + ": " + name(least->ratio) + counts + times(least->ratio),
            far + " \xC2\xB7 " + sides};
}

std::vector<ItemPair> most_disputed_first(const RoomView& view, const SetResult& entry) {
    std::vector<std::pair<double, ItemPair>> ranked;
    for (const auto& pair : asked_pairs(view.decision, entry, Id{})) {
        const auto said = said_by_each(view, entry.set, pair);
        if (!said.empty()) ranked.emplace_back(times_apart(said), pair);
    }
    std::stable_sort(ranked.begin(), ranked.end(),
                     [](const auto& a, const auto& b) { return a.first > b.first * (1 + 1e-9); });
    std::vector<ItemPair> pairs;
    for (const auto& [apart, pair] : ranked) pairs.push_back(pair);
    return pairs;
}

} // namespace steelyard
