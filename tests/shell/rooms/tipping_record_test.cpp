#include <catch_amalgamated.hpp>
#include <string>

#include "core/decision/fingerprint.hpp"
#include "shell/example.hpp"
#include "tests/shell/support/headless.hpp"
#include "tests/shell/support/ledger_checks.hpp"
#include "tests/support/round_trip.hpp"

namespace steelyard {
namespace {

using namespace testing;

/// The shell with a room shown, of the example or of a file opened.
struct Shown : Headless {
    Shown(std::string_view room, HeadlessOptions options, const std::string& file = {})
        : Headless(std::move(options)) {
        if (!file.empty()) app().open_text("test.json", file);
        settle();
        press(room, "tab");
    }
    void press(std::string_view label, std::string_view role) {
        click(label, role);
        settle();
    }
    bool shows(std::string_view text) const { return find(text, "text") != nullptr; }
};

std::string with_log(int entries, const std::string& members = "") {
    std::string log;
    for (int i = 1; i <= entries; ++i) {
        log += std::string(i == 1 ? "" : ", ") + R"({"at": "2026-12-01T10:00:00Z", "did": "Step )" +
               std::to_string(i) + R"("})";
    }
    return R"({"format": "steelyard-decision", "version": 1, "id": "0b3f6a54-9d21-4c1e-8f0a-1d2c3b4a5968",
        "options": [{"id": "a", "name": "Alder"}], "criteria": {"id": "goal", "name": "Best"}, "log": [)" +
           log + "]" + members + "}";
}

} // namespace

TEST_CASE("Tipping says what it will hold and leads to what can be done now") {
    Shown page("Tipping", {});
    CHECK(page.shows("What would change first place"));
    CHECK(page.shows("Not in this version yet. This room will hold:"));
    for (const char* name :
         {"Weights", "Figures", "Judgments", "Trials", "Worth finding out", "Across the table"})
        CHECK(page.shows(name));
    page.press("Go to Gauge", "button");
    CHECK(page.item("Gauge", "tab").value == "true");
    page.press("Tipping", "tab");
    page.press("Go to Weigh", "button");
    CHECK(page.item("Weigh", "tab").value == "true");
}

TEST_CASE("Record shows the log, latest first, with who and why") {
    const Shown page("Record", {});
    CHECK(page.shows("Not in this version yet. This room will hold:"));
    CHECK(page.shows("2026-12-14 09:00 UTC \xC2\xB7 A. Kern"));
    CHECK(page.shows("Why: one nozzle bar was blocked in the first trial"));
    CHECK(page.item("Offers of round 2 entered").at.y <
          page.item("Residual dirt of Brook measured again").at.y);
    CHECK(page.item("Residual dirt of Brook measured again").at.y <
          page.item("Weights judged in the room").at.y);
}

TEST_CASE("Record gives the decision's hash to the clipboard") {
    Shown page("Record", {.height = 1200});
    page.press("Copy", "button");
    REQUIRE(page.platform().copied.size() == 1);
    CHECK(page.platform().copied[0] == decision_sha256(test::read(example_decision())));
}

TEST_CASE("Record shows the latest entries of a long log first and the earlier ones on demand") {
    Shown page("Record", {.height = 6000}, with_log(70));
    CHECK(page.shows("Step 70"));
    CHECK(page.shows("Step 31"));
    CHECK_FALSE(page.shows("Step 30"));
    page.press("Show earlier ones (30)", "link");
    CHECK(page.shows("Step 1"));
    CHECK(page.find("Show earlier ones (30)") == nullptr);
}

TEST_CASE("Record says where a file holds a decision or signatures that it does not show yet") {
    const Shown nothing("Record", {.height = 1200}, with_log(0));
    CHECK(nothing.shows("Nothing was changed yet."));
    CHECK(nothing.find("This file holds") == nullptr);
    const Shown page("Record", {.width = 1920, .height = 1200},
                     with_log(0, R"(, "outcome": {"option": "a"}, "signed": [{"at": "2026-12-01"}])"));
    bool said = false;
    for (const auto& item : page.ledger().items())
        said = said || item.label.find("This file holds a decision for Alder and 1 signature.") == 0;
    CHECK(said);
}

TEST_CASE("Tipping and Record are drawn without faults at every size") {
    for (const char* room : {"Tipping", "Record"}) {
        for (const HeadlessOptions& size : {HeadlessOptions{.width = 1280, .height = 720},
                                            HeadlessOptions{.width = 1920, .height = 1080, .dark = true},
                                            HeadlessOptions{.width = 640, .height = 360, .density = 2}}) {
            Shown page(room, size);
            for (int screen = 0; screen < 3; ++screen) {
                INFO(room << ' ' << size.width << ' ' << screen);
                CHECK(all_faults(page.ledger().items(), static_cast<float>(size.width),
                                 static_cast<float>(size.height)) == Faults{});
                page.wheel({static_cast<float>(size.width) / 2, static_cast<float>(size.height) / 2}, 6);
                page.settle();
            }
        }
    }
}

} // namespace steelyard
