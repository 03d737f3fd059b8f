#include <algorithm>

#include "core/decision/lookup.hpp"
#include "shell/rooms/gauge_cards.hpp"
#include "shell/rooms/gauge_entries.hpp"
#include "shell/rooms/gauge_look.hpp"
#include "shell/rooms/gauge_plot.hpp"
#include "shell/widgets/panels.hpp"
#include "shell/widgets/text.hpp"

namespace steelyard::gauge {
namespace {

const MustResult* result_of(const Results& results, const Id& must, const Id& option) {
    const auto found = std::find_if(results.musts.begin(), results.musts.end(), [&](const MustResult& r) {
        return r.requirement == must && r.option == option;
    });
    return found == results.musts.end() ? nullptr : &*found;
}

Plot plot_of(const RoomView& view, const Requirement& must, const Id& option) {
    Plot plot;
    plot.name = requirement_name(view.decision, must.id) + ": " + limit_words(must);
    for (const auto& limit : {must.min_worth, must.at_least, must.at_most}) {
        if (limit) plot.limits.push_back(*limit);
    }
    for (std::size_t o = 0; o < view.decision.options.size(); ++o) {
        const Id& id = view.decision.options[o].id;
        const MustResult* result = result_of(view.results, must.id, id);
        if (result == nullptr || !result->value) continue;
        PlotMark mark{.index = o,
                      .figure = *result->value,
                      .in_play = in_play(view.results, id),
                      .chosen = id == option};
        if (!must.criterion.empty()) {
            if (const Figure* figure = standing_figure(view.decision, must.criterion, id)) {
                mark.low = figure->low;
                mark.high = figure->high;
            }
        } else if (const Check* check = standing_check(view.decision, must.id, id)) {
            mark.low = check->low;
            mark.high = check->high;
        }
        plot.marks.push_back(mark);
    }
    return plot;
}

/// One line for each option: where it stands.
void list_options(Ui& ui, const RoomView& view, const Requirement& must, Form& form) {
    for (std::size_t o = 0; o < view.decision.options.size(); ++o) {
        const Option& option = view.decision.options[o];
        const Box at = form.rest();
        const MustResult* result = result_of(view.results, must.id, option.id);
        const MustState state = result != nullptr ? result->state : MustState::unchecked;
        option_mark(ui, at.at(), o, in_play(view.results, option.id), 20);
        const Words words =
            option.withdrawn ? Words{"withdrawn", Tone::quiet} : Words{must_words(state), must_tone(state)};
        draw_text(ui, {at.x + 28, at.y + 1}, option_name(view.decision, option.id),
                  {.max_width = at.w - 120});
        draw_text(ui, {at.right(), at.y + 1}, words.text,
                  {.font = Font::strong, .ink = ink_of(ui.look(), words.tone), .align = Align::right});
        form.space(26);
    }
}

} // namespace

void draw_must_card(Ui& ui, const RoomView& view, Actions& actions, const Requirement& must, const Id& option,
                    Box box) {
    const Card card(ui, box);
    const Box inside = card_title(ui, box, "Must: " + requirement_name(view.decision, must.id));
    ScrollArea area(ui, "gauge-must", {inside.x - 4, inside.y - 4, inside.w + 8, inside.h + 8});
    const Box inner = area.inner();
    Form form(ui, view, actions, {inner.x + 4, inner.y + 4, inner.w - 8, inside.h});
    const std::string limit = limit_words(must);
    if (must.yes_no) {
        list_options(ui, view, must, form);
    } else if (limit.empty()) {
        form.sentence("No limit is set yet, so nothing can be checked.", Tone::open);
    } else {
        const Plot plot = plot_of(view, must, option);
        const float height = std::clamp(inside.h - 64, 92.0F, 170.0F);
        draw_plot(ui, plot, {form.rest().x, form.rest().y, form.rest().w, height});
        form.space(height + 6);
        form.sentence((must.unit.empty() ? limit : limit + " " + must.unit) +
                      "; the limit itself is allowed.");
    }
    if (must.waived) {
        const std::string by =
            must.waived->by.empty() ? "" : " by " + person_name(view.decision, must.waived->by);
        form.sentence("Waived" + by + (must.waived->why.empty() ? "." : ": " + must.waived->why));
    }
    if (must.safety)
        form.sentence(
            "For safety's sake: to be decided by licensed people under the codes that hold on site. This "
            "program checks no safety.");
    if (form.link("must-in-frame", "Change the must in Frame")) actions.go(RoomId::frame, must.id);
    area.reach(form.bottom());
}

} // namespace steelyard::gauge
