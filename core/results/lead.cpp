#include "core/results/lead.hpp"

#include <algorithm>
#include <cmath>
#include <variant>

#include "core/decision/lookup.hpp"
#include "core/measure/figures.hpp"
#include "core/results/appraise.hpp"
#include "core/results/solve_cache.hpp"

namespace steelyard {
namespace {

/// Scores of the options in play were `option` not there; its own entry is 0.
std::vector<double> scores_without(const Decision& decision, const Results& results, std::size_t option) {
    Decision without = decision;
    for (auto& o : without.options) {
        const bool in_play =
            std::find(results.options.begin(), results.options.end(), o.id) != results.options.end();
        o.withdrawn = !in_play || o.id == results.options[option];
    }
    without.requirements.clear();
    without.checks.clear();
    SolveCache cache;
    const Standing then = Appraiser(without, cache).standing();
    std::vector<double> scores(results.options.size(), 0.0);
    for (std::size_t k = 0; k < then.options.size(); ++k) {
        const auto at = std::find(results.options.begin(), results.options.end(), then.options[k]);
        scores[static_cast<std::size_t>(at - results.options.begin())] = then.scores[k];
    }
    return scores;
}

/// 1 where larger figures are worse, -1 where smaller ones are, 0 where either may be.
double worse_side(const Curve& curve) {
    if (const auto* c = std::get_if<ProportionalCurve>(&curve.shape))
        return c->better == Better::less ? 1 : -1;
    if (const auto* line = std::get_if<LineCurve>(&curve.shape)) return line->worst > line->best ? 1 : -1;
    if (const auto* points = std::get_if<PointsCurve>(&curve.shape)) {
        const double rise = points->at.back()[1] - points->at.front()[1];
        return rise < 0 ? 1 : rise > 0 ? -1 : 0;
    }
    return 0;
}

} // namespace

std::optional<MovingFigure> moving_figure(const Decision& decision, const Results& results, const Id& leaf,
                                          const Id& option) {
    const Node* node = find_node(decision.criteria, leaf);
    const auto place = std::find(results.options.begin(), results.options.end(), option);
    const auto values = std::find_if(results.leaves.begin(), results.leaves.end(),
                                     [&](const LeafResult& l) { return l.leaf == leaf; });
    if (node == nullptr || !node->curve || node->rate != RateBy::figure || place == results.options.end() ||
        values == results.leaves.end()) {
        return std::nullopt;
    }
    MovingFigure moving{
        *node->curve, decision.settings.synthesis, values->weight, values->worths, {}, {}, {}, {}, {}};
    moving.option = static_cast<std::size_t>(place - results.options.begin());
    for (std::size_t k = 0; k < results.options.size(); ++k) {
        moving.rest.push_back(results.scores[k] - values->weight * values->local[k]);
    }
    for (const auto& r : decision.requirements) {
        if (r.criterion != leaf || r.waived) continue;
        if (r.at_least) moving.at_least = std::max(moving.at_least.value_or(*r.at_least), *r.at_least);
        if (r.at_most) moving.at_most = std::min(moving.at_most.value_or(*r.at_most), *r.at_most);
    }
    // A range that straddles a limit keeps its option in play, wherever its value is.
    const auto now = Figures(decision).of(leaf, option).value;
    if (now && moving.at_least && *now < *moving.at_least) moving.at_least.reset();
    if (now && moving.at_most && *now > *moving.at_most) moving.at_most.reset();
    if (moving.at_least || moving.at_most) moving.without = scores_without(decision, results, moving.option);
    return moving;
}

std::optional<double> lead_in_money(const Decision& decision, const Results& results) {
    if (decision.settings.money.empty() || !results.first) return std::nullopt;
    const Id& leader = results.options[*results.first];
    const auto now = Figures(decision).of(decision.settings.money, leader).value;
    const auto moving = moving_figure(decision, results, decision.settings.money, leader);
    if (!now || !moving) return std::nullopt;
    const auto tied = std::count(results.ranks.begin(), results.ranks.end(), 1);
    if (tied > 1) return 0;
    const double worse = worse_side(moving->curve);
    std::optional<double> lead;
    for (const auto& change : first_place_changes(*moving)) {
        if ((change.at - *now) * worse < 0) continue;
        const double distance = std::abs(change.at - *now);
        if (!lead || distance < *lead) lead = distance;
    }
    return lead;
}

} // namespace steelyard
