// Glossary: t the raw worth of the moving option on the leaf, U the sum and M the largest of the other raw
// worths, W the leaf's weight, b the rest of a score. In each regime every score times a common positive
// factor is a line in t: score_k ~ at_zero_k + slope_k t.
#include "core/tipping/one_figure.hpp"

#include <algorithm>
#include <cmath>
#include <limits>
#include <variant>

#include "core/measure/curve.hpp"
#include "core/standing/local_values.hpp"

namespace steelyard {
namespace {

constexpr double never = std::numeric_limits<double>::infinity();

struct Line {
    double at_zero = 0;
    double slope = 0;
};

/// A stretch of t in which the scores are these lines.
struct Regime {
    double from = 0;
    double to = never;
    std::vector<Line> lines;
};

std::vector<Regime> regimes(const MovingFigure& leaf) {
    const std::size_t m = leaf.rest.size();
    const double w = leaf.weight;
    double sum = 0;
    double largest = 0;
    double known = 1; // The moving option has a worth.
    for (std::size_t k = 0; k < m; ++k) {
        if (k == leaf.option || !leaf.worths[k]) continue;
        sum += *leaf.worths[k];
        largest = std::max(largest, *leaf.worths[k]);
        known += 1;
    }
    // `own`: the moving option's line; `other(u)`: that of an option with raw worth u; `missing`: of one
    // without.
    const auto make = [&](double from, double to, Line scale, Line own, auto&& other, Line missing) {
        Regime regime{from, to, {}};
        for (std::size_t k = 0; k < m; ++k) {
            Line local = missing;
            if (k == leaf.option) local = own;
            if (k != leaf.option && leaf.worths[k]) local = other(*leaf.worths[k]);
            const double b = leaf.rest[k];
            regime.lines.push_back(
                {b * scale.at_zero + w * local.at_zero, b * scale.slope + w * local.slope});
        }
        return regime;
    };
    if (leaf.synthesis == Synthesis::distributive) {
        // Times U + t.
        return {make(0, never, {sum, 1}, {0, 1},
                     [](double u) {
                         return Line{u, 0};
                     },
                     {sum / known, 1 / known})};
    }
    if (is_anchored(leaf.curve)) {
        return {make(0, never, {1, 0}, {0, 1},
                     [](double u) {
                         return Line{u, 0};
                     },
                     {sum / known, 1 / known})};
    }
    std::vector<Regime> both;
    if (largest > 0) {
        both.push_back(make(0, largest, {1, 0}, {0, 1 / largest},
                            [&](double u) {
                                return Line{u / largest, 0};
                            },
                            {sum / largest / known, 1 / largest / known}));
    }
    // Times t: the moving option is the best.
    both.push_back(make(largest, never, {0, 1}, {0, 1},
                        [](double u) {
                            return Line{u, 0};
                        },
                        {sum / known, 1 / known}));
    return both;
}

/// Where the upper envelope of the lines turns, inside (from, to). Where several lines lie on each other, one
/// of them stands for all.
std::vector<double> envelope_turns(const Regime& regime) {
    std::vector<double> turns;
    const auto& lines = regime.lines;
    if (lines.empty()) return turns;
    // The best just right of `from`: highest there, then steepest.
    double t = regime.from;
    const auto height = [&](std::size_t k) { return lines[k].at_zero + lines[k].slope * t; };
    std::size_t best = 0;
    for (std::size_t k = 1; k < lines.size(); ++k) {
        const double gain = height(k) - height(best);
        if (gain > 0 || (gain == 0 && lines[k].slope > lines[best].slope)) best = k;
    }
    for (;;) {
        // The next to overtake: steeper, soonest; of several the steepest.
        double soonest = regime.to;
        std::size_t next = best;
        for (std::size_t k = 0; k < lines.size(); ++k) {
            const double gain = lines[k].slope - lines[best].slope;
            if (!(gain > 0)) continue;
            const double at = (lines[best].at_zero - lines[k].at_zero) / gain;
            const double when = std::max(at, t);
            if (when < soonest || (when == soonest && next != best && lines[k].slope > lines[next].slope)) {
                soonest = when;
                next = k;
            }
        }
        if (next == best) return turns;
        turns.push_back(soonest);
        t = soonest;
        best = next;
    }
}

/// The figures at which a worth is reached, and those at which the curve turns.
class Inverse {
public:
    explicit Inverse(const Curve& curve) : curve_(curve) {
        if (const auto* line = std::get_if<LineCurve>(&curve.shape)) {
            pieces_ = {{line->worst, 0}, {line->best, 1}};
        } else if (const auto* points = std::get_if<PointsCurve>(&curve.shape)) {
            for (const auto& [x, worth] : points->at) pieces_.push_back({x, worth});
        } else if (const auto* target = std::get_if<TargetCurve>(&curve.shape)) {
            pieces_ = {{target->target - target->tolerance, 0},
                       {target->target, 1},
                       {target->target + target->tolerance, 0}};
        }
    }

    std::vector<double> turns() const {
        std::vector<double> xs;
        for (const auto& p : pieces_) xs.push_back(p.x);
        return xs;
    }

    void add_figures(double worth, std::vector<double>& xs) const {
        if (const auto* c = std::get_if<ProportionalCurve>(&curve_.shape)) {
            const double x = c->better == Better::more ? worth : 1 / worth;
            if (worth > 0 && std::isfinite(x)) xs.push_back(x);
            return;
        }
        for (std::size_t i = 1; i < pieces_.size(); ++i) {
            const Point& a = pieces_[i - 1];
            const Point& b = pieces_[i];
            if (a.worth == b.worth) continue;
            const double part = (worth - a.worth) / (b.worth - a.worth);
            if (part >= 0 && part <= 1) xs.push_back(a.x + part * (b.x - a.x));
        }
    }

private:
    struct Point {
        double x;
        double worth;
    };
    const Curve& curve_;
    std::vector<Point> pieces_;
};

std::vector<std::size_t> firsts(const std::vector<double>& scores) {
    constexpr double tie = 1e-9; // Shares a rank.
    const double best = *std::max_element(scores.begin(), scores.end());
    std::vector<std::size_t> out;
    for (std::size_t k = 0; k < scores.size(); ++k) {
        if (scores[k] >= best - tie) out.push_back(k);
    }
    return out;
}

bool outside(const MovingFigure& leaf, double figure) {
    return (leaf.at_least && figure < *leaf.at_least) || (leaf.at_most && figure > *leaf.at_most);
}

} // namespace

std::vector<double> scores_at(const MovingFigure& leaf, double figure) {
    std::vector<double> scores = leaf.rest;
    if (outside(leaf, figure)) {
        scores = leaf.without;
        scores[leaf.option] = -never;
        return scores;
    }
    LeafWorths worths{leaf.worths, is_anchored(leaf.curve)};
    worths.worths[leaf.option] = worth_of(leaf.curve, figure);
    const LocalValues local = local_values(worths, leaf.synthesis);
    for (std::size_t k = 0; k < scores.size(); ++k) scores[k] += leaf.weight * local.values[k];
    return scores;
}

std::vector<FigureChange> first_place_changes(const MovingFigure& leaf) {
    const Inverse inverse(leaf.curve);
    std::vector<double> xs = inverse.turns();
    for (const Regime& regime : regimes(leaf)) {
        for (const double t : envelope_turns(regime)) inverse.add_figures(t, xs);
        if (regime.to != never) inverse.add_figures(regime.to, xs);
    }
    for (const auto& limit : {leaf.at_least, leaf.at_most}) {
        if (limit) xs.push_back(*limit);
    }
    const bool positive = !is_anchored(leaf.curve);
    if (positive) std::erase_if(xs, [](double x) { return !(x > 0); });
    std::sort(xs.begin(), xs.end());
    // The same figure found in two ways differs by rounding.
    constexpr double same = 1e-12;
    std::vector<double> distinct;
    for (const double x : xs) {
        if (distinct.empty() ||
            x - distinct.back() > same * std::max(std::abs(x), std::abs(distinct.back()))) {
            distinct.push_back(x);
        }
    }
    // A limit stands as typed, not as a neighbour found by rounding.
    const auto is_limit = [&](double x) {
        return (leaf.at_least && std::abs(x - *leaf.at_least) <= same * std::abs(x)) ||
               (leaf.at_most && std::abs(x - *leaf.at_most) <= same * std::abs(x));
    };
    std::vector<FigureChange> changes;
    if (distinct.empty()) return changes;

    // A place inside each gap, the outermost beyond everything.
    std::vector<double> inside;
    const double reach = std::max(std::abs(distinct.front()), std::abs(distinct.back())) + 1;
    inside.push_back(positive ? distinct.front() / 2 : distinct.front() - reach);
    for (std::size_t i = 1; i < distinct.size(); ++i) inside.push_back(distinct[i - 1] / 2 + distinct[i] / 2);
    inside.push_back(positive ? distinct.back() * 2 : distinct.back() + reach);
    std::vector<std::size_t> below = firsts(scores_at(leaf, inside[0]));
    for (std::size_t i = 0; i < distinct.size(); ++i) {
        std::vector<std::size_t> above = firsts(scores_at(leaf, inside[i + 1]));
        if (above != below) {
            const bool out = outside(leaf, inside[i]) != outside(leaf, inside[i + 1]);
            changes.push_back({distinct[i], below, above, out && is_limit(distinct[i])});
        }
        below = std::move(above);
    }
    return changes;
}

} // namespace steelyard
