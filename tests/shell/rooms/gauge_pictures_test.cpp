#include <algorithm>
#include <array>
#include <catch_amalgamated.hpp>
#include <filesystem>

#include "tests/shell/support/gauge_page.hpp"
#include "tests/shell/support/ledger_checks.hpp"
#include "tests/support/large_decision.hpp"

using namespace steelyard;
using namespace steelyard::testing;

namespace {

/// One row of each kind.
constexpr std::array kinds{"cell/price/alder",   "cell/running/alder",     "cell/dirt/alder",
                           "cell/drying/alder",  "cell/ease/alder",        "cell/height/alder",
                           "cell/service/alder", "must/noise-limit/alder", "must/interlock/alder"};

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

} // namespace

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
                if (std::find(kinds.begin(), kinds.end(), row) != kinds.end())
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
