#include "shell/rooms/weigh_hands.hpp"

#include <imgui_internal.h>

#include <algorithm>
#include <array>

#include "core/decision/lookup.hpp"
#include "shell/widgets/controls.hpp"
#include "shell/widgets/panels.hpp"
#include "shell/widgets/sentence.hpp"
#include "shell/widgets/text.hpp"
#include "shell/words.hpp"

namespace steelyard {
namespace {

constexpr int scale_end = 9;
constexpr float key_height = 36;
constexpr float key_width = 36;
constexpr float key_gap = 6;
constexpr float judge_row = 32;

bool once(ImGuiKey key) {
    return ImGui::IsKeyPressed(key, false);
}

/// "◀ 5", "equal", "5 ▶": on which side, and how much.
std::string side_text(double ratio) {
    if (ratio == 1) return "equal";
    return ratio > 1 ? "\xE2\x97\x80 " + ratio_text(ratio) : ratio_text(1 / ratio) + " \xE2\x96\xB6";
}

/// One button of the row that stands for the keys.
struct Key {
    std::string id;
    std::string label;
    float width;
    ButtonKind kind = ButtonKind::plain;
    bool enabled = true;
};

/// Where each goes in lines of one width; the lines' height comes out of the last.
std::vector<Box> flow(const std::vector<Key>& keys, const Box& box) {
    std::vector<Box> places;
    float x = box.x;
    float y = box.y;
    for (const Key& key : keys) {
        if (x > box.x && x + key.width > box.right()) {
            x = box.x;
            y += key_height + key_gap;
        }
        places.push_back({x, y, key.width, key_height});
        x += key.width + key_gap;
    }
    return places;
}

} // namespace

/// The pair and who is asked about it, for one frame.
struct HandsCard::Turn {
    const SetResult& group;
    ItemPair pair;
    std::vector<Id> judges;

    bool through(std::size_t at) const { return at >= judges.size(); }
};

void HandsCard::fresh() {
    at_ = first_open;
    passed_.clear();
    last_.clear();
    other_side_ = false;
    focus_ = true;
}

ItemPair HandsCard::first_pair(const RoomView& view, const SetResult& group) const {
    const Asking asking{Id{}, left_for_hands(view.decision, group), {}, {}};
    return next_pair(view, group, asking, {}).value_or(ItemPair{group.items[0], group.items[1]});
}

void HandsCard::move_on(const RoomView& view, const SetResult& group, ItemPair& pair, bool skip) {
    auto& skipped = skipped_[group.set];
    if (skip) skipped.push_back(pair);
    Asking asking{Id{}, left_for_hands(view.decision, group), {}, skipped};
    auto next = next_pair(view, group, asking, pair);
    if (!next) {
        skipped.clear();
        asking.skipped.clear();
        next = next_pair(view, group, asking, pair);
    }
    if (next) {
        pair = *next;
        fresh();
    }
    focus_ = true;
}

void HandsCard::digit(const RoomView& view, Actions& actions, const Turn& turn, int value) {
    if (turn.through(at_)) return;
    const double ratio = other_side_ ? 1.0 / value : value;
    last_ = turn.judges[at_];
    actions.edit(Enter<Judgment>{judgment_of(view, set_, last_, turn.pair, ratio)});
    passed_.erase(last_);
    at_ = first_open;
}

void HandsCard::turn_side(const RoomView& view, Actions& actions, const Turn& turn) {
    const auto said = said_ratio(view.decision, set_, last_, turn.pair[0], turn.pair[1]);
    if (last_.empty() || !said)
        other_side_ = !other_side_;
    else if (*said != 1)
        actions.edit(Enter<Judgment>{judgment_of(view, set_, last_, turn.pair, 1 / *said)});
}

void HandsCard::pass(const RoomView& view, Actions& actions, const Turn& turn) {
    if (turn.through(at_)) return;
    const Id& by = turn.judges[at_];
    if (said_ratio(view.decision, set_, by, turn.pair[0], turn.pair[1]))
        actions.edit(ClearJudgment{set_, by, turn.pair[0], turn.pair[1]});
    passed_.insert(by);
    at_ = first_open;
}

void HandsCard::back(const Turn& turn) {
    if (at_ == 0) return;
    at_ = std::min(at_, turn.judges.size()) - 1;
    passed_.erase(turn.judges[at_]);
}

void HandsCard::read_keys(const RoomView& view, Actions& actions, const Turn& turn, ItemPair& pair) {
    const ImGuiIO& io = ImGui::GetIO();
    if (io.WantTextInput || io.KeyCtrl || io.KeyAlt || io.KeySuper || view.read_only) return;
    const ImGuiID owner = ImGui::GetItemID();
    for (const ImGuiKey key : {ImGuiKey_Enter, ImGuiKey_KeypadEnter}) ImGui::SetKeyOwner(key, owner);
    for (int k = 1; k <= scale_end; ++k) {
        if (once(static_cast<ImGuiKey>(ImGuiKey_0 + k)) || once(static_cast<ImGuiKey>(ImGuiKey_Keypad0 + k)))
            digit(view, actions, turn, k);
    }
    if (once(ImGuiKey_X) || once(ImGuiKey_Minus) || once(ImGuiKey_KeypadSubtract))
        turn_side(view, actions, turn);
    if (once(ImGuiKey_0) || once(ImGuiKey_Keypad0) || once(ImGuiKey_A)) pass(view, actions, turn);
    if (once(ImGuiKey_Backspace)) back(turn);
    const bool enter = once(ImGuiKey_Enter) || once(ImGuiKey_KeypadEnter);
    const bool skip = once(ImGuiKey_S);
    if (enter || skip) move_on(view, turn.group, pair, skip);
}

void HandsCard::draw_words(Ui& ui, const RoomView& view, const Turn& turn, Box& inside) {
    const Node& node = *find_node(view.decision.criteria, set_);
    if (!turn.through(at_)) {
        const std::string question =
            std::string(node.is_leaf() ? "Which is worth more" : "Which counts more") + ", " +
            item_name(view.decision, set_, turn.pair[0]) + " or " +
            item_name(view.decision, set_, turn.pair[1]) + "?";
        inside.take_top(draw_sentence(ui, inside, question, Font::large, Font::heading, 2) + 6);
        return;
    }
    const auto said = said_by_each(view, set_, turn.pair);
    inside.take_top(draw_sentences(ui, inside, apart_lines(view, set_, turn.pair, said),
                                   inside.h > 340 ? Font::large : Font::heading, Font::heading));
    inside.take_top(6);
}

void HandsCard::draw_judges(Ui& ui, const RoomView& view, const Turn& turn, Box box) {
    const Theme& theme = ui.look();
    const bool through = turn.through(at_);
    const std::string name = through ? "All are through" : person_name(view.decision, turn.judges[at_]);
    const Font big = text_size(Font::large, name).x <= box.w ? Font::large : Font::heading;
    draw_text(ui, box.take_top(font_size(Font::large) + 2).at(), name,
              {.font = big, .ink = through ? theme.green : theme.ink, .max_width = box.w});
    const std::string side = item_name(view.decision, set_, turn.pair[other_side_ ? 1 : 0]);
    draw_text(ui, box.take_top(22).at(), through ? "Enter: the next pair" : "A digit counts for " + side,
              {.font = Font::small, .ink = theme.quiet, .max_width = box.w});
    ScrollArea area(ui, "judges", box);
    const Box in = area.inner();
    float y = in.y;
    for (std::size_t i = 0; i < turn.judges.size(); ++i) {
        const Id& by = turn.judges[i];
        const bool now = i == at_;
        const Box row{in.x, y, in.w - 4, judge_row - 2};
        const auto said = said_ratio(view.decision, set_, by, turn.pair[0], turn.pair[1]);
        const std::string value = said                   ? side_text(*said)
                                  : passed_.contains(by) ? "no answer"
                                                         : "\xE2\x80\x94";
        const std::string who = person_name(view.decision, by);
        if (now) {
            ImDrawList* list = ImGui::GetWindowDrawList();
            list->AddRectFilled(row.at(), row.end(), theme.brass_wash, 6);
            list->AddRect(row.at(), row.end(), theme.brass, 6, 0, 2);
        }
        const OnPaper paper(ui, now ? theme.brass_wash : theme.card);
        if (press_area(ui, "judge/" + by, "Turn of " + who, row, "radio", now ? "true" : "false")) {
            at_ = i;
            focus_ = true;
        }
        const ImVec2 size = draw_text(ui, {row.right() - 8, row.y + 5}, value,
                                      {.font = said ? Font::strong : Font::body,
                                       .ink = said ? theme.ink : theme.quiet,
                                       .align = Align::right});
        draw_text(ui, {row.x + 8, row.y + 5}, who,
                  {.font = now ? Font::strong : Font::body, .max_width = row.w - size.x - 26});
        y += judge_row;
    }
    area.reach(y);
}

void HandsCard::draw_buttons(Ui& ui, const RoomView& view, Actions& actions, const Turn& turn, ItemPair& pair,
                             Box& inside) {
    const bool asked = !turn.through(at_) && !view.read_only;
    std::vector<Key> keys;
    for (int k = 1; k <= scale_end; ++k)
        keys.push_back(
            {"digit/" + std::to_string(k), std::to_string(k), key_width, ButtonKind::plain, asked});
    const auto named = [&](const char* id, const char* label, ButtonKind kind, bool enabled) {
        keys.push_back({id, label, button_width(label, kind) - 6, kind, enabled});
    };
    named("side", "X other side", ButtonKind::plain, !view.read_only);
    named("pass", "0 no answer", ButtonKind::plain, asked);
    named("back", "Back", ButtonKind::quiet, at_ > 0);
    named("skip", "Skip", ButtonKind::quiet, true);
    named("next", "Next pair", turn.through(at_) ? ButtonKind::strong : ButtonKind::plain, true);
    auto places = flow(keys, {inside.x, 0, inside.w, 0});
    const Box box = inside.take_bottom(places.back().bottom(), 8);
    for (std::size_t i = 0; i < keys.size(); ++i) {
        const Key& key = keys[i];
        places[i].y += box.y;
        if (!button(ui, key.id, key.label, places[i], key.kind, key.enabled)) continue;
        focus_ = true;
        if (i < scale_end) digit(view, actions, turn, static_cast<int>(i) + 1);
        if (key.id == "side") turn_side(view, actions, turn);
        if (key.id == "pass") pass(view, actions, turn);
        if (key.id == "back") back(turn);
        if (key.id == "skip" || key.id == "next") move_on(view, turn.group, pair, key.id == "skip");
    }
}

void HandsCard::draw(Ui& ui, const RoomView& view, Actions& actions, const SetResult& group, ItemPair& pair,
                     Box box) {
    set_ = group.set;
    const Turn turn{group, pair, judges_of(view.decision, group, pair)};
    const auto silent = std::find_if(turn.judges.begin(), turn.judges.end(), [&](const Id& by) {
        return standing_judgment(view.decision, set_, by, pair[0], pair[1]) == nullptr &&
               !passed_.contains(by);
    });
    // Answers that were undone, too, bring their judge's turn back.
    at_ = std::min(at_, static_cast<std::size_t>(silent - turn.judges.begin()));

    const Card card(ui, box);
    Box inside = box.inset(16);
    const ItemPair shown = pair;
    draw_words(ui, view, turn, inside);
    const bool narrow = inside.w < 640;
    draw_buttons(ui, view, actions, turn, pair, inside);
    const Box judges = narrow ? inside.take_bottom(170, 8)
                              : inside.take_right(std::clamp(inside.w * 0.3f, 220.0f, 340.0f), 18);

    // The keys' place, under the arm.
    ImGui::SetCursorScreenPos(inside.at());
    ImGui::InvisibleButton("hands", {std::max(1.0f, inside.w), std::max(1.0f, inside.h)});
    if (focus_) {
        ImGui::SetFocusID(ImGui::GetItemID(), ImGui::GetCurrentWindow());
        focus_ = false;
    }
    const bool focused = ImGui::IsItemFocused();
    if (focused) read_keys(view, actions, turn, pair);
    LedgerItem keys;
    keys.id = "hands";
    keys.label = "Show of hands: " + item_name(view.decision, set_, shown[0]) + " against " +
                 item_name(view.decision, set_, shown[1]);
    keys.role = "group";
    keys.value = turn.through(at_) ? "" : person_name(view.decision, turn.judges[at_]);
    keys.at = inside.at();
    keys.size = {inside.w, inside.h};
    keys.focused = focused;
    keys.may_scroll = ui.scrolling;
    ui.ledger.add(std::move(keys));

    const auto load = [&](const Id& item) {
        return Load{item_name(view.decision, set_, item),
                    range_at_stake(view.decision, view.results, set_, item)};
    };
    ArmState state;
    state.left = load(shown[0]);
    state.right = load(shown[1]);
    for (const auto& one : said_by_each(view, set_, shown)) state.named.push_back({one.name, one.ratio});
    state.other = group_ratio(group, shown[0], shown[1]);
    show_arm(ui, state, other_side_, inside);
    draw_judges(ui, view, turn, judges);
}

} // namespace steelyard
