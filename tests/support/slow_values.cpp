#include "tests/support/slow_values.hpp"

#include <algorithm>
#include <cmath>
#include <variant>

#include "tests/support/slow_sets.hpp"

namespace steelyard::testing {
namespace {

/// (1 + rate)^-years by repeated division.
double discounted(double rate, int years) {
    double factor = 1;
    for (int year = 0; year < years; ++year) factor /= 1 + rate;
    return factor;
}

double between(double x, double x0, double y0, double x1, double y1) {
    return y0 + (y1 - y0) * (x - x0) / (x1 - x0);
}

struct WorthOf {
    double x;
    std::optional<double> operator()(const ProportionalCurve& curve) const {
        if (x <= 0) return std::nullopt;
        return curve.better == Better::more ? x : 1 / x;
    }
    std::optional<double> operator()(const LineCurve& curve) const {
        return std::clamp((x - curve.worst) / (curve.best - curve.worst), 0.0, 1.0);
    }
    std::optional<double> operator()(const PointsCurve& curve) const {
        if (x <= curve.at.front()[0]) return curve.at.front()[1];
        for (std::size_t i = 1; i < curve.at.size(); ++i)
            if (x <= curve.at[i][0])
                return between(x, curve.at[i - 1][0], curve.at[i - 1][1], curve.at[i][0], curve.at[i][1]);
        return curve.at.back()[1];
    }
    std::optional<double> operator()(const TargetCurve& curve) const {
        return std::max(0.0, 1 - std::abs(x - curve.target) / curve.tolerance);
    }
};

/// Worths of the options in play that have one, before any normalisation between leaves.
std::map<Id, double> worths(const Decision& decision, const Node& leaf, const std::vector<Id>& in_play) {
    std::map<Id, double> worth;
    if (leaf.rate == RateBy::pairs) {
        if (in_play.size() == 1) return {{in_play.front(), 1.0}};
        const SlowJudged judged = slow_judged_options(decision, leaf.id, in_play);
        const auto weights = slow_group_weights(decision, judged, decision.settings.method);
        if (!weights) return worth;
        double total = 0;
        for (const Id& option : in_play) total += weights->at(option);
        for (const Id& option : in_play) worth[option] = weights->at(option) / total;
    } else if (leaf.rate == RateBy::figure) {
        for (const Id& option : in_play)
            if (const auto figure = slow_figure(decision, leaf, option); figure && leaf.curve)
                if (const auto value = std::visit(WorthOf{figure->value}, leaf.curve->shape))
                    worth[option] = *value;
    } else {
        const auto of_grade = slow_grade_worths(decision, leaf);
        for (const Id& option : in_play) {
            double total = 0;
            double shares = 0;
            bool known = true;
            for (const auto& [share, grade] : slow_grades(decision, leaf, option)) {
                known = known && of_grade.count(grade) > 0;
                if (known) total += share * of_grade.at(grade);
                shares += share;
            }
            if (known && shares > 0) worth[option] = total / shares;
        }
    }
    return worth;
}

bool best_becomes_one(const Node& leaf) {
    return leaf.rate == RateBy::pairs ||
           (leaf.curve && std::holds_alternative<ProportionalCurve>(leaf.curve->shape));
}

} // namespace

std::optional<double> slow_computed_figure(const Decision& decision, const Node& leaf, const Id& option) {
    const CostSheet& sheet = *leaf.cost_sheet;
    std::map<std::string, const Cost*> lines;
    for (const Cost& cost : decision.costs)
        if (cost.criterion == leaf.id && cost.option == option) lines[cost.line] = &cost;

    double annuity = 0;
    for (int year = 1; year <= sheet.years; ++year) annuity += discounted(sheet.discount, year);
    double present = 0;
    bool valued = false;
    for (const auto& [name, line] : lines) {
        if (!line->value) continue;
        valued = true;
        const double money = *line->value * line->in_unit;
        if (line->kind == CostKind::once)
            present += money;
        else if (line->kind == CostKind::per_year)
            present += money * annuity;
        else if (line->kind == CostKind::in_year)
            present += *line->year <= sheet.years ? money * discounted(sheet.discount, *line->year) : 0;
        else if (sheet.volume)
            present += money * *sheet.volume * annuity;
        else
            return std::nullopt;
    }
    if (!valued || (sheet.result == CostResult::per_part && !sheet.volume)) return std::nullopt;
    if (sheet.result == CostResult::total) return present;
    return present / annuity / (sheet.result == CostResult::per_part ? *sheet.volume : 1);
}

std::optional<SlowFigure> slow_figure(const Decision& decision, const Node& leaf, const Id& option) {
    if (leaf.cost_sheet) {
        const auto computed = slow_computed_figure(decision, leaf, option);
        return computed ? std::optional<SlowFigure>{{*computed, *computed, *computed}} : std::nullopt;
    }
    std::optional<SlowFigure> standing;
    for (const Figure& figure : decision.figures) {
        if (figure.criterion != leaf.id || figure.option != option) continue;
        standing.reset();
        if (figure.value)
            standing = {*figure.value, figure.low.value_or(*figure.value),
                        figure.high.value_or(*figure.value)};
    }
    return standing;
}

std::map<Id, double> slow_grade_worths(const Decision& decision, const Node& leaf) {
    std::map<Id, double> worth;
    if (leaf.worths == WorthsBy::given) {
        for (const Grade& grade : leaf.grades)
            if (grade.worth) worth[grade.id] = *grade.worth;
        return worth;
    }
    std::vector<Id> ids;
    for (const Grade& grade : leaf.grades) ids.push_back(grade.id);
    if (ids.empty()) return worth;
    const SlowJudged judged = slow_judged(decision, leaf.id, ids, SlowKind::grades);
    const auto weights = slow_group_weights(decision, judged, decision.settings.method);
    if (!weights) return worth;
    double largest = 0;
    for (const auto& [grade, weight] : *weights) largest = std::max(largest, weight);
    for (const auto& [grade, weight] : *weights) worth[grade] = weight / largest;
    return worth;
}

std::vector<std::pair<double, Id>> slow_grades(const Decision& decision, const Node& leaf, const Id& option) {
    std::map<Id, Id> standing; // who, grade
    for (const GradeEntry& entry : decision.grades)
        if (entry.criterion == leaf.id && entry.option == option) standing[entry.by] = entry.grade;
    if (standing.count("") > 0 && !standing.at("").empty()) return {{1.0, standing.at("")}};
    std::vector<std::pair<double, Id>> grades;
    for (const Person& person : decision.people) {
        const bool abstains =
            std::find(person.abstains.begin(), person.abstains.end(), option) != person.abstains.end();
        if (!abstains && person.share > 0 && standing.count(person.id) > 0 && !standing.at(person.id).empty())
            grades.emplace_back(person.share, standing.at(person.id));
    }
    return grades;
}

SlowLeaf slow_leaf(const Decision& decision, const Node& leaf, const std::vector<Id>& in_play,
                   Synthesis synthesis) {
    const bool ideal = synthesis == Synthesis::ideal;
    const auto worth = worths(decision, leaf, in_play);
    SlowLeaf result;
    double total = 0;
    double best = 0;
    for (const auto& [option, value] : worth) {
        total += value;
        best = std::max(best, value);
    }
    result.all_zero = !worth.empty() && best == 0;
    double sum_of_local = 0;
    for (const auto& [option, value] : worth) {
        double local = value;
        if (result.all_zero)
            local = ideal ? 0 : 1 / static_cast<double>(worth.size());
        else if (!ideal)
            local = value / total;
        else if (best_becomes_one(leaf))
            local = value / best;
        result.local[option] = local;
        sum_of_local += local;
    }
    double placeholder = ideal ? 1 : 1 / static_cast<double>(in_play.size());
    if (!worth.empty()) placeholder = sum_of_local / static_cast<double>(worth.size());
    for (const Id& option : in_play)
        if (worth.count(option) == 0) {
            result.missing.insert(option);
            result.local[option] = placeholder;
        }
    return result;
}

} // namespace steelyard::testing
