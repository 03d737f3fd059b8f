#include <algorithm>
#include <catch_amalgamated.hpp>
#include <filesystem>

#include "core/decision/lookup.hpp"
#include "core/decision/read.hpp"
#include "core/decision/write.hpp"
#include "core/results/solve.hpp"
#include "shell/rooms/gauge_entries.hpp"
#include "shell/rooms/gauge_model.hpp"
#include "tests/shell/support/headless.hpp"
#include "tests/shell/support/ledger_checks.hpp"
#include "tests/support/large_decision.hpp"

using namespace steelyard;
using namespace steelyard::testing;
using Catch::Matchers::ContainsSubstring;
using Catch::Matchers::StartsWith;

namespace {

/// The example in the room Gauge, on a page so tall that nothing has to be scrolled.
class GaugePage : public Headless {
public:
    explicit GaugePage(HeadlessOptions options = {.height = 2400}) : Headless(std::move(options)) {
        settle();
        click("Gauge", "tab");
        settle();
    }

    void open(const Decision& decision) {
        app().open_text("x.decision.json", write_decision(decision));
        settle();
        click("Gauge", "tab");
    }

    /// The decision as a file saved now would hold it.
    Decision decision() {
        key(ImGuiKey_S, ImGuiMod_Ctrl);
        return *read_decision(platform().saved_files.back().text).decision;
    }

    std::string cell(const std::string& label) { return item(label, "gridcell").value; }
    std::string focused() {
        for (const LedgerItem& one : ledger().items()) {
            if (one.focused) return one.label;
        }
        return {};
    }

    /// The figure that stands, in the file saved now.
    Figure figure(const Id& criterion, const Id& option) {
        const Decision d = decision();
        const Figure* found = gauge::standing_figure(d, criterion, option);
        return found != nullptr ? *found : Figure{};
    }
    /// The grade of a person, or the agreed one; empty if there is none.
    Id grade(const Id& criterion, const Id& option, const Id& by) {
        const Decision d = decision();
        const GradeEntry* found = gauge::standing_grade(d, criterion, option, by);
        return found != nullptr ? found->grade : Id{};
    }
    Curve curve(const Id& criterion) {
        const Decision d = decision();
        return find_node(d.criteria, criterion)->curve.value();
    }
    std::size_t entries() { return decision().figures.size(); }

    void choose(const std::string& list, const std::string& label) {
        click(list, "combobox");
        click(label, "option");
    }
    void fill(const std::string& field, const std::string& text) {
        click(field, "textbox");
        key(ImGuiKey_A, ImGuiMod_Ctrl);
        type(text);
        key(ImGuiKey_Enter);
    }
    bool says(const std::string& part) {
        for (const LedgerItem& one : ledger().items()) {
            if (one.visible && one.label.find(part) != std::string::npos) return true;
        }
        return false;
    }
};

/// The id of the cell that has the keyboard.
std::string chosen_cell(const Headless& page) {
    for (const LedgerItem& one : page.ledger().items()) {
        if (one.focused && one.role == "gridcell") return one.id;
    }
    return {};
}

std::string file_name(std::string id) {
    std::replace(id.begin(), id.end(), '/', '-');
    return id;
}

const Node& leaf(const Decision& decision, const Id& id) {
    return *find_node(decision.criteria, id);
}

} // namespace

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

TEST_CASE("a must with a value of its own is typed like a figure, its range in the card") {
    GaugePage page;
    Decision d = page.decision();
    d.requirements.push_back({.id = "weight", .name = "Floor load", .unit = "t", .at_most = 6});
    page.open(d);
    page.click("Floor load of Brook", "gridcell");
    CHECK(page.cell("Floor load of Brook") == "open");
    page.type("5.5 t");
    page.key(ImGuiKey_Enter);
    CHECK(page.cell("Floor load of Brook") == "5.5, met");
    page.click("Floor load of Brook", "gridcell");
    page.fill("High end of Floor load of Brook", "6.5");
    CHECK(page.cell("Floor load of Brook") == "5.5, up to 6.5, undecided");
    page.fill("Low end of Floor load of Brook", "6");
    CHECK(page.says("The low end cannot be above the value."));
    CHECK_FALSE(gauge::standing_check(page.decision(), "weight", "brook")->low);
}

TEST_CASE("the card holds everything about a quote, and putting it right keeps the quote") {
    GaugePage page;
    page.click("Purchase price of Brook", "gridcell");
    page.fill("Source of Purchase price of Brook", "offer BT-2216-3");
    page.fill("Round of Purchase price of Brook", "3");
    page.choose("Status of Purchase price of Brook", "spoken");
    page.fill("High end of Purchase price of Brook", "76,000");
    const Decision d = page.decision();
    const Figure* now = gauge::standing_figure(d, "price", "brook");
    CHECK(now->value == 73600);
    CHECK(now->low == 72500);
    CHECK(now->high == 76000);
    CHECK(now->round == 3);
    CHECK(now->status == QuoteStatus::spoken);
    CHECK(now->source == "offer BT-2216-3");
    // What was put right of round 3 is told once; rounds 2 and 1 were superseded.
    CHECK(gauge::superseded(d, "price", "brook").size() == 2);

    page.fill("Round of Purchase price of Brook", "2.5");
    CHECK(page.says("A round is a whole number from 1."));
    page.fill("Low end of Purchase price of Brook", "80,000");
    CHECK(page.says("The low end cannot be above the value."));
    CHECK(page.figure("price", "brook").low == 72500);
    // Another value outside the range is another quote: the range does not hold for it.
    page.fill("Value of Purchase price of Brook", "60000");
    CHECK_FALSE(page.figure("price", "brook").low);
}

TEST_CASE("curves are chosen and their anchors typed") {
    GaugePage page;
    page.click("Purchase price of Brook", "gridcell");
    page.fill("Figure worth nothing of Purchase price", "100,000");
    CHECK(std::get<LineCurve>(page.curve("price").shape) == LineCurve{100000, 55000});
    page.fill("Figure worth nothing of Purchase price", "55,000");
    CHECK(page.says("The two ends of a line must differ."));
    CHECK(std::get<LineCurve>(page.curve("price").shape) == LineCurve{100000, 55000});

    page.choose("Kind of curve of Purchase price", "points");
    CHECK(std::get<PointsCurve>(page.curve("price").shape).at ==
          std::vector<std::array<double, 2>>{{55000, 1}, {100000, 0}});
    page.click("Add a point", "button");
    page.fill("Worth of point 2 of Purchase price", "0.8");
    CHECK(std::get<PointsCurve>(page.curve("price").shape).at ==
          std::vector<std::array<double, 2>>{{55000, 1}, {77500, 0.8}, {100000, 0}});
    page.fill("Worth of point 2 of Purchase price", "2");
    CHECK(page.says("A worth lies between 0 and 1."));
    page.click("Remove point 2", "button");
    CHECK(std::get<PointsCurve>(page.curve("price").shape).at.size() == 2);

    page.choose("Kind of curve of Purchase price", "target");
    CHECK(std::get<TargetCurve>(page.curve("price").shape) == TargetCurve{55000, 45000});
    page.fill("Distance worth nothing of Purchase price", "0");
    CHECK(page.says("must be above 0"));
    page.choose("Kind of curve of Purchase price", "proportional");
    CHECK(std::get<ProportionalCurve>(page.curve("price").shape) == ProportionalCurve{Better::less});
    CHECK(page.item("Worth of Purchase price: less is better", "img").value.find("C at 65,200 is worth 1") !=
          std::string::npos);
}

TEST_CASE("a leaf without a curve offers a line from the worst to the best quote") {
    GaugePage page;
    Decision d = page.decision();
    find_node(d.criteria, "price")->curve.reset();
    page.open(d);
    page.click("Purchase price of Brook", "gridcell");
    CHECK(page.says("no curve yet"));
    CHECK(page.says("As long as no option has a worth"));
    page.click("Less is better", "button");
    CHECK(std::get<LineCurve>(page.curve("price").shape) == LineCurve{82900, 65200});
}

TEST_CASE("grades are added, named, given a worth and removed") {
    GaugePage page;
    page.click("Drying of Brook", "gridcell");
    page.click("Add a grade", "button");
    page.fill("Name of grade new grade", "dry outside only");
    page.fill("Worth of grade dry outside only", "0.4");
    page.fill("Worth of grade drops in some blind holes", "1.4");
    CHECK(page.says("The worth of a grade lies between 0 and 1."));
    Decision d = page.decision();
    REQUIRE(leaf(d, "drying").grades.size() == 4);
    CHECK(leaf(d, "drying").grades[3].name == "dry outside only");
    CHECK(leaf(d, "drying").grades[3].worth == 0.4);
    CHECK(leaf(d, "drying").grades[1].worth == 0.6);
    page.click("Remove grade dry outside only", "button");
    CHECK(leaf(page.decision(), "drying").grades.size() == 3);
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

TEST_CASE("figures of a cost sheet show what they are made of and are not typed over") {
    GaugePage page;
    page.click("Running cost, 10 years of Cove", "gridcell");
    CHECK(page.says("3,400 CHF a year"));
    page.type("5");
    CHECK(page.find("Running cost, 10 years of Cove", "textbox") == nullptr);
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

TEST_CASE("every kind of row is drawn whole, and leaves its picture") {
    const std::string folder = std::string(STEELYARD_SOURCE_DIR) + "/build/pictures";
    std::filesystem::create_directories(folder);
    struct Size {
        int width;
        int height;
    };
    for (const Size size : {Size{1280, 720}, Size{1366, 768}, Size{1920, 1080}, Size{640, 360}}) {
        for (const bool dark : {false, true}) {
            Headless page({.width = size.width, .height = size.height, .dark = dark});
            page.settle();
            page.click("Gauge", "tab");
            page.click("Purchase price of Alder", "gridcell");
            std::string before;
            for (std::string row = chosen_cell(page); row != before; row = chosen_cell(page)) {
                const std::string name = "Gauge-" + file_name(row) + "-" + std::to_string(size.width) + "x" +
                                         std::to_string(size.height) + (dark ? "-dark" : "-light");
                INFO(name);
                page.save_png(folder + "/" + name + ".png");
                CHECK(all_faults(page.ledger().items(), static_cast<float>(size.width),
                                 static_cast<float>(size.height)) == Faults{});
                before = row;
                page.key(ImGuiKey_DownArrow);
            }
            CHECK(before == "must/agent/alder");
        }
    }
}

TEST_CASE("a large decision is drawn whole and quickly found through by keys") {
    GaugePage page({.width = 1366, .height = 768});
    page.open(large_decision());
    CHECK(all_faults(page.ledger().items(), 1366, 768) == Faults{});
    const std::string first = page.focused();
    page.key(ImGuiKey_End, ImGuiMod_Ctrl);
    page.key(ImGuiKey_End);
    CHECK(page.focused() != first);
    CHECK(all_faults(page.ledger().items(), 1366, 768) == Faults{});
}
