#include "core/judgment/pair_matrix.hpp"

#include <algorithm>
#include <cassert>
#include <cmath>

namespace steelyard {

PairMatrix::PairMatrix(std::size_t size) : size_(size), entries_(size * size, 0.0) {
    for (std::size_t i = 0; i < size; ++i) entries_[i * size + i] = 1;
}

void PairMatrix::set(std::size_t i, std::size_t j, double ratio) {
    assert(i != j && ratio > 0 && std::isfinite(ratio));
    entries_[i * size_ + j] = ratio;
    entries_[j * size_ + i] = 1 / ratio;
}

void PairMatrix::clear(std::size_t i, std::size_t j) {
    assert(i != j);
    entries_[i * size_ + j] = 0;
    entries_[j * size_ + i] = 0;
}

std::vector<PairMatrix::Pair> PairMatrix::missing() const {
    std::vector<Pair> pairs;
    for (std::size_t i = 0; i < size_; ++i) {
        for (std::size_t j = i + 1; j < size_; ++j) {
            if (!judged(i, j)) pairs.push_back({i, j});
        }
    }
    return pairs;
}

std::vector<PairMatrix::Pair> PairMatrix::judged_pairs() const {
    std::vector<Pair> pairs;
    for (std::size_t i = 0; i < size_; ++i) {
        for (std::size_t j = i + 1; j < size_; ++j) {
            if (judged(i, j)) pairs.push_back({i, j});
        }
    }
    return pairs;
}

bool PairMatrix::complete() const {
    return std::none_of(entries_.begin(), entries_.end(), [](double x) { return x == 0; });
}

std::vector<std::vector<std::size_t>> PairMatrix::parts() const {
    std::vector<std::vector<std::size_t>> parts;
    std::vector<bool> seen(size_, false);
    for (std::size_t start = 0; start < size_; ++start) {
        if (seen[start]) continue;
        std::vector<std::size_t> part{start};
        seen[start] = true;
        for (std::size_t k = 0; k < part.size(); ++k) {
            for (std::size_t j = 0; j < size_; ++j) {
                if (!seen[j] && judged(part[k], j)) {
                    seen[j] = true;
                    part.push_back(j);
                }
            }
        }
        std::sort(part.begin(), part.end());
        parts.push_back(std::move(part));
    }
    return parts;
}

PairMatrix PairMatrix::restricted(const std::vector<std::size_t>& items) const {
    PairMatrix result(items.size());
    for (std::size_t i = 0; i < items.size(); ++i) {
        for (std::size_t j = i + 1; j < items.size(); ++j) {
            if (judged(items[i], items[j])) result.set(i, j, at(items[i], items[j]));
        }
    }
    return result;
}

} // namespace steelyard
