// How long reading, solving and writing the largest decision takes that is meant to stay pleasant to work
// with.
//   cmake --build build/native --target steelyard_bench && build/native/steelyard_bench [SECONDS]
#include <algorithm>
#include <chrono>
#include <cstdio>
#include <cstdlib>
#include <string>
#include <vector>

#include "core/decision/fingerprint.hpp"
#include "core/decision/read.hpp"
#include "core/decision/write.hpp"
#include "core/results/solve.hpp"
#include "core/results/write_results.hpp"
#include "tests/support/large_decision.hpp"

namespace {

using Clock = std::chrono::steady_clock;

struct Timing {
    double median = 0; // Milliseconds, as the others.
    double least = 0;
    double most = 0;
    int runs = 0;
};

/// Runs `work` until `seconds` are over, at least five times. What it returns is summed, so that nothing of
/// it can be left out.
template<class Work>
Timing time_of(double seconds, std::size_t& sum, Work work) {
    std::vector<double> times;
    const auto end = Clock::now() + std::chrono::duration<double>(seconds);
    while (times.size() < 5 || Clock::now() < end) {
        const auto start = Clock::now();
        sum += work();
        times.push_back(std::chrono::duration<double, std::milli>(Clock::now() - start).count());
    }
    std::sort(times.begin(), times.end());
    return {times[times.size() / 2], times.front(), times.back(), static_cast<int>(times.size())};
}

} // namespace

int main(int argc, char** argv) {
    using namespace steelyard;
    const double seconds = argc > 1 ? std::atof(argv[1]) : 2;
    const Decision decision = testing::large_decision();
    const std::string text = write_decision(decision);
    const auto read = read_decision(text);
    if (!read.decision) {
        std::fprintf(stderr, "the large decision is refused: %s\n", sentence(read.problems.front()).c_str());
        return 1;
    }
    const Results results = solve(decision);
    std::printf(
        "large decision: %zu options, %zu leaves, %zu people, %zu judgments, %zu grades, %.0f KiB\n\n",
        decision.options.size(), results.leaves.size(), decision.people.size(), decision.judgments.size(),
        decision.grades.size(), static_cast<double>(text.size()) / 1024);

    std::size_t sum = 0;
    const Timing solving = time_of(seconds, sum, [&] { return solve(decision).sets.size(); });
    struct Row {
        const char* part;
        Timing timing;
    };
    const Row rows[] = {
        {"solve", solving},
        {"the fingerprint", time_of(seconds, sum, [&] { return decision_sha256(decision).size(); })},
        {"read the file",
         time_of(seconds, sum, [&] { return read_decision(text).decision->options.size(); })},
        {"write the file", time_of(seconds, sum, [&] { return write_decision(decision).size(); })},
        {"write the results, with it",
         time_of(seconds, sum, [&] { return write_results(decision, results).size(); })},
    };
    std::printf("%-28s %10s %10s %10s %6s %10s\n", "", "median ms", "least", "most", "runs", "to solve");
    for (const Row& row : rows) {
        const Timing& t = row.timing;
        std::printf("%-28s %10.2f %10.2f %10.2f %6d %10.2f\n", row.part, t.median, t.least, t.most, t.runs,
                    t.median / solving.median);
    }
    return sum == 0 ? 1 : 0;
}
