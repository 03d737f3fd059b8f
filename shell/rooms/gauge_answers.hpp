#pragma once

#include <optional>
#include <string>
#include <vector>

#include "shell/rooms/gauge_model.hpp"

/// What is entered into cells, as edits.
namespace steelyard::gauge {

/// Enters what was typed into a cell. Where that is refused, a sentence says why. Text without any sign
/// clears the cell.
std::optional<std::string> enter_text(const RoomView& view, Actions& actions, const Row& row,
                                      const Id& option, const std::string& text);

/// Opens a cell again: what stands there becomes history.
void clear_cell(const RoomView& view, Actions& actions, const Row& row, const Id& option);

/// What can be picked in a cell of grades or of yes and no, and which of it stands (for the person who
/// answers).
struct Answers {
    std::vector<std::string> labels; ///< The last one opens the cell again.
    std::optional<std::size_t> standing;
};
Answers answers_of(const RoomView& view, const Row& row, const Id& option);
void enter_answer(const RoomView& view, Actions& actions, const Row& row, const Id& option,
                  std::size_t answer);

/// The number of a cell as it is typed; empty where there is none.
std::string typed_text(const RoomView& view, const Row& row, const Id& option);

} // namespace steelyard::gauge
