#include "tests/support/slow_sets.hpp"

#include <algorithm>
#include <cmath>

namespace steelyard::testing {
namespace {

bool holds(const std::vector<Id>& list, const Id& id) {
    return std::find(list.begin(), list.end(), id) != list.end();
}

/// One entry of points, summing to 1.
SlowWeights normalised(const PointsEntry& entry) {
    double total = 0;
    for (const auto& [item, points] : entry.points) total += points;
    SlowWeights weights;
    for (const auto& [item, points] : entry.points) weights[item] = points / total;
    return weights;
}

/// The last entry of points of each person, or of the room (an empty id).
std::map<Id, SlowWeights> standing_points(const Decision& decision, const Id& set) {
    std::map<Id, SlowWeights> standing;
    for (const PointsEntry& entry : decision.points)
        if (entry.set == set) standing[entry.by] = normalised(entry);
    return standing;
}

/// The pairs somebody (or the room) left out on purpose, in both orientations.
std::set<SlowPair> skipped_by(const Decision& decision, const Id& set, const Id& by) {
    std::set<SlowPair> skipped;
    for (const Finished& finished : decision.finished)
        if (finished.set == set && finished.by == by)
            for (const auto& [a, b] : finished.skipped) {
                skipped.insert({a, b});
                skipped.insert({b, a});
            }
    return skipped;
}

bool skipped_on_purpose(const Decision& decision, const Id& set, const SlowJudged& judged,
                        const SlowPair& pair) {
    if (skipped_by(decision, set, "").count(pair) > 0) return true;
    for (const SlowJudge& judge : judged.judges)
        if (skipped_by(decision, set, judge.by).count(pair) == 0) return false;
    return !judged.judges.empty();
}

/// Everything of an entry that follows from its matrix alone.
SlowSet described(const Decision& decision, const Id& set, const Id& by, const SlowPairs& pairs) {
    SlowSet entry;
    entry.set = set;
    entry.by = by;
    entry.items = pairs.items;
    entry.missing = slow_missing(pairs);
    entry.indices = slow_indices(pairs, decision.settings.random_index);
    entry.misfits = slow_misfits(pairs, decision.settings.method);
    const auto parts = slow_parts(pairs);
    if (parts.size() > 1) entry.parts = parts;
    entry.column_less =
        decision.settings.method == Method::column_average && parts.size() == 1 && !entry.missing.empty();
    return entry;
}

const std::optional<SlowWeights>& chosen(const SlowSet& entry, Method method) {
    switch (method) {
    case Method::geometric_mean: return entry.geometric_mean;
    case Method::column_average: return entry.column_average;
    case Method::eigenvector: break;
    }
    return entry.eigenvector;
}

/// The mean of (A w)_i / w_i, the hand estimate of the principal eigenvalue.
double hand_estimate(const SlowPairs& pairs, const SlowWeights& weights) {
    double total = 0;
    for (const Id& row : pairs.items) {
        double product = weights.at(row);
        for (const Id& column : pairs.items)
            if (column != row) product += pairs.ratio.at({row, column}) * weights.at(column);
        total += product / weights.at(row);
    }
    return total / static_cast<double>(pairs.items.size());
}

} // namespace

std::vector<Id> slow_children(const Node& node) {
    std::vector<Id> ids;
    for (const Node& child : node.children) ids.push_back(child.id);
    return ids;
}

SlowJudged slow_judged(const Decision& decision, const Id& set, const std::vector<Id>& items, SlowKind kind) {
    std::map<Id, const Person*> people;
    for (const Person& person : decision.people) people[person.id] = &person;

    SlowPairs agreed{items, {}};
    std::map<Id, SlowPairs> own;
    for (const Judgment& judgment : decision.judgments) {
        if (judgment.set != set || !holds(items, judgment.a) || !holds(items, judgment.b)) continue;
        if (judgment.by.empty()) {
            agreed.judge(judgment.a, judgment.b, judgment.ratio);
            continue;
        }
        const auto& abstains = people.at(judgment.by)->abstains;
        if (kind == SlowKind::options && (holds(abstains, judgment.a) || holds(abstains, judgment.b)))
            continue;
        own[judgment.by].items = items;
        own[judgment.by].judge(judgment.a, judgment.b, judgment.ratio);
    }

    SlowJudged judged;
    judged.group = agreed;
    for (const Id& a : items)
        for (const Id& b : items) {
            if (a >= b || agreed.judged(a, b)) continue;
            double shares = 0;
            double logs = 0;
            for (const auto& [by, pairs] : own)
                if (pairs.judged(a, b)) {
                    shares += people.at(by)->share;
                    logs += people.at(by)->share * std::log(pairs.ratio.at({a, b}));
                }
            if (shares > 0) judged.group.judge(a, b, std::exp(logs / shares));
        }
    for (const Person& person : decision.people) {
        if (own.count(person.id) == 0) continue;
        SlowJudge judge{person.id, person.share, own.at(person.id)};
        for (const auto& [pair, ratio] : agreed.ratio) judge.own.judge(pair.first, pair.second, ratio);
        judged.judges.push_back(judge);
    }
    return judged;
}

SlowJudged slow_judged_options(const Decision& decision, const Id& leaf, const std::vector<Id>& in_play) {
    SlowJudged judged = slow_judged(decision, leaf, in_play, SlowKind::options);
    if (slow_parts(judged.group).size() == 1) return judged;
    std::vector<Id> all;
    for (const Option& option : decision.options) all.push_back(option.id);
    SlowJudged whole = slow_judged(decision, leaf, all, SlowKind::options);
    if (slow_parts(whole.group).size() != 1) return judged;
    whole.whole = true;
    return whole;
}

std::optional<SlowWeights> slow_group_weights(const Decision& decision, const SlowJudged& judged,
                                              Method method) {
    const Combine combine = decision.settings.combine;
    std::vector<std::pair<double, SlowWeights>> voices;
    if (combine != Combine::judgments)
        for (const SlowJudge& judge : judged.judges)
            if (judge.share > 0)
                if (const auto weights = slow_weights(method, judge.own))
                    voices.emplace_back(judge.share, *weights);
    if (voices.empty()) return slow_weights(method, judged.group);

    double shares = 0;
    for (const auto& [share, weights] : voices) shares += share;
    SlowWeights mean;
    double total = 0;
    for (const Id& item : judged.group.items) {
        double value = 0;
        for (const auto& [share, weights] : voices)
            value += share / shares *
                     (combine == Combine::priorities ? std::log(weights.at(item)) : weights.at(item));
        mean[item] = combine == Combine::priorities ? std::exp(value) : value;
        total += mean[item];
    }
    for (auto& [item, value] : mean) value /= total;
    return mean;
}

std::optional<SlowWeights> slow_points(const Decision& decision, const Node& node) {
    const auto standing = standing_points(decision, node.id);
    if (standing.count("") > 0) return standing.at("");
    SlowWeights mean;
    double shares = 0;
    for (const Person& person : decision.people) {
        if (standing.count(person.id) == 0) continue;
        shares += person.share;
        for (const auto& [item, weight] : standing.at(person.id)) mean[item] += person.share * weight;
    }
    if (shares == 0) return std::nullopt;
    for (auto& [item, weight] : mean) weight /= shares;
    return mean;
}

std::optional<SlowWeights> slow_criteria_weights(const Decision& decision, const Node& node) {
    if (node.weights == WeightsBy::points) return slow_points(decision, node);
    const SlowJudged judged = slow_judged(decision, node.id, slow_children(node), SlowKind::criteria);
    return slow_group_weights(decision, judged, decision.settings.method);
}

std::vector<SlowSet> slow_pair_entries(const Decision& decision, const Id& set, const SlowJudged& judged) {
    const Method method = decision.settings.method;
    const bool by_priorities = decision.settings.combine != Combine::judgments;

    SlowSet group = described(decision, set, "", judged.group);
    group.whole = judged.whole;
    group.eigenvector = slow_group_weights(decision, judged, Method::eigenvector);
    group.geometric_mean = slow_group_weights(decision, judged, Method::geometric_mean);
    group.column_average = slow_group_weights(decision, judged, Method::column_average);
    group.weights = chosen(group, method);
    if (group.weights && group.missing.empty() && !by_priorities)
        group.lambda_hand = hand_estimate(judged.group, *group.weights);
    for (const auto& [a, b] : group.missing)
        if (!group.weights || !skipped_on_purpose(decision, set, judged, {a, b}))
            group.open.push_back({a, b});

    std::vector<SlowSet> entries{group};
    int voices = 0;
    int usable = 0;
    for (const SlowJudge& judge : judged.judges) {
        SlowSet entry = described(decision, set, judge.by, judge.own);
        entry.whole = judged.whole;
        entry.eigenvector = slow_weights(Method::eigenvector, judge.own);
        entry.geometric_mean = slow_weights(Method::geometric_mean, judge.own);
        entry.column_average = slow_weights(Method::column_average, judge.own);
        entry.weights = chosen(entry, method);
        if (entry.weights && entry.missing.empty())
            entry.lambda_hand = hand_estimate(judge.own, *entry.weights);
        voices += judge.share > 0 ? 1 : 0;
        usable += judge.share > 0 && entry.weights ? 1 : 0;
        entries.push_back(entry);
    }
    entries.front().own_left_out = by_priorities && usable < voices;
    entries.front().fell_back = by_priorities && usable == 0 && !judged.judges.empty();
    return entries;
}

std::vector<SlowSet> slow_point_entries(const Decision& decision, const Node& node) {
    SlowSet group;
    group.set = node.id;
    group.from_points = true;
    group.items = slow_children(node);
    group.weights = slow_points(decision, node);
    std::vector<SlowSet> entries{group};
    const auto standing = standing_points(decision, node.id);
    for (const Person& person : decision.people) {
        if (standing.count(person.id) == 0) continue;
        SlowSet entry = group;
        entry.by = person.id;
        entry.weights = standing.count("") > 0 ? standing.at("") : standing.at(person.id);
        entries.push_back(entry);
    }
    return entries;
}

} // namespace steelyard::testing
