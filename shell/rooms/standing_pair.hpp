#pragma once

#include "shell/rooms/room.hpp"

namespace steelyard {

/// Two options side by side: on which criteria the one gains on the other, and by how much.
class StandingPair {
public:
    /// Draws the card with its top left at `at`. Gives its bottom. Two options must be in play.
    float draw(Ui& ui, const RoomView& view, ImVec2 at, float width);
    void reset() { *this = {}; }

private:
    void choose(const Results& results);
    float draw_heads(Ui& ui, const RoomView& view, ImVec2 at, float width);

    Id one_;   ///< Chosen by hand; empty: the option in first place.
    Id other_; ///< Empty: the next one in rank.
    bool groups_ = false;
    std::size_t x_ = 0; ///< Their places in Results::options, found anew in every frame.
    std::size_t y_ = 0;
};

} // namespace steelyard
