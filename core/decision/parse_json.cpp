#include <cmath>
#include <cstdlib>
#include <limits>
#include <nlohmann/json.hpp>
#include <set>
#include <utility>

#include "core/decision/json_value.hpp"
#include "core/decision/number_text.hpp"

namespace steelyard {
namespace {

/// The library's own number type would stop the parse at 1e999. With the wider one such a number is read on,
/// refused here with its place, and the rest of the text still checked. Digits are turned into a double from
/// the text itself.
using WideJson =
    nlohmann::basic_json<std::map, std::vector, std::string, bool, std::int64_t, std::uint64_t, long double>;

/// Builds a JsonValue from parse events, checking the limits on the way.
class Builder : public nlohmann::json_sax<WideJson> {
public:
    Builder(ParsedJson& out, const JsonLimits& limits) : out_(out), limits_(limits) {}

    bool null() override { return put(JsonValue{}); }
    bool boolean(bool truth) override { return put(JsonValue::of(truth)); }
    bool number_integer(number_integer_t number) override { return put_number(std::to_string(number)); }
    bool number_unsigned(number_unsigned_t number) override { return put_number(std::to_string(number)); }
    bool number_float(number_float_t, const string_t& digits) override { return put_number(digits); }
    bool binary(binary_t&) override { return true; } // Never sent for JSON text.

    bool string(string_t& text) override {
        if (text.size() > limits_.text) {
            refuse(place(), "a text of " + std::to_string(text.size()) + " bytes",
                   "at most " + std::to_string(limits_.text));
        }
        return put(JsonValue::of(std::move(text)));
    }

    bool start_object(std::size_t) override { return open(JsonValue::object()); }
    bool end_object() override { return close(); }
    bool start_array(std::size_t) override { return open(JsonValue::array()); }
    bool end_array() override { return close(); }

    bool key(string_t& name) override {
        Level& level = levels_.back();
        level.name = name;
        level.named = true;
        level.skip = !level.names.insert(name).second;
        if (level.skip) refuse(place(), "a member name that stands here twice", "each name once");
        if (name.size() > limits_.text) {
            refuse(levels_place(levels_.size() - 1),
                   "a member name of " + std::to_string(name.size()) + " bytes",
                   "at most " + std::to_string(limits_.text));
        }
        return true;
    }

    bool parse_error(std::size_t position, const std::string&,
                     const nlohmann::detail::exception& fault) override {
        if (fault.id == 406) {
            refuse(place(), "a number beyond the range of a double", "a finite number");
        } else {
            std::string why = fault.what();
            const bool utf8 =
                why.find("UTF-8") != std::string::npos || why.find("surrogate") != std::string::npos;
            const auto column = "byte " + std::to_string(position);
            if (utf8) {
                const bool in_name = !levels_.empty() &&
                                     levels_.back().value.kind == JsonValue::Kind::object &&
                                     !levels_.back().named;
                refuse(in_name ? container_place() : place(), "invalid UTF-8 at " + column, "UTF-8 text");
            } else {
                refuse(levels_.empty() ? "" : container_place(), "not JSON at " + column,
                       "a JSON text (RFC 8259)");
            }
        }
        return false;
    }

private:
    struct Level {
        JsonValue value;
        bool named = false;          ///< A name was read and its value has not been.
        std::string name;            ///< The member being read, in an object.
        bool skip = false;           ///< That member is a repetition: read, checked and dropped.
        std::set<std::string> names; ///< Member names so far.
    };

    /// The pointer of the value being read inside the first `count` open levels.
    std::string levels_place(std::size_t count) const {
        std::string pointer;
        for (std::size_t i = 0; i < count; ++i) {
            const Level& level = levels_[i];
            pointer += level.value.kind == JsonValue::Kind::array
                           ? "/" + std::to_string(level.value.items.size())
                           : pointer_part(level.name);
        }
        return pointer;
    }
    std::string place() const { return levels_place(levels_.size()); }
    std::string container_place() const { return levels_place(levels_.size() - 1); }

    void refuse(std::string at, std::string found, std::string expected) {
        if (out_.problems.size() < max_problems) {
            out_.problems.push_back({std::move(at), std::move(found), std::move(expected)});
        }
    }

    bool put_number(std::string digits) {
        JsonValue value;
        value.kind = JsonValue::Kind::number;
        value.number = std::strtod(digits.c_str(), nullptr);
        value.text = std::move(digits);
        if (!std::isfinite(value.number)) {
            refuse(place(), value.shown(), "a finite number");
            value.number = std::numeric_limits<double>::quiet_NaN(); // Named here; later checks pass over it.
        }
        return put(std::move(value));
    }

    bool put(JsonValue value) {
        if (++values_ > limits_.values) {
            refuse("", "more than " + std::to_string(limits_.values) + " values", "fewer");
            return false;
        }
        if (levels_.empty()) {
            out_.value = std::move(value);
            return true;
        }
        Level& level = levels_.back();
        level.named = false;
        if (level.value.kind == JsonValue::Kind::array) {
            level.value.items.push_back(std::move(value));
        } else if (!level.skip) {
            level.value.members.emplace_back(level.name, std::move(value));
        }
        return true;
    }

    bool open(JsonValue value) {
        if (levels_.size() == limits_.depth) {
            refuse(place(), "nested deeper than " + std::to_string(limits_.depth) + " levels",
                   "at most " + std::to_string(limits_.depth));
            return false; // Going on would only go deeper.
        }
        levels_.push_back({.value = std::move(value)});
        return true;
    }

    bool close() {
        JsonValue value = std::move(levels_.back().value);
        levels_.pop_back();
        return put(std::move(value));
    }

    ParsedJson& out_;
    JsonLimits limits_;
    std::size_t values_ = 0;
    std::vector<Level> levels_;
};

bool looks_like_utf16(std::string_view text) {
    if (text.size() < 2) return false;
    const auto a = static_cast<unsigned char>(text[0]);
    const auto b = static_cast<unsigned char>(text[1]);
    return (a == 0xff && b == 0xfe) || (a == 0xfe && b == 0xff) || a == 0 || b == 0;
}

} // namespace

ParsedJson parse_json(std::string_view text, const JsonLimits& limits) {
    ParsedJson parsed;
    if (text.size() > limits.bytes) {
        parsed.problems.push_back({"", std::to_string(text.size()) + " bytes long",
                                   "at most " + std::to_string(limits.bytes) + " bytes"});
        return parsed;
    }
    if (looks_like_utf16(text)) {
        parsed.problems.push_back({"", "UTF-16 text", "UTF-8 text"});
        return parsed;
    }
    if (text.find('\0') != std::string_view::npos) {
        parsed.problems.push_back({"", "a text with a zero byte", "a JSON text (RFC 8259)"});
        return parsed;
    }
    if (text.find_first_not_of(" \t\r\n") == std::string_view::npos) {
        parsed.problems.push_back({"", "empty", "a JSON text (RFC 8259)"});
        return parsed;
    }
    Builder builder(parsed, limits);
    parsed.whole = WideJson::sax_parse(text.begin(), text.end(), &builder);
    return parsed;
}

} // namespace steelyard
