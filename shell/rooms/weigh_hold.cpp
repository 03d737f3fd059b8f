#include "shell/rooms/weigh_hold.hpp"

#include <algorithm>

#include "core/decision/lookup.hpp"
#include "shell/rooms/size_button.hpp"
#include "shell/rooms/text_flow.hpp"
#include "shell/rooms/weigh_answers.hpp"
#include "shell/rooms/weigh_hold_words.hpp"
#include "shell/rooms/weigh_set_settings.hpp"
#include "shell/widgets/controls.hpp"
#include "shell/widgets/panels.hpp"
#include "shell/widgets/text.hpp"

namespace steelyard {
namespace {

constexpr std::size_t most_circles = 4;
constexpr float weight_line = 25;
constexpr float percent_width = 62;

ImU32 ink_of(const Theme& theme, HoldTone tone) {
    return tone == HoldTone::holds ? theme.green : tone == HoldTone::open ? theme.brass_ink : theme.red;
}

} // namespace

std::optional<ItemPair> HoldCard::draw(Ui& ui, const RoomView& view, Actions& actions, const SetResult& entry,
                                       Box box) {
    const Theme& theme = ui.look();
    const Card card(ui, box);
    Box inside = box.inset(16);
    Box head = inside.take_top(28);
    if (size_button(ui, "hold-large", "the card", large_, head)) large_ = !large_;
    draw_text(ui, {head.x, head.y + 2}, "Does it hold together?",
              {.font = Font::strong, .ink = theme.quiet, .max_width = head.w});
    ScrollArea area(ui, "words", inside);
    const Box in = area.inner();
    // The place of the scroll bar is kept free, so that nothing moves when it comes.
    TextFlow flow(ui, in.x, in.y, inside.w - ImGui::GetStyle().ScrollbarSize - 6);
    const HoldWords words = hold_words(view, entry);
    flow.say(words.headline, Font::strong, ink_of(theme, words.tone), 2);
    flow.say(words.more, Font::small, theme.quiet);
    std::optional<ItemPair> result;
    if (!hidden_while_sealed(view, entry)) {
        actions.examine(entry.set, entry.by);
        flow.space(2);
        // Over the limit, what to correct comes first; the circles go with it.
        const bool over = over_limit(view.decision, entry);
        if (!over) draw_circles(ui, view, entry, flow);
        result = corrections_.draw(ui, view, actions, entry, flow);
        if (over) draw_circles(ui, view, entry, flow);
        draw_open(ui, view, entry, flow);
        if (entry.weights) draw_weights(ui, view, entry, flow);
        draw_terms(ui, view, entry, flow);
        draw_set_settings(ui, view, actions, settings_open_, flow);
        // Criteria can be weighed by points as well; that is chosen where the tree is built.
        if (const Node* node = find_node(view.decision.criteria, entry.set);
            node != nullptr && !node->is_leaf()) {
            const char* label = "Share out points instead";
            const Box row = flow.next(30, 4);
            if (button(ui, "to-points", label,
                       {row.x - 6, row.y, button_width(label, ButtonKind::link) + 4, 28}, ButtonKind::quiet))
                actions.go(RoomId::frame, entry.set);
        }
    }
    area.reach(flow.y());
    return result;
}

void HoldCard::draw_open(Ui& ui, const RoomView& view, const SetResult& entry, TextFlow& flow) {
    const std::string text = enough_sentence(view, entry);
    if (text.empty()) return;
    flow.say(text, Font::body, nothing_open_matters(view, entry) ? ui.look().green : 0, 4);
}

void HoldCard::draw_circles(Ui& ui, const RoomView& view, const SetResult& entry, TextFlow& flow) {
    if (entry.cycles.empty()) return;
    flow.space(4);
    if (over_limit(view.decision, entry))
        flow.say(entry.cycles.size() == 1 ? "Three answers run in a circle" : "Some answers run in circles",
                 Font::strong, ui.look().red, 2);
    const std::size_t most = all_circles_ ? entry.cycles.size() : most_circles;
    for (const auto& circle : circle_sentences(view.decision, entry, most))
        flow.say(circle, Font::body, 0, 2);
    flow.space(6);
    if (entry.cycles.size() <= most_circles) return;
    const char* label = all_circles_ ? "Only the first circles" : "Name all circles";
    const Box row = flow.next(30, 4);
    if (button(ui, "all-circles", label, {row.x - 6, row.y, button_width(label, ButtonKind::link) + 4, 28},
               ButtonKind::quiet))
        all_circles_ = !all_circles_;
}

void HoldCard::draw_weights(Ui& ui, const RoomView& view, const SetResult& entry, TextFlow& flow) {
    const Theme& theme = ui.look();
    const Decision& d = view.decision;
    flow.space(6);
    flow.say("What these answers give", Font::strong, theme.quiet);
    const float name_width = std::min(flow.width() * 0.46F, 300.0F);
    for (std::size_t i = 0; i < entry.items.size(); ++i) {
        const Box row = flow.next(weight_line, 0);
        const double weight = (*entry.weights)[i];
        draw_text(ui, row.at(), item_name(d, entry.set, entry.items[i]), {.max_width = name_width - 8});
        bar(ui, {row.x + name_width, row.y + 6, row.w - name_width - percent_width - 6, 8},
            static_cast<float>(weight), theme.steel);
        draw_text(ui, {row.right(), row.y}, percent_text(weight), {.align = Align::right});
    }
    const char* label = all_methods_ ? "Only the chosen method" : "By the other methods too";
    const Box row = flow.next(30, 4);
    if (button(ui, "all-methods", label, {row.x - 6, row.y, button_width(label, ButtonKind::link) + 4, 28},
               ButtonKind::quiet))
        all_methods_ = !all_methods_;
    if (!all_methods_) return;
    struct Column {
        const char* name;
        const std::optional<std::vector<double>>* weights;
    };
    const Column columns[] = {{"eigenvector", &entry.eigenvector},
                              {"geometric", &entry.geometric_mean},
                              {"columns", &entry.column_average}};
    constexpr float column_width = 78;
    // In a narrow card the names stand above their figures.
    const bool narrow = flow.width() < 3 * column_width + 90;
    const auto at = [&](const Box& line, int k) {
        return narrow ? line.x + line.w * static_cast<float>(k + 1) / 3
                      : line.right() - column_width * static_cast<float>(2 - k);
    };
    const Box head = flow.next(20, 0);
    for (int k = 0; k < 3; ++k)
        draw_text(ui, {at(head, k), head.y}, columns[k].name,
                  {.font = Font::small, .ink = theme.quiet, .align = Align::right});
    for (std::size_t i = 0; i < entry.items.size(); ++i) {
        Box line = flow.next(22, 0);
        draw_text(ui, line.at(), item_name(d, entry.set, entry.items[i]),
                  {.font = Font::small, .max_width = narrow ? line.w : line.w - 3 * column_width - 4});
        if (narrow) line = flow.next(20, 2);
        for (int k = 0; k < 3; ++k) {
            const auto& weights = *columns[k].weights;
            draw_text(ui, {at(line, k), line.y}, weights ? percent_text((*weights)[i]) : "\xE2\x80\x94",
                      {.font = Font::small, .align = Align::right});
        }
    }
    if (!entry.column_average)
        flow.say("Columns can be averaged only where no pair is missing.", Font::small, theme.quiet);
    flow.space(6);
}

void HoldCard::draw_terms(Ui& ui, const RoomView& view, const SetResult& entry, TextFlow& flow) const {
    const Theme& theme = ui.look();
    flow.space(6);
    flow.say("The figures of the trade", Font::strong, theme.quiet);
    for (const auto& term : hold_terms(view.decision, entry)) {
        Box line = flow.next(line_step(Font::body), 0);
        draw_text(ui, {line.x, line.y}, term.name, {.max_width = line.w});
        const float together =
            text_size(Font::body, term.name).x + 10 + text_size(Font::strong, term.value).x;
        if (together > line.w) line = flow.next(line_step(Font::body), 0);
        draw_text(ui, {line.right(), line.y}, term.value, {.font = Font::strong, .align = Align::right});
        flow.say(term.meaning, Font::small, theme.quiet, 8);
    }
    for (const auto& sentence : worst_triad_sentences(view, entry)) flow.say(sentence, Font::small, 0, 0);
    if (!entry.tied_cycles.empty()) flow.space(8);
    for (const auto& sentence : tied_circle_sentences(view.decision, entry, most_circles))
        flow.say(sentence, Font::small, theme.quiet, 0);
    flow.space(8);
}

} // namespace steelyard
