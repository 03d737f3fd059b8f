#include <catch_amalgamated.hpp>
#include <cmath>
#include <filesystem>
#include <stdexcept>
#include <string>

#include "core/decision/lookup.hpp"
#include "core/results/solve.hpp"
#include "shell/example.hpp"
#include "shell/words.hpp"
#include "tests/shell/support/headless.hpp"
#include "tests/shell/support/ledger_checks.hpp"
#include "tests/support/round_trip.hpp"

// The example in a window tall enough to see the whole room at once, unless a case is about scrolling.
namespace steelyard {
namespace {

using namespace testing;

constexpr int tall = 1500;

std::string pictures() {
    const std::string folder = std::string(STEELYARD_SOURCE_DIR) + "/build/pictures/standing";
    std::filesystem::create_directories(folder);
    return folder + "/";
}

/// The shell with the standing shown, of the example or of a file opened.
struct Standing : Headless {
    explicit Standing(HeadlessOptions options = {.height = tall}, const std::string& file = {})
        : Headless(std::move(options)) {
        if (!file.empty()) app().open_text("test.json", file);
        settle();
        Headless::click("Standing", "tab");
        settle();
    }

    void press(std::string_view label, std::string_view role = {}) {
        Headless::click(label, role);
        settle();
    }

    void choose(std::string_view list, std::string_view entry) {
        press(list, "combobox");
        press(entry, "option");
    }

    bool shows(std::string_view text) const { return find(text, "text") != nullptr; }
    std::string value_of(std::string_view label, std::string_view role = {}) const {
        return item(label, role).value;
    }

    /// Scrolls down; false at the end.
    bool scroll_down(const HeadlessOptions& size) {
        const float before = place_of_bars();
        wheel({static_cast<float>(size.width) / 2, static_cast<float>(size.height) / 2}, 2);
        settle();
        return place_of_bars() != before;
    }

    float place_of_bars() const {
        for (const auto& item : ledger().items()) {
            if (item.label == "What each criterion adds") return item.at.y;
        }
        throw std::runtime_error("the bars have no heading");
    }

    /// The room that is drawn.
    bool in_room(std::string_view name) const { return value_of(name, "tab") == "true"; }

    Faults faults(const HeadlessOptions& size) const {
        return all_faults(ledger().items(), static_cast<float>(size.width), static_cast<float>(size.height));
    }
};

/// Options named A, B, C … with the given worths in hundredths on the one criterion.
std::string one_criterion(const std::vector<int>& worths, const std::string& members = "") {
    std::string options;
    std::string figures;
    for (std::size_t i = 0; i < worths.size(); ++i) {
        const std::string id = "o" + std::to_string(i);
        const std::string comma = i == 0 ? "" : ", ";
        options += comma + R"({"id": ")" + id + R"(", "name": "Offer )" + std::to_string(i + 1) + R"("})";
        figures += comma + R"({"criterion": "goal", "option": ")" + id + R"(", "value": )" +
                   std::to_string(worths[i]) + "}";
    }
    return R"({"format": "steelyard-decision", "version": 1, "id": "0b3f6a54-9d21-4c1e-8f0a-1d2c3b4a5968",
        "options": [)" +
           options + R"(], "criteria": {"id": "goal", "name": "Power", "rate": "figure",
        "curve": {"kind": "line", "worst": 0, "best": 100}}, "figures": [)" +
           figures + "]" + members + "}";
}

/// Twelve options with long names on ten criteria in groups, every fifth figure missing.
std::string large() {
    std::string options;
    std::string groups;
    std::string figures;
    for (int o = 0; o < 12; ++o) {
        options += std::string(o == 0 ? "" : ", ") + R"({"id": "o)" + std::to_string(o) +
                   R"(", "name": "Offer of the company with the very long name number )" + std::to_string(o) +
                   R"("})";
    }
    for (int c = 0; c < 10; ++c) {
        const std::string id = "c" + std::to_string(c);
        groups += std::string(c == 0 ? "" : ", ") + R"({"id": "g)" + id +
                  R"(", "name": "Group of criteria number )" + id + R"(", "children": [{"id": ")" + id +
                  R"(", "name": "Criterion with a long name )" + id +
                  R"(", "rate": "figure", "curve": {"kind": "line", "worst": 0, "best": 100}}]})";
        for (int o = 0; o < 12; ++o) {
            if ((c + o) % 5 == 0) continue;
            figures += std::string(figures.empty() ? "" : ", ") + R"({"criterion": ")" + id +
                       R"(", "option": "o)" + std::to_string(o) + R"(", "value": )" +
                       std::to_string(10 + (c * 7 + o * 5) % 80) + "}";
        }
    }
    return R"({"format": "steelyard-decision", "version": 1, "id": "0b3f6a54-9d21-4c1e-8f0a-1d2c3b4a5968",
        "options": [)" +
           options + R"(], "criteria": {"id": "goal", "name": "Best", "children": [)" + groups +
           R"(]}, "figures": [)" + figures + "]}";
}

} // namespace

TEST_CASE("The standing says who is first, that this is provisional, and why") {
    const Standing page;
    CHECK(page.shows("Brook is first, 1.2 points of 100 ahead of Alder"));
    CHECK(page.shows("Provisional: this ranking rests on answers that are still missing."));
    CHECK(page.shows("Cove has no value on Residual dirt; the mean of the others stands in."));
    CHECK(page.shows("Cove: 41.5 to 68.7, depending on what is still open."));
    CHECK(page.shows("41.5 to 68.7"));
    CHECK(page.find("Ranks preferences on the figures given; certifies nothing. What must be met for safety "
                    "is decided by "
                    "licensed people under local codes.") != nullptr);
}

TEST_CASE("The bars show what the solver says, for every criterion and option") {
    const Standing page;
    const Decision example = test::read(example_decision());
    const Results results = solve(example);
    REQUIRE(results.options.size() == 3);
    for (std::size_t o = 0; o < results.options.size(); ++o) {
        CHECK(page.shows(points_text(results.scores[o])));
        CHECK(page.shows(points_text((*results.shares)[o]) + " %"));
        for (const auto& node : results.nodes) {
            if (node.parent != "goal") continue;
            const std::string label =
                option_name(example, results.options[o]) + ": " + node_name(example, node.node);
            CHECK(page.value_of(label, "img") == points_text(node.contribution[o]));
        }
    }
    // Longer where more is added, at one scale.
    const LedgerItem& brook = page.item("Brook: Cleaning result", "img");
    const LedgerItem& alder = page.item("Alder: Cleaning result", "img");
    CHECK(alder.size.x / brook.size.x == Catch::Approx(38.3 / 34.8).epsilon(0.02));
}

TEST_CASE("A criterion opens into its parts by its name or its bar, and closes again") {
    Standing page;
    page.press("Cleaning result", "button");
    CHECK(page.shows("What adds up to Cleaning result"));
    const Results results = solve(test::read(example_decision()));
    for (const auto& node : results.nodes) {
        if (node.node == "dirt")
            CHECK(page.value_of("Brook: Residual dirt", "img") == points_text(node.contribution[1]));
    }
    CHECK(page.find("Brook: Cleaning result", "img") == nullptr);
    CHECK(page.find("Residual dirt", "button") == nullptr); // A leaf has no parts.

    page.press("\xE2\x80\xB9 Back to all criteria", "link");
    CHECK(page.shows("What each criterion adds"));
    page.click_at(Headless::middle(page.item("Alder: Fit to the cell", "img")));
    page.settle();
    CHECK(page.shows("What adds up to Fit to the cell"));
    // It stays open over a visit elsewhere.
    page.press("Frame", "tab");
    page.press("Standing", "tab");
    CHECK(page.shows("What adds up to Fit to the cell"));
}

TEST_CASE("A press that ends elsewhere opens nothing") {
    Standing page;
    page.drag(Headless::middle(page.item("Brook: Cleaning result", "img")),
              Headless::middle(page.item("Alder: Fit to the cell", "img")));
    page.settle();
    CHECK(page.shows("What each criterion adds"));
}

TEST_CASE("One option is set against another, criterion by criterion") {
    Standing page;
    const Decision example = test::read(example_decision());
    const Results results = solve(example); // alder, brook, cove
    const auto check_all = [&](std::size_t x, std::size_t y) {
        double sum = 0;
        for (const auto& leaf : results.nodes) {
            if (!leaf.leaf) continue;
            const double difference = leaf.contribution[x] - leaf.contribution[y];
            sum += difference;
            if (std::abs(difference) < 0.0005) continue;
            const std::size_t winner = difference > 0 ? x : y;
            const LedgerItem& bar = page.item(node_name(example, leaf.node) + ": better for " +
                                              option_name(example, results.options[winner]));
            CHECK(bar.value == (difference > 0 ? "+" : "") + points_text(difference));
        }
        CHECK(sum == Catch::Approx(results.scores[x] - results.scores[y]).margin(1e-9));
    };
    CHECK(page.value_of("Option explained") == "Brook");
    CHECK(page.value_of("Option it is set against") == "Alder");
    CHECK(page.shows("before"));
    check_all(1, 0);
    CHECK(page.shows("Level on Drying."));
    CHECK(page.shows("All in all 1.2 points of 100 for Brook."));

    page.choose("Option it is set against", "Cove");
    check_all(1, 2);
    CHECK(page.shows("open")); // Residual dirt of Cove stands in.

    // The same option twice makes no pair: the two change places.
    page.choose("Option it is set against", "Brook");
    CHECK(page.value_of("Option explained") == "Cove");
    CHECK(page.value_of("Option it is set against") == "Brook");
    CHECK(page.shows("behind"));
    check_all(2, 1);
}

TEST_CASE("The pair can be seen by groups, with a sentence that sums it up") {
    Standing page({.width = 1920, .height = tall});
    page.press("Shown by: Groups", "radio");
    CHECK(page.value_of("Whole-life cost: better for Brook") == "+4.0");
    CHECK(page.value_of("Cleaning result: better for Alder") == "\xE2\x88\x92"
                                                                "3.5");
    CHECK(page.shows(
        "Brook is better on Whole-life cost and Supplier; Alder on Cleaning result and Fit to the cell."));
    CHECK(page.find("Purchase price: better for Brook") == nullptr);
}

TEST_CASE("What is open leads to the room where it is answered") {
    Standing page;
    CHECK(page.shows("Still open (4)"));
    page.press("Cove has no figure for Residual dirt yet.", "link");
    CHECK(page.in_room("Gauge"));
    page.press("Standing", "tab");
    page.press("Ease of use and Loading height are not compared yet, in Fit to the cell.", "link");
    CHECK(page.in_room("Weigh"));
}

TEST_CASE("Options not in play are named with the must they fail") {
    const Standing page;
    CHECK(page.shows("Not in play"));
    CHECK(page.find("Dune") != nullptr);
    CHECK(page.shows("a must is not met"));
    CHECK(page.find("Noise at the operator's place: 81 dB(A), at most 78 allowed.") != nullptr);
    CHECK(page.shows("Set for safety's sake: licensed people decide under local codes."));
}

TEST_CASE("A standing without doubt shows no cards about doubts") {
    const Standing page({.height = tall}, one_criterion({60, 40}));
    CHECK(page.shows("Offer 1 is first, 20.0 points of 100 ahead of Offer 2"));
    CHECK(page.shows("Every answer asked for is given."));
    CHECK(page.shows("Offer 1 is better on Power; Offer 2 on nothing."));
    for (const char* heading : {"Not in play", "Worth knowing", "Shown by: Groups",
                                "Provisional: this ranking rests on answers that are still missing."})
        CHECK(page.find(heading) == nullptr);
}

TEST_CASE("Equal options, a single one and none are said plainly") {
    {
        const Standing page({.height = tall}, one_criterion({50, 50}));
        CHECK(page.shows("Offer 1 and Offer 2 are level in first place"));
        CHECK(page.shows("level with"));
        CHECK(page.shows("Offer 1 and Offer 2 are level on everything."));
    }
    {
        const Standing page({.height = tall}, one_criterion({50}));
        CHECK(page.shows("Offer 1 is the only option in play"));
        CHECK(page.find("Option explained") == nullptr);
    }
    {
        Standing page({.height = tall}, one_criterion({}));
        CHECK(page.shows("There are no options yet"));
        CHECK(page.find("What each criterion adds") == nullptr);
        page.press("Go to Frame", "button");
        CHECK(page.in_room("Frame"));
    }
    {
        Standing page({.height = tall}, one_criterion({50}, R"(, "requirements": [
            {"id": "r", "name": "Power", "criterion": "goal", "at_least": 60}])"));
        CHECK(page.shows("No option is in play"));
        CHECK(page.shows("Power: 50, at least 60 needed."));
        page.press("Go to Gauge", "button");
        CHECK(page.in_room("Gauge"));
    }
}

TEST_CASE("Options of worth nothing are ranked without shares") {
    const Standing page({.height = tall}, one_criterion({0, 0}));
    CHECK(page.shows("Offer 1 and Offer 2 are level in first place"));
    CHECK(page.find("share") == nullptr);
    CHECK(page.shows("On \"Power\" every option is worth nothing."));
}

TEST_CASE("A large standing stays readable: the rest of what is open comes on demand") {
    Standing page({.width = 1366, .height = 8000}, large());
    CHECK(page.shows(
        "The scores of 12 options depend on what is still open; the thin lines below show how far."));
    CHECK(page.find("Still open (69)") != nullptr); // 45 pairs of groups, 24 figures.
    const auto links = [&] {
        std::size_t count = 0;
        for (const auto& item : page.ledger().items()) count += item.role == "link" ? 1 : 0;
        return count;
    };
    const std::size_t before = links();
    page.press("Show all 69", "link");
    CHECK(links() == before + 61);
    page.press("Show fewer", "link");
    CHECK(links() == before);
}

TEST_CASE("The standing is drawn without faults at every size, scrolled through, with long and many names") {
    for (const std::string& file : {std::string{}, large()}) {
        for (const HeadlessOptions& size : {HeadlessOptions{.width = 1280, .height = 720},
                                            HeadlessOptions{.width = 1366, .height = 768, .dark = true},
                                            HeadlessOptions{.width = 1920, .height = 1080},
                                            HeadlessOptions{.width = 640, .height = 360, .density = 2}}) {
            Standing page(size, file);
            const std::string name = "Standing-" + std::string(file.empty() ? "example-" : "large-") +
                                     std::to_string(size.width) + (size.dark ? "-dark-" : "-");
            // Down to the line at the end.
            int screen = 0;
            for (; screen < 60; ++screen) {
                INFO(name << screen);
                if (screen < 2) page.save_png(pictures() + name + std::to_string(screen) + ".png");
                CHECK(page.faults(size) == Faults{});
                if (!page.scroll_down(size)) break;
            }
            CHECK(screen > 0);
            CHECK(screen < 60);
        }
    }
}

} // namespace steelyard
