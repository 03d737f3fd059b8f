#pragma once

#include <string>
#include <string_view>

namespace steelyard::test {

/// A valid decision file that uses every member of version 1, one array entry a line. Other tests make their
/// files from it by exchanging single pieces.
const std::string& full_decision_text();

/// `text` with `piece` exchanged for `with`. Throws std::logic_error unless `piece` stands there exactly
/// once, so that a case cannot quietly lose its meaning when the text changes.
std::string exchanged(std::string_view text, std::string_view piece, std::string_view with);

/// The full decision with `piece` exchanged for `with`.
std::string with(std::string_view piece, std::string_view with);

/// The full decision with `entry` put in front of the others of the top-level array `name`.
std::string with_first(std::string_view name, std::string_view entry);

/// The full decision with the member `name` of value `json` added at the end of the top level.
std::string with_member(std::string_view name, std::string_view json);

/// The smallest valid file, `members` (each with a comma before it) added at its end.
std::string small_decision_text(std::string_view members = "");

/// A tree of `levels` criteria (1 or more), each the only child of the one before: the value of `criteria`.
std::string deep_tree_text(int levels);

/// `unit` written `count` times.
std::string repeated(std::string_view unit, std::size_t count);

} // namespace steelyard::test
