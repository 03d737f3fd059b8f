#pragma once

#include "core/results/results.hpp"

namespace steelyard {

/// A set as it stands for somebody who has answered nothing himself; `group` is its entry for the group.
/// Pairs agreed in the room are not missing.
SetResult unanswered_entry(const SetResult& group, const Decision& decision, const Id& by);

/// What may be seen of the results while `person` answers alone (nobody, where empty): his own answers, what
/// is agreed, figures and the musts they meet; nothing that follows from what others said. Whatever is not
/// named here stays out, so that a room cannot show it by mistake.
Results sealed_results(const Results& results, const Decision& decision, const Id& person);

} // namespace steelyard
