// What an act costs: solving again after one judgment, from nothing and with what is remembered.
//   cmake --build build/native --target resolve_bench && build/native/resolve_bench [SECONDS]
//   cmake --build build/wasm --target resolve_bench && node --no-experimental-fetch
//   build/wasm/resolve_bench.js
#include <algorithm>
#include <chrono>
#include <cstdio>
#include <cstdlib>
#include <string>
#include <vector>

#include "core/results/disagreements.hpp"
#include "core/results/solve.hpp"
#include "tests/support/dice.hpp"
#include "tests/support/large_decision.hpp"

namespace {

using namespace steelyard;
using Clock = std::chrono::steady_clock;

/// Eight sets of nine items, each judged by six persons; a judgment in `missing` of a hundred left out.
Decision eight_sets(int missing) {
    testing::Dice dice(8);
    Decision d;
    for (int i = 1; i <= 9; ++i) d.options.push_back({.id = "o" + std::to_string(i)});
    for (int i = 1; i <= 6; ++i) d.people.push_back({.id = "p" + std::to_string(i)});
    d.criteria.id = "goal";
    for (int i = 1; i <= 9; ++i) d.criteria.children.push_back({.id = "c" + std::to_string(i)});
    // One set of criteria, seven leaves of pairs; the last two leaves are figures.
    for (std::size_t i = 7; i < 9; ++i) {
        d.criteria.children[i].rate = RateBy::figure;
        d.criteria.children[i].curve = Curve{ProportionalCurve{Better::less}, {}};
        for (const auto& option : d.options)
            d.figures.push_back({.criterion = d.criteria.children[i].id,
                                 .option = option.id,
                                 .value = static_cast<double>(dice.between(50, 99))});
    }
    for (std::size_t set = 0; set < 8; ++set) {
        const std::string letter = set == 0 ? "c" : "o";
        std::vector<int> sizes;
        for (int i = 0; i < 9; ++i) sizes.push_back(dice.between(1, 9));
        for (const auto& person : d.people) {
            for (std::size_t a = 0; a < 9; ++a) {
                for (std::size_t b = a + 1; b < 9; ++b) {
                    if (b > a + 1 && dice.chance(missing)) continue;
                    const double ratio =
                        std::clamp(sizes[a] * dice.between(6, 15) / (sizes[b] * 10.0), 1 / 9.0, 9.0);
                    d.judgments.push_back({.set = set == 0 ? "goal" : d.criteria.children[set - 1].id,
                                           .by = person.id,
                                           .a = letter + std::to_string(a + 1),
                                           .b = letter + std::to_string(b + 1),
                                           .ratio = ratio});
                }
            }
        }
    }
    return d;
}

struct Timing {
    double median = 0; // Milliseconds.
    double most = 0;
};

/// Enters one judgment after the other, each in another set and by another person, and times what is done
/// after each.
template<class Work>
Timing time_of(Decision decision, double seconds, Work work) {
    std::vector<double> times;
    const auto end = Clock::now() + std::chrono::duration<double>(seconds);
    const std::size_t given = decision.judgments.size();
    for (std::size_t k = 0; times.size() < 5 || Clock::now() < end; ++k) {
        Judgment& judgment = decision.judgments[(k * 7919) % given];
        judgment.ratio = judgment.ratio > 5 ? judgment.ratio / 1.25 : judgment.ratio * 1.25;
        const auto start = Clock::now();
        work(decision);
        times.push_back(std::chrono::duration<double, std::milli>(Clock::now() - start).count());
    }
    std::sort(times.begin(), times.end());
    return {times[times.size() / 2], times.back()};
}

void bench(const char* name, const Decision& decision, double seconds) {
    std::size_t sum = 0;
    const Timing anew = time_of(decision, seconds, [&](const Decision& d) { sum += solve(d).sets.size(); });
    SolveCache cache;
    solve(decision, cache);
    const Timing again =
        time_of(decision, seconds, [&](const Decision& d) { sum += solve(d, cache).sets.size(); });
    std::printf("%-44s %9.2f %9.2f %9.2f %9.2f %8.3f", name, anew.median, anew.most, again.median, again.most,
                again.median / anew.median);

    // What every disagreement does to the standing, from nothing and after one more judgment.
    SolveCache fresh;
    const Results results = solve(decision, cache);
    const auto start = Clock::now();
    sum += disagreements(decision, results, fresh).size();
    const double first = std::chrono::duration<double, std::milli>(Clock::now() - start).count();
    disagreements(decision, results, cache);
    Decision changed = decision;
    changed.judgments.front().ratio *= 1.25;
    const Results next = solve(changed, cache);
    const auto restart = Clock::now();
    const std::size_t count = disagreements(changed, next, cache).size();
    const double second = std::chrono::duration<double, std::milli>(Clock::now() - restart).count();
    std::printf("   %5zu %9.1f %9.1f\n", count, first, second);
    if (sum == 0) std::abort();
}

} // namespace

int main(int argc, char** argv) {
    const double seconds = argc > 1 ? std::atof(argv[1]) : 1;
    std::printf("%-44s %9s %9s %9s %9s %8s   %5s %9s %9s\n", "one judgment, then solve (ms)", "anew", "most",
                "remember", "most", "ratio", "pairs", "disagree", "again");
    for (const int missing : {0, 40}) {
        for (const Combine combine : {Combine::judgments, Combine::priorities}) {
            Decision d = eight_sets(missing);
            d.settings.combine = combine;
            const std::string name = "8 sets of 9, 6 judges, " + std::to_string(missing) + " % missing" +
                                     (combine == Combine::judgments ? "" : ", priorities");
            bench(name.c_str(), d, seconds);
        }
    }
    bench("60 leaves, 40 options, 12 judges", testing::large_decision(), seconds);
    return 0;
}
