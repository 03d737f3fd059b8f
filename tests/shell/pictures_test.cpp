#include <catch_amalgamated.hpp>
#include <filesystem>

#include "tests/shell/support/headless.hpp"
#include "tests/shell/support/ledger_checks.hpp"

using namespace steelyard;
using namespace steelyard::testing;

namespace {

struct Size {
    int width;
    int height;
};

} // namespace

TEST_CASE("every room is drawn whole in every size and theme, and leaves its picture") {
    const std::string folder = std::string(STEELYARD_SOURCE_DIR) + "/build/pictures";
    std::filesystem::create_directories(folder);
    for (const Size size : {Size{1280, 720}, Size{1366, 768}, Size{1920, 1080}}) {
        for (const bool dark : {false, true}) {
            Headless page({.width = size.width, .height = size.height, .dark = dark});
            page.settle();
            for (const char* room : {"Frame", "Weigh", "Gauge", "Standing", "Tipping", "Record"}) {
                page.click(room, "tab");
                page.settle();
                const std::string name = std::string(room) + "-" + std::to_string(size.width) + "x" +
                                         std::to_string(size.height) + (dark ? "-dark" : "-light");
                page.save_png(folder + "/" + name + ".png");
                INFO(name);
                CHECK(all_faults(page.ledger().items(), static_cast<float>(size.width),
                                 static_cast<float>(size.height)) == Faults{});
            }
        }
    }
}
