#include "core/judgment/lead.hpp"

#include <algorithm>

namespace steelyard {

double lead_value(const Lead& lead, const Weights& weights) {
    double divisor = 0;
    double effect = 0;
    for (std::size_t i = 0; i < weights.size(); ++i) {
        effect += lead.effect[i] * weights[i];
        if (!lead.largest) divisor += lead.part[i] * weights[i];
        if (lead.largest && lead.part[i] > 0) divisor = std::max(divisor, weights[i]);
    }
    return lead.rest + effect / divisor;
}

std::vector<double> lead_form(const Lead& lead, std::size_t k) {
    std::vector<double> form = lead.effect;
    if (lead.largest) {
        form[k] += lead.rest;
        return form;
    }
    // A divisor over 1 would make the sum larger than the lead.
    const double most = std::max(1.0, *std::max_element(lead.part.begin(), lead.part.end()));
    for (std::size_t i = 0; i < form.size(); ++i) form[i] = (form[i] + lead.rest * lead.part[i]) / most;
    return form;
}

} // namespace steelyard
