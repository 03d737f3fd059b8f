#pragma once

#include <string>
#include <vector>

#include "shell/rooms/weigh_answers.hpp"

/// What several judges said of one pair, compared and put into words. No drawing.
namespace steelyard {

struct SaidBy {
    Id person;
    std::string name;
    double ratio = 1;
};

/// What stands of each person's own answers to a pair, in the order of the people.
std::vector<SaidBy> said_by_each(const RoomView& view, const Id& set, const ItemPair& pair);

/// How far the furthest two are apart: 15 for five times as much one way and three times the other. 1 where
/// fewer than two answered.
double times_apart(const std::vector<SaidBy>& said);

/// Who disagrees and by how much, in one to three short lines.
std::vector<std::string> apart_lines(const RoomView& view, const Id& set, const ItemPair& pair,
                                     const std::vector<SaidBy>& said);

/// The pairs of a set that somebody answered for himself, the furthest apart first.
std::vector<ItemPair> most_disputed_first(const RoomView& view, const SetResult& entry);

} // namespace steelyard
