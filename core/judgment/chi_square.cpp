#include "core/judgment/chi_square.hpp"

#include <cassert>
#include <cmath>
#include <limits>

namespace steelyard {
namespace {

constexpr double precision = std::numeric_limits<double>::epsilon();

/// Both expansions gain a digit in a few terms once past the largest, which lies near term sqrt(x): this is
/// never reached, and stands against a loop without end.
constexpr int most_terms = 100'000;

/// x^a e^-x / Gamma(a), the factor before both expansions.
double factor(double a, double x) {
    return std::exp(a * std::log(x) - x - std::lgamma(a));
}

/// The lower part by the series sum x^k / (a (a+1) ... (a+k)); quick for x < a + 1.
double lower_by_series(double a, double x) {
    double term = 1 / a;
    double sum = term;
    for (int k = 1; k < most_terms && term > precision * sum; ++k) {
        term *= x / (a + k);
        sum += term;
    }
    return sum * factor(a, x);
}

/// The upper part by the even part of the continued fraction 1/(x+1-a- 1(1-a)/(x+3-a- ...)), evaluated from
/// the front by the method of Lentz (1976); quick for x > a + 1. There every denominator is positive.
double upper_by_fraction(double a, double x) {
    double b = x + 1 - a;
    double d = 1 / b;
    double c = std::numeric_limits<double>::max(); // Stands for 1/0: the first step divides by it.
    double value = d;
    for (int k = 1; k < most_terms; ++k) {
        const double numerator = -k * (k - a);
        b += 2;
        d = 1 / (numerator * d + b);
        c = b + numerator / c;
        value *= c * d;
        if (std::abs(c * d - 1) <= precision) break;
    }
    return value * factor(a, x);
}

} // namespace

double upper_gamma_fraction(double a, double x) {
    assert(a > 0 && x >= 0 && std::isfinite(a) && std::isfinite(x));
    if (x == 0) return 1;
    return x < a + 1 ? 1 - lower_by_series(a, x) : upper_by_fraction(a, x);
}

double chi_square_tail(double chi2, int freedom) {
    return upper_gamma_fraction(freedom / 2.0, chi2 / 2);
}

} // namespace steelyard
