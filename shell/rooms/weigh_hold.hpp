#pragma once

#include <optional>
#include <string>

#include "shell/rooms/room.hpp"
#include "shell/rooms/weigh_model.hpp"

namespace steelyard {

/// Whether the answers of a set hold together, in words first; what to correct where they do not.
class HoldCard {
public:
    /// Gives a pair to look at.
    std::optional<ItemPair> draw(Ui& ui, const RoomView& view, Actions& actions, const SetResult& entry,
                                 Box box);
    void reset() {}
};

} // namespace steelyard
