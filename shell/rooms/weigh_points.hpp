#pragma once

#include <optional>
#include <string>

#include "shell/rooms/room.hpp"
#include "shell/rooms/weigh_model.hpp"

namespace steelyard {

/// Points shared out in place of pairs.
class PointsCard {
public:
    void draw(Ui& ui, const RoomView& view, Actions& actions, const SetResult& entry, Box box);
    void reset() {}
};

} // namespace steelyard
