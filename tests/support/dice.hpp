#pragma once

#include <cstdint>
#include <random>
#include <vector>

namespace steelyard::testing {

/// Random choices that are the same on every platform: the standard fixes the engine but not its
/// distributions. Draw once per statement: the order in which a compiler evaluates arguments is its own.
class Dice {
public:
    explicit Dice(std::uint64_t seed) : engine_(seed) {}

    /// 0 to n - 1, n >= 1. The remainder's bias is of no concern at these sizes.
    int below(int n) { return static_cast<int>(engine_() % static_cast<std::uint64_t>(n)); }
    /// low to high, both included.
    int between(int low, int high) { return low + below(high - low + 1); }
    bool chance(int percent) { return below(100) < percent; }
    template<class T>
    T pick(const std::vector<T>& list) {
        return list[static_cast<std::size_t>(below(count(list)))];
    }

private:
    template<class T>
    static int count(const std::vector<T>& list) {
        return static_cast<int>(list.size());
    }
    std::mt19937_64 engine_;
};

} // namespace steelyard::testing
