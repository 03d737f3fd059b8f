#include <catch_amalgamated.hpp>
#include <string>
#include <vector>

#include "core/results/solve.hpp"
#include "tests/support/close.hpp"
#include "tests/support/find_results.hpp"
#include "tests/support/round_trip.hpp"

// BELTON-GEAR: V. Belton, T. Gear, On a short-coming of Saaty's method of analytic hierarchies, Omega 11(3)
// (1983) 228-230. From memory of the source, reproduced by an independent computation: with consistent pairs
// the local values are the ratios themselves, so every score is a sum of three fractions.
namespace steelyard {

using testing::check_close;
using testing::rank_of;

namespace {

constexpr double printed = 0.00005; // Half a unit of the last of four printed digits.

/// Three criteria of equal weight, A, B and C (and D, a copy of B) in ratios of 1:9:1, 9:1:1 and 8:9:1.
Decision paper(const std::string& synthesis, bool with_copy) {
    std::vector<std::vector<double>> ratios{{1, 9, 1}, {9, 1, 1}, {8, 9, 1}};
    std::string options = R"({"id": "o0"}, {"id": "o1"}, {"id": "o2"})";
    if (with_copy) {
        for (auto& leaf : ratios) leaf.push_back(leaf[1]); // D is B again.
        options += R"(, {"id": "o3"})";
    }
    Decision decision =
        test::read(R"({"format": "steelyard-decision", "version": 1, "options": [)" + options +
                   R"(], "criteria": {"id": "goal", "weights": "points", "children": [
        {"id": "c0"}, {"id": "c1"}, {"id": "c2"}]},
        "points": [{"set": "goal", "points": {"c0": 1, "c1": 1, "c2": 1}}],
        "settings": {"synthesis": ")" +
                   synthesis + R"("}})");
    for (std::size_t c = 0; c < ratios.size(); ++c) {
        for (std::size_t i = 0; i < ratios[c].size(); ++i) {
            for (std::size_t j = i + 1; j < ratios[c].size(); ++j) {
                decision.judgments.push_back({.set = "c" + std::to_string(c),
                                              .by = {},
                                              .a = "o" + std::to_string(i),
                                              .b = "o" + std::to_string(j),
                                              .ratio = ratios[c][i] / ratios[c][j],
                                              .note = {},
                                              .at = {},
                                              .extras = {}});
            }
        }
    }
    return decision;
}

} // namespace

TEST_CASE("BELTON-GEAR: distributive, B is first, and a copy of B puts A first") {
    const Results three = solve(paper("distributive", false));
    check_close(three.scores, {.4512, .4697, .0791}, printed);
    CHECK(rank_of(three, "o1") == 1);
    CHECK(three.first == 1);

    const Results four = solve(paper("distributive", true));
    check_close(four.scores, {.3654, .2889, .0568, .2889}, printed);
    CHECK(rank_of(four, "o0") == 1);
    CHECK(rank_of(four, "o1") == 2);
    CHECK(rank_of(four, "o3") == 2);
    CHECK(four.first == 0);
}

TEST_CASE("BELTON-GEAR: ideal, a copy of B ties with it and B stays first") {
    const Results three = solve(paper("ideal", false));
    check_close(three.shares.value(), {.4500, .4750, .0750}, printed);
    CHECK(rank_of(three, "o1") == 1);

    const Results four = solve(paper("ideal", true));
    check_close(four.shares.value(), {.3051, .3220, .0508, .3220}, printed);
    CHECK(rank_of(four, "o1") == 1);
    CHECK(rank_of(four, "o3") == 1);
    CHECK(rank_of(four, "o0") == 3);
    CHECK(four.first == 1); // Of equals the earliest in the file.
    // The others' scores do not move at all.
    check_close({four.scores[0], four.scores[1], four.scores[2]}, three.scores, 1e-14);
}

TEST_CASE("BELTON-GEAR: scores of the distributive synthesis are their own shares") {
    const Results three = solve(paper("distributive", false));
    check_close(three.scores, three.shares.value(), 1e-14);
}

} // namespace steelyard
