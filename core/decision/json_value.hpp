#pragma once

#include <cstddef>
#include <string>
#include <string_view>
#include <utility>
#include <vector>

#include "core/decision/problem.hpp"

namespace steelyard {

/// One JSON value as it stood in a text. Numbers keep their digits, so that what is not understood can be
/// written back untouched; object members keep their order.
struct JsonValue {
    enum class Kind { null, boolean, number, string, array, object };

    Kind kind = Kind::null;
    bool truth = false;
    double number = 0;
    std::string text;                                       ///< String contents, or the digits of a number.
    std::vector<JsonValue> items;                           ///< Array.
    std::vector<std::pair<std::string, JsonValue>> members; ///< Object.

    static JsonValue of(bool truth);
    static JsonValue of(double number); ///< `number` finite.
    static JsonValue of(int number) { return of(static_cast<double>(number)); }
    static JsonValue of(std::string text);
    static JsonValue of(std::string_view text) { return of(std::string(text)); }
    static JsonValue of(const char* text) { return of(std::string(text)); }
    static JsonValue array();
    static JsonValue object();

    /// Adds a member; the name must be new.
    JsonValue& add(std::string name, JsonValue value);
    const JsonValue* find(std::string_view name) const;

    /// A short form for messages: texts in quotes and cut, arrays and objects by name.
    std::string shown() const;
};

/// Bounds kept while parsing, so that a hostile text costs no more than it must.
struct JsonLimits {
    std::size_t bytes = std::size_t{16} << 20;
    std::size_t depth = 64;         ///< Nested arrays and objects; the outermost is 1.
    std::size_t values = 1'000'000; ///< Of all kinds together; each takes memory, however short its text.
    std::size_t text = std::size_t{64} << 10; ///< UTF-8 bytes of one string or member name.
};

struct ParsedJson {
    JsonValue value; ///< Meaningful only if there is no problem.
    std::vector<Problem> problems;
    bool whole = false; ///< The text could be read to its end, whatever its problems.
};

/// Reads a JSON text (RFC 8259), a byte order mark allowed. Refused with a JSON Pointer: text that is not
/// UTF-8 or not JSON, repeated member names, numbers beyond a double, and what passes the limits.
ParsedJson parse_json(std::string_view text, const JsonLimits& limits = {});

/// Writes indented JSON, ending with a newline. Arrays without objects or arrays inside stand on one line.
std::string write_json(const JsonValue& value);

/// The same on one line, without spaces.
std::string write_json_compact(const JsonValue& value);

} // namespace steelyard
