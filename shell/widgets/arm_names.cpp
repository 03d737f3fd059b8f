#include "shell/widgets/arm_names.hpp"

#include <algorithm>
#include <cmath>
#include <numeric>

namespace steelyard {

std::vector<PlacedName> place_names(const std::vector<NameWish>& wishes, float left, float right,
                                    float centre, float gap) {
    std::vector<PlacedName> placed(wishes.size());
    std::vector<std::size_t> order(wishes.size());
    std::iota(order.begin(), order.end(), std::size_t{0});
    // From the ends inwards: a name only ever lies over poles farther out, which then end below it.
    std::stable_sort(order.begin(), order.end(), [&](std::size_t a, std::size_t b) {
        return std::abs(wishes[a].x - centre) > std::abs(wishes[b].x - centre);
    });
    for (std::size_t k = 0; k < order.size(); ++k) {
        const NameWish& wish = wishes[order[k]];
        PlacedName& name = placed[order[k]];
        name.to_left = wish.x < centre;
        const float space = name.to_left ? wish.x - left : right - wish.x;
        name.width = std::min(wish.width, std::max(0.0f, space - gap));
        name.left = name.to_left ? wish.x - gap - name.width : wish.x + gap;
        const float from = std::min(wish.x, name.left) - gap;
        const float to = std::max(wish.x, name.left + name.width) + gap;
        for (std::size_t j = 0; j < k; ++j) {
            const float pole = wishes[order[j]].x;
            const bool same_side = placed[order[j]].to_left == name.to_left;
            if (same_side && pole >= from && pole <= to)
                name.row = std::max(name.row, placed[order[j]].row + 1);
        }
    }
    return placed;
}

std::size_t rows_of(const std::vector<PlacedName>& names) {
    std::size_t rows = 0;
    for (const auto& name : names) rows = std::max(rows, name.row + 1);
    return rows;
}

} // namespace steelyard
