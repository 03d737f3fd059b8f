#include <catch_amalgamated.hpp>

#include "tests/shell/support/ledger_checks.hpp"
#include "tests/shell/support/weigh_page.hpp"

using namespace steelyard;
using namespace steelyard::testing;

TEST_CASE("a judgment keeps the ranges that were at stake, and is marked once they are others") {
    Decision d = fresh_set(3, 1);
    WeighPage page(d);
    page.key(ImGuiKey_4);
    d = page.decision();
    REQUIRE(d.judgments.size() == 1);
    CHECK(d.judgments[0].a_range == "40,000 to 90,000 EUR");
    CHECK(d.judgments[0].b_range == "40,001 to 90,000 EUR");
    CHECK_FALSE(page.says("other ranges"));

    d.criteria.children[0].curve = Curve{LineCurve{80000, 45000}, {}};
    d.judgments[0].note = "as at the last buy";
    WeighPage later(d);
    CHECK(later.item("Goal", "tab").value == "other ranges");
    later.click("Criterion A against Criterion B", "gridcell");
    CHECK(later.says(
        "Judged while other ranges stood: Criterion A 40,000 to 90,000 EUR, now 45,000 to 80,000 EUR."));
    CHECK(all_faults(later.ledger().items(), 1366, 768) == Faults{});
    later.click("Still holds", "button");
    CHECK_FALSE(later.says("other ranges"));
    const Judgment again = later.decision().judgments.back();
    CHECK(again.ratio == 4);
    CHECK(again.a_range == "45,000 to 80,000 EUR");
    CHECK(again.b_range == "40,001 to 90,000 EUR");
    CHECK(again.note == "as at the last buy");
}

TEST_CASE("an old judgment that kept no ranges is not marked") {
    Decision d = fresh_set(3);
    d.judgments.push_back({.set = "goal", .a = "c0", .b = "c1", .ratio = 3});
    WeighPage page(d);
    CHECK_FALSE(page.says("other ranges"));
}

TEST_CASE("a remark is entered in place and stays with the pair") {
    WeighPage page(fresh_set(3));
    CHECK_FALSE(page.item("Remark", "button").enabled);
    page.key(ImGuiKey_4);
    page.click("Remark", "button");
    page.type("heard from the shop floor");
    page.key(ImGuiKey_Enter);
    CHECK(page.decision().judgments.back().note == "heard from the shop floor");
    CHECK(page.says("Remark: heard from the shop floor"));
    page.key(ImGuiKey_6);
    CHECK(page.decision().judgments.back().ratio == 6);
    CHECK(page.decision().judgments.back().note == "heard from the shop floor");
}

TEST_CASE("the item named as mattering most is asked about first") {
    WeighPage page(fresh_set(5));
    page.choose("Which matters most?", "Criterion D");
    for (const char* pair : {"Criterion A against Criterion D", "Criterion B against Criterion D",
                             "Criterion C against Criterion D", "Criterion D against Criterion E"}) {
        CHECK(page.find(pair, "slider") != nullptr);
        page.key(ImGuiKey_3);
        page.key(ImGuiKey_Enter);
    }
    CHECK(page.says("These answers give weights; "));
}

TEST_CASE("the room says how many answers are needed") {
    WeighPage page(fresh_set(4));
    CHECK(page.says("3 more answers give weights; 3 more would firm them up."));
    for (int i = 0; i < 2; ++i) {
        page.key(ImGuiKey_3);
        page.key(ImGuiKey_Enter);
    }
    CHECK(page.says("1 more answer gives weights; 3 more would firm them up."));
    page.key(ImGuiKey_2);
    CHECK(page.says("These answers give weights; 3 more would firm them up."));
}

TEST_CASE("S leaves a pair for later and enters nothing; skipped ones come round again") {
    WeighPage page(fresh_set(3));
    page.key(ImGuiKey_S);
    CHECK(page.find("Criterion A against Criterion B", "slider") == nullptr);
    for (int i = 0; i < 2; ++i) {
        page.key(ImGuiKey_2);
        page.key(ImGuiKey_Enter);
    }
    CHECK(page.find("Criterion A against Criterion B", "slider") != nullptr);
    CHECK(page.decision().judgments.size() == 2);
}

TEST_CASE("a set ended early says so, does not count as open, and can be opened again") {
    WeighPage page(fresh_set(4, 1));
    for (int i = 0; i < 4; ++i) {
        page.key(ImGuiKey_3);
        page.key(ImGuiKey_Enter);
    }
    page.click("That is all", "button");
    Decision d = page.decision();
    REQUIRE(d.finished.size() == 1);
    CHECK(d.finished[0].by.empty());
    CHECK(d.finished[0].skipped.size() == 2);
    CHECK(page.says("Ended with 2 of 6 pairs unanswered."));
    CHECK(page.says("4 of 6, ended"));
    CHECK(all_faults(page.ledger().items(), 1366, 768) == Faults{});
    page.click("Reopen", "button");
    CHECK(page.decision().finished.empty());
    CHECK(page.says("more would firm them up."));
}

TEST_CASE("a person ends a set for himself") {
    WeighPage page(fresh_set(3, 2));
    page.click("How answers are given: Each alone", "radio");
    page.click("Hand over to Judge 1", "button");
    page.click("I am Judge 1: begin", "button");
    page.key(ImGuiKey_3);
    page.key(ImGuiKey_Enter);
    page.click("Enough for me", "button");
    const Decision d = page.decision();
    REQUIRE(d.finished.size() == 1);
    CHECK(d.finished[0].by == "p0");
    CHECK(d.finished[0].skipped.size() == 2);
    page.click("Hand over", "button");
    CHECK(page.says("ended with 2 of 3 pairs unanswered"));
}
