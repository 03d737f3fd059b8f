#pragma once

#include <optional>

#include "shell/rooms/weigh_apart.hpp"
#include "shell/widgets/arm.hpp"

namespace steelyard {

/// What everybody answered, pair by pair, as named poises on one arm, large enough to be read across a room;
/// and settling a pair in the room.
class TogetherCard {
public:
    /// `pair` is the one shown and is moved on here. `group`: the group's entry of the set.
    void draw(Ui& ui, const RoomView& view, Actions& actions, const SetResult& group, ItemPair& pair,
              Box box);
    /// The set is shown anew, from the most disputed pair on, or with `keep` from the pair that is shown.
    void fresh(bool keep = false);
    void reset() { *this = TogetherCard{}; }

private:
    void draw_top(Ui& ui, const RoomView& view, Box row, std::size_t at, ItemPair& pair);
    void draw_words(Ui& ui, const RoomView& view, const ItemPair& pair, Box& inside);
    void draw_controls(Ui& ui, const RoomView& view, Actions& actions, const ItemPair& pair, Box row);
    void agree(const RoomView& view, Actions& actions, const ItemPair& pair);
    void move(ItemPair& pair, std::size_t at, int by);

    Id set_; ///< Drawn now.
    std::vector<ItemPair> order_;
    std::optional<double> proposal_; ///< Where the poise was put, not yet agreed.
    ArmMemory memory_;
    bool off_ = false;
    bool fresh_ = true;
    bool keep_ = false;
    bool focus_ = true;
};

} // namespace steelyard
