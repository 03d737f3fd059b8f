#pragma once

#include <vector>

#include "core/decision/decision.hpp"
#include "core/decision/problem.hpp"

namespace steelyard {

/// One notice for each member of the file that this version does not know, for `max_problems` of them at the
/// most.
std::vector<Notice> unknown_member_notices(const Decision& decision);

} // namespace steelyard
