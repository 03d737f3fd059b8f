#pragma once

#include <cstddef>
#include <vector>

#include "core/judgment/weights.hpp"

namespace steelyard {

/// What one thing leads another by, as it hangs on the weights w of a set: rest + (sum_i effect_i w_i) /
/// divisor. The divisor is sum_i part_i w_i, or the largest of the w_i of positive part. part_i >= 0, not all
/// 0.
struct Lead {
    double rest = 0;
    std::vector<double> effect;
    std::vector<double> part;
    bool largest = false;
};

double lead_value(const Lead& lead, const Weights& weights);

/// f with the sign of the lead in sum_i f_i w_i; over weights of sum 1 the sum is no farther from 0 than the
/// lead. Where the divisor is the largest weight, so it is for weights of which item k is the largest;
/// otherwise k is of no account.
std::vector<double> lead_form(const Lead& lead, std::size_t k);

} // namespace steelyard
