#include <catch_amalgamated.hpp>

#include <string>
#include <vector>

#include "core/decision/lookup.hpp"
#include "core/decision/write.hpp"
#include "tests/shell/support/frame_page.hpp"
#include "tests/shell/support/ledger_checks.hpp"

using namespace steelyard;
using namespace steelyard::testing;

namespace {

std::vector<std::string> option_names(const Decision& decision) {
    std::vector<std::string> names;
    for (const auto& option : decision.options) names.push_back(option.name);
    return names;
}

std::vector<Id> children_of(const Decision& decision, const Id& id) {
    std::vector<Id> ids;
    for (const auto& child : find_node(decision.criteria, id)->children) ids.push_back(child.id);
    return ids;
}

using Ids = std::vector<Id>;

} // namespace

TEST_CASE("Frame: the question is written down, its notes in several lines") {
    FramePage page;
    page.fill("Title", "Washer for cell 8");
    page.fill("What is to be decided", "Which one?");
    page.fill("Decide by", "2027-03-01");
    page.fill("Author", "Planning");
    page.fill("Notes",
              "One line that is much too long to stand in the width of the card without a break.\nTwo");
    const Decision d = page.decision();
    CHECK(d.title == "Washer for cell 8");
    CHECK(d.question == "Which one?");
    CHECK(d.decide_by == "2027-03-01");
    CHECK(d.author == "Planning");
    CHECK(d.notes ==
          "One line that is much too long to stand in the width of the card without a break.\nTwo");
}

TEST_CASE("Frame: what is copied from a broken line has no breaks in it") {
    FramePage page;
    const std::string question = page.decision().question;
    page.click("What is to be decided", "textbox");
    page.key(ImGuiKey_A, ImGuiMod_Ctrl);
    page.key(ImGuiKey_C, ImGuiMod_Ctrl);
    REQUIRE_FALSE(page.platform().copied.empty());
    CHECK(page.platform().copied.back() == question);
    page.key(ImGuiKey_X, ImGuiMod_Ctrl);
    CHECK(page.platform().copied.back() == question);
    page.paste(question);
    page.key(ImGuiKey_Tab);
    CHECK(page.decision().question == question);
}

TEST_CASE("Frame: undo inside a broken text takes back what was typed") {
    FramePage page;
    const std::string question = page.decision().question;
    page.click("What is to be decided", "textbox");
    page.key(ImGuiKey_End, ImGuiMod_Ctrl);
    page.type(" now");
    for (int i = 0; i < 20; ++i) page.undo();
    CHECK(page.item("What is to be decided", "textbox").value == question);
}

TEST_CASE("Frame: an option is renamed in its place and gets a note") {
    FramePage page;
    page.fill("Name of option A", "Alder R4");
    page.click("More about option A", "button");
    page.fill("Note on option A", "Three tanks.");
    const Decision d = page.decision();
    CHECK(d.options[0].name == "Alder R4");
    CHECK(d.options[0].note == "Three tanks.");
    CHECK(page.find("Alder R4", "text") != nullptr); // In the standing beside the room.
}

TEST_CASE("Frame: a new option has the keyboard in its name at once") {
    FramePage page;
    page.click("Add option", "button");
    page.type("Elm");
    page.key(ImGuiKey_Enter);
    CHECK(option_names(page.decision()) == std::vector<std::string>{"Alder", "Brook", "Cove", "Dune", "Elm"});
    page.undo();
    page.undo();
    CHECK(page.decision().options.size() == 4);
}

TEST_CASE("Frame: options are moved, withdrawn and brought back") {
    FramePage page;
    page.click("More about option B", "button");
    page.click("Move option B down", "button");
    CHECK(option_names(page.decision()) == std::vector<std::string>{"Alder", "Cove", "Brook", "Dune"});
    page.click("Move option C up", "button");
    page.click("Withdraw option", "button");
    CHECK(page.decision().options[1].withdrawn);
    CHECK(page.find("withdrawn: takes no part", "text") != nullptr);
    page.click("Bring back option", "button");
    CHECK_FALSE(page.decision().options[1].withdrawn);
}

TEST_CASE("Frame: an option with entries goes only after a question") {
    FramePage page;
    page.click("More about option C", "button");
    page.click("Delete option", "button");
    CHECK(page.decision().options.size() == 4);
    page.click("Keep it as it is", "button");
    CHECK(page.decision().options.size() == 4);
    if (page.find("Delete option", "button") == nullptr) page.click("More about option C", "button");
    page.click("Delete option", "button");
    page.click("Go on", "button");
    CHECK(option_names(page.decision()) == std::vector<std::string>{"Alder", "Brook", "Dune"});
}

TEST_CASE("Frame: people have a name, a role, a share, an interest and options they stay out of") {
    FramePage page;
    page.click("Add person", "button");
    page.type("R. Anders");
    page.key(ImGuiKey_Enter);
    page.click("More about person 4", "button");
    page.fill("Role", "purchasing");
    page.fill("Share", "0,5");
    page.fill("Interest to declare", "Worked for Brook until 2020.");
    page.click("Brook", "checkbox");
    Decision d = page.decision();
    REQUIRE(d.people.size() == 4);
    CHECK(d.people[3].name == "R. Anders");
    CHECK(d.people[3].role == "purchasing");
    CHECK(d.people[3].share == 0.5);
    CHECK(d.people[3].interest == "Worked for Brook until 2020.");
    CHECK(d.people[3].abstains == Ids{"brook"});
    page.fill("Share", "-1");
    page.fill("Share", "many");
    CHECK(page.decision().people[3].share == 0.5);
    page.click("Brook", "checkbox");
    page.click("Delete person", "button");
    CHECK(page.decision().people.size() == 3);
}

TEST_CASE("Frame: the tree shows what each criterion counts") {
    FramePage page;
    CHECK(page.item("Whole-life cost", "treeitem").value == "30.0 %");
    CHECK(page.item("Best washer for cell 7", "treeitem").value == "100.0 %");
    page.click("Purchase price", "treeitem");
    CHECK(page.find("Counts 16.8 % of the whole, 56.0 % of Whole-life cost.", "text") != nullptr);
}

TEST_CASE("Frame: a criterion is added, named, described and rated otherwise") {
    FramePage page;
    page.click("Supplier", "treeitem");
    page.click("Add below it", "button");
    page.type("Training");
    page.key(ImGuiKey_Enter);
    page.fill("Note", "Of our own operators.");
    page.click("How the options are rated: Figures", "radio");
    page.fill("Unit", "days");
    const Decision d = page.decision();
    CHECK(children_of(d, "supplier") == Ids{"delivery", "service", "warranty", "new-criterion"});
    const Node& node = *find_node(d.criteria, "new-criterion");
    CHECK(node.name == "Training");
    CHECK(node.note == "Of our own operators.");
    CHECK(node.rate == RateBy::figure);
    CHECK(node.unit == "days");
    page.click("How the options are rated: Grades", "radio");
    CHECK(find_node(page.decision().criteria, "new-criterion")->grades.size() == 3);
}

TEST_CASE("Frame: a criterion with figures changes its kind only after a question") {
    FramePage page;
    page.click("Delivery", "treeitem");
    page.click("How the options are rated: In pairs", "radio");
    CHECK(find_node(page.decision().criteria, "delivery")->rate == RateBy::figure);
    page.click("Go on", "button");
    CHECK(find_node(page.decision().criteria, "delivery")->rate == RateBy::pairs);
}

TEST_CASE("Frame: a group is weighed by points or in pairs, and its judgments stay") {
    FramePage page;
    const auto judgments = page.decision().judgments;
    page.click("Fit to the cell", "treeitem");
    page.click("How its criteria are weighed: By points", "radio");
    CHECK(find_node(page.decision().criteria, "fit")->weights == WeightsBy::points);
    page.click("How its criteria are weighed: In pairs", "radio");
    const Decision d = page.decision();
    CHECK(find_node(d.criteria, "fit")->weights == WeightsBy::pairs);
    CHECK(d.judgments == judgments);
}

TEST_CASE("Frame: buttons move a criterion up, down, out of its group and under another") {
    FramePage page;
    page.click("Drying", "treeitem");
    page.click("Move criterion up", "button");
    CHECK(children_of(page.decision(), "clean") == Ids{"drying", "dirt"});
    page.click("Move criterion down", "button");
    CHECK(children_of(page.decision(), "clean") == Ids{"dirt", "drying"});
    page.click("Move criterion out of its group", "button");
    page.click("Go on", "button"); // The judgment of the two goes.
    CHECK(children_of(page.decision(), "goal") == Ids{"cost", "clean", "drying", "fit", "supplier"});
    page.click("Move criterion under the one above", "button");
    CHECK(children_of(page.decision(), "clean") == Ids{"dirt", "drying"});
    CHECK_FALSE(page.item("Move criterion down", "button").enabled);
}

TEST_CASE("Frame: the keyboard alone moves, adds, names and removes criteria") {
    FramePage page;
    page.click("Noise", "treeitem");
    page.key(ImGuiKey_UpArrow, ImGuiMod_Alt);
    page.key(ImGuiKey_UpArrow, ImGuiMod_Alt);
    CHECK(children_of(page.decision(), "fit") == Ids{"throughput", "noise", "floor", "ease", "height"});
    page.key(ImGuiKey_DownArrow, ImGuiMod_Alt);
    CHECK(children_of(page.decision(), "fit") == Ids{"throughput", "floor", "noise", "ease", "height"});
    page.key(ImGuiKey_Insert);
    page.type("Vibration");
    page.key(ImGuiKey_Enter);
    CHECK(children_of(page.decision(), "fit") ==
          Ids{"throughput", "floor", "noise", "new-criterion", "ease", "height"});

    page.key(ImGuiKey_RightArrow, ImGuiMod_Alt);
    page.click("Go on", "button"); // Noise had figures.
    CHECK(children_of(page.decision(), "noise") == Ids{"new-criterion"});
    page.click("Vibration", "treeitem");
    page.key(ImGuiKey_LeftArrow, ImGuiMod_Alt);
    CHECK(children_of(page.decision(), "noise").empty());
    page.key(ImGuiKey_F2);
    page.type("Shaking");
    page.key(ImGuiKey_Enter);
    CHECK(find_node(page.decision().criteria, "new-criterion")->name == "Shaking");
    page.click("Shaking", "treeitem");
    page.key(ImGuiKey_Delete);
    CHECK(find_node(page.decision().criteria, "new-criterion") == nullptr);
}

TEST_CASE("Frame: Delete in a text field takes a letter, not the criterion") {
    FramePage page;
    page.click("Noise", "treeitem");
    page.click("Name of the criterion", "textbox");
    page.key(ImGuiKey_Home);
    page.key(ImGuiKey_Delete);
    page.key(ImGuiKey_Enter);
    CHECK(find_node(page.decision().criteria, "noise")->name == "oise");
}

TEST_CASE("Frame: a criterion and all below it is deleted and comes back by undo") {
    FramePage page;
    const Decision before = page.decision();
    page.click("Fit to the cell", "treeitem");
    page.click("Delete criterion", "button");
    page.click("Go on", "button");
    CHECK(children_of(page.decision(), "goal") == Ids{"cost", "clean", "supplier"});
    page.undo();
    const Decision after = page.decision();
    CHECK(after.criteria == before.criteria);
    CHECK(after.figures == before.figures);
    CHECK(after.judgments == before.judgments);
}

TEST_CASE("Frame: an empty decision is set up from nothing") {
    FramePage page;
    page.click("Start empty", "button");
    page.click("Add criterion", "button");
    page.type("Cost");
    page.key(ImGuiKey_Enter);
    page.click("Add criterion", "button");
    page.type("Delivery");
    page.key(ImGuiKey_Enter);
    page.click("Add option", "button");
    page.type("Ash");
    page.key(ImGuiKey_Enter);
    const Decision d = page.decision();
    REQUIRE(d.criteria.children.size() == 2);
    CHECK(d.criteria.children[0].name == "Cost");
    CHECK(d.criteria.children[1].name == "Delivery");
    CHECK(option_names(d) == std::vector<std::string>{"Ash"});
}

TEST_CASE("Frame: what is opened is scrolled into sight, and the row stays under the pointer") {
    FramePage page(1366, 768);
    page.click("Warranty", "treeitem");
    const LedgerItem* remove = page.find("Delete criterion", "button");
    REQUIRE(remove != nullptr);
    CHECK(remove->at.y + remove->size.y <= remove->clip_max.y);

    FramePage tall(1366, 900);
    tall.click("Best washer for cell 7", "treeitem");
    tall.wheel(Headless::middle(tall.item("Cleaning result", "treeitem")), 3);
    const ImVec2 place = Headless::middle(tall.item("Fit to the cell", "treeitem"));
    tall.click("Fit to the cell", "treeitem");
    CHECK(Headless::middle(tall.item("Fit to the cell", "treeitem")).y == Catch::Approx(place.y).margin(1));
}
