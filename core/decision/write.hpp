#pragma once

#include <string>

#include "core/decision/decision.hpp"
#include "core/decision/json_value.hpp"

namespace steelyard {

/// The decision as a JSON value: what was read, with unknown members back in their objects.
JsonValue to_json(const Decision& decision);
JsonValue to_json(const Settings& settings);
JsonValue to_json(const Node& node);

/// The decision file: UTF-8 JSON, indented, ending with a newline.
std::string write_decision(const Decision& decision);

} // namespace steelyard
