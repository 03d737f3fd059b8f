#include "shell/rooms/weigh_grid.hpp"

#include <catch_amalgamated.hpp>

#include "shell/rooms/weigh_answers.hpp"
#include "tests/shell/support/card_page.hpp"
#include "tests/shell/support/judged_set.hpp"

using namespace steelyard;
using namespace steelyard::testing;

namespace {

/// The grid of the set "goal" alone on a page.
class GridPage {
public:
    explicit GridPage(Decision decision, CardOptions options = {.width = 620, .height = 480})
        : page(
              std::move(decision),
              [this](Ui& ui, const RoomView& view, Actions& actions, Box box) {
                  if (!pasted.empty()) took = grid.paste(std::exchange(pasted, {}), view, actions, "goal");
                  const SetResult entry = own_entry(view, "goal");
                  if (chosen[0].empty()) chosen = {entry.items[0], entry.items[1]};
                  if (const auto pair = grid.draw(ui, view, actions, entry, chosen, box)) chosen = *pair;
              },
              options) {}

    std::string cell(const std::string& label) const { return page.item(label, "gridcell").value; }
    double said(const std::string& a, const std::string& b, const Id& by = {}) const {
        return said_ratio(page.decision(), "goal", by, a, b).value_or(0);
    }
    void paste(const std::string& text) {
        pasted = text;
        page.frame(4);
    }
    std::string focused() const {
        for (const auto& one : const_cast<CardPage&>(page).ui().ledger.items()) {
            if (one.focused) return one.label;
        }
        return {};
    }

    PairGrid grid;
    ItemPair chosen;
    std::string pasted;
    bool took = false;
    CardPage page;
};

const std::vector<std::string> three{"Throughput", "Floor space", "Noise"};

} // namespace

TEST_CASE("the grid is typed through by keys: one stop, arrows, a digit opens a cell, Enter goes on") {
    GridPage grid(judged_set(three));
    grid.page.click("Throughput against Floor space", "gridcell");
    CHECK(grid.grid.has_keyboard());
    grid.page.type("3");
    grid.page.key(ImGuiKey_Enter);
    CHECK(grid.focused() == "Throughput against Noise");
    grid.page.type("1/4");
    grid.page.key(ImGuiKey_Enter);
    CHECK(grid.focused() == "Floor space against Noise");
    grid.page.type("2,5");
    grid.page.key(ImGuiKey_Enter);
    CHECK(grid.said("c0", "c1") == 3);
    CHECK(grid.said("c0", "c2") == 0.25);
    CHECK(grid.said("c1", "c2") == 2.5);
    CHECK(grid.page.decision().judgments.size() == 3);
    CHECK(grid.cell("Noise against Throughput").starts_with("4"));
    // What was at stake is kept with the answer.
    CHECK(grid.page.decision().judgments[0].a_range == "0 to 10 kg");
    CHECK(grid.page.undo());
    CHECK(grid.said("c1", "c2") == 0);
}

TEST_CASE("below the diagonal the reciprocal is typed, and arrows pass over the diagonal") {
    GridPage grid(judged_set(three));
    grid.page.click("Throughput against Noise", "gridcell");
    grid.page.key(ImGuiKey_DownArrow);
    CHECK(grid.focused() == "Floor space against Noise");
    grid.page.key(ImGuiKey_LeftArrow);
    CHECK(grid.focused() == "Floor space against Throughput");
    grid.page.type("5");
    grid.page.key(ImGuiKey_Enter);
    CHECK(grid.said("c1", "c0") == 5);
    CHECK(grid.cell("Throughput against Floor space") == "1/5");
    CHECK(grid.chosen == ItemPair{"c0", "c2"});
    CHECK(grid.focused() == "Noise against Throughput");
    grid.page.key(ImGuiKey_End, ImGuiMod_Ctrl);
    CHECK(grid.focused() == "Noise against Floor space");
    grid.page.key(ImGuiKey_Home, ImGuiMod_Ctrl);
    CHECK(grid.focused() == "Throughput against Floor space");
}

TEST_CASE("Delete clears, F2 opens, Escape leaves as it was, and what is no ratio is refused in the cell") {
    GridPage grid(judged_set(three, {3, 2, 1}));
    grid.page.click("Throughput against Floor space", "gridcell");
    grid.page.key(ImGuiKey_Delete);
    CHECK(grid.said("c0", "c1") == 0);
    CHECK(grid.cell("Throughput against Floor space") == "open");
    grid.page.key(ImGuiKey_RightArrow);
    grid.page.key(ImGuiKey_F2);
    grid.page.type("7");
    grid.page.key(ImGuiKey_Escape);
    CHECK(grid.said("c0", "c2") == 2);
    grid.page.type("120");
    grid.page.key(ImGuiKey_Enter);
    CHECK(grid.page.message == "\"120\" is no ratio from 1/100 to 100; type 3, 2.5 or 1/3.");
    CHECK(grid.page.find("Throughput against Noise", "textbox") != nullptr);
    CHECK(grid.said("c0", "c2") == 2);
    grid.page.key(ImGuiKey_Escape);
    // The same again is no step.
    const auto before = grid.page.decision().judgments.size();
    grid.page.type("2");
    grid.page.key(ImGuiKey_Enter);
    CHECK(grid.page.decision().judgments.size() == before);
}

TEST_CASE("contradictions are marked by words and strength, circles and missing pairs too") {
    GridPage grid(contradicting_set());
    CHECK(grid.cell("Floor space against Noise") == "1/6, far off, in a circle");
    CHECK(grid.page.find("far off") != nullptr); // In the cell or in the legend.
    CHECK(grid.cell("Throughput against Ease of use") == "4, a little off");
    grid.page.click("Floor space against Noise", "gridcell");
    CHECK(grid.page.says("Noise counts 6 times as much as Floor space."));
    CHECK(grid.page.says("Far off: the other answers say Floor space counts"));
    grid.page.key(ImGuiKey_Delete);
    CHECK(grid.cell("Floor space against Noise") == "open");
    CHECK(grid.page.says("Floor space against Noise: not answered."));
}

TEST_CASE("an answer given while other ranges stood is marked so") {
    Decision d = judged_set(three, {3, 2, 1});
    d.judgments[1].a_range = "0 to 10 kg";
    d.judgments[1].b_range = "0 to 25 kg";
    GridPage grid(d);
    CHECK(grid.cell("Throughput against Floor space") == "3");
    CHECK(grid.cell("Throughput against Noise") == "2, judged on other ranges");
    grid.page.click("Throughput against Noise", "gridcell");
    CHECK(grid.page.says("Judged while other ranges stood: Noise 0 to 25 kg, now 0 to 10 kg."));
}

TEST_CASE("the group sees means, who said what, and what is agreed; means are not typed over") {
    Decision d = judged_set(three);
    add_judge(d, "A. Kern", {4, 2, 0});
    add_judge(d, "M. Tolle", {1, 2, 0});
    d.judgments.push_back(Judgment{.set = "goal", .a = "c1", .b = "c2", .ratio = 3});
    GridPage grid(d);
    CHECK(grid.cell("Throughput against Floor space").starts_with("2, mean of 2 answers"));
    CHECK(grid.cell("Floor space against Noise").starts_with("3, agreed"));
    grid.page.click("Throughput against Floor space", "gridcell");
    CHECK(grid.page.says("Mean of 2 answers: A. Kern 4 and M. Tolle 1."));
    grid.page.type("7");
    CHECK(grid.page.message ==
          "This is the mean of 2 answers. Choose who answers above, or agree on one answer on the arm.");
    grid.page.key(ImGuiKey_Delete);
    CHECK(grid.page.decision().judgments.size() == 5);
    // A judge types his own answers.
    grid.page.person = "p0";
    grid.page.frame(2);
    CHECK(grid.cell("Throughput against Floor space").starts_with("4, far off"));
    grid.page.type("6");
    grid.page.key(ImGuiKey_Enter);
    CHECK(grid.said("c0", "c1", "p0") == 6);
    CHECK(grid.cell("Floor space against Noise").starts_with("3, agreed"));
}

TEST_CASE("while all answer alone nobody sees what another said") {
    Decision d = judged_set(three);
    add_judge(d, "A. Kern", {4, 2, 1});
    add_judge(d, "M. Tolle", {1, 0, 0});
    GridPage grid(d);
    grid.page.answering = Answering::alone;
    grid.page.person = "p1";
    grid.page.frame(2);
    CHECK(grid.cell("Throughput against Floor space") == "1");
    CHECK(grid.cell("Throughput against Noise") == "open");
    CHECK_FALSE(grid.page.says("Kern"));
    grid.page.person = "";
    grid.page.frame(2);
    CHECK(grid.cell("Throughput against Floor space") == "open");
}

TEST_CASE("who abstains on an option is not asked about it") {
    Decision d = judged_set(three);
    Node leaf;
    leaf.id = "goal";
    leaf.name = "Ease of use";
    leaf.rate = RateBy::pairs;
    d.criteria = leaf;
    d.figures.clear();
    d.options.push_back(Option{.id = "cove", .name = "Cove"});
    d.people = {Person{.id = "p0", .name = "M. Tolle", .abstains = {"cove"}}};
    GridPage grid(d);
    grid.page.person = "p0";
    grid.page.frame(2);
    CHECK(grid.cell("Brook against Cove") == "takes no part");
    grid.page.click("Brook against Cove", "gridcell");
    grid.page.type("3");
    CHECK(grid.page.message == "M. Tolle takes no part where one of these is judged.");
    CHECK(grid.page.decision().judgments.empty());
}

TEST_CASE("the set is copied as a matrix, by Ctrl+C and by its button") {
    GridPage grid(judged_set(three, {3, 1.0 / 3, 0}));
    const std::string text =
        "\tThroughput\tFloor space\tNoise\nThroughput\t1\t3\t1/3\nFloor space\t1/3\t1\t\nNoise\t3\t\t1\n";
    grid.page.click("Throughput against Floor space", "gridcell");
    grid.page.key(ImGuiKey_C, ImGuiMod_Ctrl);
    grid.page.click("Copy");
    CHECK(grid.page.copied == std::vector<std::string>{text, text});
}

TEST_CASE("a pasted matrix says what it will do, waits for the word, and is one step") {
    GridPage grid(judged_set(three, {3, 2, 0}));
    grid.paste("Noise\tThroughput\tFloor space\n1\t1/2\t0,25\n2\t1\t7\n4\t1/7\t1\n");
    CHECK(grid.took);
    CHECK(grid.page.says("Enters 1 answer, replaces 1, clears none."));
    CHECK(grid.page.says("1 answer is as before."));
    CHECK(grid.said("c0", "c1") == 3);
    grid.page.click("Enter 2 answers", "button");
    CHECK(grid.said("c0", "c1") == 7);
    CHECK(grid.said("c0", "c2") == 2);
    CHECK(grid.said("c1", "c2") == 4);
    CHECK(grid.page.decision().log.back().did == "Pasted 2 answers into \"Fit to the cell\"");
    CHECK(grid.grid.has_keyboard());
    CHECK(grid.page.undo());
    CHECK(grid.said("c0", "c1") == 3);
    CHECK(grid.said("c1", "c2") == 0);
}

TEST_CASE("a refused paste names the cell and changes nothing") {
    GridPage grid(judged_set(three, {3, 2, 1}));
    const auto before = grid.page.decision();
    grid.paste("1\t3\t2\n0.5\t1\t1\n0.5\t1\t1");
    CHECK(grid.page.message ==
          "Nothing was changed. Row \"Throughput\", column \"Floor space\": 3 and, the other way "
          "round, 0.5 are not reciprocal.");
    CHECK(grid.page.says("Nothing was changed."));
    CHECK_FALSE(grid.page.item("Enter 0 answers", "button").enabled);
    CHECK(grid.page.decision() == before);
    grid.page.click("Cancel", "button");
    CHECK(grid.page.decision() == before);
    CHECK(grid.page.find("Throughput against Noise", "gridcell") != nullptr);
}

TEST_CASE("what a paste leaves blank is cleared only when that is asked for") {
    GridPage grid(judged_set(three, {3, 2, 5}));
    grid.paste("1\t3\t\n\t1\t6\n\t\t1");
    CHECK(grid.page.says("Enters none, replaces 1, clears none."));
    grid.page.click("Clear the 1 it leaves blank", "checkbox");
    CHECK(grid.page.says("Enters none, replaces 1, clears 1."));
    grid.page.click("Enter 1 answer", "button");
    CHECK(grid.said("c1", "c2") == 6);
    CHECK(grid.said("c0", "c2") == 0);
    CHECK(grid.page.undo());
    CHECK(grid.said("c0", "c2") == 2);
    CHECK(grid.said("c1", "c2") == 5);
}

TEST_CASE("by its button the matrix is put into a field, and is a judge's own") {
    Decision d = judged_set(three);
    add_judge(d, "A. Kern", {4, 0, 0});
    GridPage grid(d);
    grid.page.person = "p0";
    grid.page.frame(2);
    grid.page.click("Paste", "button");
    CHECK(grid.page.says("Paste a matrix of answers of A. Kern"));
    CHECK(grid.focused() == "Matrix as text");
    grid.page.type("1;2;3\n;1;4\n;;1");
    CHECK(grid.page.says("Enters 2 answers, replaces 1, clears none."));
    grid.page.click("Enter 3 answers", "button");
    CHECK(grid.said("c0", "c1", "p0") == 2);
    CHECK(grid.said("c1", "c2", "p0") == 4);
    CHECK(grid.page.decision().log.back().did == "Pasted 3 answers into \"Fit to the cell\" (A. Kern)");
}

TEST_CASE("rows of a spreadsheet pasted into the field keep their tabs, and Tab goes on") {
    GridPage grid(judged_set(three));
    grid.page.click("Paste", "button");
    ImGui::SetClipboardText("1\t2\t\n\t1\t4\n\t\t1");
    grid.page.key(ImGuiKey_V, ImGuiMod_Ctrl);
    CHECK(grid.page.says("Enters 2 answers, replaces none, clears none."));
    grid.page.key(ImGuiKey_Tab);
    CHECK(grid.focused() == "Enter 2 answers");
    grid.page.key(ImGuiKey_Space);
    CHECK(grid.said("c0", "c1") == 2);
    CHECK(grid.said("c1", "c2") == 4);
}

TEST_CASE("a decision that is only read is neither typed over nor pasted into") {
    GridPage grid(judged_set(three, {3, 2, 1}));
    grid.page.read_only = true;
    grid.page.frame(2);
    grid.page.click("Throughput against Floor space", "gridcell");
    grid.page.type("7");
    grid.page.key(ImGuiKey_Delete);
    grid.paste("1\t5\t5\n\t1\t5\n\t\t1");
    CHECK_FALSE(grid.took);
    CHECK(grid.said("c0", "c1") == 3);
    CHECK(grid.page.decision().judgments.size() == 3);
}
