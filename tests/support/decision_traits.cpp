#include "tests/support/decision_traits.hpp"

#include <algorithm>
#include <array>
#include <map>

#include "core/decision/words.hpp"
#include "tests/support/slow_standing.hpp"

namespace steelyard::testing {
namespace {

using Traits = std::set<std::string>;

void note(Traits& traits, bool there, const std::string& trait) {
    if (there) traits.insert(trait);
}

int levels(const Node& node) {
    int below = 0;
    for (const Node& child : node.children) below = std::max(below, levels(child));
    return below + 1;
}

void note_frame(const Decision& decision, Traits& traits) {
    const std::size_t options = decision.options.size();
    note(traits, options == 1, "one option");
    note(traits, options == 9, "nine options");
    for (const Option& option : decision.options) note(traits, option.withdrawn, "withdrawn option");
    traits.insert("tree of " + std::to_string(levels(decision.criteria)));
    note(traits, decision.people.empty(), "no people");
    note(traits, decision.people.size() == 5, "five people");
    for (const Person& person : decision.people) {
        note(traits, person.share == 0, "share of 0");
        note(traits, person.share != decision.people.front().share, "unequal shares");
        note(traits, !person.abstains.empty(), "abstention");
        note(traits, !person.interest.empty(), "interest");
    }
    const Settings& settings = decision.settings;
    traits.insert("method " + std::string(word(settings.method)));
    traits.insert("synthesis " + std::string(word(settings.synthesis)));
    traits.insert("combine " + std::string(word(settings.combine)));
    traits.insert("table " + std::string(word(settings.random_index)));
    note(traits, !settings.money.empty(), "money");
    note(traits, decision.outcome.has_value(), "outcome");
    note(traits, decision.rules.has_value(), "rules");
    note(traits, !decision.log.empty(), "log");
    note(traits, !decision.signatures.empty(), "signature");
}

void note_leaf(const Node& leaf, Traits& traits) {
    static const std::array<std::string, 4> curves{"proportional", "line", "points", "target"};
    traits.insert("rate " + std::string(word(leaf.rate)));
    if (leaf.rate == RateBy::figure) {
        note(traits, !leaf.curve, "no curve");
        if (leaf.curve) traits.insert("curve " + curves[leaf.curve->shape.index()]);
    }
    if (leaf.cost_sheet) {
        traits.insert("sheet " + std::string(word(leaf.cost_sheet->result)));
        note(traits, !leaf.cost_sheet->volume, "sheet without volume");
        note(traits, leaf.cost_sheet->discount == 0, "no discount");
    }
    if (leaf.rate == RateBy::grade) {
        traits.insert("worths " + std::string(word(leaf.worths)));
        note(traits, leaf.grades.empty(), "no grades");
    }
}

void note_nodes(const Decision& decision, const SlowResults& results, Traits& traits) {
    for (const Node* node : slow_nodes(decision)) {
        if (node->is_leaf()) {
            note_leaf(*node, traits);
        } else {
            traits.insert("weights " + std::string(word(node->weights)));
            note(traits, node->children.size() == 1, "one child");
            note(traits, node->children.size() == 6, "six children");
        }
        note(traits, results.nodes.at(node->id).weight == 0, "weight of 0");
    }
}

void note_answers(const Decision& decision, Traits& traits) {
    std::set<std::array<Id, 4>> said;
    for (const Judgment& judgment : decision.judgments) {
        note(traits, judgment.by.empty(), "agreed judgment");
        note(traits, !judgment.by.empty(), "personal judgment");
        note(traits, judgment.ratio > 9 || judgment.ratio < 1 / 9.0, "ratio outside 1/9 to 9");
        note(traits, said.count({judgment.set, judgment.by, judgment.a, judgment.b}) > 0, "judged again");
        note(traits, said.count({judgment.set, judgment.by, judgment.b, judgment.a}) > 0,
             "judged again, turned");
        said.insert({judgment.set, judgment.by, judgment.a, judgment.b});
    }
    for (const Finished& finished : decision.finished)
        note(traits, !finished.skipped.empty(), "skipped pairs");
    for (const PointsEntry& entry : decision.points)
        traits.insert(entry.by.empty() ? "agreed points" : "personal points");
    for (const GradeEntry& grade : decision.grades) {
        traits.insert(grade.by.empty() ? "agreed grade" : "personal grade");
        note(traits, grade.grade.empty(), "grade taken back");
    }
}

void note_figures(const Decision& decision, Traits& traits) {
    std::map<Id, const Node*> nodes;
    for (const Node* node : slow_nodes(decision)) nodes[node->id] = node;
    std::set<std::array<Id, 2>> quoted;
    for (const Figure& figure : decision.figures) {
        const Node& leaf = *nodes.at(figure.criterion);
        note(traits, !quoted.insert({figure.criterion, figure.option}).second, "superseded figure");
        note(traits, !figure.value, "cleared figure");
        note(traits, figure.low && figure.high, "figure with a range");
        note(traits, figure.low.has_value() != figure.high.has_value(), "figure with one end");
        note(traits, leaf.cost_sheet.has_value(), "figure beside a cost sheet");
        note(traits,
             leaf.curve && std::holds_alternative<ProportionalCurve>(leaf.curve->shape) &&
                 figure.value.value_or(1) <= 0,
             "figure of 0 or less, proportional");
    }
    std::set<std::array<Id, 3>> lines;
    for (const Cost& cost : decision.costs) {
        const Node& leaf = *nodes.at(cost.criterion);
        traits.insert("cost " + std::string(word(cost.kind)));
        note(traits, !lines.insert({cost.criterion, cost.option, cost.line}).second, "superseded cost");
        note(traits, !cost.value, "cleared cost");
        note(traits, cost.in_unit != 1, "cost in another currency");
        note(traits, !leaf.cost_sheet, "cost without a sheet");
        note(traits, leaf.cost_sheet && cost.year.value_or(0) > leaf.cost_sheet->years, "cost after the end");
        note(traits, cost.year == 0, "cost in year 0");
        note(traits, leaf.cost_sheet && !leaf.cost_sheet->volume && cost.kind == CostKind::per_part,
             "cost per part without volume");
    }
}

void note_requirements(const Decision& decision, const SlowResults& results, Traits& traits) {
    std::map<Id, const Requirement*> by_id;
    for (const Requirement& requirement : decision.requirements) {
        by_id[requirement.id] = &requirement;
        note(traits, !requirement.criterion.empty(), "must on a figure");
        note(traits, !requirement.node.empty(), "must on a node");
        note(traits, requirement.yes_no, "must yes or no");
        note(traits, requirement.at_least && requirement.at_most, "must with both limits");
        note(traits, !requirement.node.empty() && requirement.min_worth && requirement.at_least,
             "must with two lower limits");
        note(traits,
             !requirement.yes_no && !requirement.at_least && !requirement.at_most && !requirement.min_worth,
             "must without a limit");
    }
    for (const Check& check : decision.checks) {
        note(traits, check.value && check.state != CheckState::unstated, "check with value and state");
        note(traits, !check.value && check.low && check.high, "check of a range alone");
        note(traits, !check.value && check.low && !check.high, "check of a low end alone");
        note(traits, !by_id.at(check.requirement)->criterion.empty(), "check of a must on a figure");
    }
    static const std::array<std::string, 6> states{"met",       "failed", "undecided",
                                                   "unchecked", "asked",  "waived"};
    for (const auto& [place, state] : results.musts) {
        const Requirement& requirement = *by_id.at(place[1]);
        const std::string kind = !requirement.node.empty()        ? "node must "
                                 : !requirement.criterion.empty() ? "figure must "
                                                                  : "check must ";
        traits.insert(kind + states[static_cast<std::size_t>(state)]);
    }
}

void note_sets(const Decision& decision, const SlowResults& results, Traits& traits) {
    for (const SlowSet& entry : results.sets) {
        if (entry.from_points) {
            note(traits, !entry.weights, "points by nobody");
            continue;
        }
        const std::string who = entry.by.empty() ? "group " : "judge ";
        traits.insert(who + (!entry.parts.empty()    ? "not connected"
                             : entry.missing.empty() ? "complete"
                                                     : "incomplete"));
        note(traits, !entry.indices.ri && entry.weights && entry.items.size() > 2, "spanning tree");
        note(traits, entry.items.size() == 9 && entry.missing.empty(), "nine items complete");
        note(traits, entry.open.size() < entry.missing.size() && entry.by.empty(),
             "pairs skipped on purpose");
        note(traits, entry.whole, "whole set for the options in play");
        note(traits, entry.whole && entry.column_less, "whole set without columns");
        note(traits, entry.column_less, "columns of an incomplete set");
        note(traits, entry.own_left_out && entry.weights, "priorities without one judge");
        note(traits, entry.fell_back && entry.weights, "priorities of nobody");
        note(traits, !entry.indices.cycles.empty(), "cycle");
        note(traits, !entry.indices.tied_cycles.empty(), "tied cycle");
        note(traits, entry.indices.zeta.value_or(1) < 1, "zeta below 1");
    }
    note(traits, decision.settings.synthesis == Synthesis::ideal && !results.ranges.empty(), "ranges");
}

void note_group(const Decision& decision, const SlowResults& results, Traits& traits) {
    if (!results.group) return;
    traits.insert("several judges");
    note(traits, results.group->spreads.empty(), "judges without a common pair");
    for (const SlowSpread& spread : results.group->spreads) {
        note(traits, spread.ratios.size() > 2, "spread over three");
        note(traits, spread.in_favour > 0 && spread.against > 0, "sides taken");
        note(traits, spread.equal > 0, "equal for somebody");
    }
    for (const auto& [judge, ranks] : results.group->without) {
        note(traits, ranks != results.ranks, "another ranking without a judge");
        note(traits, ranks.size() != results.ranks.size(), "another field without a judge");
        for (const auto& [option, rank] : results.ranks)
            note(traits, rank == 1 && (ranks.count(option) == 0 || ranks.at(option) != 1),
                 "first place moves without a judge");
    }
    for (const Id& judge : results.group->judges)
        note(traits,
             std::none_of(results.sets.begin(), results.sets.end(),
                          [&](const SlowSet& set) { return set.by == judge; }),
             "judge by grades alone");
    note(traits, results.group->judges.size() < decision.people.size(), "person who is no judge");
}

} // namespace

std::set<std::string> traits(const Decision& decision, const SlowResults& results) {
    static const std::array<std::string, 7> open_kinds{"judgment", "points", "figure",     "curve",
                                                       "grade",    "worth",  "requirement"};
    Traits traits;
    note_frame(decision, traits);
    note_nodes(decision, results, traits);
    note_answers(decision, traits);
    note_figures(decision, traits);
    note_requirements(decision, results, traits);
    note_sets(decision, results, traits);
    note_group(decision, results, traits);
    for (const auto& [id, leaf] : results.leaves) {
        note(traits, leaf.all_zero, "all worth 0, " + std::string(word(decision.settings.synthesis)));
        note(traits, !leaf.missing.empty() && leaf.missing.size() < results.options.size(),
             "some values missing");
        note(traits, !leaf.missing.empty() && leaf.missing.size() == results.options.size(),
             "all values missing");
    }
    for (const OpenItem& item : results.open)
        traits.insert("open " + open_kinds[static_cast<std::size_t>(item.kind)]);
    traits.insert(results.provisional ? "provisional" : "not provisional");
    note(traits, results.options.empty(), "nothing in play");
    note(traits, results.options.size() == 1, "one option in play");
    note(traits, !results.options.empty() && !results.shares, "all scores 0");
    for (const auto& [option, rank] : results.ranks)
        for (const auto& [other, theirs] : results.ranks)
            note(traits, option != other && rank == theirs, "shared rank");
    return traits;
}

} // namespace steelyard::testing
