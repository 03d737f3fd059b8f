#include <array>
#include <catch_amalgamated.hpp>
#include <cmath>
#include <cstddef>
#include <random>

#include "core/judgment/random_index.hpp"
#include "tests/support/close.hpp"

// The random index is the mean consistency index of reciprocal matrices whose upper entries are drawn
// uniformly from the 17 values 1/9 ... 1 ... 9. J. A. Alonso, M. T. Lamata, Consistency in the analytic
// hierarchy process: a new approach, International Journal of Uncertainty, Fuzziness and Knowledge-Based
// Systems 14(4) (2006) 445-459; the table, from 500,000 matrices a size, is from memory of the source. It is
// drawn anew here.
namespace steelyard {

using Catch::Matchers::WithinAbs;

namespace {

constexpr std::size_t largest = 9;

double scale_value(unsigned step) {
    return step < 9 ? 1 + step : 1. / (step - 7);
} // 1 ... 9, 1/2 ... 1/9.

/// The principal eigenvalue by plain power steps, written apart from the core. The smallest and the largest
/// of (A w)_i / w_i enclose it (Collatz 1942; Wielandt 1950), so the accuracy is proven: 1e-7 relative.
double principal_eigenvalue(const double (&a)[largest][largest], std::size_t n) {
    double w[largest];
    for (std::size_t i = 0; i < n; ++i) w[i] = 1;
    for (int step = 0; step < 10000; ++step) {
        double next[largest];
        double sum = 0;
        double low = 1e300;
        double high = 0;
        for (std::size_t i = 0; i < n; ++i) {
            double row = 0;
            for (std::size_t j = 0; j < n; ++j) row += a[i][j] * w[j];
            low = std::fmin(low, row / w[i]);
            high = std::fmax(high, row / w[i]);
            next[i] = row;
            sum += row;
        }
        if (high - low < 1e-7 * low) return (low + high) / 2;
        for (std::size_t i = 0; i < n; ++i) w[i] = next[i] / sum;
    }
    FAIL("the power steps did not settle");
    return 0;
}

} // namespace

TEST_CASE("random index: the table is what random matrices give, n = 3 to 9") {
    const std::size_t count = testing::cases(100000);
    for (std::size_t n = 3; n <= largest; ++n) {
        const std::uint64_t seed = 20061400 + n;
        std::mt19937_64 engine(seed);
        double sum = 0;
        double squares = 0;
        for (std::size_t k = 0; k < count; ++k) {
            double a[largest][largest];
            for (std::size_t i = 0; i < n; ++i) {
                a[i][i] = 1;
                for (std::size_t j = i + 1; j < n; ++j) {
                    // The remainder of 64 bits by 17 is uniform to 1e-18.
                    const double value = scale_value(static_cast<unsigned>(engine() % 17));
                    a[i][j] = value;
                    a[j][i] = 1 / value;
                }
            }
            const auto size = static_cast<double>(n);
            const double ci = (principal_eigenvalue(a, n) - size) / (size - 1);
            sum += ci;
            squares += ci * ci;
        }
        const auto total = static_cast<double>(count);
        const double mean = sum / total;
        const double variance = (squares - sum * mean) / (total - 1);
        // Four standard errors of both draws, and the rounding of the table to four digits.
        const double tolerance = 4 * std::sqrt(variance / total + variance / 500000 + 1e-9);
        INFO("n = " << n << ", seed " << seed << ", " << count << " matrices");
        CHECK_THAT(mean, WithinAbs(random_index(RandomIndexTable::alonso_lamata_2006, n).value(), tolerance));
    }
}

// All 17^3 matrices of three items. There lambda = 1 + c + 1/c with c the cube root of a13 / (a12 a23).
TEST_CASE("random index: of three items it is .524457 exactly, all matrices counted") {
    double sum = 0;
    for (unsigned p = 0; p < 17; ++p) {
        for (unsigned q = 0; q < 17; ++q) {
            for (unsigned r = 0; r < 17; ++r) {
                const double c = std::cbrt(scale_value(q) / (scale_value(p) * scale_value(r)));
                sum += (1 + c + 1 / c - 3) / 2;
            }
        }
    }
    const double exact = sum / (17 * 17 * 17);
    CHECK_THAT(exact, WithinAbs(.524457, .0000005)); // Half a unit of the last digit.
    CHECK_THAT(random_index(RandomIndexTable::alonso_lamata_2006, 3).value(), WithinAbs(exact, .00005));
}

// T. L. Saaty, The Analytic Hierarchy Process, McGraw-Hill 1980, from memory of the source. An older and
// smaller draw in two digits; its n = 3 lies .056 from the exact mean.
TEST_CASE("random index: the two tables lie near each other") {
    for (std::size_t n = 3; n <= 10; ++n) {
        INFO("n = " << n);
        CHECK_THAT(random_index(RandomIndexTable::saaty_1980, n).value(),
                   WithinAbs(random_index(RandomIndexTable::alonso_lamata_2006, n).value(), .06));
    }
}

} // namespace steelyard
