#include "shell/rooms/outline.hpp"

#include <catch_amalgamated.hpp>

#include <string>

using namespace steelyard;

namespace {

/// The list as one text, so that a test can show it whole: depth as dots, name, weight in brackets.
std::string shown(const Outline& outline) {
    std::string text = outline.problem;
    for (const auto& item : outline.items) {
        text += (text.empty() ? "" : "\n") + std::string(item.depth, '.') + item.name;
        if (item.weight) {
            std::string weight = std::to_string(*item.weight);
            weight.erase(weight.find_last_not_of('0') + 1);
            if (weight.back() == '.') weight.pop_back();
            text += " [" + weight + (item.percent ? "%" : "") + "]";
        }
    }
    return text;
}

std::string shown(std::string_view text, LineEnds ends = LineEnds::weights) {
    return shown(read_outline(text, ends));
}

} // namespace

TEST_CASE("a list takes its depth from tabs or from spaces") {
    CHECK(shown("Cost\n\tPrice\n\tRunning cost\n\t\tEnergy\nDelivery") ==
          "Cost\n.Price\n.Running cost\n..Energy\nDelivery");
    CHECK(shown("Cost\n  Price\n  Running cost\n      Energy\nDelivery") ==
          "Cost\n.Price\n.Running cost\n..Energy\nDelivery");
    CHECK(shown("    Cost\n        Price\n    Delivery") == "Cost\n.Price\nDelivery");
    CHECK(shown("Cost\n\xC2\xA0\xC2\xA0Price\nDelivery") == "Cost\n.Price\nDelivery");
}

TEST_CASE("line ends of every system, empty lines and a byte order mark are no part of a list") {
    CHECK(shown("\xEF\xBB\xBF"
                "Cost\r\n\tPrice\r\n\r\n   \r\nDelivery\r\n") == "Cost\n.Price\nDelivery");
    CHECK(shown("Cost\rDelivery") == "Cost\nDelivery");
    CHECK(shown("").empty());
    CHECK(read_outline("\n \t\n").items.empty());
    CHECK(read_outline("\n\nCost").items.at(0).line == 3);
}

TEST_CASE("bullets and numbering are taken off") {
    CHECK(shown("- Cost\n  * Price\n  + Running cost\n\xE2\x80\xA2 Delivery") ==
          "Cost\n.Price\n.Running cost\nDelivery");
    CHECK(shown("\xE2\x80\xA2\tCost\n\to\tPrice") == "Cost\n.Price");
    CHECK(shown("1. Cost\n2) Delivery\n(3) Service") == "Cost\nDelivery\nService");
    CHECK(shown("a) Cost\nb) Delivery\n(c) Service\niv) Training") == "Cost\nDelivery\nService\nTraining");
}

TEST_CASE("what only looks like a bullet or a number stays in the name") {
    CHECK(shown("3 phase supply\n2.5 mm clearance") == "3 phase supply\n2.5 mm clearance");
    CHECK(shown("-20 start\ne.g. this") == "-20 start\ne.g. this");
    CHECK(shown("mix. of parts") == "mix. of parts");
}

TEST_CASE("numbering gives the depth where no line is indented") {
    CHECK(shown("1 Cost\n2 Delivery") == "1 Cost\n2 Delivery");
    CHECK(shown("1. Cost\n1.1 Price\n1.2 Running cost\n1.2.1 Energy\n2. Delivery") ==
          "Cost\n.Price\n.Running cost\n..Energy\nDelivery");
    CHECK(shown("2.1 Price 70\n2.2 Running cost 30") == "Price [70]\nRunning cost [30]");
    CHECK(shown("1. Cost\n   1. Price\n2. Delivery") == "Cost\n.Price\nDelivery");
}

TEST_CASE("a weight at the end of a line is read however it is written") {
    const auto* text =
        GENERATE("Price 40\nDelivery 60", "Price: 40\nDelivery: 60", "Price\t40\nDelivery\t60",
                 "Price\t\t40\nDelivery\t\t60\t", "Price (40)\nDelivery [60]", "Price = 40\nDelivery=60",
                 "Price - 40\nDelivery \xE2\x80\x93 60", "Price;40\nDelivery;60", "Price,40\nDelivery, 60",
                 "Price:\t40\nDelivery:\t60");
    CAPTURE(text);
    const Outline outline = read_outline(text);
    REQUIRE(outline.problem.empty());
    REQUIRE(outline.items.size() == 2);
    CHECK(outline.items[0].weight == 40);
    CHECK(outline.items[1].weight == 60);
    CHECK(outline.items[1].name == "Delivery");
    CHECK(outline.has_numbers);
}

TEST_CASE("percents and decimals with a point or a comma are read") {
    CHECK(shown("Price: 40 %\nDelivery 60%\nService\xC2\xA0(2,5\xC2\xA0%)") ==
          "Price [40%]\nDelivery [60%]\nService [2.5%]");
    CHECK(shown("Price 0,4\nDelivery 0.6") == "Price [0.4]\nDelivery [0.6]");
    CHECK(shown("Price\t12,5\nDelivery\t87.5") == "Price [12.5]\nDelivery [87.5]");
}

TEST_CASE("a cell that a spreadsheet quoted is read as it was") {
    CHECK(shown("\"Price, \"\"delivered\"\"\"\t40\nDelivery\t60") ==
          "Price, \"delivered\" [40]\nDelivery [60]");
}

TEST_CASE("each group has weights of its own") {
    CHECK(shown("Cost 60\n\tPrice 70\n\tRunning cost 30\nDelivery 40") ==
          "Cost [60]\n.Price [70]\n.Running cost [30]\nDelivery [40]");
    CHECK(shown("Cost\n\tPrice 70\n\tRunning cost 30\nDelivery") ==
          "Cost\n.Price [70]\n.Running cost [30]\nDelivery");
}

TEST_CASE("a number at the end of a name is no weight where the others have none") {
    CHECK(shown("Price\nMeets ISO 9001\nFits cell 7") == "Price\nMeets ISO 9001\nFits cell 7");
    CHECK(read_outline("Price\nMeets ISO 9001").notes.empty());
    CHECK(shown("Spindle T480\nRatio 1:40") == "Spindle T480\nRatio 1:40");
    CHECK(shown("Starts at -20\nStarts at -30") == "Starts at -20\nStarts at -30");
    CHECK(shown("Offer of 12.5.2026") == "Offer of 12.5.2026");
}

TEST_CASE("numbers stay in the names where the person says so") {
    const std::string text = "Cell 7\nCell 8\n\tHall: 40\n\tYard\t60";
    CHECK(shown(text) == "Cell [7]\nCell [8]\n.Hall [40]\n.Yard [60]");
    CHECK(shown(text, LineEnds::names) == "Cell 7\nCell 8\n.Hall: 40\n.Yard 60");
    CHECK(read_outline(text, LineEnds::names).has_numbers);
    CHECK_FALSE(read_outline("Price\nDelivery").has_numbers);
}

TEST_CASE("weights that only some of a group have are left out, and it is said") {
    const Outline outline = read_outline("Price: 40\nDelivery\nService: 10");
    CHECK(shown(outline) == "Price\nDelivery\nService");
    REQUIRE(outline.notes.size() == 1);
    CHECK(outline.notes[0].find("Delivery") != std::string::npos);
    CHECK(outline.notes[0].find("line 2") != std::string::npos);
}

TEST_CASE("a first line that heads columns is passed over") {
    const Outline outline = read_outline("Criterion\tWeight in %\nPrice\t40\nDelivery\t60");
    CHECK(shown(outline) == "Price [40]\nDelivery [60]");
    REQUIRE(outline.notes.size() == 1);
    CHECK(outline.notes[0].find("Line 1") != std::string::npos);
}

TEST_CASE("what cannot be read is refused with its line and gives nothing") {
    struct Bad {
        const char* text;
        const char* says;
    };
    const auto bad =
        GENERATE(Bad{"Cost\n    Price\n  Running cost", "Line 3 is indented like no line above"},
                 Bad{"    Cost\nDelivery", "Line 2 is indented less than the first line"},
                 Bad{"Cost\n\tPrice\n    Running cost", "Line 3 mixes tabs and spaces"},
                 Bad{"Cost\n\n40", "Line 3 has no name"}, Bad{"Cost\n- ", "Line 2 has no name"},
                 Bad{"Price: 40\nDelivery: -5", "Line 2 has a weight below 0"},
                 Bad{"Price\t40\nDelivery\t\xE2\x88\x92"
                     "5",
                     "Line 2 has a weight below 0"},
                 Bad{"Cost\n\tPrice: 0\n\tEnergy: 0", "Line 2 begins a group whose weights add up to 0"},
                 Bad{"Price 40 %\nDelivery 0.6", "Line 2 has a weight of 1 or less without %"});
    CAPTURE(bad.text);
    const Outline outline = read_outline(bad.text);
    CHECK(outline.items.empty());
    CHECK(outline.problem.starts_with(bad.says));
}

TEST_CASE("the longest name and the longest list are read, one more is refused") {
    CHECK(read_outline("Price\n" + std::string(200, 'x')).problem.empty());
    CHECK(read_outline("Price\n" + std::string(201, 'x')).problem.starts_with("Line 2 is longer than 200"));
    std::string umlauts;
    for (int i = 0; i < 200; ++i) umlauts += "\xC3\xBC";
    CHECK(read_outline(umlauts).problem.empty());

    std::string lines;
    for (int i = 0; i < 1000; ++i) lines += "Price\n";
    CHECK(read_outline(lines).items.size() == 1000);
    CHECK(read_outline(lines + "Delivery").problem.starts_with("Line 1001 "));
}

TEST_CASE("each item knows the one it stands under") {
    const auto items = read_outline("Cost\n\tPrice\n\t\tFreight\n\tEnergy\nDelivery\n\tBy sea").items;
    CHECK(outline_parents(items) == std::vector<std::size_t>{6, 0, 1, 0, 6, 4});
    CHECK(outline_parents({}).empty());
}
