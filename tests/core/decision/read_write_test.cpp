#include <array>
#include <catch_amalgamated.hpp>
#include <string>
#include <string_view>
#include <utility>
#include <variant>
#include <vector>

#include "core/decision/fingerprint.hpp"
#include "core/decision/write.hpp"
#include "tests/support/full_decision.hpp"
#include "tests/support/round_trip.hpp"

namespace steelyard {
namespace {

using test::canonical;
using test::comes_back_equal;
using test::exchanged;
using test::full_decision_text;
using test::noticed;
using test::Places;
using test::read;
using test::small_decision_text;
using test::with;
using test::with_first;
using test::with_member;

const char* const all_defaults = R"({
  "format": "steelyard-decision", "version": 1,
  "id": "", "title": "", "question": "", "author": "", "decide_by": "", "notes": "",
  "people": [{"id": "p1", "name": "", "role": "", "share": 1, "interest": "", "abstains": []}],
  "options": [{"id": "o1", "name": "", "note": "", "withdrawn": false}],
  "criteria": {"id": "goal", "name": "", "note": "", "weights": "pairs", "unit": "", "worths": "given", "grades": [],
    "children": [
      {"id": "a", "name": "", "note": "", "weights": "pairs", "children": [], "rate": "pairs", "unit": "", "grades": []},
      {"id": "b", "rate": "figure", "unit": "", "curve": {"kind": "proportional", "better": "more"}, "cost_sheet": {}},
      {"id": "c", "rate": "figure", "cost_sheet": {"years": 10, "discount": 0, "result": "total"}},
      {"id": "d", "rate": "grade", "worths": "given", "grades": [{"id": "g", "name": ""}]},
      {"id": "e", "rate": "grade", "grades": []},
      {"id": "f", "rate": "figure", "curve": {"kind": "line", "worst": 0, "best": 1}},
      {"id": "h", "rate": "figure", "curve": {"kind": "target", "target": 0, "tolerance": 1}}]},
  "judgments": [{"set": "goal", "by": null, "a": "a", "b": "b", "ratio": 1, "note": "", "at": ""}],
  "finished": [{"set": "goal", "by": null, "skipped": []}],
  "points": [{"set": "goal", "by": null, "points": {"h": 1, "a": 0, "b": 0, "c": 0, "d": 0, "e": 0, "f": 0}, "note": "",
    "at": ""}],
  "figures": [{"criterion": "f", "option": "o1", "source": "", "valid_until": "", "note": "", "at": ""},
    {"criterion": "f", "option": "o1", "value": 0, "low": 0, "high": 0, "round": 1}],
  "costs": [{"criterion": "c", "option": "o1", "line": "", "kind": "once", "source": "", "currency": "", "in_unit": 1,
    "note": "", "at": ""}, {"criterion": "c", "option": "o1", "line": "", "kind": "once", "value": 0, "year": 0}],
  "grades": [{"criterion": "d", "option": "o1", "by": null, "source": "", "note": "", "at": ""}],
  "requirements": [{"id": "r", "name": "", "note": "", "unit": "", "yes_no": false, "safety": false,
    "waived": {"by": null, "at": "", "why": ""}}, {"id": "s", "at_least": 0, "at_most": 0, "waived": {}}],
  "checks": [{"requirement": "r", "option": "o1", "source": "", "note": "", "by": null, "at": ""}],
  "settings": {"method": "eigenvector", "synthesis": "ideal", "combine": "judgments",
    "random_index": "alonso-lamata-2006", "limit": 0.10, "too_close": 0,
    "trials": {"n": 10000, "seed": 1, "kinds": ["weights"], "spread": 1.5}},
  "rules": {"fixed_at": "", "by": null, "sha256": ""},
  "outcome": {"by": [], "at": "", "reasons": "", "conditions": "", "why_not_first": ""},
  "log": [{"at": "", "by": null, "did": "", "why": ""}],
  "signed": [{"by": null, "at": "", "sha256": "", "remark": ""}]
})";

} // namespace

TEST_CASE("reading and writing: everything in the full decision comes back equal") {
    comes_back_equal(full_decision_text());
}

TEST_CASE("reading: the members arrive in their places") {
    const Decision d = read(full_decision_text());
    CHECK(d.id == "post-round");
    CHECK(d.question == "Which cargo bicycle do we buy?");
    CHECK(d.decide_by == "2027-02-26");
    REQUIRE(d.people.size() == 2);
    CHECK(d.people[0].share == 2);
    CHECK(d.people[0].abstains == std::vector<Id>{"o3"});
    CHECK(d.people[1].role.empty());
    REQUIRE(d.options.size() == 3);
    CHECK_FALSE(d.options[0].withdrawn);
    CHECK(d.options[2].withdrawn);
    REQUIRE(d.criteria.children.size() == 6);
    const Node& cost = d.criteria.children[0];
    CHECK(cost.weights == WeightsBy::points);
    REQUIRE(cost.children.size() == 2);
    const Node& price = cost.children[0];
    CHECK(price.rate == RateBy::figure);
    REQUIRE(price.curve);
    CHECK(std::get<LineCurve>(price.curve->shape) == LineCurve{9000, 4000});
    const Node& upkeep = cost.children[1];
    CHECK(std::get<ProportionalCurve>(upkeep.curve->shape).better == Better::less);
    REQUIRE(upkeep.cost_sheet);
    CHECK(upkeep.cost_sheet->years == 10);
    CHECK(upkeep.cost_sheet->discount == 0.08);
    CHECK(upkeep.cost_sheet->volume == 12000);
    CHECK(d.criteria.children[2].grades[1].worth == 0.6);
    CHECK(std::get<PointsCurve>(d.criteria.children[3].curve->shape).at[1] == std::array<double, 2>{40, 0.5});
    CHECK(std::get<TargetCurve>(d.criteria.children[4].curve->shape) == TargetCurve{30, 10});
    CHECK(d.criteria.children[5].worths == WorthsBy::pairs);
    CHECK_FALSE(d.criteria.children[5].grades[0].worth);
    REQUIRE(d.judgments.size() == 3);
    CHECK(d.judgments[0].ratio == 3);
    CHECK(d.judgments[0].note == "said twice");
    CHECK(d.judgments[1].by == "p2");
    CHECK(d.judgments[2].by.empty());
    CHECK(d.finished[0].skipped[1] == std::array<Id, 2>{"reach", "mass"});
    CHECK(d.points[0].points[1] == std::pair<Id, double>{"upkeep", 30});
    CHECK(d.figures[0].low == 6000);
    CHECK(d.figures[0].round == 2);
    CHECK(d.figures[0].status == QuoteStatus::quoted);
    CHECK_FALSE(d.figures[1].low);
    CHECK(d.costs[0].in_unit == 0.92);
    CHECK(d.costs[1].kind == CostKind::in_year);
    CHECK(d.costs[1].year == 5);
    CHECK(d.grades[0].grade == "g2");
    CHECK(d.requirements[1].at_least == 1);
    CHECK(d.requirements[1].safety);
    CHECK(d.requirements[2].yes_no);
    CHECK(d.requirements[2].waived->why == "bought apart");
    CHECK(d.requirements[3].min_worth == 0.3);
    CHECK(d.checks[0].high == 77);
    CHECK(d.checks[1].state == CheckState::met);
    CHECK(d.settings.too_close == 0.02);
    CHECK(d.settings.money == "price");
    CHECK(d.settings.trials.kinds ==
          std::vector<TrialKind>{TrialKind::weights, TrialKind::judgments, TrialKind::figures});
    CHECK(d.settings.trials.seed == 7);
    CHECK(d.rules->sha256 == "00ff");
    CHECK(d.outcome->by == std::vector<Id>{"p1", "p2"});
    CHECK(d.log[0].did == "opened");
    CHECK(d.signatures[0].remark == "agreed");
}

TEST_CASE("reading: what is absent has the value that stands for it") {
    const Decision d = read(small_decision_text(R"(, "people": [{"id": "p"}])"));
    CHECK(d.people[0].share == 1);
    CHECK(d.criteria.is_leaf());
    CHECK(d.criteria.rate == RateBy::pairs);
    CHECK(d.settings == Settings{});
    CHECK(d.settings.limit == 0.1);
    CHECK(d.settings.trials.n == 10000);
    CHECK_FALSE(d.outcome);
    CHECK_FALSE(d.rules);
    CHECK(d.judgments.empty());
}

TEST_CASE("reading and writing: nothing absent is added") {
    comes_back_equal(small_decision_text());
    comes_back_equal(
        exchanged(small_decision_text(), R"({"id": "goal"})",
                  R"({"id": "goal", "children": [{"id": "a"}, {"id": "b", "children": [{"id": "c"}]}]})"));
    comes_back_equal(
        exchanged(small_decision_text(), R"("criteria": {"id": "goal"})",
                  R"("people": [{"id": "p"}], "log": [{}], "signed": [{}], "requirements": [{"id": "r"}],
                                  "criteria": {"id": "goal", "rate": "grade", "grades": [{"id": "g"}]})"));
}

TEST_CASE("reading and writing: what is written out although it is the default stays") {
    comes_back_equal(all_defaults);
    comes_back_equal(small_decision_text(R"(, "settings": {}, "rules": {}, "outcome": {})"));
    comes_back_equal(small_decision_text(R"(, "settings": {"trials": {}})"));
    comes_back_equal(small_decision_text(R"(, "settings": {"trials": {"kinds": []}})"));
    comes_back_equal(small_decision_text(
        R"(, "people": [], "judgments": [], "finished": [], "points": [], "figures": [], "costs": [], "grades": [],
             "requirements": [], "checks": [], "log": [], "signed": [])"));
}

TEST_CASE("reading and writing: each default stays or stays away by itself") {
    // Every member of the file of defaults that may be absent, taken out alone.
    const std::string text = all_defaults;
    for (const char* member : {R"("name": "", "role": "", )",
                               R"( "share": 1,)",
                               R"(, "abstains": [])",
                               R"(, "withdrawn": false)",
                               R"( "weights": "pairs", "children": [],)",
                               R"( "children": [], "rate": "pairs",)",
                               R"( "curve": {"kind": "proportional", "better": "more"},)",
                               R"("years": 10, )",
                               R"("discount": 0, )",
                               R"(, "result": "total")",
                               R"(, "skipped": [])",
                               R"( "in_unit": 1,)",
                               R"( "yes_no": false,)",
                               R"(, "waived": {}}])",
                               R"("synthesis": "ideal", )",
                               R"("limit": 0.10, )",
                               R"("n": 10000, )",
                               R"( "kinds": ["weights"],)",
                               R"(, "spread": 1.5)",
                               R"("by": [], )"}) {
        INFO(member);
        // A requirement's last member takes its brackets along, to stand there only once.
        comes_back_equal(exchanged(text, member, std::string_view(member).ends_with("}}]") ? "}]" : ""));
    }
}

TEST_CASE("reading and writing: members that stand on the other kind of criterion stay") {
    comes_back_equal(with(R"("rate": "pairs")", R"("rate": "pairs", "weights": "points")"));
    comes_back_equal(with(R"("rate": "pairs")", R"("rate": "pairs", "weights": "pairs", "worths": "pairs")"));
    comes_back_equal(
        with(R"("weights": "points", "children")",
             R"("weights": "points", "worths": "pairs", "unit": "x", "curve": {"kind": "line", "worst": 1,
                             "best": 2}, "cost_sheet": {"years": 3}, "grades": [{"id": "q"}], "children")"));
    comes_back_equal(with(R"("better": "less")", R"("better": "less", "worst": 3, "at": "x")"));
    comes_back_equal(with(R"("tolerance": 10)", R"("tolerance": 10, "better": "more", "best": null)"));
}

TEST_CASE("reading and writing: numbers keep their value to the last bit") {
    const auto value = [](const char* number) {
        return with_first("figures",
                          std::string(R"({"criterion": "mass", "option": "o1", "value": )") + number + "}");
    };
    for (const char* number : {"0.1", "0.30000000000000004", "5e-324", "-1.7976931348623157e308",
                               "9007199254740993", "-0", "-0.0", "1e21", "123456789012345678901234567890",
                               "0.1000000000000000055511151231257827", "1E+2", "100.000", "1e-400"}) {
        INFO(number);
        comes_back_equal(value(number));
    }
    CHECK(read(value("0.30000000000000004")).figures[0].value == 0.1 + 0.2);
    CHECK(read(value("9007199254740993")).figures[0].value == 9007199254740992.0);
    comes_back_equal(with("\"seed\": 7", "\"seed\": 9007199254740992"));
    CHECK(read(with("\"seed\": 7", "\"seed\": 9007199254740991")).settings.trials.seed == 9007199254740991);
}

TEST_CASE("reading and writing: texts of every kind come back equal") {
    comes_back_equal(
        with("Works council",
             R"(\u0000\u0001\u001f \b\f\n\r\t \" \\ \/ / \u007f \u2028 \ufeff \ud83d\ude00 \u20ac)"));
    comes_back_equal(
        with("Works council", "\xc3\xa4 \xe2\x82\xac \xf0\x9f\x98\x80 e\xcc\x81 <script> ## %s"));
    CHECK(read(with("Works council", R"(a\u0000b)")).author == std::string("a\0b", 3));
    CHECK(read(with("Works council", R"(\ud83d\ude00)")).author == "\xf0\x9f\x98\x80");
    comes_back_equal(with_first("options", "{\"id\": \"\\u0001/~\\\" \xc3\xa9\"}"));
}

TEST_CASE("reading: a byte order mark, line ends of either kind and missing ends make no difference") {
    const std::string& full = full_decision_text();
    const Decision expected = read(full);
    std::string carriage;
    std::string one_line;
    for (const char c : full) {
        if (c == '\n') carriage += '\r';
        carriage += c;
        one_line += c == '\n' ? ' ' : c;
    }
    for (const auto& text : {"\xef\xbb\xbf" + full, carriage, "\xef\xbb\xbf" + carriage, one_line,
                             full.substr(0, full.rfind('}') + 1), full + "\n\n"}) {
        CHECK(read(text) == expected);
    }
}

TEST_CASE("writing: plain JSON without a mark, ending with one line end") {
    const std::string written = write_decision(read("\xef\xbb\xbf" + full_decision_text()));
    CHECK(written.front() == '{');
    CHECK(written.ends_with("}\n"));
    CHECK_FALSE(written.ends_with("\n\n"));
    CHECK(written.find('\r') == std::string::npos);
}

TEST_CASE("reading: what is accepted with a notice") {
    const auto ratio = [](const char* number) {
        return with("\"ratio\": 3,", std::string("\"ratio\": ") + number + ",");
    };
    CHECK(noticed(ratio("9"), "ratio-off-scale").empty());
    CHECK(noticed(ratio("0.1111111111111111"), "ratio-off-scale").empty());
    CHECK(noticed(ratio("9.1"), "ratio-off-scale") == Places{"/judgments/0/ratio"});
    CHECK(noticed(ratio("0.11"), "ratio-off-scale") == Places{"/judgments/0/ratio"});
    CHECK(noticed(ratio("100"), "ratio-off-scale") == Places{"/judgments/0/ratio"});

    const auto price = [](const char* number) {
        return with("\"value\": 6150, \"low\": 6000, \"high\": 6600", std::string("\"value\": ") + number);
    };
    CHECK(noticed(price("4000"), "outside-anchors").empty());
    CHECK(noticed(price("9000"), "outside-anchors").empty());
    CHECK(noticed(price("3999"), "outside-anchors") == Places{"/figures/0/value"});
    CHECK(noticed(price("9001"), "outside-anchors") == Places{"/figures/0/value"});

    const auto ground = [](const char* number) {
        return small_decision_text(
            std::string(R"(, "figures": [{"criterion": "goal", "option": "o1", "value": )") + number + "}]");
    };
    const auto proportional = [&](const char* number) {
        return exchanged(
            ground(number), R"({"id": "goal"})",
            R"({"id": "goal", "rate": "figure", "curve": {"kind": "proportional", "better": "more"}})");
    };
    CHECK(noticed(proportional("5e-324"), "not-positive").empty());
    CHECK(noticed(proportional("0"), "not-positive") == Places{"/figures/0/value"});
    CHECK(noticed(proportional("-2"), "not-positive") == Places{"/figures/0/value"});

    CHECK(noticed(with_first("figures", R"({"criterion": "upkeep", "option": "o1", "value": 1})"),
                  "figure-unused") == Places{"/figures/0"});
    CHECK(
        noticed(with_first("costs", R"({"criterion": "price", "option": "o1", "line": "x", "kind": "once"})"),
                "cost-unused") == Places{"/costs/0"});
    CHECK(noticed(with("\"year\": 5", "\"year\": 10"), "cost-unused").empty());
    CHECK(noticed(with("\"year\": 5", "\"year\": 11"), "cost-unused") == Places{"/costs/1"});
}

TEST_CASE("fingerprint: covers everything but the signatures, and not how the file is laid out") {
    const std::string& full = full_decision_text();
    const Decision decision = read(full);
    const std::string hash = decision_sha256(decision);
    CHECK(hash.size() == 64);
    CHECK(canonical_json(decision).find("\"signed\"") == std::string::npos);
    CHECK(decision_sha256(read(write_decision(decision))) == hash);
    CHECK(decision_sha256(read(with("\"remark\": \"agreed\"", "\"remark\": \"\""))) == hash);
    CHECK(decision_sha256(read(with("\"ratio\": 0.25", "\"ratio\": 25e-2"))) == hash);
    CHECK(decision_sha256(read(with("\"why\": \"new round\"", "\"why\": \"New round\""))) != hash);
    CHECK(decision_sha256(read(with("\"ratio\": 0.25", "\"ratio\": 0.2500000000000001"))) != hash);
    CHECK(decision_sha256(read(with_member("extra", "1"))) != hash);
    CHECK(canonical_json(read(small_decision_text(R"(, "signed": [{}])"))) ==
          canonical(small_decision_text()));
}

} // namespace steelyard
