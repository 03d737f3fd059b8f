#include <catch_amalgamated.hpp>

#include "shell/widgets/arm.hpp"
#include "shell/words.hpp"

using namespace steelyard;

TEST_CASE("numbers are written with thousands marks and no needless zeros") {
    CHECK(figure_text(57500) == "57,500");
    CHECK(figure_text(1234567.891) == "1,234,567.89");
    CHECK(figure_text(0.9) == "0.9");
    CHECK(figure_text(-3.5) == "\xE2\x88\x92"
                               "3.5");
    CHECK(figure_text(100) == "100");
    CHECK(figure_text(999) == "999");
    CHECK(figure_text(0) == "0");
    CHECK(points_text(0.76718) == "76.7");
    CHECK(points_text(-0.00001) == "0.0");
    CHECK(ratio_text(3) == "3");
    CHECK(ratio_text(1.0 / 3) == "1/3");
    CHECK(ratio_text(0.4) == "1/2.5");
    CHECK(times_text(6) == "6 times as much as");
    CHECK(times_text(1) == "as much as");
}

TEST_CASE("numbers are read as people type them") {
    const auto reads = [](const char* text, double value) {
        INFO(text);
        const auto number = read_number(text);
        REQUIRE(number.has_value());
        CHECK(*number == value);
    };
    reads("57500", 57500);
    reads("57,500", 57500);
    reads("57.500,50", 57500.5);
    reads("1,234,567.8", 1234567.8);
    reads("1.234.567", 1234567);
    reads("1 234,5", 1234.5);
    reads("0,9", 0.9);
    reads("0,125", 0.125);
    reads(".5", 0.5);
    reads("-3.5", -3.5);
    reads("\xE2\x88\x92"
          "2",
          -2);
    reads("EUR 61500", 61500);
    reads("61500 EUR", 61500);
    reads("\xE2\x82\xAC 4'150", 4150);
    reads("74 dB(A)", 74);
    for (const char* text : {"", "EUR", "60-66", "1,2,3.4.5", "three", "5 of 6"}) {
        INFO(text);
        CHECK_FALSE(read_number(text).has_value());
    }
}

TEST_CASE("ratios are read as numbers and fractions within 1/100 to 100") {
    CHECK(read_ratio("3") == 3);
    CHECK(read_ratio("1/4") == 0.25);
    CHECK(read_ratio("2,5") == 2.5);
    CHECK(read_ratio("3:2") == 1.5);
    CHECK(read_ratio("0.01") == 0.01);
    for (const char* text : {"0", "-3", "101", "1/0", "1/101", "x", "", "1/2/3/"}) {
        INFO(text);
        CHECK_FALSE(read_ratio(text).has_value());
    }
}

TEST_CASE("the poise steps over the scale's values, through equal, and in tenths when fine") {
    CHECK(stepped_ratio(1, 1, false) == 2);
    CHECK(stepped_ratio(1, -1, false) == 0.5);
    CHECK(stepped_ratio(2.4, 1, false) == 3);
    CHECK(stepped_ratio(0.5, 1, false) == 1);
    CHECK(stepped_ratio(9, 1, false) == 9);
    CHECK(stepped_ratio(1.0 / 9, -1, false) == 1.0 / 9);
    CHECK(stepped_ratio(3, 1, true) == Catch::Approx(3.1));
    CHECK(stepped_ratio(1, -1, true) == Catch::Approx(1 / 1.1));
}
