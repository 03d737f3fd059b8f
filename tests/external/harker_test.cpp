#include <Eigen/Eigenvalues>
#include <catch_amalgamated.hpp>
#include <cmath>
#include <utility>
#include <vector>

#include "core/judgment/consistency.hpp"
#include "core/judgment/weights.hpp"
#include "tests/support/close.hpp"
#include "tests/support/pairs.hpp"

namespace steelyard {

using Catch::Matchers::WithinAbs;
using testing::check_close;
using testing::upper_triangle;

namespace {

// P. T. Harker, Alternative modes of questioning in the analytic hierarchy process, Mathematical Modelling 9
// (1987) 353-360, from memory: a missing entry becomes 0, each diagonal entry 1 + the number missing in its
// row.
std::pair<double, std::vector<double>> harker(const PairMatrix& pairs) {
    const auto n = static_cast<Eigen::Index>(pairs.size());
    Eigen::MatrixXd a(n, n);
    for (Eigen::Index i = 0; i < n; ++i) {
        for (Eigen::Index j = 0; j < n; ++j)
            a(i, j) = pairs.at(static_cast<std::size_t>(i), static_cast<std::size_t>(j));
    }
    for (const auto& [i, j] : pairs.missing()) {
        a(static_cast<Eigen::Index>(i), static_cast<Eigen::Index>(i)) += 1;
        a(static_cast<Eigen::Index>(j), static_cast<Eigen::Index>(j)) += 1;
    }
    const Eigen::EigenSolver<Eigen::MatrixXd> solver(a);
    Eigen::Index largest = 0;
    for (Eigen::Index k = 1; k < n; ++k) {
        if (solver.eigenvalues()(k).real() > solver.eigenvalues()(largest).real()) largest = k;
    }
    std::vector<double> weights;
    for (Eigen::Index i = 0; i < n; ++i)
        weights.push_back(std::abs(solver.eigenvectors()(i, largest).real()));
    return {solver.eigenvalues()(largest).real(), testing::normalised(std::move(weights))};
}

} // namespace

// HARKER (1987), from memory of the source, reproduced by an independent computation. Exact fractions, so the
// tolerance is rounding.
TEST_CASE("HARKER: three items, one pair missing") {
    const PairMatrix pairs = upper_triangle(3, {2, 0, 2});
    const std::vector<double> published{4. / 7, 2. / 7, 1. / 7};
    check_close(weights_by(Method::eigenvector, pairs).value(), published, 1e-14);
    check_close(weights_by(Method::geometric_mean, pairs).value(), published, 1e-14);
    CHECK_THAT(complete_optimally(pairs).principal.lambda, WithinAbs(3, 1e-13));
    CHECK_THAT(complete_optimally(pairs).matrix(0, 2), WithinAbs(4, 1e-12));
    const auto [lambda, weights] = harker(pairs);
    CHECK_THAT(lambda, WithinAbs(3, 1e-12));
    check_close(weights, published, 1e-12);
}

// Where judgments are a tree both ways agree whatever the ratios: nothing can contradict anything.
TEST_CASE("HARKER: on a spanning tree both treatments of missing pairs agree") {
    const PairMatrix star = upper_triangle(5, {3, 1. / 2, 7, 4, 0, 0, 0, 0, 0, 0});
    check_close(weights_by(Method::eigenvector, star).value(), harker(star).second, 1e-12);
    CHECK_THAT(complete_optimally(star).principal.lambda, WithinAbs(5, 1e-12));
}

// The completion after S. Bozoki, J. Fulop, L. Ronyai, Mathematical and Computer Modelling 52 (2010) 318-333.
// The case is our own; its digits are from an independent computation (Newton's method in numpy, checked by a
// general minimiser and by coordinate descent).
TEST_CASE("completion: a case in which the optimal one differs from Harker's") {
    const PairMatrix pairs = upper_triangle(4, {2, 3, 0, 5, 4, 9});
    const Completion best = complete_optimally(pairs);
    CHECK_THAT(best.matrix(0, 3), WithinAbs(14.69694, .000005));
    CHECK_THAT(best.principal.lambda, WithinAbs(4.55083, .000005));
    check_close(eigenvector_weights(best), {.47408, .33088, .15772, .03732}, .000005);
    const auto [lambda, weights] = harker(pairs);
    CHECK_THAT(lambda, WithinAbs(4.55926, .000005));
    check_close(weights, {.45690, .33925, .16361, .04024}, .000005);
}

// Saaty 1977: for a_ij = w_i / w_j every method returns w, lambda max is n and every index is 0. Exact, so
// the tolerances are rounding.
TEST_CASE("consistent sets: every method returns the weights and no index sees anything") {
    for (std::size_t n = 1; n <= 15; ++n) {
        std::vector<double> weights;
        for (std::size_t i = 0; i < n; ++i) weights.push_back(1 + std::fmod(static_cast<double>(i) * 2.7, 8));
        const PairMatrix pairs = testing::consistent_pairs(weights);
        INFO(n << " items");
        for (const Method method : {Method::eigenvector, Method::geometric_mean, Method::column_average})
            check_close(weights_by(method, pairs).value(), testing::normalised(weights), 1e-14);
        const Completion whole = complete_optimally(pairs);
        CHECK_THAT(whole.principal.lambda, WithinAbs(static_cast<double>(n), 1e-12));
        CHECK_THAT(lambda_by_hand(whole.matrix, testing::normalised(weights)),
                   WithinAbs(static_cast<double>(n), 1e-12));
        CHECK_THAT(consistency_index(whole.principal.lambda, n).value_or(0), WithinAbs(0, 1e-12));
        CHECK_THAT(geometric_consistency_index(pairs).value_or(0), WithinAbs(0, 1e-28));
        CHECK_THAT(koczkodaj_index(pairs).value_or(WorstTriad{}).index, WithinAbs(0, 1e-14));
        CHECK(circular_triads(pairs).strict.empty());
        CHECK(circular_triads(pairs).tied.empty());
    }
}

} // namespace steelyard
