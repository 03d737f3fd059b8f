#include <catch_amalgamated.hpp>
#include <cmath>
#include <set>
#include <string>
#include <vector>

#include "core/decision/fingerprint.hpp"
#include "core/decision/json_value.hpp"
#include "core/results/corrections.hpp"
#include "core/results/solve.hpp"
#include "core/results/write_results.hpp"
#include "tests/support/close.hpp"
#include "tests/support/full_decision.hpp"
#include "tests/support/random_decision.hpp"
#include "tests/support/round_trip.hpp"

namespace steelyard {

using Kind = JsonValue::Kind;
using Names = std::vector<std::string>;

namespace {

JsonValue results_of(const Decision& decision) {
    const ParsedJson parsed = parse_json(write_results(decision, solve(decision)));
    REQUIRE(parsed.problems.empty());
    return parsed.value;
}

JsonValue results_of(const std::string& text) {
    return results_of(test::read(text));
}

/// The value at a path of member names and indices; the running test fails where there is none.
const JsonValue& at(const JsonValue& value, const Names& path) {
    const JsonValue* here = &value;
    for (const auto& step : path) {
        INFO("at " << step);
        if (here->kind == Kind::array) {
            REQUIRE(std::stoul(step) < here->items.size());
            here = &here->items[std::stoul(step)];
        } else {
            REQUIRE(here->find(step) != nullptr);
            here = here->find(step);
        }
    }
    return *here;
}

Names member_names(const JsonValue& value) {
    Names names;
    for (const auto& [name, member] : value.members) names.push_back(name);
    return names;
}

std::string compact(const JsonValue& value) {
    std::string text = write_json_compact(value);
    while (!text.empty() && text.back() == '\n') text.pop_back();
    return text;
}

/// Two judged criteria and two options, one figure missing; small but with something in most members.
const std::string small = R"({"format": "steelyard-decision", "version": 1,
    "people": [{"id": "p1"}], "options": [{"id": "o1"}, {"id": "o2"}, {"id": "o3"}],
    "criteria": {"id": "goal", "children": [
        {"id": "cost", "rate": "figure", "curve": {"kind": "line", "worst": 100, "best": 0},
         "cost_sheet": {"years": 2, "discount": 0}},
        {"id": "ease", "rate": "figure", "curve": {"kind": "line", "worst": 0, "best": 1}}]},
    "judgments": [{"set": "goal", "by": "p1", "a": "cost", "b": "ease", "ratio": 3}],
    "costs": [{"criterion": "cost", "option": "o1", "line": "price", "kind": "once", "value": 50},
              {"criterion": "cost", "option": "o2", "line": "price", "kind": "once", "value": 25},
              {"criterion": "cost", "option": "o3", "line": "price", "kind": "once", "value": 5}],
    "figures": [{"criterion": "ease", "option": "o1", "value": 0.5}],
    "requirements": [{"id": "r1", "criterion": "cost", "at_least": 10, "at_most": 80}, {"id": "r2", "yes_no": true}],
    "checks": [{"requirement": "r2", "option": "o1", "state": "met"}, {"requirement": "r2", "option": "o3", "state": "failed"}]})";

/// Every number and text is plain JSON; counts the numbers.
int count_numbers(const JsonValue& value) {
    int count = value.kind == Kind::number ? 1 : 0;
    if (value.kind == Kind::number) CHECK(std::isfinite(value.number));
    for (const auto& item : value.items) count += count_numbers(item);
    for (const auto& [name, member] : value.members) count += count_numbers(member);
    return count;
}

} // namespace

TEST_CASE("results file: its members in their order") {
    CHECK(member_names(results_of(small)) == Names{"format", "version", "decision_sha256", "settings", "sets",
                                                   "leaf_weights", "figures", "local", "scores", "shares",
                                                   "ranks", "provisional", "ranges", "lead", "excluded",
                                                   "open", "notices"});
}

TEST_CASE("results file: it says what it is and of which decision") {
    const JsonValue results = results_of(small);
    CHECK(at(results, {"format"}).text == "steelyard-results");
    CHECK(at(results, {"version"}).number == 1);
    CHECK(at(results, {"decision_sha256"}).text == decision_sha256(test::read(small)));
}

TEST_CASE("results file: settings in full, defaults written out") {
    CHECK(
        compact(at(results_of(small), {"settings"})) ==
        R"({"method":"eigenvector","synthesis":"ideal","combine":"judgments","random_index":"alonso-lamata-2006",)"
        R"("limit":0.1,"too_close":0,"money":null,"trials":{"n":10000,"seed":1,"kinds":["weights"],"spread":1.5}})");
}

TEST_CASE("results file: numbers by id, options in play only") {
    const JsonValue results = results_of(small);
    CHECK(compact(at(results, {"leaf_weights"})) == R"({"cost":0.75,"ease":0.25})");
    CHECK(compact(at(results, {"figures"})) == R"({"cost":{"o1":50,"o2":25,"o3":5}})");
    CHECK(compact(at(results, {"local"})) == R"({"cost":{"o1":0.5,"o2":0.75},"ease":{"o1":0.5,"o2":0.5}})");
    CHECK(compact(at(results, {"scores"})) == R"({"o1":0.5,"o2":0.6875})");
    CHECK(compact(at(results, {"ranks"})) == R"({"o1":2,"o2":1})");
    CHECK(at(results, {"provisional"}).truth);
    CHECK(compact(at(results, {"ranges"})) == R"({"o2":[0.5625,0.8125]})");
    CHECK_THAT(at(results, {"lead", "points"}).number, Catch::Matchers::WithinAbs(18.75, 1e-12));
}

TEST_CASE("results file: who was excluded, by what, and what is open") {
    const JsonValue results = results_of(small);
    CHECK(compact(at(results, {"excluded"})) ==
          R"([{"option":"o3","requirement":"r1","value":5,"limit":{"at_least":10,"at_most":80}},)"
          R"({"option":"o3","requirement":"r2"}])");
    CHECK(compact(at(results, {"open"})) == R"([{"kind":"figure","criterion":"ease","option":"o2"},)"
                                            R"({"kind":"requirement","requirement":"r2","option":"o2"}])");
}

TEST_CASE("results file: a set of two, whose ratio is null") {
    const JsonValue results = results_of(small);
    CHECK(at(results, {"sets"}).items.size() == 2);
    const JsonValue& group = at(results, {"sets", "0"});
    CHECK(member_names(group) == Names{"set", "by", "items", "missing", "weights", "by_method", "lambda_max",
                                       "ci", "ri", "cr", "gci", "koczkodaj", "cycles", "misfits"});
    CHECK(at(group, {"by"}).kind == Kind::null);
    CHECK(at(results, {"sets", "1", "by"}).text == "p1");
    CHECK(compact(at(group, {"items"})) == R"(["cost","ease"])");
    CHECK(compact(at(group, {"missing"})) == "[]");
    CHECK(compact(at(group, {"weights"})) == R"({"cost":0.75,"ease":0.25})");
    CHECK(member_names(at(group, {"by_method"})) == Names{"eigenvector", "geometric-mean", "column-average"});
    CHECK(at(group, {"lambda_max"}).kind == Kind::number);
    CHECK(at(group, {"ci"}).number == 0);
    for (const char* name : {"ri", "cr", "gci", "koczkodaj"}) CHECK(at(group, {name}).kind == Kind::null);
    CHECK(compact(at(group, {"misfits"})) == R"([{"a":"cost","b":"ease","given":3,"implied":null}])");
}

TEST_CASE("results file: what is undefined is null, not left out") {
    // Criteria that nobody links, options all worth 0.
    const JsonValue results =
        results_of(R"({"format": "steelyard-decision", "version": 1, "options": [{"id": "o1"}],
        "criteria": {"id": "goal", "children": [
            {"id": "a", "rate": "figure", "curve": {"kind": "line", "worst": 0, "best": 1}},
            {"id": "b", "rate": "figure", "curve": {"kind": "line", "worst": 0, "best": 1}}]},
        "figures": [{"criterion": "a", "option": "o1", "value": 0}, {"criterion": "b", "option": "o1", "value": 0}]})");
    const JsonValue& set = at(results, {"sets", "0"});
    for (const char* name : {"weights", "lambda_max", "ci", "ri", "cr", "gci", "koczkodaj"})
        CHECK(at(set, {name}).kind == Kind::null);
    for (const char* name : {"eigenvector", "geometric-mean", "column-average"})
        CHECK(at(set, {"by_method", name}).kind == Kind::null);
    CHECK(compact(at(set, {"missing"})) == R"([["a","b"]])");
    CHECK(at(results, {"shares"}).kind == Kind::null);
    CHECK(compact(at(results, {"ranges"})) == "{}");
    CHECK(compact(at(results, {"excluded"})) == "[]");
    CHECK(results.find("lead") == nullptr); // Nobody to lead.
    bool said = false;
    for (const auto& notice : at(results, {"notices"}).items) {
        CHECK(member_names(notice) == Names{"code", "text", "at"});
        said = said || at(notice, {"code"}).text == "not-connected";
    }
    CHECK(said);
}

TEST_CASE("results file: a decision without options") {
    const JsonValue results = results_of(R"({"format": "steelyard-decision", "version": 1, "options": [],
        "criteria": {"id": "goal"}})");
    CHECK(compact(at(results, {"scores"})) == "{}");
    CHECK(compact(at(results, {"ranks"})) == "{}");
    CHECK(at(results, {"shares"}).kind == Kind::null);
    CHECK(compact(at(results, {"local"})) == R"({"goal":{}})");
}

TEST_CASE("results file: cycles, misfits and limits of a larger set") {
    const JsonValue results = results_of(R"({"format": "steelyard-decision", "version": 1,
        "options": [{"id": "o1"}, {"id": "o2"}, {"id": "o3"}], "criteria": {"id": "goal"},
        "judgments": [{"set": "goal", "a": "o1", "b": "o2", "ratio": 2}, {"set": "goal", "a": "o2", "b": "o3", "ratio": 2},
                      {"set": "goal", "a": "o3", "b": "o1", "ratio": 2}]})");
    const JsonValue& set = at(results, {"sets", "0"});
    CHECK(compact(at(set, {"cycles"})) == R"([["o1","o2","o3"]])");
    CHECK(at(set, {"misfits"}).items.size() == 3);
    CHECK(at(set, {"ri"}).number == .5245);
    CHECK(at(set, {"cr"}).number == at(set, {"ci"}).number / .5245);
    CHECK(at(set, {"koczkodaj"}).number == .875);
}

TEST_CASE("results file: ids with quotes, marks and accents are written as JSON needs them") {
    const JsonValue results = results_of(R"({"format": "steelyard-decision", "version": 1,
        "options": [{"id": "a\"b\\c"}, {"id": "Größe\n"}], "criteria": {"id": "goal/~"}})");
    CHECK(member_names(at(results, {"scores"})) == Names{"a\"b\\c", "Größe\n"});
    CHECK(member_names(at(results, {"leaf_weights"})) == Names{"goal/~"});
}

TEST_CASE("results file: ends with a newline, reads back, and is the same every time") {
    const Decision decision = test::read(test::full_decision_text());
    const std::string text = write_results(decision, solve(decision));
    CHECK(text.back() == '\n');
    CHECK(text == write_results(decision, solve(decision)));
    CHECK(write_json(parse_json(text).value) == text);
}

TEST_CASE("results file: whatever the decision, every number is finite and every name stands once") {
    for (std::uint64_t seed = 1; seed <= testing::cases(300); ++seed) {
        INFO("seed " << seed);
        const Decision decision = testing::random_decision(seed);
        const std::string text = write_results(decision, solve(decision));
        CHECK(text.find("nan") == std::string::npos);
        const ParsedJson parsed = parse_json(text); // Refuses repeated names and numbers beyond a double.
        CHECK(parsed.problems.empty());
        CHECK(count_numbers(parsed.value) > 0);
    }
}

TEST_CASE("results file: corrections stand in it when they were added, else nothing of them") {
    const Decision decision = test::read(R"({"format": "steelyard-decision", "version": 1,
        "options": [{"id": "o1"}], "criteria": {"id": "goal", "children": [{"id": "a"}, {"id": "b"}, {"id": "c"}]},
        "judgments": [{"set": "goal", "a": "a", "b": "b", "ratio": 2}, {"set": "goal", "a": "a", "b": "c", "ratio": 0.2},
                      {"set": "goal", "a": "b", "b": "c", "ratio": 3}]})");
    Results results = solve(decision);
    const JsonValue plain = parse_json(write_results(decision, results)).value;
    CHECK(member_names(at(plain, {"sets", "0", "misfits", "0"})) == Names{"a", "b", "given", "implied"});
    CHECK(at(plain, {"sets", "0"}).find("fewest_changes") == nullptr);
    add_corrections(decision, results);
    const JsonValue corrected = parse_json(write_results(decision, results)).value;
    const JsonValue& misfit = at(corrected, {"sets", "0", "misfits", "1"});
    CHECK(member_names(misfit) == Names{"a", "b", "given", "implied", "best", "cr_at_best"});
    CHECK_THAT(at(misfit, {"best"}).number, Catch::Matchers::WithinAbs(6, 1e-9));
    CHECK_THAT(at(misfit, {"cr_at_best"}).number, Catch::Matchers::WithinAbs(0, 1e-12));
    const JsonValue& fewest = at(corrected, {"sets", "0", "fewest_changes"});
    CHECK(member_names(fewest) == Names{"count", "proven", "changes"});
    CHECK(at(fewest, {"count"}).number == 1);
    CHECK(at(fewest, {"proven"}).truth);
    CHECK(member_names(at(fewest, {"changes", "0"})) == Names{"a", "b", "to"});
    CHECK(at(fewest, {"changes", "0", "b"}).text == "c");
}

TEST_CASE("results file: corrections that cannot be are null") {
    const Decision decision = test::read(small);
    Results results = solve(decision);
    add_corrections(decision, results);
    const JsonValue file = parse_json(write_results(decision, results)).value;
    CHECK(at(file, {"sets", "0", "misfits", "0", "best"}).kind == Kind::null);
    CHECK(at(file, {"sets", "0", "misfits", "0", "cr_at_best"}).kind == Kind::null);
    CHECK(at(file, {"sets", "0", "fewest_changes"}).kind == Kind::null);
}

} // namespace steelyard
