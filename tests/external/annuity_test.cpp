#include <catch_amalgamated.hpp>
#include <cmath>

#include "core/measure/cost_sheet.hpp"

namespace steelyard {

using Catch::Matchers::WithinAbs;
using Catch::Matchers::WithinRel;

// The standard annuity table (present value of 1 a year, paid at the end of each), four digits, from memory;
// each reproduced by summing (1 + d)^-t. Half a unit of the last printed digit.
TEST_CASE("annuity factor: the standard table") {
    struct {
        double discount;
        int years;
        double factor;
    } const cases[] = {
        {.08, 10, 6.7101}, {.10, 5, 3.7908}, {.10, 10, 6.1446}, {.05, 20, 12.4622},
        {.06, 15, 9.7122}, {.12, 8, 4.9676}, {.01, 1, .9901},   {.04, 30, 17.2920},
    };
    for (const auto& c : cases) {
        INFO(c.years << " years at " << c.discount);
        CHECK_THAT(annuity_factor(c.discount, c.years), WithinAbs(c.factor, .00005));
    }
}

// The definition itself: the sum of (1 + d)^-t over the years, summed from the smallest term up.
TEST_CASE("annuity factor: equal to the sum of discounted years, negative and tiny rates too") {
    for (const double discount :
         {-.9, -.5, -.02, -1e-9, 0., 1e-300, 1e-15, 1e-9, 1e-4, .03, .08, .5, 3., 1e3}) {
        for (const int years : {1, 2, 3, 10, 40, 200}) {
            long double sum = 0;
            for (int t = years; t >= 1; --t)
                sum += std::pow(1 + static_cast<long double>(discount), -static_cast<long double>(t));
            INFO(years << " years at " << discount);
            // Rounding only: the terms are exact to a few units of the last digit of a double.
            CHECK_THAT(annuity_factor(discount, years), WithinRel(static_cast<double>(sum), 1e-12));
        }
    }
}

} // namespace steelyard
