#include "core/measure/figures.hpp"

#include "core/decision/lookup.hpp"
#include "core/measure/by_place.hpp"
#include "core/measure/cost_sheet.hpp"

namespace steelyard {

Figures::Figures(const Decision& decision) {
    for (const auto& figure : decision.figures) {
        figures_[{figure.criterion, figure.option}] = {figure.value, figure.low, figure.high};
    }
    const ByPlace<Cost> costs(decision.costs);
    for (const Node* leaf : leaves(decision.criteria)) {
        if (leaf->rate != RateBy::figure || !leaf->cost_sheet) continue;
        for (const auto& option : decision.options) {
            const auto lines = standing_costs(costs.at(leaf->id, option.id));
            figures_[{leaf->id, option.id}] = {cost_sheet_figure(*leaf->cost_sheet, lines), {}, {}};
        }
    }
}

StandingFigure Figures::of(const Id& criterion, const Id& option) const {
    const auto found = figures_.find({criterion, option});
    return found == figures_.end() ? StandingFigure{} : found->second;
}

} // namespace steelyard
