#pragma once

#include <catch_amalgamated.hpp>
#include <cmath>
#include <cstddef>
#include <cstdlib>
#include <string>
#include <vector>

namespace steelyard::testing {

/// Checks every number against the one expected, to `tolerance`.
inline void check_close(const std::vector<double>& got, const std::vector<double>& expected,
                        double tolerance) {
    REQUIRE(got.size() == expected.size());
    for (std::size_t i = 0; i < got.size(); ++i) {
        INFO("number " << i);
        CHECK_THAT(got[i], Catch::Matchers::WithinAbs(expected[i], tolerance));
    }
}

/// How many random cases to run: `usual`, or fewer where the environment variable STEELYARD_CASES says so
/// (slow builds set it).
inline std::size_t cases(std::size_t usual) {
    const char* most = std::getenv("STEELYARD_CASES");
    if (most == nullptr || *most == '\0') return usual;
    const std::size_t limit = std::stoul(most);
    return limit > 0 && limit < usual ? limit : usual;
}

/// The same for cases that are slow in themselves: `usual` in the proportion in which STEELYARD_CASES is less
/// than the 2000 random decisions of the second solver; one at least.
inline std::size_t slow_cases(std::size_t usual) {
    const std::size_t some = usual * cases(2000) / 2000;
    return some > 0 ? some : 1;
}

} // namespace steelyard::testing
