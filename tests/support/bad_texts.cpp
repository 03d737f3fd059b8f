#include "tests/support/bad_files.hpp"
#include "tests/support/full_decision.hpp"

namespace steelyard::test {
namespace {

std::string utf16(const std::string& ascii, bool little, bool mark) {
    std::string text;
    const auto put = [&](char high, char low) {
        text += little ? low : high;
        text += little ? high : low;
    };
    if (mark) put('\xfe', '\xff');
    for (const char c : ascii) put('\0', c);
    return text;
}

/// A title that holds `inside`, given as the bytes between its quotation marks.
std::string with_title(const std::string& inside) {
    return with("\"A cargo bicycle for the post round\"", "\"" + inside + "\"");
}

std::vector<BadFile> bad_encodings() {
    const std::string& full = full_decision_text();
    const std::string nul(1, '\0');
    return {
        {"an empty file", "", {""}},
        {"nothing but white space", " \r\n\t\n", {""}},
        {"nothing but a byte order mark", "\xef\xbb\xbf", {""}},
        {"UTF-16, low byte first, with its mark", utf16(full, true, true), {""}},
        {"UTF-16, high byte first, with its mark", utf16(full, false, true), {""}},
        {"UTF-16, low byte first, without a mark", utf16(full, true, false), {""}},
        {"UTF-16, high byte first, without a mark", utf16(full, false, false), {""}},
        {"a zero byte and more after the end", full + nul + "more", {""}},
        {"a zero byte instead of a value", with("\"version\": 1,", "\"version\": " + nul + ","), {""}},
        {"a text with a byte that UTF-8 never has", with_title("a\xff"), {"/title"}},
        {"a text with half a UTF-8 character", with_title("a\xc3"), {"/title"}},
        {"a text with an overlong UTF-8 character", with_title("a\xc0\xaf"), {"/title"}},
        {"a text with a surrogate in UTF-8", with_title("a\xed\xa0\x80"), {"/title"}},
        {"a text with a character beyond U+10FFFF", with_title("a\xf4\x90\x80\x80"), {"/title"}},
        {"invalid UTF-8 deep in an unknown member",
         with_member("extra", "[0, {\"b\": \"\xff\"}]"),
         {"/extra/1/b"}},
        {"invalid UTF-8 in a member name", with_member("extra", "{\"a\": 1, \"b\xff\": 2}"), {"/extra"}},
        {"a first surrogate escape without its second", with_title("a\\ud83d"), {"/title"}},
        {"a second surrogate escape without its first", with_title("a\\ude00"), {"/title"}},
        {"two first surrogate escapes", with_title("a\\ud83d\\ud83d"), {"/title"}},
    };
}

std::vector<BadFile> bad_syntax() {
    const std::string& full = full_decision_text();
    return {
        {"a text file that is no JSON", "Dear all,\nsee below.\n", {""}},
        {"a file cut off in a person", full.substr(0, full.find("\"name\": \"Workshop\"")), {"/people/1"}},
        {"a file cut off between members", full.substr(0, full.find("\n  \"options\"")), {""}},
        {"a file without its last bracket", full.substr(0, full.rfind('}')), {""}},
        {"a file cut off in a list", R"({"format": "steelyard-decision", "options": [)", {"/options"}},
        {"letters after the end", full + "x", {""}},
        {"a second value after the end", full + full, {""}},
        {"a comma after the last item",
         with(R"(["weights", "judgments", "figures"])", R"(["weights",])"),
         {"/settings/trials/kinds"}},
        {"a comma after the last member", with(R"("share": 0.5)", R"("share": 0.5,)"), {"/people/1"}},
        {"a missing comma", with(R"("name": "Workshop", )", R"("name": "Workshop" )"), {"/people/1"}},
        {"a member without a value", with(R"("share": 0.5)", R"("share": )"), {"/people/1"}},
        {"a name without quotation marks", with(R"("share": 0.5)", "share: 0.5"), {"/people/1"}},
        {"single quotation marks", with(R"("name": "Workshop")", R"("name": 'Workshop')"), {"/people/1"}},
        {"a comment", with("\"people\": [", "// who\n  \"people\": ["), {""}},
        {"a word that is no literal", with(R"("share": 0.5)", R"("share": none)"), {"/people/1"}},
        {"a literal in capitals", with(R"("withdrawn": true)", R"("withdrawn": TRUE)"), {"/options/2"}},
        {"not a number", with(R"("share": 0.5)", R"("share": NaN)"), {"/people/1"}},
        {"infinity as a word", with(R"("share": 0.5)", R"("share": Infinity)"), {"/people/1"}},
        {"a number with a plus sign", with(R"("share": 0.5)", R"("share": +0.5)"), {"/people/1"}},
        {"a number with a leading zero", with(R"("share": 0.5)", R"("share": 00.5)"), {"/people/1"}},
        {"a number without a digit before the point",
         with(R"("share": 0.5)", R"("share": .5)"),
         {"/people/1"}},
        {"a number without a digit after the point",
         with(R"("share": 0.5)", R"("share": 5.)"),
         {"/people/1"}},
        {"a number with a decimal comma", with(R"("share": 0.5)", R"("share": 0,5)"), {"/people/1"}},
        {"a hexadecimal number", with(R"("share": 0.5)", R"("share": 0x5)"), {"/people/1"}},
        {"a line end inside a text", with_title("two\nlines"), {""}},
        {"a tab inside a text", with_title("a\tb"), {""}},
        {"an escape that JSON does not have", with_title("a\\x41"), {""}},
        {"an escape with too few digits", with_title("a\\u12"), {""}},
        {"a bracket closed by the wrong one",
         with(R"("abstains": ["o3"])", R"("abstains": ["o3"})"),
         {"/people/0/abstains"}},
        {"a list instead of an object", "[]", {""}},
        {"a number instead of an object", "5", {""}},
        {"a text instead of an object", "\"steelyard-decision\"", {""}},
        {"null instead of an object", "null", {""}},
    };
}

std::vector<BadFile> bad_names_and_sizes() {
    const std::string& full = full_decision_text();
    const std::string one_over = full + std::string((16u << 20) + 1 - full.size(), ' ');
    return {
        {"a member twice at the top",
         with("\"version\": 1,", "\"version\": 1, \"version\": 1,"),
         {"/version"}},
        {"a member twice, once written with an escape", with_member("ti\\u0074le", "\"B\""), {"/title"}},
        {"a member twice in a judgment",
         with(R"("ratio": 3,)", R"("ratio": 3, "ratio": 4,)"),
         {"/judgments/0/ratio"}},
        {"a member twice in the tree",
         with(R"("id": "ease",)", R"("id": "ease", "id": "ease",)"),
         {"/criteria/children/1/id"}},
        {"an item twice among points",
         with(R"({"price": 70,)", R"({"price": 70, "price": 70,)"),
         {"/points/0/points/price"}},
        {"a member twice in an unknown member",
         with_member("extra", R"([{"x": 1, "y": 2, "x": 1}])"),
         {"/extra/0/x"}},
        {"an unknown member twice, of different types",
         with_member("extra", "1,\n  \"extra\": {\"a\": [2]}"),
         {"/extra"}},
        {"three members twice",
         with(R"("did": "opened",)", R"("did": "a", "by": "p1", "did": "b", "did": "c",)"),
         {"/log/0/by", "/log/0/did", "/log/0/did"}},
        {"the empty name twice", with_member("extra", R"({"": 1, "": 2})"), {"/extra/"}},
        // RFC 6901, section 3: "~" is written "~0" and "/" is written "~1"; nothing else is changed.
        {"a name with a slash twice", with_member("extra", R"({"a/b": 1, "a/b": 2})"), {"/extra/a~1b"}},
        {"a name with a tilde twice", with_member("extra", R"({"m~n": 1, "m~n": 2})"), {"/extra/m~0n"}},
        {"a name that looks escaped twice", with_member("extra", R"({"~1": 1, "~1": 2})"), {"/extra/~01"}},
        {"the other names of RFC 6901 section 5 twice",
         with_member("extra", R"({"c%d":1, "c%d":2, "e^f":3, "e^f":3, "g|h":4, "g|h":4, "i\\j":5, "i\\j":5,)"
                              R"( "k\"l":6, "k\"l":6, " ":7, " ":7})"),
         {"/extra/c%d", "/extra/e^f", "/extra/g|h", "/extra/i\\j", "/extra/k\"l", "/extra/ "}},
        {"a number beyond a double", with(R"("ratio": 3,)", R"("ratio": 1e999,)"), {"/judgments/0/ratio"}},
        {"a negative number beyond a double",
         with(R"("ratio": 3,)", R"("ratio": -1e999,)"),
         {"/judgments/0/ratio"}},
        {"a number far beyond a double",
         with(R"("ratio": 3,)", R"("ratio": 1e99999,)"),
         {"/judgments/0/ratio"}},
        {"a number beyond a double written out",
         with(R"("value": 55,)", "\"value\": 1" + repeated("0", 400) + ","),
         {"/figures/1/value"}},
        {"a number beyond a double in an unknown member",
         with_member("extra", R"({"x": [0, 1e400]})"),
         {"/extra/x/1"}},
        {"two numbers beyond a double", with_member("extra", "[1e400, 0, -1e400]"), {"/extra/0", "/extra/2"}},
        {"lists nested 65 levels deep",
         with_member("extra", repeated("[", 64) + repeated("]", 64)),
         {"/extra" + repeated("/0", 63)}},
        {"objects nested 65 levels deep",
         with_member("extra", repeated("{\"x\":", 63) + "{}" + repeated("}", 63)),
         {"/extra" + repeated("/x", 63)}},
        {"100,000 levels", repeated("[", 100'000), {repeated("/0", 64)}},
        {"a file one byte over 16 MiB", one_over, {""}},
    };
}

} // namespace

std::vector<BadFile> bad_texts() {
    std::vector<BadFile> all = bad_encodings();
    for (const auto& part : {bad_syntax(), bad_names_and_sizes()})
        all.insert(all.end(), part.begin(), part.end());
    return all;
}

} // namespace steelyard::test
