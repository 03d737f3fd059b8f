#include "core/decision/check.hpp"

#include <algorithm>
#include <cmath>
#include <map>
#include <set>
#include <string>
#include <utility>

#include "core/decision/json_value.hpp"
#include "core/decision/lookup.hpp"
#include "core/decision/unknown_members.hpp"

namespace steelyard {
namespace {

constexpr std::size_t longest_id = 64;
constexpr int deepest_tree = 12;
constexpr double largest_ratio = 100; ///< Beyond this a ratio is taken for a slip of the hand.
constexpr double scale_end = 9;       ///< Saaty 1980: the scale runs from 1/9 to 9.
constexpr std::size_t longest_list =
    500; ///< Options, or children of one criterion: beyond this no set can be worked with.
constexpr std::size_t largest_pairs = 100; ///< Items of a set that judgments may compare.
constexpr int most_years = 200;
constexpr int most_trials = 10'000'000;

/// 1/9 typed with many digits should not draw a notice for its last one.
constexpr double rounding = 1e-9;

std::string at(const char* list, std::size_t index, const char* member = "") {
    return std::string("/") + list + "/" + std::to_string(index) + member;
}

std::string quoted(const std::string& text) {
    return JsonValue::of(text).shown();
}
std::string shown(double number) {
    return JsonValue::of(number).shown();
}

/// True for a number that could be read; what could not was named by the reader.
bool is_read(double number) {
    return !std::isnan(number);
}

class Checker {
public:
    Checker(const Decision& decision, const Unread& unread) : d_(decision), unread_(unread) {}

    Checked run() {
        collect_ids();
        tree();
        people();
        judgments();
        points();
        measures();
        requirements();
        settings();
        records();
        result_.notices = unknown_member_notices(d_);
        std::move(notices_.begin(), notices_.end(), std::back_inserter(result_.notices));
        return std::move(result_);
    }

private:
    void refuse(std::string where, std::string found, std::string expected) {
        if (result_.problems.size() < max_problems) {
            result_.problems.push_back({std::move(where), std::move(found), std::move(expected)});
        }
    }
    void notice(const char* code, std::string text, std::string where) {
        notices_.push_back({code, std::move(text), std::move(where)});
    }

    /// True where every member of an object could be read, so that one left at its default was left out.
    bool read_whole(const std::string& object) const { return !unread_.objects.contains(object); }

    /// Takes an id into `known`, refusing what is too long, repeated or, in a decision made here, empty.
    void take_id(std::set<Id>& known, const Id& id, const std::string& where, const char* what) {
        if (id.empty()) {
            if (!unread_.any) refuse(where + "/id", "an empty text", "an id of 1 to 64 bytes");
            return;
        }
        if (id.size() > longest_id) {
            refuse(where + "/id", "an id of " + std::to_string(id.size()) + " bytes", "at most 64");
        }
        if (!known.insert(id).second) {
            refuse(where + "/id", quoted(id) + " again", std::string("an id that no other ") + what + " has");
        }
    }

    void few_enough(std::size_t count, const std::string& where, const char* what) {
        if (count <= longest_list) return;
        refuse(where, std::to_string(count) + " " + what, "at most " + std::to_string(longest_list));
    }

    void collect_ids() {
        for (std::size_t i = 0; i < d_.people.size(); ++i)
            take_id(people_, d_.people[i].id, at("people", i), "person");
        for (std::size_t i = 0; i < d_.options.size(); ++i) {
            take_id(options_, d_.options[i].id, at("options", i), "option");
        }
        few_enough(d_.options.size(), "/options", "options");
        placed_ = placed_nodes(d_.criteria);
        for (const auto& placed : placed_) {
            take_id(nodes_, placed.node->id, placed.pointer, "criterion");
            by_id_.emplace(placed.node->id, placed.node);
        }
        for (std::size_t i = 0; i < d_.requirements.size(); ++i) {
            take_id(requirements_, d_.requirements[i].id, at("requirements", i), "requirement");
        }
    }

    /// True where `id` may be used further: it is known, or nothing can be said of it.
    bool refer(const std::set<Id>& known, bool unsure, const Id& id, const std::string& where,
               const char* what) {
        if (id.empty() && unread_.any) return false;
        if (known.contains(id)) return true;
        if (!unsure) refuse(where, quoted(id), std::string("the id of ") + what);
        return false;
    }
    bool refer_option(const Id& id, const std::string& where) {
        return refer(options_, unread_.options, id, where, "an option");
    }
    void refer_person_or_room(const Id& by, const std::string& where) {
        if (!by.empty()) refer(people_, unread_.people, by, where, "a person");
    }
    const Node* node(const Id& id) const {
        const auto found = by_id_.find(id);
        return found == by_id_.end() ? nullptr : found->second;
    }

    /// The leaf rated in the given way, or null with a problem.
    const Node* refer_leaf(const Id& id, RateBy rate, const std::string& where, const char* what) {
        if (!refer(nodes_, unread_.nodes, id, where, what)) return nullptr;
        const Node* leaf = node(id);
        if (leaf->is_leaf() && leaf->rate == rate) return leaf;
        refuse(where, quoted(id), std::string("the id of ") + what);
        return nullptr;
    }

    void number_over(double number, double floor, bool floor_allowed, const std::string& where,
                     const char* expected) {
        if (is_read(number) && (number < floor || (number == floor && !floor_allowed))) {
            refuse(where, shown(number), expected);
        }
    }

    void worth(std::optional<double> worth, const std::string& where) {
        if (worth && is_read(*worth) && (*worth < 0 || *worth > 1))
            refuse(where, shown(*worth), "a worth from 0 to 1");
    }

    void tree() {
        for (const auto& [node, parent, depth, pointer] : placed_) {
            if (depth == deepest_tree + 1)
                refuse(pointer, "a criterion at depth 13", "a tree at most 12 deep");
            if (node->curve) curve(*node->curve, pointer + "/curve");
            if (node->cost_sheet) cost_sheet(*node->cost_sheet, pointer + "/cost_sheet");
            few_enough(node->children.size(), pointer + "/children", "children");
            few_enough(node->grades.size(), pointer + "/grades", "grades");
            std::set<Id>& grades = grades_[node->id];
            for (std::size_t i = 0; i < node->grades.size(); ++i) {
                const std::string where = pointer + "/grades/" + std::to_string(i);
                take_id(grades, node->grades[i].id, where, "grade here");
                worth(node->grades[i].worth, where + "/worth");
            }
        }
    }

    void curve(const Curve& curve, const std::string& where) {
        if (const auto* line = std::get_if<LineCurve>(&curve.shape)) {
            if (line->worst == line->best)
                refuse(where + "/best", shown(line->best), "another value than worst");
        } else if (const auto* points = std::get_if<PointsCurve>(&curve.shape)) {
            if (points->at.empty() && read_whole(where))
                refuse(where + "/at", "no point", "at least one point");
            for (std::size_t i = 0; i < points->at.size(); ++i) {
                const std::string point = where + "/at/" + std::to_string(i);
                const auto& [x, y] = points->at[i];
                if (i > 0 && x <= points->at[i - 1][0]) {
                    refuse(point, shown(x) + " after " + shown(points->at[i - 1][0]),
                           "figures that increase");
                }
                worth(y, point + "/1");
            }
        } else if (const auto* target = std::get_if<TargetCurve>(&curve.shape)) {
            number_over(target->tolerance, 0, false, where + "/tolerance", "a number above 0");
        }
    }

    void cost_sheet(const CostSheet& sheet, const std::string& where) {
        if (sheet.years < 1 || sheet.years > most_years) {
            refuse(where + "/years", std::to_string(sheet.years), "a whole number from 1 to 200");
        }
        number_over(sheet.discount, -1, false, where + "/discount", "a rate above -1");
        if (sheet.volume) number_over(*sheet.volume, 0, false, where + "/volume", "a number above 0");
    }

    void people() {
        double sum = 0;
        bool all_read = true;
        for (std::size_t i = 0; i < d_.people.size(); ++i) {
            const Person& person = d_.people[i];
            number_over(person.share, 0, true, at("people", i, "/share"), "a share of 0 or more");
            all_read = all_read && person.share >= 0; // Also false for one that was not read.
            sum += person.share;
            for (std::size_t k = 0; k < person.abstains.size(); ++k) {
                refer_option(person.abstains[k], at("people", i, "/abstains/") + std::to_string(k));
            }
        }
        if (!d_.people.empty() && all_read && sum == 0) {
            refuse("/people", "shares that are all 0", "a share above 0 for somebody");
        }
    }

    const std::set<Id>& items_of(const Id& set) {
        auto found = items_.find(set);
        if (found == items_.end()) {
            const auto items = set_items(d_, set);
            found = items_.emplace(set, std::set<Id>(items.begin(), items.end())).first;
        }
        return found->second;
    }

    /// True where the items of `set` can be looked at; a problem where it is no set.
    bool refer_set(const Id& set, const std::string& where) {
        if (!refer(nodes_, unread_.nodes, set, where, "a set of pairs")) return false;
        const Node* n = node(set);
        const bool of_options = n->is_leaf() && n->rate == RateBy::pairs;
        const bool of_grades = n->is_leaf() && n->rate == RateBy::grade && n->worths == WorthsBy::pairs;
        if (of_options && unread_.options) return false;
        if (of_grades && unread_.grades) return false;
        if (!n->is_leaf() && unread_.nodes) return false;
        if (!n->is_leaf() || of_options || of_grades) return true;
        refuse(where, quoted(set), "the id of a set of pairs");
        return false;
    }

    bool refer_item(const Id& set, const Id& item, const std::string& where) {
        if (item.empty() && unread_.any) return false;
        if (items_of(set).contains(item)) return true;
        refuse(where, quoted(item), "an item of the set " + quoted(set));
        return false;
    }

    void judgments() {
        for (std::size_t i = 0; i < d_.judgments.size(); ++i) {
            const Judgment& j = d_.judgments[i];
            refer_person_or_room(j.by, at("judgments", i, "/by"));
            if (refer_set(j.set, at("judgments", i, "/set"))) {
                if (items_of(j.set).size() > largest_pairs) {
                    refuse(at("judgments", i, "/set"),
                           "a set of " + std::to_string(items_of(j.set).size()) + " items",
                           "at most " + std::to_string(largest_pairs) + " items to compare in pairs");
                }
                const bool a = refer_item(j.set, j.a, at("judgments", i, "/a"));
                const bool b = refer_item(j.set, j.b, at("judgments", i, "/b"));
                if (a && b && j.a == j.b)
                    refuse(at("judgments", i, "/b"), quoted(j.b), "another item than a");
            }
            ratio(j.ratio, at("judgments", i, "/ratio"));
        }
        for (std::size_t i = 0; i < d_.finished.size(); ++i) {
            const Finished& f = d_.finished[i];
            refer_person_or_room(f.by, at("finished", i, "/by"));
            if (!refer_set(f.set, at("finished", i, "/set"))) continue;
            for (std::size_t k = 0; k < f.skipped.size(); ++k) {
                const std::string where = at("finished", i, "/skipped/") + std::to_string(k);
                const bool a = refer_item(f.set, f.skipped[k][0], where + "/0");
                const bool b = refer_item(f.set, f.skipped[k][1], where + "/1");
                if (a && b && f.skipped[k][0] == f.skipped[k][1]) {
                    refuse(where + "/1", quoted(f.skipped[k][1]), "another item");
                }
            }
        }
    }

    void ratio(double ratio, const std::string& where) {
        if (!is_read(ratio)) return;
        if (ratio < 1 / largest_ratio || ratio > largest_ratio) {
            refuse(where, shown(ratio), "a ratio from 1/100 to 100");
        } else if (ratio > scale_end * (1 + rounding) || ratio * scale_end < 1 - rounding) {
            notice("ratio-off-scale", "The ratio " + shown(ratio) + " lies outside 1/9 to 9.", where);
        }
    }

    void points() {
        for (std::size_t i = 0; i < d_.points.size(); ++i) {
            const PointsEntry& p = d_.points[i];
            refer_person_or_room(p.by, at("points", i, "/by"));
            double sum = 0;
            bool all_read = true;
            for (const auto& [id, value] : p.points) {
                all_read = all_read && is_read(value);
                sum += value;
                number_over(value, 0, true, at("points", i, "/points") + pointer_part(id),
                            "0 points or more");
            }
            if (!refer(nodes_, unread_.nodes, p.set, at("points", i, "/set"), "a criterion with children"))
                continue;
            const Node* set = node(p.set);
            if (set->is_leaf()) {
                refuse(at("points", i, "/set"), quoted(p.set), "the id of a criterion with children");
                continue;
            }
            if (unread_.nodes) continue;
            for (const auto& [id, value] : p.points) {
                refer_item(p.set, id, at("points", i, "/points") + pointer_part(id));
            }
            std::set<Id> named;
            for (const auto& [id, value] : p.points) named.insert(id);
            for (const auto& child : set->children) {
                if (!named.contains(child.id) && read_whole(at("points", i))) {
                    refuse(at("points", i, "/points"), "no points for " + quoted(child.id),
                           "points for every item");
                }
            }
            if (all_read && !p.points.empty() && sum <= 0) {
                refuse(at("points", i, "/points"), "a sum of " + shown(sum), "a sum above 0");
            }
        }
    }

    void range(const std::optional<double>& low, const std::optional<double>& value,
               const std::optional<double>& high, const std::string& where) {
        if (low && value && *low > *value) refuse(where + "/low", shown(*low), "a number not above value");
        if (high && value && *value > *high)
            refuse(where + "/high", shown(*high), "a number not below value");
        if (!value && low && high && *low > *high)
            refuse(where + "/low", shown(*low), "a number not above high");
    }

    void measures() {
        for (std::size_t i = 0; i < d_.figures.size(); ++i) {
            const Figure& f = d_.figures[i];
            const Node* leaf = refer_leaf(f.criterion, RateBy::figure, at("figures", i, "/criterion"),
                                          "a criterion rated by figures");
            refer_option(f.option, at("figures", i, "/option"));
            range(f.low, f.value, f.high, at("figures", i));
            if (f.round && *f.round < 1)
                refuse(at("figures", i, "/round"), shown(*f.round), "a round from 1");
            if (leaf != nullptr) figure_notices(*leaf, f, at("figures", i));
        }
        for (std::size_t i = 0; i < d_.costs.size(); ++i) {
            const Cost& c = d_.costs[i];
            const Node* leaf = refer_leaf(c.criterion, RateBy::figure, at("costs", i, "/criterion"),
                                          "a criterion rated by figures");
            refer_option(c.option, at("costs", i, "/option"));
            number_over(c.in_unit, 0, false, at("costs", i, "/in_unit"), "a number above 0");
            if (c.year && *c.year > most_years) {
                refuse(at("costs", i, "/year"), shown(*c.year), "a whole number from 0 to 200");
            }
            if (c.kind == CostKind::in_year && !c.year && read_whole(at("costs", i))) {
                refuse(at("costs", i), "no member \"year\"", "one for a cost in one year");
            }
            if (leaf != nullptr && !leaf->cost_sheet) {
                notice("cost-unused", "This cost does not count: its criterion has no cost sheet.",
                       at("costs", i));
            } else if (leaf != nullptr && c.kind == CostKind::in_year && c.year &&
                       *c.year > leaf->cost_sheet->years) {
                notice("cost-unused", "This cost falls after the years of the cost sheet and does not count.",
                       at("costs", i));
            }
        }
        for (std::size_t i = 0; i < d_.grades.size(); ++i) {
            const GradeEntry& g = d_.grades[i];
            const Node* leaf = refer_leaf(g.criterion, RateBy::grade, at("grades", i, "/criterion"),
                                          "a criterion rated by grades");
            refer_option(g.option, at("grades", i, "/option"));
            refer_person_or_room(g.by, at("grades", i, "/by"));
            if (leaf != nullptr && !g.grade.empty() && !unread_.grades &&
                !grades_[leaf->id].contains(g.grade)) {
                refuse(at("grades", i, "/grade"), quoted(g.grade), "a grade of " + quoted(leaf->id));
            }
        }
    }

    void figure_notices(const Node& leaf, const Figure& f, const std::string& where) {
        if (unread_.any) return; // The file is refused anyway, and its anchors may not be numbers.
        if (leaf.cost_sheet) {
            notice("figure-unused", "This figure does not count: its criterion has a cost sheet.", where);
        } else if (leaf.curve && f.value) {
            if (const auto* line = std::get_if<LineCurve>(&leaf.curve->shape)) {
                const auto [low, high] = std::minmax(line->worst, line->best);
                if (*f.value < low || *f.value > high) {
                    notice("outside-anchors",
                           "The figure " + shown(*f.value) + " lies outside " + shown(low) + " to " +
                               shown(high) + ".",
                           where + "/value");
                }
            } else if (std::holds_alternative<ProportionalCurve>(leaf.curve->shape) && *f.value <= 0) {
                notice("not-positive", "A figure of 0 or less counts as missing under a proportional curve.",
                       where + "/value");
            }
        }
    }

    void requirements() {
        for (std::size_t i = 0; i < d_.requirements.size(); ++i) {
            const Requirement& r = d_.requirements[i];
            const auto where = [&](const char* member) { return at("requirements", i, member); };
            if (!r.criterion.empty()) {
                refer_leaf(r.criterion, RateBy::figure, where("/criterion"), "a criterion rated by figures");
            }
            if (!r.node.empty()) refer(nodes_, unread_.nodes, r.node, where("/node"), "a criterion");
            if (!r.criterion.empty() && !r.node.empty()) {
                refuse(where("/node"), "a node beside a criterion", "one of them");
            }
            if (r.yes_no &&
                (r.at_least || r.at_most || r.min_worth || !r.criterion.empty() || !r.node.empty())) {
                refuse(where("/yes_no"), "yes or no beside a limit or a criterion", "one of them");
            }
            if (r.min_worth && r.node.empty())
                refuse(where("/min_worth"), shown(*r.min_worth), "a node to go with it");
            worth(r.min_worth, where("/min_worth"));
            if (r.at_least && r.at_most && *r.at_least > *r.at_most) {
                refuse(where("/at_least"), shown(*r.at_least), "a number not above at_most");
            }
            if (r.waived) refer_person_or_room(r.waived->by, where("/waived/by"));
        }
        for (std::size_t i = 0; i < d_.checks.size(); ++i) {
            const Check& c = d_.checks[i];
            refer(requirements_, unread_.requirements, c.requirement, at("checks", i, "/requirement"),
                  "a requirement");
            refer_option(c.option, at("checks", i, "/option"));
            refer_person_or_room(c.by, at("checks", i, "/by"));
            range(c.low, c.value, c.high, at("checks", i));
        }
    }

    void settings() {
        const Settings& s = d_.settings;
        number_over(s.limit, 0, false, "/settings/limit", "a number above 0");
        number_over(s.too_close, 0, true, "/settings/too_close", "a number of 0 or more");
        if (!s.money.empty()) {
            refer_leaf(s.money, RateBy::figure, "/settings/money", "a criterion rated by figures");
        }
        if (s.trials.n < 1 || s.trials.n > most_trials) {
            refuse("/settings/trials/n", std::to_string(s.trials.n), "a whole number from 1 to 10000000");
        }
        number_over(s.trials.spread, 1, true, "/settings/trials/spread", "a factor of 1 or more");
    }

    void records() {
        if (d_.rules) refer_person_or_room(d_.rules->by, "/rules/by");
        if (d_.outcome) {
            if (!d_.outcome->option.empty()) refer_option(d_.outcome->option, "/outcome/option");
            for (std::size_t i = 0; i < d_.outcome->by.size(); ++i) {
                refer(people_, unread_.people, d_.outcome->by[i], "/outcome/by/" + std::to_string(i),
                      "a person");
            }
        }
        for (std::size_t i = 0; i < d_.log.size(); ++i)
            refer_person_or_room(d_.log[i].by, at("log", i, "/by"));
        for (std::size_t i = 0; i < d_.signatures.size(); ++i) {
            refer_person_or_room(d_.signatures[i].by, at("signed", i, "/by"));
        }
    }

    const Decision& d_;
    const Unread& unread_;
    Checked result_;
    std::vector<Notice> notices_;
    std::set<Id> people_;
    std::set<Id> options_;
    std::set<Id> nodes_;
    std::set<Id> requirements_;
    std::vector<PlacedNode> placed_;
    std::map<Id, const Node*> by_id_;
    std::map<Id, std::set<Id>> items_;
    std::map<Id, std::set<Id>> grades_; ///< Of each leaf.
};

} // namespace

Checked check(const Decision& decision, const Unread& unread) {
    return Checker(decision, unread).run();
}

} // namespace steelyard
