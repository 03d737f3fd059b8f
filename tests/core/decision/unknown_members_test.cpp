#include <algorithm>
#include <catch_amalgamated.hpp>
#include <string>

#include "core/decision/write.hpp"
#include "tests/support/full_decision.hpp"
#include "tests/support/round_trip.hpp"

namespace steelyard {
namespace {

using test::canonical;
using test::comes_back_equal;
using test::exchanged;
using test::full_decision_text;
using test::noticed;
using test::Places;
using test::read;
using test::small_decision_text;
using test::with_member;

/// The text with `member` (ending in a comma) put first into every object, the numbers by item of `points`
/// apart.
std::string with_member_everywhere(const std::string& text, const std::string& member, int& count) {
    static const std::string points = "\"points\": ";
    std::string out;
    bool quoted = false;
    for (std::size_t i = 0; i < text.size(); ++i) {
        out += text[i];
        if (text[i] == '"') quoted = !quoted; // The full decision has no escapes.
        const bool by_item =
            i >= points.size() && text.compare(i - points.size(), points.size(), points) == 0;
        if (text[i] == '{' && !quoted && !by_item) {
            out += member;
            ++count;
        }
    }
    return out;
}

} // namespace

TEST_CASE("reading and writing: unknown members in every object stay, and each is noticed") {
    const std::string odd =
        R"("x/y~z": {"deep": [null, true, {"": -0.0, "b": [], "a": {}}], "u": "\ud83d\ude00\u0000"}, )";
    int count = 0;
    const std::string text = with_member_everywhere(full_decision_text(), odd, count);
    CHECK(count == 48);
    comes_back_equal(text);
    const Places at = noticed(text, "unknown-member");
    CHECK(at.size() == static_cast<std::size_t>(count));
    for (const char* place : {"/x~1y~0z",
                              "/people/1/x~1y~0z",
                              "/options/2/x~1y~0z",
                              "/criteria/x~1y~0z",
                              "/criteria/children/0/x~1y~0z",
                              "/criteria/children/0/children/1/curve/x~1y~0z",
                              "/criteria/children/0/children/1/cost_sheet/x~1y~0z",
                              "/criteria/children/5/grades/2/x~1y~0z",
                              "/judgments/2/x~1y~0z",
                              "/finished/0/x~1y~0z",
                              "/points/0/x~1y~0z",
                              "/figures/1/x~1y~0z",
                              "/costs/0/x~1y~0z",
                              "/grades/0/x~1y~0z",
                              "/requirements/2/waived/x~1y~0z",
                              "/checks/1/x~1y~0z",
                              "/settings/x~1y~0z",
                              "/settings/trials/x~1y~0z",
                              "/rules/x~1y~0z",
                              "/outcome/x~1y~0z",
                              "/log/0/x~1y~0z",
                              "/signed/0/x~1y~0z"}) {
        INFO(place);
        CHECK(std::count(at.begin(), at.end(), place) == 1);
    }
}

TEST_CASE("reading and writing: unknown numbers keep their digits where a double would lose them") {
    const std::string big = "123456789012345678901234567890";
    const std::string precise = "0.1000000000000000055511151231257827";
    const std::string text =
        with_member("extra", "{\"a\": " + big + ", \"b\": [" + precise + ", 9007199254740993]}");
    comes_back_equal(text);
    const std::string written = write_decision(read(text));
    CHECK(written.find(big) != std::string::npos);
    CHECK(written.find(precise) != std::string::npos);
    CHECK(written.find("9007199254740993") != std::string::npos);
}

// RFC 6901 (2013), section 5: the names of its example document, from memory. Only "/" and "~" change in a
// pointer.
TEST_CASE("reading: the pointers of unknown members are those of RFC 6901, section 5") {
    const std::string text = small_decision_text(
        R"(, "": 0, "a/b": 1, "c%d": 2, "e^f": 3, "g|h": 4, "i\\j": 5, "k\"l": 6, " ": 7, "m~n": 8)");
    CHECK(noticed(text, "unknown-member") ==
          Places{"/", "/a~1b", "/c%d", "/e^f", "/g|h", "/i\\j", "/k\"l", "/ ", "/m~0n"});
    comes_back_equal(text);
}

// T. Bray: RFC 8259, The JavaScript Object Notation (JSON) Data Interchange Format, 2017, sections 2, 3, 6, 7
// and 13; the examples from memory.
TEST_CASE("reading and writing: the JSON of RFC 8259 as an unknown member") {
    comes_back_equal(with_member("literals", "[false, null, true]")); // section 3
    comes_back_equal(
        with_member("numbers", "[0, -0, 10, -1.5, 0.5e+3, 1E-2, 1e5, 3.141592653589793]")); // section 6
    comes_back_equal(
        with_member("texts", R"(["\u005C", "\\", "\"", "\/", "\b\f\n\r\t", "\uD834\uDD1E"])")); // section 7
    comes_back_equal(with_member("image", R"({
      "Image": {
        "Width":  800,
        "Height": 600,
        "Title":  "View from 15th Floor",
        "Thumbnail": {
          "Url":    "http://www.example.com/image/481989943",
          "Height": 125,
          "Width":  100
        },
        "Animated" : false,
        "IDs": [116, 943, 234, 38793]
      }
    })"));
    comes_back_equal(with_member("places", R"([
      {
        "precision": "zip",
        "Latitude":  37.7668,
        "Longitude": -122.3959,
        "Address":   "",
        "City":      "SAN FRANCISCO",
        "State":     "CA",
        "Zip":       "94107",
        "Country":   "US"
      },
      {
        "precision": "zip",
        "Latitude":  37.371991,
        "Longitude": -122.026020,
        "Address":   "",
        "City":      "SUNNYVALE",
        "State":     "CA",
        "Zip":       "94085",
        "Country":   "US"
      }
    ])"));
    // The G clef of section 7 is one character, U+1D11E, whichever way it is written.
    CHECK(canonical("[\"\\uD834\\uDD1E\"]") == "[\"\xf0\x9d\x84\x9e\"]");
    // White space between any two tokens: section 2.
    comes_back_equal("\t\r\n " +
                     exchanged(full_decision_text(), "\"version\": 1,", "\"version\"\r\n:\t1 \n,") + " \n\n");
}

} // namespace steelyard
