#include <catch_amalgamated.hpp>

#include "core/decision/read.hpp"
#include "core/decision/write.hpp"
#include "core/results/solve.hpp"
#include "shell/rooms/weigh_model.hpp"
#include "tests/shell/support/headless.hpp"
#include "tests/shell/support/ledger_checks.hpp"

using namespace steelyard;
using namespace steelyard::testing;

namespace {

/// Criteria compared in pairs, nobody has answered yet.
std::string fresh(int items, int judges = 0) {
    Decision d;
    d.id = "fresh";
    d.title = "Fresh";
    d.options = {Option{.id = "o1", .name = "One"}, Option{.id = "o2", .name = "Two"}};
    d.criteria.id = "goal";
    d.criteria.name = "Goal";
    for (int i = 0; i < items; ++i) {
        Node leaf;
        leaf.id = "c" + std::to_string(i);
        leaf.name = "Criterion " + std::string(1, static_cast<char>('A' + i));
        leaf.rate = RateBy::figure;
        d.criteria.children.push_back(leaf);
    }
    for (int i = 0; i < judges; ++i) {
        d.people.push_back(Person{.id = "p" + std::to_string(i), .name = "Judge " + std::to_string(i + 1)});
    }
    return write_decision(d);
}

/// Opens a decision in the room Weigh.
void open(Headless& page, const std::string& text) {
    page.settle();
    page.app().open_text("fresh.decision.json", text);
    page.settle();
    page.click("Weigh", "tab");
    page.settle();
}

/// What the store holds last: the decision as a person would find it again.
Decision stored(Headless& page) {
    page.wait(1);
    page.settle();
    REQUIRE_FALSE(page.platform().kept.empty());
    for (const auto& kept : page.platform().kept) {
        if (kept.id == "fresh") return *read_decision(kept.text).decision;
    }
    FAIL("not stored");
    return {};
}

} // namespace

TEST_CASE("a set of six is judged by keys alone in at most sixty acts") {
    Headless page;
    open(page, fresh(6));
    int acts = 0;
    for (int pair = 0; pair < 15; ++pair) {
        page.key(static_cast<ImGuiKey>(ImGuiKey_1 + pair % 5));
        ++acts;
        if (pair % 3 == 0) {
            page.key(ImGuiKey_X);
            ++acts;
        }
        page.key(ImGuiKey_Enter);
        ++acts;
    }
    CHECK(acts <= 60);
    const Decision d = stored(page);
    const auto said = [&](const char* a, const char* b) {
        return said_ratio(d, "goal", "", a, b).value_or(0);
    };
    // A star around the first item, then what tells most.
    CHECK(said("c0", "c1") == 1);
    CHECK(said("c0", "c2") == 2);
    CHECK(said("c0", "c3") == 3);
    CHECK(said("c0", "c4") == 0.25);
    CHECK(said("c0", "c5") == 5);
    CHECK(d.judgments.size() == 15 + 4); // A digit and its X are two entries; the last one stands.
    CHECK(solve(d).sets.front().missing.empty());
}

TEST_CASE("arrows move the poise by a step, with Shift by a tenth, and the ratio is typed as a fraction") {
    Headless page;
    open(page, fresh(3));
    page.key(ImGuiKey_LeftArrow);
    page.key(ImGuiKey_LeftArrow);
    CHECK(page.item("Criterion A against Criterion B", "slider").value == "3");
    page.key(ImGuiKey_RightArrow, ImGuiMod_Shift);
    CHECK(page.item("Criterion A against Criterion B", "slider").value == "2.9");
    page.click("Ratio", "textbox");
    page.type("1/4");
    page.key(ImGuiKey_Enter);
    page.settle();
    CHECK(page.item("Criterion A against Criterion B", "slider").value == "1/4");
    CHECK(page.find("For Goal, Criterion B counts 4 times as much as Criterion A.") != nullptr);
}

TEST_CASE("the poise is dragged, settles at a notch, and one drag is one step to undo") {
    Headless page;
    open(page, fresh(3));
    const LedgerItem arm = page.item("Criterion A against Criterion B", "slider");
    const ImVec2 middle{arm.at.x + arm.size.x / 2, arm.at.y + arm.size.y * 0.4f};
    page.drag(middle, {middle.x + 148, middle.y}, 12);
    page.settle();
    const std::string value = page.item("Criterion A against Criterion B", "slider").value;
    CHECK(value.starts_with("1/"));
    CHECK(stored(page).judgments.size() == 1);
    page.key(ImGuiKey_Z, ImGuiMod_Ctrl);
    page.settle();
    CHECK(stored(page).judgments.empty());
}

TEST_CASE("a person's answers are his own, and what is agreed stands beside them") {
    Headless page;
    open(page, fresh(3, 2));
    page.key(ImGuiKey_3);
    page.click("Who answers", "combobox");
    page.settle();
    page.click("Judge 2", "option");
    page.settle();
    page.click("Answer in the open", "button");
    page.click("Criterion A against Criterion B", "gridcell");
    CHECK(page.find("Agreed in the room: Criterion A counts 3 times as much as Criterion B. That stands in "
                    "place of your answer.") != nullptr);
    page.type("5"); // Onto the cell.
    page.key(ImGuiKey_Enter);
    const Decision d = stored(page);
    CHECK(said_ratio(d, "goal", "", "c0", "c1") == 3);
    CHECK(said_ratio(d, "goal", "p1", "c0", "c1") == 5);
}

TEST_CASE("a contradiction is said in two sentences and leads to its pair") {
    Headless page;
    page.settle();
    page.click("Show them");
    page.settle();
    CHECK(page.find("Some answers contradict each other") != nullptr);
    page.click("Enlarge the card", "button");
    CHECK(page.find("Look at this pair", "button") != nullptr);
    page.click("Look at this pair", "button");
    page.settle();
    CHECK(page.find("Floor space against Noise", "slider") != nullptr);
    CHECK(page.item("Floor space against Noise", "gridcell").value == "1/6, far off");
}

TEST_CASE("points are typed and shown as shares") {
    Headless page;
    page.settle();
    page.click("Weigh", "tab");
    page.click("Whole-life cost", "tab");
    page.settle();
    page.click("Points for Purchase price", "textbox");
    page.type("75");
    page.key(ImGuiKey_Tab);
    page.type("25");
    page.key(ImGuiKey_Enter);
    page.settle();
    CHECK(page.find("75.0 %") != nullptr);
}

TEST_CASE("sets of many items, long names and a small page are drawn without faults") {
    for (const int items : {3, 6, 9, 15}) {
        std::string text = fresh(items);
        text.replace(text.find("Criterion B"), 11,
                     "A criterion whose name is a good deal longer than any room for it");
        for (const auto& [width, height] :
             {std::pair{1280, 720}, std::pair{640, 360}, std::pair{1920, 1080}}) {
            INFO(items << " items, " << width << " x " << height);
            Headless page({.width = width, .height = height});
            open(page, text);
            page.save_png(std::string(STEELYARD_SOURCE_DIR) + "/build/pictures/Weigh-" +
                          std::to_string(items) + "-items-" + std::to_string(width) + ".png");
            CHECK(all_faults(page.ledger().items(), static_cast<float>(width), static_cast<float>(height)) ==
                  Faults{});
        }
    }
}
