#include <catch_amalgamated.hpp>

#include "tests/shell/support/ledger_checks.hpp"
#include "tests/shell/support/weigh_page.hpp"

using namespace steelyard;
using namespace steelyard::testing;

namespace {

constexpr const char* hands = "How answers are given: Show of hands";

std::string turn(const WeighPage& page) {
    return page.item("Show of hands: Criterion A against Criterion B", "group").value;
}

} // namespace

TEST_CASE("six judges on one side take six keystrokes a pair, and Enter brings the next") {
    WeighPage page(fresh_set(3, 6));
    page.click(hands, "radio");
    int strokes = 0;
    for (const int digit : {5, 3, 4, 2, 5, 7}) {
        page.key(static_cast<ImGuiKey>(ImGuiKey_0 + digit));
        ++strokes;
    }
    CHECK(strokes == 6);
    const Decision d = page.decision();
    REQUIRE(d.judgments.size() == 6);
    CHECK(d.judgments[5].by == "p5");
    CHECK(d.judgments[5].ratio == 7);
    CHECK(page.says("All on one side: Criterion A counts 2 to 7 times as much as Criterion B."));
    CHECK(page.find("Judge 6 \xC3\x97"
                    "7") != nullptr);
    page.key(ImGuiKey_Enter);
    CHECK(page.find("Show of hands: Criterion A against Criterion C", "group") != nullptr);
    CHECK(all_faults(page.ledger().items(), 1366, 768) == Faults{});
}

TEST_CASE("a show of hands: sides, no answer, one back, undone") {
    WeighPage page(fresh_set(3, 4));
    page.click(hands, "radio");
    CHECK(turn(page) == "Judge 1");
    SECTION("X turns the answer typed last; the next digit counts for the left one again") {
        page.key(ImGuiKey_5);
        page.key(ImGuiKey_X);
        page.key(ImGuiKey_3);
        CHECK(page.said("c0", "c1", "p0") == 0.2);
        CHECK(page.said("c0", "c1", "p1") == 3);
    }
    SECTION("X before the first digit turns the side for all") {
        page.key(ImGuiKey_X);
        CHECK(page.says("A digit counts for Criterion B"));
        page.key(ImGuiKey_5);
        page.key(ImGuiKey_4);
        CHECK(page.said("c0", "c1", "p0") == 0.2);
        CHECK(page.said("c0", "c1", "p1") == 0.25);
    }
    SECTION("0 gives no answer") {
        page.key(ImGuiKey_0);
        CHECK(turn(page) == "Judge 2");
        for (const ImGuiKey key : {ImGuiKey_2, ImGuiKey_A, ImGuiKey_3}) page.key(key);
        CHECK(turn(page).empty());
        CHECK(page.decision().judgments.size() == 2);
        CHECK(page.says("no answer"));
    }
    SECTION("Backspace goes one judge back, his next digit replaces the one before") {
        page.key(ImGuiKey_5);
        page.key(ImGuiKey_4);
        page.key(ImGuiKey_Backspace);
        CHECK(turn(page) == "Judge 2");
        page.key(ImGuiKey_8);
        CHECK(page.said("c0", "c1", "p1") == 8);
        CHECK(turn(page) == "Judge 3");
    }
    SECTION("undo takes one judge's answer back and gives him the turn") {
        page.key(ImGuiKey_5);
        page.key(ImGuiKey_4);
        page.key(ImGuiKey_Z, ImGuiMod_Ctrl);
        CHECK(page.said("c0", "c1", "p1") == 0);
        CHECK(page.said("c0", "c1", "p0") == 5);
        CHECK(turn(page) == "Judge 2");
    }
    SECTION("all of it works by touch") {
        page.click("5", "button");
        page.click("X other side", "button");
        page.click("3", "button");
        page.click("0 no answer", "button");
        page.click("Back", "button");
        CHECK(turn(page) == "Judge 3");
        page.click("2", "button");
        page.click("2", "button");
        CHECK(page.said("c0", "c1", "p0") == 0.2);
        CHECK(page.said("c0", "c1", "p2") == 2);
        page.click("Next pair", "button");
        CHECK(page.find("Show of hands: Criterion A against Criterion C", "group") != nullptr);
    }
}

TEST_CASE("in a show of hands on options, who abstains from one is not asked") {
    Decision d = fresh_set(2, 3);
    d.criteria.children[0].rate = RateBy::pairs;
    d.criteria.children[0].unit.clear();
    d.criteria.children[0].curve.reset();
    d.people[1].abstains = {"o2"};
    WeighPage page(d);
    page.click("Criterion A: options", "tab");
    page.click(hands, "radio");
    page.key(ImGuiKey_3);
    page.key(ImGuiKey_4);
    const Decision after = page.decision();
    REQUIRE(after.judgments.size() == 2);
    CHECK(after.judgments[0].by == "p0");
    CHECK(after.judgments[1].by == "p2");
}
