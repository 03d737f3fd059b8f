#pragma once

#include "shell/rooms/room.hpp"

namespace steelyard {

/// The cards of the standing that are lists of sentences. Each is drawn with its top left at `at` and gives
/// its bottom, or `at.y` where there is nothing to say and no card.

/// That the ranking is provisional, what stands in for what is missing, and how far the scores can still
/// move.
float draw_provisional(Ui& ui, const RoomView& view, ImVec2 at, float width);

/// Options that failed a must, with requirement, value and limit; options withdrawn.
float draw_not_in_play(Ui& ui, const RoomView& view, ImVec2 at, float width);

/// All that is open, each with the way to the room where it is answered. Says so where nothing is.
class StandingOpen {
public:
    float draw(Ui& ui, const RoomView& view, Actions& actions, ImVec2 at, float width);
    void reset() { all_ = false; }

private:
    bool all_ = false; ///< Also those beyond the first few.
};

/// What the solver noticed beside the ranking.
float draw_notices(Ui& ui, const RoomView& view, ImVec2 at, float width);

} // namespace steelyard
