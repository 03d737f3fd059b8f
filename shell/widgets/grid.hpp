#pragma once

#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "shell/ui.hpp"

namespace steelyard {

/// What a person does to a table of cells in one frame. The table is one stop for Tab; the arrow keys belong
/// to it while it has the keyboard. Which cell is where, and which is chosen, is the caller's.
struct GridInput {
    bool focused = false;          ///< The table has the keyboard.
    std::optional<ImVec2> hovered; ///< The pointer, when it is on the table.
    std::optional<ImVec2> pressed; ///< Where a press ended that began at `began`.
    ImVec2 began{0, 0};
    int right = 0; ///< Cells to go by arrow keys; far ones for Home, End, Page Up and Page Down.
    int down = 0;
    bool edit = false;     ///< F2, Enter or Space.
    bool clear = false;    ///< Delete or Backspace.
    bool copy = false;     ///< Ctrl+C, or Cmd+C.
    std::string typed;     ///< Signs of a number typed onto the chosen cell.
    bool echo_due = false; ///< The same sign may still arrive as text.
};

/// Reports no ledger item: the caller reports its cells. `focus`: take the keyboard now.
GridInput grid_input(Ui& ui, std::string_view id, const Box& box, bool focus);

/// A cell being typed into; kept by the caller while it is open.
struct CellEdit {
    std::string id; ///< Of the ledger item.
    std::string text;
    bool caret_at_end = true; ///< Else the whole text is selected, to be typed over.
    std::string echo;         ///< A sign the text begins with that may arrive once more as typed text.
    bool open = false;        ///< It has had the keyboard.
    bool wrong = false;       ///< What was typed could not be read.
};

enum class CellLeft { not_yet, down, up, right, left, away, cancelled };

/// Gives the field the keyboard in the next frame. Call it where cell_editor() will be called.
void begin_cell_edit(CellEdit& edit);

/// Draws the field of an open cell. Says how it was left: Enter, Shift+Enter, Tab, Shift+Tab, by the pointer,
/// Escape.
CellLeft cell_editor(Ui& ui, CellEdit& edit, std::string_view name, const Box& box);

/// A list of answers beside a cell, opened by setting `open` (reset once it shows). Gives the index chosen.
std::optional<std::size_t> cell_choices(Ui& ui, std::string_view id, const std::vector<std::string>& labels,
                                        std::optional<std::size_t> chosen, const Box& cell, bool& open);

/// A ring of two colours around what has the keyboard.
void cell_ring(const Ui& ui, const Box& box);

/// The part of the current scrolled area that is in sight, without its scroll bars.
Box area_in_sight();

/// Scrolls the current area so that `wanted` is in sight, in a view whose top and left edge are covered by so
/// much; the page around it, too, unless told otherwise.
void scroll_into_sight(const Box& wanted, float covered_left, float covered_top, bool page_too = true);

} // namespace steelyard
