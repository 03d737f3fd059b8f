#pragma once

#include <map>
#include <string>
#include <utility>
#include <vector>

#include "core/decision/decision.hpp"
#include "tests/support/dice.hpp"
#include "tests/support/random_decision.hpp"

/// The parts of random_decision, in the order in which they draw.
namespace steelyard::testing {

/// How far the people have got.
enum class Progress { finished, nearly, half, started };

/// Figures of a leaf lie between base and base + span, in tenths of its unit.
struct FigureScale {
    int base = 100;
    int span = 100;
};

class RandomMaker {
public:
    RandomMaker(std::uint64_t seed, const DecisionSize& size);

    void make_people_and_options();
    void make_settings();
    void make_tree();
    void make_answers();      ///< Judgments, points and what was skipped, for every set.
    void make_figures();      ///< Figures and cost lines.
    void make_grades();       ///< Grades of the options.
    void make_requirements(); ///< Musts and checks.
    void make_papers();       ///< Texts, log, outcome, signatures, members from elsewhere.

    const Decision& decision() const { return decision_; }

private:
    using Pairs = std::vector<std::pair<int, int>>;
    enum class Style { exact, near, wild };
    enum class Cover { complete, linked, star, some, few };
    struct SheetLine {
        std::string name;
        CostKind kind;
    };

    Node make_node(int levels_left, int& leaves_left);
    void make_leaf(Node& node);
    void make_figure_leaf(Node& node);
    void make_grade_leaf(Node& node);
    Curve make_curve(const FigureScale& scale);
    CostSheet make_cost_sheet();

    void answer_set(const Id& set, const std::vector<Id>& items, bool of_options);
    void answer_points(const Node& node);
    std::vector<Id> voices(); ///< Who answers; an empty id is the room.
    Cover cover();
    Pairs pairs_of(int items, Cover cover, int hub);
    double ratio(Style style, int a, int b);
    void say(const Id& set, const Id& by, const Id& a, const Id& b, double ratio);
    void finish_set(const Id& set, const Id& by, const std::vector<Id>& items, const Pairs& judged);

    void make_figure(const Node& leaf, const Id& option);
    void make_costs(const Node& leaf);
    void enter_cost(const Node& leaf, const Id& option, const SheetLine& line);
    void make_grade(const Node& leaf, const Id& option);
    Requirement make_requirement();
    void make_checks(const Requirement& requirement);

    bool answered(); ///< Whether one more thing was filled in, as progress has it.
    bool hurried() const { return progress_ == Progress::half || progress_ == Progress::started; }
    std::string text();
    std::string time();
    int option_count() const { return static_cast<int>(decision_.options.size()); }

    Dice dice_;
    DecisionSize size_;
    Progress progress_ = Progress::finished;
    Decision decision_;
    std::vector<Node> nodes_; ///< Copies of all nodes, depth first.
    std::map<Id, FigureScale> scales_;
    int node_count_ = 0;
};

} // namespace steelyard::testing
