#pragma once

#include <string>

#include "core/decision/decision.hpp"

namespace steelyard {

/// The RFC 8785 form of a decision without its signatures: what a signature covers.
std::string canonical_json(const Decision& decision);

/// SHA-256 of that form.
std::string decision_sha256(const Decision& decision);

/// SHA-256 of the RFC 8785 form of what fixing the rules seals: criteria, requirements, settings, and the
/// judgments and points on sets of criteria.
std::string rules_sha256(const Decision& decision);

} // namespace steelyard
