#include <catch_amalgamated.hpp>

#include "tests/shell/support/ledger_checks.hpp"
#include "tests/shell/support/weigh_page.hpp"

using namespace steelyard;
using namespace steelyard::testing;

namespace {

/// Takes a person's seat, by the list and the card on which he says that it is he.
void seat(WeighPage& page, const std::string& name) {
    page.click("Hand over to " + name, "button");
    page.click("I am " + name + ": begin", "button");
    page.settle();
}

/// Answers the set of three: digits for the three pairs in order, below 0 for the right one.
void answer(WeighPage& page, const std::vector<int>& digits) {
    for (const int digit : digits) {
        page.key(static_cast<ImGuiKey>(ImGuiKey_0 + std::abs(digit)));
        if (digit < 0) page.key(ImGuiKey_X);
        page.key(ImGuiKey_Enter);
    }
}

} // namespace

TEST_CASE("answers given alone are sealed: no other's name with a number, no mean, no standing") {
    WeighPage page(fresh_set(3, 3));
    page.click("How answers are given: Each alone", "radio");
    seat(page, "Judge 1");
    answer(page, {7, -6, 5});
    CHECK(page.says("All 3 pairs of this set are answered."));
    page.click("Hand over", "button");
    seat(page, "Judge 2");

    CHECK(page.says("Judge 2"));
    CHECK_FALSE(page.says("Judge 1"));
    CHECK_FALSE(page.says("points of 100"));
    CHECK_FALSE(page.says("the judges together"));
    for (const char* number : {"7", "1/6", "6",
                               "\xC3\x97"
                               "7",
                               "\xC3\x97"
                               "6"}) {
        INFO(number);
        for (const auto& item : page.ledger().items()) {
            // Numbers of the graduation are no answers.
            if (item.role == "text" && item.label == std::string("\xC3\x97") + "7") continue;
            if (item.role == "button" || item.id.starts_with("digit/")) continue;
            CHECK_FALSE(item.value == number);
            CHECK_FALSE((item.role == "text" && item.label == number));
        }
    }
    CHECK(page.item("Criterion A against Criterion B", "slider").value.empty());
    CHECK(page.item("Goal", "tab").value == "open");
    CHECK(page.says("0 of 3"));
    // What the others' answers would give stays folded away in every room.
    for (const char* room : {"Standing", "Tipping", "Record"}) {
        page.click(room, "tab");
        CHECK(page.says("Folded away while answers are sealed"));
    }
    page.click("Frame", "tab");
    CHECK_FALSE(page.says("Counts "));
    CHECK(all_faults(page.ledger().items(), 1366, 768) == Faults{});
}

TEST_CASE("nobody answers under another's name by accident") {
    WeighPage page(fresh_set(3, 2));
    SECTION("a person is seated only after he says that it is he") {
        page.choose("Who answers", "Judge 2");
        CHECK(page.find("Criterion A against Criterion B", "slider") == nullptr);
        page.key(ImGuiKey_5);
        CHECK(page.decision().judgments.empty());
        page.click("I am Judge 2: begin", "button");
        page.key(ImGuiKey_5);
        CHECK(page.said("c0", "c1", "p1") == 5);
        CHECK(page.decision().judgments.size() == 1);
    }
    SECTION("he may turn back") {
        page.choose("Who answers", "Judge 2");
        page.click("Back", "button");
        page.key(ImGuiKey_5);
        CHECK(page.said("c0", "c1") == 5);
    }
    SECTION("or answer in the open, with the standing in sight") {
        page.choose("Who answers", "Judge 2");
        page.click("Answer in the open", "button");
        CHECK(page.says("answers in the open"));
        CHECK(page.says("points of 100"));
        page.key(ImGuiKey_5);
        CHECK(page.said("c0", "c1", "p1") == 5);
    }
    SECTION("his seat survives another room, and a new decision empties it") {
        page.choose("Who answers", "Judge 2");
        page.click("I am Judge 2: begin", "button");
        page.click("Gauge", "tab");
        page.click("Weigh", "tab");
        CHECK(page.says("answers alone"));
        page.key(ImGuiKey_4);
        CHECK(page.said("c0", "c1", "p1") == 4);
        page.choose("File", "Start empty");
        CHECK(page.item("Who answers", "combobox").value == "Agreed in the room");
    }
    SECTION("what another one did before the hand-over is not undone") {
        page.click("How answers are given: Each alone", "radio");
        seat(page, "Judge 1");
        page.key(ImGuiKey_7);
        page.click("Hand over", "button");
        seat(page, "Judge 2");
        page.key(ImGuiKey_3);
        page.key(ImGuiKey_Z, ImGuiMod_Ctrl);
        page.key(ImGuiKey_Z, ImGuiMod_Ctrl);
        CHECK(page.says("not undone while answers are sealed"));
        CHECK(page.said("c0", "c1", "p0") == 7);
        CHECK(page.said("c0", "c1", "p1") == 0);
        page.key(ImGuiKey_Y, ImGuiMod_Ctrl);
        CHECK(page.said("c0", "c1", "p1") == 3);
    }
}

TEST_CASE("three judges answer alone, all is revealed at once, and a pair is settled") {
    WeighPage page(fresh_set(3, 3));
    page.click("How answers are given: Each alone", "radio");
    CHECK(page.says("Judge 1, Judge 2 and Judge 3 have not done with Goal yet."));
    seat(page, "Judge 1");
    answer(page, {5, 2, 2});
    page.click("Hand over", "button");
    CHECK(page.says("done with this set: all 3 pairs"));
    CHECK(page.says("Reveal without Judge 2 and Judge 3"));
    seat(page, "Judge 2");
    answer(page, {-3, 2, 2});
    page.click("Hand over", "button");
    seat(page, "Judge 3");
    answer(page, {1, 2, 4});
    page.click("Hand over", "button");
    page.click("Reveal", "button");

    // The pair they are furthest apart in comes first.
    CHECK(page.find("Judge 1: Criterion A counts 5 times as much") != nullptr);
    CHECK(page.find("Judge 2: Criterion B counts 3 times as much") != nullptr);
    CHECK(page.find("15 times apart \xC2\xB7 1 for Criterion A, 1 equal, 1 for Criterion B") != nullptr);
    CHECK(page.find("Judge 1 \xC3\x97"
                    "5") != nullptr);
    CHECK(page.find("Judge 2 \xC3\x97"
                    "3") != nullptr);
    CHECK(page.find("Judge 3 \xC3\x97"
                    "1") != nullptr);
    CHECK_FALSE(page.says("points of 100"));
    CHECK(all_faults(page.ledger().items(), 1366, 768) == Faults{});

    // Settled: the poise is put, then agreed.
    page.key(ImGuiKey_2);
    CHECK(page.says("Proposed: Criterion A counts 2 times as much as Criterion B."));
    CHECK(page.said("c0", "c1") == 0);
    page.key(ImGuiKey_Enter);
    CHECK(page.said("c0", "c1") == 2);
    CHECK(page.said("c0", "c1", "p0") == 5);
    page.key(ImGuiKey_Enter);
    CHECK(page.says("All on one side: Criterion B counts 2 to 4 times as much as Criterion C."));
    page.key(ImGuiKey_Enter);
    CHECK(page.says("All say the same: Criterion A counts 2 times as much as Criterion C."));

    // Opened for good: one question, then the standing is back and everybody's answers can still be seen.
    page.click("Open what is sealed", "button");
    CHECK(page.says("Everybody has answered everything."));
    page.click("Open everything", "button");
    CHECK(page.says("points of 100"));
    page.click("Everybody's answers", "button");
    CHECK(page.find("15 times apart \xC2\xB7 1 for Criterion A, 1 equal, 1 for Criterion B") != nullptr);
}

TEST_CASE("opening what is sealed asks first and names who has not answered") {
    WeighPage page(fresh_set(3, 2));
    page.click("How answers are given: Each alone", "radio");
    page.click("How answers are given: Agreed in the room", "radio");
    CHECK(page.says("Judge 1 and Judge 2 have not answered everything yet."));
    page.click("Stay sealed", "button");
    CHECK(page.says("Who answers next?"));
    CHECK_FALSE(page.says("points of 100"));
}
