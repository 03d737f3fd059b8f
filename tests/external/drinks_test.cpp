#include <catch_amalgamated.hpp>

#include "core/judgment/consistency.hpp"
#include "core/judgment/misfits.hpp"
#include "core/judgment/random_index.hpp"
#include "tests/support/close.hpp"
#include "tests/support/pairs.hpp"

// DRINKS: how much more one drink is drawn than another in the United States. T. L. Saaty, Decision making
// with the analytic hierarchy process, International Journal of Services Sciences 1(1) (2008) 83-98.
// Judgments, weights, ratio and known consumption are from memory of the source; further digits are
// reproduced by an independent computation (numpy 1.24, numpy.linalg.eig of the matrix; row means of its
// logarithms; means of its columns divided by their sums).
namespace steelyard {

using Catch::Matchers::WithinAbs;
using testing::check_close;
using testing::drinks_pairs;

namespace {

constexpr double printed_3 = 0.0005;  // Half a unit of the last of three printed digits.
constexpr double printed_4 = 0.00005; // The same for four digits.

} // namespace

TEST_CASE("DRINKS: the published weights, by eigenvector") {
    check_close(weights_by(Method::eigenvector, drinks_pairs()).value(),
                {.177, .019, .042, .116, .190, .129, .327}, printed_3);
}

TEST_CASE("DRINKS: the published consistency ratio, and lambda max") {
    const Completion whole = complete_optimally(drinks_pairs());
    CHECK_THAT(whole.principal.lambda, WithinAbs(7.1766, printed_4));
    const double ci = consistency_index(whole.principal.lambda, 7).value();
    CHECK_THAT(ci / random_index(RandomIndexTable::alonso_lamata_2006, 7).value(),
               WithinAbs(.022, printed_3));
    CHECK_THAT(ci / random_index(RandomIndexTable::saaty_1980, 7).value(), WithinAbs(.022, printed_3));
}

TEST_CASE("DRINKS: the weights come near the known consumption") {
    // The paper sets them side by side; the largest difference is that of milk, .129 against .140.
    check_close(weights_by(Method::eigenvector, drinks_pairs()).value(),
                {.180, .010, .040, .120, .180, .140, .330}, .012);
}

TEST_CASE("DRINKS: weights by geometric mean and by averaged columns") {
    check_close(geometric_mean_weights(drinks_pairs()).value(),
                {.1787, .0185, .0422, .1165, .1911, .1286, .3243}, printed_4);
    check_close(column_average_weights(drinks_pairs()).value(),
                {.1776, .0195, .0421, .1173, .1888, .1296, .3250}, printed_4);
}

TEST_CASE("DRINKS: the geometric consistency index") {
    CHECK_THAT(geometric_consistency_index(drinks_pairs()).value(), WithinAbs(.0804, printed_4));
}

TEST_CASE("DRINKS: the worst triad is shared, and the first of them is named") {
    // Two thirds for items 2,3,7 and 2,4,7 and 2,6,7 alike.
    const WorstTriad worst = koczkodaj_index(drinks_pairs()).value();
    CHECK_THAT(worst.index, WithinAbs(.66667, .000005));
    CHECK(worst.triad == Triad{1, 2, 6});
    PairMatrix without = drinks_pairs();
    without.clear(1, 2);
    CHECK(koczkodaj_index(without).value().triad == Triad{1, 3, 6});
    without.clear(1, 3);
    CHECK(koczkodaj_index(without).value().triad == Triad{1, 5, 6});
    CHECK_THAT(koczkodaj_index(without).value().index, WithinAbs(.66667, .000005));
}

TEST_CASE("DRINKS: no cycle, and the judgment of items 2 and 7 fits worst") {
    CHECK(circular_triads(drinks_pairs()).strict.empty());
    const auto list =
        misfits(drinks_pairs(), Method::eigenvector, weights_by(Method::eigenvector, drinks_pairs()).value());
    REQUIRE(list.size() == 21);
    CHECK(list[0].i == 1);
    CHECK(list[0].j == 6);
}

} // namespace steelyard
