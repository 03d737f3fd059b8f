#include <catch_amalgamated.hpp>

#include "core/decision/apply.hpp"
#include "core/decision/check.hpp"
#include "core/decision/lookup.hpp"
#include "core/decision/read.hpp"
#include "core/decision/write.hpp"

using namespace steelyard;

namespace {

/// Two groups of criteria, two options, two people, something entered everywhere.
Decision small_decision() {
    const auto read = read_decision(R"({
      "format": "steelyard-decision", "version": 1,
      "people": [{ "id": "p1", "name": "Ada" }, { "id": "p2", "name": "Ben", "abstains": ["o2"] }],
      "options": [{ "id": "o1", "name": "One" }, { "id": "o2", "name": "Two" }],
      "criteria": { "id": "goal", "weights": "pairs", "children": [
        { "id": "cost", "weights": "points", "children": [
          { "id": "price", "rate": "figure", "unit": "EUR", "curve": { "kind": "line", "worst": 90, "best": 10 } },
          { "id": "running", "rate": "figure", "curve": { "kind": "proportional", "better": "less" }, "cost_sheet": {} } ] },
        { "id": "ease", "rate": "pairs" },
        { "id": "service", "rate": "grade", "grades": [{ "id": "g1", "worth": 1 }, { "id": "g2", "worth": 0.5 }] } ] },
      "judgments": [ { "set": "goal", "a": "cost", "b": "ease", "ratio": 3 },
                     { "set": "goal", "by": "p1", "a": "ease", "b": "service", "ratio": 2 },
                     { "set": "ease", "by": "p2", "a": "o1", "b": "o2", "ratio": 2 } ],
      "finished": [{ "set": "goal", "skipped": [["cost", "service"]] }],
      "points": [{ "set": "cost", "points": { "price": 70, "running": 30 } }],
      "figures": [{ "criterion": "price", "option": "o1", "value": 40 }, { "criterion": "price", "option": "o2", "value": 50 }],
      "costs": [{ "criterion": "running", "option": "o1", "line": "energy", "kind": "per_year", "value": 5 }],
      "grades": [{ "criterion": "service", "option": "o1", "grade": "g1", "by": "p1" },
                 { "criterion": "service", "option": "o2", "grade": "g2" }],
      "requirements": [{ "id": "r1", "criterion": "price", "at_most": 60 }, { "id": "r2", "yes_no": true },
                       { "id": "r3", "node": "cost", "min_worth": 0.2 }],
      "checks": [{ "requirement": "r2", "option": "o2", "state": "met", "by": "p2" }],
      "settings": { "money": "price" },
      "log": [{ "by": "p2", "did": "Began" }] })");
    REQUIRE(read.problems.empty());
    return *read.decision;
}

/// Applies edits that must be accepted; the result must be valid and survive being written and read.
Applied accepted(const Decision& decision, const std::vector<Edit>& edits) {
    Applied applied = apply(decision, edits);
    REQUIRE(applied.problems.empty());
    CHECK(check(applied.decision).problems.empty());
    const auto again = read_decision(write_decision(applied.decision));
    REQUIRE(again.decision.has_value());
    CHECK(write_decision(*again.decision) == write_decision(applied.decision));
    return applied;
}

Node leaf(const char* id) {
    Node node;
    node.id = id;
    node.name = id;
    return node;
}

} // namespace

TEST_CASE("removing an option takes its figures, grades, checks and judgments with it, and counts them") {
    const Decision before = small_decision();
    const auto applied = accepted(before, {Remove<Option>{"o2"}});
    CHECK(applied.losses == Losses{.judgments = 1, .figures = 1, .grades = 1, .checks = 1});
    CHECK(sentence(applied.losses) == "1 judgment, 1 figure, 1 grade and 1 check go with it.");
    CHECK(applied.decision.people[1].abstains.empty());
    CHECK(before == small_decision());
}

TEST_CASE("removing a criterion takes what hangs on it, below it and in its parent's set") {
    const auto applied = accepted(small_decision(), {RemoveNode{"cost"}});
    CHECK(applied.losses == Losses{.judgments = 1, .points = 1, .figures = 2, .costs = 1, .requirements = 1});
    CHECK(applied.decision.settings.money.empty());
    CHECK(applied.decision.finished[0].skipped.empty());
    REQUIRE(find_requirement(applied.decision, "r1") != nullptr);
    CHECK(find_requirement(applied.decision, "r1")->criterion.empty());
    CHECK(find_requirement(applied.decision, "r1")->at_most == 60);
}

TEST_CASE("removing one of two items keeps the other's points") {
    const auto applied = accepted(small_decision(), {RemoveNode{"running"}});
    CHECK(applied.losses == Losses{.costs = 1});
    REQUIRE(applied.decision.points.size() == 1);
    CHECK(applied.decision.points[0].points.size() == 1);
}

TEST_CASE("a criterion added under points takes the points back, since they do not name it") {
    const auto applied = accepted(small_decision(), {AddNode{"cost", leaf("disposal")}});
    CHECK(applied.losses == Losses{.points = 1});
}

TEST_CASE("moving a criterion takes the judgments of its old set and keeps what is below it") {
    const auto applied = accepted(small_decision(), {MoveNode{"ease", "cost", 0}});
    CHECK(applied.losses == Losses{.judgments = 2, .points = 1});
    CHECK(find_node(applied.decision.criteria, "cost")->children[0].id == "ease");
    CHECK(applied.decision.judgments.size() == 1);
}

TEST_CASE("moving a criterion among its own siblings loses nothing") {
    const auto applied = accepted(small_decision(), {MoveNode{"service", "goal", 0}});
    CHECK_FALSE(applied.losses.any());
    CHECK(applied.decision.criteria.children[0].id == "service");
}

TEST_CASE("a leaf that gets a child stops being rated") {
    const auto applied = accepted(small_decision(), {AddNode{"service", leaf("hours")}});
    CHECK(applied.losses == Losses{.grades = 2});
    CHECK(find_node(applied.decision.criteria, "service")->grades.empty());
}

TEST_CASE("changing how a leaf is rated takes what no longer fits") {
    Decision decision = small_decision();
    Node price = *find_node(decision.criteria, "price");
    price.rate = RateBy::pairs;
    const auto applied = accepted(decision, {ChangeNode{price}});
    CHECK(applied.losses == Losses{.figures = 2});
    CHECK(find_requirement(applied.decision, "r1")->criterion.empty());
}

TEST_CASE("removing a grade takes the grades given") {
    Decision decision = small_decision();
    Node service = *find_node(decision.criteria, "service");
    service.grades.pop_back();
    CHECK(accepted(decision, {ChangeNode{service}}).losses == Losses{.grades = 1});
}

TEST_CASE("removing a person takes the person's answers and keeps acts by name") {
    const auto applied = accepted(small_decision(), {Remove<Person>{"p2"}});
    CHECK(applied.losses == Losses{.judgments = 1});
    CHECK(applied.decision.log[0].did == "Began (by Ben)");
    CHECK(applied.decision.log[0].by.empty());
    CHECK(applied.decision.checks[0].by.empty());
    CHECK(applied.decision.checks[0].note == "(by Ben)");
}

TEST_CASE("an option the outcome names and a person who signed cannot be removed") {
    Decision decision = small_decision();
    decision.outcome.emplace().option = "o1";
    decision.signatures.push_back({"p1", "", "", "", {}});
    CHECK(apply(decision, {Remove<Option>{"o1"}}).problems.size() == 1);
    CHECK(apply(decision, {Remove<Person>{"p1"}}).problems.size() == 1);
    CHECK(apply(decision, {Remove<Option>{"o2"}}).problems.empty());
}

TEST_CASE("edits that lead nowhere or make the decision invalid are refused") {
    const Decision d = small_decision();
    const std::vector<Edit> refused{Remove<Option>{"nobody"},
                                    Change<Person>{Person{.id = "nobody"}},
                                    Move<Requirement>{"nobody", 0},
                                    RemoveNode{"nobody"},
                                    RemoveNode{"goal"},
                                    MoveNode{"goal", "cost"},
                                    MoveNode{"cost", "price"},
                                    MoveNode{"cost", "nobody"},
                                    AddNode{"nobody", leaf("x")},
                                    AddNode{"goal", leaf("price")},
                                    Add<Option>{Option{.id = "o1"}},
                                    Add<Option>{Option{}},
                                    Enter<Judgment>{{.set = "goal", .a = "cost", .b = "cost"}},
                                    Enter<Judgment>{{.set = "goal", .a = "cost", .b = "ease", .ratio = 101}},
                                    Enter<Figure>{{.criterion = "ease", .option = "o1", .value = 1}},
                                    Enter<Finished>{{.set = "nobody"}},
                                    Enter<Check>{{.requirement = "r9", .option = "o1"}}};
    for (std::size_t i = 0; i < refused.size(); ++i) {
        INFO("edit " << i);
        const auto applied = apply(d, {refused[i]});
        REQUIRE_FALSE(applied.problems.empty());
        CHECK_FALSE(sentence(applied.problems[0]).empty());
    }
}

TEST_CASE("list edits put, change, move and take") {
    const Decision d = small_decision();
    CHECK(accepted(d, {Add<Option>{Option{.id = "o3"}, 1}}).decision.options[1].id == "o3");
    CHECK(accepted(d, {Add<Option>{Option{.id = "o3"}}}).decision.options[2].id == "o3");
    CHECK(accepted(d, {Change<Option>{Option{.id = "o1", .name = "Uno"}}}).decision.options[0].name == "Uno");
    CHECK(accepted(d, {Move<Option>{"o1", 1}}).decision.options[1].id == "o1");
    CHECK(accepted(d, {Remove<Requirement>{"r2"}}).losses == Losses{.checks = 1});
}

TEST_CASE("a judgment is entered after the others and taken back whole") {
    const Decision d = small_decision();
    const auto twice =
        accepted(d, {Enter<Judgment>{{.set = "goal", .a = "ease", .b = "cost", .ratio = 2}}}).decision;
    CHECK(twice.judgments.size() == 4);
    CHECK(accepted(twice, {ClearJudgment{"goal", "", "cost", "ease"}}).decision.judgments.size() == 2);
}

TEST_CASE("every edit is described in words") {
    const Decision d = small_decision();
    CHECK(describe(Change<Option>{Option{.id = "o1", .name = "Uno"}}, d) ==
          "Renamed option \"One\" to \"Uno\"");
    CHECK(describe(Enter<Judgment>{{.set = "goal", .by = "p1", .a = "cost", .b = "ease", .ratio = 0.2}}, d) ==
          "Judged \"cost\" against \"ease\": 1/5 (Ada)");
    CHECK(describe(Enter<Figure>{{.criterion = "price", .option = "o1", .value = 41.5}}, d) ==
          "Entered figure \"price\" of \"One\": 41.5");
    CHECK(describe(Remove<Person>{"p2"}, d) == "Removed person \"Ben\"");
    CHECK(describe(SetHeading{Heading::question, "x"}, d) == "Changed the question");
}
