#include "shell/rooms/weigh_cards.hpp"

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

std::optional<Id> draw_set_list(Ui& ui, const RoomView& view, const Id& chosen, Box box) {
    const Theme& theme = ui.look();
    std::optional<Id> result;
    draw_text(ui, {box.x + 6, box.y + 2}, "Sets to judge", {.font = Font::strong, .ink = theme.quiet});
    box.take_top(32);
    ScrollArea area(ui, "sets", box);
    const Box in = area.inner();
    float y = in.y;
    for (const auto& group : view.results.sets) {
        if (!group.by.empty()) continue;
        const SetResult& entry = *shown_entry(view.results, group.set, view.person);
        const SetState state = state_of(view.decision, entry);
        const Box row{in.x + 1, y, in.w - 6, 50};
        const bool here = group.set == chosen;
        const OnPaper paper(ui, here ? theme.card : theme.paper);
        if (here) {
            ImDrawList* list = ImGui::GetWindowDrawList();
            list->AddRectFilled(row.at(), row.end(), theme.card, 8);
            list->AddRect(row.at(), row.end(), theme.brass, 8, 0, 2);
        }
        const Node* node = find_node(view.decision.criteria, group.set);
        std::string name = node_name(view.decision, group.set);
        if (node->is_leaf()) name += node->rate == RateBy::grade ? ": grades" : ": options";
        if (press_area(ui, "set/" + group.set, name, row, "tab", state.word)) result = group.set;
        const ImU32 ink = state.contradicts ? theme.red : theme.ink;
        const ImVec2 ratio = draw_text(
            ui, {row.right() - 10, row.y + 6}, state.ratio,
            {.font = state.contradicts ? Font::strong : Font::body, .ink = ink, .align = Align::right});
        draw_text(ui, {row.x + 10, row.y + 6}, name,
                  {.font = here ? Font::strong : Font::body, .max_width = row.w - 30 - ratio.x});
        const std::string count = entry.from_points
                                      ? "points"
                                      : std::to_string(state.judged) + " of " + std::to_string(state.pairs);
        draw_text(ui, {row.x + 10, row.y + 28}, count, {.font = Font::small, .ink = theme.quiet});
        draw_text(ui, {row.right() - 10, row.y + 28}, state.word,
                  {.font = Font::small,
                   .ink = state.contradicts ? theme.red
                          : state.open      ? theme.brass_ink
                                            : theme.quiet,
                   .align = Align::right});
        y += 56;
    }
    area.reach(y);
    return result;
}

std::optional<ItemPair> draw_grid(Ui& ui, const RoomView& view, const SetResult& entry,
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

std::optional<ItemPair> draw_consistency(Ui& ui, const RoomView& view, const SetResult& entry, Box box) {
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

void draw_points(Ui& ui, const RoomView& view, const SetResult& entry, Actions& actions, Box box) {
    const Theme& theme = ui.look();
    const Decision& d = view.decision;
    const Card card(ui, box);
    Box inside = box.inset(20);
    const std::string who = view.person.empty() ? "agreed in the room" : person_name(d, view.person);
    draw_text(ui, inside.take_top(30).at(), "Points for " + node_name(d, entry.set),
              {.font = Font::heading, .max_width = inside.w});
    draw_text(ui, inside.take_top(34).at(),
              "Share out as many as you like; only their proportions count. These are " + who + ".",
              {.ink = theme.quiet, .max_width = inside.w});
    const PointsEntry* last = nullptr;
    for (const auto& p : d.points) {
        if (p.set == entry.set && p.by == view.person) last = &p;
    }
    const auto points_of = [&](const Id& id) {
        if (last == nullptr) return 0.0;
        for (const auto& [item, value] : last->points) {
            if (item == id) return value;
        }
        return 0.0;
    };
    ScrollArea area(ui, "points", inside);
    const Box in = area.inner();
    float y = in.y;
    double sum = 0;
    for (const auto& item : entry.items) sum += points_of(item);
    const float name_width = std::clamp(in.w * 0.34f, 120.0f, 260.0f);
    for (std::size_t i = 0; i < entry.items.size(); ++i) {
        const Id& item = entry.items[i];
        const std::string name = item_name(d, entry.set, item);
        draw_text(ui, {in.x, y + 2}, name, {.font = Font::strong, .max_width = name_width - 10});
        draw_text(ui, {in.x, y + 23}, range_at_stake(d, view.results, entry.set, item),
                  {.font = Font::small, .ink = theme.quiet, .max_width = name_width - 10});
        const std::string value = last == nullptr ? "" : figure_text(points_of(item));
        if (const auto typed = text_field(ui, "points/" + item, "Points for " + name, value,
                                          {in.x + name_width, y + 4, 84, 34}, "0")) {
            const auto number = read_number(*typed);
            if (!number || *number < 0) {
                actions.say("\"" + *typed + "\" is no number of points.");
            } else {
                PointsEntry next;
                next.set = entry.set;
                next.by = view.person;
                for (const auto& other : entry.items)
                    next.points.emplace_back(other, other == item ? *number : points_of(other));
                actions.edit(Enter<PointsEntry>{std::move(next)});
            }
        }
        const double share = sum > 0 ? points_of(item) / sum : 0;
        bar(ui, {in.x + name_width + 100, y + 17, std::max(20.0f, in.w - name_width - 180), 8},
            static_cast<float>(share), theme.steel);
        draw_text(ui, {in.right() - 4, y + 11}, percent(share), {.align = Align::right});
        y += 54;
    }
    rule(ui, in.x, y, in.w);
    draw_text(ui, {in.x, y + 10}, "Together", {.font = Font::strong});
    draw_text(ui, {in.x + name_width + 10, y + 10}, figure_text(sum), {.font = Font::strong});
    y += 44;
    if (entry.weights && (last == nullptr || !view.person.empty())) {
        draw_text(ui, {in.x, y},
                  view.person.empty() ? "What the judges' points give together"
                                      : "What counts in the standing",
                  {.font = Font::strong, .ink = theme.quiet});
        y += 26;
        const SetResult& group = *group_entry(view.results, entry.set);
        for (std::size_t i = 0; group.weights && i < group.items.size(); ++i) {
            draw_text(ui, {in.x, y}, item_name(d, entry.set, group.items[i]), {.max_width = name_width - 10});
            draw_text(ui, {in.x + name_width + 84, y}, percent((*group.weights)[i]), {.align = Align::right});
            y += 25;
        }
    }
    area.reach(y + 6);
}

} // namespace steelyard
