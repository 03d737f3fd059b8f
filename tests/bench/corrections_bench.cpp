// How long the mathematics of corrections takes, against the slow way within the same run.
//   cmake --build build/native --target corrections_bench && build/native/corrections_bench
#include <algorithm>
#include <chrono>
#include <cstdint>
#include <cstdio>
#include <vector>

#include "core/judgment/best_value.hpp"
#include "core/judgment/changed_set.hpp"
#include "core/judgment/fewest_changes.hpp"
#include "core/judgment/misfits.hpp"
#include "core/judgment/random_index.hpp"
#include "tests/support/pairs.hpp"

namespace {

using namespace steelyard;
using Clock = std::chrono::steady_clock;

double milliseconds_since(Clock::time_point start) {
    return std::chrono::duration<double, std::milli>(Clock::now() - start).count();
}

struct Times {
    std::vector<double> all;

    void add(double ms) { all.push_back(ms); }
    double mean() const {
        double sum = 0;
        for (const double ms : all) sum += ms;
        return sum / static_cast<double>(all.size());
    }
    double most() const { return *std::max_element(all.begin(), all.end()); }
};

double sum = 0; // Of what was computed, so that nothing of it can be left out.

void row(const char* what, const Times& times, const Times& baseline) {
    std::printf("%-44s %10.3f %10.3f %6zu %10.4f\n", what, times.mean(), times.most(), times.all.size(),
                times.mean() / baseline.mean());
}

ConsistencyLimit limit_of(std::size_t n) {
    return {random_index(RandomIndexTable::alonso_lamata_2006, n).value(), .1};
}

/// Every triple of changes minimised, as the search would without leaving any out.
void all_triples(const PairMatrix& pairs) {
    const ChangeableSet set(pairs);
    const std::size_t m = set.judged().size();
    for (std::size_t p = 0; p < m; ++p)
        for (std::size_t q = p + 1; q < m; ++q)
            for (std::size_t r = q + 1; r < m; ++r)
                sum += set.change({p, q, r}, set.unchanged(), {1e-5}).floor;
}

void fewest(std::size_t n, const char* what, const char* slice_name, const char* slow_name) {
    constexpr std::size_t sets = 20;
    Times whole;
    Times slice;
    Times slow;
    for (std::uint64_t seed = 1; whole.all.size() < sets; ++seed) {
        const PairMatrix pairs = testing::random_near_pairs(n, 1.2, 0, seed);
        FewestChangesSearch search(pairs, limit_of(n));
        double longest = 0;
        double all = 0;
        for (bool more = true; more;) {
            const auto start = Clock::now();
            more = search.step();
            const double ms = milliseconds_since(start);
            longest = std::max(longest, ms);
            all += ms;
        }
        if (search.answer().changes.size() != 3 || !search.answer().proven) continue;
        sum += search.answer().lambda;
        whole.add(all);
        slice.add(longest);
        if (slow.all.size() < 3) {
            const auto start = Clock::now();
            all_triples(pairs);
            slow.add(milliseconds_since(start));
        }
    }
    row(what, whole, slow);
    row(slice_name, slice, slow);
    row(slow_name, slow, slow);
}

void best_values(std::size_t n, double noise, int missing, std::size_t sets, const char* what,
                 const char* slow_name) {
    Times fast;
    Times slow;
    for (std::uint64_t seed = 1; seed <= sets; ++seed) {
        const PairMatrix pairs = testing::random_near_pairs(n, noise, missing, seed);
        auto start = Clock::now();
        BestValues values(pairs);
        for (const auto& [i, j] : pairs.judged_pairs()) sum += values.of(i, j).value_or(BestValue{}).ratio;
        fast.add(milliseconds_since(start));
        start = Clock::now();
        for (const auto& [i, j] : pairs.judged_pairs()) {
            PairMatrix rest = pairs;
            rest.clear(i, j);
            if (rest.connected()) sum += complete_optimally(rest).principal.lambda;
        }
        slow.add(milliseconds_since(start));
    }
    row(what, fast, slow);
    row(slow_name, slow, slow);
}

/// The slow way would take many seconds, so all pairs are set against a few.
void misfits_of_hundred() {
    const PairMatrix pairs = testing::random_near_pairs(100, .7, 0, 1);
    for (const Method method : {Method::eigenvector, Method::geometric_mean}) {
        Times fast;
        Times slow;
        const Weights weights = weights_by(method, pairs).value();
        for (int run = 0; run < 3; ++run) {
            const auto start = Clock::now();
            sum += misfits(pairs, method, weights).front().given;
            fast.add(milliseconds_since(start));
        }
        constexpr std::size_t few = 30;
        const auto judged = pairs.judged_pairs();
        const auto start = Clock::now();
        for (std::size_t k = 0; k < few; ++k) {
            PairMatrix rest = pairs;
            rest.clear(judged[k * 160][0], judged[k * 160][1]);
            sum += weights_by(method, rest).value().front();
        }
        slow.add(milliseconds_since(start) / static_cast<double>(few) * static_cast<double>(judged.size()));
        const bool vector = method == Method::eigenvector;
        row(vector ? "misfits, n = 100, eigenvector" : "misfits, n = 100, geometric mean", fast, slow);
        row("  weights anew for each pair (from 30)", slow, slow);
    }
}

} // namespace

int main() {
    std::printf("%-44s %10s %10s %6s %10s\n", "", "mean ms", "most", "runs", "to slow");
    fewest(9, "fewest changes, n = 9, three needed", "  longest slice", "  all triples, none left out");
    fewest(10, "fewest changes, n = 10, three needed", "  longest slice", "  all triples, none left out");
    best_values(9, .7, 0, 50, "best values of all pairs, n = 9", "  completions without each pair");
    best_values(9, .7, 40, 50, "the same, incomplete", "  completions without each pair");
    best_values(30, .7, 40, 2, "the same, incomplete, n = 30", "  completions without each pair");
    misfits_of_hundred();
    return sum == 0 ? 1 : 0;
}
