#pragma once

#include <cstddef>
#include <optional>
#include <vector>

#include "core/decision/decision.hpp"
#include "core/results/results.hpp"

namespace steelyard {

/// What the ranking does if the field changes: without each option in play, with a copy of each, and with a
/// typical one added. Excluded and withdrawn options stay out; musts exclude nobody anew. Works through one
/// change a step.
///
/// A copy has the figures, grades and costs of its original; in pairs it counts as much, every judge repeats
/// on it what he said of the original, and who abstains on the original abstains on it. The typical option
/// has the median figure (the middle two's mean where their number is even), the grade of the lower median,
/// and in pairs the ratio of the geometric mean of the weights to each option's.
class FieldChanges {
public:
    /// `results`: those of `decision`. Both must outlive the work.
    FieldChanges(const Decision& decision, const Results& results);

    /// Does one change; false once there is none left.
    bool step();
    double progress() const;
    const std::vector<FieldChange>& found() const { return found_; }

private:
    Decision without(const Id& option) const;
    Decision with_copy(const Id& option) const;
    Decision with_typical() const;
    void compare(FieldChange::Kind kind, const Id& option, const Decision& changed);

    const Decision& decision_;
    const Results& results_;
    Decision field_; ///< The decision with nobody but the options in play.
    Id newcomer_;    ///< An id that nobody has.
    std::size_t done_ = 0;
    std::vector<FieldChange> found_;
};

/// All of them at once.
std::vector<FieldChange> field_changes(const Decision& decision, const Results& results);

} // namespace steelyard
