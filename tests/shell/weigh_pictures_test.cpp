#include <catch_amalgamated.hpp>
#include <filesystem>

#include "tests/shell/support/ledger_checks.hpp"
#include "tests/shell/support/weigh_page.hpp"

using namespace steelyard;
using namespace steelyard::testing;

namespace {

struct Size {
    int width;
    int height;
};
constexpr Size sizes[] = {{1280, 720}, {1366, 768}, {1920, 1080}, {640, 360}};

/// Leaves a picture of the page and looks for faults in it.
void look(const Headless& page, const std::string& name, const HeadlessOptions& options) {
    const std::string folder = std::string(STEELYARD_SOURCE_DIR) + "/build/pictures";
    std::filesystem::create_directories(folder);
    const std::string whole = "arm-" + name + "-" + std::to_string(options.width) + "x" +
                              std::to_string(options.height) + (options.dark ? "-dark" : "-light");
    page.save_png(folder + "/" + whole + ".png");
    INFO(whole);
    CHECK(all_faults(page.ledger().items(), static_cast<float>(options.width),
                     static_cast<float>(options.height)) == Faults{});
}

/// Calls `each` with every size, light, and one dark.
template<class Each>
void every_look(Each each) {
    for (const Size size : sizes) each(HeadlessOptions{.width = size.width, .height = size.height});
    each(HeadlessOptions{.width = 1366, .height = 768, .dark = true});
}

} // namespace

TEST_CASE("the arm: fresh, judged, far to a side, held off, with a remark") {
    every_look([](const HeadlessOptions& options) {
        Decision d = fresh_set(6);
        d.criteria.children[1].name = "Noise at the operator's place";
        WeighPage page(d, options);
        look(page, "fresh", options);
        page.key(ImGuiKey_3);
        look(page, "judged", options);
        page.key(ImGuiKey_9);
        page.key(ImGuiKey_X);
        look(page, "far-side", options);
        const LedgerItem& poise = page.item("Poise");
        const ImVec2 at = Headless::middle(poise);
        page.drag_halfway(at, {at.x - 60, at.y - 150});
        look(page, "held-off", options);
    });
}
