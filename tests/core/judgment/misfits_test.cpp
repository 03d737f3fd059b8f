#include <catch_amalgamated.hpp>
#include <cmath>
#include <cstddef>
#include <cstdint>
#include <vector>

#include "core/judgment/misfits.hpp"
#include "tests/support/close.hpp"
#include "tests/support/pairs.hpp"

namespace steelyard {

using Catch::Matchers::WithinRel;
using testing::upper_triangle;

namespace {

std::vector<PairMisfit> misfits_by(Method method, const PairMatrix& pairs) {
    return misfits(pairs, method, weights_by(method, pairs).value());
}

} // namespace

TEST_CASE("misfits: none without judgments") {
    CHECK(misfits(PairMatrix(1), Method::eigenvector, {1}).empty());
}

TEST_CASE("misfits: a pair that alone links the items has nothing to be held against") {
    const auto two = misfits_by(Method::eigenvector, upper_triangle(2, {4}));
    REQUIRE(two.size() == 1);
    CHECK(two[0].given == 4);
    CHECK_FALSE(two[0].implied.has_value());
    // A triad and a fourth item that hangs on by one pair.
    for (const auto& misfit : misfits_by(Method::geometric_mean, upper_triangle(4, {2, 8, 0, 2, 0, 3}))) {
        INFO(misfit.i << ", " << misfit.j);
        CHECK(misfit.implied.has_value() == (misfit.j != 3));
    }
}

TEST_CASE("misfits: in a triad the other two pairs imply their product") {
    for (const Method method : {Method::eigenvector, Method::geometric_mean, Method::column_average}) {
        const auto list = misfits_by(method, upper_triangle(3, {2, 5, 3}));
        REQUIRE(list.size() == 3);
        for (const auto& misfit : list) {
            const double expected = misfit.j == 1 ? 5. / 3 : misfit.i == 0 ? 6. : 5. / 2;
            INFO(misfit.i << ", " << misfit.j << ", method " << static_cast<int>(method));
            CHECK_THAT(misfit.implied.value(), WithinRel(expected, 1e-12));
        }
    }
}

TEST_CASE("misfits: in a consistent set the others imply what was given, in the order of the items") {
    // Every error is rounding, which differs from pair to pair: none is worse than another.
    for (std::uint64_t seed = 1; seed <= 20; ++seed) {
        const PairMatrix pairs = testing::random_near_pairs(3 + seed % 7, 0, 0, seed);
        const auto list = misfits_by(Method::eigenvector, pairs);
        const auto judged = pairs.judged_pairs();
        INFO("seed " << seed << ", " << pairs.size() << " items");
        REQUIRE(list.size() == judged.size());
        for (std::size_t k = 0; k < list.size(); ++k) {
            CHECK(PairMatrix::Pair{list[k].i, list[k].j} == judged[k]);
            CHECK_THAT(list[k].implied.value(), WithinRel(list[k].given, 1e-12));
        }
    }
}

TEST_CASE("misfits: worst first by the error of the weights") {
    for (std::uint64_t seed = 1; seed <= testing::cases(20); ++seed) {
        const PairMatrix pairs = testing::random_near_pairs(3 + seed % 7, 1, 40, seed);
        const Method method = seed % 2 == 0 ? Method::eigenvector : Method::geometric_mean;
        const Weights w = weights_by(method, pairs).value();
        const auto list = misfits(pairs, method, w);
        REQUIRE(list.size() == pairs.judged_pairs().size());
        double before = 1e300;
        for (const auto& misfit : list) {
            const double error = std::abs(std::log(misfit.given * w[misfit.j] / w[misfit.i]));
            INFO("seed " << seed << ", pair " << misfit.i << ", " << misfit.j);
            CHECK(misfit.i < misfit.j);
            CHECK(misfit.given == pairs.at(misfit.i, misfit.j));
            CHECK(error <= before + 1e-12);
            before = error;
        }
    }
}

TEST_CASE("misfits: implied by the weights found anew without the pair, by each method") {
    for (const Method method : {Method::eigenvector, Method::geometric_mean}) {
        for (std::uint64_t seed = 1; seed <= testing::cases(10); ++seed) {
            const PairMatrix pairs = testing::random_near_pairs(6, 1, 30, seed);
            for (const auto& misfit : misfits_by(method, pairs)) {
                PairMatrix rest = pairs;
                rest.clear(misfit.i, misfit.j);
                const auto w = weights_by(method, rest);
                INFO("seed " << seed << ", pair " << misfit.i << ", " << misfit.j);
                REQUIRE(misfit.implied.has_value() == w.has_value());
                if (w) CHECK_THAT(misfit.implied.value(), WithinRel((*w)[misfit.i] / (*w)[misfit.j], 1e-12));
            }
        }
    }
}

TEST_CASE("misfits: averaged columns need every pair, so the eigenvector stands in") {
    const PairMatrix pairs = testing::random_scale_pairs(5, 8);
    const Weights w = weights_by(Method::eigenvector, pairs).value();
    const auto columns = misfits(pairs, Method::column_average, w);
    const auto vector = misfits(pairs, Method::eigenvector, w);
    REQUIRE(columns.size() == vector.size());
    for (std::size_t k = 0; k < vector.size(); ++k) {
        CHECK(columns[k].i == vector[k].i);
        CHECK(columns[k].j == vector[k].j);
        CHECK(columns[k].implied == vector[k].implied);
    }
}

TEST_CASE("misfits: implied by the weights found anew without the pair, complete sets of 3 to 30 items") {
    for (const Method method : {Method::eigenvector, Method::geometric_mean}) {
        for (std::uint64_t seed = 1; seed <= testing::cases(30); ++seed) {
            const std::size_t n = seed == 30 ? 30 : 3 + seed % 8;
            const PairMatrix pairs = seed % 2 == 0 ? testing::random_scale_pairs(n, seed)
                                                   : testing::random_near_pairs(n, .7, 0, seed);
            for (const auto& misfit : misfits_by(method, pairs)) {
                PairMatrix rest = pairs;
                rest.clear(misfit.i, misfit.j);
                const Weights w = weights_by(method, rest).value();
                INFO("seed " << seed << ", " << n << " items, pair " << misfit.i << ", " << misfit.j);
                CHECK_THAT(misfit.implied.value(), WithinRel(w[misfit.i] / w[misfit.j], 1e-10));
            }
        }
    }
}

} // namespace steelyard
