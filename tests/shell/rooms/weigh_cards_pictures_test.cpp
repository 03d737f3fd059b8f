#include <catch_amalgamated.hpp>
#include <filesystem>

#include "core/decision/write.hpp"
#include "shell/rooms/weigh_answers.hpp"
#include "shell/rooms/weigh_hold.hpp"
#include "shell/rooms/weigh_points.hpp"
#include "tests/shell/support/card_page.hpp"
#include "tests/shell/support/headless.hpp"
#include "tests/shell/support/judged_set.hpp"
#include "tests/shell/support/ledger_checks.hpp"

using namespace steelyard;
using namespace steelyard::testing;

namespace {

struct Size {
    int width;
    int height;
};

/// `count` names, some of them long.
std::vector<std::string> names(std::size_t count, bool with_long = false) {
    std::vector<std::string> all{"Purchase price",  "Running cost",  "Residual dirt",   "Drying",
                                 "Noise",           "Floor space",   "Ease of use",     "Loading height",
                                 "Service",         "Delivery time", "Energy per part", "Spare parts",
                                 "Training effort", "Warranty",      "References"};
    if (with_long) {
        all[1] = "A criterion whose name is a good deal longer than any room for it";
        all[2] = "Donaudampfschifffahrtselektrizitaetenhauptbetriebswerk";
    }
    all.resize(count);
    return all;
}

/// Answers that mostly agree with falling weights; every seventh is turned round.
std::vector<double> answers(std::size_t count, std::size_t who) {
    std::vector<double> upper;
    for (std::size_t i = 0; i < count; ++i) {
        for (std::size_t j = i + 1; j < count; ++j) {
            const double ratio = 1 + static_cast<double>((j - i) * (2 + who % 3) % 9);
            const std::size_t at = upper.size() + who;
            upper.push_back(at % 11 == 10 ? 0 : at % 7 == 5 ? 1 / ratio : ratio);
        }
    }
    return upper;
}

Decision judged(std::size_t count, int judges, bool with_long = false) {
    Decision d = judged_set(names(count, with_long), judges == 0 ? answers(count, 0) : std::vector<double>{});
    static const char* const people[] = {"A. Kern",    "M. Tolle",  "J. Wirth", "E. Brandt",
                                         "P. Hollweg", "S. Ritter", "K. Amsel", "L. von der Heide"};
    for (int k = 0; k < judges; ++k) add_judge(d, people[k % 8], answers(count, static_cast<std::size_t>(k)));
    return d;
}

void look(Headless& page, const std::string& name, Size size, bool dark = false) {
    const std::string folder = std::string(STEELYARD_SOURCE_DIR) + "/build/pictures";
    std::filesystem::create_directories(folder);
    const std::string whole = "cards-" + name + "-" + std::to_string(size.width) + (dark ? "-dark" : "");
    page.save_png(folder + "/" + whole + ".png");
    INFO(whole);
    CHECK(all_faults(page.ledger().items(), static_cast<float>(size.width),
                     static_cast<float>(size.height)) == Faults{});
}

void open(Headless& page, const Decision& decision) {
    page.app().open_text("x.decision.json", write_decision(decision));
    page.settle();
    page.click("Weigh", "tab");
    page.settle();
}

} // namespace

TEST_CASE("sets of 3, 6, 9 and 15 items, of one and of eight judges, leave their pictures") {
    for (const std::size_t count : {3, 6, 9, 15}) {
        for (const int judges : {0, 8}) {
            for (const Size size : {Size{1366, 768}, Size{640, 360}}) {
                Headless page({.width = size.width, .height = size.height});
                open(page, judged(count, judges, count == 6 || count == 15));
                const std::string name =
                    std::to_string(count) + "-items-" + (judges == 0 ? "agreed" : "eight-judges");
                look(page, name, size);
                if (size.width < 700) continue;
                page.click("Enlarge the grid", "button");
                look(page, name + "-large", size);
                page.click("Shrink the grid", "button");
                look(page, name + "-small-again", size);
                page.click("Enlarge the card", "button");
                look(page, name + "-hold", size);
            }
        }
    }
}

TEST_CASE("the grid in the dark, on a large page, and a matrix on its way in") {
    for (const bool dark : {false, true}) {
        const Size size{1920, 1080};
        Headless page({.width = size.width, .height = size.height, .dark = dark});
        open(page, judged(6, 0));
        look(page, "grid", size, dark);
        page.paste("1\t3\t5\n1/3\t1\t1\n1/5\t1\t1");
        look(page, "paste-refused", size, dark);
        page.click("Cancel", "button");
        page.paste(
            "1\t3\t5\t\t\t\n\t1\t1\t2\t3\t0,33\n\t\t1\t\t\t4\n\t\t\t1\t1\t1\n\t\t\t\t1\t1\n\t\t\t\t\t1");
        look(page, "paste", size, dark);
    }
}

TEST_CASE("what can be corrected, in a narrow card and in a wide one, to the end of what it says") {
    for (const bool dark : {false, true}) {
        for (const int width : {300, 560}) {
            HoldCard hold;
            CardPage page(contradicting_set(),
                          [&](Ui& ui, const RoomView& view, Actions& actions, Box box) {
                              hold.draw(ui, view, actions, own_entry(view, "goal"), box);
                          },
                          {.width = width, .height = width == 300 ? 2500 : 1900, .dark = dark});
            const std::string folder = std::string(STEELYARD_SOURCE_DIR) + "/build/pictures";
            const auto picture = [&](const std::string& name) {
                page.save_png(folder + "/hold-" + name + "-" + std::to_string(width) + (dark ? "-dark" : "") +
                              ".png");
                INFO(name << " " << width);
                CHECK(page.faults() == std::vector<std::string>{});
            };
            picture("waiting");
            Examination found;
            found.set = "goal";
            found.finished = true;
            PairCorrection worst{.a = "c1", .b = "c3", .given = 1.0 / 6, .implied = 2};
            worst.choices = {{1, .12, {"brook", 3.1}}, {2, .03, {"alder", 0.4}}, {3, .05, {"brook", 0.2}}};
            found.pairs = {worst, {.a = "c0", .b = "c2", .given = 4, .implied = 1.5}};
            found.fewest = FewestCorrections{
                false, {{"c1", "c3", "", 1.0 / 6, 2}, {"c0", "c2", "", 4, 3}}, .02, {"brook", 2.8}};
            found.matters_worst = MattersAnswer{.matters = Matters::proven_no, .pairs = {{"c1", "c3"}}};
            found.matters_fewest = MattersAnswer{.matters = Matters::found_yes,
                                                 .answers = {{"c1", "c3", 9}, {"c0", "c2", 5}},
                                                 .first_then = "alder"};
            page.examination = found;
            page.frame(3);
            page.click("Floor space 2 times Noise", "radio");
            page.click("By the other methods too", "button");
            page.click("Change these settings", "button");
            picture("corrections");
        }
    }
}

TEST_CASE("points shared out over few items and many, narrow and wide") {
    const std::string folder = std::string(STEELYARD_SOURCE_DIR) + "/build/pictures";
    for (const bool dark : {false, true}) {
        for (const std::size_t count : {3, 15}) {
            for (const int width : {440, 760}) {
                Decision d = judged_set(names(count, true));
                d.criteria.weights = WeightsBy::points;
                d.people = {Person{.id = "p0", .name = "A. Kern"}, Person{.id = "p1", .name = "M. Tolle"}};
                for (const auto& person : d.people) {
                    PointsEntry entry{.set = "goal", .by = person.id, .note = "as in the last tender"};
                    for (std::size_t i = 0; i < count; ++i)
                        entry.points.emplace_back("c" + std::to_string(i), (i * 7 + person.id.back()) % 9);
                    d.points.push_back(entry);
                }
                PointsCard card;
                CardPage page(d,
                              [&](Ui& ui, const RoomView& view, Actions& actions, Box box) {
                                  card.draw(ui, view, actions, own_entry(view, "goal"), box);
                              },
                              {.width = width, .height = 820, .dark = dark});
                for (const char* person : {"", "p0"}) {
                    page.person = person;
                    page.frame(3);
                    const std::string name = "points-" + std::to_string(count) + "-" + std::to_string(width) +
                                             (*person == 0 ? "-room" : "-person") + (dark ? "-dark" : "");
                    page.save_png(folder + "/" + name + ".png");
                    INFO(name);
                    CHECK(page.faults() == std::vector<std::string>{});
                }
            }
        }
    }
}
