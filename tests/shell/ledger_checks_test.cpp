#include "tests/shell/support/ledger_checks.hpp"

#include <catch_amalgamated.hpp>

// The checks that judge every room are judged here: each finds its fault, and nothing in a sound item.

namespace steelyard {
namespace {

using namespace testing;

constexpr ImU32 black = 0xFF000000;
constexpr ImU32 white = 0xFFFFFFFF;

LedgerItem sound_text() {
    LedgerItem item;
    item.id = "weigh/title";
    item.room = "weigh";
    item.label = "Noise";
    item.role = "text";
    item.at = {100, 100};
    item.size = {40, 20};
    item.needs = {40, 20};
    item.clip_max = {800, 600};
    item.ink = black;
    item.paper = white;
    item.font_size = 19;
    return item;
}

LedgerItem sound_button() {
    LedgerItem item = sound_text();
    item.id = "weigh/next";
    item.label = "Next";
    item.role = "button";
    item.at = {100, 200};
    item.size = {80, 32};
    item.needs = {0, 0};
    return item;
}

TEST_CASE("sound items have no faults") {
    CHECK(all_faults({sound_text(), sound_button()}, 800, 600).empty());
    CHECK(all_faults({}, 800, 600).empty());
}

TEST_CASE("a text that is cut off is found, one shortened on purpose or in a scrolled area is not") {
    LedgerItem item = sound_text();
    item.needs.x = 41;
    REQUIRE(cut_texts({item}).size() == 1);
    CHECK(cut_texts({item})[0].find("Noise") != std::string::npos);

    LedgerItem shortened = item;
    shortened.shortened = true;
    CHECK(cut_texts({shortened}).empty());
    shortened.clip_max.x = 139;
    CHECK(cut_texts({shortened}).size() == 1);

    LedgerItem scrolled = item;
    scrolled.may_scroll = true;
    CHECK(cut_texts({scrolled}).empty());

    LedgerItem low = sound_text();
    low.clip_max.y = 119;
    CHECK(cut_texts({low}).size() == 1);
    low.visible = false;
    CHECK(cut_texts({low}).empty());
}

TEST_CASE("texts printed over each other are found, neighbours are not") {
    LedgerItem other = sound_text();
    other.label = "Price";
    other.at = {138, 118};
    CHECK(overlapping_texts({sound_text(), other}).size() == 1);
    other.at = {139, 118};
    CHECK(overlapping_texts({sound_text(), other}).empty());
    other.at = {110, 119};
    CHECK(overlapping_texts({sound_text(), other}).empty());
    // A text that ends at its clip rectangle reaches no farther.
    LedgerItem clipped = sound_text();
    clipped.clip_max.x = 120;
    other.at = {119.5F, 100};
    CHECK(overlapping_texts({clipped, other}).empty());
    // The label of a button stands on it.
    CHECK(overlapping_texts({sound_button(), sound_button()}).empty());
}

TEST_CASE("targets under 24 pixels are found") {
    LedgerItem item = sound_button();
    item.size = {24, 24};
    CHECK(small_targets({item}).empty());
    item.size = {23, 40};
    CHECK(small_targets({item}).size() == 1);
    item.size = {40, 23};
    CHECK(small_targets({item}).size() == 1);
    item.role = "text";
    CHECK(small_targets({item}).empty());
}

TEST_CASE("contrast is that of WCAG 2.2") {
    // 21 and 1 are the ends of the definition's scale. Grey 777777 on white is widely given as just short
    // of 4.5:1, and 767676 as the lightest grey that reaches it (from memory; the definition gives 4.48
    // and 4.54).
    CHECK(contrast(black, white) == Catch::Approx(21).epsilon(1e-9));
    CHECK(contrast(white, black) == Catch::Approx(21).epsilon(1e-9));
    CHECK(contrast(white, white) == 1);
    CHECK(contrast(0xFF777777, white) == Catch::Approx(4.48).margin(0.005));
    CHECK(contrast(0xFF767676, white) == Catch::Approx(4.54).margin(0.005));
    // Half black on white is a middle grey.
    CHECK(contrast(0x80000000, white) == contrast(0xFF7F7F7F, white));
}

TEST_CASE("faint text is found; large text may be fainter") {
    LedgerItem item = sound_text();
    item.ink = 0xFF767676;
    CHECK(faint_texts({item}).empty());
    item.ink = 0xFF777777;
    CHECK(faint_texts({item}).size() == 1);
    // 24 CSS pixels are a line of 28.125.
    item.font_size = 28.2F;
    CHECK(faint_texts({item}).empty());
    item.font_size = 28;
    CHECK(faint_texts({item}).size() == 1);
    item.font_size = 47;
    item.ink = 0xFFA0A0A0;
    CHECK(faint_texts({item}).size() == 1);

    LedgerItem disabled = sound_button();
    disabled.ink = 0xFFDDDDDD;
    CHECK(faint_texts({disabled}).size() == 1);
    disabled.enabled = false;
    CHECK(faint_texts({disabled}).empty());
}

TEST_CASE("what reaches beyond the display is found, unless scrolling brings it in") {
    LedgerItem item = sound_button();
    item.at = {720, 568};
    CHECK(outside_display({item}, 800, 600).empty());
    for (const ImVec2 at : {ImVec2{721, 568}, ImVec2{720, 569}, ImVec2{-1, 5}, ImVec2{5, -1}}) {
        item.at = at;
        CHECK(outside_display({item}, 800, 600).size() == 1);
    }
    item.may_scroll = true;
    CHECK(outside_display({item}, 800, 600).empty());
}

TEST_CASE("a control without a label is found") {
    LedgerItem item = sound_button();
    item.label.clear();
    CHECK(without_label({item}).size() == 1);
    item.role = "img";
    CHECK(without_label({item}).empty());
}

TEST_CASE("all faults are gathered") {
    LedgerItem item = sound_button();
    item.label.clear();
    item.size = {20, 20};
    item.at = {-5, 0};
    CHECK(all_faults({item}, 800, 600).size() == 3);
}

} // namespace
} // namespace steelyard
