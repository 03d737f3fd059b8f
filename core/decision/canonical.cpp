#include "core/decision/canonical.hpp"

#include <algorithm>
#include <utility>

namespace steelyard {
namespace {

/// Order of two UTF-8 texts by UTF-16 code units. It differs from the order of bytes only between
/// U+E000..U+FFFF and the characters beyond, whose surrogates sort lower.
bool less_utf16(const std::string& a, const std::string& b) {
    const auto [p, q] = std::mismatch(a.begin(), a.end(), b.begin(), b.end());
    if (p == a.end() || q == b.end()) return p == a.end() && q != b.end();
    const auto x = static_cast<unsigned char>(*p);
    const auto y = static_cast<unsigned char>(*q);
    const bool x_beyond = x >= 0xf0;
    const bool y_beyond = y >= 0xf0;
    if (x_beyond != y_beyond) {
        const unsigned char other = x_beyond ? y : x;
        if (other == 0xee || other == 0xef) return x_beyond; // U+E000 and up sort after surrogates.
    }
    return x < y;
}

JsonValue sorted(JsonValue value) {
    for (auto& item : value.items) item = sorted(std::move(item));
    for (auto& [name, member] : value.members) member = sorted(std::move(member));
    std::sort(value.members.begin(), value.members.end(),
              [](const auto& a, const auto& b) { return less_utf16(a.first, b.first); });
    if (value.kind == JsonValue::Kind::number) value = JsonValue::of(value.number);
    return value;
}

} // namespace

std::string canonical_json(const JsonValue& value) {
    return write_json_compact(sorted(value));
}

CanonicalResult canonicalize_json(std::string_view text) {
    ParsedJson parsed = parse_json(text);
    if (!parsed.problems.empty()) return {std::nullopt, std::move(parsed.problems)};
    return {canonical_json(parsed.value), {}};
}

} // namespace steelyard
