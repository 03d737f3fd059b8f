#pragma once

#include <array>
#include <optional>
#include <string>

#include "shell/rooms/room.hpp"
#include "shell/rooms/weigh_model.hpp"

namespace steelyard {

/// A pair of items of a set.
using ItemPair = std::array<Id, 2>;

/// The list of sets; gives the one pressed.
std::optional<Id> draw_set_list(Ui& ui, const RoomView& view, const Id& chosen, Box box);

/// All pairs of a set as a grid; gives the pair pressed.
std::optional<ItemPair> draw_grid(Ui& ui, const RoomView& view, const SetResult& entry,
                                  const ItemPair& chosen, Box box);

/// Whether the answers hold together, in words first, and the weights they give; gives a pair to look at.
std::optional<ItemPair> draw_consistency(Ui& ui, const RoomView& view, const SetResult& entry, Box box);

/// Points typed in place of pairs.
void draw_points(Ui& ui, const RoomView& view, const SetResult& entry, Actions& actions, Box box);

} // namespace steelyard
