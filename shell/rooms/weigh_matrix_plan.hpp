#pragma once

#include <cstddef>
#include <string>
#include <vector>

#include "shell/rooms/room.hpp"
#include "shell/rooms/weigh_matrix_text.hpp"

namespace steelyard {

/// What a pasted matrix does to a set, as one step.
struct MatrixPlan {
    std::string problem; ///< Why it is refused, naming the cell; empty if it can be entered.
    std::string words;   ///< "Enters 6 answers, replaces 9, clears none."
    std::string notes;   ///< More to know before it is done; may be empty.
    std::vector<Edit> edits;
    std::string label;        ///< Of the step.
    std::size_t entered = 0;  ///< Where there was no answer.
    std::size_t replaced = 0; ///< Another answer in place of one.
    std::size_t as_before = 0;
    std::size_t left_blank = 0; ///< Answers that stand where the block has none.
};

/// `text` for the answers of `view.person` in the set of `entry`. `clear`: answers that the block leaves
/// blank are taken back.
MatrixPlan plan_matrix(const RoomView& view, const SetResult& entry, std::string_view text, bool clear);

} // namespace steelyard
