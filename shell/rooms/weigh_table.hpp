#pragma once

#include <optional>

#include "shell/rooms/weigh_grid.hpp"
#include "shell/rooms/weigh_pairs.hpp"

namespace steelyard {

/// The cells of a set with the names of its items in sight, both halves. Above the diagonal are the answers,
/// with their marks; below it their reciprocals, which can be typed as well. Gives the pair chosen anew, in
/// item order.
std::optional<ItemPair> draw_pair_table(Ui& ui, const RoomView& view, Actions& actions,
                                        const SetResult& entry, const PairTable& table,
                                        PairGrid::TableState& state, Box box);

/// Puts the whole matrix into the clipboard and says so.
void copy_matrix(Actions& actions, const PairTable& table);

/// The signs drawn in the corners of cells.
enum class PairMark { far, little, circle, ranges, agreed, mean };
void draw_pair_mark(const Ui& ui, PairMark mark, ImVec2 middle);

/// What the marks of this set mean, each with its sign; only those that stand in it. Gives its height; `draw`
/// false: only measures.
float draw_mark_legend(Ui& ui, const PairTable& table, const Box& box, bool draw);

} // namespace steelyard
