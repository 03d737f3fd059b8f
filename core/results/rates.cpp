#include "core/results/rates.hpp"

#include <algorithm>
#include <cmath>
#include <variant>
#include <vector>

#include "core/decision/lookup.hpp"
#include "core/measure/curve.hpp"
#include "core/measure/figures.hpp"
#include "core/standing/local_values.hpp"

namespace steelyard {
namespace {

/// Derivatives to the left and to the right.
struct Slopes {
    double left = 0;
    double right = 0;
};

/// Of the worth in the figure.
Slopes worth_slopes(const Curve& curve, double x) {
    if (const auto* c = std::get_if<ProportionalCurve>(&curve.shape)) {
        const double slope = c->better == Better::more ? 1 : -1 / (x * x);
        return {slope, slope};
    }
    std::vector<std::array<double, 2>> at;
    if (const auto* line = std::get_if<LineCurve>(&curve.shape)) {
        at = {{line->worst, 0}, {line->best, 1}};
    } else if (const auto* points = std::get_if<PointsCurve>(&curve.shape)) {
        at = points->at;
    } else {
        const auto& target = std::get<TargetCurve>(curve.shape);
        at = {
            {target.target - target.tolerance, 0}, {target.target, 1}, {target.target + target.tolerance, 0}};
    }
    std::sort(at.begin(), at.end());
    Slopes slopes;
    for (std::size_t i = 1; i < at.size(); ++i) {
        const double slope = (at[i][1] - at[i - 1][1]) / (at[i][0] - at[i - 1][0]);
        if (x > at[i - 1][0] && x <= at[i][0]) slopes.left = slope;
        if (x >= at[i - 1][0] && x < at[i][0]) slopes.right = slope;
    }
    return slopes;
}

/// What one leaf is to one option.
class AtOption {
public:
    AtOption(const Decision& d, const LeafResult& leaf, std::size_t option)
        : synthesis_(d.settings.synthesis), leaf_(leaf), option_(option) {}

    /// Of the local value in the raw worth t. `anchored`: see is_anchored.
    Slopes local_slopes(bool anchored) const {
        if (synthesis_ == Synthesis::ideal && anchored) return {1, 1};
        const double t = *leaf_.worths[option_];
        double sum = 0;
        double largest = 0;
        for (std::size_t k = 0; k < leaf_.worths.size(); ++k) {
            if (k == option_ || !leaf_.worths[k]) continue;
            sum += *leaf_.worths[k];
            largest = std::max(largest, *leaf_.worths[k]);
        }
        if (synthesis_ == Synthesis::distributive) {
            if (!(sum > 0)) return {};
            // Divided twice: the square of a sum of small worths could vanish.
            const double slope = sum / (sum + t) / (sum + t);
            return {slope, slope};
        }
        if (!(largest > 0)) return {};
        return {t <= largest ? 1 / largest : 0, t < largest ? 1 / largest : 0};
    }

    /// The local value were the raw worth `t`.
    double local_at(double t, bool anchored) const {
        LeafWorths worths{leaf_.worths, anchored};
        worths.worths[option_] = t;
        return local_values(worths, synthesis_).values[option_];
    }

    /// Of the score in the figure x.
    Slopes score_slopes(const Curve& curve, double x) const {
        const Slopes worth = worth_slopes(curve, x);
        const Slopes local = local_slopes(is_anchored(curve));
        const auto chain = [&](double slope, bool to_the_right) {
            const bool worth_rises = (slope > 0) == to_the_right;
            return leaf_.weight * slope * (worth_rises ? local.right : local.left);
        };
        return {chain(worth.left, false), chain(worth.right, true)};
    }

private:
    Synthesis synthesis_;
    const LeafResult& leaf_;
    std::size_t option_;
};

/// The smallest of the rates that the one-sided derivatives give.
std::optional<double> cheapest(const Slopes& of_figure, const Slopes& of_money) {
    std::optional<double> best;
    for (const double figure : {of_figure.left, of_figure.right}) {
        for (const double money : {of_money.left, of_money.right}) {
            if (figure == 0 || money == 0) continue;
            const double rate = -figure / money;
            if (std::isfinite(rate) && (!best || std::abs(rate) < std::abs(*best))) best = rate;
        }
    }
    return best;
}

/// Worths of a leaf's grades, known ones only.
std::vector<double> grade_worths(const Results& results, const Node& leaf) {
    std::vector<double> worths;
    if (leaf.worths == WorthsBy::given) {
        for (const auto& grade : leaf.grades) {
            if (grade.worth) worths.push_back(*grade.worth);
        }
        return worths;
    }
    const auto set = std::find_if(results.sets.begin(), results.sets.end(),
                                  [&](const SetResult& s) { return s.set == leaf.id && s.by.empty(); });
    if (set == results.sets.end() || !set->weights) return worths;
    const double largest = *std::max_element(set->weights->begin(), set->weights->end());
    for (const double w : *set->weights) worths.push_back(w / largest);
    return worths;
}

/// Per grade: of the score to the next worse and the next better one. None at a mean of several grades.
Slopes grade_slopes(const Results& results, const Node& node, const AtOption& at, const LeafResult& leaf,
                    std::size_t option) {
    constexpr double same = 1e-12;
    const double now = *leaf.worths[option];
    std::optional<double> better;
    std::optional<double> worse;
    bool on_a_grade = false;
    for (const double worth : grade_worths(results, node)) {
        if (std::abs(worth - now) <= same) {
            on_a_grade = true;
        } else if (worth > now && (!better || worth < *better)) {
            better = worth;
        } else if (worth < now && (!worse || worth > *worse)) {
            worse = worth;
        }
    }
    if (!on_a_grade) return {};
    const double local = at.local_at(now, true);
    return {worse ? leaf.weight * (local - at.local_at(*worse, true)) : 0,
            better ? leaf.weight * (at.local_at(*better, true) - local) : 0};
}

} // namespace

std::optional<Rates> rates_at(const Decision& decision, const Results& results, const Id& option) {
    const Id& money = decision.settings.money;
    const auto place = std::find(results.options.begin(), results.options.end(), option);
    if (money.empty() || place == results.options.end()) return std::nullopt;
    const auto o = static_cast<std::size_t>(place - results.options.begin());
    const Figures figures(decision);
    const auto slopes_on = [&](const LeafResult& leaf) -> Slopes {
        const Node& node = *find_node(decision.criteria, leaf.leaf);
        if (!leaf.worths[o]) return {};
        const AtOption at(decision, leaf, o);
        if (node.rate == RateBy::grade) return grade_slopes(results, node, at, leaf, o);
        return at.score_slopes(*node.curve, *figures.of(leaf.leaf, option).value);
    };
    Rates rates{money, option, {}};
    const auto leaf_of = [&](const Id& id) {
        return std::find_if(results.leaves.begin(), results.leaves.end(),
                            [&](const LeafResult& l) { return l.leaf == id; });
    };
    const auto money_leaf = leaf_of(money);
    const Slopes of_money = money_leaf == results.leaves.end() ? Slopes{} : slopes_on(*money_leaf);
    for (const auto& leaf : results.leaves) {
        if (leaf.leaf == money || find_node(decision.criteria, leaf.leaf)->rate == RateBy::pairs) continue;
        rates.rates.push_back({leaf.leaf, cheapest(slopes_on(leaf), of_money)});
    }
    return rates;
}

} // namespace steelyard
