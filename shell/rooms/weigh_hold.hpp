#pragma once

#include <optional>
#include <string>

#include "shell/rooms/room.hpp"
#include "shell/rooms/weigh_corrections.hpp"
#include "shell/rooms/weigh_model.hpp"

namespace steelyard {

/// Whether the answers of a set hold together, in words first; what to correct where they do not; what
/// weights they give; and the figures of the trade.
class HoldCard {
public:
    /// Gives a pair to look at.
    std::optional<ItemPair> draw(Ui& ui, const RoomView& view, Actions& actions, const SetResult& entry,
                                 Box box);
    void reset() { *this = {}; }

    /// It asks for all the room there is.
    bool large() const { return large_; }
    void shrink() { large_ = false; }

private:
    static void draw_open(Ui& ui, const RoomView& view, const SetResult& entry, TextFlow& flow);
    void draw_circles(Ui& ui, const RoomView& view, const SetResult& entry, TextFlow& flow);
    void draw_weights(Ui& ui, const RoomView& view, const SetResult& entry, TextFlow& flow);
    void draw_terms(Ui& ui, const RoomView& view, const SetResult& entry, TextFlow& flow) const;

    Corrections corrections_;
    bool all_methods_ = false;
    bool all_circles_ = false;
    bool settings_open_ = false;
    bool large_ = false;
};

} // namespace steelyard
