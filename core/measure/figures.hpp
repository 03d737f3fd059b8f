#pragma once

#include <map>
#include <optional>
#include <utility>

#include "core/decision/decision.hpp"

namespace steelyard {

/// A figure that stands, with the range it was quoted in. All in the criterion's unit.
struct StandingFigure {
    std::optional<double> value;
    std::optional<double> low;
    std::optional<double> high;
};

/// The figures of every leaf rated by figures, computed ones from their cost sheets.
class Figures {
public:
    explicit Figures(const Decision& decision);

    /// Empty where there is none.
    StandingFigure of(const Id& criterion, const Id& option) const;

private:
    std::map<std::pair<Id, Id>, StandingFigure> figures_;
};

} // namespace steelyard
