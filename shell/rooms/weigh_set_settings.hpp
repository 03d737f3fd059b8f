#pragma once

#include "shell/rooms/room.hpp"
#include "shell/rooms/text_flow.hpp"

namespace steelyard {

/// What decides whether a set holds together, to be changed here for all sets: limit, table, method, and how
/// several judges are combined. `open` is whether it is unfolded.
void draw_set_settings(Ui& ui, const RoomView& view, Actions& actions, bool& open, TextFlow& flow);

} // namespace steelyard
