#pragma once

#include <optional>
#include <set>
#include <string>

#include "shell/rooms/room.hpp"
#include "shell/rooms/weigh_model.hpp"

namespace steelyard {

/// The list of sets; gives the one pressed. While answers are sealed it tells of nobody but the one who
/// answers, and with nobody at the seat only how many have done. `revealed`: sets opened meanwhile.
std::optional<Id> draw_set_list(Ui& ui, const RoomView& view, const Id& chosen, const std::set<Id>& revealed,
                                Box box);

} // namespace steelyard
