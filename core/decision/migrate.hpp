#pragma once

#include <string_view>
#include <vector>

#include "core/decision/json_value.hpp"

namespace steelyard {

/// The version this program writes. It reads this one and every earlier one.
inline constexpr int current_version = 1;

/// One step from a version to the next, on the file's JSON. Steps are only ever added, never changed: a file
/// of every old version stays in tests/core/decision/versions/, and a test fails for a step without one.
struct Migration {
    int from;
    std::string_view name;
    JsonValue (*step)(JsonValue);
};

/// All steps, in order: the entry at index i leads from version i + 1 to i + 2.
const std::vector<Migration>& migrations();

/// Brings a file from `version` (1 or more) up to the current one.
JsonValue migrate(JsonValue file, int version);

} // namespace steelyard
