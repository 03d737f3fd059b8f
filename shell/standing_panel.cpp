#include <algorithm>
#include <cmath>
#include <numeric>

#include "core/decision/lookup.hpp"
#include "shell/app_state.hpp"
#include "shell/sentences.hpp"
#include "shell/widgets/panels.hpp"
#include "shell/widgets/text.hpp"
#include "shell/words.hpp"

namespace steelyard {
namespace {

std::size_t place_of(const Decision& d, const Id& option) {
    const auto found =
        std::find_if(d.options.begin(), d.options.end(), [&](const Option& o) { return o.id == option; });
    return static_cast<std::size_t>(found - d.options.begin());
}

/// One option of the ranking; returns the height used.
float draw_ranked(Ui& ui, const RoomView& view, std::size_t o, const Box& box) {
    const Theme& theme = ui.look();
    const Id& id = view.results.options[o];
    const std::size_t place = place_of(view.decision, id);
    draw_text(ui, {box.x, box.y + 2}, std::to_string(view.results.ranks[o]), {.font = Font::strong});
    option_mark(ui, {box.x + 22, box.y}, place);
    const std::string points = points_text(view.results.scores[o]);
    const ImVec2 size =
        draw_text(ui, {box.right(), box.y + 2}, points, {.font = Font::strong, .align = Align::right});
    draw_text(ui, {box.x + 54, box.y + 2}, option_name(view.decision, id),
              {.max_width = box.w - 54 - size.x - 10});
    const Box line{box.x + 22, box.y + 30, box.w - 22, 8};
    bar(ui, line, static_cast<float>(view.results.scores[o]), option_colour(theme, place));
    for (const auto& [ranged, range] : view.results.ranges) {
        if (ranged != id) continue;
        // What is missing moves the score within this span.
        const float left = line.x + static_cast<float>(range[0]) * line.w;
        const float right = line.x + static_cast<float>(range[1]) * line.w;
        ImDrawList* list = ImGui::GetWindowDrawList();
        const float y = line.y + line.h / 2;
        list->AddRectFilled({left, y - 1}, {right, y + 1}, theme.ink);
        list->AddRectFilled({left, y - 5}, {left + 2, y + 5}, theme.ink);
        list->AddRectFilled({right - 2, y - 5}, {right, y + 5}, theme.ink);
    }
    return 56;
}

/// What the judgments pay, at the option in first place; returns the height used.
float draw_rates(Ui& ui, const RoomView& view, const Box& box) {
    const auto rates = rate_words(view.decision, view.results);
    if (rates.empty()) return 0;
    const Theme& theme = ui.look();
    float y = box.y;
    rule(ui, box.x, y, box.w);
    y += 12;
    draw_text(ui, {box.x, y}, "You pay", {.font = Font::strong, .ink = theme.quiet});
    y += 26;
    for (const auto& rate : rates) {
        draw_text(ui, {box.x, y}, rate.amount, {.font = Font::strong, .max_width = box.w});
        y += 20;
        y += draw_paragraph(ui, {box.x, y}, box.w, rate.what, {.font = Font::small, .ink = theme.quiet}) + 6;
    }
    draw_text(ui, {box.x, y}, "Would you?", {.font = Font::strong, .ink = theme.steel, .max_width = box.w});
    return y + 28 - box.y;
}

} // namespace

void draw_standing(Ui& ui, const RoomView& view, Box box) {
    const Theme& theme = ui.look();
    ImDrawList* list = ImGui::GetWindowDrawList();
    list->AddRectFilled(box.at(), box.end(), theme.paper);
    list->AddRectFilled(box.at(), {box.x + 1, box.bottom()}, theme.line);
    Box inside{box.x + 18, box.y + 14, box.w - 30, box.h - 20};
    const Box foot = inside.take_bottom(22, 10);
    draw_text(ui, foot.at(), "Ranks preferences; checks no safety.",
              {.font = Font::small, .ink = theme.quiet, .max_width = foot.w});
    ScrollArea area(ui, "standing-panel", inside);
    Box in = area.inner();
    in.w -= 4;
    const Results& results = view.results;
    draw_text(ui, in.at(), "Standing", {.font = Font::strong, .ink = theme.quiet});
    draw_text(ui, {in.right(), in.y + 1}, "points of 100",
              {.font = Font::small, .ink = theme.quiet, .align = Align::right});
    float y = in.y + 34;
    if (results.provisional && !results.options.empty()) {
        y += draw_paragraph(ui, {in.x, y}, in.w, "Provisional: something that counts is still open.",
                            {.font = Font::small, .ink = theme.brass_ink});
        y += 8;
    }
    std::vector<std::size_t> order(results.options.size());
    std::iota(order.begin(), order.end(), std::size_t{0});
    std::stable_sort(order.begin(), order.end(),
                     [&](std::size_t a, std::size_t b) { return results.scores[a] > results.scores[b]; });
    for (const std::size_t o : order) y += draw_ranked(ui, view, o, {in.x, y, in.w, 0});
    if (results.options.empty()) {
        y += draw_paragraph(ui, {in.x, y}, in.w,
                            view.decision.options.empty()
                                ? "No options yet. The ranking shows here as soon as there are some."
                                : "No option is in play.",
                            {.ink = theme.quiet});
    }
    if (!results.excluded.empty()) {
        rule(ui, in.x, y, in.w);
        y += 12;
        for (const auto& exclusion : results.excluded) {
            option_mark(ui, {in.x, y}, place_of(view.decision, exclusion.option), false);
            draw_text(ui, {in.x + 32, y + 2}, option_name(view.decision, exclusion.option) + " excluded",
                      {.ink = theme.quiet, .max_width = in.w - 32});
            y += 26;
            y += draw_paragraph(ui, {in.x + 32, y}, in.w - 32, exclusion_reason(view.decision, exclusion),
                                {.font = Font::small, .ink = theme.quiet});
            y += 8;
        }
    }
    if (results.options.size() > 1) {
        rule(ui, in.x, y, in.w);
        y += 12;
        const std::string money = lead_in_money_words(view.decision, results);
        y += draw_paragraph(ui, {in.x, y}, in.w,
                            standing_sentence(view.decision, results) +
                                (money.empty() ? "." : ", " + money + "."));
        y += draw_rates(ui, view, {in.x, y + 10, in.w, 0});
    }
    area.reach(y + 8);
}

} // namespace steelyard
