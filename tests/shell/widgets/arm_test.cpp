#include <catch_amalgamated.hpp>

#include "tests/shell/support/ledger_checks.hpp"
#include "tests/shell/support/weigh_page.hpp"

using namespace steelyard;
using namespace steelyard::testing;

// The arm as a person meets it, in the room Weigh: A against B of three criteria, fresh.
namespace {

struct Arm : WeighPage {
    explicit Arm(HeadlessOptions options = {}) : WeighPage(fresh_set(3), std::move(options)) {}

    std::string value() const { return item("Criterion A against Criterion B", "slider").value; }
    ImVec2 poise() const { return middle(item("Poise")); }
    /// The middle of the beam, with the poise at equal.
    ImVec2 pivot() const {
        const LedgerItem& arm = item("Criterion A against Criterion B", "slider");
        return {arm.at.x + arm.size.x / 2, item_of_id("arm/poise").at.y + 36};
    }
};

} // namespace

TEST_CASE("digits count for the left load, and then for the side the poise is on") {
    Arm page;
    page.key(ImGuiKey_5);
    CHECK(page.value() == "5");
    page.key(ImGuiKey_X);
    CHECK(page.value() == "1/5");
    page.key(ImGuiKey_3);
    CHECK(page.value() == "1/3");
    page.key(ImGuiKey_Minus);
    CHECK(page.value() == "3");
    page.key(ImGuiKey_Keypad7);
    CHECK(page.value() == "7");
}

TEST_CASE("X before the digit takes the right load and enters nothing by itself") {
    Arm page;
    page.key(ImGuiKey_X);
    CHECK(page.value().empty());
    CHECK(page.decision().judgments.empty());
    page.key(ImGuiKey_4);
    CHECK(page.value() == "1/4");
    CHECK(page.decision().judgments.size() == 1);
}

TEST_CASE("a number or a fraction is typed on after its first digit") {
    Arm page;
    SECTION("with a point") {
        for (const ImGuiKey key : {ImGuiKey_2, ImGuiKey_Period, ImGuiKey_5}) page.key(key);
        CHECK(page.value() == "2.5");
    }
    SECTION("with a comma, for the other side") {
        for (const ImGuiKey key : {ImGuiKey_X, ImGuiKey_2, ImGuiKey_Comma, ImGuiKey_5}) page.key(key);
        CHECK(page.value() == "1/2.5");
    }
    SECTION("as a fraction, of two digits too") {
        for (const ImGuiKey key : {ImGuiKey_1, ImGuiKey_Slash, ImGuiKey_1, ImGuiKey_2}) page.key(key);
        CHECK(page.value() == "1/12");
    }
    SECTION("what is typed shows in the field meanwhile") {
        for (const ImGuiKey key : {ImGuiKey_1, ImGuiKey_Slash}) page.key(key);
        CHECK(page.item("Ratio", "textbox").value == "1/");
    }
    SECTION("another key ends it") {
        for (const ImGuiKey key : {ImGuiKey_2, ImGuiKey_Period, ImGuiKey_LeftArrow, ImGuiKey_5})
            page.key(key);
        CHECK(page.value() == "5");
    }
}

TEST_CASE("arrows go by a step of the scale, with Shift by a tenth") {
    Arm page;
    page.key(ImGuiKey_RightArrow);
    CHECK(page.value() == "1/2");
    page.key(ImGuiKey_LeftArrow);
    page.key(ImGuiKey_LeftArrow);
    CHECK(page.value() == "2");
    page.key(ImGuiKey_LeftArrow, ImGuiMod_Shift);
    CHECK(page.value() == "2.1");
}

TEST_CASE("the poise is put by a press on the beam, dragged, and settles at notches") {
    Arm page;
    const ImVec2 pivot = page.pivot();
    page.click_at({pivot.x - 100, pivot.y});
    const std::string pressed = page.value();
    CHECK_FALSE(pressed.empty());
    CHECK_FALSE(pressed.starts_with("1/"));
    page.drag(page.poise(), {pivot.x + 2, pivot.y});
    CHECK(page.value() == "1");
    page.drag_halfway(page.poise(), {pivot.x + 100, pivot.y + 30});
    CHECK(page.value().starts_with("1/"));
    CHECK(page.said("c0", "c1") == 1); // Nothing is entered before it is let go.
    page.release();
    CHECK(page.said("c0", "c1") < 1);
}

TEST_CASE("a press beside the beam does nothing") {
    Arm page;
    const LedgerItem arm = page.item("Criterion A against Criterion B", "slider");
    page.click_at({arm.at.x + arm.size.x / 2 + 60, arm.at.y + 3});
    page.click_at({arm.at.x + arm.size.x / 2 - 60, arm.at.y + arm.size.y - 3});
    CHECK(page.decision().judgments.empty());
}

TEST_CASE("pulled off the beam and let go, the answer is taken back, and words say so before") {
    Arm page;
    page.key(ImGuiKey_5);
    for (const float far : {-190.0f, 190.0f}) {
        page.key(ImGuiKey_5);
        const ImVec2 poise = page.poise();
        page.drag_halfway(poise, {poise.x + 30, poise.y + far});
        CHECK(page.says("Let go to take this answer back."));
        CHECK(page.said("c0", "c1") == 5);
        CHECK(all_faults(page.ledger().items(), 1366, 768) == Faults{});
        page.release();
        CHECK(page.value().empty());
        CHECK(page.decision().judgments.empty());
        page.key(ImGuiKey_Z, ImGuiMod_Ctrl);
        CHECK(page.value() == "5");
    }
    // Back on the beam it is an answer again.
    const ImVec2 poise = page.poise();
    page.drag_halfway(poise, {poise.x, poise.y - 190});
    page.drag_halfway({poise.x, poise.y - 190}, {page.pivot().x, page.pivot().y});
    page.release();
    CHECK(page.value() == "1");
    page.key(ImGuiKey_Delete);
    CHECK(page.value().empty());
}

TEST_CASE("a press on a load says that it counts more") {
    Arm page;
    page.click("Criterion B counts more", "button");
    page.key(ImGuiKey_6);
    CHECK(page.value() == "1/6");
    page.click("Criterion A counts more", "button");
    CHECK(page.value() == "6");
    page.click("Criterion A counts more", "button");
    CHECK(page.value() == "6");
}

TEST_CASE("nothing of the arm can be moved where the decision may only be read") {
    HeadlessOptions options;
    options.prepare = [](FakePlatform& platform) {
        platform.next_claims = {Claim::taken_elsewhere, Claim::taken_elsewhere};
    };
    Arm page(options);
    page.key(ImGuiKey_5);
    const ImVec2 pivot = page.pivot();
    page.drag(pivot, {pivot.x + 100, pivot.y});
    CHECK(page.value().empty());
}
