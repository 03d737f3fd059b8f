#include "shell/rooms/standing_lists.hpp"

#include <algorithm>

#include "core/decision/lookup.hpp"
#include "shell/rooms/growing_card.hpp"
#include "shell/sentences.hpp"
#include "shell/widgets/controls.hpp"
#include "shell/widgets/panels.hpp"
#include "shell/widgets/text.hpp"

namespace steelyard {
namespace {

constexpr float line_gap = 4;
constexpr std::size_t open_shown = 8;
constexpr std::size_t notices_shown = 8;
constexpr std::size_t stand_ins_shown = 4;
constexpr std::size_t ranges_shown = 3;

std::string id_of(const OpenItem& item) {
    std::string id = "standing/open-item/" + std::to_string(static_cast<int>(item.kind));
    for (const Id* part :
         {&item.set, &item.a, &item.b, &item.criterion, &item.option, &item.grade, &item.requirement})
        id += "/" + *part;
    return id;
}

/// One line of the list, with the room's name at its end. The whole line can be pressed.
float draw_open_item(Ui& ui, const RoomView& view, Actions& actions, const OpenItem& item,
                     const GrowingCard& card, float y) {
    const std::string sentence = open_sentence(view.decision, item);
    const std::string way = room_name(room_of(item)) + " \xE2\x80\xBA";
    const float way_width = text_size(Font::strong, way).x + 16;
    const float text_width = card.width() - way_width;
    const float height = paragraph_height(text_width, sentence, Font::body) + 10;
    const Box box{card.left() - 8, y, card.width() + 16, height};
    if (press_area(ui, id_of(item), sentence, box, "link", room_name(room_of(item))))
        actions.go(room_of(item), focus_of(item));
    draw_paragraph(ui, {card.left(), y + 5}, text_width, sentence);
    draw_text(ui, {card.right(), y + 5}, way,
              {.font = Font::strong, .ink = ui.look().steel, .align = Align::right});
    return y + height;
}

/// The mark of an option that takes no part, and its name. Gives where lines about it begin.
ImVec2 draw_absent(Ui& ui, const Decision& decision, std::size_t option, const GrowingCard& card, float y,
                   std::string_view why) {
    option_mark(ui, {card.left(), y}, option, false);
    const float x = card.left() + 32;
    const std::string name = option_name(decision, decision.options[option].id);
    const float why_width = why.empty() ? 0 : text_size(Font::body, why).x + 12;
    const float name_y = y + (22 - font_size(Font::strong)) / 2;
    const ImVec2 shown =
        draw_text(ui, {x, name_y}, name, {.font = Font::strong, .max_width = card.right() - x - why_width});
    if (!why.empty()) draw_text(ui, {x + shown.x + 12, name_y}, why, {.ink = ui.look().quiet});
    return {x, y + 22 + line_gap};
}

} // namespace

float draw_provisional(Ui& ui, const RoomView& view, ImVec2 at, float width) {
    if (!view.results.provisional) return at.y;
    const Theme& theme = ui.look();
    GrowingCard card(ui, at, width, theme.brass_wash, theme.brass);
    float y = at.y + 14;
    y += draw_paragraph(ui, {card.left(), y}, card.width(),
                        "Provisional: this ranking rests on answers that are still missing.",
                        {.font = Font::strong, .ink = theme.brass_ink}) +
         line_gap;
    const auto say = [&](const std::string& sentence) {
        y += draw_paragraph(ui, {card.left(), y}, card.width(), sentence) + line_gap;
    };
    const auto stand_ins = stand_in_sentences(view.decision, view.results);
    for (std::size_t i = 0; i < std::min(stand_ins.size(), stand_ins_shown); ++i) say(stand_ins[i]);
    if (stand_ins.size() > stand_ins_shown)
        say("More is missing in the same way; all of it is listed under Still open.");
    const auto ranges = range_sentences(view.decision, view.results);
    if (ranges.size() > ranges_shown) {
        say("The scores of " + std::to_string(ranges.size()) +
            " options depend on what is still open; the thin lines below show how far.");
    } else {
        for (const auto& sentence : ranges) say(sentence + ".");
    }
    return card.end(y - 10);
}

float draw_not_in_play(Ui& ui, const RoomView& view, ImVec2 at, float width) {
    const Decision& decision = view.decision;
    const auto& excluded = view.results.excluded;
    const auto failed = [&](const Id& option) {
        return std::any_of(excluded.begin(), excluded.end(),
                           [&](const Exclusion& e) { return e.option == option; });
    };
    const auto absent = [&](const Option& option) { return option.withdrawn || failed(option.id); };
    if (std::none_of(decision.options.begin(), decision.options.end(), absent)) return at.y;

    GrowingCard card(ui, at, width);
    float y = card.heading("Not in play");
    for (std::size_t o = 0; o < decision.options.size(); ++o) {
        const Option& option = decision.options[o];
        if (!absent(option)) continue;
        const ImVec2 below =
            draw_absent(ui, decision, o, card, y, option.withdrawn ? "withdrawn" : "a must is not met");
        y = below.y;
        for (const auto& exclusion : excluded) {
            if (exclusion.option != option.id) continue;
            y += draw_paragraph(ui, {below.x, y}, card.right() - below.x,
                                exclusion_reason(decision, exclusion) + ".") +
                 line_gap;
            const Requirement* requirement = find_requirement(decision, exclusion.requirement);
            if (requirement == nullptr || !requirement->safety) continue;
            y += draw_paragraph(ui, {below.x, y}, card.right() - below.x,
                                "Set for safety's sake: licensed people decide under local codes.",
                                {.font = Font::small, .ink = ui.look().quiet}) +
                 line_gap;
        }
        y += 8;
    }
    return card.end(y - 8 - line_gap);
}

float StandingOpen::draw(Ui& ui, const RoomView& view, Actions& actions, ImVec2 at, float width) {
    const auto& open = view.results.open;
    GrowingCard card(ui, at, width);
    const std::string count = open.empty() ? std::string{} : " (" + std::to_string(open.size()) + ")";
    float y = card.heading("Still open" + count);
    if (open.empty()) {
        y += draw_paragraph(ui, {card.left(), y}, card.width(), "Every answer asked for is given.");
        return card.end(y);
    }
    const std::size_t shown = all_ ? open.size() : std::min(open.size(), open_shown);
    y -= 5; // The first line stands where it would without its press area.
    for (std::size_t i = 0; i < shown; ++i) y = draw_open_item(ui, view, actions, open[i], card, y);
    if (open.size() > open_shown) {
        const std::string label = all_ ? "Show fewer" : "Show all " + std::to_string(open.size());
        const float label_width = button_width(label, ButtonKind::link);
        if (button(ui, "standing/open-all", label, {card.left() - 4, y + 4, label_width, 28},
                   ButtonKind::link))
            all_ = !all_;
        y += 32;
    }
    return card.end(y - 5);
}

float draw_notices(Ui& ui, const RoomView& view, ImVec2 at, float width) {
    const auto& notices = view.results.notices;
    if (notices.empty()) return at.y;
    GrowingCard card(ui, at, width);
    float y = card.heading("Worth knowing");
    const std::size_t shown = std::min(notices.size(), notices_shown);
    for (std::size_t i = 0; i < shown; ++i)
        y += draw_paragraph(ui, {card.left(), y}, card.width(), notices[i].text) + 2 * line_gap;
    if (notices.size() > shown) {
        y += draw_paragraph(ui, {card.left(), y}, card.width(),
                            "And " + std::to_string(notices.size() - shown) + " more, in the results file.",
                            {.ink = ui.look().quiet}) +
             2 * line_gap;
    }
    return card.end(y - 2 * line_gap);
}

} // namespace steelyard
