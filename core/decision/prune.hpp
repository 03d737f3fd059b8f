#pragma once

#include "core/decision/apply.hpp"
#include "core/decision/decision.hpp"

namespace steelyard {

/// Removes what no longer fits after a change to options, people, requirements or the tree, and counts it. A
/// requirement on a criterion that is gone or no longer rated by figures stays, with its values asked for
/// anew. Acts of a person who was removed stay: the name from `before` takes the place of the id.
Losses prune(Decision& decision, const Decision& before);

} // namespace steelyard
