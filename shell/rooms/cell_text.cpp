#include "shell/rooms/cell_text.hpp"

#include <algorithm>

namespace steelyard {
namespace {

/// Length of the space a text begins with, 0 if it begins with none.
std::size_t space_at(std::string_view text) {
    if (text.empty()) return 0;
    if (text[0] == ' ' || text[0] == '\t' || text[0] == '\r' || text[0] == '\n') return 1;
    if (text.substr(0, 2) == "\xC2\xA0") return 2;
    return text.substr(0, 3) == "\xE2\x80\xAF" || text.substr(0, 3) == "\xEF\xBB\xBF" ? 3 : 0;
}

bool ends_with_space(std::string_view text, std::size_t length) {
    return text.size() >= length && space_at(text.substr(text.size() - length)) == length;
}

} // namespace

std::string trimmed(std::string_view text) {
    while (const std::size_t length = space_at(text)) text.remove_prefix(length);
    for (bool any = true; any;) {
        any = false;
        for (const std::size_t length : {std::size_t{1}, std::size_t{2}, std::size_t{3}}) {
            if (!ends_with_space(text, length)) continue;
            text.remove_suffix(length);
            any = true;
        }
    }
    return std::string(text);
}

std::vector<std::vector<std::string>> read_cells(std::string_view text) {
    if (text.substr(0, 3) == "\xEF\xBB\xBF") text.remove_prefix(3);
    while (!text.empty() && (text.back() == '\n' || text.back() == '\r')) text.remove_suffix(1);
    std::vector<std::vector<std::string>> rows;
    if (text.empty()) return rows;
    const char separator = text.find('\t') != std::string_view::npos ? '\t' : ';';
    std::string cell;
    bool in_quotes = false;
    rows.emplace_back();
    for (std::size_t i = 0; i < text.size(); ++i) {
        const char c = text[i];
        if (in_quotes) {
            const bool twice = c == '"' && i + 1 < text.size() && text[i + 1] == '"';
            if (twice) ++i;
            if (c == '"' && !twice)
                in_quotes = false;
            else
                cell += c;
        } else if (c == '"' && trimmed(cell).empty()) {
            in_quotes = true;
            cell.clear();
        } else if (c == separator || c == '\n' || c == '\r') {
            rows.back().push_back(trimmed(cell));
            cell.clear();
            if (c != separator) rows.emplace_back();
            if (c == '\r' && i + 1 < text.size() && text[i + 1] == '\n') ++i;
        } else {
            cell += c;
        }
    }
    rows.back().push_back(trimmed(cell));
    return rows;
}

std::string safe_cell(std::string_view name) {
    std::string text = trimmed(name);
    std::replace_if(
        text.begin(), text.end(), [](char c) { return c == '\t' || c == '\n' || c == '\r'; }, ' ');
    if (!text.empty() && std::string_view("=+-@").find(text[0]) != std::string_view::npos)
        text.insert(text.begin(), '\'');
    if (text.find('"') == std::string::npos) return text;
    std::string quoted = "\"";
    for (const char c : text) quoted += c == '"' ? "\"\"" : std::string(1, c);
    return quoted + "\"";
}

} // namespace steelyard
