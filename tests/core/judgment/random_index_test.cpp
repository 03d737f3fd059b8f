#include <catch_amalgamated.hpp>
#include <cstddef>

#include "core/judgment/random_index.hpp"

// That the tables say what their papers say is tests/external/random_index_test.cpp.
namespace steelyard {

using Catch::Matchers::WithinAbs;

namespace {

constexpr auto newer = RandomIndexTable::alonso_lamata_2006;
constexpr auto older = RandomIndexTable::saaty_1980;

} // namespace

TEST_CASE("random index: none where nothing can contradict") {
    for (std::size_t n = 0; n <= 2; ++n) {
        for (const auto table : {newer, older}) {
            CHECK_FALSE(random_index(table, n).has_value());
            CHECK_FALSE(random_index(table, n, 0).has_value());
        }
    }
}

TEST_CASE("random index: the printed tables, to their last entries") {
    const double alonso_lamata[] = {.5245,  .8815,  1.1086, 1.2479, 1.3417, 1.4056, 1.4499,
                                    1.4854, 1.5141, 1.5365, 1.5551, 1.5713, 1.5838};
    for (std::size_t i = 0; i < std::size(alonso_lamata); ++i)
        CHECK(random_index(newer, i + 3) == alonso_lamata[i]);
    const double saaty[] = {.58, .90, 1.12, 1.24, 1.32, 1.41, 1.45, 1.49};
    for (std::size_t i = 0; i < std::size(saaty); ++i) CHECK(random_index(older, i + 3) == saaty[i]);
}

TEST_CASE(
    "random index: beyond 15 items the newer table goes on by its regression, the older one ends at 10") {
    CHECK_THAT(random_index(newer, 16).value(), WithinAbs((1.7699 * 16 - 4.3513) / 15, 1e-15));
    CHECK_THAT(random_index(newer, 40).value(), WithinAbs((1.7699 * 40 - 4.3513) / 39, 1e-15));
    // The regression carries on where the table stops.
    CHECK(random_index(newer, 16).value() > random_index(newer, 15).value());
    CHECK_FALSE(random_index(older, 11).has_value());
    CHECK_FALSE(random_index(older, 11, 1).has_value());
}

// RI(n) (1 - 2k / ((n-1)(n-2))): Agoston and Csato, Omega 111 (2022), from memory.
TEST_CASE("random index: reduced for missing pairs, and none at a spanning tree") {
    CHECK(random_index(newer, 4, 0) == random_index(newer, 4));
    CHECK_THAT(random_index(newer, 4, 1).value(), WithinAbs(.8815 * 2 / 3, 1e-15));
    CHECK_THAT(random_index(newer, 4, 2).value(), WithinAbs(.8815 / 3, 1e-15));
    CHECK_FALSE(random_index(newer, 4, 3).has_value());
    CHECK_FALSE(random_index(newer, 3, 1).has_value());
    CHECK_THAT(random_index(older, 8, 6).value(), WithinAbs(1.41 * 30 / 42, 1e-15));
    CHECK_FALSE(random_index(older, 8, 21).has_value());
}

} // namespace steelyard
