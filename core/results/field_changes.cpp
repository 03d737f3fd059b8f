#include "core/results/field_changes.hpp"

#include <algorithm>
#include <cmath>
#include <utility>

#include "core/decision/lookup.hpp"
#include "core/measure/figures.hpp"
#include "core/results/solve.hpp"

namespace steelyard {
namespace {

std::size_t place_of(const std::vector<Id>& options, const Id& option) {
    return static_cast<std::size_t>(std::find(options.begin(), options.end(), option) - options.begin());
}

/// Sharing a rank is no order: differences up to this are ties.
constexpr double tie = 1e-9;

Node* leaf_of(Decision& decision, const Id& id) {
    return find_node(decision.criteria, id);
}

} // namespace

FieldChanges::FieldChanges(const Decision& decision, const Results& results)
    : decision_(decision), results_(results), field_(decision), newcomer_("newcomer") {
    for (auto& option : field_.options) {
        option.withdrawn = place_of(results.options, option.id) == results.options.size();
    }
    // Who is in play is settled; what only a must needs would exclude anew.
    field_.requirements.clear();
    field_.checks.clear();
    field_.settings.money.clear();
    while (find_option(decision, newcomer_) != nullptr) newcomer_ += "+";
}

double FieldChanges::progress() const {
    const std::size_t all = 2 * results_.options.size() + 1;
    return static_cast<double>(done_) / static_cast<double>(all);
}

Decision FieldChanges::without(const Id& option) const {
    Decision changed = field_;
    for (auto& o : changed.options) {
        if (o.id == option) o.withdrawn = true;
    }
    return changed;
}

Decision FieldChanges::with_copy(const Id& option) const {
    Decision changed = field_;
    changed.options.push_back({newcomer_, {}, {}, false, {}});
    const auto repeat = [&](auto& entries) {
        const std::size_t n = entries.size();
        for (std::size_t i = 0; i < n; ++i) {
            if (entries[i].option != option) continue;
            auto entry = entries[i];
            entry.option = newcomer_;
            entries.push_back(std::move(entry));
        }
    };
    repeat(changed.figures);
    repeat(changed.costs);
    repeat(changed.grades);
    for (auto& person : changed.people) {
        if (std::find(person.abstains.begin(), person.abstains.end(), option) != person.abstains.end())
            person.abstains.push_back(newcomer_);
    }
    for (const Node* leaf : leaves(decision_.criteria)) {
        if (leaf->rate != RateBy::pairs) continue;
        const std::size_t n = changed.judgments.size();
        for (std::size_t i = 0; i < n; ++i) {
            Judgment judgment = changed.judgments[i];
            if (judgment.set != leaf->id || (judgment.a != option && judgment.b != option)) continue;
            (judgment.a == option ? judgment.a : judgment.b) = newcomer_;
            changed.judgments.push_back(std::move(judgment));
        }
        Judgment equal;
        equal.set = leaf->id;
        equal.a = option;
        equal.b = newcomer_;
        changed.judgments.push_back(std::move(equal));
    }
    return changed;
}

Decision FieldChanges::with_typical() const {
    Decision changed = field_;
    changed.options.push_back({newcomer_, {}, {}, false, {}});
    const Figures figures(decision_);
    for (const auto& leaf : results_.leaves) {
        const Node& node = *find_node(decision_.criteria, leaf.leaf);
        if (node.rate == RateBy::figure) {
            std::vector<double> values;
            for (const auto& option : results_.options) {
                const auto x = figures.of(leaf.leaf, option).value;
                if (!x) continue;
                values.push_back(*x);
                if (!node.cost_sheet) continue;
                // A sheet takes no figure: its results stand as figures, so that the typical one can be among
                // them.
                Figure figure;
                figure.criterion = leaf.leaf;
                figure.option = option;
                figure.value = x;
                changed.figures.push_back(std::move(figure));
            }
            if (node.cost_sheet) {
                leaf_of(changed, leaf.leaf)->cost_sheet.reset();
                // Figures below a sheet do not count; with the sheet gone they must not begin to.
                for (auto& figure : changed.figures) {
                    if (figure.criterion != leaf.leaf) continue;
                    figure.value = figures.of(leaf.leaf, figure.option).value;
                    figure.low.reset();
                    figure.high.reset();
                }
            }
            if (values.empty()) continue;
            std::sort(values.begin(), values.end());
            const std::size_t n = values.size();
            Figure typical;
            typical.criterion = leaf.leaf;
            typical.option = newcomer_;
            typical.value = values[(n - 1) / 2] / 2 + values[n / 2] / 2;
            changed.figures.push_back(std::move(typical));
        } else if (node.rate == RateBy::grade) {
            std::vector<std::pair<double, std::size_t>> graded;
            for (std::size_t o = 0; o < results_.options.size(); ++o) {
                if (leaf.worths[o]) graded.emplace_back(*leaf.worths[o], o);
            }
            if (graded.empty()) continue;
            std::sort(graded.begin(), graded.end());
            const Id& median = results_.options[graded[(graded.size() - 1) / 2].second];
            const std::size_t n = changed.grades.size();
            for (std::size_t i = 0; i < n; ++i) {
                GradeEntry entry = changed.grades[i];
                if (entry.criterion != leaf.leaf || entry.option != median) continue;
                entry.option = newcomer_;
                changed.grades.push_back(std::move(entry));
            }
            for (auto& person : changed.people) {
                if (std::find(person.abstains.begin(), person.abstains.end(), median) !=
                        person.abstains.end() &&
                    std::find(person.abstains.begin(), person.abstains.end(), newcomer_) ==
                        person.abstains.end())
                    person.abstains.push_back(newcomer_);
            }
        } else {
            double logs = 0;
            std::size_t known = 0;
            for (std::size_t o = 0; o < results_.options.size(); ++o) {
                if (leaf.missing[o]) continue;
                logs += std::log(leaf.local[o]);
                ++known;
            }
            for (std::size_t o = 0; o < results_.options.size(); ++o) {
                if (leaf.missing[o]) continue;
                Judgment judgment;
                judgment.set = leaf.leaf;
                judgment.a = newcomer_;
                judgment.b = results_.options[o];
                judgment.ratio = std::exp(logs / static_cast<double>(known)) / leaf.local[o];
                changed.judgments.push_back(std::move(judgment));
            }
        }
    }
    return changed;
}

void FieldChanges::compare(FieldChange::Kind kind, const Id& option, const Decision& changed) {
    const Results then = solve(changed);
    FieldChange change{kind, option, {}, {}, {}};
    if (results_.first) change.first_before = results_.options[*results_.first];
    if (then.first) change.first_after = then.options[*then.first];
    if (change.first_after == newcomer_) change.first_after.clear();

    // The options that stay, best first, with their places before and after.
    std::vector<std::array<std::size_t, 2>> stay;
    for (std::size_t o = 0; o < results_.options.size(); ++o) {
        const std::size_t after = place_of(then.options, results_.options[o]);
        if (after < then.options.size()) stay.push_back({o, after});
    }
    std::stable_sort(stay.begin(), stay.end(), [&](const auto& x, const auto& y) {
        return results_.scores[x[0]] > results_.scores[y[0]];
    });
    for (std::size_t i = 0; i < stay.size(); ++i) {
        for (std::size_t j = i + 1; j < stay.size(); ++j) {
            const auto [a, a_then] = stay[i];
            const auto [b, b_then] = stay[j];
            const bool ahead = results_.scores[a] - results_.scores[b] > tie;
            const bool behind = then.scores[b_then] - then.scores[a_then] > tie;
            if (!ahead || !behind) continue;
            Reversal reversal{results_.options[a], results_.options[b], {}};
            std::vector<std::pair<double, Id>> moved;
            for (std::size_t l = 0; l < results_.leaves.size(); ++l) {
                const LeafResult& before = results_.leaves[l];
                const LeafResult& after = then.leaves[l];
                const double gap_before = before.weight * (before.local[a] - before.local[b]);
                const double gap_after = after.weight * (after.local[a_then] - after.local[b_then]);
                if (gap_before - gap_after > tie) moved.emplace_back(gap_before - gap_after, before.leaf);
            }
            std::stable_sort(moved.begin(), moved.end(),
                             [](const auto& x, const auto& y) { return x.first > y.first; });
            for (auto& [by, leaf] : moved) reversal.leaves.push_back(std::move(leaf));
            change.reversals.push_back(std::move(reversal));
        }
    }
    found_.push_back(std::move(change));
}

bool FieldChanges::step() {
    const std::size_t m = results_.options.size();
    if (m == 0 || done_ == 2 * m + 1) return false;
    if (done_ < m) {
        const Id& option = results_.options[done_];
        compare(FieldChange::Kind::without, option, without(option));
    } else if (done_ < 2 * m) {
        const Id& option = results_.options[done_ - m];
        compare(FieldChange::Kind::copy_of, option, with_copy(option));
    } else {
        compare(FieldChange::Kind::typical, Id{}, with_typical());
    }
    return ++done_ < 2 * m + 1;
}

std::vector<FieldChange> field_changes(const Decision& decision, const Results& results) {
    FieldChanges work(decision, results);
    while (work.step()) {
    }
    return work.found();
}

} // namespace steelyard
