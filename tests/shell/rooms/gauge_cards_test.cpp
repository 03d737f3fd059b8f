#include <catch_amalgamated.hpp>

#include "core/decision/lookup.hpp"
#include "shell/rooms/gauge_entries.hpp"
#include "tests/shell/support/gauge_page.hpp"

using namespace steelyard;
using namespace steelyard::testing;

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
    CHECK(std::get<LineCurve>(page.leaf("price").curve.value().shape) == LineCurve{100000, 55000});
    page.fill("Figure worth nothing of Purchase price", "55,000");
    CHECK(page.says("The two ends of a line must differ."));
    CHECK(std::get<LineCurve>(page.leaf("price").curve.value().shape) == LineCurve{100000, 55000});

    page.choose("Kind of curve of Purchase price", "points");
    CHECK(std::get<PointsCurve>(page.leaf("price").curve.value().shape).at ==
          std::vector<std::array<double, 2>>{{55000, 1}, {100000, 0}});
    page.click("Add a point", "button");
    page.fill("Worth of point 2 of Purchase price", "0.8");
    CHECK(std::get<PointsCurve>(page.leaf("price").curve.value().shape).at ==
          std::vector<std::array<double, 2>>{{55000, 1}, {77500, 0.8}, {100000, 0}});
    page.fill("Worth of point 2 of Purchase price", "2");
    CHECK(page.says("A worth lies between 0 and 1."));
    page.click("Remove point 2", "button");
    CHECK(std::get<PointsCurve>(page.leaf("price").curve.value().shape).at.size() == 2);

    page.choose("Kind of curve of Purchase price", "target");
    CHECK(std::get<TargetCurve>(page.leaf("price").curve.value().shape) == TargetCurve{55000, 45000});
    page.fill("Distance worth nothing of Purchase price", "0");
    CHECK(page.says("must be above 0"));
    page.choose("Kind of curve of Purchase price", "proportional");
    CHECK(std::get<ProportionalCurve>(page.leaf("price").curve.value().shape) ==
          ProportionalCurve{Better::less});
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
    CHECK(std::get<LineCurve>(page.leaf("price").curve.value().shape) == LineCurve{82900, 65200});
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
    REQUIRE(page.leaf("drying").grades.size() == 4);
    CHECK(page.leaf("drying").grades[3].name == "dry outside only");
    CHECK(page.leaf("drying").grades[3].worth == 0.4);
    CHECK(page.leaf("drying").grades[1].worth == 0.6);
    page.click("Remove grade dry outside only", "button");
    CHECK(page.leaf("drying").grades.size() == 3);
}

TEST_CASE("figures of a cost sheet show what they are made of and are not typed over") {
    GaugePage page;
    page.click("Running cost, 10 years of Cove", "gridcell");
    CHECK(page.says("3,400 CHF a year"));
    page.type("5");
    CHECK(page.find("Running cost, 10 years of Cove", "textbox") == nullptr);
}
