#pragma once

#include <cstddef>
#include <vector>

#include "core/judgment/weights.hpp"

namespace steelyard {

/// What one option leads another by: rest + (sum_i effect_i w_i) / divisor.
struct Lead {
    double rest = 0;
    std::vector<double> effect;
};

/// The leads that hang on one set's weights w. The divisor is sum_i part_i w_i, or the largest of the w_i of
/// positive part. part_i >= 0, not all 0.
struct LeadQuestion {
    std::vector<Lead> leads;
    std::vector<double> part;
    bool largest = false;
};

double lead_value(const LeadQuestion& question, const Lead& lead, const Weights& weights);

/// The lead where item k is the largest (or, where the divisor is a sum, for any weights; k is then of no
/// account): its sign is that of sum_i form_i w_i, and over weights of sum 1 it is at least as far from 0.
std::vector<double> lead_form(const LeadQuestion& question, const Lead& lead, std::size_t k);

} // namespace steelyard
