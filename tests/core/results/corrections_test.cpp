#include <algorithm>
#include <catch_amalgamated.hpp>
#include <cmath>
#include <string>
#include <vector>

#include "core/judgment/best_value.hpp"
#include "core/judgment/consistency.hpp"
#include "core/results/corrections.hpp"
#include "core/results/entry_matrix.hpp"
#include "core/results/solve.hpp"
#include "tests/support/close.hpp"
#include "tests/support/find_results.hpp"
#include "tests/support/judged_decisions.hpp"
#include "tests/support/pairs.hpp"
#include "tests/support/random_decision.hpp"
#include "tests/support/round_trip.hpp"

namespace steelyard {

using Catch::Matchers::WithinAbs;
using Catch::Matchers::WithinRel;
using testing::judgment;
using testing::judgments;
using testing::set_of;

namespace {

/// Criteria "c1" to "cN" of "goal", judged as the pairs say, by one person (or agreed).
std::string decision_text(const PairMatrix& pairs, const std::string& by = "",
                          const std::string& settings = "", const std::string& more_judgments = "") {
    std::string children;
    for (std::size_t i = 1; i <= pairs.size(); ++i)
        children += (children.empty() ? "" : ", ") + (R"({"id": "c)" + std::to_string(i) + "\"}");
    std::vector<std::string> list;
    for (const auto& [i, j] : pairs.judged_pairs()) {
        std::string ratio = std::to_string(pairs.at(i, j));
        list.push_back(judgment("goal", by, "c" + std::to_string(i + 1), "c" + std::to_string(j + 1), ratio));
    }
    std::string said = judgments(list);
    if (!more_judgments.empty()) said.insert(said.size() - 1, (list.empty() ? "" : ", ") + more_judgments);
    return R"({"format": "steelyard-decision", "version": 1, "options": [{"id": "o1"}],
        "people": [{"id": "p1"}, {"id": "p2"}, {"id": "p3", "share": 0}],
        "criteria": {"id": "goal", "children": [)" +
           children + R"(]}, "settings": {)" + settings + "}, " + said + "}";
}

struct Corrected {
    Decision decision;
    Results results;
};

Corrected corrected(const std::string& text) {
    Corrected both{test::read(text), {}};
    both.results = solve(both.decision);
    add_corrections(both.decision, both.results);
    return both;
}

double cr_of(const SetResult& entry, double lambda) {
    return consistency_index(lambda, entry.items.size()).value() / entry.ri.value();
}

} // namespace

TEST_CASE("corrections: none are there until they are asked for") {
    const Results plain = solve(test::read(decision_text(testing::random_scale_pairs(5, 1))));
    CHECK_FALSE(plain.corrected);
    for (const auto& misfit : set_of(plain, "goal").misfits) {
        CHECK_FALSE(misfit.best.has_value());
        CHECK_FALSE(misfit.cr_at_best.has_value());
    }
    CHECK_FALSE(set_of(plain, "goal").fewest_changes.has_value());
}

TEST_CASE("corrections: every pair with its best value, the lowest CR first") {
    const auto [decision, results] = corrected(decision_text(testing::random_scale_pairs(6, 2)));
    CHECK(results.corrected);
    const SetResult& set = set_of(results, "goal");
    const EntryMatrix matrix = entry_matrix(decision, set);
    CHECK(matrix.judges == 0);
    BestValues values(matrix.pairs);
    REQUIRE(set.misfits.size() == 15);
    double before = 0;
    for (const auto& misfit : set.misfits) {
        const auto i = static_cast<std::size_t>(misfit.a[1] - '1');
        const auto j = static_cast<std::size_t>(misfit.b[1] - '1');
        INFO(misfit.a << " and " << misfit.b);
        CHECK_THAT(misfit.given, WithinRel(matrix.pairs.at(i, j), 1e-15));
        const BestValue best = values.of(i, j).value();
        CHECK(misfit.best == best.ratio);
        CHECK_THAT(misfit.implied.value(), WithinRel(best.implied, 1e-12));
        CHECK_THAT(misfit.cr_at_best.value(), WithinAbs(cr_of(set, best.lambda), 1e-14));
        CHECK(misfit.cr_at_best.value() <= set.cr.value() + 1e-12);
        CHECK(misfit.cr_at_best.value() >= before - 1e-12);
        before = misfit.cr_at_best.value();
    }
}

TEST_CASE("corrections: pairs that reach the same CR stand in item order") {
    // Any pair of a triad can make it consistent.
    const auto triad = corrected(decision_text(testing::upper_triangle(3, {2, 1. / 4, 3})));
    const SetResult& set = set_of(triad.results, "goal");
    REQUIRE(set.misfits.size() == 3);
    CHECK(set.misfits[0].b == "c2");
    CHECK(set.misfits[1].b == "c3");
    CHECK(set.misfits[2].a == "c2");
    for (const auto& misfit : set.misfits) CHECK_THAT(misfit.cr_at_best.value(), WithinAbs(0, 1e-12));
}

TEST_CASE("corrections: a pair that nothing else links has no best value and leaves CR as it is") {
    const auto hanging = corrected(decision_text(testing::upper_triangle(4, {2, 8, 0, 2, 0, 3})));
    const SetResult& set = set_of(hanging.results, "goal");
    REQUIRE(set.misfits.size() == 4);
    const Misfit& last = set.misfits.back(); // Every other pair can do better.
    CHECK(last.a == "c3");
    CHECK(last.b == "c4");
    CHECK_FALSE(last.best.has_value());
    CHECK(last.cr_at_best == set.cr);
}

TEST_CASE("corrections: where CR is not defined there is none, and no fewest changes") {
    // Two items; a tree; Saaty's table ends at ten.
    for (const auto& text :
         {decision_text(testing::upper_triangle(2, {3})),
          decision_text(testing::upper_triangle(3, {3, 0, 2})),
          decision_text(testing::random_scale_pairs(11, 1), "", R"("random_index": "saaty-1980")")}) {
        const Decision decision = test::read(text);
        const Results plain = solve(decision);
        Results results = plain;
        add_corrections(decision, results);
        const SetResult& set = set_of(results, "goal");
        REQUIRE_FALSE(set.cr.has_value());
        CHECK_FALSE(set.fewest_changes.has_value());
        CHECK_FALSE(entry_search(decision, set).has_value());
        REQUIRE_FALSE(set.misfits.empty());
        for (std::size_t k = 0; k < set.misfits.size(); ++k) {
            CHECK(set.misfits[k].best.has_value() == (set.items.size() > 10));
            CHECK_FALSE(set.misfits[k].cr_at_best.has_value());
            CHECK(set.misfits[k].a == set_of(plain, "goal").misfits[k].a); // Worst first still.
            CHECK(set.misfits[k].b == set_of(plain, "goal").misfits[k].b);
        }
    }
}

TEST_CASE("corrections: a set that does not hang together has nothing to correct") {
    const auto parts = corrected(decision_text(testing::upper_triangle(4, {2, 0, 0, 0, 0, 3})));
    CHECK(set_of(parts.results, "goal").misfits.empty());
    CHECK_FALSE(set_of(parts.results, "goal").fewest_changes.has_value());
}

TEST_CASE("corrections: a set within its limit needs no change, and the limit is the decision's") {
    const PairMatrix drinks = testing::drinks_pairs();
    const auto within = corrected(decision_text(drinks));
    const auto& none = set_of(within.results, "goal").fewest_changes;
    REQUIRE(none.has_value());
    CHECK(none->proven);
    CHECK(none->changes.empty());
    CHECK_THAT(none->cr, WithinAbs(set_of(within.results, "goal").cr.value(), 1e-12));
    const auto strict = corrected(decision_text(drinks, "", R"("limit": 0.015)"));
    const auto& some = set_of(strict.results, "goal").fewest_changes;
    REQUIRE(some.has_value());
    CHECK_FALSE(some->changes.empty());
    CHECK(some->cr <= .015 + 1e-9);
}

TEST_CASE("corrections: the changes, entered, bring the set within its limit") {
    for (std::uint64_t seed = 1; seed <= testing::cases(20); ++seed) {
        const PairMatrix pairs = testing::random_near_pairs(4 + seed % 5, 1.5, seed % 2 == 0 ? 0 : 30, seed);
        auto [decision, results] = corrected(decision_text(pairs, "p1"));
        const SetResult set = set_of(results, "goal");
        if (!set.fewest_changes) continue;
        for (const auto& change : set.fewest_changes->changes) {
            for (auto& judged : decision.judgments) {
                if (judged.a == change.a && judged.b == change.b) judged.ratio = change.to;
            }
        }
        INFO("seed " << seed);
        const SetResult after = set_of(solve(decision), "goal");
        CHECK_THAT(after.cr.value(), WithinAbs(set.fewest_changes->cr, 1e-9));
        CHECK(after.cr.value() <= .1 + 2e-9);
    }
}

TEST_CASE("corrections: of several judges each has his own, the group only best values") {
    const PairMatrix pairs = testing::random_scale_pairs(4, 3);
    // The second judge said one thing, of which nobody can tell whether it fits: his other pairs are missing.
    const auto two = corrected(decision_text(pairs, "p1", "", judgment("goal", "p2", "c1", "c2", "7")));
    const SetResult& group = set_of(two.results, "goal");
    CHECK(group.misfits.front().best.has_value());
    CHECK_FALSE(group.fewest_changes.has_value());
    CHECK_FALSE(entry_search(two.decision, group).has_value());
    const SetResult& first = set_of(two.results, "goal", "p1");
    CHECK(first.fewest_changes.has_value());
    CHECK(first.misfits.front().best.has_value());
    CHECK_FALSE(set_of(two.results, "goal", "p2").fewest_changes.has_value());
    CHECK(entry_matrix(two.decision, group).judges == 2);

    const auto one = corrected(decision_text(pairs, "p1"));
    CHECK(set_of(one.results, "goal").fewest_changes.has_value());
    CHECK(set_of(one.results, "goal").fewest_changes->changes.size() ==
          set_of(one.results, "goal", "p1").fewest_changes->changes.size());
    // Somebody without a share takes part all the same.
    const auto silent = corrected(decision_text(pairs, "p1", "", judgment("goal", "p3", "c1", "c2", "7")));
    CHECK_FALSE(set_of(silent.results, "goal").fewest_changes.has_value());
}

TEST_CASE("corrections: what the fewest changes are looked for in, for those who search in slices") {
    const auto [decision, results] = corrected(decision_text(testing::random_scale_pairs(6, 2)));
    const SetResult& set = set_of(results, "goal");
    const auto search = entry_search(decision, set);
    REQUIRE(search.has_value());
    CHECK(search->limit.random_index == set.ri);
    CHECK(search->limit.ratio == decision.settings.limit);
    const FewestChangesResult again = in_words(set, fewest_changes(search->pairs, search->limit));
    REQUIRE(again.changes.size() == set.fewest_changes->changes.size());
    for (std::size_t k = 0; k < again.changes.size(); ++k) {
        CHECK(again.changes[k].a == set.fewest_changes->changes[k].a);
        CHECK(again.changes[k].to == set.fewest_changes->changes[k].to);
    }
}

TEST_CASE("corrections: the matrix of an entry is the one its indices come from, decisions of every kind") {
    std::size_t entries = 0;
    for (std::uint64_t seed = 1; seed <= testing::cases(100); ++seed) {
        const Decision decision = testing::random_decision(seed);
        const Results results = solve(decision);
        for (const auto& entry : results.sets) {
            const EntryMatrix matrix = entry_matrix(decision, entry);
            INFO("seed " << seed << ", set " << entry.set << " by '" << entry.by << "'");
            REQUIRE(matrix.pairs.size() == entry.items.size());
            if (entry.from_points) {
                CHECK(matrix.pairs.judged_pairs().empty());
                continue;
            }
            ++entries;
            CHECK(matrix.pairs.missing().size() == entry.missing.size());
            for (const auto& misfit : entry.misfits) {
                const auto at = [&](const Id& id) {
                    return static_cast<std::size_t>(std::find(entry.items.begin(), entry.items.end(), id) -
                                                    entry.items.begin());
                };
                CHECK(matrix.pairs.at(at(misfit.a), at(misfit.b)) == misfit.given);
            }
            if (entry.lambda_max)
                CHECK(complete_optimally(matrix.pairs).principal.lambda == *entry.lambda_max);
        }
    }
    CHECK(entries > testing::cases(100));
}

} // namespace steelyard
