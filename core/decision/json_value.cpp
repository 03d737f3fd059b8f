#include "core/decision/json_value.hpp"

#include <algorithm>
#include <utility>

#include "core/decision/number_text.hpp"

namespace steelyard {
namespace {

void append_quoted(std::string& out, std::string_view text) {
    static constexpr char hex[] = "0123456789abcdef";
    out += '"';
    for (const char c : text) {
        switch (c) {
        case '"': out += "\\\""; break;
        case '\\': out += "\\\\"; break;
        case '\b': out += "\\b"; break;
        case '\f': out += "\\f"; break;
        case '\n': out += "\\n"; break;
        case '\r': out += "\\r"; break;
        case '\t': out += "\\t"; break;
        default:
            if (static_cast<unsigned char>(c) < 0x20) {
                out += "\\u00";
                out += hex[(c >> 4) & 0xf];
                out += hex[c & 0xf];
            } else {
                out += c;
            }
        }
    }
    out += '"';
}

/// At most 60 bytes of a text, whole UTF-8 characters.
std::string cut(const std::string& text) {
    if (text.size() <= 60) return text;
    std::size_t end = 57;
    while (end > 0 && (static_cast<unsigned char>(text[end]) & 0xc0) == 0x80) --end;
    return text.substr(0, end) + "...";
}

bool is_container(const JsonValue& value) {
    return (value.kind == JsonValue::Kind::array && !value.items.empty()) ||
           (value.kind == JsonValue::Kind::object && !value.members.empty());
}

/// One line for a value without nested containers, or a short pair of them.
bool fits_one_line(const JsonValue& value) {
    return value.kind == JsonValue::Kind::array &&
           std::none_of(value.items.begin(), value.items.end(), is_container);
}

void append(std::string& out, const JsonValue& value, int indent, bool pretty) {
    const auto line = [&](int level) {
        if (pretty) {
            out += '\n';
            out.append(static_cast<std::size_t>(level) * 2, ' ');
        }
    };
    switch (value.kind) {
    case JsonValue::Kind::null: out += "null"; break;
    case JsonValue::Kind::boolean: out += value.truth ? "true" : "false"; break;
    case JsonValue::Kind::number: out += value.text; break;
    case JsonValue::Kind::string: append_quoted(out, value.text); break;
    case JsonValue::Kind::array: {
        const bool one_line = fits_one_line(value);
        out += '[';
        for (std::size_t i = 0; i < value.items.size(); ++i) {
            if (i > 0) out += pretty && one_line ? ", " : ",";
            if (!one_line) line(indent + 1);
            append(out, value.items[i], indent + 1, pretty);
        }
        if (!one_line) line(indent);
        out += ']';
        break;
    }
    case JsonValue::Kind::object: {
        out += '{';
        for (std::size_t i = 0; i < value.members.size(); ++i) {
            if (i > 0) out += ',';
            line(indent + 1);
            append_quoted(out, value.members[i].first);
            out += pretty ? ": " : ":";
            append(out, value.members[i].second, indent + 1, pretty);
        }
        if (!value.members.empty()) line(indent);
        out += '}';
        break;
    }
    }
}

} // namespace

JsonValue JsonValue::of(bool truth) {
    JsonValue value;
    value.kind = Kind::boolean;
    value.truth = truth;
    return value;
}

JsonValue JsonValue::of(double number) {
    JsonValue value;
    value.kind = Kind::number;
    value.number = number;
    value.text = shortest_number(number);
    return value;
}

JsonValue JsonValue::of(std::string text) {
    JsonValue value;
    value.kind = Kind::string;
    value.text = std::move(text);
    return value;
}

JsonValue JsonValue::array() {
    JsonValue value;
    value.kind = Kind::array;
    return value;
}

JsonValue JsonValue::object() {
    JsonValue value;
    value.kind = Kind::object;
    return value;
}

JsonValue& JsonValue::add(std::string name, JsonValue value) {
    members.emplace_back(std::move(name), std::move(value));
    return *this;
}

const JsonValue* JsonValue::find(std::string_view name) const {
    for (const auto& [key, value] : members) {
        if (key == name) return &value;
    }
    return nullptr;
}

std::string JsonValue::shown() const {
    switch (kind) {
    case Kind::null: return "null";
    case Kind::boolean: return truth ? "true" : "false";
    case Kind::number: return cut(text);
    case Kind::array: return "an array";
    case Kind::object: return "an object";
    case Kind::string: break;
    }
    std::string quoted;
    append_quoted(quoted, cut(text));
    return quoted;
}

std::string write_json(const JsonValue& value) {
    std::string out;
    append(out, value, 0, true);
    out += '\n';
    return out;
}

std::string write_json_compact(const JsonValue& value) {
    std::string out;
    append(out, value, 0, false);
    return out;
}

} // namespace steelyard
