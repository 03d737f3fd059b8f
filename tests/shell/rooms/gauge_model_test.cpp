#include <catch_amalgamated.hpp>

#include "core/results/solve.hpp"
#include "shell/rooms/gauge_choice.hpp"
#include "shell/rooms/gauge_entries.hpp"
#include "shell/rooms/gauge_model.hpp"

using namespace steelyard;
using namespace steelyard::gauge;

namespace {

/// Two options; a figure leaf in a group, a leaf of grades and one of pairs beside it; one must of each kind.
Decision small() {
    Decision d;
    d.id = "d";
    d.options = {{.id = "o1", .name = "One"}, {.id = "o2", .name = "Two"}};
    d.people = {{.id = "p1", .name = "Ash"}, {.id = "p2", .name = "Elm", .abstains = {"o2"}}};
    Node price{.id = "price",
               .name = "Price",
               .rate = RateBy::figure,
               .unit = "EUR",
               .curve = Curve{LineCurve{90, 40}}};
    Node upkeep{.id = "upkeep", .name = "Upkeep", .children = {price}};
    Node cost{.id = "cost", .name = "Cost", .children = {upkeep}};
    Node look{.id = "look",
              .name = "Look",
              .rate = RateBy::grade,
              .grades = {{.id = "g1", .name = "fine", .worth = 1}, {.id = "g2", .name = "poor"}}};
    Node ease{.id = "ease", .name = "Ease"};
    d.criteria = {.id = "goal", .name = "Goal", .children = {cost, look, ease}};
    d.requirements = {{.id = "r1", .name = "Dear", .criterion = "price", .at_most = 80},
                      {.id = "r2", .name = "Loud", .unit = "dB(A)", .at_most = 78, .safety = true},
                      {.id = "r3", .name = "Guard", .yes_no = true},
                      {.id = "r4", .name = "Good", .node = "cost", .min_worth = 0.5}};
    return d;
}

struct Solved {
    Decision decision;
    Results results = solve(decision);
    Model model(const Id& person = {}) const { return make_model({decision, results, person}); }
};

const Row& row_of(const Model& model, const Id& id) {
    for (const auto& row : model.rows) {
        if (row.id == id) return row;
    }
    FAIL("no row " << id);
    return model.rows.front();
}

} // namespace

TEST_CASE("rows stand under the groups they belong to, the musts last") {
    const Solved solved{small()};
    std::vector<std::string> titles;
    for (const auto& row : solved.model().rows) titles.push_back(row.title);
    CHECK(titles == std::vector<std::string>{"Cost \xE2\x80\xBA Upkeep", "Price", "Criteria", "Look", "Ease",
                                             "Musts", "Dear", "Loud", "Guard", "Good"});
    const Model model = solved.model();
    CHECK(row_of(model, "price").detail.text == "EUR \xC2\xB7 none at 90, full at 40");
    CHECK(row_of(model, "look").detail == gauge::Words{"2 grades \xC2\xB7 worth open", Tone::open});
    CHECK(row_of(model, "ease").detail.text == "judged in pairs");
    CHECK(row_of(model, "r2").detail.text == "dB(A) \xC2\xB7 at most 78 \xC2\xB7 safety");
    CHECK(row_of(model, "r4").detail.text == "at least 0.50");
}

TEST_CASE("cells are open only where something is to be entered by an option that takes part") {
    Decision d = small();
    d.options[1].withdrawn = true;
    const Solved solved{d};
    const Model model = solved.model();
    CHECK(model.columns[0].out.empty());
    CHECK(model.columns[1].out == "withdrawn");
    for (const char* id : {"price", "look", "r2", "r3"}) {
        CHECK(row_of(model, id).cells[0].open);
        CHECK_FALSE(row_of(model, id).cells[1].open);
    }
    CHECK_FALSE(row_of(model, "r1").cells[0].open); // read from the price
    CHECK(row_of(model, "r1").cells[0].main == gauge::Words{"open", Tone::open});
}

TEST_CASE("a quote shows its round, its status and the change against the round before") {
    Decision d = small();
    d.figures = {
        {.criterion = "price", .option = "o1", .value = 64, .round = 1, .status = QuoteStatus::budget},
        {.criterion = "price", .option = "o1", .value = 62, .low = 60, .high = 66, .round = 2},
        {.criterion = "price",
         .option = "o1",
         .value = 62,
         .low = 60,
         .round = 2,
         .status = QuoteStatus::quoted}};
    const Model model = Solved{d}.model();
    const Cell& cell = row_of(model, "price").cells[0];
    CHECK(cell.main.text == "62");
    CHECK(cell.change == "\xE2\x88\x92"
                         "3.1 %"); // 62 / 64 = 0.96875
    CHECK(cell.range == "from 60");
    CHECK(cell.small.text == "round 2 \xC2\xB7 quoted");
    CHECK(row_of(model, "price").has_ranges);
}

TEST_CASE("a figure without rounds is compared with the one it took the place of") {
    Decision d = small();
    d.figures = {{.criterion = "price", .option = "o1", .value = 50},
                 {.criterion = "price", .option = "o1"}, // opened again
                 {.criterion = "price", .option = "o1", .value = 55}};
    const Model model = Solved{d}.model();
    CHECK(row_of(model, "price").cells[0].change == "+10.0 %");
    CHECK(change_text(0, 5).empty());
    CHECK(change_text(-50, -55) == "\xE2\x88\x92"
                                   "10.0 %");
    CHECK(change_text(100, 100.01) == "\xC2\xB1"
                                      "0.0 %");
}

TEST_CASE("grades that differ are all told until one is agreed, but not to a person who still answers") {
    Decision d = small();
    d.grades = {{.criterion = "look", .option = "o1", .grade = "g1", .by = "p1"},
                {.criterion = "look", .option = "o1", .grade = "g2", .by = "p2"}};
    Solved solved{d};
    CHECK(row_of(solved.model(), "look").cells[0].main.text == "fine / poor");
    CHECK(row_of(solved.model(), "look").cells[0].small.text == "Ash, Elm");
    CHECK(row_of(solved.model("p1"), "look").cells[0].main.text == "fine");
    CHECK(row_of(solved.model("p2"), "look").cells[1].small.text == "Elm abstains");
    CHECK_FALSE(row_of(solved.model("p2"), "look").cells[1].open);

    d.grades.push_back({.criterion = "look", .option = "o1", .grade = "g2"});
    const Solved agreed{d};
    CHECK(row_of(agreed.model("p1"), "look").cells[0].main.text == "poor");
    CHECK(row_of(agreed.model(), "look").cells[0].small.text == "agreed");
}

TEST_CASE("musts stand in words: failed ones exclude, a range over the limit is undecided, a waived one "
          "holds nobody") {
    Decision d = small();
    d.checks = {{.requirement = "r2", .option = "o1", .value = 81},
                {.requirement = "r2", .option = "o2", .low = 76, .high = 80}};
    {
        const Model model = Solved{d}.model();
        CHECK(row_of(model, "r2").cells[0].main == gauge::Words{"81", Tone::bad});
        CHECK(row_of(model, "r2").cells[0].small == gauge::Words{"failed \xC2\xB7 excluded", Tone::bad});
        CHECK(row_of(model, "r2").cells[1].small == gauge::Words{"undecided", Tone::open});
        CHECK(row_of(model, "r2").cells[1].range == "76 to 80");
        CHECK(model.columns[0].out == "excluded");
    }
    d.requirements[1].waived = Waiver{.why = "Cabin comes later."};
    const Model model = Solved{d}.model();
    CHECK(row_of(model, "r2").cells[0].small.text == "waived");
    CHECK(model.columns[0].out.empty());
}

TEST_CASE("curves are told in words") {
    CHECK(curve_words({ProportionalCurve{Better::less}}) == "less is better");
    CHECK(curve_words({LineCurve{90000, 40000}}) == "none at 90,000, full at 40,000");
    CHECK(curve_words({TargetCurve{900, 200}}) == "full at 900, none 200 away");
    CHECK(curve_words({PointsCurve{{{0.5, 1}, {1, 0.85}, {2, 0.1}}}}) == "full at 0.5, 0.10 at 2");
    CHECK(curve_words({PointsCurve{{{3, 0}}}}) == "none at 3");
}

TEST_CASE("a curve is turned into another kind by its two ends, or by the figures where it has none") {
    const std::vector<double> figures{10, 20, 40};
    const Curve line{LineCurve{90, 40}};
    CHECK(as_kind(CurveKind::points, line, {})->shape == Curve{PointsCurve{{{40, 1}, {90, 0}}}}.shape);
    CHECK(as_kind(CurveKind::target, line, {})->shape == Curve{TargetCurve{40, 50}}.shape);
    CHECK(as_kind(CurveKind::proportional, line, {})->shape == Curve{ProportionalCurve{Better::less}}.shape);
    const Curve less{ProportionalCurve{Better::less}};
    CHECK(as_kind(CurveKind::line, less, figures)->shape == Curve{LineCurve{40, 10}}.shape);
    CHECK_FALSE(as_kind(CurveKind::line, less, {10}));
    CHECK_FALSE(suggested_line({5}, Better::more));
    CHECK(suggested_line(figures, Better::more)->shape == Curve{LineCurve{10, 40}}.shape);
}

TEST_CASE("the choice goes over section heads and from the end of a row to the next") {
    const Model model = Solved{small()}.model();
    const Place price{1, 0};
    CHECK(moved(model, price, 0, 1) == Place{3, 0});
    CHECK(moved(model, price, 0, -1) == price);
    CHECK(moved(model, price, 9, 0) == Place{1, 1});
    CHECK(moved_on(model, {1, 1}, 1) == Place{3, 0});
    CHECK(moved_on(model, {3, 0}, -1) == Place{1, 1});
    CHECK(moved_on(model, price, -1) == price);
    const Place last{9, 1};
    CHECK(moved_on(model, last, 1) == last);
    CHECK(moved(model, price, 0, 100) == Place{9, 0});
}
