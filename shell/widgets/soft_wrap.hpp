#pragma once

#include <cstddef>
#include <functional>
#include <string>
#include <string_view>

/// Long lines broken for showing only. A soft break is a line feed after a space; a real one never follows a
/// space here. Places are in bytes.
namespace steelyard {

using MeasureText = std::function<float(std::string_view)>;

/// Breaks lines at spaces so that each is at most `width` wide; a longer word stands alone in its line.
/// Spaces before real line feeds are dropped, since they would make them soft.
std::string soft_wrap(std::string_view text, float width, const MeasureText& measure);

/// The text without its soft breaks.
std::string without_soft_breaks(std::string_view wrapped);

/// Where a place of the plain text is in the wrapped one; behind a soft break rather than before it.
std::size_t wrapped_place(std::string_view wrapped, std::size_t place);

/// The plain text and place of the cursor after an edit of a wrapped text.
struct PlainEdit {
    std::string text;
    std::size_t cursor = 0;
};

/// What a key that took away a soft break was meant to take away.
enum class Erased { nothing, before, after };

/// `before` was wrapped and became `after` by one typing, pasting or deleting, with the cursor now at
/// `cursor`. Soft breaks of `before` stay soft whatever now stands beside them; line feeds that came in are
/// real.
PlainEdit edit_of_wrapped(std::string_view before, std::string_view after, std::size_t cursor, Erased erased);

} // namespace steelyard
