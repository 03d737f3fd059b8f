#pragma once

#include <optional>
#include <string>

#include "shell/rooms/room.hpp"
#include "shell/rooms/weigh_model.hpp"

namespace steelyard {

/// The list of sets; gives the one pressed.
std::optional<Id> draw_set_list(Ui& ui, const RoomView& view, const Id& chosen, Box box);

} // namespace steelyard
