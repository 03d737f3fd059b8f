#include <algorithm>
#include <catch_amalgamated.hpp>
#include <set>
#include <string>
#include <vector>

#include "core/decision/problem.hpp"
#include "core/decision/read.hpp"
#include "tests/support/bad_files.hpp"
#include "tests/support/full_decision.hpp"

namespace steelyard {
namespace {

using test::BadFile;
using test::exchanged;
using test::repeated;
using test::small_decision_text;
using test::with;
using test::with_first;
using test::with_member;

std::vector<std::string> places(const std::vector<Problem>& problems) {
    std::vector<std::string> at;
    for (const auto& problem : problems) at.push_back(problem.at);
    std::sort(at.begin(), at.end());
    return at;
}

std::string told(const std::vector<Problem>& problems) {
    std::string text;
    for (const auto& problem : problems) text += sentence(problem) + "\n";
    return text;
}

void accepted(const std::string& name, const std::string& text) {
    INFO(name);
    const ReadResult result = read_decision(text);
    INFO(told(result.problems));
    CHECK(result.problems.empty());
    CHECK(result.decision.has_value());
}

} // namespace

TEST_CASE("bad files: each is refused at exactly the places at fault") {
    const std::vector<BadFile> files = test::bad_files();
    REQUIRE(files.size() >= 75);
    std::set<std::string> names;
    for (const BadFile& file : files) {
        INFO(file.name);
        const ReadResult result = read_decision(file.text);
        std::vector<std::string> expected = file.at;
        std::sort(expected.begin(), expected.end());
        INFO(told(result.problems));
        CHECK(names.insert(file.name).second);
        CHECK_FALSE(result.decision.has_value());
        CHECK(places(result.problems) == expected);
    }
}

TEST_CASE(
    "bad files: every problem is told in one line with its place, what stands there and what was expected") {
    for (const BadFile& file : test::bad_files()) {
        INFO(file.name);
        const ReadResult result = read_decision(file.text);
        CHECK_FALSE(result.problems.empty());
        for (const Problem& problem : result.problems) {
            const std::string text = sentence(problem);
            INFO(text);
            CHECK_FALSE(problem.found.empty());
            CHECK_FALSE(problem.expected.empty());
            CHECK(text.find(problem.at) != std::string::npos);
            CHECK(text.find(problem.found) != std::string::npos);
            CHECK(text.find(problem.expected) != std::string::npos);
            CHECK(text.find('\n') == std::string::npos);
            // Room for the deepest pointer and a shortened value.
            CHECK(text.size() < 500);
        }
    }
}

TEST_CASE("bad files: a value that fills the file is shortened in the sentence") {
    const std::string ones = repeated("1", 100'000);
    const std::string letters = repeated("\xc3\xa4", 30'000);
    const std::vector<std::string> texts{
        with("\"ratio\": 3,", "\"ratio\": -0." + ones + ","),
        with("\"ratio\": 3,", "\"ratio\": " + ones + ","),
        with("\"ratio\": 3,", "\"ratio\": 1" + repeated("0", 400) + "." + ones + ","),
        with("\"round\": 2", "\"round\": 2." + ones),
        with("\"quoted\"", "\"" + letters + "\""),
        with("\"by\": \"p1\", \"did\"", "\"by\": \"" + letters + "\", \"did\""),
        with("\"Works council\"", ones),
    };
    for (const std::string& text : texts) {
        const ReadResult result = read_decision(text);
        CHECK_FALSE(result.decision.has_value());
        for (const Problem& problem : result.problems) {
            INFO(problem.at);
            CHECK(sentence(problem).size() < 500);
        }
    }
}

TEST_CASE("bad files: UTF-16 is refused in so many words") {
    const std::string little("\xff\xfe{\0}\0", 6);
    const std::string big("\xfe\xff\0{\0}", 6);
    for (const auto& text : {little, big}) {
        const ReadResult result = read_decision(text);
        REQUIRE(result.problems.size() == 1);
        CHECK(sentence(result.problems[0]).find("UTF-16") != std::string::npos);
        CHECK(sentence(result.problems[0]).find("UTF-8") != std::string::npos);
    }
}

TEST_CASE("bad files: no more problems are kept than the cap") {
    std::string entries;
    for (int i = 0; i < 150; ++i) entries += "{\"id\": 5, \"name\": 6},";
    const ReadResult result = read_decision(with_first("people", entries.substr(0, entries.size() - 1)));
    CHECK(max_problems == 100);
    CHECK(result.problems.size() == 100);
    CHECK_FALSE(result.decision.has_value());
    CHECK(result.problems.front().at == "/people/0/id");
}

TEST_CASE("bad files: exactly the cap of problems is told in full") {
    const std::string ninety_nine = repeated("5,", 98) + "5";
    CHECK(read_decision(small_decision_text(", \"log\": [" + ninety_nine + "]")).problems.size() == 99);
    CHECK(read_decision(small_decision_text(", \"log\": [" + ninety_nine + ",5]")).problems.size() == 100);
    CHECK(read_decision(small_decision_text(", \"log\": [" + ninety_nine + ",5,5]")).problems.size() == 100);
}

TEST_CASE("good files: the base files of the bad ones are accepted without a notice") {
    for (const std::string& text : {test::full_decision_text(), small_decision_text()}) {
        accepted("base", text);
        CHECK(read_decision(text).notices.empty());
    }
}

TEST_CASE("good files: every cap is accepted at its value") {
    const std::string id64(64, 'i');
    const std::string& full = test::full_decision_text();
    accepted("an id of 64 bytes", with_first("options", "{\"id\": \"" + id64 + "\"}"));
    accepted("an id of 32 characters in 64 bytes",
             with_first("people", "{\"id\": \"" + repeated("\xc3\xa4", 32) + "\"}"));
    accepted("a criterion's id of 64 bytes", exchanged(small_decision_text(), "goal", id64));
    accepted("a text of 65,536 bytes", with("\"Works council\"", "\"" + std::string(65536, 't') + "\""));
    accepted("a text of 32,768 characters in 65,536 bytes",
             with("\"Works council\"", "\"" + repeated("\xc3\xa4", 32768) + "\""));
    // 65,537 bytes in the file, but the text they stand for is 65,536 bytes long.
    accepted("a text that is longer only by its escape",
             with("\"Works council\"", "\"" + std::string(65535, 't') + "\\n\""));
    accepted("a tree of 12 levels",
             exchanged(small_decision_text(), R"({"id": "goal"})", test::deep_tree_text(12)));
    accepted("lists nested 64 levels deep", with_member("extra", repeated("[", 63) + repeated("]", 63)));
    accepted("a file of 16 MiB", full + std::string((16u << 20) - full.size(), ' '));
    accepted("a file of 16 MiB with its mark",
             "\xef\xbb\xbf" + full + std::string((16u << 20) - full.size() - 3, '\n'));
}

TEST_CASE("good files: every range is accepted at its ends") {
    const auto ratio = [](const char* number) {
        return with("\"ratio\": 3,", std::string("\"ratio\": ") + number + ",");
    };
    accepted("the ratio 1/100", ratio("0.01"));
    accepted("the ratio 100", ratio("100"));
    accepted("the ratio 100 with an exponent", ratio("1e2"));
    accepted("a share of zero beside another", with("\"share\": 0.5", "\"share\": 0"));
    accepted("the same worth twice", with("[40, 0.5]", "[40, 1]"));
    accepted("a falling curve", with("[[20, 0], [40, 0.5], [80, 1]]", "[[20, 1], [40, 0.5], [80, 0]]"));
    accepted("a curve of one point", with("[[20, 0], [40, 0.5], [80, 1]]", "[[20, 0.5]]"));
    accepted("the smallest tolerance", with("\"tolerance\": 10", "\"tolerance\": 5e-324"));
    accepted("a grade worth 0", with("\"worth\": 0.6", "\"worth\": 0"));
    accepted("one year", with("\"years\": 10", "\"years\": 1"));
    accepted("200 years", with("\"years\": 10", "\"years\": 200"));
    accepted("a whole number written with a point", with("\"years\": 10", "\"years\": 10.0"));
    accepted("a whole number written with an exponent", with("\"years\": 10", "\"years\": 1e1"));
    accepted("a discount just above -1", with("\"discount\": 0.08", "\"discount\": -0.9999999999999999"));
    accepted("round 1", with("\"round\": 2", "\"round\": 1"));
    accepted("low and high equal to value",
             with("\"low\": 6000, \"high\": 6600", "\"low\": 6150, \"high\": 6150"));
    accepted("low equal to high without a value",
             with_first("figures", R"({"criterion": "price", "option": "o1", "low": 5000, "high": 5000})"));
    accepted("a cost in year 0", with("\"year\": 5", "\"year\": 0"));
    accepted("a cost in year 200", with("\"year\": 5", "\"year\": 200"));
    accepted("a least worth of 0", with("\"min_worth\": 0.3", "\"min_worth\": 0"));
    accepted("a least worth of 1", with("\"min_worth\": 0.3", "\"min_worth\": 1"));
    accepted("limits that meet",
             with("\"at_least\": 1, \"at_most\": 78", "\"at_least\": 78, \"at_most\": 78"));
    accepted("points that are partly zero", with("\"upkeep\": 30}", "\"upkeep\": 0}"));
    accepted("a lead of zero", with("\"too_close\": 0.02", "\"too_close\": 0"));
    accepted("a spread of 1", with("\"spread\": 1.25", "\"spread\": 1"));
    accepted("one trial", with("\"n\": 5000", "\"n\": 1"));
    accepted("ten million trials", with("\"n\": 5000", "\"n\": 10000000"));
    accepted("seed 0", with("\"seed\": 7", "\"seed\": 0"));
    accepted("seed 2^53", with("\"seed\": 7", "\"seed\": 9007199254740992"));
}

TEST_CASE("good files: what the rules leave open is accepted") {
    accepted("no options", exchanged(small_decision_text(), R"([{"id": "o1"}, {"id": "o2"}])", "[]"));
    accepted(
        "the same id for a person, an option, a criterion, a requirement and a grade",
        R"({"format": "steelyard-decision", "version": 1, "people": [{"id": "x"}], "options": [{"id": "x"}],
                 "criteria": {"id": "x", "rate": "grade", "grades": [{"id": "x"}]}, "requirements": [{"id": "x"}]})");
    accepted("the same grade id on two leaves", with(R"("id": "k3")", R"("id": "g1")"));
    accepted("a way of weighing on a leaf",
             with(R"("rate": "pairs")", R"("rate": "pairs", "weights": "points")"));
    accepted("a rate beside empty children",
             with(R"("rate": "pairs")", R"("rate": "pairs", "children": [])"));
    accepted("a figure without a value", with_first("figures", R"({"criterion": "price", "option": "o1"})"));
    accepted("a cost without a value",
             with_first("costs", R"({"criterion": "upkeep", "option": "o1", "line": "x", "kind": "once"})"));
    accepted(
        "a year beside another kind of cost",
        with_first("costs",
                   R"({"criterion": "upkeep", "option": "o1", "line": "x", "kind": "once", "year": 3})"));
    accepted("a grade entry without a grade",
             with_first("grades", R"({"criterion": "service", "option": "o1"})"));
    accepted("a check without a value or state",
             with_first("checks", R"({"requirement": "r2", "option": "o1"})"));
    accepted("a requirement that limits nothing", with_first("requirements", R"({"id": "r9"})"));
    accepted("a node with both kinds of limits",
             with_first("requirements",
                        R"({"id": "r9", "node": "goal", "min_worth": 0.2, "at_least": 0.3, "at_most": 1})"));
    accepted("a grade without a worth", with(R"(, "worth": 0.6)", ""));
    accepted("a figure leaf without a curve", with(R"("unit": "km",
        "curve": {"kind": "points", "at": [[20, 0], [40, 0.5], [80, 1]]})",
                                                   R"("unit": "km")"));
    accepted("a judgment of a withdrawn option",
             with_first("judgments", R"({"set": "ease", "a": "o1", "b": "o3", "ratio": 2})"));
    accepted("empty records",
             small_decision_text(R"(, "rules": {}, "outcome": {}, "log": [{}], "signed": [{}])"));
    accepted("several entries for one place",
             with_first("judgments", R"({"set": "goal", "by": "p1", "a": "ease", "b": "cost", "ratio": 2})"));
}

} // namespace steelyard
