#include "shell/rooms/weigh_pair.hpp"

#include <algorithm>
#include <utility>

#include "core/decision/lookup.hpp"
#include "shell/rooms/weigh_answers.hpp"
#include "shell/widgets/controls.hpp"
#include "shell/widgets/panels.hpp"
#include "shell/widgets/sentence.hpp"
#include "shell/widgets/star.hpp"
#include "shell/widgets/text.hpp"
#include "shell/words.hpp"

namespace steelyard {
namespace {

constexpr float control_height = 34;
constexpr float progress_height = 38;
constexpr float line_height = 18;
constexpr float ranges_height = 42; ///< Two lines and the button beside them.

/// What the keys do, as much of it as there is room for.
std::string keys_text(float width) {
    for (const char* text : {"1\xE2\x80\x93"
                             "9 times as much \xC2\xB7 X other side \xC2\xB7 \xE2\x86\x90 \xE2\x86\x92 a "
                             "step, Shift finer \xC2\xB7 Enter "
                             "next \xC2\xB7 S skip",
                             "1\xE2\x80\x93"
                             "9 \xC2\xB7 X other side \xC2\xB7 \xE2\x86\x90 \xE2\x86\x92, Shift finer "
                             "\xC2\xB7 Enter next \xC2\xB7 S skip",
                             "1\xE2\x80\x93"
                             "9 \xC2\xB7 X other side \xC2\xB7 Enter next \xC2\xB7 S skip",
                             "1\xE2\x80\x93"
                             "9 \xC2\xB7 X \xC2\xB7 Enter"}) {
        if (text_size(Font::small, text).x <= width) return text;
    }
    return "";
}

/// Of the own judgment of a pair, or else of the agreed one: on which other ranges it was made.
std::string changed_words(const RoomView& view, const Id& set, const ItemPair& pair) {
    const Judgment* judgment = standing_judgment(view.decision, set, view.person, pair[0], pair[1]);
    if (judgment == nullptr) judgment = standing_judgment(view.decision, set, Id{}, pair[0], pair[1]);
    return judgment == nullptr ? std::string() : changed_ranges(view, *judgment);
}

} // namespace

void PairCard::fresh(bool bring_in) {
    fresh_ = true;
    memory_ = {};
    memory_.bring_in = bring_in;
    remark_open_ = false;
}

void PairCard::reset() {
    *this = PairCard{};
}

Id PairCard::star(const RoomView& view, const Id& set) const {
    const auto found = stars_.find({set, view.person});
    return found == stars_.end() ? Id{} : found->second;
}

Asking PairCard::asking(const RoomView& view, const SetResult& entry) const {
    Asking asking{
        view.person, progress_of(view.decision, entry, view.person).left, star(view, entry.set), {}};
    if (asking.left.empty() && view.person.empty()) {
        // All is answered by somebody: what the room has not agreed on can still be settled.
        for (const auto& pair : asked_pairs(view.decision, entry, Id{})) {
            if (standing_judgment(view.decision, entry.set, Id{}, pair[0], pair[1]) == nullptr)
                asking.left.push_back(pair);
        }
    }
    const auto skipped = skipped_.find({entry.set, view.person});
    if (skipped != skipped_.end()) asking.skipped = skipped->second;
    return asking;
}

ItemPair PairCard::first_pair(const RoomView& view, const SetResult& entry) const {
    const auto next = next_pair(view, entry, asking(view, entry), {});
    return next.value_or(ItemPair{entry.items[0], entry.items[1]});
}

void PairCard::move_on(const RoomView& view, const SetResult& entry, ItemPair& pair, bool skip) {
    auto& skipped = skipped_[{entry.set, view.person}];
    if (skip) skipped.push_back(pair);
    auto next = next_pair(view, entry, asking(view, entry), pair);
    if (!next) {
        // Only skipped ones are left: they come round again.
        skipped.clear();
        next = next_pair(view, entry, asking(view, entry), pair);
    }
    if (next) pair = *next;
    fresh(true);
}

ArmState PairCard::arm_state(const RoomView& view, const SetResult& entry, const ItemPair& pair) const {
    const Id named = star(view, entry.set);
    const auto load = [&](const Id& item) {
        return Load{item_name(view.decision, entry.set, item),
                    range_at_stake(view.decision, view.results, entry.set, item), item == named};
    };
    ArmState state;
    state.left = load(pair[0]);
    state.right = load(pair[1]);
    state.ratio = said_ratio(view.decision, entry.set, view.person, pair[0], pair[1]);
    state.other = implied_ratio(entry, pair[0], pair[1]);
    state.other_name = view.person.empty() ? "the other answers" : "your other answers";
    state.enabled = !view.read_only;
    if (state.ratio) return state;
    if (const auto agreed = said_ratio(view.decision, entry.set, Id{}, pair[0], pair[1])) {
        state.other = agreed;
        state.other_name = "agreed in the room";
    } else if (const auto mean = group_ratio(entry, pair[0], pair[1]); entry.by.empty() && mean) {
        state.other = mean;
        state.other_name = "the judges together";
    }
    return state;
}

void PairCard::draw_words(Ui& ui, const RoomView& view, Actions& actions, const ItemPair& pair, Box& inside) {
    const Theme& theme = ui.look();
    const Decision& d = view.decision;
    const Node& node = *find_node(d.criteria, set_);
    const Judgment* own = standing_judgment(d, set_, view.person, pair[0], pair[1]);
    const auto said = said_ratio(d, set_, view.person, pair[0], pair[1]);
    const auto ratio = preview_ ? preview_ : said;
    std::string sentence;
    if (off_) {
        sentence = said ? "Let go to take this answer back." : "Let go: nothing is entered.";
    } else if (ratio) {
        sentence = judgment_sentence(d, set_, pair[0], pair[1], *ratio);
    } else {
        sentence = std::string(node.is_leaf() ? "Which is worth more" : "Which counts more") + ", " +
                   item_name(d, set_, pair[0]) + " or " + item_name(d, set_, pair[1]) + "?";
    }
    const bool roomy = inside.h >= 380;
    const bool small = inside.w < 520;
    const float height =
        draw_sentence(ui, inside, sentence, roomy && !small ? Font::large : Font::heading,
                      small ? Font::strong : Font::heading, 2, off_ ? theme.brass_ink : theme.ink);
    inside.take_top(height + 4);

    const auto agreed = said_ratio(d, set_, Id{}, pair[0], pair[1]);
    if (!view.person.empty() && agreed) {
        draw_text(
            ui, {inside.x + inside.w / 2, inside.y},
            "Agreed in the room: " + pair_sentence(d, set_, pair[0], pair[1], *agreed) +
                ". That stands in place of your answer.",
            {.font = Font::small, .ink = theme.brass_ink, .max_width = inside.w, .align = Align::centre});
        inside.take_top(line_height);
    }
    const std::string changed = changed_words(view, set_, pair);
    if (!changed.empty()) {
        Box row = inside.take_top(ranges_height);
        if (own != nullptr && !view.read_only) {
            const Box holds = row.take_right(button_width("Still holds"), 10);
            if (button(ui, "still-holds", "Still holds", {holds.x, holds.y + 4, holds.w, 30})) {
                actions.edit(
                    Enter<Judgment>{judgment_of(view, set_, view.person, {own->a, own->b}, own->ratio)});
                ui.focus_next = "arm";
            }
        }
        draw_paragraph(ui, row.at(), row.w, changed, {.font = Font::small, .ink = theme.brass_ink});
    }
    if (own != nullptr && !own->note.empty() && !remark_open_) {
        draw_text(ui, {inside.x + inside.w / 2, inside.y}, "Remark: " + own->note,
                  {.font = Font::small, .ink = theme.quiet, .max_width = inside.w, .align = Align::centre});
        inside.take_top(line_height);
    }
}

float PairCard::more_height(const RoomView& view, const SetResult& entry, const ItemPair& pair) const {
    const Judgment* own = standing_judgment(view.decision, entry.set, view.person, pair[0], pair[1]);
    float more = changed_words(view, entry.set, pair).empty() ? 0 : ranges_height;
    if (own != nullptr && !own->note.empty()) more += line_height;
    if (!view.person.empty() && said_ratio(view.decision, entry.set, Id{}, pair[0], pair[1]))
        more += line_height;
    return more;
}

void PairCard::draw_remark(Ui& ui, const RoomView& view, Actions& actions, const Judgment* own, Box& row) {
    const bool can = own != nullptr && !view.read_only;
    if (!remark_open_ || !can) {
        const Box open = row.take_left(button_width("Remark") - 12, 6);
        if (button(ui, "remark-open", "Remark", open, ButtonKind::quiet, can)) {
            remark_open_ = true;
            ui.focus_next = "remark";
        }
        return;
    }
    const Box field = row.take_left(std::max(120.0f, row.w), 8);
    if (auto text = text_field(ui, "remark", "Remark on this answer", own->note, field, "why so")) {
        Judgment changed = *own;
        changed.note = std::move(*text);
        changed.at.clear();
        actions.edit(std::vector<Edit>{Enter<Judgment>{std::move(changed)}},
                     "Remarked on " + item_name(view.decision, own->set, own->a) + " against " +
                         item_name(view.decision, own->set, own->b));
        remark_open_ = false;
        ui.focus_next = "arm";
    }
}

void PairCard::draw_controls(Ui& ui, const RoomView& view, Actions& actions, const SetResult& entry,
                             ItemPair& pair, Box row) {
    const Judgment* own = standing_judgment(view.decision, set_, view.person, pair[0], pair[1]);
    const bool can = !view.read_only;
    const Box next = row.take_right(button_width("Next"), 4);
    const Box skip = row.take_right(button_width("Skip") - 14, 4);
    const Box back = row.take_right(button_width("Take back") - 14, 6);
    const Box field = row.take_left(76, 6);

    const auto said = said_ratio(view.decision, set_, view.person, pair[0], pair[1]);
    const bool typing = memory_.typed.find_first_of("./") != std::string::npos;
    const std::string shown = typing ? memory_.typed : said ? ratio_text(*said) : "";
    if (const auto typed = text_field(ui, "ratio", "Ratio", shown, field, "ratio")) {
        if (const auto ratio = read_ratio(*typed)) {
            actions.edit(Enter<Judgment>{judgment_of(view, set_, view.person, pair, *ratio)});
            ui.focus_next = "arm";
        } else {
            actions.say("\"" + *typed + "\" is no ratio from 1/100 to 100; type 3, 2.5 or 1/3.");
        }
    }
    draw_remark(ui, view, actions, own, row);
    if (row.w > 60) {
        const std::string keys = keys_text(row.w);
        draw_text(ui, {row.x + row.w / 2, row.y + (row.h - font_size(Font::small)) / 2}, keys,
                  {.font = Font::small, .ink = ui.look().quiet, .align = Align::centre});
    }
    if (button(ui, "take-back", "Take back", back, ButtonKind::quiet, own != nullptr && can)) {
        actions.edit(ClearJudgment{set_, view.person, pair[0], pair[1]});
        fresh();
    }
    if (button(ui, "skip", "Skip", skip, ButtonKind::quiet)) move_on(view, entry, pair, true);
    if (button(ui, "next", "Next", next)) move_on(view, entry, pair, false);
}

void PairCard::draw_go_on(Ui& ui, const RoomView& view, Actions& actions, Box& row) {
    if (view.sealed() && !view.person.empty()) {
        const Box over = row.take_right(button_width("Hand over"), 8);
        if (button(ui, "done-hand-over", "Hand over", over)) actions.answer_as({});
    }
    const auto open =
        std::find_if(view.results.sets.begin(), view.results.sets.end(), [&](const SetResult& s) {
            return s.by.empty() && s.set != set_ && !progress_of(view.decision, s, view.person).done();
        });
    if (open == view.results.sets.end()) return;
    const std::string label = "Go on to " + node_name(view.decision, open->set);
    const Box go = row.take_right(std::min(button_width(label), row.w * 0.55f), 8);
    if (button(ui, "go-on", label, go)) actions.go(RoomId::weigh, open->set);
}

void PairCard::draw_progress(Ui& ui, const RoomView& view, Actions& actions, const SetResult& entry,
                             ItemPair& pair, Box row) {
    const Theme& theme = ui.look();
    const Decision& d = view.decision;
    const Progress progress = progress_of(d, entry, view.person);
    const bool mine = !view.person.empty();
    std::string text;
    ImU32 ink = theme.quiet;
    const float line = font_size(Font::small);
    if (progress.left.empty()) {
        text = progress.asked == 0
                   ? "You abstain from every pair of this set."
                   : "All " + std::to_string(progress.asked) + " pairs of this set are answered.";
        ink = theme.green;
        draw_go_on(ui, view, actions, row);
    } else if (progress.ended) {
        text = "Ended with " + std::to_string(progress.left.size()) + " of " +
               std::to_string(progress.asked) + " pairs unanswered.";
        const Box reopen = row.take_right(button_width("Reopen"), 10);
        if (button(ui, "reopen", "Reopen", reopen, ButtonKind::quiet, !view.read_only))
            actions.edit(ReopenSet{set_, view.person});
        draw_go_on(ui, view, actions, row);
    } else {
        // In one line: what is needed, unless nothing still open can matter. The card below says more.
        text = nothing_open_matters(view, entry) ? enough_sentence(view, entry)
                                                 : needed_sentence(d, entry, progress, view.person);
        const std::string finish = mine ? "Enough for me" : "That is all";
        const Box end = row.take_right(button_width(finish), 8);
        if (button(ui, "finish", finish, end, ButtonKind::plain, !view.read_only && progress.any)) {
            Finished finished;
            finished.set = set_;
            finished.by = view.person;
            finished.skipped = progress.left;
            actions.edit(Enter<Finished>{std::move(finished)});
        }
    }
    if (!progress.done() && row.w > 330) {
        std::vector<std::string> names{"Which matters most?"};
        std::size_t chosen = 0;
        for (const auto& item : entry.items) {
            if (item == star(view, set_)) chosen = names.size();
            names.push_back(item_name(d, set_, item));
        }
        const Box list = row.take_right(188, 4);
        const Box mark = row.take_right(20, 10);
        draw_star({mark.x + 10, mark.y + mark.h / 2}, 8, chosen == 0 ? theme.edge : theme.brass);
        if (const auto index = drop_down(ui, "star", "Which matters most?", names, chosen, list)) {
            stars_[{set_, view.person}] = *index == 0 ? Id{} : entry.items[*index - 1];
            // A pair without the item named is not what to ask next; one just answered stays in sight.
            if (!said_ratio(d, set_, view.person, pair[0], pair[1])) pair = first_pair(view, entry);
            fresh();
        }
    }
    const float height = paragraph_height(row.w, text, Font::small);
    if (height <= row.h) {
        draw_paragraph(ui, {row.x, row.y + (row.h - height) / 2}, row.w, text,
                       {.font = Font::small, .ink = ink});
    } else {
        draw_text(ui, {row.x, row.y + (row.h - line) / 2}, text,
                  {.font = Font::small, .ink = ink, .max_width = row.w});
    }
}

void PairCard::draw(Ui& ui, const RoomView& view, Actions& actions, const SetResult& entry, ItemPair& pair,
                    Box box) {
    set_ = entry.set;
    const Card card(ui, box);
    Box inside = box.inset(box.h < 320 ? 10.0f : 14.0f);
    draw_words(ui, view, actions, pair, inside);
    const Box progress = inside.take_bottom(progress_height, 4);
    const Box controls = inside.take_bottom(control_height, 6);
    if (fresh_) {
        ui.focus_next = "arm";
        fresh_ = false;
    }
    const ItemPair asked = pair;
    const std::string label =
        item_name(view.decision, set_, pair[0]) + " against " + item_name(view.decision, set_, pair[1]);
    const ArmState state = arm_state(view, entry, pair);
    const ArmAnswer answer = draw_arm(ui, "arm", label, state, memory_, inside);
    preview_ = answer.preview;
    off_ = answer.off;
    if (answer.ratio && (!state.ratio || *answer.ratio != *state.ratio))
        actions.edit(Enter<Judgment>{judgment_of(view, set_, view.person, pair, *answer.ratio)});
    if (answer.take_back) actions.edit(ClearJudgment{set_, view.person, pair[0], pair[1]});
    if (answer.next || answer.skip) move_on(view, entry, pair, answer.skip);
    draw_controls(ui, view, actions, entry, pair, controls);
    draw_progress(ui, view, actions, entry, pair, progress);
    if (!same_pair(asked, pair)) fresh_ = true;
}

} // namespace steelyard
