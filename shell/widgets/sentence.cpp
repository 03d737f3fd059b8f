#include "shell/widgets/sentence.hpp"

#include <algorithm>
#include <string>
#include <utility>
#include <vector>

namespace steelyard {
namespace {

std::vector<std::string> broken(std::string_view text, Font font, float width, std::size_t most) {
    std::vector<std::string> lines{""};
    std::size_t at = 0;
    while (at < text.size()) {
        const std::size_t end = std::min(text.find(' ', at), text.size());
        const std::string word(text.substr(at, end - at));
        at = end + 1;
        std::string& last = lines.back();
        if (last.empty()) {
            last = word;
        } else if (lines.size() == most || text_size(font, last + " " + word).x <= width) {
            last += " " + word;
        } else {
            lines.push_back(word);
        }
    }
    return lines;
}

/// The largest of the fonts in which each sentence takes one line.
Font fitting(const std::vector<std::string>& sentences, float width, Font largest, Font least) {
    for (const Font each : {Font::huge, Font::large, Font::heading, Font::strong, Font::body, Font::small}) {
        const float size = font_size(each);
        if (size > font_size(largest) || size < font_size(least)) continue;
        if (std::all_of(sentences.begin(), sentences.end(),
                        [&](const std::string& text) { return text_size(each, text).x <= width; }))
            return each;
    }
    return least;
}

} // namespace

float draw_sentence(Ui& ui, const Box& box, std::string_view text, Font largest, Font least,
                    std::size_t lines, ImU32 ink) {
    const Font font = fitting({std::string(text)}, box.w, largest, least);
    // Lines of about one length: the narrowest width that takes no line more.
    auto shown = broken(text, font, box.w, lines);
    for (float width = box.w * 0.95f; shown.size() > 1 && width > box.w / 3; width -= box.w * 0.05f) {
        auto narrower = broken(text, font, width, lines + 1);
        if (narrower.size() > shown.size()) break;
        shown = std::move(narrower);
    }
    float y = box.y;
    for (const auto& line : shown) {
        draw_text(ui, {box.x + box.w / 2, y}, line,
                  {.font = font, .ink = ink, .max_width = box.w, .align = Align::centre});
        y += line_step(font);
    }
    return y - box.y;
}

float draw_sentences(Ui& ui, const Box& box, const std::vector<std::string>& sentences, Font largest,
                     Font least, ImU32 ink) {
    const Font font = fitting(sentences, box.w, largest, least);
    float y = box.y;
    for (const auto& text : sentences) y += draw_sentence(ui, {box.x, y, box.w, 0}, text, font, font, 2, ink);
    return y - box.y;
}

} // namespace steelyard
