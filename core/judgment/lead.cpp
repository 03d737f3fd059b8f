#include "core/judgment/lead.hpp"

#include <algorithm>

namespace steelyard {

double lead_value(const LeadQuestion& question, const Lead& lead, const Weights& weights) {
    double divisor = 0;
    double effect = 0;
    for (std::size_t i = 0; i < weights.size(); ++i) {
        effect += lead.effect[i] * weights[i];
        if (!question.largest) divisor += question.part[i] * weights[i];
        if (question.largest && question.part[i] > 0) divisor = std::max(divisor, weights[i]);
    }
    return lead.rest + effect / divisor;
}

std::vector<double> lead_form(const LeadQuestion& question, const Lead& lead, std::size_t k) {
    std::vector<double> form = lead.effect;
    if (question.largest) {
        form[k] += lead.rest;
        return form;
    }
    // The divisor is at most the largest part, so that the form is at most the lead.
    const double most = std::max(1.0, *std::max_element(question.part.begin(), question.part.end()));
    for (std::size_t i = 0; i < form.size(); ++i) form[i] = (form[i] + lead.rest * question.part[i]) / most;
    return form;
}

} // namespace steelyard
