#include "core/judgment/least_sum.hpp"

#include <catch_amalgamated.hpp>
#include <cmath>
#include <random>
#include <vector>

#include "tests/support/close.hpp"
#include "tests/support/dice.hpp"

using namespace steelyard;
using namespace steelyard::testing;

namespace {

using Eigen::Index;
using Eigen::MatrixXd;
using Eigen::VectorXd;

struct Problem {
    VectorXd y;
    std::vector<LogShift> shifts;
    VectorXd d;

    double sum(const std::vector<double>& x) const {
        VectorXd at = y;
        for (std::size_t p = 0; p < shifts.size(); ++p) {
            at(static_cast<Index>(shifts[p].i)) += x[p];
            at(static_cast<Index>(shifts[p].j)) -= x[p];
        }
        double total = 0;
        for (Index i = 0; i < d.size(); ++i) total += d(i) * std::exp(at(i));
        return total;
    }
};

double uniform(std::mt19937_64& engine) {
    return static_cast<double>(engine() >> 11) * 0x1p-53;
}

/// `sign`: which terms there are: -1 negative, 1 positive, 0 all, some of them 0.
Problem random_problem(std::size_t n, std::size_t shifts, int sign, std::uint64_t seed) {
    Dice dice(seed);
    Problem problem{VectorXd(static_cast<Index>(n)), {}, VectorXd(static_cast<Index>(n))};
    std::vector<LogShift> all;
    for (std::size_t i = 0; i < n; ++i) {
        problem.y(static_cast<Index>(i)) = dice.between(-1000, 1000) / 1000.0;
        double d = dice.between(1, 1000) / 1000.0;
        if (sign == 0) d *= dice.between(-1, 1);
        problem.d(static_cast<Index>(i)) = sign < 0 ? -d : d;
        for (std::size_t j = i + 1; j < n; ++j) {
            // Ranges of all kinds: around 0, on one side of it, of no width.
            const double low = dice.between(-1000, 500) / 1000.0;
            const double width = dice.chance(10) ? 0 : dice.between(0, 1000) / 1000.0;
            all.push_back({i, j, low, low + width});
            if (dice.chance(50)) std::swap(all.back().i, all.back().j);
        }
    }
    for (std::size_t p = 0; p < shifts && !all.empty(); ++p) {
        const auto at = static_cast<std::size_t>(dice.below(static_cast<int>(all.size())));
        problem.shifts.push_back(all[at]);
        all.erase(all.begin() + static_cast<std::ptrdiff_t>(at));
    }
    return problem;
}

/// The least over corners and a fine descent from the best of random starts.
double slow_least(const Problem& problem, std::uint64_t seed) {
    std::mt19937_64 engine(seed);
    const std::size_t count = problem.shifts.size();
    double least = problem.sum(std::vector<double>(count, 0.0)) + 1e9;
    const auto descend = [&](std::vector<double> x) {
        double best = problem.sum(x);
        for (double step = .5; step > 1e-9; step /= 2) {
            for (bool better = true; better;) {
                better = false;
                for (std::size_t p = 0; p < count; ++p) {
                    const double stood = x[p];
                    for (const double to : {stood - step, stood + step}) {
                        const double kept = x[p];
                        x[p] = std::clamp(to, problem.shifts[p].low, problem.shifts[p].high);
                        const double sum = problem.sum(x);
                        if (sum < best - 1e-15) {
                            best = sum;
                            better = true;
                        } else {
                            x[p] = kept;
                        }
                    }
                }
            }
        }
        least = std::min(least, best);
    };
    for (std::size_t corner = 0; corner < std::size_t{1} << count; ++corner) {
        std::vector<double> x;
        for (std::size_t p = 0; p < count; ++p)
            x.push_back((corner >> p & 1) != 0 ? problem.shifts[p].high : problem.shifts[p].low);
        least = std::min(least, problem.sum(x));
    }
    for (int start = 0; start < 6; ++start) {
        std::vector<double> x;
        for (const auto& shift : problem.shifts)
            x.push_back(shift.low + (shift.high - shift.low) * uniform(engine));
        descend(x);
    }
    return least;
}

} // namespace

TEST_CASE("least sum: the least over all corners and descents, no less and no more") {
    const std::size_t problems = cases(300);
    for (std::size_t seed = 0; seed < problems; ++seed) {
        Dice dice(seed);
        const auto n = static_cast<std::size_t>(dice.between(2, 6));
        const auto shifts = static_cast<std::size_t>(dice.between(0, 9));
        const int sign = dice.between(-1, 1);
        const Problem problem = random_problem(n, shifts, sign, seed);
        const auto found = least_sum(problem.y, problem.shifts, problem.d);
        REQUIRE(found);
        const double slow = slow_least(problem, seed);
        CAPTURE(seed, n, shifts, sign);
        CHECK(found->bound <= slow + 1e-12);
        CHECK(found->bound >= slow - 1e-6);
        REQUIRE(found->at.size() == problem.shifts.size());
        for (std::size_t p = 0; p < problem.shifts.size(); ++p) {
            CHECK(found->at[p] >= problem.shifts[p].low);
            CHECK(found->at[p] <= problem.shifts[p].high);
        }
        CHECK(problem.sum(found->at) >= found->bound);
        CHECK(problem.sum(found->at) <= slow + 1e-6);
    }
}

TEST_CASE("least sum: too many negative items in one group are refused, in several they are not") {
    Problem ring = random_problem(12, 0, -1, 1);
    for (std::size_t i = 0; i < 12; ++i) ring.shifts.push_back({i, (i + 1) % 12, -1, 1});
    CHECK_FALSE(least_sum(ring.y, ring.shifts, ring.d));
    ring.shifts.erase(ring.shifts.begin() + 5);
    ring.shifts.pop_back();
    CHECK(least_sum(ring.y, ring.shifts, ring.d));
}

TEST_CASE("linear bound: below every value of the box, and near the least as the box shrinks") {
    const std::size_t problems = cases(200);
    for (std::size_t seed = 0; seed < problems; ++seed) {
        std::mt19937_64 engine(seed);
        const Index n = 2 + static_cast<Index>(seed % 5);
        const Index answers = 1 + static_cast<Index>(seed % 3);
        AffineLogs logs{VectorXd(n), MatrixXd(n, answers), false};
        VectorXd d(n);
        for (Index i = 0; i < n; ++i) {
            logs.start(i) = uniform(engine);
            d(i) = 2 * uniform(engine) - 1;
            for (Index p = 0; p < answers; ++p) logs.columns(i, p) = uniform(engine) - .5;
        }
        double gap = 0;
        double narrower_gap = 0;
        for (const double width : {.2, .1}) {
            std::vector<double> low;
            std::vector<double> high;
            for (Index p = 0; p < answers; ++p) {
                low.push_back(.3 - width);
                high.push_back(.3 + width);
            }
            const double bound = linear_bound(logs, low, high, d);
            double least = 1e9;
            for (int k = 0; k < 2000; ++k) {
                VectorXd x(answers);
                for (Index p = 0; p < answers; ++p) {
                    double part = uniform(engine);
                    if (k % 2 == 0) part = part < .5 ? 0 : 1;
                    x(p) = low[static_cast<std::size_t>(p)] + 2 * width * part;
                }
                const VectorXd y = logs.start + logs.columns * x;
                double sum = 0;
                for (Index i = 0; i < n; ++i) sum += d(i) * std::exp(y(i));
                least = std::min(least, sum);
            }
            CHECK(bound <= least);
            gap = narrower_gap;
            narrower_gap = least - bound;
        }
        CAPTURE(seed);
        // A quarter by the square; sampling and higher terms leave some room.
        CHECK(narrower_gap <= .45 * gap + 1e-3);
    }
}
