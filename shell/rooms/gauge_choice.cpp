#include "shell/rooms/gauge_choice.hpp"

#include <algorithm>
#include <cstdlib>

namespace steelyard::gauge {
namespace {

template<class Rows>
auto find_row(Rows& rows, const Id& id, bool must) {
    return std::find_if(rows.begin(), rows.end(), [&](const Row& row) {
        return !row.cells.empty() && row.is_must() == must && row.id == id;
    });
}

auto find_column(const Decision& decision, const Id& id) {
    return std::find_if(decision.options.begin(), decision.options.end(),
                        [&](const Option& option) { return option.id == id; });
}

} // namespace

std::optional<Place> chosen(const Model& model, const Decision& decision, const TableState& state) {
    const auto row = find_row(model.rows, state.row, state.must);
    const auto option = find_column(decision, state.option);
    if (row == model.rows.end() || option == decision.options.end()) return std::nullopt;
    return Place{static_cast<std::size_t>(row - model.rows.begin()),
                 static_cast<std::size_t>(option - decision.options.begin())};
}

void choose(const Model& model, const Decision& decision, TableState& state, const Place& to) {
    state.must = model.rows[to.row].is_must();
    state.row = model.rows[to.row].id;
    state.option = decision.options[to.option].id;
    state.reveal = true;
}

bool choose_row(const Model& model, const Decision& decision, TableState& state, const Id& id, bool must) {
    const auto row = find_row(model.rows, id, must);
    if (row == model.rows.end()) return false;
    const auto open =
        std::find_if(row->cells.begin(), row->cells.end(), [](const Cell& cell) { return cell.open; });
    state.must = must;
    state.row = id;
    if (open != row->cells.end()) {
        state.option = decision.options[static_cast<std::size_t>(open - row->cells.begin())].id;
    } else if (find_column(decision, state.option) == decision.options.end()) {
        state.option = decision.options.front().id;
    }
    state.take_keyboard = true;
    state.reveal = true;
    return true;
}

Place moved(const Model& model, Place from, int right, int down) {
    const int last = static_cast<int>(model.columns.size()) - 1;
    from.option = static_cast<std::size_t>(std::clamp(static_cast<int>(from.option) + right, 0, last));
    const int step = down < 0 ? -1 : 1;
    const int end = static_cast<int>(model.rows.size());
    for (int left = std::abs(down); left > 0; --left) {
        int next = static_cast<int>(from.row) + step;
        while (next >= 0 && next < end && model.rows[static_cast<std::size_t>(next)].cells.empty())
            next += step;
        if (next < 0 || next >= end) break;
        from.row = static_cast<std::size_t>(next);
    }
    return from;
}

Place moved_on(const Model& model, const Place& from, int step) {
    const int columns = static_cast<int>(model.columns.size());
    const int option = static_cast<int>(from.option) + step;
    if (option >= 0 && option < columns) return moved(model, from, step, 0);
    const Place there = moved(model, from, 0, step);
    // Before the first and behind the last cell there is none.
    return there == from ? from : moved(model, there, step > 0 ? -columns : columns, 0);
}

std::optional<std::size_t> first_row(const Model& model) {
    for (std::size_t r = 0; r < model.rows.size(); ++r) {
        if (!model.rows[r].cells.empty()) return r;
    }
    return std::nullopt;
}

} // namespace steelyard::gauge
