#pragma once

#include <string>
#include <vector>

#include "core/decision/decision.hpp"

namespace steelyard::test {

/// The decision in a file that must be accepted; the running test fails with its problems otherwise.
Decision read(const std::string& text);

/// The RFC 8785 form of a JSON text.
std::string canonical(const std::string& text);

/// Reads and writes `text` and checks that this gives the same JSON and the same decision, and no change the
/// second time.
void comes_back_equal(const std::string& text);

using Places = std::vector<std::string>;

/// The places of the notices with the given code, in their order.
Places noticed(const std::string& text, const std::string& code);

} // namespace steelyard::test
