#include <catch_amalgamated.hpp>
#include <cstddef>
#include <optional>
#include <vector>

#include "core/standing/local_values.hpp"
#include "tests/support/close.hpp"

namespace steelyard {

using testing::check_close;
using Worths = std::vector<std::optional<double>>;
using Missing = std::vector<bool>;

namespace {

constexpr auto none = std::nullopt;
constexpr double rounding = 1e-15;

LocalValues distributive(const Worths& worths, bool anchored = false) {
    return local_values({worths, anchored}, Synthesis::distributive);
}

LocalValues ideal(const Worths& worths, bool anchored = false) {
    return local_values({worths, anchored}, Synthesis::ideal);
}

} // namespace

TEST_CASE("local values: of no options there are none") {
    for (const auto& values : {distributive({}), ideal({}), ideal({}, true)}) {
        CHECK(values.values.empty());
        CHECK(values.missing.empty());
        CHECK_FALSE(values.all_zero);
    }
}

TEST_CASE("local values, distributive: shares of the sum, anchored or not") {
    for (const bool anchored : {false, true}) {
        const LocalValues values = distributive({.9, .3, .6}, anchored);
        check_close(values.values, {.5, 1. / 6, 1. / 3}, rounding);
        CHECK(values.missing == Missing{false, false, false});
    }
}

TEST_CASE("local values, ideal: divided by the largest, unless anchored") {
    check_close(ideal({300, 150, 75}).values, {1, .5, .25}, rounding);
    check_close(ideal({.9, .3, .6}, true).values, {.9, .3, .6}, 0);
    check_close(ideal({1e-300, 5e-301}).values, {1, .5}, rounding);
}

TEST_CASE("local values: a single option has it all where it is set against others") {
    check_close(distributive({.4}).values, {1}, 0);
    check_close(distributive({.4}, true).values, {1}, 0);
    check_close(ideal({.4}).values, {1}, 0);
    check_close(ideal({.4}, true).values, {.4}, 0);
}

TEST_CASE("local values: an option without a value takes the others' mean and changes none of them") {
    const LocalValues shares = distributive({.6, none, .2});
    check_close(shares.values, {.75, .5, .25}, rounding);
    CHECK(shares.missing == Missing{false, true, false});
    const LocalValues best = ideal({none, 40, 10, none});
    check_close(best.values, {.625, 1, .25, .625}, rounding);
    CHECK(best.missing == Missing{true, false, false, true});
    check_close(ideal({.9, none, .2}, true).values, {.9, .55, .2}, rounding);
}

TEST_CASE("local values: where nobody has one all are equal") {
    const LocalValues shares = distributive({none, none, none, none});
    check_close(shares.values, {.25, .25, .25, .25}, 0);
    CHECK(shares.missing == Missing(4, true));
    CHECK_FALSE(shares.all_zero);
    check_close(ideal({none, none}).values, {1, 1}, 0);
    check_close(ideal({none, none}, true).values, {1, 1}, 0);
    CHECK_FALSE(ideal({none, none}).all_zero);
}

TEST_CASE("local values: all worth nothing is 0 each in ideal and the same share each in distributive") {
    const LocalValues shares = distributive({0, 0, 0}, true);
    CHECK(shares.all_zero);
    check_close(shares.values, {1. / 3, 1. / 3, 1. / 3}, rounding);
    const LocalValues best = ideal({0, 0, 0}, true);
    CHECK(best.all_zero);
    check_close(best.values, {0, 0, 0}, 0);
    // With one missing: the shares are those of the options that have a value, the placeholder their mean.
    const LocalValues some = distributive({0, none, 0}, true);
    CHECK(some.all_zero);
    check_close(some.values, {.5, .5, .5}, rounding);
    check_close(ideal({0, none}, true).values, {0, 0}, 0);
}

TEST_CASE("local values: one worth nothing among others is 0 and not missing") {
    const LocalValues values = distributive({0, .5, .5}, true);
    CHECK_FALSE(values.all_zero);
    check_close(values.values, {0, .5, .5}, rounding);
    CHECK(values.missing == Missing{false, false, false});
}

TEST_CASE("local values: a common factor does not matter where options are set against each other") {
    const Worths small{3, 1, none, 2};
    Worths large = small;
    for (auto& worth : large) {
        if (worth) *worth *= 1e6;
    }
    check_close(distributive(large).values, distributive(small).values, rounding);
    check_close(ideal(large).values, ideal(small).values, rounding);
}

TEST_CASE("local values: worths whose sum no number can hold still give finite shares") {
    const LocalValues shares = distributive({1.7e308, 1.7e308, 1.7e308});
    check_close(shares.values, {1. / 3, 1. / 3, 1. / 3}, rounding);
    const LocalValues tiny = distributive({5e-324, 5e-324});
    check_close(tiny.values, {.5, .5}, rounding);
    check_close(ideal({5e-324, 1.7e308}).values, {0, 1}, rounding);
}

TEST_CASE("local values: forty options, shares of sum 1") {
    Worths worths;
    for (int i = 0; i < 40; ++i) worths.emplace_back(i + 1);
    double sum = 0;
    for (const double value : distributive(worths).values) sum += value;
    CHECK_THAT(sum, Catch::Matchers::WithinAbs(1, 1e-14));
    CHECK(ideal(worths).values.back() == 1);
}

} // namespace steelyard
