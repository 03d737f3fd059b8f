#include "core/decision/prune.hpp"

#include <algorithm>
#include <set>

#include "core/decision/lookup.hpp"

namespace steelyard {
namespace {

template<class T>
std::set<Id> ids_of(const std::vector<T>& list) {
    std::set<Id> ids;
    for (const auto& x : list) ids.insert(x.id);
    return ids;
}

class Pruner {
public:
    Pruner(Decision& decision, const Decision& before)
        : d_(decision),
          before_(before),
          people_(ids_of(decision.people)),
          options_(ids_of(decision.options)) {}

    Losses run() {
        requirements();
        judgments();
        points();
        measures();
        people();
        if (!d_.settings.money.empty() && !rated(d_.settings.money, RateBy::figure))
            d_.settings.money.clear();
        return losses_;
    }

private:
    bool known_or_room(const Id& by) const { return by.empty() || people_.contains(by); }

    bool rated(const Id& leaf, RateBy rate) const {
        const Node* node = find_node(d_.criteria, leaf);
        return node != nullptr && node->is_leaf() && node->rate == rate;
    }

    void requirements() {
        losses_.requirements += std::erase_if(d_.requirements, [&](const Requirement& r) {
            return !r.node.empty() && find_node(d_.criteria, r.node) == nullptr;
        });
        for (auto& r : d_.requirements) {
            if (!r.criterion.empty() && !rated(r.criterion, RateBy::figure)) r.criterion.clear();
        }
        const auto requirements = ids_of(d_.requirements);
        losses_.checks += std::erase_if(d_.checks, [&](const Check& c) {
            return !requirements.contains(c.requirement) || !options_.contains(c.option);
        });
    }

    void judgments() {
        const auto fits = [&](const Id& set, const Id& a, const Id& b) {
            const auto items = set_items(d_, set);
            return std::find(items.begin(), items.end(), a) != items.end() &&
                   std::find(items.begin(), items.end(), b) != items.end();
        };
        losses_.judgments += std::erase_if(
            d_.judgments, [&](const Judgment& j) { return !known_or_room(j.by) || !fits(j.set, j.a, j.b); });
        for (auto& f : d_.finished) {
            std::erase_if(f.skipped, [&](const auto& pair) { return !fits(f.set, pair[0], pair[1]); });
        }
        std::erase_if(d_.finished, [&](const Finished& f) {
            return !known_or_room(f.by) || set_items(d_, f.set).empty();
        });
    }

    void points() {
        for (auto& entry : d_.points) {
            const auto items = set_items(d_, entry.set);
            std::erase_if(entry.points, [&](const auto& p) {
                return std::find(items.begin(), items.end(), p.first) == items.end();
            });
        }
        losses_.points += std::erase_if(d_.points, [&](const PointsEntry& entry) {
            const Node* node = find_node(d_.criteria, entry.set);
            if (!known_or_room(entry.by) || node == nullptr || node->is_leaf()) return true;
            double sum = 0;
            for (const auto& [id, points] : entry.points) sum += points;
            return entry.points.size() != node->children.size() || sum <= 0;
        });
    }

    void measures() {
        losses_.figures += std::erase_if(d_.figures, [&](const Figure& f) {
            return !options_.contains(f.option) || !rated(f.criterion, RateBy::figure);
        });
        losses_.costs += std::erase_if(d_.costs, [&](const Cost& c) {
            return !options_.contains(c.option) || !rated(c.criterion, RateBy::figure);
        });
        losses_.grades += std::erase_if(d_.grades, [&](const GradeEntry& g) {
            if (!options_.contains(g.option) || !known_or_room(g.by) || !rated(g.criterion, RateBy::grade))
                return true;
            return !g.grade.empty() && find_grade(*find_node(d_.criteria, g.criterion), g.grade) == nullptr;
        });
    }

    void people() {
        for (auto& person : d_.people) {
            std::erase_if(person.abstains, [&](const Id& option) { return !options_.contains(option); });
        }
        for (auto& entry : d_.log) {
            if (!known_or_room(entry.by)) {
                entry.did += " (by " + person_name(before_, entry.by) + ")";
                entry.by.clear();
            }
        }
        for (auto& check : d_.checks) {
            if (!known_or_room(check.by)) {
                check.note +=
                    (check.note.empty() ? "" : " ") + ("(by " + person_name(before_, check.by) + ")");
                check.by.clear();
            }
        }
    }

    Decision& d_;
    const Decision& before_;
    std::set<Id> people_;
    std::set<Id> options_;
    Losses losses_;
};

} // namespace

Losses prune(Decision& decision, const Decision& before) {
    return Pruner(decision, before).run();
}

} // namespace steelyard
