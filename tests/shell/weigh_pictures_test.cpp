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

namespace {

constexpr const char* people[] = {"R. Voss",  "T. Lindqvist", "M. Ito",    "A. Kern",
                                  "J. Wirth", "P. Okonkwo",   "S. Farkas", "Maria-Theresia von Altenburg"};

/// Eight judges with their answers to the first pair of three criteria.
Decision eight_judges(const std::vector<double>& ratios) {
    Decision d = fresh_set(3, static_cast<int>(ratios.size()));
    d.criteria.children[0].name = "Noise at the operator's place";
    d.criteria.children[1].name = "Floor space";
    d.criteria.children[2].name = "Throughput";
    for (std::size_t i = 0; i < ratios.size(); ++i) {
        d.people[i].name = people[i];
        d.judgments.push_back(
            {.set = "goal", .by = d.people[i].id, .a = "c0", .b = "c1", .ratio = ratios[i]});
        d.judgments.push_back({.set = "goal", .by = d.people[i].id, .a = "c1", .b = "c2", .ratio = 2});
    }
    return d;
}

} // namespace

TEST_CASE("everybody's answers: eight judges apart, on one side, all at one place") {
    const std::pair<const char*, std::vector<double>> cases[] = {
        {"apart", {5, 1.0 / 3, 3, 5, 1, 1.0 / 7, 9, 4}},
        {"one-side", {5, 3, 3, 5, 2, 7, 9, 4}},
        {"one-place", {3, 3, 3, 3, 3, 3, 3, 3}},
        {"ends", {9, 9, 1.0 / 9, 1.0 / 9, 9, 1.0 / 9, 1, 1}},
        {"two", {5, 1.0 / 3}},
    };
    for (const auto& [name, ratios] : cases) {
        every_look([&, name = name, ratios = ratios](const HeadlessOptions& options) {
            WeighPage page(eight_judges(ratios), options);
            page.click("Everybody's answers", "button");
            look(page, std::string("together-") + name, options);
            page.key(ImGuiKey_2);
            look(page, std::string("together-proposed-") + name, options);
        });
    }
}

TEST_CASE("alone: handing over, beginning, at the seat, folded away, opening") {
    every_look([](const HeadlessOptions& options) {
        WeighPage page(eight_judges({5, 1.0 / 3, 3, 5, 1, 1.0 / 7, 9, 4}), options);
        page.click("How answers are given: Each alone", "radio");
        look(page, "hand-over", options);
        page.choose("Who answers", people[0]);
        look(page, "begin", options);
        page.click("I am R. Voss: begin", "button");
        look(page, "sealed", options);
        page.click("Standing", "tab");
        look(page, "folded", options);
        page.click("Open what is sealed", "button");
        look(page, "opening", options);
    });
}

TEST_CASE("show of hands: begun and through, with eight judges") {
    every_look([](const HeadlessOptions& options) {
        WeighPage page(eight_judges({5, 1.0 / 3, 3, 5, 1, 1.0 / 7, 9, 4}), options);
        page.click("How answers are given: Show of hands", "radio");
        for (const ImGuiKey key : {ImGuiKey_3, ImGuiKey_5, ImGuiKey_X, ImGuiKey_7}) page.key(key);
        look(page, "hands-begun", options);
        for (const ImGuiKey key : {ImGuiKey_3, ImGuiKey_1, ImGuiKey_2, ImGuiKey_4, ImGuiKey_0}) page.key(key);
        look(page, "hands-through", options);
    });
}
