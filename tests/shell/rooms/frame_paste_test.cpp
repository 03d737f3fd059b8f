#include <catch_amalgamated.hpp>

#include <string>

#include "core/decision/lookup.hpp"
#include "core/decision/write.hpp"
#include "tests/shell/support/frame_page.hpp"
#include "tests/shell/support/ledger_checks.hpp"

using namespace steelyard;
using namespace steelyard::testing;

namespace {

const std::string list = "Environment 30\n\tPower: 60 %\n\tWater: 40 %\nTraining\t12,5";

/// What the log does not tell apart.
Decision without_log(Decision decision) {
    decision.log.clear();
    return decision;
}

Faults faults(const FramePage& page, int width, int height) {
    return all_faults(page.ledger().items(), static_cast<float>(width), static_cast<float>(height));
}

} // namespace

TEST_CASE("Frame: a pasted list shows what it would make and is added as one step") {
    FramePage page;
    const Decision before = page.decision();
    page.click("Ease of use", "treeitem");
    page.paste(list);
    CHECK(page.item("Added under", "combobox").value.ends_with("Ease of use"));
    CHECK(page.find("70.6 %", "text") != nullptr); // 30 of 42.5
    CHECK(page.find("60.0 %", "text") != nullptr);
    CHECK(without_log(page.decision()) == without_log(before));

    page.click("Add 4 criteria", "button");
    page.click("Keep it as it is", "button"); // The options were compared on it.
    CHECK(without_log(page.decision()) == without_log(before));
    page.click("Add 4 criteria", "button"); // The list is still there.
    page.click("Go on", "button");
    page.key(ImGuiKey_F2); // The keyboard is on the first of the list.
    CHECK(page.item("Name of the criterion", "textbox").value == "Environment");
    page.key(ImGuiKey_Escape);
    const Decision after = page.decision();
    const Node& ease = *find_node(after.criteria, "ease");
    CHECK(ease.weights == WeightsBy::points);
    REQUIRE(ease.children.size() == 2);
    CHECK(ease.children[0].name == "Environment");
    CHECK(ease.children[0].weights == WeightsBy::points);
    REQUIRE(ease.children[0].children.size() == 2);
    CHECK(ease.children[1].name == "Training");
    CHECK(page.find("Water", "treeitem") != nullptr);
    page.undo();
    CHECK(without_log(page.decision()) == without_log(before));
}

TEST_CASE("Frame: a list goes under the goal where nothing is chosen, and elsewhere by choice") {
    FramePage page;
    page.paste("Environment\nTraining");
    CHECK(page.item("Added under", "combobox").value == "Best washer for cell 7");
    page.choose("Added under", "   Cleaning result");
    page.click("Add 2 criteria", "button");
    const Decision d = page.decision();
    CHECK(find_parent(d.criteria, "training")->id == "clean");
}

TEST_CASE("Frame: a list is typed or pasted into its own field") {
    FramePage page;
    page.click("Paste a list", "button");
    page.type("Environment");
    page.key(ImGuiKey_Enter);
    page.paste("  Power\n  Water");
    CHECK(page.find("Water", "text") != nullptr);
    page.click("Add 3 criteria", "button");
    CHECK(find_parent(page.decision().criteria, "water")->id == "environment");
}

TEST_CASE("Frame: a list that cannot be read names its line and changes nothing") {
    FramePage page;
    const Decision before = page.decision();
    page.paste("Environment\n    Power\n  Water");
    bool named = false;
    for (const auto& item : page.ledger().items())
        named = named || item.label.starts_with("Line 3 is indented like no line");
    CHECK(named);
    CHECK_FALSE(page.item("Add", "button").enabled);
    page.click("Add", "button");
    page.key(ImGuiKey_Escape);
    CHECK(page.find("Added under", "combobox") == nullptr);
    CHECK(without_log(page.decision()) == without_log(before));
}

TEST_CASE("Frame: numbers stay in the names on request") {
    FramePage page;
    const auto points = page.decision().points;
    page.click("Ease of use", "treeitem");
    page.paste("Fits cell 7\nFits cell 8");
    page.click("Numbers at the end are weights", "checkbox");
    page.click("Add 2 criteria", "button");
    page.click("Go on", "button");
    const Decision d = page.decision();
    const Node& ease = *find_node(d.criteria, "ease");
    CHECK(ease.children.at(0).name == "Fits cell 7");
    CHECK(ease.weights == WeightsBy::pairs);
    CHECK(d.points == points);
}

TEST_CASE("Frame: cancelling a pasted list leaves everything as it was") {
    FramePage page;
    const Decision before = page.decision();
    page.paste(list);
    page.click("Cancel", "button");
    CHECK(page.find("Add criterion", "button") != nullptr);
    CHECK(without_log(page.decision()) == without_log(before));
}

TEST_CASE("Frame: nothing is cut, printed over or too small in any state and width") {
    struct Size {
        int width;
        int height;
    };
    const auto size =
        GENERATE(Size{1280, 720}, Size{1366, 768}, Size{1920, 1080}, Size{900, 600}, Size{640, 400});
    for (const int more : {0, 4000}) { // As it is, and so tall that everything is in sight.
        const int height = std::max(size.height, more);
        FramePage page(size.width, height);
        CAPTURE(size.width, height);
        CHECK(faults(page, size.width, height) == Faults{});
        if (more > 0) {
            for (const char* open :
                 {"More about option B", "More about person 2", "More about must 3", "Open the settings"})
                page.click(open, "button");
            for (const char* node :
                 {"Best washer for cell 7", "Fit to the cell", "Delivery", "Service", "Ease of use"}) {
                page.click(node, "treeitem");
                CAPTURE(node);
                CHECK(faults(page, size.width, height) == Faults{});
            }
        }
        page.paste(list);
        CHECK(faults(page, size.width, height) == Faults{});
    }
}

TEST_CASE("Frame: while another page writes, everything is shown and nothing can be edited") {
    Headless page({.width = 1366, .height = 2400, .prepare = [](FakePlatform& platform) {
                       platform.next_claims = {Claim::taken_elsewhere, Claim::taken_elsewhere};
                   }});
    page.click("Frame", "tab");
    page.click("Delivery", "treeitem");
    page.click("More about option A", "button");
    page.click("More about person 1", "button");
    page.click("More about must 1", "button");
    page.click("Open the settings", "button");
    CHECK(page.find("Alder", "text") != nullptr);
    for (const auto& item : page.ledger().items()) {
        if (item.room != "frame" || item.id.starts_with("room/")) continue;
        CAPTURE(item.label);
        CHECK(item.role != "textbox");
        CHECK(item.role != "radio");
    }
    for (const char* act :
         {"Add criterion", "Paste a list", "Add option", "Add person", "Add must", "Delete criterion"})
        CHECK_FALSE(page.item(act, "button").enabled);
    page.paste("Environment");
    CHECK(page.find("Added under", "combobox") == nullptr);
    CHECK(all_faults(page.ledger().items(), 1366, 2400) == Faults{});
}
