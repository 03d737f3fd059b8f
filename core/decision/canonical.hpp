#pragma once

#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "core/decision/json_value.hpp"
#include "core/decision/problem.hpp"

namespace steelyard {

/// The canonical form of a JSON value (RFC 8785): no spaces, members sorted by the UTF-16 code units of their
/// names, numbers as ECMAScript writes doubles.
std::string canonical_json(const JsonValue& value);

struct CanonicalResult {
    std::optional<std::string> text;
    std::vector<Problem> problems;
};

/// The same for a JSON text; refuses what `parse_json` refuses.
CanonicalResult canonicalize_json(std::string_view text);

} // namespace steelyard
