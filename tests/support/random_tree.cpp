#include <algorithm>

#include "tests/support/random_maker.hpp"

namespace steelyard::testing {
namespace {

void list_nodes(const Node& node, std::vector<Node>& nodes) {
    nodes.push_back(node);
    for (const Node& child : node.children) list_nodes(child, nodes);
}

} // namespace

void RandomMaker::make_tree() {
    int levels = dice_.pick<int>({1, 2, 2, 2, 3, 3, 4});
    levels = std::min(levels, size_.depth);
    int leaves = std::min(dice_.between(3, 14), size_.leaves);
    decision_.criteria = make_node(levels, leaves);
    list_nodes(decision_.criteria, nodes_);
}

Node RandomMaker::make_node(int levels_left, int& leaves_left) {
    Node node;
    node.id = node_count_ == 0 ? "goal" : "n" + std::to_string(node_count_);
    ++node_count_;
    node.name = text();
    if (dice_.chance(10)) node.note = text();
    int children = levels_left > 1 ? std::min(dice_.below(7), size_.children) : 0;
    if (children == 0 && levels_left > 1 && dice_.chance(70)) children = std::min(3, size_.children);
    children = std::min(children, leaves_left);
    for (int i = 0; i < children; ++i)
        if (i == 0 || leaves_left > 0) node.children.push_back(make_node(levels_left - 1, leaves_left));
    if (node.children.empty()) {
        --leaves_left;
        make_leaf(node);
    } else if (dice_.chance(25)) {
        node.weights = WeightsBy::points;
    }
    return node;
}

void RandomMaker::make_leaf(Node& node) {
    const int roll = dice_.below(100);
    if (roll < 30) {
        node.rate = RateBy::pairs;
    } else if (roll < 72) {
        node.rate = RateBy::figure;
        make_figure_leaf(node);
    } else {
        node.rate = RateBy::grade;
        make_grade_leaf(node);
    }
}

void RandomMaker::make_figure_leaf(Node& node) {
    FigureScale scale;
    scale.base = dice_.between(20, 5000);
    scale.span = dice_.between(8, scale.base + 8);
    if (dice_.chance(10)) scale.base = -scale.span / 2;
    node.unit = dice_.pick<std::string>({"EUR", "mg", "weeks", ""});
    if (dice_.chance(25)) {
        node.cost_sheet = make_cost_sheet();
        // What the lines come to is a multiple of the single line: anchors lie accordingly wide.
        scale.base = std::abs(scale.base) + 10;
        node.curve = make_curve({scale.base, scale.base * dice_.between(2, 40)});
    } else {
        node.curve = make_curve(scale);
    }
    if (!answered() && dice_.chance(40)) node.curve.reset();
    scales_[node.id] = scale;
}

Curve RandomMaker::make_curve(const FigureScale& scale) {
    Curve curve;
    const int low = scale.base;
    const int high = scale.base + scale.span;
    const int roll = dice_.below(100);
    const bool nothing_is_worth_anything = dice_.chance(5);
    if (roll < 30 && low > 0) {
        curve.shape = ProportionalCurve{dice_.chance(60) ? Better::less : Better::more};
    } else if (roll < 60) {
        int worst = low - dice_.below(scale.span / 4 + 1);
        int best = high + dice_.below(scale.span / 4 + 1);
        if (dice_.chance(25)) { // anchors inside, so that some figures lie outside
            worst = low + scale.span / 4;
            best = high - scale.span / 4;
        }
        if (nothing_is_worth_anything) {
            worst = high + 5;
            best = high + 25;
        }
        LineCurve line{worst / 10.0, best / 10.0};
        if (!nothing_is_worth_anything && dice_.chance(50)) std::swap(line.worst, line.best);
        curve.shape = line;
    } else if (roll < 82) {
        // Bends lie half a tenth beside what a figure can be.
        PointsCurve points;
        const int bends = dice_.between(2, 5);
        const int step = std::max(1, scale.span / bends);
        for (int i = 0; i < bends; ++i) {
            const int worth = nothing_is_worth_anything ? 0 : dice_.below(21);
            points.at.push_back({(2 * (low + i * step) + 1) / 20.0, worth / 20.0});
        }
        curve.shape = points;
    } else {
        // So does the tolerance, so that no worth is 0 by rounding.
        const int target = nothing_is_worth_anything ? high + 50 : low + dice_.below(scale.span);
        const int tolerance = nothing_is_worth_anything ? 3 : dice_.between(scale.span / 4, scale.span);
        curve.shape = TargetCurve{target / 10.0, (2 * tolerance + 1) / 20.0};
    }
    return curve;
}

CostSheet RandomMaker::make_cost_sheet() {
    CostSheet sheet;
    sheet.years = dice_.between(1, 20);
    sheet.discount = dice_.pick<double>({0, 0, 0.03, 0.05, 0.08, 0.08, 0.1, -0.02});
    if (dice_.chance(80)) sheet.volume = dice_.pick<double>({1000, 12000, 500.5});
    sheet.result = dice_.pick<CostResult>({CostResult::total, CostResult::per_year, CostResult::per_part});
    return sheet;
}

void RandomMaker::make_grade_leaf(Node& node) {
    // A single grade judged in pairs has nothing to be compared with: not made.
    node.worths = dice_.chance(30) ? WorthsBy::pairs : WorthsBy::given;
    int grades = node.worths == WorthsBy::pairs ? dice_.between(2, 5) : dice_.between(1, 5);
    if (dice_.chance(3)) grades = 0;
    const bool nothing_is_worth_anything = dice_.chance(5);
    for (int i = 1; i <= grades; ++i) {
        Grade grade;
        grade.id = "g" + std::to_string(i);
        grade.name = text();
        const int worth = nothing_is_worth_anything ? 0 : dice_.below(11);
        const bool known = progress_ == Progress::finished || dice_.chance(88);
        if (node.worths == WorthsBy::given ? known : dice_.chance(10)) grade.worth = worth / 10.0;
        node.grades.push_back(grade);
    }
}

} // namespace steelyard::testing
