#include "shell/rooms/weigh_set_settings.hpp"

#include <string>
#include <utility>
#include <vector>

#include "core/decision/number_text.hpp"
#include "shell/rooms/weigh_hold_words.hpp"
#include "shell/widgets/controls.hpp"
#include "shell/words.hpp"

namespace steelyard {
namespace {

constexpr float field_height = 34;

const std::vector<std::string> methods{"Eigenvector: all chains of answers",
                                       "Geometric mean: rows multiplied",
                                       "Columns averaged: complete sets only"};
const std::vector<std::string> combines{"Answer by answer", "Each one's weights, multiplied",
                                        "Each one's weights, averaged"};
const std::vector<std::string> tables{"Alonso and Lamata, 2006", "Saaty, 1980"};

template<class Enum>
void pick(Ui& ui, TextFlow& flow, const char* id, const char* name, const char* caption,
          const std::vector<std::string>& labels, Enum& value) {
    flow.say(caption, Font::small, ui.look().quiet, 2);
    const Box box = flow.next(field_height, 8);
    if (const auto now = drop_down(ui, id, name, labels, static_cast<std::size_t>(value),
                                   {box.x + 2, box.y, box.w - 4, box.h}))
        value = static_cast<Enum>(*now);
}

} // namespace

void draw_set_settings(Ui& ui, const RoomView& view, Actions& actions, bool& open, TextFlow& flow) {
    const Settings& now = view.decision.settings;
    flow.say("Limit of CR " + figure_text(now.limit) + ", weights by " + method_name(now.method) +
                 ", random index of " + table_name(now.random_index) + ".",
             Font::small, ui.look().quiet);
    const char* label = open ? "Done" : "Change these settings";
    const Box row = flow.next(30, 8);
    if (button(ui, "set-settings", label, {row.x - 6, row.y, button_width(label, ButtonKind::link) + 4, 28},
               ButtonKind::quiet, !view.read_only))
        open = !open;
    if (!open || view.read_only) return;

    Settings changed = now;
    flow.say("They hold for every set.", Font::small, ui.look().quiet);
    flow.say("Answers hold together up to a consistency ratio (CR) of", Font::small, ui.look().quiet, 2);
    const Box limit = flow.next(field_height, 8);
    if (const auto typed = text_field(ui, "weigh-limit", "Limit of the consistency ratio",
                                      shortest_number(now.limit), {limit.x + 2, limit.y, 96, limit.h})) {
        const auto value = read_number(*typed);
        if (value && *value > 0)
            changed.limit = *value;
        else
            actions.say("The limit is a number above 0, such as 0.1; nothing was changed.");
    }
    pick(ui, flow, "weigh-table", "Random index table", "Random index: what answers at random would give",
         tables, changed.random_index);
    pick(ui, flow, "weigh-method", "Method", "How weights come from pairs", methods, changed.method);
    if (!view.decision.people.empty())
        pick(ui, flow, "weigh-combine", "Combine", "Several judges: what is combined", combines,
             changed.combine);
    if (changed != now) actions.edit(ChangeSettings{std::move(changed)});
}

} // namespace steelyard
