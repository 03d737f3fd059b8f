#include "shell/rooms/weigh_hold.hpp"

#include <algorithm>
#include <cmath>
#include <cstdio>

#include "core/decision/lookup.hpp"
#include "shell/widgets/controls.hpp"
#include "shell/widgets/panels.hpp"
#include "shell/widgets/text.hpp"
#include "shell/words.hpp"

namespace steelyard {
namespace {

std::string percent(double weight) {
    char buffer[32];
    std::snprintf(buffer, sizeof buffer, "%.1f %%", 100 * weight);
    return buffer;
}

std::string digits(const char* format, double value) {
    char buffer[64];
    std::snprintf(buffer, sizeof buffer, format, value);
    return buffer;
}

const char* table_name(RandomIndexTable table) {
    return table == RandomIndexTable::saaty_1980 ? "Saaty 1980" : "Alonso and Lamata 2006";
}

/// The headline of a set, and the ink it is said in.
struct Headline {
    std::string text;
    ImU32 ink;
};

Headline headline(const Theme& theme, const Decision& d, const SetResult& entry) {
    const SetState state = state_of(d, entry);
    if (!entry.weights) {
        return {entry.parts.size() > 1 ? "These answers do not hang together yet"
                                       : "This method needs every pair",
                theme.brass_ink};
    }
    if (state.contradicts) return {"Some answers contradict each other", theme.red};
    if (!entry.cycles.empty()) return {"Three answers run in a circle", theme.red};
    if (!entry.cr) return {"Nothing here can contradict", theme.green};
    return {"These answers hold together", theme.green};
}

} // namespace

std::optional<ItemPair> HoldCard::draw(Ui& ui, const RoomView& view, Actions&, const SetResult& entry,
                                       Box box) {
    const Theme& theme = ui.look();
    const Decision& d = view.decision;
    std::optional<ItemPair> result;
    const Headline head = headline(theme, d, entry);
    const Card card(ui, box);
    Box inside = box.inset(16);
    draw_text(ui, inside.take_top(28).at(), "Does it hold together?",
              {.font = Font::strong, .ink = theme.quiet});
    ScrollArea area(ui, "words", inside);
    const Box in = area.inner();
    const float w = in.w - 4;
    float y = in.y;
    y += draw_paragraph(ui, {in.x, y}, w, head.text, {.font = Font::strong, .ink = head.ink}) + 2;
    const auto say = [&](const std::string& text, Font font, ImU32 ink) {
        y += draw_paragraph(ui, {in.x, y}, w, text, {.font = font, .ink = ink});
    };
    if (entry.parts.size() > 1) {
        for (const auto& part : entry.parts) {
            std::string names;
            for (const auto& item : part)
                names += (names.empty() ? "" : ", ") + item_name(d, entry.set, item);
            say("\xE2\x80\xA2 " + names, Font::body, theme.ink);
        }
        say("No answer links these with each other.", Font::small, theme.quiet);
    }
    const bool contradicts = entry.cr && *entry.cr > d.settings.limit;
    if (contradicts && !entry.misfits.empty() && entry.misfits.front().implied) {
        const Misfit& worst = entry.misfits.front();
        say((view.person.empty() ? "It was said that " : "You said ") +
                pair_sentence(d, entry.set, worst.a, worst.b, worst.given) + ".",
            Font::body, theme.ink);
        say("The other answers say " + pair_sentence(d, entry.set, worst.a, worst.b, *worst.implied) + ".",
            Font::body, theme.ink);
        const std::string label = "Look at this pair";
        if (button(ui, "look", label, {in.x, y + 4, button_width(label), 32}))
            result = ItemPair{worst.a, worst.b};
        y += 44;
    }
    for (const auto& c : entry.cycles) {
        say(item_name(d, entry.set, c[0]) + " over " + item_name(d, entry.set, c[1]) + ", " +
                item_name(d, entry.set, c[1]) + " over " + item_name(d, entry.set, c[2]) + ", yet " +
                item_name(d, entry.set, c[2]) + " over " + item_name(d, entry.set, c[0]) + ".",
            Font::body, theme.ink);
    }
    if (entry.cr) {
        say("Consistency ratio CR " + digits("%.3f", *entry.cr) + ", limit " +
                digits("%.2f", d.settings.limit) + " \xC2\xB7 CI " + digits("%.3f", *entry.ci) +
                " \xC2\xB7 RI " + digits("%.3f", *entry.ri) + " (" + table_name(d.settings.random_index) +
                (entry.missing.empty() ? ")" : ", fewer for missing pairs)"),
            Font::small, theme.quiet);
    } else if (entry.weights) {
        say(entry.items.size() <= 2
                ? "Two items have no consistency ratio: one answer cannot contradict itself."
                : "CR \xE2\x80\x94: there are just enough answers, or the table of random indices ends "
                  "before.",
            Font::small, theme.quiet);
    }
    if (entry.weights) {
        y += 10;
        draw_text(ui, {in.x, y}, "What these answers give", {.font = Font::strong, .ink = theme.quiet});
        y += 26;
        for (std::size_t i = 0; i < entry.items.size(); ++i) {
            const double weight = (*entry.weights)[i];
            const float name_width = std::min(w * 0.42f, 170.0f);
            draw_text(ui, {in.x, y}, item_name(d, entry.set, entry.items[i]), {.max_width = name_width - 8});
            bar(ui, {in.x + name_width, y + 6, w - name_width - 66, 8}, static_cast<float>(weight),
                theme.steel);
            draw_text(ui, {in.x + w, y}, percent(weight), {.align = Align::right});
            y += 25;
        }
    }
    area.reach(y + 4);
    return result;
}

} // namespace steelyard
