#include "tests/support/round_trip.hpp"

#include <catch_amalgamated.hpp>

#include "core/decision/canonical.hpp"
#include "core/decision/read.hpp"
#include "core/decision/write.hpp"

namespace steelyard::test {

Decision read(const std::string& text) {
    const ReadResult result = read_decision(text);
    std::string told;
    for (const auto& problem : result.problems) told += sentence(problem) + "\n";
    INFO(told);
    REQUIRE(result.decision);
    return *result.decision;
}

std::string canonical(const std::string& text) {
    const CanonicalResult result = canonicalize_json(text);
    REQUIRE(result.text);
    return *result.text;
}

void comes_back_equal(const std::string& text) {
    const Decision decision = read(text);
    const std::string written = write_decision(decision);
    CHECK(canonical(written) == canonical(text));
    const Decision again = read(written);
    CHECK(again == decision);
    CHECK(write_decision(again) == written);
}

Places noticed(const std::string& text, const std::string& code) {
    const ReadResult result = read_decision(text);
    REQUIRE(result.decision);
    Places at;
    for (const auto& notice : result.notices) {
        CHECK_FALSE(notice.text.empty());
        if (notice.code == code) at.push_back(notice.at);
    }
    return at;
}

} // namespace steelyard::test
