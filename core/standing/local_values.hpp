#pragma once

#include <optional>
#include <vector>

#include "core/decision/decision.hpp"

namespace steelyard {

/// The raw worths of the options on one leaf, before they are set against each other.
struct LeafWorths {
    std::vector<std::optional<double>> worths; ///< Per option, >= 0; none where it has no value.
    bool anchored = false;                     ///< Worths from 0 to 1 that stand on their own.
};

struct LocalValues {
    std::vector<double> values; ///< Per option, placeholders included.
    std::vector<bool> missing;  ///< Per option: the value is a placeholder.
    bool all_zero = false;      ///< Every option that has a value is worth nothing.
};

/// Local values of one leaf. Distributive (Saaty 1980): shares of the sum. Ideal (Belton and Gear 1983):
/// anchored worths as they are, others divided by the largest. An option without a value takes the mean of
/// the others' local values and no part in the normalisation; where nobody has one, all are equal.
LocalValues local_values(const LeafWorths& leaf, Synthesis synthesis);

} // namespace steelyard
