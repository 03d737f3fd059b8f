#pragma once

#include <optional>
#include <string_view>
#include <vector>

#include "core/decision/decision.hpp"
#include "core/decision/problem.hpp"

namespace steelyard {

struct ReadResult {
    std::optional<Decision> decision; ///< None if there is any problem.
    std::vector<Problem> problems;
    std::vector<Notice> notices;
};

/// Reads a decision file. In order: size and syntax, format and version, migration, shape, then the rules of
/// core/decision/check.hpp. All problems are named, up to `max_problems`; only broken syntax ends the search
/// at once.
ReadResult read_decision(std::string_view text);

} // namespace steelyard
