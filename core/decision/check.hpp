#pragma once

#include <set>
#include <string>
#include <vector>

#include "core/decision/decision.hpp"
#include "core/decision/problem.hpp"

namespace steelyard {

struct Checked {
    std::vector<Problem> problems; ///< Empty for a valid decision.
    std::vector<Notice> notices;
};

/// What the reader could not make sense of, so that one fault is not told twice. Members that failed are left
/// empty (ids) or not a number (numbers) and are passed over; references into a list with a failed id are not
/// followed.
struct Unread {
    bool any = false;
    bool people = false;
    bool options = false;
    bool nodes = false;
    bool grades = false;
    bool requirements = false;
    std::set<std::string> objects; ///< Pointers of the objects in which something failed.
};

/// Checks every rule that a decision must keep beyond its shape: ids, references, sets, limits, shares,
/// curves, ranges. The pointers are those of the file the decision would be written to.
Checked check(const Decision& decision, const Unread& unread = {});

} // namespace steelyard
