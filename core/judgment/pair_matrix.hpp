#pragma once

#include <array>
#include <cstddef>
#include <vector>

namespace steelyard {

/// The judgments of one set as a positive reciprocal matrix, pairs possibly missing. Entry (i, j) says how
/// many times item i counts as much as item j.
class PairMatrix {
public:
    using Pair = std::array<std::size_t, 2>;

    explicit PairMatrix(std::size_t size);

    std::size_t size() const { return size_; }
    bool judged(std::size_t i, std::size_t j) const { return at(i, j) != 0; }

    /// The ratio of a judged pair, 1 on the diagonal, 0 for a missing pair.
    double at(std::size_t i, std::size_t j) const { return entries_[i * size_ + j]; }

    /// All ratios row by row, 1 on the diagonal, 0 for missing pairs.
    const std::vector<double>& entries() const { return entries_; }

    /// Sets the pair and its reciprocal. i != j; ratio positive and finite.
    void set(std::size_t i, std::size_t j, double ratio);
    void clear(std::size_t i, std::size_t j);

    /// Missing and judged pairs, i < j, row by row.
    std::vector<Pair> missing() const;
    std::vector<Pair> judged_pairs() const;
    bool complete() const;

    /// The groups of items that judgments link, each ascending, ordered by their first item. One for a
    /// connected matrix.
    std::vector<std::vector<std::size_t>> parts() const;
    bool connected() const { return parts().size() <= 1; }

    /// The matrix of the given items, in their order.
    PairMatrix restricted(const std::vector<std::size_t>& items) const;

private:
    std::size_t size_;
    std::vector<double> entries_;
};

} // namespace steelyard
