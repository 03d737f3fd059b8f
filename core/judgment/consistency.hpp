#pragma once

#include <array>
#include <cstddef>
#include <optional>
#include <vector>

#include "core/judgment/pair_matrix.hpp"
#include "core/judgment/weights.hpp"

namespace steelyard {

using Triad = std::array<std::size_t, 3>;

/// CI = (lambda max - n) / (n - 1); none for n < 2. Saaty 1980. Rounding below 0 is cut off.
std::optional<double> consistency_index(double lambda_max, std::size_t n);

/// Mean of (A w)_i / w_i over the complete matrix: the common hand estimate of lambda max.
double lambda_by_hand(const Eigen::MatrixXd& matrix, const Weights& weights);

/// GCI = 2 / ((n-1)(n-2)) sum_{i<j} ln^2(a_ij w_j / w_i), w by geometric mean. Complete sets of n >= 3, else
/// none. Source: Aguaron and Moreno-Jimenez, EJOR 147 (2003) 137-145, from memory.
std::optional<double> geometric_consistency_index(const PairMatrix& pairs);

struct WorstTriad {
    double index = 0;
    Triad triad{};
};

/// Koczkodaj's index: the largest over fully judged triads i < j < k of min(|1 - a_ik/(a_ij a_jk)|, |1 - a_ij
/// a_jk/a_ik|). Of triads equal within 1e-12 the first in item order. None without such a triad. Sources:
/// Koczkodaj, Mathematical and Computer Modelling 18(7) (1993); Duszak and Koczkodaj, Information Processing
/// Letters 52 (1994); from memory.
std::optional<WorstTriad> koczkodaj_index(const PairMatrix& pairs);

struct CircularTriads {
    std::vector<Triad> strict;  ///< a > b > c > a, each starting with its first item, in item order.
    std::vector<Triad> tied;    ///< a >= b >= c >= a with one or two ties.
    std::optional<double> zeta; ///< Coefficient of consistence; complete sets without ties, n >= 3.
};

/// Circular triads among fully judged triads, with Kendall's coefficient 1 - 24 d/(n^3 - n), n odd, or
/// 1 - 24 d/(n^3 - 4n), n even. Source: Kendall and Babington Smith, Biometrika 31 (1940) 324-345, from
/// memory.
CircularTriads circular_triads(const PairMatrix& pairs);

} // namespace steelyard
