#pragma once

#include <string>
#include <vector>

namespace steelyard {

/// One thing wrong with a file or an edit: where (a JSON Pointer, RFC 6901), what stands there, what was
/// expected.
struct Problem {
    std::string at;
    std::string found;
    std::string expected;
    bool operator==(const Problem&) const = default;
};

/// One thing accepted but worth knowing. `code` is stable; `text` is a sentence; `at` a JSON Pointer, or
/// empty.
struct Notice {
    std::string code;
    std::string text;
    std::string at;
    bool operator==(const Notice&) const = default;
};

/// The one sentence a person reads for a problem.
std::string sentence(const Problem& problem);

/// A member name or index made part of a JSON Pointer: "~" becomes "~0" and "/" becomes "~1" (RFC 6901,
/// section 3).
std::string pointer_part(const std::string& name);

/// Problems found in one go; no more than this many are kept.
inline constexpr std::size_t max_problems = 100;

} // namespace steelyard
