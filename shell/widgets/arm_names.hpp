#pragma once

#include <cstddef>
#include <vector>

namespace steelyard {

/// A name to be written beside the pole that rises from a poise.
struct NameWish {
    float x = 0;     ///< Of the pole.
    float width = 0; ///< Of the name.
};

/// Where it goes: like a flag, to the outer side of its pole.
struct PlacedName {
    float left = 0;
    float width = 0;     ///< Less than wished where the space to the edge is less.
    std::size_t row = 0; ///< 0 is the lowest.
    bool to_left = false;
};

/// Gives each name a row so that no two names meet and no pole runs through a name. Names left of `centre`
/// fly to the left, the others to the right; the farther in, the higher. `left` and `right` bound the space;
/// `gap` lies between a pole and its name and between two names.
std::vector<PlacedName> place_names(const std::vector<NameWish>& wishes, float left, float right,
                                    float centre, float gap);

/// How many rows that takes.
std::size_t rows_of(const std::vector<PlacedName>& names);

} // namespace steelyard
