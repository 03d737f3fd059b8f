#include "shell/rooms/gauge_entries.hpp"

#include <algorithm>
#include <cmath>

namespace steelyard::gauge {
namespace {

template<class Entry, class Fits>
const Entry* last_of(const std::vector<Entry>& entries, Fits fits) {
    const auto found = std::find_if(entries.rbegin(), entries.rend(), fits);
    return found == entries.rend() ? nullptr : &*found;
}

/// The lowest and the highest anchor of a curve, if it has two.
struct Ends {
    double worst;
    double best;
};

std::optional<Ends> ends_of(const Curve& curve) {
    if (const auto* line = std::get_if<LineCurve>(&curve.shape)) return Ends{line->worst, line->best};
    if (const auto* points = std::get_if<PointsCurve>(&curve.shape)) {
        const auto by_worth = [](const auto& a, const auto& b) { return a[1] < b[1]; };
        const auto [low, high] = std::minmax_element(points->at.begin(), points->at.end(), by_worth);
        if ((*low)[0] != (*high)[0]) return Ends{(*low)[0], (*high)[0]};
    }
    if (const auto* target = std::get_if<TargetCurve>(&curve.shape))
        return Ends{target->target + target->tolerance, target->target};
    return std::nullopt;
}

} // namespace

const Figure* standing_figure(const Decision& decision, const Id& criterion, const Id& option) {
    return last_of(decision.figures,
                   [&](const Figure& f) { return f.criterion == criterion && f.option == option; });
}

const Check* standing_check(const Decision& decision, const Id& requirement, const Id& option) {
    return last_of(decision.checks,
                   [&](const Check& c) { return c.requirement == requirement && c.option == option; });
}

const GradeEntry* standing_grade(const Decision& decision, const Id& criterion, const Id& option,
                                 const Id& by) {
    const GradeEntry* last = last_of(decision.grades, [&](const GradeEntry& g) {
        return g.criterion == criterion && g.option == option && g.by == by;
    });
    return last != nullptr && !last->grade.empty() ? last : nullptr;
}

std::vector<const Figure*> superseded(const std::vector<const Figure*>& of_place) {
    std::vector<const Figure*> earlier;
    const Figure* later = nullptr;
    for (auto figure = of_place.rbegin(); figure != of_place.rend(); ++figure) {
        const bool another =
            later == nullptr || (*figure)->value != later->value || (*figure)->round != later->round;
        if (later != nullptr && another && (*figure)->value) earlier.push_back(*figure);
        later = *figure;
    }
    return earlier;
}

std::vector<const Figure*> superseded(const Decision& decision, const Id& criterion, const Id& option) {
    std::vector<const Figure*> of_place;
    for (const auto& figure : decision.figures) {
        if (figure.criterion == criterion && figure.option == option) of_place.push_back(&figure);
    }
    return superseded(of_place);
}

Figure typed_figure(const Decision& decision, const Id& criterion, const Id& option,
                    std::optional<double> value) {
    Figure figure{.criterion = criterion, .option = option, .value = value};
    if (const Figure* before = standing_figure(decision, criterion, option); before != nullptr && value)
        figure.round = before->round;
    return figure;
}

Figure figure_to_change(const Decision& decision, const Id& criterion, const Id& option) {
    const Figure* before = standing_figure(decision, criterion, option);
    Figure figure = before != nullptr ? *before : Figure{.criterion = criterion, .option = option};
    figure.at.clear();
    return figure;
}

Check check_to_change(const Decision& decision, const Id& requirement, const Id& option, const Id& by) {
    const Check* before = standing_check(decision, requirement, option);
    Check check = before != nullptr ? *before : Check{.requirement = requirement, .option = option};
    check.by = by;
    check.at.clear();
    return check;
}

GradeEntry grade_to_change(const Decision& decision, const Id& criterion, const Id& option, const Id& by) {
    const GradeEntry* before = standing_grade(decision, criterion, option, by);
    GradeEntry entry =
        before != nullptr ? *before : GradeEntry{.criterion = criterion, .option = option, .by = by};
    entry.at.clear();
    return entry;
}

std::string range_problem(const std::optional<double>& low, const std::optional<double>& value,
                          const std::optional<double>& high) {
    if (low && value && *low > *value) return "The low end cannot be above the value.";
    if (value && high && *value > *high) return "The high end cannot be below the value.";
    if (low && high && *low > *high) return "The low end cannot be above the high end.";
    return {};
}

CurveKind kind_of(const Curve& curve) {
    if (std::holds_alternative<ProportionalCurve>(curve.shape)) return CurveKind::proportional;
    if (std::holds_alternative<PointsCurve>(curve.shape)) return CurveKind::points;
    return std::holds_alternative<TargetCurve>(curve.shape) ? CurveKind::target : CurveKind::line;
}

std::vector<double> known_figures(const Decision& decision, const Node& leaf,
                                  const std::vector<std::pair<Id, double>>* computed) {
    std::vector<double> figures;
    if (leaf.cost_sheet) {
        if (computed != nullptr) {
            for (const auto& [option, value] : *computed) figures.push_back(value);
        }
    } else {
        for (const auto& option : decision.options) {
            const Figure* figure = standing_figure(decision, leaf.id, option.id);
            if (figure != nullptr && figure->value) figures.push_back(*figure->value);
        }
    }
    std::sort(figures.begin(), figures.end());
    figures.erase(std::unique(figures.begin(), figures.end()), figures.end());
    return figures;
}

std::optional<Curve> suggested_line(const std::vector<double>& figures, Better better) {
    if (figures.size() < 2) return std::nullopt;
    return better == Better::less ? Curve{LineCurve{figures.back(), figures.front()}}
                                  : Curve{LineCurve{figures.front(), figures.back()}};
}

bool less_is_better(const Curve& curve) {
    if (const auto* proportional = std::get_if<ProportionalCurve>(&curve.shape))
        return proportional->better == Better::less;
    const auto ends = ends_of(curve);
    return ends && ends->best < ends->worst;
}

std::optional<Curve> as_kind(CurveKind kind, const std::optional<Curve>& now,
                             const std::vector<double>& figures) {
    const Better better = now && less_is_better(*now) ? Better::less : Better::more;
    if (kind == CurveKind::proportional) return Curve{ProportionalCurve{better}};
    std::optional<Ends> ends = now ? ends_of(*now) : std::nullopt;
    if (!ends) {
        const auto line = suggested_line(figures, better);
        if (!line) return std::nullopt;
        ends = ends_of(*line);
    }
    const auto [worst, best] = *ends;
    if (kind == CurveKind::line) return Curve{LineCurve{worst, best}};
    if (kind == CurveKind::target) return Curve{TargetCurve{best, std::abs(best - worst)}};
    return worst < best ? Curve{PointsCurve{{{worst, 0}, {best, 1}}}}
                        : Curve{PointsCurve{{{best, 1}, {worst, 0}}}};
}

} // namespace steelyard::gauge
