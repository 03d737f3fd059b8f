#pragma once

#include <optional>

#include "shell/rooms/gauge_model.hpp"
#include "shell/widgets/grid.hpp"

/// Which cell of the table is chosen, and how the choice moves.
namespace steelyard::gauge {

/// What is chosen in the table and what is being typed into it.
struct TableState {
    bool must = false; ///< `row` is a must, not a leaf.
    Id row;
    Id option;
    CellEdit edit;
    bool editing = false;
    bool open_choices = false;
    bool take_keyboard = false;
    bool had_keyboard = false; ///< Before the pointer went down.
    bool reveal = false;       ///< Scroll to what is chosen.
};

/// A cell of a model: places of its row and its option.
struct Place {
    std::size_t row = 0;
    std::size_t option = 0;
    bool operator==(const Place&) const = default;
};

/// Where the choice stands; none where nothing is chosen, or where it is no longer there.
std::optional<Place> chosen(const Model& model, const Decision& decision, const TableState& state);

void choose(const Model& model, const Decision& decision, TableState& state, const Place& to);

/// Chooses the leaf or must with this id, and in its row the first open cell, or else the column chosen
/// before. False where there is none. There must be options.
bool choose_row(const Model& model, const Decision& decision, TableState& state, const Id& id, bool must);

/// The cell so many columns and rows away. Goes over section heads, stops at the edges.
Place moved(const Model& model, Place from, int right, int down);

/// The next (`step` 1) or last (-1) cell, from the end of a row to the next row.
Place moved_on(const Model& model, const Place& from, int step);

/// The first row with cells; none in an empty table.
std::optional<std::size_t> first_row(const Model& model);

} // namespace steelyard::gauge
