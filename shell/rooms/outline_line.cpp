#include "shell/rooms/outline_line.hpp"

#include <algorithm>
#include <array>
#include <utility>

#include "shell/words.hpp"

namespace steelyard {
namespace {

constexpr std::string_view no_break_space = "\xC2\xA0";

/// What word processors and mail programs put before the lines of a list; the last is Word's own, of its
/// private area.
constexpr std::array<std::string_view, 18> bullets{"-",
                                                   "*",
                                                   "+",
                                                   "\xE2\x80\xA2",
                                                   "\xE2\x80\x93",
                                                   "\xE2\x80\x94",
                                                   "\xC2\xB7",
                                                   "\xE2\x97\xA6",
                                                   "\xE2\x96\xAA",
                                                   "\xE2\x96\xAB",
                                                   "\xE2\x96\xA0",
                                                   "\xE2\x96\xA1",
                                                   "\xE2\x97\x8F",
                                                   "\xE2\x97\x8B",
                                                   "\xE2\x80\xA3",
                                                   "\xE2\x81\x83",
                                                   "\xE2\x9E\xA2",
                                                   "\xEF\x82\xB7"};

bool is_digit(char c) {
    return c >= '0' && c <= '9';
}
bool is_small_letter(char c) {
    return c >= 'a' && c <= 'z';
}

/// Bytes of white space at the beginning, 0 for none.
std::size_t space_at(std::string_view text) {
    if (text.starts_with(' ') || text.starts_with('\t')) return 1;
    return text.starts_with(no_break_space) ? no_break_space.size() : 0;
}

std::string_view trimmed_front(std::string_view text) {
    while (const std::size_t space = space_at(text)) text.remove_prefix(space);
    return text;
}

std::string_view trimmed_back(std::string_view text) {
    while (!text.empty()) {
        if (text.back() == ' ' || text.back() == '\t')
            text.remove_suffix(1);
        else if (text.ends_with(no_break_space))
            text.remove_suffix(no_break_space.size());
        else
            break;
    }
    return text;
}

std::string_view trimmed(std::string_view text) {
    return trimmed_front(trimmed_back(text));
}

/// Bytes of "1", "1.2", "1.2.3" at the beginning, and its parts.
std::pair<std::size_t, int> number_at(std::string_view text) {
    std::size_t end = 0;
    int parts = 0;
    while (end < text.size() && is_digit(text[end])) {
        ++parts;
        while (end < text.size() && is_digit(text[end])) ++end;
        if (end + 1 < text.size() && text[end] == '.' && is_digit(text[end + 1])) ++end;
    }
    return {end, parts};
}

/// What a line begins with.
struct Marker {
    std::size_t size = 0; ///< Bytes, without the white space after it; 0 for none.
    int parts = 0;        ///< Of a number.
    bool sure = true;     ///< False for "1.2", which may be a measure.
};

Marker counting_marker(std::string_view text) {
    const bool bracket = text.starts_with('(');
    const std::string_view inside = text.substr(bracket ? 1 : 0);
    auto [size, parts] = number_at(inside);
    if (size == 0) {
        while (size < inside.size() && size < 4 && is_small_letter(inside[size])) ++size;
        const bool roman = inside.substr(0, size).find_first_not_of("ivx") == std::string_view::npos;
        if (size == 0 || (size > 1 && !roman)) return {};
    }
    const std::string_view after = inside.substr(size);
    if (bracket) return after.starts_with(')') ? Marker{size + 2, parts} : Marker{};
    if (after.starts_with('.') || after.starts_with(')')) return {size + 1, parts};
    return parts > 1 ? Marker{size, parts, false} : Marker{};
}

Marker marker_of(std::string_view text) {
    Marker found = counting_marker(text);
    if (found.size == 0) {
        const auto bullet = std::find_if(bullets.begin(), bullets.end(),
                                         [&](std::string_view b) { return text.starts_with(b); });
        if (bullet != bullets.end())
            found.size = bullet->size();
        else if (text.starts_with("o\t")) // Word's second level.
            found.size = 1;
    }
    const bool stands_alone = found.size == text.size() || space_at(text.substr(found.size)) > 0;
    return stands_alone ? found : Marker{};
}

/// A cell as spreadsheets quote it: "Price, ""delivered""".
std::string unquoted(std::string_view cell) {
    if (cell.size() < 2 || !cell.starts_with('"') || !cell.ends_with('"')) return std::string(cell);
    std::string text;
    for (std::size_t i = 1; i + 1 < cell.size(); ++i) {
        text += cell[i];
        if (cell[i] == '"' && cell[i + 1] == '"' && i + 2 < cell.size()) ++i;
    }
    return text;
}

std::vector<std::string_view> cells_of(std::string_view text) {
    std::vector<std::string_view> cells;
    for (std::size_t from = 0; from <= text.size();) {
        const std::size_t tab = std::min(text.find('\t', from), text.size());
        cells.push_back(trimmed(text.substr(from, tab - from)));
        from = tab + 1;
    }
    return cells;
}

std::string joined(const std::vector<std::string_view>& cells) {
    std::string text;
    for (const auto cell : cells) {
        if (!cell.empty()) text += (text.empty() ? "" : " ") + unquoted(cell);
    }
    return text;
}

/// A number with what stands around it, at the end of a text.
struct Tail {
    std::string_view before; ///< What is left of the text, without separators.
    double value = 0;
    bool percent = false;
    bool marked = false; ///< A percent sign, a bracket or a separator says that it is a weight.
};

/// Bytes of a minus sign at the end of a text, the hyphen or the real one.
std::size_t minus_before(std::string_view text) {
    if (text.ends_with('-')) return 1;
    return text.ends_with("\xE2\x88\x92") ? 3 : 0;
}

/// Takes a colon, an equals sign, a bar or a dash off the end; false if there is none. A colon between digits
/// belongs to a ratio, a dash without a space before it to a word.
bool take_separator(std::string_view& text, bool spaced) {
    if (text.empty()) return false;
    if (std::string_view("=;|").find(text.back()) != std::string_view::npos || text.back() == ':') {
        const bool ratio =
            text.back() == ':' && !spaced && text.size() > 1 && is_digit(text[text.size() - 2]);
        if (!ratio) text.remove_suffix(1);
        return !ratio;
    }
    for (const std::string_view dash : {"-", "\xE2\x80\x93", "\xE2\x80\x94"}) {
        if (text.ends_with(dash) && spaced) {
            const std::string_view rest = text.substr(0, text.size() - dash.size());
            if (trimmed_back(rest).size() < rest.size()) {
                text = rest;
                return true;
            }
        }
    }
    return false;
}

/// The digits a text ends in, with one decimal mark among them; empty if there are none, or more marks.
std::string_view digits_at_end(std::string_view text) {
    std::size_t begin = text.size();
    while (begin > 0 && (is_digit(text[begin - 1]) || text[begin - 1] == '.' || text[begin - 1] == ','))
        --begin;
    std::string_view digits = text.substr(begin);
    if (digits.starts_with(',')) digits.remove_prefix(1); // The separator of "Price,40".
    const auto marks =
        digits.size() - static_cast<std::size_t>(std::count_if(digits.begin(), digits.end(), is_digit));
    const bool plain = !digits.empty() && is_digit(digits.back()) && marks <= 1 && marks < digits.size();
    return plain ? digits : std::string_view{};
}

std::optional<Tail> number_tail(std::string_view text) {
    Tail tail;
    const bool bracket = text.ends_with(')') || text.ends_with(']');
    if (bracket) text = trimmed_back(text.substr(0, text.size() - 1));
    tail.percent = text.ends_with('%');
    if (tail.percent) text = trimmed_back(text.substr(0, text.size() - 1));

    const std::string_view digits = digits_at_end(text);
    const auto value = digits.empty() ? std::nullopt : read_number(digits);
    if (!value) return std::nullopt;
    tail.value = *value;
    text.remove_suffix(digits.size());

    const std::string_view apart = trimmed_back(text);
    const std::size_t minus = apart.size() == text.size() ? minus_before(text) : 0;
    if (minus > 0) {
        const std::string_view rest = text.substr(0, text.size() - minus);
        const bool of_a_word = !rest.empty() && trimmed_back(rest).size() == rest.size() && !bracket &&
                               std::string_view(":=;|").find(rest.back()) == std::string_view::npos;
        if (of_a_word) return std::nullopt;
        tail.value = -tail.value;
        text = rest;
    }
    std::string_view name = trimmed_back(text);
    const bool spaced = name.size() < text.size();
    tail.marked = tail.percent;
    if (bracket) {
        if (!name.ends_with('(') && !name.ends_with('[')) return std::nullopt;
        name = trimmed_back(name.substr(0, name.size() - 1));
        tail.marked = true;
    } else if (take_separator(name, spaced)) {
        name = trimmed_back(name);
        tail.marked = true;
    } else if (name.ends_with(',')) {
        name = trimmed_back(name.substr(0, name.size() - 1));
    } else if (!spaced && !name.empty()) {
        return std::nullopt; // The end of a word: T480.
    }
    tail.before = name;
    return tail;
}

/// A cell that holds a number and nothing else.
std::optional<Tail> number_cell(std::string_view cell) {
    const auto tail = number_tail(cell);
    return tail && tail->before.empty() ? tail : std::nullopt;
}

} // namespace

std::vector<std::string_view> text_lines(std::string_view text) {
    if (text.starts_with("\xEF\xBB\xBF")) text.remove_prefix(3);
    std::vector<std::string_view> lines;
    while (!text.empty()) {
        const std::size_t end = std::min(text.find_first_of("\r\n"), text.size());
        lines.push_back(text.substr(0, end));
        text.remove_prefix(end);
        if (text.starts_with("\r\n"))
            text.remove_prefix(2);
        else if (!text.empty())
            text.remove_prefix(1);
    }
    return lines;
}

OutlineLine read_line(std::string_view text, std::size_t number) {
    OutlineLine line;
    line.number = number;
    while (const std::size_t space = space_at(text)) {
        const bool tab = text.front() == '\t';
        line.indent.narrow += 1;
        line.indent.wide += tab ? 8 - line.indent.wide % 8 : 1;
        text.remove_prefix(space);
    }
    line.text = trimmed_back(text);
    line.numbering = marker_of(line.text).parts;
    const auto cells = cells_of(line.text);
    line.columns = cells.size();
    line.last_column_is_number = cells.size() > 1 && number_cell(cells.back());
    return line;
}

void strip_marker(OutlineLine& line, bool numbered) {
    const Marker marker = marker_of(line.text);
    if (marker.size > 0 && (marker.sure || numbered))
        line.text = std::string(trimmed_front(std::string_view(line.text).substr(marker.size)));
}

void split_weight(OutlineLine& line, bool weights) {
    auto cells = cells_of(line.text);
    line.with_number = joined(cells);
    const bool own_column = cells.size() > 1 && number_cell(cells.back());
    const auto tail = own_column ? number_cell(cells.back()) : number_tail(line.with_number);
    line.ends_in_number = tail.has_value();
    const bool is_weight = weights && tail && (own_column || tail->marked || tail->value >= 0);
    if (is_weight) {
        line.weight = tail->value;
        line.percent = tail->percent;
        line.may_be_name = !own_column && !tail->marked;
    }
    if (is_weight && own_column) {
        cells.pop_back();
        const std::string name = joined(cells);
        std::string_view bare = name;
        take_separator(bare, false); // "Price:" in a column of its own.
        line.text = std::string(trimmed_back(bare));
    } else {
        line.text = is_weight ? std::string(tail->before) : line.with_number;
    }
}

} // namespace steelyard
