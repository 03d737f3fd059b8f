#include <algorithm>
#include <variant>

#include "tests/support/random_maker.hpp"

namespace steelyard::testing {

void RandomMaker::make_figures() {
    for (const Node& node : nodes_) {
        if (!node.is_leaf() || node.rate != RateBy::figure) continue;
        // Figures beside a cost sheet, and cost lines without one, are kept but play no part.
        if (!node.cost_sheet || dice_.chance(10))
            for (const Option& option : decision_.options) make_figure(node, option.id);
        if (node.cost_sheet || dice_.chance(5)) make_costs(node);
    }
}

void RandomMaker::make_figure(const Node& leaf, const Id& option) {
    const FigureScale& scale = scales_.at(leaf.id);
    const bool stands = answered();
    const int superseded = dice_.chance(20) ? dice_.between(1, 2) : 0;
    for (int round = 1; round <= superseded + 1; ++round) {
        const bool last = round == superseded + 1;
        if (last && !stands && dice_.chance(60)) return; // nothing, or only what an earlier round said
        Figure figure;
        figure.criterion = leaf.id;
        figure.option = option;
        if (dice_.chance(30)) figure.round = round;
        figure.status =
            dice_.pick<QuoteStatus>({QuoteStatus::unstated, QuoteStatus::budget, QuoteStatus::quoted,
                                     QuoteStatus::spoken, QuoteStatus::confirmed, QuoteStatus::measured});
        if (dice_.chance(30)) figure.source = text();
        if (dice_.chance(10)) figure.valid_until = "2027-01-31";
        if (dice_.chance(50)) figure.at = time();
        int tenths = scale.base + dice_.below(scale.span + 1);
        const bool proportional = leaf.curve && std::holds_alternative<ProportionalCurve>(leaf.curve->shape);
        if (proportional && dice_.chance(3)) tenths = dice_.pick<int>({0, -tenths});
        if (last && !stands) {
            decision_.figures.push_back(figure); // clears the place
            return;
        }
        figure.value = tenths / 10.0;
        const int ends = dice_.below(12); // 3 in 12 with one end or both
        if (ends == 0 || ends == 2) figure.low = (tenths - dice_.below(scale.span / 3 + 1)) / 10.0;
        if (ends == 1 || ends == 2) figure.high = (tenths + dice_.below(scale.span / 3 + 1)) / 10.0;
        decision_.figures.push_back(figure);
    }
}

void RandomMaker::make_costs(const Node& leaf) {
    std::vector<SheetLine> lines{{"machine", CostKind::once}};
    if (dice_.chance(60)) lines.push_back({"energy", CostKind::per_year});
    if (dice_.chance(35)) lines.push_back({"tools", CostKind::per_part});
    if (dice_.chance(40)) lines.push_back({"overhaul", CostKind::in_year});
    if (dice_.chance(25)) lines.push_back({"resale", CostKind::in_year});
    for (const Option& option : decision_.options)
        for (const SheetLine& line : lines) {
            if (!answered()) continue;
            if (dice_.chance(15)) {
                SheetLine earlier = line;
                if (dice_.chance(30)) earlier.kind = CostKind::once;
                enter_cost(leaf, option.id, earlier);
            }
            enter_cost(leaf, option.id, line);
        }
}

void RandomMaker::enter_cost(const Node& leaf, const Id& option, const SheetLine& line) {
    const FigureScale& scale = scales_.at(leaf.id);
    const int years = leaf.cost_sheet ? leaf.cost_sheet->years : 10;
    Cost cost;
    cost.criterion = leaf.id;
    cost.option = option;
    cost.line = line.name;
    cost.kind = line.kind;
    const int tenths = scale.base + dice_.below(scale.span + 1);
    if (!dice_.chance(4)) // else it clears the line
        cost.value = tenths / 10.0;
    if (cost.value && line.kind == CostKind::per_part) cost.value = tenths / 1000.0;
    if (cost.value && line.name == "resale")
        cost.value = -tenths / 40.0 - 0.003; // an odd part, so that no sheet comes to 0 but for rounding
    if (line.kind == CostKind::in_year)
        cost.year = dice_.chance(8) ? std::min(200, years + dice_.between(1, 5)) : dice_.between(0, years);
    if (dice_.chance(15)) {
        cost.currency = "USD";
        cost.in_unit = dice_.pick<double>({0.92, 1.1, 0.0064});
    }
    if (dice_.chance(20)) cost.source = text();
    decision_.costs.push_back(cost);
}

void RandomMaker::make_grades() {
    for (const Node& node : nodes_)
        if (node.is_leaf() && node.rate == RateBy::grade && !node.grades.empty())
            for (const Option& option : decision_.options) make_grade(node, option.id);
}

void RandomMaker::make_grade(const Node& leaf, const Id& option) {
    for (const Id& by : voices()) {
        if (!answered()) continue;
        const int entries = dice_.chance(12) ? 2 : 1;
        for (int i = 0; i < entries; ++i) {
            GradeEntry entry;
            entry.criterion = leaf.id;
            entry.option = option;
            entry.by = by;
            entry.grade = dice_.pick(leaf.grades).id;
            if (progress_ != Progress::finished && dice_.chance(6)) entry.grade.clear(); // takes it back
            if (dice_.chance(15)) entry.source = text();
            decision_.grades.push_back(entry);
        }
    }
}

} // namespace steelyard::testing
