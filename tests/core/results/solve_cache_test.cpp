#include <catch_amalgamated.hpp>
#include <string>
#include <vector>

#include "core/decision/check.hpp"
#include "core/results/session.hpp"
#include "core/results/solve.hpp"
#include "core/results/write_results.hpp"
#include "tests/support/close.hpp"
#include "tests/support/dice.hpp"
#include "tests/support/random_decision.hpp"

namespace steelyard {

using testing::Dice;

namespace {

/// Changes something anywhere in a decision: answers, people, options, settings, names, figures.
void change_something(Dice& dice, Decision& d) {
    switch (dice.below(12)) {
    case 0:
    case 1:
    case 2:
        if (!d.judgments.empty()) {
            auto& judgment =
                d.judgments[static_cast<std::size_t>(dice.below(static_cast<int>(d.judgments.size())))];
            judgment.ratio = dice.pick<double>({1. / 9, .25, .5, 1, 1.5, 2, 3, 7, 9});
        }
        break;
    case 3:
        if (!d.judgments.empty())
            d.judgments.erase(d.judgments.begin() + dice.below(static_cast<int>(d.judgments.size())));
        break;
    case 4:
        if (!d.judgments.empty()) {
            Judgment agreed = dice.pick(d.judgments);
            agreed.by.clear();
            d.judgments.push_back(agreed);
        }
        break;
    case 5:
        if (!d.people.empty()) d.people.front().share = dice.pick<double>({1, 2, .5});
        break;
    case 6: {
        auto& option = d.options[static_cast<std::size_t>(dice.below(static_cast<int>(d.options.size())))];
        option.withdrawn = !option.withdrawn;
        break;
    }
    case 7:
        d.settings.method = dice.pick<Method>(
            {Method::eigenvector, Method::eigenvector, Method::geometric_mean, Method::column_average});
        break;
    case 8:
        d.settings.combine =
            dice.pick<Combine>({Combine::judgments, Combine::priorities, Combine::priorities_arithmetic});
        break;
    case 9:
        d.settings.random_index =
            dice.pick<RandomIndexTable>({RandomIndexTable::alonso_lamata_2006, RandomIndexTable::saaty_1980});
        d.settings.limit = dice.pick<double>({.05, .1, .2});
        d.settings.synthesis = dice.pick<Synthesis>({Synthesis::ideal, Synthesis::distributive});
        break;
    case 10:
        d.criteria.name += "x";
        if (!d.people.empty()) d.people.front().name += "y";
        d.options.front().name += "z";
        break;
    default:
        if (!d.figures.empty()) {
            auto& figure =
                d.figures[static_cast<std::size_t>(dice.below(static_cast<int>(d.figures.size())))];
            figure.low.reset();
            figure.high.reset();
            if (figure.value) *figure.value *= 1.125;
        }
        break;
    }
}

/// Six people who judge every pair of eight leaves of four options; one set of criteria of eight.
Decision eight_leaves() {
    Decision d;
    for (int i = 1; i <= 4; ++i) d.options.push_back({.id = "o" + std::to_string(i)});
    for (int i = 1; i <= 6; ++i) d.people.push_back({.id = "p" + std::to_string(i)});
    d.criteria.id = "goal";
    double ratio = 1; // Every matrix is to be another one.
    const auto judge_all = [&](const Id& set, const std::string& letter, int items) {
        for (const auto& person : d.people) {
            for (int a = 1; a <= items; ++a) {
                for (int b = a + 1; b <= items; ++b) {
                    ratio = ratio > 8 ? 1 : ratio + .01;
                    d.judgments.push_back({.set = set,
                                           .by = person.id,
                                           .a = letter + std::to_string(a),
                                           .b = letter + std::to_string(b),
                                           .ratio = ratio});
                }
            }
        }
    };
    for (int i = 1; i <= 8; ++i) {
        d.criteria.children.push_back({.id = "c" + std::to_string(i)});
        judge_all("c" + std::to_string(i), "o", 4);
    }
    judge_all("goal", "c", 8);
    return d;
}

} // namespace

TEST_CASE("solve: with what is remembered of other decisions the results are the same text") {
    Dice dice(11);
    SolveCache cache; // One for all: what was learned of one decision must never spoil another.
    std::size_t edits = 0;
    for (std::uint64_t seed = 1; seed <= testing::cases(120); ++seed) {
        Decision decision = testing::random_decision(seed);
        for (int k = 0; k < 10; ++k) {
            INFO("seed " << seed << " after " << k << " changes");
            const std::string remembered = write_results(decision, solve(decision, cache));
            CHECK((remembered == write_results(decision, solve(decision))));
            Decision next = decision;
            change_something(dice, next);
            if (!check(next).problems.empty()) continue;
            edits += next != decision ? 1 : 0;
            decision = std::move(next);
        }
    }
    CHECK(edits > 6 * testing::cases(120));
    CHECK(cache.facts_count().reused > cache.facts_count().solved);
}

TEST_CASE("solve: after one judgment only that judge's matrix and the group's are worked out") {
    Decision decision = eight_leaves();
    SolveCache cache;
    const Results before = solve(decision, cache);
    CHECK(before.sets.size() == 9 * 7);
    CHECK(cache.facts_count().solved == 9 * 7);
    CHECK(cache.facts_count().reused == 0);
    const auto weights_before = cache.weights_count();

    decision.judgments.front().ratio = 5.5; // By p1 on c1.
    solve(decision, cache);
    CHECK(cache.facts_count().solved == 9 * 7 + 2);
    CHECK(cache.facts_count().reused == 9 * 7 - 2);
    // Weights anew: p1's on c1, the group's there, and the group's there without each of the others.
    CHECK(cache.weights_count().solved == weights_before.solved + 2 + 5);

    // Nothing of that hinges on a name or a note.
    const auto counted = cache.facts_count();
    decision.people.front().name = "somebody";
    decision.judgments.front().note = "why";
    solve(decision, cache);
    CHECK(cache.facts_count().solved == counted.solved);
}

TEST_CASE("solve: a judge who says nothing in a set costs nothing there when he is left out") {
    Decision decision = eight_leaves();
    std::erase_if(decision.judgments, [](const Judgment& j) { return j.by == "p6" && j.set != "c1"; });
    SolveCache cache;
    solve(decision, cache);
    // The group's and the judges' own in each set (these for their rankings), and the group's without each.
    CHECK(cache.weights_count().solved == (1 + 6 + 6) + 8 * (1 + 5 + 5));
}

TEST_CASE("Session: a change and its undoing work out what is new, and nothing twice") {
    Session session(eight_leaves());
    session.results();
    CHECK(session.cache().facts_count().solved == 9 * 7);
    const Judgment judgment{.set = "c1", .by = "p1", .a = "o1", .b = "o2", .ratio = 7};
    session.apply({Enter<Judgment>{judgment}}, {});
    session.results();
    CHECK(session.cache().facts_count().solved == 9 * 7 + 2);
    session.undo({});
    session.results();
    CHECK(session.cache().facts_count().solved == 9 * 7 + 2);
}

TEST_CASE("Memory: answers once, and forgets what was not asked for in sixteen solves") {
    Memory<int, int> memory;
    int worked = 0;
    const auto ask = [&](int question) {
        return memory.answer(question, [&] {
            ++worked;
            return 10 * question;
        });
    };
    CHECK(ask(1) == 10);
    CHECK(ask(1) == 10);
    CHECK(ask(2) == 20);
    CHECK(worked == 2);
    CHECK(memory.count() == Memory<int, int>::Count{2, 1});
    for (int k = 0; k < 16; ++k) {
        memory.next_solve();
        CHECK(ask(1) == 10);
    }
    CHECK(memory.size() == 2);
    CHECK(worked == 2);
    memory.next_solve();
    CHECK(memory.size() == 1);
    CHECK(ask(2) == 20);
    CHECK(worked == 3);
}

} // namespace steelyard
