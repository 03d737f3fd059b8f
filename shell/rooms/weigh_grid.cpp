#include "shell/rooms/weigh_grid.hpp"

#include <algorithm>
#include <cmath>
#include <cstdio>

#include "core/decision/lookup.hpp"
#include "shell/widgets/controls.hpp"
#include "shell/widgets/panels.hpp"
#include "shell/widgets/text.hpp"
#include "shell/words.hpp"

namespace steelyard {

std::optional<ItemPair> PairGrid::draw(Ui& ui, const RoomView& view, Actions&, const SetResult& entry,
                                       const ItemPair& chosen, Box box) {
    const Theme& theme = ui.look();
    std::optional<ItemPair> result;
    const Card card(ui, box);
    Box inside = box.inset(16);
    draw_text(ui, inside.take_top(28).at(), "All pairs of this set",
              {.font = Font::strong, .ink = theme.quiet});
    ScrollArea area(ui, "grid", inside);
    const Box in = area.inner();
    const std::size_t n = entry.items.size();
    const auto columns = static_cast<float>(std::max<std::size_t>(n - 1, 1));
    const float names = std::clamp(in.w - 58 * columns, 84.0f, 160.0f);
    const float cell = std::clamp((in.w - names - 4) / columns, 50.0f, 76.0f);
    for (std::size_t j = 1; j < n; ++j) {
        const float x = in.x + names + cell * static_cast<float>(j - 1);
        draw_text(ui, {x + cell / 2, in.y}, item_name(view.decision, entry.set, entry.items[j]),
                  {.font = Font::small, .ink = theme.quiet, .max_width = cell - 6, .align = Align::centre});
    }
    float y = in.y + 22;
    for (std::size_t i = 0; i + 1 < n; ++i) {
        draw_text(ui, {in.x, y + 11}, item_name(view.decision, entry.set, entry.items[i]),
                  {.max_width = names - 8});
        for (std::size_t j = i + 1; j < n; ++j) {
            const ItemPair pair{entry.items[i], entry.items[j]};
            const Box at{in.x + names + cell * static_cast<float>(j - 1) + 2, y, cell - 4, 42};
            const auto own = said_ratio(view.decision, entry.set, view.person, pair[0], pair[1]);
            const auto agreed = said_ratio(view.decision, entry.set, Id{}, pair[0], pair[1]);
            const auto said = agreed ? agreed : own;
            const bool missing = std::any_of(entry.missing.begin(), entry.missing.end(),
                                             [&](const auto& p) { return p == pair; });
            const std::string words = misfit_words(entry, pair[0], pair[1]);
            const bool far = words == "far off";
            const ImU32 ground = missing ? theme.card : far ? theme.red_wash : theme.rail;
            ImDrawList* list = ImGui::GetWindowDrawList();
            list->AddRectFilled(at.at(), at.end(), ground, 6);
            if (missing) list->AddRect(at.at(), at.end(), theme.edge, 6);
            if (pair == chosen) list->AddRect(at.at(), at.end(), theme.brass, 6, 0, 2.5f);
            if (far && pair != chosen) list->AddRect(at.at(), at.end(), theme.red, 6, 0, 1.5f);
            // A mean of several judges has no single answer behind it: what the group's matrix holds is
            // shown.
            std::string text = "\xE2\x80\x94";
            if (const auto shown = said ? said : group_ratio(entry, pair[0], pair[1]))
                text = ratio_text(*shown);
            const std::string label = item_name(view.decision, entry.set, pair[0]) + " against " +
                                      item_name(view.decision, entry.set, pair[1]);
            const OnPaper paper(ui, ground);
            if (press_area(ui, "cell/" + pair[0] + "/" + pair[1], label, at, "gridcell",
                           missing ? "open" : text))
                result = pair;
            const bool two = !words.empty();
            draw_text(ui, {at.x + at.w / 2, at.y + (two ? 4.0f : 11.0f)}, text,
                      {.font = far ? Font::strong : Font::body,
                       .ink = missing ? theme.brass_ink : theme.ink,
                       .align = Align::centre});
            if (two) {
                draw_text(ui, {at.x + at.w / 2, at.y + 23}, words,
                          {.font = Font::small,
                           .ink = far ? theme.red : theme.quiet,
                           .max_width = at.w - 4,
                           .align = Align::centre});
            }
        }
        y += 48;
    }
    area.reach(y);
    area.reach_right(in.x + names + cell * static_cast<float>(n - 1));
    return result;
}

} // namespace steelyard
