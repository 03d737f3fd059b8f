#pragma once

#include <optional>

#include "shell/rooms/room.hpp"
#include "shell/rooms/weigh_model.hpp"

namespace steelyard {

/// Where the judges differ, ordered by what it does to the standing; how alike they rank; the standing
/// without each of them.
class DifferPage {
public:
    struct Chosen {
        Id set;
        ItemPair pair;
    };

    /// Whether there is anything to show: two or more judges.
    static bool has_something(const RoomView& view) { return view.results.group.has_value(); }

    /// Gives a pair to look at.
    std::optional<Chosen> draw(Ui& ui, const RoomView& view, Actions& actions, Box area);

    void reset() { all_ = false; }

private:
    std::optional<Chosen> draw_pairs(Ui& ui, const RoomView& view, ImVec2 at, float width, float& bottom);

    bool all_ = false; ///< Also the pairs beyond the first few.
};

} // namespace steelyard
