#include "shell/widgets/soft_wrap.hpp"

#include <algorithm>

namespace steelyard {
namespace {

bool is_soft(std::string_view text, std::size_t i) {
    return i > 0 && text[i] == '\n' && text[i - 1] == ' ';
}

bool continues(char c) {
    return (static_cast<unsigned char>(c) & 0xC0) == 0x80;
}

void wrap_line(std::string_view line, float width, const MeasureText& measure, std::string& out) {
    float used = 0;
    for (std::size_t i = 0; i < line.size();) {
        const std::size_t word_end = std::min(line.find(' ', i), line.size());
        const std::size_t end = std::min(line.find_first_not_of(' ', word_end), line.size());
        const std::string_view word = line.substr(i, word_end - i);
        const float word_width = measure(word);
        if (used > 0 && used + word_width > width && out.back() == ' ') {
            out += '\n';
            used = 0;
        }
        out += line.substr(i, end - i);
        used += measure(line.substr(i, end - i));
        i = end;
    }
}

} // namespace

std::string soft_wrap(std::string_view text, float width, const MeasureText& measure) {
    std::string out;
    for (std::size_t from = 0; from <= text.size();) {
        const std::size_t feed = std::min(text.find('\n', from), text.size());
        std::string_view line = text.substr(from, feed - from);
        if (feed < text.size()) line = line.substr(0, line.find_last_not_of(' ') + 1);
        wrap_line(line, width, measure, out);
        if (feed < text.size()) out += '\n';
        from = feed + 1;
    }
    return out;
}

std::string without_soft_breaks(std::string_view wrapped) {
    std::string text;
    for (std::size_t i = 0; i < wrapped.size(); ++i) {
        if (!is_soft(wrapped, i)) text += wrapped[i];
    }
    return text;
}

std::size_t wrapped_place(std::string_view wrapped, std::size_t place) {
    std::size_t i = 0;
    for (std::size_t plain = 0; i < wrapped.size(); ++i) {
        if (is_soft(wrapped, i)) continue;
        if (plain == place) return i;
        ++plain;
    }
    return i;
}

PlainEdit edit_of_wrapped(std::string_view before, std::string_view after, std::size_t cursor,
                          Erased erased) {
    const std::size_t most = std::min(before.size(), after.size());
    std::size_t head = 0; // The bytes both begin with, not past the cursor where something was typed.
    while (head < most && before[head] == after[head]) ++head;
    if (after.size() > before.size())
        head = std::min(head, cursor - std::min(cursor, after.size() - before.size()));
    std::size_t tail = 0; // The bytes both end with.
    while (tail < most - head && before[before.size() - 1 - tail] == after[after.size() - 1 - tail]) ++tail;

    PlainEdit plain;
    for (std::size_t i = 0; i < after.size(); ++i) {
        if (i == cursor) plain.cursor = plain.text.size();
        const bool from_head = i < head;
        const bool from_tail = i >= after.size() - tail;
        const std::size_t was = from_head ? i : before.size() - (after.size() - i);
        if ((from_head || from_tail) && is_soft(before, was)) continue;
        if (after[i] == '\n' && !from_head && !from_tail) {
            while (!plain.text.empty() && plain.text.back() == ' ') plain.text.pop_back();
        }
        plain.text += after[i];
    }
    if (cursor >= after.size()) plain.cursor = plain.text.size();
    plain.cursor = std::min(plain.cursor, plain.text.size());

    const std::string_view gone = before.substr(head, before.size() - tail - head);
    if (gone != "\n" || !is_soft(before, head)) return plain;
    if (erased == Erased::before && plain.cursor > 0) {
        plain.text.erase(--plain.cursor, 1); // The space before the break.
    } else if (erased == Erased::after && plain.cursor < plain.text.size()) {
        std::size_t end = plain.cursor + 1;
        while (end < plain.text.size() && continues(plain.text[end])) ++end;
        plain.text.erase(plain.cursor, end - plain.cursor);
    }
    return plain;
}

} // namespace steelyard
