#include <catch_amalgamated.hpp>
#include <cmath>
#include <cstdint>
#include <cstdlib>
#include <cstring>
#include <random>
#include <string>

#include "core/decision/canonical.hpp"
#include "core/decision/fingerprint.hpp"
#include "core/decision/number_text.hpp"
#include "core/decision/read.hpp"
#include "core/decision/sha256.hpp"
#include "tests/support/full_decision.hpp"

// A. Rundgren, B. Jordan, S. Erdtman: RFC 8785, JSON Canonicalization Scheme (JCS), 2020.
namespace steelyard {
namespace {

/// The canonical form, or what is wrong.
std::string canonical(std::string_view text) {
    const CanonicalResult result = canonicalize_json(text);
    if (result.text) return *result.text;
    return "refused at \"" + (result.problems.empty() ? "?" : result.problems[0].at) + "\"";
}

// emscripten's standard library has no std::bit_cast yet.
double double_of(std::uint64_t bits) {
    double number = 0;
    std::memcpy(&number, &bits, sizeof number);
    return number;
}

std::uint64_t bits_of(double number) {
    std::uint64_t bits = 0;
    std::memcpy(&bits, &number, sizeof bits);
    return bits;
}

struct NumberSample {
    std::uint64_t bits;
    const char* text;
};

} // namespace

// RFC 8785, appendix B, table of number samples, without its rows for NaN and Infinity (those are not JSON).
// From memory; every row confirmed with Node 20:
//   node -e 'console.log(new Float64Array(new BigUint64Array([0x44b52d02c7e14af6n]).buffer)[0].toString())'
TEST_CASE("canonical numbers: the samples of RFC 8785, appendix B") {
    const NumberSample samples[] = {
        {0x0000000000000000, "0"},
        {0x8000000000000000, "0"},
        {0x0000000000000001, "5e-324"},
        {0x8000000000000001, "-5e-324"},
        {0x7fefffffffffffff, "1.7976931348623157e+308"},
        {0xffefffffffffffff, "-1.7976931348623157e+308"},
        {0x4340000000000000, "9007199254740992"},
        {0xc340000000000000, "-9007199254740992"},
        {0x4430000000000000, "295147905179352830000"},
        {0x44b52d02c7e14af5, "9.999999999999997e+22"},
        {0x44b52d02c7e14af6, "1e+23"},
        {0x44b52d02c7e14af7, "1.0000000000000001e+23"},
        {0x444b1ae4d6e2ef4e, "999999999999999700000"},
        {0x444b1ae4d6e2ef4f, "999999999999999900000"},
        {0x444b1ae4d6e2ef50, "1e+21"},
        {0x3eb0c6f7a0b5ed8c, "9.999999999999997e-7"},
        {0x3eb0c6f7a0b5ed8d, "0.000001"},
        {0x41b3de4355555553, "333333333.3333332"},
        {0x41b3de4355555554, "333333333.33333325"},
        {0x41b3de4355555555, "333333333.3333333"},
        {0x41b3de4355555556, "333333333.3333334"},
        {0x41b3de4355555557, "333333333.33333343"},
        {0xbecbf647612f3696, "-0.0000033333333333333333"},
        {0x43143ff3c1cb0959, "1424953923781206.2"},
    };
    for (const auto& sample : samples) {
        INFO(std::hex << sample.bits);
        const auto number = double_of(sample.bits);
        CHECK(shortest_number(number) == sample.text);
        // The text reads back as the same number (-0 as 0), and stays what it is.
        CHECK(std::strtod(sample.text, nullptr) == number);
        CHECK(canonical(sample.text) == sample.text);
    }
}

// Not in the RFC; confirmed with the same Node command: 2^-44, the ends of the normal range, the number after
// 1, and the sizes where ECMAScript's layout changes.
TEST_CASE("canonical numbers: further doubles") {
    const NumberSample samples[] = {
        {0x3d30000000000000, "5.684341886080802e-14"},
        {0x0010000000000000, "2.2250738585072014e-308"},
        {0x000fffffffffffff, "2.225073858507201e-308"},
        {0x3ff0000000000001, "1.0000000000000002"},
    };
    for (const auto& sample : samples) {
        INFO(std::hex << sample.bits);
        CHECK(shortest_number(double_of(sample.bits)) == sample.text);
    }
    CHECK(shortest_number(1e21) == "1e+21");
    CHECK(shortest_number(1e20) == "100000000000000000000");
    CHECK(shortest_number(-1.5e21) == "-1.5e+21");
    CHECK(shortest_number(1e-6) == "0.000001");
    CHECK(shortest_number(1e-7) == "1e-7");
    CHECK(shortest_number(1.5e-7) == "1.5e-7");
    CHECK(shortest_number(-0.0) == "0");
    CHECK(shortest_number(0.1) == "0.1");
    CHECK(shortest_number(0.1 + 0.2) == "0.30000000000000004");
    CHECK(shortest_number(100) == "100");
    CHECK(shortest_number(123456) == "123456");
    CHECK(shortest_number(-12.5) == "-12.5");
}

// Expected value from Node 20's Number.prototype.toString over the same numbers:  node
// tests/external/random_doubles.js
TEST_CASE("canonical numbers: random doubles agree with Node and read back exactly") {
    std::mt19937_64 random(20261201);
    std::string joined;
    int wrong = 0;
    int count = 0;
    const auto take = [&](double number) {
        const std::string text = shortest_number(number);
        if (bits_of(std::strtod(text.c_str(), nullptr)) != bits_of(number)) {
            ++wrong;
        }
        if (count++ > 0) joined += '\n';
        joined += text;
    };
    while (count < 20'000) {
        const auto number = double_of(random());
        if (std::isfinite(number)) take(number);
    }
    // Between 2^-25 and 2^75, around the sizes where the layout changes.
    while (count < 40'000) {
        const std::uint64_t bits = random();
        const std::uint64_t exponent = 998 + ((bits >> 52) & 0x7ff) % 100;
        take(double_of((bits & 0x800fffffffffffff) | (exponent << 52)));
    }
    CHECK(wrong == 0);
    CHECK(sha256_hex(joined) == "1e72ecbce63ec8efe8e8e22868b1db679fb6f719c66f3b23898121e90349765e");
}

// RFC 8785, section 3.2.2 (the input) and 3.2.3 (the result). From memory, confirmed with Node 20's
// JSON.parse and JSON.stringify, member names sorted by Array.prototype.sort (UTF-16 code units).
TEST_CASE("canonical JSON: the sample of RFC 8785, section 3.2.2") {
    const char* input = R"({
  "numbers": [333333333.33333329, 1E30, 4.50,
              2e-3, 0.000000000000000000000000001],
  "string": "\u20ac$\u000F\u000aA'\u0042\u0022\u005c\\\"\/",
  "literals": [null, true, false]
})";
    CHECK(canonical(input) ==
          R"({"literals":[null,true,false],"numbers":[333333333.3333333,1e+30,4.5,0.002,1e-27],)"
          "\"string\":\"\xe2\x82\xac$\\u000f\\nA'B\\\"\\\\\\\\\\\"/\"}");
}

// RFC 8785, section 3.2.3: the order is that of UTF-16 code units, so U+1F600 (d83d de00) comes before
// U+FB33. From memory, confirmed with Node 20 as above.
TEST_CASE("canonical JSON: the order of names of RFC 8785, section 3.2.3") {
    const char* input = R"({
  "\u20ac": "Euro Sign",
  "\r": "Carriage Return",
  "\ufb33": "Hebrew Letter Dalet With Dagesh",
  "1": "One",
  "\ud83d\ude00": "Emoji: Grinning Face",
  "\u0080": "Control",
  "\u00f6": "Latin Small Letter O With Diaeresis"
})";
    CHECK(canonical(input) ==
          "{\"\\r\":\"Carriage Return\",\"1\":\"One\",\"\xc2\x80\":\"Control\","
          "\"\xc3\xb6\":\"Latin Small Letter O With Diaeresis\",\"\xe2\x82\xac\":\"Euro Sign\","
          "\"\xf0\x9f\x98\x80\":\"Emoji: Grinning Face\",\"\xef\xac\xb3\":\"Hebrew Letter Dalet With "
          "Dagesh\"}");
}

// The same rule at the ends of the surrogates: U+D7FF < U+10000 (d800 dc00) < U+10FFFF (dbff dfff) < U+E000 <
// U+FFFF.
TEST_CASE("canonical JSON: names around the surrogates, after a common start, and of different lengths") {
    CHECK(canonical(R"({"\uffff":1,"\ue000":2,"\udbff\udfff":3,"\ud800\udc00":4,"\ud7ff":5})") ==
          "{\"\xed\x9f\xbf\":5,\"\xf0\x90\x80\x80\":4,\"\xf4\x8f\xbf\xbf\":3,\"\xee\x80\x80\":2,"
          "\"\xef\xbf\xbf\":1}");
    CHECK(canonical(R"({"a\ue000":1,"a\ud83d\ude00":2,"a\ud83d\ude01":3})") ==
          "{\"a\xf0\x9f\x98\x80\":2,\"a\xf0\x9f\x98\x81\":3,\"a\xee\x80\x80\":1}");
    CHECK(canonical(R"({"b":1,"aa":2,"a":3,"":4,"B":5,"10":6,"9":7})") ==
          R"({"":4,"10":6,"9":7,"B":5,"a":3,"aa":2,"b":1})");
    CHECK(canonical(R"([{"z":{"b":1,"a":[{"d":1,"c":2}]},"y":[3,2,1]}])") ==
          R"([{"y":[3,2,1],"z":{"a":[{"c":2,"d":1}],"b":1}}])");
}

// RFC 8785, section 3.2.2.2: five short escapes, \u00xx in small letters for the other controls, nothing else
// but the quotation mark and the backslash.
TEST_CASE("canonical JSON: texts are escaped no more than they must") {
    CHECK(canonical(R"("\u0000\u0001\u0008\u0009\u000a\u000b\u000c\u000d\u000e\u001F")") ==
          R"("\u0000\u0001\b\t\n\u000b\f\r\u000e\u001f")");
    CHECK(canonical(R"("\u007f\u0080\u2028\u2029\/<>&")") == "\"\x7f\xc2\x80\xe2\x80\xa8\xe2\x80\xa9/<>&\"");
    // Nothing is composed or decomposed: e with acute accent in one and in two characters.
    CHECK(canonical(R"(["\u00e9","e\u0301"])") == "[\"\xc3\xa9\",\"e\xcc\x81\"]");
}

TEST_CASE("canonical JSON: numbers are read as doubles, whatever their digits") {
    CHECK(canonical("[1.0, 10e-1, 0.1e1, 1E0, -0, -0.0, 0e9, 1e-400]") == "[1,1,1,1,0,0,0,0]");
    CHECK(canonical("[9007199254740993, 18446744073709551615, 18446744073709551616, -9223372036854775809]") ==
          "[9007199254740992,18446744073709552000,18446744073709552000,-9223372036854776000]");
    CHECK(canonical("123456789012345678901234567890") == "1.2345678901234568e+29");
    // Half-way between two doubles, and just above: rounded to even, and up.
    CHECK(canonical("[1.00000000000000011102230246251565404, 1.00000000000000011102230246251565405]") ==
          "[1,1.0000000000000002]");
}

TEST_CASE("canonical JSON: any value may stand alone, and white space goes") {
    CHECK(canonical(" null\n") == "null");
    CHECK(canonical("\t\"a b\"\r\n") == "\"a b\"");
    CHECK(canonical("[ ]") == "[]");
    CHECK(canonical("{ }") == "{}");
    CHECK(canonical("\xef\xbb\xbf[ 1 ,\r\n2 ]") == "[1,2]");
}

// RFC 8785, section 3.1: the input keeps to I-JSON (RFC 7493): no repeated names, no lone surrogates, doubles
// only.
TEST_CASE("canonical JSON: what is no I-JSON is refused") {
    CHECK(canonical(R"({"a":1,"a":1})") == "refused at \"/a\"");
    CHECK(canonical(R"(["\ud800"])") == "refused at \"/0\"");
    CHECK(canonical("[0,1e999]") == "refused at \"/1\"");
    CHECK(canonical("[\"\xff\"]") == "refused at \"/0\"");
    CHECK(canonical("[1,]") == "refused at \"\"");
    CHECK(canonical("") == "refused at \"\"");
}

// Computed with Node 20 from the same text:
//   node -e 'const t = require("fs").readFileSync("tests/support/full_decision.cpp",
//   "utf8").match(/R"\(([^]*?)\n\)";/)[1], d = JSON.parse(t); delete d.signed; const c = v => v && typeof v
//   == "object" ? Array.isArray(v) ? "[" + v.map(c) + "]" :
//   "{" + Object.keys(v).sort().map(k => JSON.stringify(k) + ":" + c(v[k])) + "}" : JSON.stringify(v);
//   console.log(require("crypto").createHash("sha256").update(c(d)).digest("hex"))'
TEST_CASE("canonical JSON: the hash of a decision is that of its file without the signatures") {
    const ReadResult result = read_decision(test::full_decision_text());
    REQUIRE(result.decision);
    CHECK(decision_sha256(*result.decision) ==
          "6651c4bb7cce74a7670efe640c98fd8c7e502b456f00b4a2c007317688825c01");
}

} // namespace steelyard
