#pragma once

#include <optional>

#include "shell/rooms/gauge_model.hpp"
#include "shell/widgets/grid.hpp"

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
    bool reveal = false; ///< Scroll to what is chosen.
};

/// Where in the model the choice stands.
struct Chosen {
    std::size_t row = 0;
    std::size_t option = 0;
};

/// None where nothing is chosen, or where it is no longer there.
std::optional<Chosen> chosen(const Model& model, const Decision& decision, const TableState& state);

/// Chooses the leaf or must with this id, and in its row the first open cell, or else the column chosen before. False
/// where there is none.
bool choose_row(const Model& model, const Decision& decision, TableState& state, const Id& id, bool must);

/// The table with its keys: options across, leaves and musts down.
void draw_table(Ui& ui, const RoomView& view, Actions& actions, const Model& model, TableState& state, Box box);

/// "Purchase price of Brook".
std::string cell_name(const Row& row, const Decision& decision, const Id& option);

} // namespace steelyard::gauge
