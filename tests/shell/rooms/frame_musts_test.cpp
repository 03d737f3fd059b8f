#include <catch_amalgamated.hpp>

#include <string>

#include "core/decision/write.hpp"
#include "tests/shell/support/frame_page.hpp"

using namespace steelyard;
using namespace steelyard::testing;

TEST_CASE("Frame: a must is added and given a limit of its own") {
    FramePage page;
    page.click("Add must", "button");
    page.type("Weight of the machine");
    page.key(ImGuiKey_Enter);
    page.choose("What the must looks at", "A value of its own");
    page.fill("At most", "4,500 kg");
    page.fill("At least", "1000");
    page.fill("Unit", "kg");
    page.click("For safety's sake", "checkbox");
    page.fill("Note on the must", "The floor carries no more.");
    const Requirement must = page.decision().requirements.back();
    CHECK(must.name == "Weight of the machine");
    CHECK_FALSE(must.yes_no);
    CHECK(must.at_most == 4500);
    CHECK(must.at_least == 1000);
    CHECK(must.unit == "kg");
    CHECK(must.safety);
    CHECK(must.note == "The floor carries no more.");
    page.fill("At least", "");
    CHECK_FALSE(page.decision().requirements.back().at_least.has_value());
    page.click("Less about must 6", "button");
    CHECK(page.find("at most 4,500 kg \xC2\xB7 safety", "text") != nullptr);
}

TEST_CASE("Frame: limits that cannot be are refused and stay as they were") {
    FramePage page;
    page.click("More about must 1", "button");
    page.fill("At least", "95000");
    CHECK(page.find("The lower limit is above the upper one; nothing was changed.", "text") != nullptr);
    page.fill("At most", "dear");
    const Requirement must = page.decision().requirements.front();
    CHECK(must.at_most == 90000);
    CHECK_FALSE(must.at_least.has_value());
    CHECK(page.item("At most", "textbox").value == "90,000");
}

TEST_CASE("Frame: a must looks at the figures or the worth of a criterion") {
    FramePage page;
    page.click("Add must", "button");
    page.key(ImGuiKey_Enter);
    page.choose("What the must looks at", "The figures of a criterion");
    page.choose("Criterion of the must", "Warranty");
    page.fill("At least", "24");
    Requirement must = page.decision().requirements.back();
    CHECK(must.criterion == "warranty");
    CHECK(must.at_least == 24);
    page.choose("What the must looks at", "The worth of a criterion");
    page.choose("Criterion of the must", "Cleaning result");
    page.fill("Worth of at least", "0.4");
    must = page.decision().requirements.back();
    CHECK(must.criterion.empty());
    CHECK(must.node == "clean");
    CHECK(must.min_worth == 0.4);
    CHECK_FALSE(must.at_least.has_value());
    page.fill("Worth of at least", "4");
    CHECK(page.decision().requirements.back().min_worth == 0.4);
}

TEST_CASE("Frame: musts are moved and deleted") {
    FramePage page;
    page.click("More about must 5", "button");
    page.click("Move must 5 up", "button");
    CHECK(page.decision().requirements[3].id == "agent");
    page.click("Delete must", "button");
    page.click("Go on", "button"); // Checks go with it.
    CHECK(page.decision().requirements.size() == 4);
}

TEST_CASE("Frame: a waived must says by whom and why") {
    FramePage page;
    Decision d = page.decision();
    d.requirements[3].waived = Waiver{"kern", "2026-12-01T09:00:00Z", "Guard is fitted on site."};
    page.app().open_text("waived.decision.json", write_decision(d));
    page.settle();
    CHECK(page.find("waived by A. Kern, 2026-12-01: Guard is fitted on site.", "text") != nullptr);
}

TEST_CASE("Frame: the card of the musts says who decides on safety") {
    FramePage page;
    bool said = false;
    for (const auto& item : page.ledger().items())
        said = said || item.label.find("licensed") != std::string::npos;
    CHECK(said);
}

TEST_CASE("Frame: settings are changed and say what they mean") {
    FramePage page;
    page.click("Open the settings", "button");
    page.click("Synthesis: Shared out", "radio");
    page.choose("Method", "Rows multiplied (geometric mean)");
    page.choose("Combine", "Each one's weights, multiplied");
    page.choose("Random index table", "Saaty, 1980");
    page.choose("Money criterion", "Running cost, 10 years");
    page.fill("Limit of the consistency ratio", "0.05");
    page.fill("Lead that is too close, in points", "1");
    Settings s = page.decision().settings;
    CHECK(s.synthesis == Synthesis::distributive);
    CHECK(s.method == Method::geometric_mean);
    CHECK(s.combine == Combine::priorities);
    CHECK(s.random_index == RandomIndexTable::saaty_1980);
    CHECK(s.money == "running");
    CHECK(s.limit == 0.05);
    CHECK(s.too_close == Catch::Approx(0.01));
    page.fill("Limit of the consistency ratio", "0");
    page.choose("Money criterion", "Not told in money");
    s = page.decision().settings;
    CHECK(s.limit == 0.05);
    CHECK(s.money.empty());
}
