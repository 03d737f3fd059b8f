#include <vector>

#include "shell/rooms/weigh_table.hpp"
#include "shell/widgets/text.hpp"

namespace steelyard {
namespace {

constexpr float line = 18;
constexpr float sign_width = 16;
constexpr float gap = 14;

struct Meaning {
    PairMark mark;
    std::string words;
};

std::vector<Meaning> meanings(const PairTable& table) {
    bool far = false;
    bool little = false;
    bool circle = false;
    bool ranges = false;
    bool agreed = false;
    bool mean = false;
    for (std::size_t i = 0; i < table.size(); ++i) {
        for (std::size_t j = i + 1; j < table.size(); ++j) {
            const PairCell& cell = table.pair(i, j);
            far = far || cell.off == PairOff::far;
            little = little || cell.off == PairOff::little;
            circle = circle || !cell.circles.empty();
            ranges = ranges || !cell.ranges.empty();
            agreed = agreed || table.marked_agreed(i, j);
            mean = mean || cell.mean();
        }
    }
    std::vector<Meaning> list;
    const auto add = [&](bool any, PairMark mark, const char* words) {
        if (any) list.push_back({mark, words});
    };
    add(far, PairMark::far, "far off");
    add(little, PairMark::little, "a little off");
    add(circle, PairMark::circle, "in a circle");
    add(ranges, PairMark::ranges, "other ranges");
    add(mean, PairMark::mean, "of the judges");
    add(agreed, PairMark::agreed, "agreed");
    return list;
}

} // namespace

void draw_pair_mark(const Ui& ui, PairMark mark, ImVec2 middle) {
    const Theme& theme = ui.look();
    ImDrawList* list = ImGui::GetWindowDrawList();
    const float x = middle.x;
    const float y = middle.y;
    switch (mark) {
    case PairMark::far: list->AddTriangleFilled({x, y - 5}, {x + 5, y + 4}, {x - 5, y + 4}, theme.red); break;
    case PairMark::little:
        list->AddTriangle({x, y - 4}, {x + 4, y + 3}, {x - 4, y + 3}, theme.quiet, 1.4F);
        break;
    case PairMark::circle:
        list->AddCircle(middle, 3.6F, theme.red, 0, 1.6F);
        list->AddCircleFilled(middle, 1.2F, theme.red);
        break;
    case PairMark::ranges:
        // A span that has moved: two bars, one further on.
        list->AddRectFilled({x - 5, y - 3}, {x + 2, y - 1}, theme.brass_ink);
        list->AddRectFilled({x - 2, y + 1}, {x + 5, y + 3}, theme.brass_ink);
        break;
    case PairMark::agreed: list->AddRectFilled({x - 3, y - 3}, {x + 3, y + 3}, theme.steel, 1); break;
    case PairMark::mean:
        for (const float dx : {-4.0F, 0.0F, 4.0F}) list->AddCircleFilled({x + dx + 1, y}, 1.5F, theme.steel);
        break;
    }
}

float draw_mark_legend(Ui& ui, const PairTable& table, const Box& box, bool draw) {
    const auto list = meanings(table);
    if (list.empty()) return 0;
    float x = box.x;
    float y = box.y;
    for (const auto& [mark, words] : list) {
        const float width = sign_width + text_size(Font::small, words).x;
        if (x > box.x && x + width > box.right()) {
            x = box.x;
            y += line;
        }
        if (draw) {
            draw_pair_mark(ui, mark, {x + 6, y + line / 2});
            draw_text(
                ui, {x + sign_width, y + (line - font_size(Font::small)) / 2}, words,
                {.font = Font::small, .ink = ui.look().quiet, .max_width = box.right() - x - sign_width});
        }
        x += width + gap;
    }
    return y + line - box.y;
}

} // namespace steelyard
