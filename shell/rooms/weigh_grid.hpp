#pragma once

#include <optional>
#include <string>

#include "shell/rooms/room.hpp"
#include "shell/rooms/weigh_model.hpp"

namespace steelyard {

/// All pairs of a set at a glance.
class PairGrid {
public:
    /// Gives the pair pressed.
    std::optional<ItemPair> draw(Ui& ui, const RoomView& view, Actions& actions, const SetResult& entry,
                                 const ItemPair& chosen, Box box);

    /// Text pasted while no field had the focus. True if it was taken.
    bool paste(const std::string&, const RoomView&, Actions&, const Id&) { return false; }
    void reset() {}
};

} // namespace steelyard
