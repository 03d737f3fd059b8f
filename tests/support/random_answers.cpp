#include <algorithm>
#include <set>

#include "tests/support/random_maker.hpp"

namespace steelyard::testing {

void RandomMaker::make_answers() {
    for (const Node& node : nodes_) {
        std::vector<Id> items;
        if (!node.is_leaf()) {
            for (const Node& child : node.children) items.push_back(child.id);
        } else if (node.rate == RateBy::pairs) {
            for (const Option& option : decision_.options) items.push_back(option.id);
        } else if (node.rate == RateBy::grade && node.worths == WorthsBy::pairs) {
            for (const Grade& grade : node.grades) items.push_back(grade.id);
        }
        if (items.size() < 2) continue;
        if (!node.is_leaf() && node.weights == WeightsBy::points)
            answer_points(node);
        else
            answer_set(node.id, items, node.is_leaf() && node.rate == RateBy::pairs);
    }
}

std::vector<Id> RandomMaker::voices() {
    const std::vector<Person>& people = decision_.people;
    std::vector<Id> who;
    if (people.empty() || dice_.chance(20)) {
        if (answered() || dice_.chance(50)) who.emplace_back();
        return who;
    }
    const bool agreed_too = dice_.chance(30);
    const int take_part = hurried() ? 50 : 85;
    for (const Person& person : people)
        if (dice_.chance(take_part)) who.push_back(person.id);
    if (progress_ == Progress::finished && who.empty()) who.push_back(people.front().id);
    if (agreed_too) who.insert(dice_.chance(50) ? who.begin() : who.end(), Id());
    return who;
}

RandomMaker::Cover RandomMaker::cover() {
    switch (progress_) {
    case Progress::finished: return dice_.chance(75) ? Cover::complete : Cover::linked;
    case Progress::nearly:
        return dice_.pick<Cover>(
            {Cover::complete, Cover::complete, Cover::linked, Cover::linked, Cover::star, Cover::some});
    case Progress::half:
        return dice_.pick<Cover>({Cover::complete, Cover::linked, Cover::star, Cover::some, Cover::some});
    case Progress::started: break;
    }
    return dice_.pick<Cover>({Cover::some, Cover::few, Cover::few});
}

RandomMaker::Pairs RandomMaker::pairs_of(int items, Cover cover, int hub) {
    std::set<std::pair<int, int>> chosen;
    const auto take = [&](int a, int b) { chosen.insert({std::min(a, b), std::max(a, b)}); };
    for (int i = 0; i < items; ++i) {
        if (cover == Cover::star && i != hub) take(i, hub);
        if (cover == Cover::linked && i > 0) take(i, dice_.below(i));
    }
    const int percent = cover == Cover::complete ? 100
                        : cover == Cover::linked ? 40
                        : cover == Cover::some   ? 45
                        : cover == Cover::few    ? 15
                                                 : 0;
    for (int a = 0; a < items; ++a)
        for (int b = a + 1; b < items; ++b)
            if (dice_.chance(percent)) take(a, b);
    return {chosen.begin(), chosen.end()};
}

double RandomMaker::ratio(Style style, int a, int b) {
    static const std::vector<double> scale{1, 2, 3, 4, 5, 6, 7, 8, 9};
    if (style == Style::exact) return static_cast<double>(a) / b;
    if (style == Style::wild) {
        const double times = dice_.chance(4) ? dice_.pick<double>({12, 25, 100}) : dice_.pick<double>(scale);
        return dice_.chance(50) ? times : 1 / times;
    }
    // As somebody would say it: the nearest whole number, a step off at times, sometimes with a decimal.
    int times = (2 * std::max(a, b) + std::min(a, b)) / (2 * std::min(a, b));
    times = std::clamp(times + dice_.between(-1, 1), 1, 9);
    double said = times;
    if (times < 9 && dice_.chance(15)) said = (10 * times + dice_.below(10)) / 10.0;
    return a >= b ? said : 1 / said;
}

void RandomMaker::say(const Id& set, const Id& by, const Id& a, const Id& b, double ratio) {
    Judgment judgment;
    judgment.set = set;
    judgment.by = by;
    judgment.a = a;
    judgment.b = b;
    judgment.ratio = ratio;
    if (dice_.chance(10)) judgment.note = text();
    if (dice_.chance(50)) judgment.at = time();
    decision_.judgments.push_back(judgment);
}

void RandomMaker::answer_set(const Id& set, const std::vector<Id>& items, bool of_options) {
    const int count = static_cast<int>(items.size());
    const int roll = dice_.below(100);
    const Style style = roll < 12 ? Style::exact : roll < 80 ? Style::near : Style::wild;
    std::vector<int> size;
    for (int i = 0; i < count; ++i) size.push_back(dice_.between(1, 9));

    // At times everything was compared with one option that is no longer there.
    int hub = dice_.below(count);
    bool star_for_all = false;
    for (int i = 0; of_options && i < count; ++i)
        if (decision_.options[static_cast<std::size_t>(i)].withdrawn && dice_.chance(25)) {
            hub = i;
            star_for_all = true;
        }

    const std::vector<Id> who = voices();
    const bool alone = who.size() == 1;
    for (const Id& by : who) {
        Cover pattern = star_for_all ? Cover::star : cover();
        if (by.empty() && !alone) pattern = Cover::few; // the room settles a few pairs only
        const Pairs pairs = pairs_of(count, pattern, hub);
        const auto judge = [&](std::size_t which, bool turned) {
            const auto a = static_cast<std::size_t>(turned ? pairs[which].second : pairs[which].first);
            const auto b = static_cast<std::size_t>(turned ? pairs[which].first : pairs[which].second);
            say(set, by, items[a], items[b], ratio(style, size[a], size[b]));
        };
        for (std::size_t which = 0; which < pairs.size(); ++which) judge(which, dice_.chance(40));
        const int again = !pairs.empty() && dice_.chance(20) ? dice_.between(1, 3) : 0;
        for (int i = 0; i < again; ++i) {
            const int which = dice_.below(static_cast<int>(pairs.size()));
            judge(static_cast<std::size_t>(which), dice_.chance(50));
        }
        if (dice_.chance(60)) finish_set(set, by, items, pairs);
    }
}

void RandomMaker::finish_set(const Id& set, const Id& by, const std::vector<Id>& items, const Pairs& judged) {
    Finished finished;
    finished.set = set;
    finished.by = by;
    const int skips = dice_.pick<int>({0, 60, 100, 100});
    for (int a = 0; a < static_cast<int>(items.size()); ++a)
        for (int b = a + 1; b < static_cast<int>(items.size()); ++b) {
            if (std::find(judged.begin(), judged.end(), std::pair(a, b)) != judged.end() ||
                !dice_.chance(skips))
                continue;
            std::array<Id, 2> pair{items[static_cast<std::size_t>(a)], items[static_cast<std::size_t>(b)]};
            if (dice_.chance(30)) std::swap(pair[0], pair[1]);
            finished.skipped.push_back(pair);
        }
    decision_.finished.push_back(finished);
}

void RandomMaker::answer_points(const Node& node) {
    for (const Id& by : voices()) {
        const int entries = dice_.chance(15) ? 2 : 1;
        for (int entry = 0; entry < entries; ++entry) {
            PointsEntry points;
            points.set = node.id;
            points.by = by;
            int total = 0;
            for (const Node& child : node.children) {
                const int given = dice_.chance(10) ? 0 : dice_.between(1, 50);
                total += given;
                points.points.emplace_back(child.id, given);
            }
            if (total == 0) points.points.front().second = 10;
            if (dice_.chance(10)) points.note = text();
            decision_.points.push_back(points);
        }
    }
}

} // namespace steelyard::testing
