#include "shell/rooms/weigh_model.hpp"

#include <algorithm>
#include <cmath>
#include <cstdio>

#include "core/decision/lookup.hpp"
#include "shell/words.hpp"

namespace steelyard {
namespace {

/// Beyond three times what the others say a judgment is far off, beyond 1.7 times a little. Our own choice
/// for the words.
const double far_off = std::log(3.0);
const double little_off = std::log(1.7);

std::string span(double from, double to, const std::string& unit) {
    const std::string text = from == to ? figure_text(from) : figure_text(from) + " to " + figure_text(to);
    return unit.empty() ? text : text + " " + unit;
}

/// The range of a leaf: where its curve ends, or else the figures there are.
std::string leaf_range(const Decision& d, const Node& leaf) {
    if (leaf.rate == RateBy::grade && !leaf.grades.empty()) {
        const auto worth = [](const Grade& g) { return g.worth.value_or(0); };
        const auto [low, high] =
            std::minmax_element(leaf.grades.begin(), leaf.grades.end(),
                                [&](const Grade& a, const Grade& b) { return worth(a) < worth(b); });
        const Grade& worst = leaf.worths == WorthsBy::given ? *low : leaf.grades.back();
        const Grade& best = leaf.worths == WorthsBy::given ? *high : leaf.grades.front();
        return worst.name + " to " + best.name;
    }
    if (leaf.rate == RateBy::pairs) return "as judged in pairs";
    if (leaf.curve) {
        if (const auto* line = std::get_if<LineCurve>(&leaf.curve->shape)) {
            return span(std::min(line->worst, line->best), std::max(line->worst, line->best), leaf.unit);
        }
        if (const auto* points = std::get_if<PointsCurve>(&leaf.curve->shape)) {
            return span(points->at.front()[0], points->at.back()[0], leaf.unit);
        }
        if (const auto* target = std::get_if<TargetCurve>(&leaf.curve->shape)) {
            return figure_text(target->target) + " \xC2\xB1 " + figure_text(target->tolerance) +
                   (leaf.unit.empty() ? "" : " " + leaf.unit);
        }
    }
    std::vector<double> figures;
    for (const auto& option : d.options) {
        const auto last = std::find_if(d.figures.rbegin(), d.figures.rend(), [&](const Figure& f) {
            return f.criterion == leaf.id && f.option == option.id;
        });
        if (last != d.figures.rend() && last->value && !option.withdrawn) figures.push_back(*last->value);
    }
    if (figures.empty()) return "no figures yet";
    const auto [low, high] = std::minmax_element(figures.begin(), figures.end());
    return span(*low, *high, leaf.unit);
}

} // namespace

const SetResult* group_entry(const Results& results, const Id& set) {
    const auto found = std::find_if(results.sets.begin(), results.sets.end(),
                                    [&](const SetResult& s) { return s.set == set && s.by.empty(); });
    return found == results.sets.end() ? nullptr : &*found;
}

const SetResult* shown_entry(const Results& results, const Id& set, const Id& person) {
    const auto found = std::find_if(results.sets.begin(), results.sets.end(),
                                    [&](const SetResult& s) { return s.set == set && s.by == person; });
    return found == results.sets.end() ? group_entry(results, set) : &*found;
}

std::optional<double> said_ratio(const Decision& decision, const Id& set, const Id& by, const Id& a,
                                 const Id& b) {
    for (auto j = decision.judgments.rbegin(); j != decision.judgments.rend(); ++j) {
        if (j->set != set || j->by != by) continue;
        if (j->a == a && j->b == b) return j->ratio;
        if (j->a == b && j->b == a) return 1 / j->ratio;
    }
    return std::nullopt;
}

std::optional<double> group_ratio(const SetResult& entry, const Id& a, const Id& b) {
    for (const auto& misfit : entry.misfits) {
        if (misfit.a == a && misfit.b == b) return misfit.given;
        if (misfit.a == b && misfit.b == a) return 1 / misfit.given;
    }
    return std::nullopt;
}

std::optional<double> implied_ratio(const SetResult& entry, const Id& a, const Id& b) {
    for (const auto& misfit : entry.misfits) {
        if (misfit.a == a && misfit.b == b) return misfit.implied;
        if (misfit.a == b && misfit.b == a && misfit.implied) return 1 / *misfit.implied;
    }
    // A pair nobody judged: what the weights say of it.
    if (!entry.weights || entry.from_points) return std::nullopt;
    const auto i = std::find(entry.items.begin(), entry.items.end(), a) - entry.items.begin();
    const auto j = std::find(entry.items.begin(), entry.items.end(), b) - entry.items.begin();
    const auto n = static_cast<std::ptrdiff_t>(entry.items.size());
    if (i == n || j == n) return std::nullopt;
    const bool judged = std::none_of(entry.missing.begin(), entry.missing.end(), [&](const auto& pair) {
        return (pair[0] == a && pair[1] == b) || (pair[0] == b && pair[1] == a);
    });
    if (judged) return std::nullopt;
    return (*entry.weights)[static_cast<std::size_t>(i)] / (*entry.weights)[static_cast<std::size_t>(j)];
}

std::string misfit_words(const SetResult& entry, const Id& a, const Id& b) {
    for (const auto& misfit : entry.misfits) {
        const bool pair = (misfit.a == a && misfit.b == b) || (misfit.a == b && misfit.b == a);
        if (!pair || !misfit.implied) continue;
        const double off = std::abs(std::log(misfit.given / *misfit.implied));
        if (off > far_off) return "far off";
        return off > little_off ? "a little off" : "";
    }
    return "";
}

std::string range_at_stake(const Decision& decision, const Results& results, const Id& set, const Id& item) {
    const Node* node = find_node(decision.criteria, set);
    if (node == nullptr) return "";
    if (node->is_leaf()) {
        if (node->rate == RateBy::grade) return "";
        const Option* option = find_option(decision, item);
        return option == nullptr ? "" : option->note;
    }
    const Node* criterion = find_node(decision.criteria, item);
    if (criterion == nullptr) return "";
    if (criterion->is_leaf()) {
        if (criterion->cost_sheet) {
            for (const auto& computed : results.figures) {
                if (computed.leaf != criterion->id || computed.values.empty()) continue;
                const auto less = [](const auto& x, const auto& y) { return x.second < y.second; };
                const auto [low, high] =
                    std::minmax_element(computed.values.begin(), computed.values.end(), less);
                return span(std::round(low->second), std::round(high->second), criterion->unit);
            }
        }
        return leaf_range(decision, *criterion);
    }
    std::string names;
    for (const auto& child : criterion->children) {
        names += (names.empty() ? "" : ", ") + (child.name.empty() ? child.id : child.name);
    }
    return names;
}

std::string pair_sentence(const Decision& decision, const Id& set, const Id& a, const Id& b, double ratio) {
    const Node* node = find_node(decision.criteria, set);
    const bool criteria = node != nullptr && !node->is_leaf();
    const Id& more = ratio >= 1 ? a : b;
    const Id& less = ratio >= 1 ? b : a;
    return item_name(decision, set, more) + (criteria ? " counts " : " is worth ") +
           times_text(ratio >= 1 ? ratio : 1 / ratio) + " " + item_name(decision, set, less);
}

std::string judgment_sentence(const Decision& decision, const Id& set, const Id& a, const Id& b,
                              double ratio) {
    const Node* node = find_node(decision.criteria, set);
    const char* opening = node != nullptr && node->is_leaf() ? "On " : "For ";
    return opening + node_name(decision, set) + ", " + pair_sentence(decision, set, a, b, ratio) + ".";
}

SetState state_of(const Decision& decision, const SetResult& entry) {
    SetState state;
    const int n = static_cast<int>(entry.items.size());
    state.pairs = n * (n - 1) / 2;
    state.judged = state.pairs - static_cast<int>(entry.missing.size());
    state.ratio = "\xE2\x80\x94";
    if (entry.cr) {
        char buffer[32];
        std::snprintf(buffer, sizeof buffer, "%.2f", *entry.cr);
        state.ratio = buffer;
    }
    if (entry.from_points) {
        state.word = entry.weights ? "shared out" : "open";
        state.open = !entry.weights;
        state.pairs = 0;
    } else if (!entry.weights) {
        state.word = "open";
        state.open = true;
    } else if (entry.cr && *entry.cr > decision.settings.limit) {
        state.word = "contradicts";
        state.contradicts = true;
    } else {
        state.open = !entry.open.empty();
        state.word = state.open ? "nearly done" : "consistent";
    }
    return state;
}

} // namespace steelyard
