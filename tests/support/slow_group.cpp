#include "tests/support/slow_group.hpp"

#include <algorithm>
#include <cmath>

#include "tests/support/slow_sets.hpp"
#include "tests/support/slow_standing.hpp"

namespace steelyard::testing {
namespace {

bool holds(const std::vector<Id>& list, const Id& id) {
    return std::find(list.begin(), list.end(), id) != list.end();
}

/// The grade a person gives an option on a leaf, empty if none counts.
Id own_grade(const Decision& decision, const Person& person, const Id& leaf, const Id& option) {
    if (person.share == 0 || holds(person.abstains, option)) return {};
    Id grade;
    for (const GradeEntry& entry : decision.grades)
        if (entry.criterion == leaf && entry.option == option && entry.by == person.id) grade = entry.grade;
    return grade;
}

std::vector<Id> judges_of(const Decision& decision, const SlowResults& results) {
    std::vector<Id> judges;
    for (const Person& person : decision.people) {
        bool answers = false;
        for (const SlowSet& set : results.sets) answers = answers || set.by == person.id;
        for (const Node* node : slow_nodes(decision))
            if (node->children.empty() && node->rate == RateBy::grade)
                for (const Id& option : results.options)
                    answers = answers || !own_grade(decision, person, node->id, option).empty();
        if (answers && person.share > 0) judges.push_back(person.id);
    }
    return judges;
}

Decision without_answers(Decision decision, const Id& person) {
    std::erase_if(decision.judgments, [&](const Judgment& j) { return j.by == person; });
    std::erase_if(decision.points, [&](const PointsEntry& p) { return p.by == person; });
    std::erase_if(decision.grades, [&](const GradeEntry& g) { return g.by == person; });
    return decision;
}

/// Takes everybody else's answers out of the sets where the judge's entry has weights, and out of the places
/// where he gave a grade.
Decision answers_alone(Decision decision, const Person& judge, const SlowResults& results) {
    const auto others = [&](const Id& by) { return !by.empty() && by != judge.id; };
    for (const SlowSet& set : results.sets) {
        if (set.by != judge.id || !set.weights) continue;
        std::erase_if(decision.judgments,
                      [&](const Judgment& j) { return j.set == set.set && others(j.by); });
        std::erase_if(decision.points,
                      [&](const PointsEntry& p) { return p.set == set.set && others(p.by); });
    }
    const Decision before = decision;
    std::erase_if(decision.grades, [&](const GradeEntry& g) {
        return others(g.by) && !own_grade(before, judge, g.criterion, g.option).empty();
    });
    return decision;
}

/// The ratio a judge gave a pair last, 0 if none that counts.
double said(const Decision& decision, const Person& person, const SlowSet& set, const Id& a, const Id& b) {
    bool of_options = false;
    for (const Node* node : slow_nodes(decision))
        if (node->id == set.set) of_options = node->children.empty() && node->rate == RateBy::pairs;
    if (of_options && (holds(person.abstains, a) || holds(person.abstains, b))) return 0;
    double ratio = 0;
    for (const Judgment& j : decision.judgments) {
        if (j.set != set.set || j.by != person.id) continue;
        if (j.a == a && j.b == b) ratio = j.ratio;
        if (j.a == b && j.b == a) ratio = 1 / j.ratio;
    }
    return ratio;
}

std::optional<SlowSpread> spread_of(const Decision& decision, const SlowSet& set, const Id& a, const Id& b) {
    for (const Judgment& j : decision.judgments)
        if (j.set == set.set && j.by.empty() && ((j.a == a && j.b == b) || (j.a == b && j.b == a)))
            return std::nullopt;
    SlowSpread spread;
    spread.set = set.set;
    spread.a = a;
    spread.b = b;
    double product = 1;
    for (const Person& person : decision.people) {
        const double ratio = said(decision, person, set, a, b);
        if (ratio == 0 || person.share == 0) continue;
        spread.ratios[person.id] = ratio;
        product *= ratio;
        (std::abs(ratio - 1) < 1e-12 ? spread.equal : ratio > 1 ? spread.in_favour : spread.against) += 1;
    }
    if (spread.ratios.size() < 2) return std::nullopt;
    const double count = static_cast<double>(spread.ratios.size());
    const double mean = std::pow(product, 1 / count);
    double squares = 0;
    for (const auto& [judge, ratio] : spread.ratios) squares += std::pow(std::log(ratio / mean), 2);
    spread.gsd = std::exp(std::sqrt(squares / count));
    return spread;
}

} // namespace

std::optional<SlowGroup> slow_group(const Decision& decision, const SlowResults& results) {
    SlowGroup group;
    group.judges = judges_of(decision, results);
    if (group.judges.size() < 2) return std::nullopt;
    for (const Person& judge : decision.people) {
        if (!holds(group.judges, judge.id)) continue;
        group.scores[judge.id] = slow_standing(answers_alone(decision, judge, results), results.options,
                                               decision.settings.synthesis)
                                     .scores;

        const Decision rest = without_answers(decision, judge.id);
        const auto scores = slow_standing(rest, slow_musts(rest).in_play, decision.settings.synthesis).scores;
        std::map<Id, int>& ranks = group.without[judge.id];
        for (const auto& [option, score] : scores) {
            ranks[option] = 1;
            for (const auto& [other, theirs] : scores) ranks[option] += theirs > score + 1e-9 ? 1 : 0;
        }
    }
    for (const SlowSet& set : results.sets) {
        if (!set.by.empty() || set.from_points) continue;
        for (std::size_t i = 0; i < set.items.size(); ++i)
            for (std::size_t j = i + 1; j < set.items.size(); ++j)
                if (const auto spread = spread_of(decision, set, set.items[i], set.items[j]))
                    group.spreads.push_back(*spread);
    }
    return group;
}

} // namespace steelyard::testing
