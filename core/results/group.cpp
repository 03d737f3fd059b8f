#include "core/results/group.hpp"

#include <algorithm>
#include <cmath>

#include "core/decision/lookup.hpp"

namespace steelyard {
namespace {

/// Ratios this close to 1 are ties, and distances of logarithms this close are equal: beyond them is
/// rounding.
constexpr double tie = 1e-12;

/// Whether a person has a grade of his own on an option in play.
bool grades_something(const Appraiser& appraiser, const Decision& decision, const Id& person,
                      const Results& results) {
    for (const Node* leaf : appraiser.leaves()) {
        if (leaf->rate != RateBy::grade) continue;
        for (std::size_t o = 0; o < decision.options.size(); ++o) {
            const Id& option = decision.options[o].id;
            if (std::find(results.options.begin(), results.options.end(), option) == results.options.end())
                continue;
            const auto& own = appraiser.grades(leaf->id)[o].own;
            if (std::any_of(own.begin(), own.end(), [&](const auto& g) { return g.person->id == person; }))
                return true;
        }
    }
    return false;
}

std::vector<Id> find_judges(const Decision& decision, const Appraiser& appraiser, const Results& results) {
    std::vector<Id> judges;
    for (const auto& person : decision.people) {
        if (person.share == 0) continue;
        const bool in_a_set = std::any_of(results.sets.begin(), results.sets.end(),
                                          [&](const SetResult& set) { return set.by == person.id; });
        if (in_a_set || grades_something(appraiser, decision, person.id, results))
            judges.push_back(person.id);
    }
    return judges;
}

/// The spread of one pair over the judges, or none where fewer than two answered.
std::optional<Spread> spread_of(const SetResult& set, const JudgedSet& judged, std::size_t i, std::size_t j) {
    Spread spread{.set = set.set, .a = set.items[i], .b = set.items[j]};
    std::vector<const Id*> who;
    std::vector<double> ratios;
    std::vector<double> logs;
    for (const auto& judge : judged.judges) {
        if (judge.share == 0 || !judge.own.judged(i, j)) continue;
        const double ratio = judge.own.at(i, j);
        who.push_back(&judge.person);
        ratios.push_back(ratio);
        logs.push_back(std::log(ratio));
        if (std::abs(ratio - 1) <= tie) {
            ++spread.equal;
        } else {
            ++(ratio > 1 ? spread.in_favour : spread.against);
        }
    }
    if (who.size() < 2) return std::nullopt;
    double longest = -1;
    for (std::size_t p = 0; p < who.size(); ++p) {
        for (std::size_t q = p + 1; q < who.size(); ++q) {
            const double distance = std::abs(logs[p] - logs[q]);
            if (distance <= longest + tie) continue;
            longest = distance;
            spread.furthest = {*who[p], *who[q]};
            spread.furthest_ratios = {ratios[p], ratios[q]};
        }
    }
    if (longest <= tie) return spread; // Alike: what rounding leaves of the mean is no spread.
    double mean = 0;
    for (const double x : logs) mean += x / static_cast<double>(logs.size());
    double variance = 0;
    for (const double x : logs) variance += (x - mean) * (x - mean) / static_cast<double>(logs.size());
    spread.gsd = std::exp(std::sqrt(variance));
    return spread;
}

std::vector<Spread> find_spreads(const Decision& decision, SetWeights& sets, const Results& results) {
    std::vector<Spread> spreads;
    for (const auto& set : results.sets) {
        if (!set.by.empty() || set.from_points) continue;
        const JudgedSet& judged = sets.judged(*find_node(decision.criteria, set.set), set.items);
        for (const auto& [i, j] : judged.agreed.missing()) {
            if (auto spread = spread_of(set, judged, i, j)) spreads.push_back(std::move(*spread));
        }
    }
    return spreads;
}

} // namespace

bool first_moves(const Results& results, const Standing& other) {
    if (!results.first) return other.first.has_value();
    const auto at = std::find(other.options.begin(), other.options.end(), results.options[*results.first]);
    if (at == other.options.end()) return true;
    return other.ranks[static_cast<std::size_t>(at - other.options.begin())] != 1;
}

std::optional<GroupResult> describe_group(const Decision& decision, Appraiser& appraiser, SolveCache& cache,
                                          const Results& results) {
    GroupResult group;
    group.judges = find_judges(decision, appraiser, results);
    if (group.judges.size() < 2) return std::nullopt;
    std::vector<std::vector<double>> ranks;
    for (const auto& judge : group.judges) {
        const Standing alone = appraiser.standing({.only = judge});
        group.rankings.push_back({judge, alone.scores, alone.ranks});
        ranks.push_back(mean_ranks(alone.scores));
    }
    if (const auto& found = cache.concordance(ranks)) group.concordance = Concordance{*found, group.judges};
    group.spreads = find_spreads(decision, appraiser.sets(), results);
    for (const auto& judge : group.judges) {
        const Standing rest = appraiser.standing({.without = judge});
        WithoutJudge without{judge, rest.options, rest.ranks, std::nullopt, first_moves(results, rest)};
        if (rest.first) without.first = rest.options[*rest.first];
        group.without.push_back(std::move(without));
    }
    return group;
}

} // namespace steelyard
