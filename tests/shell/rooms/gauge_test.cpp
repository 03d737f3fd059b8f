#include <catch_amalgamated.hpp>

#include <algorithm>

#include "core/results/solve.hpp"
#include "shell/rooms/gauge_entries.hpp"
#include "shell/rooms/gauge_model.hpp"
#include "tests/shell/support/gauge_page.hpp"

using namespace steelyard;
using namespace steelyard::testing;
using Catch::Matchers::ContainsSubstring;
using Catch::Matchers::StartsWith;

TEST_CASE("a number typed onto a cell is a new quote, and the one before stays as its history") {
    GaugePage page;
    page.click("Purchase price of Alder", "gridcell");
    page.type("79,500");
    CHECK(page.item("Purchase price of Alder", "textbox").value == "79,500");
    page.key(ImGuiKey_Enter);
    CHECK(page.focused() == "Running cost, 10 years of Alder");

    const Decision d = page.decision();
    const Figure* now = gauge::standing_figure(d, "price", "alder");
    CHECK(now->value == 79500);
    CHECK(now->round == 2);
    CHECK_FALSE(now->low);
    CHECK(now->source.empty());
    const auto before = gauge::superseded(d, "price", "alder");
    REQUIRE(before.size() == 2);
    CHECK(before[0]->value == 82900);
    CHECK(before[1]->value == 86900);
    // Against the quote of the round before: 79,500 / 86,900 = 0.9148.
    CHECK(page.cell("Purchase price of Alder") == "79,500, \xE2\x88\x92"
                                                  "8.5 %, round 2");
    page.click("Purchase price of Alder", "gridcell");
    CHECK(page.says("82,900 (superseded)"));
}

TEST_CASE("cells are filled by keys like those of a spreadsheet") {
    GaugePage page;
    page.click("Purchase price of Alder", "gridcell");

    SECTION("Tab and Shift+Tab finish and go along the row") {
        page.type("80000");
        page.key(ImGuiKey_Tab);
        CHECK(page.focused() == "Purchase price of Brook");
        page.type("70000 EUR");
        page.key(ImGuiKey_Tab, ImGuiMod_Shift);
        CHECK(page.focused() == "Purchase price of Alder");
        const Decision d = page.decision();
        CHECK(gauge::standing_figure(d, "price", "alder")->value == 80000);
        CHECK(gauge::standing_figure(d, "price", "brook")->value == 70000);
    }
    SECTION("Shift+Enter goes up, and from the first row nowhere") {
        page.type("80000");
        page.key(ImGuiKey_Enter, ImGuiMod_Shift);
        CHECK(page.focused() == "Purchase price of Alder");
    }
    SECTION("F2 opens what is there, with the caret at its end") {
        page.key(ImGuiKey_F2);
        page.key(ImGuiKey_Backspace);
        page.type("5");
        page.key(ImGuiKey_Enter);
        CHECK(page.figure("price", "alder").value == 82905);
    }
    SECTION("a second press opens it with all of it chosen, to be typed over") {
        page.click("Purchase price of Alder", "gridcell");
        page.type("81000");
        page.key(ImGuiKey_Enter);
        CHECK(page.figure("price", "alder").value == 81000);
    }
    SECTION("Escape keeps what was there") {
        const std::size_t entries = page.entries();
        page.type("1");
        page.key(ImGuiKey_Escape);
        CHECK(page.focused() == "Purchase price of Alder");
        CHECK(page.entries() == entries);
    }
    SECTION("finishing without a change enters nothing") {
        const std::size_t entries = page.entries();
        page.key(ImGuiKey_F2);
        page.key(ImGuiKey_Enter);
        CHECK(page.entries() == entries);
    }
    SECTION("Delete opens the cell again, and the standing says that it is provisional") {
        page.key(ImGuiKey_Delete);
        CHECK(page.cell("Purchase price of Alder") == "open");
        CHECK_FALSE(page.figure("price", "alder").value);
    }
    SECTION("pressing elsewhere finishes too") {
        page.type("80000");
        page.click("Purchase price of Cove", "gridcell");
        CHECK(page.figure("price", "alder").value == 80000);
        CHECK(page.focused() == "Purchase price of Cove");
    }
    SECTION("arrows go over the heads of groups and stop at the edges") {
        page.key(ImGuiKey_LeftArrow);
        page.key(ImGuiKey_UpArrow);
        CHECK(page.focused() == "Purchase price of Alder");
        page.key(ImGuiKey_DownArrow);
        page.key(ImGuiKey_DownArrow);
        CHECK(page.focused() == "Residual dirt of Alder");
        page.key(ImGuiKey_End);
        CHECK(page.focused() == "Residual dirt of Dune");
        page.key(ImGuiKey_End, ImGuiMod_Ctrl);
        CHECK(page.focused() == "Runs with a cleaning agent on our list of approved chemicals of Dune");
        page.key(ImGuiKey_Home);
        CHECK(page.focused() == "Runs with a cleaning agent on our list of approved chemicals of Alder");
        page.key(ImGuiKey_PageUp);
        page.key(ImGuiKey_Home, ImGuiMod_Ctrl);
        CHECK(page.focused() == "Purchase price of Alder");
    }
    SECTION("a sign that arrives as a key and as text counts once") {
        page.key(ImGuiKey_7);
        page.type("7");
        page.type("7500");
        page.key(ImGuiKey_Enter);
        CHECK(page.figure("price", "alder").value == 77500);
    }
    SECTION("a sign that arrives as a key only counts too") {
        page.key(ImGuiKey_7);
        CHECK(page.item("Purchase price of Alder", "textbox").value == "7");
    }
    SECTION("a single value is pasted onto the chosen cell, and copied from it") {
        page.paste("79.900,50\n");
        CHECK(page.figure("price", "alder").value == 79900.5);
        page.key(ImGuiKey_C, ImGuiMod_Ctrl);
        CHECK(page.platform().copied.back() == "79,900.5");
    }
}

TEST_CASE("what is no number is refused in words and can be put right") {
    GaugePage page;
    page.click("Purchase price of Alder", "gridcell");
    page.type("ask again");
    page.key(ImGuiKey_Enter);
    CHECK(page.says("is not a number"));
    CHECK(page.item("Purchase price of Alder", "textbox").value == "ask again");
    CHECK(page.figure("price", "alder").value == 82900);
    page.key(ImGuiKey_A, ImGuiMod_Ctrl);
    page.type("81,000");
    page.key(ImGuiKey_Enter);
    CHECK(page.figure("price", "alder").value == 81000);
}

TEST_CASE("a figure typed changes the ranking to what the solver says of the saved file") {
    GaugePage page;
    page.click("Residual dirt of Cove", "gridcell");
    CHECK(page.says("counts as 0."));
    page.type("0.9");
    page.key(ImGuiKey_Enter);
    const Decision d = page.decision();
    const Results results = solve(d);
    CHECK_FALSE(results.provisional);
    page.click("Residual dirt of Cove", "gridcell");
    const auto dirt = std::find_if(results.leaves.begin(), results.leaves.end(),
                                   [](const LeafResult& one) { return one.leaf == "dirt"; });
    const auto cove =
        std::find(results.options.begin(), results.options.end(), "cove") - results.options.begin();
    CHECK(page.says("worth " + gauge::worth_text(dirt->local[static_cast<std::size_t>(cove)])));
}

TEST_CASE("grades are picked from the list or by their number, agreed or by who answers") {
    GaugePage page;
    page.click("Drying of Cove", "gridcell");
    SECTION("from the list by keys") {
        page.key(ImGuiKey_Enter);
        page.key(ImGuiKey_DownArrow);
        page.key(ImGuiKey_Enter);
        CHECK(page.cell("Drying of Cove") == "drops in some blind holes, agreed");
        CHECK(page.focused() == "Drying of Cove");
        CHECK(page.grade("drying", "cove", "") == "drops");
    }
    SECTION("by number, and taken back by Delete") {
        page.type("3");
        CHECK(page.grade("drying", "cove", "") == "damp");
        page.key(ImGuiKey_Delete);
        CHECK(page.grade("drying", "cove", "").empty());
        CHECK(page.cell("Drying of Cove") == "drops in some blind holes, A. Kern");
    }
    SECTION("a number beyond the last grade changes nothing") {
        page.type("4");
        CHECK(page.cell("Drying of Cove") == "drops in some blind holes, A. Kern");
    }
    SECTION("by the person who answers, who does not see what the others said") {
        page.choose("Who answers", "J. Wirth (maintenance)");
        page.click("I am J. Wirth: begin");
        CHECK_THAT(page.cell("Drying of Cove"), StartsWith("open"));
        page.click("Drying of Cove", "gridcell");
        page.type("1");
        CHECK(page.grade("drying", "cove", "wirth") == "dry");
        CHECK(page.cell("Drying of Cove") == "dry, blind holes too, J. Wirth");
        CHECK_FALSE(page.says("drops in some blind holes, A. Kern"));
    }
    SECTION("its reason is typed beside it") {
        page.type("2");
        page.fill("Reason of Drying of Cove", "Seen at the trial.");
        const Decision d = page.decision();
        CHECK(gauge::standing_grade(d, "drying", "cove", "")->note == "Seen at the trial.");
        CHECK(gauge::standing_grade(d, "drying", "cove", "")->grade == "drops");
    }
}

TEST_CASE("musts say in words how each option stands") {
    GaugePage page;
    CHECK(page.cell("Noise at the operator's place of Dune") == "81, failed \xC2\xB7 excluded");
    CHECK_THAT(page.cell("Noise at the operator's place of Alder"), ContainsSubstring("met"));
    CHECK_THAT(page.cell("Guard interlock of the loading door accepted of Cove"), StartsWith("asked"));

    page.click("Guard interlock of the loading door accepted of Cove", "gridcell");
    page.key(ImGuiKey_Enter);
    page.click("failed", "option");
    CHECK_THAT(page.cell("Guard interlock of the loading door accepted of Cove"),
               StartsWith("failed \xC2\xB7 excluded"));
    CHECK(solve(page.decision()).excluded.size() == 2);
}

TEST_CASE("criteria judged in pairs and weighed grades lead to Weigh") {
    GaugePage page;
    page.click("Ease of use of Brook", "gridcell");
    page.key(ImGuiKey_Enter);
    CHECK(page.item("Weigh", "tab").value == "true");
    page.click("Gauge", "tab");
    page.click("Service of Brook", "gridcell");
    page.click("Weigh the grades in Weigh", "link");
    CHECK(page.item("Weigh", "tab").value == "true");
}

TEST_CASE("where another page writes, cells can be looked at only") {
    GaugePage page({.height = 2400, .prepare = [](FakePlatform& platform) {
                        platform.next_claims.assign(20, Claim::taken_elsewhere);
                    }});
    if (!page.says("reading only")) page.settle();
    CHECK(page.says("Open for reading only"));
    page.click("Purchase price of Alder", "gridcell");
    page.type("5");
    page.key(ImGuiKey_Delete);
    CHECK(page.find("Purchase price of Alder", "textbox") == nullptr);
    CHECK_THAT(page.cell("Purchase price of Alder"), StartsWith("82,900"));
}

TEST_CASE("without options or criteria the room says what is missing") {
    GaugePage page;
    Decision d;
    d.id = "empty";
    d.criteria.id = "goal";
    page.open(d);
    CHECK(page.says("There are no options yet"));
    d.options = {Option{.id = "o1", .name = "One"}};
    page.open(d);
    CHECK(page.says("There is no criterion yet"));
    page.click("Add criteria in Frame", "link");
    CHECK(page.item("Frame", "tab").value == "true");
}
