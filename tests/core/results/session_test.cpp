#include <catch_amalgamated.hpp>

#include "core/decision/fingerprint.hpp"
#include "core/decision/read.hpp"
#include "core/results/session.hpp"

using namespace steelyard;

namespace {

Decision price_only() {
    const auto read = read_decision(R"({ "format": "steelyard-decision", "version": 1,
      "options": [{ "id": "a" }, { "id": "b" }],
      "criteria": { "id": "price", "rate": "figure", "curve": { "kind": "proportional", "better": "less" } },
      "figures": [{ "criterion": "price", "option": "a", "value": 10 },
                  { "criterion": "price", "option": "b", "value": 20 }] })");
    REQUIRE(read.decision.has_value());
    return *read.decision;
}

} // namespace

TEST_CASE("results are solved once for a revision and anew after a change, an undo and another decision") {
    Session session(price_only());
    const Results* first = &session.results();
    CHECK(first->ranks == std::vector{1, 2});
    const std::string sha = session.sha256();
    CHECK(&session.results() == first);

    session.apply({Enter<Figure>{{.criterion = "price", .option = "a", .value = 40}}}, {});
    CHECK(session.results().ranks == std::vector{2, 1});
    CHECK(session.sha256() != sha);
    CHECK(session.sha256() == decision_sha256(session.decision()));
    session.undo({});
    CHECK(session.results().ranks == std::vector{1, 2});

    Decision other = price_only();
    other.options[0].withdrawn = true;
    session.open(other);
    CHECK(session.sha256() == decision_sha256(other));
    CHECK(session.results().options == std::vector<Id>{"b"});
    CHECK(session.history().undo_label().empty());
}
