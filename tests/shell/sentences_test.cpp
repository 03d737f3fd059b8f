#include <catch_amalgamated.hpp>
#include <string>
#include <vector>

#include "core/results/solve.hpp"
#include "shell/example.hpp"
#include "shell/sentences.hpp"
#include "tests/support/round_trip.hpp"

// Musts and standings are solved, not made up: what is said must fit what the solver gives.
namespace steelyard {

using Texts = std::vector<std::string>;

namespace {

/// Three options, two figures and two grades; `members` (each with a comma before it) added at the end.
Decision washers(const std::string& members = "") {
    return test::read(R"({"format": "steelyard-decision", "version": 1,
        "options": [{"id": "a", "name": "Alder"}, {"id": "b", "name": "Brook"}, {"id": "c", "name": "Cove"}],
        "criteria": {"id": "goal", "name": "Best washer", "children": [
            {"id": "price", "name": "Price", "rate": "figure", "unit": "EUR",
             "curve": {"kind": "proportional", "better": "less"}},
            {"id": "drying", "name": "Drying", "rate": "grade", "grades": [
                {"id": "dry", "name": "all dry", "worth": 1}, {"id": "damp", "name": "damp"}]},
            {"id": "ease", "name": "Ease of use"}]})" +
                      members + "}");
}

/// The sentences for all that is open.
Texts all_open(const Decision& decision) {
    Texts sentences;
    for (const auto& item : solve(decision).open) sentences.push_back(open_sentence(decision, item));
    return sentences;
}

bool holds(const Texts& sentences, const std::string& sentence) {
    return std::find(sentences.begin(), sentences.end(), sentence) != sentences.end();
}

/// A decision on one figure, worth as much as it is, so that scores can be set; the best of all has 100.
Decision scored(const std::vector<double>& figures, const std::string& settings = "{}") {
    std::string options;
    std::string entries;
    for (std::size_t i = 0; i < figures.size(); ++i) {
        const std::string id = "o" + std::to_string(i);
        const std::string name = std::string(1, static_cast<char>('P' + i)) + "ine";
        options += std::string(i == 0 ? "" : ", ") + R"({"id": ")" + id + R"(", "name": ")" + name + R"("})";
        entries += std::string(i == 0 ? "" : ", ") + R"({"criterion": "goal", "option": ")" + id +
                   R"(", "value": )" + std::to_string(figures[i]) + "}";
    }
    return test::read(R"({"format": "steelyard-decision", "version": 1, "options": [)" + options +
                      R"(], "criteria": {"id": "goal", "name": "Power", "rate": "figure",
        "curve": {"kind": "line", "worst": 0, "best": 100}}, "figures": [)" +
                      entries + R"(], "settings": )" + settings + "}");
}

std::string said(const Decision& decision) {
    return standing_sentence(decision, solve(decision));
}

/// Reasons for which the options are out.
Texts reasons(const Decision& decision) {
    Texts texts;
    for (const auto& exclusion : solve(decision).excluded)
        texts.push_back(exclusion_reason(decision, exclusion));
    return texts;
}

} // namespace

TEST_CASE("Every kind of open item has its sentence") {
    const Texts open = all_open(washers());
    CHECK(holds(open, "Price and Drying are not compared yet, in Best washer."));
    CHECK(holds(open, "Alder and Brook are not compared yet on Ease of use."));
    CHECK(holds(open, "Cove has no figure for Price yet."));
    CHECK(holds(open, "Alder has no grade for Drying yet."));
    CHECK(holds(open, "The grade “damp” of Drying has no worth yet."));
}

TEST_CASE("A figure that is there but has no worth is not called missing") {
    const Texts open = all_open(washers(R"(, "figures": [
        {"criterion": "price", "option": "a", "value": 3}, {"criterion": "price", "option": "a", "value": 0}])"));
    CHECK(holds(open, "The figure of Alder for Price, 0 EUR, has no worth: it must be above 0."));
    CHECK(holds(open, "Brook has no figure for Price yet."));
}

TEST_CASE("Sets of grades, points, curves and cost sheets say what is open in them") {
    const Decision decision = test::read(R"({"format": "steelyard-decision", "version": 1,
        "options": [{"id": "a", "name": "Alder"}],
        "criteria": {"id": "goal", "name": "Best", "weights": "points", "children": [
            {"id": "price", "name": "Price", "rate": "figure"},
            {"id": "running", "name": "Running cost", "rate": "figure",
             "curve": {"kind": "proportional", "better": "less"}, "cost_sheet": {"years": 5}},
            {"id": "drying", "name": "Drying", "rate": "grade", "worths": "pairs", "grades": [
                {"id": "dry", "name": "all dry"}, {"id": "damp", "name": "damp"}]}]}})");
    const Texts open = all_open(decision);
    CHECK(holds(open, "No points are shared out yet in Best."));
    CHECK(holds(open, "Price has no worth curve yet, so no figure counts there."));
    CHECK(holds(open, "The cost sheet of Alder gives no figure for Running cost yet."));
    CHECK(holds(open, "The grades “all dry” and “damp” of Drying are not compared yet."));
}

TEST_CASE("A must that is open says whether it was asked about or has no limit") {
    const Decision decision = washers(R"(, "requirements": [
        {"id": "guard", "name": "Guard accepted", "yes_no": true},
        {"id": "budget", "name": "Within budget", "criterion": "price", "at_most": 9},
        {"id": "later", "name": "Weight"}],
        "checks": [{"requirement": "guard", "option": "b", "state": "asked"}])");
    const Texts open = all_open(decision);
    CHECK(holds(open, "Whether Alder meets the must “Guard accepted” is not settled yet."));
    CHECK(holds(open, "Brook was asked about the must “Guard accepted”; the answer is not there yet."));
    CHECK(holds(open, "Whether Alder meets the must “Within budget” is not settled yet."));
    CHECK(holds(open, "The must “Weight” has no limit yet, so Alder cannot be checked."));
}

TEST_CASE("An open item leads to the room where it is answered, and to what it is about") {
    const OpenItem judgment{.kind = OpenKind::judgment, .set = "goal", .a = "x", .b = "y"};
    CHECK(room_of(judgment) == RoomId::weigh);
    CHECK(focus_of(judgment) == "goal");
    const OpenItem points{.kind = OpenKind::points, .set = "cost"};
    CHECK(room_of(points) == RoomId::weigh);
    CHECK(focus_of(points) == "cost");
    for (const OpenKind kind : {OpenKind::figure, OpenKind::curve, OpenKind::grade, OpenKind::worth}) {
        const OpenItem item{.kind = kind, .criterion = "price", .option = "a", .grade = "dry"};
        CHECK(room_of(item) == RoomId::gauge);
        CHECK(focus_of(item) == "price");
    }
    const OpenItem must{.kind = OpenKind::requirement, .option = "a", .requirement = "guard"};
    CHECK(room_of(must) == RoomId::gauge);
    CHECK(focus_of(must) == "guard");
    CHECK(room_name(RoomId::gauge) == "Gauge");
    CHECK(room_name(RoomId::record) == "Record");
}

TEST_CASE("An exclusion names value, limit and unit") {
    const Decision example = test::read(example_decision());
    const auto excluded = solve(example).excluded;
    REQUIRE(excluded.size() == 1);
    CHECK(exclusion_reason(example, excluded[0]) ==
          "Noise at the operator's place: 81 dB(A), at most 78 allowed");
    CHECK(exclusion_sentence(example, excluded[0]) ==
          "Dune does not meet the must “Noise at the operator's place”: 81 dB(A), at most 78 allowed.");
}

TEST_CASE("Exclusions on yes or no, on a lower limit and on worth") {
    const std::string figures = R"(, "figures": [{"criterion": "price", "option": "a", "value": 10},
        {"criterion": "price", "option": "b", "value": 20}, {"criterion": "price", "option": "c", "value": 19.9999}])";
    CHECK(reasons(washers(R"(, "requirements": [{"id": "guard", "name": "Guard accepted", "yes_no": true}],
        "checks": [{"requirement": "guard", "option": "a", "state": "failed"}])")) ==
          Texts{"Guard accepted: not met"});
    // The criterion's unit where the must has none of its own; both limits, and the one that is broken.
    CHECK(reasons(washers(figures + R"(, "requirements": [
        {"id": "r", "name": "Price", "criterion": "price", "at_least": 15, "at_most": 20}])")) ==
          Texts{"Price: 10 EUR, at least 15 needed"});
    CHECK(reasons(washers(figures + R"(, "requirements": [
        {"id": "r", "name": "Price", "criterion": "price", "at_least": 5, "at_most": 15}])")) ==
          Texts{"Price: 20 EUR, at most 15 allowed", "Price: 19.9999 EUR, at most 15 allowed"});
    // 10 / 20.004 is told with as many digits as it takes to be seen below the limit.
    CHECK(reasons(washers(R"(, "figures": [{"criterion": "price", "option": "a", "value": 10},
        {"criterion": "price", "option": "b", "value": 20}, {"criterion": "price", "option": "c", "value": 20.004}],
        "requirements": [{"id": "r", "name": "Cheap", "node": "price", "min_worth": 0.5}])")) ==
          Texts{"Cheap: worth 0.4999 of 1 on Price, at least 0.5 needed"});
}

TEST_CASE("The standing in one sentence") {
    CHECK(said(test::read(example_decision())) == "Brook is first, 1.2 points of 100 ahead of Alder");
    CHECK(said(scored({60, 40})) == "Pine is first, 20.0 points of 100 ahead of Qine");
    CHECK(said(scored({40, 60, 40})) == "Qine is first, 20.0 points of 100 ahead of Pine and Rine");
    CHECK(said(scored({41, 40})) == "Pine is first, 1.0 point of 100 ahead of Qine");
    CHECK(said(scored({40.01, 40})) == "Pine is first, less than 0.1 points of 100 ahead of Qine");
    CHECK(said(scored({40, 60, 60})) == "Qine and Rine are level in first place");
    CHECK(said(scored({60, 60})) == "Pine and Qine are level in first place");
    CHECK(said(scored({60, 60, 60})) == "All 3 options are level");
    CHECK(said(scored({60})) == "Pine is the only option in play");
}

TEST_CASE("A lead at or under the decision's own limit is too close to call") {
    CHECK(said(scored({52, 50}, R"({"too_close": 0.02})")) ==
          "Too close to call: Pine is only 2.0 points of 100 ahead of Qine");
    CHECK(said(scored({53, 50}, R"({"too_close": 0.02})")) ==
          "Pine is first, 3.0 points of 100 ahead of Qine");
}

TEST_CASE("Without options in play the standing says why") {
    Decision decision = scored({60, 40});
    for (auto& option : decision.options) option.withdrawn = true;
    CHECK(said(decision) == "Every option is withdrawn");
    decision.options.clear();
    decision.figures.clear();
    CHECK(said(decision) == "There are no options yet");
    Requirement power{.id = "r", .name = "Power"};
    power.criterion = "goal";
    power.at_least = 90;
    decision = scored({60, 40});
    decision.requirements.push_back(power);
    CHECK(said(decision) == "No option is in play");
}

TEST_CASE("What stands in for missing answers is named") {
    const Decision example = test::read(example_decision());
    const Results solved = solve(example);
    CHECK(stand_in_sentences(example, solved) ==
          Texts{"Cove has no value on Residual dirt; the mean of the others stands in."});
    CHECK(range_sentences(example, solved) == Texts{"Cove: 41.5 to 68.7, depending on what is still open"});

    const Decision fresh = washers(R"(, "figures": [{"criterion": "price", "option": "a", "value": 10}])");
    CHECK(stand_in_sentences(fresh, solve(fresh)) ==
          Texts{"In Best washer the criteria count equally until they are weighed.",
                "Brook and Cove have no value on Price; the mean of the others stands in.",
                "Nobody has a value on Drying and Ease of use, so every option counts the same there."});
    CHECK(range_sentences(fresh, solve(fresh)).size() == 3);

    const Decision firm = scored({60, 40});
    CHECK(stand_in_sentences(firm, solve(firm)).empty());
    CHECK(range_sentences(firm, solve(firm)).empty());
}

TEST_CASE("Names are listed with commas and and") {
    CHECK(listed({}).empty());
    CHECK(listed({"A"}) == "A");
    CHECK(listed({"A", "B"}) == "A and B");
    CHECK(listed({"A", "B", "C"}) == "A, B and C");
    CHECK(listed({"A", "B", "C", "D"}) == "A, B, C and 1 more");
    CHECK(listed({"A", "B", "C"}, 1) == "A and 2 more");
}

} // namespace steelyard
