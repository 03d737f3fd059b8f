#pragma once

#include <string>

#include "shell/rooms/room.hpp"

namespace steelyard {

/// The single most useful thing to do next, for the line below.
struct NextStep {
    std::string kind; ///< "Contradiction", "Open", "Begin", "Done".
    std::string text;
    std::string button; ///< Empty where there is nowhere to go.
    RoomId room = RoomId::frame;
    Id focus;
    bool urgent = false;
};

NextStep next_step(const RoomView& view);

/// How much is open in each room.
struct OpenCounts {
    int weigh = 0;
    int gauge = 0;
    int of(RoomId room) const;
};

OpenCounts count_open(const RoomView& view);

} // namespace steelyard
