#pragma once

#include <cstdint>
#include <deque>
#include <memory>
#include <string>
#include <vector>

#include "core/decision/apply.hpp"
#include "core/decision/decision.hpp"
#include "core/decision/edit.hpp"

namespace steelyard {

/// Who acts, when and why, for the log. The core has no clock of its own.
struct Stamp {
    std::string at;
    Id by;
    std::string why;
};

/// The open decision with the steps that led to it. Whole earlier values are kept, so no edit needs an
/// inverse. Every step, undo and redo adds to the decision's log; nothing is ever taken from it.
class History {
public:
    explicit History(Decision decision);

    const Decision& now() const { return *now_; }
    std::shared_ptr<const Decision> snapshot() const { return now_; }

    /// Raised by every change, never repeated in one History.
    std::uint64_t revision() const { return revision_; }

    struct Outcome {
        bool changed = false;
        Losses losses;
        std::vector<Problem> problems; ///< If any, nothing was changed.
    };

    /// Applies edits as one step. Edits that change nothing leave no step and no log entry. `label` names the
    /// step; without one the first edit does.
    Outcome apply(const std::vector<Edit>& edits, const Stamp& stamp, std::string label = {});

    /// The step that undo (redo) would take back (repeat), empty if there is none.
    std::string undo_label() const { return undo_.empty() ? std::string{} : undo_.back().label; }
    std::string redo_label() const { return redo_.empty() ? std::string{} : redo_.back().label; }

    /// False if there is nothing to undo (redo).
    bool undo(const Stamp& stamp);
    bool redo(const Stamp& stamp);

private:
    struct Step {
        std::shared_ptr<const Decision> other; ///< The decision on the far side of this step.
        std::string label;
    };

    bool step(std::deque<Step>& from, std::deque<Step>& to, const Stamp& stamp, const char* verb);

    std::shared_ptr<const Decision> now_;
    std::deque<Step> undo_;
    std::deque<Step> redo_;
    std::uint64_t revision_ = 1;
};

} // namespace steelyard
