#pragma once

#include <string>

#include "shell/rooms/room.hpp"

namespace steelyard {

/// A matrix on its way in: its text, and what it would do, before it is done.
class MatrixPaste {
public:
    /// `text` as pasted; empty where it is still to be put into the field. For the answers of `person` in
    /// `set`.
    void open(std::string text, const Id& set, const Id& person);
    bool is_open(const Id& set, const Id& person) const { return open_ && set_ == set && person_ == person; }
    void close() { open_ = false; }

    /// Draws it in place of the grid. Gives false once it is done or given up.
    bool draw(Ui& ui, const RoomView& view, Actions& actions, const SetResult& entry, Box box);

private:
    bool open_ = false;
    bool fresh_ = false;
    bool clear_ = false;
    std::string text_;
    Id set_;
    Id person_;
};

} // namespace steelyard
