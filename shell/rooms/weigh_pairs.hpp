#pragma once

#include <cstddef>
#include <optional>
#include <string>
#include <utility>
#include <vector>

#include "shell/rooms/room.hpp"
#include "shell/rooms/weigh_model.hpp"

/// What the grid says of every pair of a set. No drawing.
namespace steelyard {

/// Where the answer of a pair comes from.
enum class PairSource {
    missing,
    own,       ///< Of the one who answers.
    agreed,    ///< Agreed in the room.
    others,    ///< Of one or several judges, seen by the group.
    abstained, ///< Whoever answers takes no part where one of the two is judged.
};

enum class PairOff { none, little, far };

/// One pair of items i < j. Ratios are those of i against j.
struct PairCell {
    PairSource source = PairSource::missing;
    std::optional<double>
        ratio;                 ///< None also where the mean of several judges has no set that hangs together.
    std::optional<double> own; ///< His own answer where an agreed one stands in its place.
    std::vector<std::pair<Id, double>> said; ///< Each judge's answer, for `others`.
    PairOff off = PairOff::none;
    std::optional<double> implied; ///< What the other answers say.
    std::vector<Id> circles;       ///< The third item of each circle the pair is part of.
    std::string ranges;            ///< That it was judged on other ranges, and which; empty where it was not.

    /// The answers of several judges, or of one of them, are not to be changed for the group.
    bool mean() const { return source == PairSource::others; }
};

/// The pairs of a set as `view.person` sees them; nobody else's answers while all answer alone.
class PairTable {
public:
    PairTable(const RoomView& view, const SetResult& entry);

    std::size_t size() const { return names_.size(); }
    const std::vector<std::string>& names() const { return names_; }
    const Id& item(std::size_t i) const { return entry_.items[i]; }

    /// The cell of two different items, in any order.
    const PairCell& pair(std::size_t i, std::size_t j) const {
        return i < j ? cells_[i * size() + j] : cells_[j * size() + i];
    }
    /// The ratio of i against j, in any order.
    std::optional<double> ratio(std::size_t i, std::size_t j) const;

    /// Why the answer cannot be typed here; empty where it can.
    std::string why_not(std::size_t i, std::size_t j) const;

    /// What a cell shows: "3", "1/3", a dash, "4 answers".
    std::string text(std::size_t i, std::size_t j) const;

    /// What needs to be said of it in a word or two, the weightiest only: "far off", "mean of 4", "agreed".
    std::string word(std::size_t i, std::size_t j) const;

    /// All that the cell says, for those who do not see its marks: "1/6, far off, in a circle".
    std::string all_words(std::size_t i, std::size_t j) const;

    /// Whose answer it is, who said what, what contradicts it, in sentences.
    std::string sentences(std::size_t i, std::size_t j) const;

    /// True where it must be said that an answer is an agreed one, since others could stand there.
    bool marked_agreed(std::size_t i, std::size_t j) const {
        return pair(i, j).source == PairSource::agreed && (mixed_ || !view_.person.empty());
    }

private:
    PairCell& cell(std::size_t i, std::size_t j) { return cells_[i * size() + j]; }
    std::optional<std::size_t> place(const Id& item) const;
    void gather_answers();
    void mark_misfits();
    void mark_circles();

    const RoomView& view_;
    const SetResult& entry_;
    std::vector<std::string> names_;
    std::vector<PairCell> cells_;
    bool marks_ = false; ///< The entry's figures are those of the answers shown.
    bool mixed_ = false; ///< There are agreed answers and those of judges.
};

} // namespace steelyard
