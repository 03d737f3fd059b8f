#pragma once

#include "shell/rooms/room.hpp"

namespace steelyard {

/// The ranking as stacked bars: what each criterion adds to the score of each option in play. A criterion
/// that has parts of its own can be opened.
class StandingBars {
public:
    /// Draws the card with its top left at `at`. Gives its bottom. Some option must be in play.
    float draw(Ui& ui, const RoomView& view, ImVec2 at, float width);

    /// Opens a criterion; a leaf opens what it is part of. Unknown ids change nothing.
    void open(const Id& criterion, const RoomView& view);
    void reset() { opened_.clear(); }

private:
    Id opened_; ///< The criterion whose parts are shown; empty: the goal.
};

} // namespace steelyard
