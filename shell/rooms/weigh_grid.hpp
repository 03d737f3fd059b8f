#pragma once

#include <optional>
#include <string>

#include "shell/rooms/room.hpp"
#include "shell/rooms/weigh_model.hpp"
#include "shell/rooms/weigh_paste.hpp"
#include "shell/widgets/grid.hpp"

namespace steelyard {

class PairTable;

/// All pairs of a set at a glance, as a table to read, to type into, to copy and to paste.
class PairGrid {
public:
    /// Gives the pair pressed, or gone to by keys.
    std::optional<ItemPair> draw(Ui& ui, const RoomView& view, Actions& actions, const SetResult& entry,
                                 const ItemPair& chosen, Box box);

    /// Text pasted while no field had the focus. True if it was taken.
    bool paste(const std::string& text, const RoomView& view, Actions& actions, const Id& set);
    void reset() { *this = {}; }

    /// The grid has the keyboard: what is typed belongs to it.
    bool has_keyboard() const { return table_.has_keyboard; }

    /// It asks for all the room there is.
    bool large() const { return large_; }

    /// What the table of cells remembers from frame to frame.
    struct TableState {
        Id row; ///< The chosen cell.
        Id column;
        CellEdit edit;
        bool editing = false;
        bool take_keyboard = false; ///< In the next frame.
        bool had_keyboard = false;  ///< When the last press began.
        bool has_keyboard = false;
        bool reveal = false; ///< Scroll to the chosen cell.
    };

private:
    void draw_head(Ui& ui, const RoomView& view, Actions& actions, const PairTable& table, Box head);

    TableState table_;
    MatrixPaste paste_;
    Id set_; ///< Drawn last.
    bool large_ = false;
};

} // namespace steelyard
