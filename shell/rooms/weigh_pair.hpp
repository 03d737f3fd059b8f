#pragma once

#include <map>
#include <optional>
#include <string>
#include <utility>
#include <vector>

#include "shell/rooms/room.hpp"
#include "shell/rooms/weigh_answers.hpp"
#include "shell/widgets/arm.hpp"

namespace steelyard {

/// One pair on the arm: the question or the answer in words, the arm, what can be done with it.
class PairCard {
public:
    /// `pair` is the one shown, and is moved on by Enter and Skip.
    void draw(Ui& ui, const RoomView& view, Actions& actions, const SetResult& entry, ItemPair& pair,
              Box box);

    /// Height the card takes beyond what every pair does: for what is said about this one.
    float more_height(const RoomView& view, const SetResult& entry, const ItemPair& pair) const;

    /// Another pair is shown: the arm takes the keyboard, and with `bring_in` is scrolled into sight.
    void fresh(bool bring_in = false);

    /// The pair to begin a set with.
    ItemPair first_pair(const RoomView& view, const SetResult& entry) const;

    void reset();

private:
    using Place = std::pair<Id, Id>; ///< Set and person.

    void draw_words(Ui& ui, const RoomView& view, Actions& actions, const ItemPair& pair, Box& inside);
    void draw_controls(Ui& ui, const RoomView& view, Actions& actions, const SetResult& entry, ItemPair& pair,
                       Box row);
    void draw_remark(Ui& ui, const RoomView& view, Actions& actions, const Judgment* own, Box& row);
    void draw_progress(Ui& ui, const RoomView& view, Actions& actions, const SetResult& entry, ItemPair& pair,
                       Box row);
    void draw_go_on(Ui& ui, const RoomView& view, Actions& actions, Box& row);
    ArmState arm_state(const RoomView& view, const SetResult& entry, const ItemPair& pair) const;
    void move_on(const RoomView& view, const SetResult& entry, ItemPair& pair, bool skip);
    Asking asking(const RoomView& view, const SetResult& entry) const;
    Id star(const RoomView& view, const Id& set) const;

    Id set_; ///< Drawn now.
    ArmMemory memory_;
    std::optional<double> preview_; ///< While the poise is dragged.
    bool off_ = false;              ///< It is held off the beam.
    bool fresh_ = false;
    bool remark_open_ = false;
    std::map<Place, Id> stars_; ///< What each person named as mattering most.
    std::map<Place, std::vector<ItemPair>> skipped_;
};

} // namespace steelyard
