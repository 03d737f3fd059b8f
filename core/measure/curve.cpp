#include "core/measure/curve.hpp"

#include <algorithm>
#include <cmath>

namespace steelyard {
namespace {

/// Where x stands between two figures, 0 at `from` and 1 at `to`. Quarters are exact, and their differences
/// never overflow.
double part_between(double x, double from, double to) {
    return (x / 4 - from / 4) / (to / 4 - from / 4);
}

double on_points(const PointsCurve& curve, double x) {
    const auto& at = curve.at;
    if (x <= at.front()[0]) return at.front()[1];
    for (std::size_t i = 1; i < at.size(); ++i) {
        if (x > at[i][0]) continue;
        const double part = part_between(x, at[i - 1][0], at[i][0]);
        return at[i - 1][1] + part * (at[i][1] - at[i - 1][1]);
    }
    return at.back()[1];
}

} // namespace

std::optional<double> worth_of(const Curve& curve, double figure) {
    if (const auto* c = std::get_if<ProportionalCurve>(&curve.shape)) {
        if (figure <= 0) return std::nullopt;
        const double worth = c->better == Better::more ? figure : 1 / figure;
        return std::isfinite(worth) ? std::optional(worth) : std::nullopt;
    }
    if (const auto* line = std::get_if<LineCurve>(&curve.shape)) {
        return std::clamp(part_between(figure, line->worst, line->best), 0.0, 1.0);
    }
    if (const auto* points = std::get_if<PointsCurve>(&curve.shape)) return on_points(*points, figure);
    const auto& target = std::get<TargetCurve>(curve.shape);
    return std::max(0.0, 1 - std::abs(figure - target.target) / target.tolerance);
}

bool is_anchored(const Curve& curve) {
    return !std::holds_alternative<ProportionalCurve>(curve.shape);
}

} // namespace steelyard
