#include <algorithm>
#include <set>

#include "core/decision/lookup.hpp"
#include "shell/rooms/weigh_answers.hpp"
#include "shell/rooms/weigh_differ.hpp"
#include "shell/rooms/weigh_grid.hpp"
#include "shell/rooms/weigh_hands.hpp"
#include "shell/rooms/weigh_hold.hpp"
#include "shell/rooms/weigh_pair.hpp"
#include "shell/rooms/weigh_people.hpp"
#include "shell/rooms/weigh_points.hpp"
#include "shell/rooms/weigh_sets.hpp"
#include "shell/rooms/weigh_together.hpp"
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
        const SetResult entry = own_entry(view, set_);
        const SetResult& group = *group_entry(view.results, set_);
        choose_pair(view, entry, group);

        // Short or narrow pages scroll as a whole; the list of sets becomes one to drop down.
        const bool narrow = area.w < 700;
        const float head = head_height(view, set_, area.w);
        const float least = narrow ? 880.0f + head : 600.0f + (head > 0 ? head + 10 : 0);
        if (narrow || area.h < least) {
            ScrollArea scroll(ui, "weigh", area);
            Box inner = scroll.inner();
            inner.w -= 4;
            inner.h = std::max(area.h, least);
            draw_all(ui, view, actions, entry, inner, narrow);
            scroll.reach(inner.bottom());
        } else {
            draw_all(ui, view, actions, entry, area, false);
        }
    }

    void show(const Id& set) override {
        set_ = set;
        part_ = WeighPart::arm;
    }

    bool paste(const std::string& text, const RoomView& view, Actions& actions) override {
        return grid_.paste(text, view, actions, set_);
    }

    void reset() override {
        set_.clear();
        pair_ = {};
        card_.reset();
        together_.reset();
        hands_.reset();
        differ_.reset();
        revealed_.clear();
        part_ = WeighPart::arm;
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

    void choose_pair(const RoomView& view, const SetResult& entry, const SetResult& group) {
        const auto holds = [&](const Id& id) {
            return std::find(entry.items.begin(), entry.items.end(), id) != entry.items.end();
        };
        // Back from another room the arm takes the keyboard again.
        const int frame = ImGui::GetFrameCount();
        const bool away = frame > last_frame_ + 1;
        last_frame_ = frame;
        const bool same = holds(pair_[0]) && holds(pair_[1]) && shown_set_ == set_ &&
                          shown_person_ == view.person && shown_way_ == view.answering;
        if (same && away) fresh();
        if (same) return;
        if (shown_way_ != view.answering) revealed_.clear();
        shown_set_ = set_;
        shown_person_ = view.person;
        shown_way_ = view.answering;
        pair_ = view.answering == Answering::hands ? hands_.first_pair(view, group)
                                                   : card_.first_pair(view, entry);
        together_.fresh();
        fresh();
    }

    void fresh() {
        card_.fresh();
        hands_.fresh();
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

    void draw_all(Ui& ui, const RoomView& view, Actions& actions, const SetResult& entry, Box area,
                  bool narrow) {
        const SetResult& group = *group_entry(view.results, set_);
        const float head = head_height(view, set_, area.w);
        Box free{area.x, area.y, 0, 0};
        if (head > 0) {
            const WeighPart before = part_;
            free = draw_head(ui, view, actions, group, part_, area.take_top(head, 10));
            if (part_ != before) {
                fresh();
                together_.fresh();
            }
        }
        const bool nobody = view.sealed() && view.person.empty();
        const bool open = view.answering == Answering::agreed && view.person.empty();
        const bool together = (nobody && revealed_.contains(set_)) || (open && part_ == WeighPart::everybody);
        const bool hands = view.answering == Answering::hands;
        if (open && part_ == WeighPart::differ && DifferPage::has_something(view)) {
            if (const auto chosen = differ_.draw(ui, view, actions, area))
                show_pair(chosen->set, chosen->pair);
            return;
        }
        // What is read across a room stands alone.
        if (!narrow && (together || hands) && free.w >= 150) {
            draw_set_choice(ui, view, {free.x, free.y + 2, std::min(free.w, 320.0f), 34});
        } else if (narrow || together || hands) {
            draw_set_choice(ui, view, area.take_top(36, 10));
        } else {
            const Box list = area.take_left(std::clamp(area.w * 0.23f, 170.0f, 230.0f), 16);
            if (const auto set = draw_set_list(ui, view, set_, revealed_, list)) set_ = *set;
        }
        if (together && !entry.from_points) {
            together_.draw(ui, view, actions, group, pair_, area);
        } else if (nobody) {
            draw_hand_over(ui, view, actions, group, revealed_, area);
        } else if (entry.from_points) {
            points_.draw(ui, view, actions, entry, area);
        } else if (hands) {
            hands_.draw(ui, view, actions, group, pair_, area);
        } else {
            draw_work(ui, view, actions, entry, area, narrow);
        }
    }

    void draw_work(Ui& ui, const RoomView& view, Actions& actions, const SetResult& entry, Box area,
                   bool narrow) {
        if (!view.sealed() || !view.person.empty()) actions.examine(set_, view.person);
        if (grid_.large()) {
            if (const auto pair = grid_.draw(ui, view, actions, entry, pair_, area)) pair_ = *pair;
            return;
        }
        if (hold_.large()) {
            if (const auto pair = hold_.draw(ui, view, actions, entry, area)) {
                pick(*pair);
                hold_.shrink(); // To the arm, where the pair is.
            }
            return;
        }
        const float card = narrow ? 352.0f : std::clamp(area.h * 0.55f, 350.0f, 500.0f);
        const float more = card_.more_height(view, entry, pair_);
        card_.draw(ui, view, actions, entry, pair_, area.take_top(card + more, 12));
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
        // The keyboard stays with the grid.
        if (const auto pair = grid_.draw(ui, view, actions, entry, pair_, grid)) pair_ = *pair;
        if (const auto pair = hold_.draw(ui, view, actions, entry, words)) pick(*pair);
    }

    /// A pair of any set, with everybody's answers to it.
    void show_pair(const Id& set, const ItemPair& pair) {
        set_ = set;
        shown_set_ = set;
        pair_ = pair;
        part_ = WeighPart::everybody;
        fresh();
        together_.fresh(true);
    }

    void pick(const ItemPair& pair) {
        pair_ = pair;
        card_.fresh(true);
    }

    PairCard card_;
    TogetherCard together_;
    HandsCard hands_;
    DifferPage differ_;
    PairGrid grid_;
    HoldCard hold_;
    PointsCard points_;
    Id set_;
    Id shown_set_; ///< The set the pair belongs to, and who is asked.
    Id shown_person_;
    Answering shown_way_ = Answering::agreed;
    std::set<Id> revealed_; ///< Sets opened while the others are sealed.
    WeighPart part_ = WeighPart::arm;
    int last_frame_ = -2;
    ItemPair pair_;
};

} // namespace

std::unique_ptr<Room> make_weigh_room() {
    return std::make_unique<Weigh>();
}

} // namespace steelyard
