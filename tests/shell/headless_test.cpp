#include "tests/shell/support/headless.hpp"

#include <catch_amalgamated.hpp>
#include <set>
#include <stdexcept>

#include "tests/shell/support/fake_platform.hpp"

// The harness that other tests of the shell lean on.

namespace steelyard {
namespace {

using testing::FakePlatform;
using testing::Headless;
using testing::HeadlessOptions;

TEST_CASE("a first start shows the example and comes to rest") {
    Headless shell;
    CHECK(shell.app().idle());
    CHECK(shell.platform().kept.empty());
    CHECK(shell.item("Frame", "tab").value == "true");
    // Painted, and not in one colour.
    const auto& pixels = shell.painter().pixels();
    CHECK(shell.painter().width() == 1366);
    CHECK(shell.painter().height() == 768);
    CHECK(std::set<std::uint32_t>(pixels.begin(), pixels.end()).size() > 100);
}

TEST_CASE("a click on a tab opens its room") {
    Headless shell;
    shell.click("Weigh", "tab");
    CHECK(shell.item("Weigh", "tab").value == "true");
    CHECK(shell.item("Frame", "tab").value == "false");
}

TEST_CASE("letters typed go into the field that was clicked, and the decision is stored") {
    Headless shell;
    shell.click("Title", "textbox");
    shell.key(ImGuiKey_A, ImGuiMod_Ctrl);
    shell.type("Größe ≤ 5");
    shell.key(ImGuiKey_Enter);
    shell.wait(2);
    shell.settle();
    CHECK(shell.item("Title", "textbox").value == "Größe ≤ 5");
    REQUIRE(shell.platform().kept.size() == 1);
    CHECK(shell.platform().kept[0].title == "Größe ≤ 5");
    shell.key(ImGuiKey_Z, ImGuiMod_Ctrl);
    CHECK(shell.item("Title", "textbox").value == "Parts washer for cell 7");
}

TEST_CASE("text is copied from a field and pasted into another") {
    Headless shell;
    shell.click("Author", "textbox");
    shell.key(ImGuiKey_A, ImGuiMod_Ctrl);
    shell.key(ImGuiKey_C, ImGuiMod_Ctrl);
    REQUIRE(shell.platform().copied.size() == 1);
    CHECK(shell.platform().copied[0] == shell.item("Author", "textbox").value);
    shell.paste("J. Wirth");
    shell.key(ImGuiKey_Enter);
    CHECK(shell.item("Author", "textbox").value == "J. Wirth");
}

TEST_CASE("what is not to be seen cannot be clicked, and the test is told what there is") {
    Headless shell;
    CHECK(shell.find("No such thing") == nullptr);
    CHECK(shell.find("Weigh", "slider") == nullptr);
    CHECK_THROWS_WITH(shell.click("No such thing"), Catch::Matchers::ContainsSubstring("tab: Weigh"));
    CHECK_THROWS_AS(shell.item_of_id("no/such/id"), std::runtime_error);
}

TEST_CASE("a shell in another size and density is painted in device pixels") {
    HeadlessOptions options;
    options.width = 1280;
    options.height = 720;
    options.density = 1.25F;
    options.dark = true;
    Headless shell(options);
    CHECK(shell.painter().width() == 1600);
    CHECK(shell.painter().height() == 900);
    const auto dark_corner = shell.painter().pixels().back();
    CHECK((dark_corner & 0xFF) < 0x80);
    shell.resize(1000, 700, 2);
    shell.settle();
    CHECK(shell.painter().width() == 2000);
    CHECK(shell.painter().height() == 1400);
}

TEST_CASE("two shells run side by side") {
    Headless one;
    Headless other;
    one.click("Weigh", "tab");
    other.click("Gauge", "tab");
    one.settle();
    CHECK(one.item("Weigh", "tab").value == "true");
    CHECK(other.item("Gauge", "tab").value == "true");
}

TEST_CASE("the fake store answers later, and refuses a revision that is not newer") {
    FakePlatform platform;
    std::vector<std::string> answers;
    const auto store = [&](const char* id, std::uint64_t revision, const char* text) {
        platform.store({id, "Title", text, platform.now(), revision}, [&](const SaveOutcome& outcome) {
            answers.push_back(outcome.saved ? "saved" : outcome.problem.empty() ? "nothing" : "refused");
        });
    };
    store("a", 1, "first");
    CHECK(answers.empty());
    CHECK(platform.waiting());
    platform.answer();
    store("a", 1, "again");
    store("a", 2, "second");
    platform.next_store_problems = {"The disk is full."};
    store("a", 3, "third");
    store("b", 1, "other");
    platform.answer();
    CHECK_FALSE(platform.waiting());
    CHECK(answers == std::vector<std::string>{"saved", "refused", "saved", "refused", "saved"});
    CHECK(platform.stores == 5);
    REQUIRE(platform.kept.size() == 2);
    CHECK(platform.kept[0].text == "second");

    std::vector<std::string> listed;
    platform.list_kept([&](const std::vector<KeptDecision>& kept, const std::string& problem) {
        CHECK(problem.empty());
        for (const KeptDecision& each : kept) listed.push_back(each.id);
    });
    platform.load_kept("none", [](const std::optional<StoredDecision>& found, const std::string& problem) {
        CHECK_FALSE(found);
        CHECK(problem.empty());
    });
    platform.answer();
    CHECK(listed == std::vector<std::string>{"b", "a"});
}

TEST_CASE("the fake clock and the fake ids never say the same twice") {
    FakePlatform platform;
    CHECK(platform.now() == "2026-12-01T09:30:00Z");
    CHECK(platform.now() == "2026-12-01T09:30:01Z");
    for (int i = 0; i < 60 * 60 * 15; ++i) platform.now();
    CHECK(platform.now() == "2026-12-02T00:30:02Z");
    CHECK(platform.new_id() == "00000000-0000-4000-8000-000000000001");
    CHECK(platform.new_id() == "00000000-0000-4000-8000-000000000002");
}

TEST_CASE("a picked file reaches the shell with the next frame, and is refused if it is bad") {
    Headless shell;
    shell.platform().next_picks = {{"broken.json", "{", ""}};
    shell.key(ImGuiKey_O, ImGuiMod_Ctrl);
    shell.settle();
    CHECK(shell.item("Title", "textbox").value == "Parts washer for cell 7");
    CHECK(shell.platform().next_picks.empty());
}

} // namespace
} // namespace steelyard
