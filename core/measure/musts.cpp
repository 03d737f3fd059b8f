#include "core/measure/musts.hpp"

#include <algorithm>

namespace steelyard {
namespace {

MustState stated(CheckState state) {
    switch (state) {
    case CheckState::met: return MustState::met;
    case CheckState::failed: return MustState::failed;
    case CheckState::asked: return MustState::asked;
    case CheckState::unstated: break;
    }
    return MustState::unchecked;
}

/// Limits against a value and the range around it; none where neither is known.
std::optional<MustFinding> judge(const Requirement& requirement, const std::optional<double>& value,
                                 const std::optional<double>& low, const std::optional<double>& high) {
    if (!value && !(low && high)) return std::nullopt;
    const double middle = value ? *value : (*low + *high) / 2;
    return MustFinding{against_limits(requirement, low.value_or(middle), high.value_or(middle)), middle};
}

} // namespace

MustState against_limits(const Requirement& requirement, double low, double high) {
    std::optional<double> least = requirement.at_least;
    if (requirement.min_worth)
        least = std::max(least.value_or(*requirement.min_worth), *requirement.min_worth);
    const auto& most = requirement.at_most;
    if (!least && !most) return MustState::unchecked;
    if ((least && high < *least) || (most && low > *most)) return MustState::failed;
    if ((!least || low >= *least) && (!most || high <= *most)) return MustState::met;
    return MustState::undecided;
}

MustFinding find_must(const Decision& decision, const Figures& figures, const Requirement& requirement,
                      const Id& option) {
    if (!requirement.criterion.empty()) {
        const auto figure = figures.of(requirement.criterion, option);
        return judge(requirement, figure.value, figure.low, figure.high).value_or(MustFinding{});
    }
    const bool limited = requirement.at_least || requirement.at_most;
    if (!requirement.yes_no && !limited) return {};
    const auto last = std::find_if(decision.checks.rbegin(), decision.checks.rend(), [&](const Check& check) {
        return check.requirement == requirement.id && check.option == option;
    });
    if (last == decision.checks.rend()) return {};
    if (!requirement.yes_no) {
        if (const auto found = judge(requirement, last->value, last->low, last->high)) return *found;
    }
    return {stated(last->state), std::nullopt};
}

} // namespace steelyard
