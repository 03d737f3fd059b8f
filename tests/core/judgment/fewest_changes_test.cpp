#include <algorithm>
#include <catch_amalgamated.hpp>
#include <cmath>
#include <cstddef>
#include <cstdint>
#include <optional>
#include <vector>

#include "core/judgment/changed_set.hpp"
#include "core/judgment/fewest_changes.hpp"
#include "core/judgment/random_index.hpp"
#include "tests/support/close.hpp"
#include "tests/support/pairs.hpp"
#include "tests/support/slow_least.hpp"

namespace steelyard {

using Catch::Matchers::WithinAbs;
using Catch::Matchers::WithinRel;
using testing::upper_triangle;

namespace {

std::optional<ConsistencyLimit> limit_of(const PairMatrix& pairs, double ratio = .1) {
    const auto ri = random_index(RandomIndexTable::alonso_lamata_2006, pairs.size(), pairs.missing().size());
    if (!ri) return std::nullopt;
    return ConsistencyLimit{*ri, ratio};
}

double lambda_limit(const PairMatrix& pairs, double ratio = .1) {
    const auto n = static_cast<double>(pairs.size());
    return n + (n - 1) * limit_of(pairs, ratio)->random_index * (ratio + 1e-9);
}

/// Lambda max of the set with the changes, by the slow way.
double lambda_with(const PairMatrix& pairs, const FewestChanges& found) {
    PairMatrix changed = pairs;
    for (const auto& [i, j, to] : found.changes) changed.set(i, j, to);
    std::vector<testing::SlowFree> missing;
    const testing::Square square = testing::slow_square(changed, missing);
    return testing::slow_least(square, missing).lambda;
}

/// What must hold of every answer.
void check_sound(const PairMatrix& pairs, const FewestChanges& found, double ratio = .1) {
    CHECK_THAT(found.lambda, WithinRel(lambda_with(pairs, found), 1e-11));
    CHECK(found.lambda <= lambda_limit(pairs, ratio));
    for (std::size_t k = 0; k < found.changes.size(); ++k) {
        const auto& [i, j, to] = found.changes[k];
        CHECK(i < j);
        CHECK(pairs.judged(i, j));
        CHECK(to >= 1. / 9);
        CHECK(to <= 9);
        if (k > 0)
            CHECK(PairMatrix::Pair{found.changes[k - 1].i, found.changes[k - 1].j} < PairMatrix::Pair{i, j});
    }
}

PairMatrix set_of_errors(std::size_t n, int errors, std::uint64_t seed) {
    // Near a consistent set, but for some judgments that are far off.
    PairMatrix pairs = testing::random_near_pairs(n, .25, 0, seed);
    const auto judged = pairs.judged_pairs();
    for (int k = 0; k < errors; ++k) {
        const auto [i, j] = judged[(seed * 7 + static_cast<std::uint64_t>(k) * 13) % judged.size()];
        pairs.set(i, j, pairs.at(i, j) > 1 ? 1. / 7 : 8);
    }
    return pairs;
}

/// The same search, every subset minimised and none left out.
struct Plain {
    std::vector<std::size_t> changed;
    double lambda = 0;
};

std::optional<Plain> without_pruning(const PairMatrix& pairs) {
    const ChangeableSet set(pairs);
    const double limit = lambda_limit(pairs);
    if (set.unchanged().whole.principal.lambda <= limit) return Plain{};
    const std::size_t m = set.judged().size();
    std::vector<std::size_t> chosen;
    std::optional<Plain> best;
    const auto look = [&] {
        const double lambda = set.change(chosen, set.unchanged(), {1e-5}).whole.principal.lambda;
        if (lambda <= limit && (!best || lambda < best->lambda * (1 - 1e-12))) best = Plain{chosen, lambda};
    };
    for (std::size_t size = 1; size <= 3 && !best; ++size) {
        for (std::size_t p = 0; p < m; ++p) {
            chosen = {p};
            if (size == 1) look();
            for (std::size_t q = p + 1; size > 1 && q < m; ++q) {
                chosen = {p, q};
                if (size == 2) look();
                for (std::size_t r = q + 1; size > 2 && r < m; ++r) {
                    chosen = {p, q, r};
                    look();
                }
            }
        }
    }
    return best;
}

/// Sets of nine items that need few changes and many.
PairMatrix nine_items(std::uint64_t seed) {
    return seed % 2 == 0 ? set_of_errors(9, 5 + static_cast<int>(seed / 2 % 3), seed)
                         : testing::random_near_pairs(9, 1.2 + .02 * static_cast<double>(seed % 10), 0, seed);
}

/// Checks one set; the number of its changes.
std::size_t changes_against_plain(std::uint64_t seed) {
    const PairMatrix pairs = nine_items(seed);
    INFO("seed " << seed);
    const FewestChanges found = fewest_changes(pairs, limit_of(pairs).value());
    check_sound(pairs, found);
    const auto plain = without_pruning(pairs);
    REQUIRE(found.proven == plain.has_value());
    if (!plain) {
        CHECK(found.changes.size() > 3);
        return found.changes.size();
    }
    REQUIRE(found.changes.size() == plain->changed.size());
    if (!plain->changed.empty()) CHECK_THAT(found.lambda, WithinRel(plain->lambda, 1e-12));
    const auto judged = pairs.judged_pairs();
    for (std::size_t k = 0; k < found.changes.size(); ++k)
        CHECK(PairMatrix::Pair{found.changes[k].i, found.changes[k].j} == judged[plain->changed[k]]);
    return found.changes.size();
}

} // namespace

TEST_CASE("fewest changes: trying every subset finds the same, up to six items, complete and incomplete") {
    std::size_t counts[4] = {};
    std::size_t beyond = 0;
    for (std::uint64_t seed = 1; seed <= testing::slow_cases(90); ++seed) {
        const std::size_t n = 3 + seed % 4;
        PairMatrix pairs(n);
        switch (seed / 4 % 3) {
        case 0: pairs = testing::random_near_pairs(n, 1.5, 0, seed); break;
        case 1: pairs = testing::random_near_pairs(n, 2, 30, seed); break;
        default: pairs = testing::random_scale_pairs(n, seed);
        }
        const auto limit = limit_of(pairs);
        if (!limit) continue; // A tree: nothing can contradict.
        INFO("seed " << seed << ", " << n << " items, " << pairs.missing().size() << " missing");
        const FewestChanges found = fewest_changes(pairs, *limit);
        check_sound(pairs, found);
        const auto slow = testing::slow_fewest(pairs, lambda_limit(pairs), 3);
        REQUIRE(found.proven == slow.has_value());
        if (!slow) {
            CHECK(found.changes.size() > 3);
            ++beyond;
            continue;
        }
        ++counts[slow->changed.size()];
        REQUIRE(slow->least.steepest < 1e-9);
        REQUIRE(found.changes.size() == slow->changed.size());
        CHECK_THAT(found.lambda, WithinRel(slow->least.lambda, 1e-9));
        // Which pairs, unless two choices are as good.
        if (slow->runner_up < slow->least.lambda + 1e-9) continue;
        const auto judged = pairs.judged_pairs();
        for (std::size_t k = 0; k < found.changes.size(); ++k) {
            const auto [i, j] = judged[slow->changed[k]];
            CHECK(found.changes[k].i == i);
            CHECK(found.changes[k].j == j);
            CHECK_THAT(found.changes[k].to, WithinRel(slow->least.matrix[i][j], 1e-7));
        }
    }
    if (testing::slow_cases(90) < 90) return;
    CHECK(counts[0] >= 5);
    CHECK(counts[1] >= 10);
    CHECK(counts[2] >= 10);
    CHECK(counts[3] >= 5);
    CHECK(beyond >= 3);
}

TEST_CASE("fewest changes: leaving out what is proven too high changes nothing, fifty sets of nine items") {
    std::size_t of_three = 0;
    for (std::uint64_t seed = 1; seed <= testing::slow_cases(50); ++seed)
        of_three += changes_against_plain(seed) == 3 ? 1 : 0;
    if (testing::slow_cases(50) == 50) CHECK(of_three >= 10);
}

TEST_CASE("fewest changes: none of a set within its limit") {
    for (std::size_t n = 3; n <= 12; ++n) {
        const std::vector<double> weights(n, 2);
        const PairMatrix pairs = testing::consistent_pairs(weights);
        FewestChangesSearch search(pairs, limit_of(pairs).value());
        CHECK(search.progress() == 1);
        CHECK_FALSE(search.step());
        CHECK(search.answer().proven);
        CHECK(search.answer().changes.empty());
        CHECK_THAT(search.answer().lambda, WithinAbs(static_cast<double>(n), 1e-12));
    }
    const PairMatrix drinks = testing::drinks_pairs();
    CHECK(fewest_changes(drinks, limit_of(drinks).value()).changes.empty());
    CHECK_FALSE(fewest_changes(drinks, limit_of(drinks, .02).value()).changes.empty());
}

TEST_CASE("fewest changes: in a triad one, the first of those that reach as far") {
    // a12 to 1/6, a13 to 6 or a23 to 1/4: each leaves no contradiction.
    const PairMatrix pairs = upper_triangle(3, {2, 1. / 2, 3});
    const FewestChanges found = fewest_changes(pairs, limit_of(pairs).value());
    CHECK(found.proven);
    REQUIRE(found.changes.size() == 1);
    CHECK(found.changes[0].i == 0);
    CHECK(found.changes[0].j == 1);
    CHECK_THAT(found.changes[0].to, WithinRel(1. / 6, 1e-9));
    CHECK_THAT(found.lambda, WithinAbs(3, 1e-12));
}

TEST_CASE("fewest changes: of single changes the one that reaches the lowest lambda") {
    // a12 to 1/15 and a23 to 1/10 lie beyond the scale, where a contradiction stays; a13 to 6 is consistent.
    const PairMatrix pairs = upper_triangle(3, {2, 1. / 5, 3});
    const FewestChanges found = fewest_changes(pairs, limit_of(pairs).value());
    REQUIRE(found.changes.size() == 1);
    CHECK(found.changes[0].i == 0);
    CHECK(found.changes[0].j == 2);
    CHECK_THAT(found.changes[0].to, WithinRel(6, 1e-9));
    CHECK_THAT(found.lambda, WithinAbs(3, 1e-12));
}

TEST_CASE("fewest changes: where the scale is too short for one, two") {
    // The others imply 81 where 1/9 was said; 9, the end of the scale, still contradicts.
    const PairMatrix pairs = upper_triangle(3, {9, 1. / 9, 9});
    const FewestChanges found = fewest_changes(pairs, limit_of(pairs).value());
    CHECK(found.proven);
    CHECK(found.changes.size() == 2);
    check_sound(pairs, found);
    CHECK_THAT(found.lambda, WithinAbs(3, 1e-10));
}

TEST_CASE("fewest changes: ratios from 1/100 to 100 are only brought into the scale where they are changed") {
    PairMatrix pairs = testing::consistent_pairs({50, 1, 2, 4, 8});
    pairs.set(1, 4, 100);
    const FewestChanges found = fewest_changes(pairs, limit_of(pairs).value());
    REQUIRE(found.changes.size() == 1);
    CHECK(found.changes[0].i == 1);
    CHECK(found.changes[0].j == 4);
    CHECK_THAT(found.changes[0].to, WithinRel(1. / 8, 1e-9));
    // All ratios 100 around a ring.
    PairMatrix ring(5);
    for (std::size_t i = 0; i < 5; ++i) ring.set(i, (i + 1) % 5, 100);
    check_sound(ring, fewest_changes(ring, limit_of(ring).value()));
}

TEST_CASE(
    "fewest changes: a set found by one change after the other is within its limit and not called proven") {
    for (const std::size_t n : {std::size_t{5}, std::size_t{8}, std::size_t{12}, std::size_t{16}}) {
        const PairMatrix pairs = testing::random_scale_pairs(n, 3);
        const FewestChanges found = fewest_changes(pairs, limit_of(pairs).value());
        INFO(n << " items");
        check_sound(pairs, found);
        CHECK(found.changes.size() > 3);
        CHECK_FALSE(found.proven);
        // No change could be left out, all others as they are.
        for (std::size_t k = 0; k < found.changes.size(); ++k) {
            FewestChanges fewer = found;
            fewer.changes.erase(fewer.changes.begin() + static_cast<std::ptrdiff_t>(k));
            CHECK(lambda_with(pairs, fewer) > lambda_limit(pairs));
        }
    }
}

TEST_CASE("fewest changes: more than ten items, one wrong judgment") {
    for (std::uint64_t seed = 1; seed <= testing::cases(12); ++seed) {
        PairMatrix pairs = testing::random_near_pairs(11 + seed % 5, .3, seed % 2 == 0 ? 0 : 30, seed);
        const auto judged = pairs.judged_pairs();
        const auto [i, j] = judged[seed * 5 % judged.size()];
        const double right = pairs.at(i, j);
        pairs.set(i, j, right > 1 ? .02 : 50);
        const FewestChanges found = fewest_changes(pairs, limit_of(pairs, .06).value());
        INFO("seed " << seed << ", " << pairs.size() << " items");
        REQUIRE(found.changes.size() == 1);
        CHECK(found.proven);
        CHECK(found.changes[0].i == i);
        CHECK(found.changes[0].j == j);
        check_sound(pairs, found, .06);
    }
}

TEST_CASE("fewest changes: hundreds of changes come to an end") {
    const PairMatrix pairs = testing::random_scale_pairs(24, 1);
    const FewestChanges found = fewest_changes(pairs, limit_of(pairs).value());
    CHECK(found.changes.size() > 40);
    CHECK_FALSE(found.proven);
    check_sound(pairs, found);
}

TEST_CASE("fewest changes: slices, progress that never falls, and the same answer") {
    for (const std::size_t n : {std::size_t{6}, std::size_t{9}, std::size_t{13}}) {
        const PairMatrix pairs = testing::random_near_pairs(n, 1.4, 20, 5);
        FewestChangesSearch search(pairs, limit_of(pairs).value());
        INFO(n << " items");
        double before = search.progress();
        CHECK(before == 0);
        std::size_t slices = 0;
        while (search.step()) {
            ++slices;
            CHECK(search.progress() >= before);
            CHECK(search.progress() < 1);
            before = search.progress();
        }
        CHECK(slices > 10);
        CHECK(before > .01);
        CHECK(search.progress() == 1);
        CHECK_FALSE(search.step());
        const FewestChanges whole = fewest_changes(pairs, limit_of(pairs).value());
        REQUIRE(search.answer().changes.size() == whole.changes.size());
        CHECK(search.answer().lambda == whole.lambda);
    }
}

TEST_CASE("fewest changes: a permutation of the items permutes the answer") {
    const PairMatrix pairs = set_of_errors(7, 2, 4);
    const std::vector<std::size_t> order{3, 0, 6, 2, 5, 1, 4};
    const PairMatrix moved = testing::permuted(pairs, order);
    const FewestChanges plain = fewest_changes(pairs, limit_of(pairs).value());
    const FewestChanges other = fewest_changes(moved, limit_of(moved).value());
    REQUIRE_FALSE(plain.changes.empty());
    REQUIRE(plain.changes.size() == other.changes.size());
    CHECK_THAT(plain.lambda, WithinRel(other.lambda, 1e-12));
    for (const auto& [i, j, to] : plain.changes) {
        const auto p = std::minmax(order[i], order[j]);
        const auto found = std::find_if(other.changes.begin(), other.changes.end(), [&](const PairChange& c) {
            return c.i == p.first && c.j == p.second;
        });
        REQUIRE(found != other.changes.end());
        CHECK_THAT(found->to, WithinRel(order[i] < order[j] ? to : 1 / to, 1e-8));
    }
}

TEST_CASE("floor of a changed set: no further changes go below it") {
    // The bound the search leaves subsets out by, against the minimum itself.
    for (std::uint64_t seed = 1; seed <= testing::cases(20); ++seed) {
        const PairMatrix pairs = testing::random_near_pairs(6, 1.5, seed % 2 == 0 ? 0 : 30, seed);
        const ChangeableSet set(pairs);
        const std::size_t m = set.judged().size();
        for (std::size_t p = 0; p < m; ++p) {
            const ChangedSet one = set.change({p}, set.unchanged(), {1e-5});
            for (std::size_t q = 0; q < m; ++q) {
                if (p == q) continue;
                const ChangedSet two = set.change({std::min(p, q), std::max(p, q)}, one, {1e-5});
                INFO("seed " << seed << ", pairs " << p << " and " << q);
                CHECK(std::log(two.whole.principal.lambda) >= one.floor + one.further[q] - 1e-9);
                CHECK(std::log(two.whole.principal.lambda) >=
                      set.unchanged().floor + set.unchanged().further[p] + set.unchanged().further[q] - 1e-9);
            }
        }
    }
}

} // namespace steelyard
