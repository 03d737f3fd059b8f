#include "tests/support/large_decision.hpp"

#include <algorithm>
#include <string>
#include <vector>

#include "tests/support/dice.hpp"

namespace steelyard::testing {
namespace {

constexpr int leaf_count = 60;
constexpr int group_count = 8; ///< Groups of 7 or 8 leaves; 60 in all.
constexpr int option_count = 40;
constexpr int judge_count = 12;

Node figure_leaf(Dice& dice, const Id& id) {
    Node leaf;
    leaf.id = id;
    leaf.name = "Figure " + id;
    leaf.rate = RateBy::figure;
    leaf.unit = "EUR";
    Curve curve;
    const int kind = dice.below(4);
    if (kind == 0)
        curve.shape = ProportionalCurve{Better::less};
    else if (kind == 1)
        curve.shape = LineCurve{220, 80};
    else if (kind == 2)
        curve.shape = PointsCurve{{{80.05, 1}, {120.05, 0.7}, {180.05, 0.2}, {220.05, 0}}};
    else
        curve.shape = TargetCurve{150, 80.05};
    leaf.curve = curve;
    return leaf;
}

Node grade_leaf(const Id& id) {
    Node leaf;
    leaf.id = id;
    leaf.name = "Grade " + id;
    leaf.rate = RateBy::grade;
    for (int i = 0; i < 5; ++i) {
        Grade grade;
        grade.id = "g" + std::to_string(i + 1);
        grade.name = "Grade " + std::to_string(i + 1);
        grade.worth = (4 - i) / 4.0;
        leaf.grades.push_back(grade);
    }
    return leaf;
}

/// One judge's answers to a whole set: the ratios of the sizes, each a tenth off at most.
void judge_set(Dice& dice, Decision& decision, const Node& node, const Id& by,
               const std::vector<int>& sizes) {
    for (std::size_t a = 0; a < node.children.size(); ++a)
        for (std::size_t b = a + 1; b < node.children.size(); ++b) {
            Judgment judgment;
            judgment.set = node.id;
            judgment.by = by;
            judgment.a = node.children[a].id;
            judgment.b = node.children[b].id;
            const int tenths = dice.between(9, 11);
            judgment.ratio = std::clamp(sizes[a] * tenths / (sizes[b] * 10.0), 1 / 9.0, 9.0);
            decision.judgments.push_back(judgment);
        }
}

void judge_criteria(Dice& dice, Decision& decision, const Node& node) {
    std::vector<int> sizes;
    for (std::size_t i = 0; i < node.children.size(); ++i) sizes.push_back(dice.between(1, 9));
    for (const Person& judge : decision.people) judge_set(dice, decision, node, judge.id, sizes);
    for (const Node& child : node.children)
        if (!child.is_leaf()) judge_criteria(dice, decision, child);
}

void rate_options(Dice& dice, Decision& decision, const Node& leaf) {
    for (const Option& option : decision.options) {
        if (leaf.rate == RateBy::figure) {
            Figure figure;
            figure.criterion = leaf.id;
            figure.option = option.id;
            figure.value = dice.between(800, 2200) / 10.0;
            decision.figures.push_back(figure);
            continue;
        }
        const int about = dice.between(1, 4);
        for (const Person& judge : decision.people) {
            GradeEntry grade;
            grade.criterion = leaf.id;
            grade.option = option.id;
            grade.by = judge.id;
            grade.grade = "g" + std::to_string(about + dice.below(2));
            decision.grades.push_back(grade);
        }
    }
}

} // namespace

Decision large_decision(std::uint64_t seed) {
    Dice dice(seed);
    Decision decision;
    decision.id = "large";
    decision.title = "Sixty criteria, forty options, twelve judges";
    for (int i = 1; i <= judge_count; ++i) {
        Person judge;
        judge.id = "p" + std::to_string(i);
        judge.name = "Judge " + std::to_string(i);
        decision.people.push_back(judge);
    }
    for (int i = 1; i <= option_count; ++i) {
        Option option;
        option.id = "o" + std::to_string(i);
        option.name = "Option " + std::to_string(i);
        decision.options.push_back(option);
    }
    decision.criteria.id = "goal";
    for (int i = 1; i <= group_count; ++i) {
        Node group;
        group.id = "group" + std::to_string(i);
        group.name = "Group " + std::to_string(i);
        decision.criteria.children.push_back(group);
    }
    for (int i = 0; i < leaf_count; ++i) {
        const Id id = "leaf" + std::to_string(i + 1);
        auto& group = decision.criteria.children[static_cast<std::size_t>(i % group_count)];
        group.children.push_back(i % 3 == 2 ? grade_leaf(id) : figure_leaf(dice, id));
    }
    judge_criteria(dice, decision, decision.criteria);
    for (const Node& group : decision.criteria.children)
        for (const Node& leaf : group.children) rate_options(dice, decision, leaf);
    return decision;
}

} // namespace steelyard::testing
