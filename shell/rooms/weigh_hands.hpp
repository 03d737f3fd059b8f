#pragma once

#include <cstddef>
#include <limits>
#include <map>
#include <set>
#include <vector>

#include "shell/rooms/weigh_apart.hpp"
#include "shell/widgets/arm.hpp"

namespace steelyard {

/// A show of hands: one person types each judge's digit in turn.
///
/// A digit enters the answer of the judge whose turn it is, as one step that can be undone, and moves on to
/// the next. X or minus turns the side of the answer typed last; before the first one it turns the side that
/// digits count for.
/// 0 or A: no answer. Backspace goes one judge back; his next digit replaces the one before. Enter: the next
/// pair.
class HandsCard {
public:
    void draw(Ui& ui, const RoomView& view, Actions& actions, const SetResult& group, ItemPair& pair,
              Box box);
    /// Another pair was chosen.
    void fresh();
    void reset() { *this = HandsCard{}; }
    ItemPair first_pair(const RoomView& view, const SetResult& group) const;

private:
    struct Turn;
    /// Stands for the first judge who has not said anything.
    static constexpr std::size_t first_open = std::numeric_limits<std::size_t>::max();
    void read_keys(const RoomView& view, Actions& actions, const Turn& turn, ItemPair& pair);
    void digit(const RoomView& view, Actions& actions, const Turn& turn, int value);
    void turn_side(const RoomView& view, Actions& actions, const Turn& turn);
    void pass(const RoomView& view, Actions& actions, const Turn& turn);
    void back(const Turn& turn);
    void move_on(const RoomView& view, const SetResult& group, ItemPair& pair, bool skip);
    void draw_words(Ui& ui, const RoomView& view, const Turn& turn, Box& inside);
    void draw_judges(Ui& ui, const RoomView& view, const Turn& turn, Box box);
    void draw_buttons(Ui& ui, const RoomView& view, Actions& actions, const Turn& turn, ItemPair& pair,
                      Box& inside);

    Id set_; ///< Drawn now.
    std::size_t at_ =
        first_open;       ///< Whose turn it is, among the judges of the pair; their number: all are through.
    std::set<Id> passed_; ///< Gave no answer to this pair.
    Id last_;             ///< Whose answer to this pair was typed last.
    bool other_side_ = false; ///< Digits count for the right load.
    bool focus_ = true;
    std::map<Id, std::vector<ItemPair>> skipped_;
};

} // namespace steelyard
