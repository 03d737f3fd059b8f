#include <algorithm>

#include "core/decision/lookup.hpp"
#include "shell/rooms/weigh_grid.hpp"
#include "shell/rooms/weigh_hold.hpp"
#include "shell/rooms/weigh_points.hpp"
#include "shell/rooms/weigh_sets.hpp"
#include "shell/widgets/arm.hpp"
#include "shell/widgets/controls.hpp"
#include "shell/widgets/panels.hpp"
#include "shell/widgets/text.hpp"
#include "shell/words.hpp"

namespace steelyard {
namespace {

/// How much things count: sets on the left, the arm in the middle, the set as a grid and what it gives below.
class Weigh : public Room {
public:
    void draw(Ui& ui, const RoomView& view, Actions& actions, Box area) override {
        choose_set(view);
        if (set_.empty()) {
            draw_nothing(ui, view, actions, area);
            return;
        }
        const SetResult& entry = *shown_entry(view.results, set_, view.person);
        choose_pair(view, entry);

        // Short or narrow pages scroll as a whole; the list of sets becomes one to drop down.
        const bool narrow = area.w < 700;
        const float least = narrow ? 860.0f : 560.0f;
        if (narrow || area.h < least) {
            ScrollArea scroll(ui, "weigh", area);
            Box inner = scroll.inner();
            inner.w -= 4;
            inner.h = std::max(area.h, least);
            if (narrow) draw_set_choice(ui, view, inner.take_top(36, 12));
            draw_work(ui, view, actions, entry, inner, narrow);
            scroll.reach(inner.bottom());
        } else {
            draw_work(ui, view, actions, entry, area, false);
        }
    }

    void show(const Id& set) override { set_ = set; }

    bool paste(const std::string& text, const RoomView& view, Actions& actions) override {
        return grid_.paste(text, view, actions, set_);
    }

    void reset() override {
        set_.clear();
        pair_ = {};
        grid_.reset();
        hold_.reset();
        points_.reset();
    }

private:
    void choose_set(const RoomView& view) {
        if (group_entry(view.results, set_) != nullptr) return;
        const auto first = std::find_if(view.results.sets.begin(), view.results.sets.end(),
                                        [](const SetResult& s) { return s.by.empty(); });
        set_ = first == view.results.sets.end() ? Id{} : first->set;
        pair_ = {};
    }

    void choose_pair(const RoomView& view, const SetResult& entry) {
        const auto holds = [&](const Id& id) {
            return std::find(entry.items.begin(), entry.items.end(), id) != entry.items.end();
        };
        if (holds(pair_[0]) && holds(pair_[1]) && shown_set_ == set_) return;
        shown_set_ = set_;
        pair_ = next_pair(view, entry, {}).value_or(ItemPair{entry.items[0], entry.items[1]});
        fresh_ = true;
    }

    /// The next pair after `from` that `person` has still to answer; the first one with an empty `from`.
    static std::optional<ItemPair> next_pair(const RoomView& view, const SetResult& entry,
                                             const ItemPair& from) {
        std::vector<ItemPair> unjudged;
        bool passed = from[0].empty();
        std::optional<ItemPair> earlier;
        for (std::size_t i = 0; i < entry.items.size(); ++i) {
            for (std::size_t j = i + 1; j < entry.items.size(); ++j) {
                const ItemPair pair{entry.items[i], entry.items[j]};
                if (pair == from) {
                    passed = true;
                    continue;
                }
                const bool said =
                    said_ratio(view.decision, entry.set, view.person, pair[0], pair[1]).has_value() ||
                    said_ratio(view.decision, entry.set, Id{}, pair[0], pair[1]).has_value();
                if (said) continue;
                if (passed) return pair;
                if (!earlier) earlier = pair;
            }
        }
        return earlier;
    }

    void draw_nothing(Ui& ui, const RoomView& view, Actions& actions, Box area) const {
        Box box = area.take_top(150);
        const Card card(ui, box);
        Box inside = box.inset(24);
        draw_text(ui, inside.take_top(34).at(), "Nothing to weigh yet", {.font = Font::heading});
        inside.h = 48;
        const char* text = view.decision.criteria.is_leaf() && view.decision.criteria.rate != RateBy::pairs
                               ? "There are no criteria to set against each other."
                               : "Two criteria, or two options compared in pairs, make a set.";
        draw_text(ui, inside.take_top(30).at(), text, {.ink = ui.look().quiet, .max_width = inside.w});
        if (button(ui, "to-frame", "Go to Frame", {inside.x, inside.y, button_width("Go to Frame"), 34})) {
            actions.go(RoomId::frame);
        }
    }

    void draw_set_choice(Ui& ui, const RoomView& view, const Box& box) {
        std::vector<std::string> names;
        std::vector<Id> ids;
        std::size_t chosen = 0;
        for (const auto& s : view.results.sets) {
            if (!s.by.empty()) continue;
            if (s.set == set_) chosen = ids.size();
            ids.push_back(s.set);
            names.push_back(node_name(view.decision, s.set));
        }
        if (const auto index = drop_down(ui, "set", "Set to judge", names, chosen, box)) set_ = ids[*index];
    }

    void draw_work(Ui& ui, const RoomView& view, Actions& actions, const SetResult& entry, Box area,
                   bool narrow) {
        if (!narrow) {
            const Box list = area.take_left(std::clamp(area.w * 0.23f, 170.0f, 230.0f), 16);
            if (const auto set = draw_set_list(ui, view, set_, list)) set_ = *set;
        }
        if (entry.from_points) {
            points_.draw(ui, view, actions, entry, area);
            return;
        }
        if (grid_.large()) {
            if (const auto pair = grid_.draw(ui, view, actions, entry, pair_, area)) pair_ = *pair;
            return;
        }
        Box arm = area.take_top(std::clamp(area.h * 0.52f, 300.0f, 420.0f), 12);
        draw_arm_card(ui, view, actions, entry, arm);
        Box below = area;
        Box grid = below;
        Box words = below;
        if (narrow) {
            grid = below.take_top((below.h - 12) / 2, 12);
            words = below;
        } else {
            const float side = static_cast<float>(entry.items.size()) * 52 + 150;
            grid = below.take_left(std::clamp(side, below.w * 0.42f, below.w * 0.52f), 12);
            words = below;
        }
        if (const auto pair = grid_.draw(ui, view, actions, entry, pair_, grid)) pair_ = *pair;
        if (const auto pair = hold_.draw(ui, view, actions, entry, words)) pick(ui, *pair);
    }

    void pick(Ui& ui, const ItemPair& pair) {
        pair_ = pair;
        ui.focus_next = "arm";
    }

    void draw_arm_card(Ui& ui, const RoomView& view, Actions& actions, const SetResult& entry,
                       const Box& box) {
        const Theme& theme = ui.look();
        const Card card(ui, box);
        Box inside = box.inset(14);
        const auto own = said_ratio(view.decision, set_, view.person, pair_[0], pair_[1]);
        const auto agreed = said_ratio(view.decision, set_, Id{}, pair_[0], pair_[1]);
        const auto ratio = preview_ ? preview_ : own;

        std::string sentence;
        if (ratio) {
            sentence = judgment_sentence(view.decision, set_, pair_[0], pair_[1], *ratio);
        } else {
            const Node* node = find_node(view.decision.criteria, set_);
            sentence = std::string(node->is_leaf() ? "Which is worth more" : "Which counts more") + ", " +
                       item_name(view.decision, set_, pair_[0]) + " or " +
                       item_name(view.decision, set_, pair_[1]) + "?";
        }
        const Box head = inside.take_top(30);
        const Font big = text_size(Font::heading, sentence).x <= head.w ? Font::heading : Font::strong;
        draw_text(ui, {head.x + head.w / 2, head.y + 2}, sentence,
                  {.font = big, .max_width = head.w, .align = Align::centre});

        const std::string who = view.person.empty()
                                    ? "Agreed in the room"
                                    : "Answering as " + person_name(view.decision, view.person);
        std::string note = who;
        if (!view.person.empty() && agreed) {
            note +=
                " \xC2\xB7 agreed in the room: " + ratio_text(*agreed) + ", which stands in place of this";
        }
        draw_text(ui, {head.x + head.w / 2, head.bottom() + 2}, note,
                  {.font = Font::small,
                   .ink = view.person.empty() ? theme.quiet : theme.brass_ink,
                   .max_width = head.w,
                   .align = Align::centre});
        inside.take_top(20);

        Box foot = inside.take_bottom(32);
        const auto load = [&](const Id& item) {
            return Load{item_name(view.decision, set_, item),
                        range_at_stake(view.decision, view.results, set_, item)};
        };
        ArmState state{load(pair_[0]),      load(pair_[1]), own, implied_ratio(entry, pair_[0], pair_[1]),
                       "the other answers", !view.read_only};
        if (!own && agreed) {
            state.other = agreed;
            state.other_name = "agreed in the room";
        } else if (const auto mean = group_ratio(entry, pair_[0], pair_[1]);
                   !own && entry.by.empty() && mean) {
            state.other = mean;
            state.other_name = "the judges together";
        }
        if (fresh_) {
            ui.focus_next = "arm";
            fresh_ = false;
        }
        const ArmAnswer answer = draw_arm(ui, "arm", pair_label(view), state, inside);
        preview_ = answer.preview;
        if (answer.ratio && answer.ratio != own) judge(view, actions, *answer.ratio);
        if (answer.next || answer.skip) {
            if (const auto next = next_pair(view, entry, pair_)) pick(ui, *next);
        }
        draw_foot(ui, view, actions, own, foot);
    }

    std::string pair_label(const RoomView& view) const {
        return item_name(view.decision, set_, pair_[0]) + " against " +
               item_name(view.decision, set_, pair_[1]);
    }

    void judge(const RoomView& view, Actions& actions, double ratio) const {
        Judgment judgment;
        judgment.set = set_;
        judgment.by = view.person;
        judgment.a = pair_[0];
        judgment.b = pair_[1];
        judgment.ratio = ratio;
        actions.edit(Enter<Judgment>{std::move(judgment)});
    }

    void draw_foot(Ui& ui, const RoomView& view, Actions& actions, const std::optional<double>& own,
                   Box foot) {
        const Theme& theme = ui.look();
        const Box clear = foot.take_right(button_width("Take back"), 8);
        if (button(ui, "take-back", "Take back", clear, ButtonKind::quiet,
                   own.has_value() && !view.read_only)) {
            actions.edit(ClearJudgment{set_, view.person, pair_[0], pair_[1]});
        }
        const Box field = foot.take_left(84, 10);
        const std::string shown = own ? ratio_text(*own) : "";
        if (const auto typed = text_field(ui, "ratio", "Ratio", shown, field, "ratio")) {
            if (const auto ratio = read_ratio(*typed)) {
                judge(view, actions, *ratio);
            } else {
                actions.say("\"" + *typed + "\" is no ratio from 1/100 to 100; type 3, 2.5 or 1/3.");
            }
        }
        const char* keys =
            foot.w > 520 ? "drag the poise \xC2\xB7 1-9 how many times \xC2\xB7 X other side \xC2\xB7 "
                           "\xE2\x86\x90 \xE2\x86\x92 move, Shift finer \xC2\xB7 Enter next \xC2\xB7 S skip"
                         : "1-9 \xC2\xB7 X other side \xC2\xB7 \xE2\x86\x90 \xE2\x86\x92 \xC2\xB7 Enter next";
        draw_text(ui, {foot.x + foot.w / 2, foot.y + (foot.h - font_size(Font::small)) / 2}, keys,
                  {.font = Font::small, .ink = theme.quiet, .max_width = foot.w, .align = Align::centre});
    }

    PairGrid grid_;
    HoldCard hold_;
    PointsCard points_;
    Id set_;
    Id shown_set_; ///< The set the pair belongs to.
    ItemPair pair_;
    std::optional<double> preview_; ///< While the poise is dragged.
    bool fresh_ = false;            ///< A pair was chosen by the room: the arm takes the keys.
};

} // namespace

std::unique_ptr<Room> make_weigh_room() {
    return std::make_unique<Weigh>();
}

} // namespace steelyard
