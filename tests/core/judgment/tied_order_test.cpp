#include <catch_amalgamated.hpp>
#include <vector>

#include "core/judgment/tied_order.hpp"

namespace steelyard {

using Order = std::vector<std::size_t>;

TEST_CASE("tied order: ascending, equals as they stand") {
    CHECK(tied_order({}).empty());
    CHECK(tied_order({7}) == Order{0});
    CHECK(tied_order({3, 1, 2}) == Order{1, 2, 0});
    CHECK(tied_order({2, 1, 2, 1}) == Order{1, 3, 0, 2});
}

TEST_CASE("tied order: what differs by rounding is equal") {
    CHECK(tied_order({1 + 1e-13, 1, 0}) == Order{2, 0, 1});
    CHECK(tied_order({1 + 1e-11, 1, 0}) == Order{2, 1, 0});
    CHECK(tied_order({0, -1e-13, 5, 1e-13}) == Order{0, 1, 3, 2});
}

} // namespace steelyard
