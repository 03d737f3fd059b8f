#include "shell/rooms/weigh_together.hpp"

#include <algorithm>

#include "core/decision/lookup.hpp"
#include "shell/widgets/controls.hpp"
#include "shell/widgets/panels.hpp"
#include "shell/widgets/sentence.hpp"
#include "shell/widgets/text.hpp"
#include "shell/words.hpp"

namespace steelyard {
namespace {

constexpr float top_height = 34;
constexpr float control_height = 36;

} // namespace

void TogetherCard::fresh(bool keep) {
    fresh_ = true;
    keep_ = keep;
    focus_ = true;
}

void TogetherCard::move(ItemPair& pair, std::size_t at, int by) {
    const auto count = static_cast<int>(order_.size());
    if (count == 0) return;
    pair = order_[static_cast<std::size_t>((static_cast<int>(at) + by + count) % count)];
    proposal_.reset();
    memory_ = {};
    focus_ = true;
}

void TogetherCard::draw_top(Ui& ui, const RoomView& view, Box row, std::size_t at, ItemPair& pair) {
    const Theme& theme = ui.look();
    const Box next = row.take_right(button_width("Next pair"), 6);
    const Box before = row.take_right(button_width("Pair before"), 14);
    if (button(ui, "pair-next", "Next pair", next)) move(pair, at, 1);
    if (button(ui, "pair-before", "Pair before", before, ButtonKind::quiet)) move(pair, at, -1);
    const std::string text = node_name(view.decision, set_) + ": pair " + std::to_string(at + 1) + " of " +
                             std::to_string(order_.size()) + ", the most disputed first";
    draw_text(ui, {row.x, row.y + (row.h - font_size(Font::body)) / 2}, text,
              {.ink = theme.quiet, .max_width = row.w});
}

void TogetherCard::draw_words(Ui& ui, const RoomView& view, const ItemPair& pair, Box& inside) {
    const Theme& theme = ui.look();
    if (off_ || proposal_) {
        const std::string text =
            off_ ? "Let go to take this answer back."
                 : "Proposed: " + pair_sentence(view.decision, set_, pair[0], pair[1], *proposal_) + ".";
        inside.take_top(draw_sentence(ui, inside, text, Font::large, Font::heading, 2, theme.brass_ink) + 4);
        return;
    }
    // Where there is little height the arm goes first.
    const Font largest = inside.h > 480 ? Font::huge : inside.h > 340 ? Font::large : Font::heading;
    inside.take_top(draw_sentences(ui, inside, apart_lines(view, set_, pair, said_by_each(view, set_, pair)),
                                   largest, Font::heading));
    const auto judges = judges_of(view.decision, *group_entry(view.results, set_), pair);
    std::string abstain;
    for (const auto& person : view.decision.people) {
        if (std::find(judges.begin(), judges.end(), person.id) == judges.end())
            abstain += (abstain.empty() ? "" : ", ") + person_name(view.decision, person.id);
    }
    if (!abstain.empty()) {
        draw_text(ui, {inside.x + inside.w / 2, inside.y}, "Abstains here: " + abstain,
                  {.ink = theme.quiet, .max_width = inside.w, .align = Align::centre});
        inside.take_top(22);
    }
    inside.take_top(4);
}

void TogetherCard::agree(const RoomView& view, Actions& actions, const ItemPair& pair) {
    actions.edit(std::vector<Edit>{Enter<Judgment>{judgment_of(view, set_, Id{}, pair, *proposal_)}},
                 "Agreed on " + item_name(view.decision, set_, pair[0]) + " against " +
                     item_name(view.decision, set_, pair[1]) + ": " + ratio_text(*proposal_));
    proposal_.reset();
    memory_ = {};
    focus_ = true;
}

void TogetherCard::draw_controls(Ui& ui, const RoomView& view, Actions& actions, const ItemPair& pair,
                                 Box row) {
    const Theme& theme = ui.look();
    const bool agreed = said_ratio(view.decision, set_, Id{}, pair[0], pair[1]).has_value();
    const Box field = row.take_left(76, 8);
    const std::string shown = memory_.typed.find_first_of("./") != std::string::npos ? memory_.typed
                              : proposal_                                            ? ratio_text(*proposal_)
                                                                                     : "";
    if (const auto typed = text_field(ui, "ratio", "Ratio to agree on", shown, field, "ratio")) {
        if (const auto ratio = read_ratio(*typed)) {
            proposal_ = *ratio;
            focus_ = true;
        } else {
            actions.say("\"" + *typed + "\" is no ratio from 1/100 to 100; type 3, 2.5 or 1/3.");
        }
    }
    const Box yes = row.take_left(button_width("Agree on this"), 8);
    if (button(ui, "agree", "Agree on this", yes, ButtonKind::strong,
               proposal_.has_value() && !view.read_only))
        agree(view, actions, pair);
    if (agreed) {
        const Box back = row.take_right(button_width("Take back what was agreed"), 8);
        if (button(ui, "take-back", "Take back what was agreed", back, ButtonKind::quiet, !view.read_only)) {
            actions.edit(ClearJudgment{set_, Id{}, pair[0], pair[1]});
            proposal_.reset();
            focus_ = true;
        }
    }
    for (const char* text : {"put the poise where the room agrees: drag it, or 1\xE2\x80\x93"
                             "9 and X \xC2\xB7 Enter agrees, then the next pair",
                             "1\xE2\x80\x93"
                             "9 and X put the poise \xC2\xB7 Enter agrees, then next",
                             "1\xE2\x80\x93"
                             "9, X \xC2\xB7 Enter"}) {
        if (text_size(Font::small, text).x > row.w) continue;
        draw_text(ui, {row.x + row.w / 2, row.y + (row.h - font_size(Font::small)) / 2}, text,
                  {.font = Font::small, .ink = theme.quiet, .align = Align::centre});
        break;
    }
}

void TogetherCard::draw(Ui& ui, const RoomView& view, Actions& actions, const SetResult& group,
                        ItemPair& pair, Box box) {
    const bool other_set = set_ != group.set;
    set_ = group.set;
    if (fresh_ || other_set) {
        // Kept while it is looked through: settling a pair does not throw the others about.
        order_ = most_disputed_first(view, group);
        if (!order_.empty() && !keep_) pair = order_.front();
        keep_ = false;
        proposal_.reset();
        memory_ = {};
        focus_ = true;
        fresh_ = false;
    }
    const Card card(ui, box);
    Box inside = box.inset(16);
    if (order_.empty()) {
        draw_text(ui, inside.at(), "Nobody has answered anything of this set for himself.",
                  {.max_width = inside.w});
        return;
    }
    const auto found =
        std::find_if(order_.begin(), order_.end(), [&](const ItemPair& p) { return same_pair(p, pair); });
    const auto at = static_cast<std::size_t>(found == order_.end() ? 0 : found - order_.begin());
    if (found == order_.end()) pair = order_.front();
    const ItemPair shown = pair;
    draw_top(ui, view, inside.take_top(top_height, 8), at, pair);
    const Box controls = inside.take_bottom(control_height, 8);
    draw_words(ui, view, shown, inside);

    const auto load = [&](const Id& item) {
        return Load{item_name(view.decision, set_, item),
                    range_at_stake(view.decision, view.results, set_, item)};
    };
    ArmState state;
    state.left = load(shown[0]);
    state.right = load(shown[1]);
    for (const auto& one : said_by_each(view, set_, shown)) state.named.push_back({one.name, one.ratio});
    state.other = group_ratio(group, shown[0], shown[1]);
    state.ratio = proposal_ ? proposal_ : said_ratio(view.decision, set_, Id{}, shown[0], shown[1]);
    state.own_name = proposal_ ? "proposed" : "agreed";
    state.enabled = !view.read_only;
    if (focus_) {
        ui.focus_next = "arm";
        focus_ = false;
    }
    const std::string label =
        item_name(view.decision, set_, shown[0]) + " against " + item_name(view.decision, set_, shown[1]);
    const ArmAnswer answer = draw_arm(ui, "arm", label, state, memory_, inside);
    off_ = answer.off;
    if (answer.ratio) proposal_ = answer.ratio;
    if (answer.take_back && !proposal_) actions.edit(ClearJudgment{set_, Id{}, shown[0], shown[1]});
    if (answer.take_back) proposal_.reset();
    draw_controls(ui, view, actions, shown, controls);
    if (answer.next && proposal_ && !answer.ratio)
        agree(view, actions, shown);
    else if (answer.next || answer.skip)
        move(pair, at, 1);
}

} // namespace steelyard
