#pragma once

#include <set>

#include "shell/rooms/weigh_answers.hpp"

/// Who answers how, in the head of the room, and the card that hands over from one judge to the next.
namespace steelyard {

/// What the room shows while it answers in one voice.
enum class WeighPart { arm, everybody, differ };

/// Height the head takes in so much width; 0 where nobody is named who could answer for himself.
float head_height(const RoomView& view, const Id& set, float width);

/// The way of answering, and who answers; `part` is changed by its buttons. Gives what is left free between,
/// on the first line.
Box draw_head(Ui& ui, const RoomView& view, Actions& actions, const SetResult& group, WeighPart& part,
              Box box);

/// Sealed, with nobody at the seat: who has answered what, whom to hand over to, and revealing a set. Adds to
/// `revealed`.
void draw_hand_over(Ui& ui, const RoomView& view, Actions& actions, const SetResult& group,
                    std::set<Id>& revealed, Box box);

} // namespace steelyard
