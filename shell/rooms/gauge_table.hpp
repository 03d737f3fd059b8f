#pragma once

#include "shell/rooms/gauge_choice.hpp"
#include "shell/rooms/gauge_model.hpp"

namespace steelyard::gauge {

/// The table with its keys: options across, leaves and musts down. Heads of columns and rows stay in sight.
void draw_table(Ui& ui, const RoomView& view, Actions& actions, const Model& model, TableState& state,
                Box box);

} // namespace steelyard::gauge
