#include "core/judgment/random_index.hpp"

#include <array>

namespace steelyard {
namespace {

constexpr std::size_t first_n = 3;
constexpr std::array alonso_lamata{.5245,  .8815,  1.1086, 1.2479, 1.3417, 1.4056, 1.4499,
                                   1.4854, 1.5141, 1.5365, 1.5551, 1.5713, 1.5838};
constexpr std::array saaty{.58, .90, 1.12, 1.24, 1.32, 1.41, 1.45, 1.49};

} // namespace

std::optional<double> random_index(RandomIndexTable table, std::size_t n) {
    if (n < first_n) return std::nullopt;
    const std::size_t i = n - first_n;
    if (table == RandomIndexTable::saaty_1980) {
        return i < saaty.size() ? std::optional(saaty[i]) : std::nullopt;
    }
    if (i < alonso_lamata.size()) return alonso_lamata[i];
    const auto size = static_cast<double>(n);
    return (1.7699 * size - 4.3513) / (size - 1); // Regression of the mean lambda max, same paper.
}

std::optional<double> random_index(RandomIndexTable table, std::size_t n, std::size_t missing) {
    const auto complete = random_index(table, n);
    if (!complete || 2 * missing >= (n - 1) * (n - 2)) return std::nullopt;
    return *complete * (1 - 2 * static_cast<double>(missing) / static_cast<double>((n - 1) * (n - 2)));
}

} // namespace steelyard
