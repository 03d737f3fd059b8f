#include "shell/rooms/frame_edits.hpp"

#include <catch_amalgamated.hpp>

#include "core/decision/apply.hpp"
#include "core/decision/lookup.hpp"

using namespace steelyard;

namespace {

Node leaf(const char* id) {
    Node node;
    node.id = id;
    node.name = id;
    return node;
}

/// goal: a (a1, a2), b, c.
Decision small() {
    Decision d;
    d.id = "d";
    d.criteria = leaf("goal");
    d.criteria.children = {leaf("a"), leaf("b"), leaf("c")};
    d.criteria.children[0].children = {leaf("a1"), leaf("a2")};
    return d;
}

/// The tree in one line: a(a1 a2) b c.
std::string line(const Node& node) {
    std::string text = node.id;
    if (node.children.empty()) return text;
    text += "(";
    for (const auto& child : node.children) text += (text.back() == '(' ? "" : " ") + line(child);
    return text + ")";
}

std::string moved(const Decision& d, const Id& id, Way way) {
    const auto move = node_move(d.criteria, id, way);
    if (!move) return "no";
    const Applied applied = steelyard::apply(d, {*move});
    return applied.problems.empty() ? line(applied.decision.criteria) : "refused";
}

Applied with_list(const Decision& d, const Id& parent, std::string_view text) {
    const ListPlan plan = plan_list(d, parent, read_outline(text));
    CHECK(plan.problem.empty());
    return steelyard::apply(d, plan.edits);
}

Decision as_deep_as(int depth) {
    Decision d = small();
    d.criteria.children = {};
    Node* node = &d.criteria;
    for (int i = 2; i <= depth; ++i) {
        node->children = {leaf(("n" + std::to_string(i)).c_str())};
        node = &node->children[0];
    }
    return d;
}

} // namespace

TEST_CASE("ids are made of names, in plain small letters") {
    CHECK(slug("Purchase price", "x") == "purchase-price");
    CHECK(slug("  R\xC3\xBCst\xC3\xBCng & Gr\xC3\xB6\xC3\x9F"
               "e (mm) ",
               "x") == "ruestueng-groesse-mm");
    CHECK(slug("\xE4\xBB\xB7\xE6\xA0\xBC", "criterion") == "criterion");
    CHECK(slug("", "option") == "option");
    CHECK(slug("A name that is longer than an id should ever be", "x").size() <= 25);
}

TEST_CASE("ids taken already get a number") {
    Decision d = small();
    CHECK(node_id_for(d, "A1") == "a12");
    CHECK(node_id_for(d, "D") == "d");
    d.options = {Option{.id = "alder"}};
    CHECK(option_id_for(d, "Alder") == "alder2");
    CHECK(person_id_for(d, "Alder") == "alder");
    CHECK(requirement_id_for(d, "") == "must");
}

TEST_CASE("a criterion moves among its siblings, into the one above and out of its group") {
    const Decision d = small();
    CHECK(moved(d, "b", Way::up) == "goal(b a(a1 a2) c)");
    CHECK(moved(d, "b", Way::down) == "goal(a(a1 a2) c b)");
    CHECK(moved(d, "b", Way::in) == "goal(a(a1 a2 b) c)");
    CHECK(moved(d, "c", Way::in) == "goal(a(a1 a2) b(c))");
    CHECK(moved(d, "a1", Way::out) == "goal(a(a2) a1 b c)");
}

TEST_CASE("a criterion does not move where there is no place") {
    const Decision d = small();
    CHECK(moved(d, "a", Way::up) == "no");
    CHECK(moved(d, "c", Way::down) == "no");
    CHECK(moved(d, "a", Way::in) == "no");
    CHECK(moved(d, "b", Way::out) == "no");
    CHECK(moved(d, "nobody", Way::up) == "no");
    for (const Way way : {Way::up, Way::down, Way::in, Way::out}) CHECK(moved(d, "goal", way) == "no");
}

TEST_CASE("a criterion moves in as long as the tree is at most 12 deep") {
    for (const int depth : {11, 12}) {
        Decision d = as_deep_as(depth);
        Node* parent = find_node(d.criteria, "n" + std::to_string(depth - 1));
        parent->children.push_back(leaf("last"));
        INFO(depth);
        CHECK((moved(d, "last", Way::in) == "no") == (depth == 12));
        CHECK(moved(d, "last", Way::in) != "refused");
    }
}

TEST_CASE("a criterion newly graded has three grades, one that had some keeps them") {
    Node node = rated_by(leaf("a"), RateBy::grade);
    REQUIRE(node.grades.size() == 3);
    CHECK(node.grades[0].worth == 1.0);
    CHECK(node.grades[2].worth == 0.0);
    node.grades.resize(1);
    CHECK(rated_by(rated_by(node, RateBy::figure), RateBy::grade).grades == node.grades);
}

TEST_CASE("a must of another kind keeps only what fits it") {
    Requirement must;
    must.unit = "mm";
    must.at_most = 5;
    CHECK(kind_of(must) == MustKind::own_limit);
    const Requirement figures = of_kind(must, MustKind::figures, "a");
    CHECK(kind_of(figures) == MustKind::figures);
    CHECK(figures.criterion == "a");
    CHECK(figures.at_most == 5);
    const Requirement worth = of_kind(figures, MustKind::worth, "b");
    CHECK(kind_of(worth) == MustKind::worth);
    CHECK(worth.node == "b");
    CHECK(worth.criterion.empty());
    CHECK_FALSE(worth.at_most.has_value());
    const Requirement yes_no = of_kind(worth, MustKind::yes_no, {});
    CHECK(yes_no.yes_no);
    CHECK(yes_no.node.empty());
    CHECK(kind_of(of_kind(yes_no, MustKind::own_limit, {})) == MustKind::own_limit);
}

TEST_CASE("a list is added with its depth under the criterion chosen") {
    const Applied applied = with_list(small(), "b", "Price\n  Freight\n  Duty\nService");
    CHECK(applied.problems.empty());
    CHECK(line(applied.decision.criteria) == "goal(a(a1 a2) b(price(freight duty) service) c)");
    CHECK(applied.decision.points.empty());
    CHECK(find_node(applied.decision.criteria, "price")->name == "Price");
}

TEST_CASE("a criterion that is not there stands for the goal") {
    CHECK(line(with_list(small(), "gone", "Price").decision.criteria) == "goal(a(a1 a2) b c price)");
}

TEST_CASE("weights of a list become agreed points of the group") {
    const Decision d = with_list(small(), "b", "Price 60\n  Freight: 1\n  Duty: 3\nService 20").decision;
    REQUIRE(d.points.size() == 2);
    CHECK(find_node(d.criteria, "b")->weights == WeightsBy::points);
    CHECK(find_node(d.criteria, "price")->weights == WeightsBy::points);
    CHECK(find_node(d.criteria, "goal")->weights == WeightsBy::pairs);
    for (const auto& entry : d.points) {
        CHECK(entry.by.empty());
        REQUIRE(entry.points.size() == 2);
    }
    const ListPlan plan =
        plan_list(small(), "b", read_outline("Price 60\n  Freight: 1\n  Duty: 3\nService 20"));
    REQUIRE(plan.shares.size() == 4);
    CHECK(plan.shares[0] == 0.75);
    CHECK(plan.shares[1] == 0.25);
    CHECK(plan.shares[2] == 0.75);
    CHECK(plan.shares[3] == 0.25);
    CHECK(plan.label == "Added 4 criteria from a list");
}

TEST_CASE("weights beside criteria that stand there already are left out, and it is said") {
    const ListPlan plan =
        plan_list(small(), "goal", read_outline("Price: 60\n  Freight: 1\n  Duty: 3\nService: 20"));
    CHECK(plan.notes.size() == 1);
    CHECK_FALSE(plan.shares[0].has_value());
    CHECK(plan.shares[1] == 0.25);
    const Decision d = steelyard::apply(small(), plan.edits).decision;
    CHECK(find_node(d.criteria, "goal")->weights == WeightsBy::pairs);
    CHECK(d.points.size() == 1);
}

TEST_CASE("criteria of the same name get ids of their own") {
    const Decision d = with_list(small(), "c", "Other\n  Other\nA").decision;
    CHECK(line(*find_node(d.criteria, "c")) == "c(other(other2) a3)");
}

TEST_CASE("a list that would be too deep is refused with its line") {
    const ListPlan fits = plan_list(as_deep_as(10), "n10", read_outline("One\n Two"));
    CHECK(fits.problem.empty());
    CHECK(steelyard::apply(as_deep_as(10), fits.edits).problems.empty());
    const ListPlan deep = plan_list(as_deep_as(10), "n10", read_outline("One\n Two\n  Three"));
    CHECK(deep.problem.starts_with("Line 3 would stand more than 12 deep"));
    CHECK(deep.edits.empty());
}

TEST_CASE("an empty list adds nothing") {
    const ListPlan plan = plan_list(small(), "goal", read_outline(""));
    CHECK(plan.edits.empty());
    CHECK(plan.problem.empty());
}
