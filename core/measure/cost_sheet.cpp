#include "core/measure/cost_sheet.hpp"

#include <algorithm>
#include <cmath>

namespace steelyard {

double annuity_factor(double discount, int years) {
    if (discount == 0) return years;
    return -std::expm1(-years * std::log1p(discount)) / discount;
}

std::vector<const Cost*> standing_costs(const std::vector<const Cost*>& entered) {
    std::vector<const Cost*> lines;
    for (const Cost* cost : entered) {
        const auto same = std::find_if(lines.begin(), lines.end(),
                                       [&](const Cost* line) { return line->line == cost->line; });
        if (same == lines.end()) {
            lines.push_back(cost);
        } else {
            *same = cost;
        }
    }
    std::erase_if(lines, [](const Cost* line) { return !line->value; });
    return lines;
}

namespace {

/// Sums and factors of any finite lines can leave the range of a double; such a figure is none.
std::optional<double> if_finite(double figure) {
    return std::isfinite(figure) ? std::optional(figure) : std::nullopt;
}

} // namespace

std::optional<double> cost_sheet_figure(const CostSheet& sheet, const std::vector<const Cost*>& lines) {
    if (lines.empty()) return std::nullopt;
    const double annuity = annuity_factor(sheet.discount, sheet.years);
    double present = 0;
    for (const Cost* line : lines) {
        const double value = *line->value * line->in_unit;
        switch (line->kind) {
        case CostKind::once: present += value; break;
        case CostKind::per_year: present += value * annuity; break;
        case CostKind::per_part:
            if (!sheet.volume) return std::nullopt;
            present += value * *sheet.volume * annuity;
            break;
        case CostKind::in_year: {
            const int year = line->year.value_or(0);
            if (year <= sheet.years) present += value * std::pow(1 + sheet.discount, -year);
            break;
        }
        }
    }
    switch (sheet.result) {
    case CostResult::total: return if_finite(present);
    case CostResult::per_year: return if_finite(present / annuity);
    case CostResult::per_part: break;
    }
    if (!sheet.volume) return std::nullopt;
    return if_finite(present / annuity / *sheet.volume);
}

} // namespace steelyard
