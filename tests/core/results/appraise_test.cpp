#include <catch_amalgamated.hpp>
#include <vector>

#include "core/results/appraise.hpp"
#include "core/results/solve.hpp"
#include "tests/support/close.hpp"
#include "tests/support/dice.hpp"
#include "tests/support/random_decision.hpp"

// Other voices against edited decisions: the numbers must be the same to the last bit.
namespace steelyard {
namespace {

void check_same(const Standing& standing, const Results& results) {
    CHECK(standing.options == results.options);
    CHECK(standing.scores == results.scores);
    CHECK(standing.ranks == results.ranks);
    CHECK(standing.first == results.first);
}

} // namespace

TEST_CASE("appraise: everybody's voices give what solve gives, another agreed judgment what an edit gives") {
    testing::Dice dice(3);
    int agreed = 0;
    for (std::uint64_t seed = 1; seed <= testing::cases(300); ++seed) {
        INFO("seed " << seed);
        const Decision decision = testing::random_decision(seed);
        SolveCache cache;
        Appraiser appraiser(decision, cache);
        check_same(appraiser.standing(), solve(decision));
        if (decision.judgments.empty()) continue;
        ++agreed;
        Judgment judgment = dice.pick(decision.judgments);
        judgment.by.clear();
        judgment.ratio = dice.pick<double>({1. / 9, .5, 1, 3, 9});
        Decision edited = decision;
        edited.judgments.push_back(judgment);
        check_same(appraiser.standing(
                       {.agreed = Voices::Agreed{judgment.set, judgment.a, judgment.b, judgment.ratio}}),
                   solve(edited));
    }
    CHECK(agreed > 0);
}

TEST_CASE("appraise: without a person it is as if he had not answered") {
    int people = 0;
    for (std::uint64_t seed = 1; seed <= testing::cases(200); ++seed) {
        const Decision decision = testing::random_decision(seed);
        SolveCache cache;
        Appraiser appraiser(decision, cache);
        for (const auto& person : decision.people) {
            INFO("seed " << seed << " without " << person.id);
            ++people;
            Decision edited = decision;
            std::erase_if(edited.judgments, [&](const Judgment& j) { return j.by == person.id; });
            std::erase_if(edited.points, [&](const PointsEntry& p) { return p.by == person.id; });
            std::erase_if(edited.grades, [&](const GradeEntry& g) { return g.by == person.id; });
            check_same(appraiser.standing({.without = person.id}), solve(edited));
        }
    }
    CHECK(people > 0);
}

} // namespace steelyard
