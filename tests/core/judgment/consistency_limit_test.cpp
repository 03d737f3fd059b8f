#include "core/judgment/consistency_limit.hpp"

#include <catch_amalgamated.hpp>

namespace steelyard {

using Catch::Matchers::WithinAbs;

// Aguaron and Moreno-Jimenez, EJOR 147 (2003) 137-145, from memory.
TEST_CASE("geometric consistency limit: .31, .35 and .37 at a ratio of .10, in proportion else") {
    CHECK_THAT(geometric_consistency_limit(3, .10).value(), WithinAbs(.31, 1e-15));
    CHECK_THAT(geometric_consistency_limit(4, .10).value(), WithinAbs(.35, 1e-15));
    CHECK_THAT(geometric_consistency_limit(5, .10).value(), WithinAbs(.37, 1e-15));
    CHECK_THAT(geometric_consistency_limit(15, .10).value(), WithinAbs(.37, 1e-15));
    CHECK_THAT(geometric_consistency_limit(8, .05).value(), WithinAbs(.185, 1e-15));
    CHECK_FALSE(geometric_consistency_limit(2, .10).has_value());
}

} // namespace steelyard
