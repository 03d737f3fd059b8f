#include <array>
#include <catch_amalgamated.hpp>
#include <cmath>
#include <string>
#include <vector>

#include "core/judgment/chi_square.hpp"

namespace steelyard {
namespace {

void check_relative(double got, double expected, double tolerance) {
    INFO(got << " for " << expected);
    CHECK(std::abs(got - expected) <= tolerance * std::abs(expected));
}

/// The same by its closed form for whole and half a: finite sums of positive terms, and the complementary
/// error function. Abramowitz and Stegun 26.4.4 and 26.4.5, from memory.
double by_closed_form(int twice_a, double x) {
    const bool whole = twice_a % 2 == 0;
    double term = whole ? std::exp(-x) : 2 * std::sqrt(x / std::acos(-1.0)) * std::exp(-x);
    double sum = whole ? 0 : std::erfc(std::sqrt(x));
    double next = whole ? 1 : 1.5;
    for (int k = 0; k < twice_a / 2; ++k, next += 1) {
        sum += term;
        term *= x / next;
    }
    return sum;
}

constexpr double accuracy = 1e-12; // As the header promises.

} // namespace

// Values by scipy 1.10.1: python3 -c "from scipy.special import gammaincc; print(float(gammaincc(A, X)))"
TEST_CASE("upper_gamma_fraction: values computed elsewhere") {
    const std::vector<std::array<double, 3>> known{
        {.5, 1e-08, 0.9998871620836666},    {.5, .3, 0.4385780260809997},
        {.5, 1, 0.15729920705028105},       {.5, 2.5, 0.025347318677468325},
        {.5, 10, 7.744216431044088e-06},    {.5, 50, 1.5239706048320995e-23},
        {.5, 600, 6.099568814808675e-263},  {1, .3, 0.740818220681718},
        {1, 2.5, 0.0820849986238988},       {1.5, .3, 0.8964323733419115},
        {1.5, 2.5, 0.1717971442967335},     {1.5, 10, 0.00016974243555282632},
        {4, .3, 0.9997341888099782},        {4, 10, 0.010336050675925726},
        {4, 50, 4.269159205144943e-18},     {4, 600, 9.589294017602776e-254},
        {49.5, 50, 0.4529585113209314},     {49.5, 600, 1.8292973556853317e-188},
        {500, 600, 1.2255942330622893e-05},
    };
    for (const auto& [a, x, expected] : known) {
        INFO(a << ' ' << x);
        check_relative(upper_gamma_fraction(a, x), expected, accuracy);
    }
}

TEST_CASE("upper_gamma_fraction: its ends, and falling between") {
    for (const double a : {.5, 1., 7., 100.}) {
        INFO(a);
        CHECK(upper_gamma_fraction(a, 0) == 1);
        CHECK(upper_gamma_fraction(a, 5000) < 1e-300);
        double before = 1;
        for (double x = .125; x < 4 * a + 10; x *= 1.25) {
            const double now = upper_gamma_fraction(a, x);
            CHECK(now <= before);
            CHECK(now >= 0);
            before = now;
        }
    }
}

TEST_CASE("chi_square_tail: agrees with its closed form for every degree of freedom") {
    for (int freedom = 1; freedom <= 99; ++freedom) {
        for (const double chi2 : {.01, .5, 1., 3., 7.5, 20., 60., 99., 100.5, 101.5, 250.}) {
            INFO(freedom << ' ' << chi2);
            check_relative(chi_square_tail(chi2, freedom), by_closed_form(freedom, chi2 / 2), accuracy);
        }
    }
}

// Values by scipy 1.10.1: python3 -c "from scipy.stats import chi2; print(float(chi2.sf(CHI2, FREEDOM)))"
TEST_CASE("chi_square_tail: values computed elsewhere") {
    check_relative(chi_square_tail(3.841458820694124, 1), 0.04999999999999989, accuracy);
    check_relative(chi_square_tail(7.25, 3), 0.06434222056279873, accuracy);
    check_relative(chi_square_tail(15.507313055865453, 8), 0.050000000000000024, accuracy);
    check_relative(chi_square_tail(100, 10), 5.4497019829205215e-17, accuracy);
    check_relative(chi_square_tail(.5, 40), 1, accuracy);
}

} // namespace steelyard
