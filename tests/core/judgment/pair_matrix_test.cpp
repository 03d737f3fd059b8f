#include <catch_amalgamated.hpp>
#include <cstddef>
#include <vector>

#include "core/judgment/pair_matrix.hpp"

namespace steelyard {

using Pairs = std::vector<PairMatrix::Pair>;
using Groups = std::vector<std::vector<std::size_t>>;

TEST_CASE("pair matrix: no items and one item are complete and connected") {
    for (const std::size_t n : {std::size_t{0}, std::size_t{1}}) {
        const PairMatrix pairs(n);
        INFO(n << " items");
        CHECK(pairs.size() == n);
        CHECK(pairs.complete());
        CHECK(pairs.connected());
        CHECK(pairs.missing().empty());
        CHECK(pairs.judged_pairs().empty());
        CHECK(pairs.parts().size() == n);
    }
    CHECK(PairMatrix(1).at(0, 0) == 1);
}

TEST_CASE("pair matrix: a judgment stands in both orientations") {
    PairMatrix pairs(3);
    pairs.set(2, 0, 4);
    CHECK(pairs.at(2, 0) == 4);
    CHECK(pairs.at(0, 2) == .25);
    CHECK(pairs.judged(0, 2));
    CHECK(pairs.judged(2, 0));
    CHECK_FALSE(pairs.judged(0, 1));
    CHECK(pairs.at(0, 1) == 0);
    CHECK(pairs.at(1, 1) == 1);
    pairs.set(0, 2, 3);
    CHECK(pairs.at(2, 0) == 1. / 3);
}

TEST_CASE("pair matrix: missing and judged pairs are listed row by row, the earlier item first") {
    PairMatrix pairs(4);
    pairs.set(3, 1, 2);
    pairs.set(1, 0, 5);
    CHECK(pairs.judged_pairs() == Pairs{{0, 1}, {1, 3}});
    CHECK(pairs.missing() == Pairs{{0, 2}, {0, 3}, {1, 2}, {2, 3}});
    CHECK_FALSE(pairs.complete());
    for (const auto& [i, j] : pairs.missing()) pairs.set(i, j, 1);
    CHECK(pairs.complete());
    pairs.clear(3, 0);
    CHECK(pairs.missing() == Pairs{{0, 3}});
    CHECK(pairs.at(0, 3) == 0);
    CHECK(pairs.at(3, 0) == 0);
}

TEST_CASE("pair matrix: parts are ascending and ordered by their first item") {
    PairMatrix pairs(6);
    pairs.set(5, 0, 2);
    pairs.set(4, 2, 2);
    pairs.set(2, 1, 2);
    CHECK(pairs.parts() == Groups{{0, 5}, {1, 2, 4}, {3}});
    CHECK_FALSE(pairs.connected());
    pairs.set(3, 5, 1);
    CHECK(pairs.parts() == Groups{{0, 3, 5}, {1, 2, 4}});
    pairs.set(3, 4, 1);
    CHECK(pairs.connected());
}

TEST_CASE("pair matrix: forty items in a chain, listed backwards, hang together") {
    constexpr std::size_t n = 40;
    PairMatrix pairs(n);
    for (std::size_t i = n - 1; i > 0; --i) pairs.set(i, i - 1, 2);
    CHECK(pairs.connected());
    CHECK(pairs.judged_pairs().size() == n - 1);
    CHECK(pairs.missing().size() == n * (n - 1) / 2 - (n - 1));
    pairs.clear(19, 20);
    REQUIRE(pairs.parts().size() == 2);
    CHECK(pairs.parts()[0].size() == 20);
}

TEST_CASE("pair matrix: a restriction takes items in the order asked for") {
    PairMatrix pairs(4);
    pairs.set(0, 1, 2);
    pairs.set(1, 3, 3);
    const PairMatrix some = pairs.restricted({3, 1});
    CHECK(some.size() == 2);
    CHECK(some.at(0, 1) == 1. / 3);
    CHECK(some.at(1, 0) == 3);
    CHECK_FALSE(pairs.restricted({0, 2, 3}).judged(0, 1));
    CHECK(pairs.restricted({}).size() == 0);
}

} // namespace steelyard
