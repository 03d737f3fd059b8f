#include <catch_amalgamated.hpp>
#include <string>
#include <vector>

#include "core/judgment/chi_square.hpp"
#include "core/judgment/concordance.hpp"
#include "tests/support/close.hpp"
#include "tests/support/dice.hpp"

namespace steelyard {

using Catch::Matchers::WithinAbs;
using Catch::Matchers::WithinRel;
using Table = std::vector<std::vector<double>>;

namespace {

struct Known {
    const char* name;
    Table ranks;
    double w;
    double chi2;
    double tail; ///< p by chi2.
    double p;    ///< By counting, a fraction.
};

// Small tables with and without ties. W, chi2 and its tail by scipy 1.10.1, n items and J judges in ROWS:
//   from scipy.stats import friedmanchisquare
//   c, p = friedmanchisquare(*zip(*ROWS)); print(c / (J * (n - 1)), c, p)
// p by counting every deal, in Python:
//   import itertools
//   from fractions import Fraction
//   def S(rows): return sum((2 * sum(c) - len(rows) * (len(rows[0]) + 1)) ** 2 for c in zip(*rows))
//   deals = [set(itertools.permutations(r)) for r in ROWS[1:]]
//   large = [S([ROWS[0], *d]) >= S(ROWS) for d in itertools.product(*deals)]
//   print(Fraction(sum(large), len(large)))
const std::vector<Known>& known() {
    static const std::vector<Known> tables{
        {"three items, three judges",
         {{1, 2, 3}, {1, 3, 2}, {1, 2, 3}},
         0.7777777777777773,
         4.666666666666664,
         0.09697196786440515,
         7. / 36},
        {"four items, three judges",
         {{1, 2, 3, 4}, {2, 1, 3, 4}, {1, 2, 4, 3}},
         0.8222222222222229,
         7.400000000000006,
         0.06018432387173455,
         19. / 576},
        {"ties of two and three",
         {{1, 2.5, 2.5, 4}, {1.5, 1.5, 3, 4}, {2, 2, 2, 4}},
         0.8750000000000006,
         7.875000000000005,
         0.04866696826567106,
         1. / 24},
        {"two judges in opposite order", {{1, 2, 3, 4, 5}, {5, 4, 3, 2, 1}}, 0, 0, 1, 1},
        {"one judge ties all",
         {{2, 2, 2}, {1, 2, 3}, {1.5, 1.5, 3}},
         0.6190476190476185,
         3.714285714285711,
         0.15611804531597134,
         1. / 3},
        {"six items, two judges",
         {{1, 2, 3, 4, 5, 6}, {2, 1, 4, 3, 6, 5}},
         0.9142857142857139,
         9.142857142857139,
         0.10349995148362036,
         7. / 240},
        {"five items, ties of two",
         {{1, 2.5, 2.5, 4, 5}, {2, 1, 3.5, 3.5, 5}, {1, 2, 3, 4.5, 4.5}},
         0.8947368421052634,
         10.736842105263161,
         0.029686303943990914,
         1. / 300},
    };
    return tables;
}

Table columns_reversed(Table ranks) {
    for (auto& row : ranks) std::reverse(row.begin(), row.end());
    return ranks;
}

/// S of a table, in doubled ranks.
long doubled_spread(const Table& ranks) {
    long sum = 0;
    for (std::size_t i = 0; i < ranks.front().size(); ++i) {
        double total = 0;
        for (const auto& row : ranks) total += 2 * row[i];
        const long off = std::lround(total) - static_cast<long>(ranks.size() * (ranks.front().size() + 1));
        sum += off * off;
    }
    return sum;
}

/// The share of all deals of the judges' ranks, the first one's too, that spread the sums as much: counted
/// one by one.
double counted_p(const Table& ranks) {
    const long observed = doubled_spread(ranks);
    Table deal = ranks;
    for (auto& row : deal) std::sort(row.begin(), row.end());
    double all = 0;
    double large = 0;
    for (bool more = true; more;) {
        all += 1;
        large += doubled_spread(deal) >= observed ? 1 : 0;
        more = false;
        for (auto& row : deal) {
            if (std::next_permutation(row.begin(),
                                      row.end())) { // Else it starts anew, and the next one moves.
                more = true;
                break;
            }
        }
    }
    return large / all;
}

} // namespace

TEST_CASE("mean_ranks: from 1 for the largest, ties share the mean of their places") {
    CHECK(mean_ranks({.2, .5, .3}) == std::vector<double>{3, 1, 2});
    CHECK(mean_ranks({.25, .5, .25}) == std::vector<double>{2.5, 1, 2.5});
    CHECK(mean_ranks({1, 1, 1, 1}) == std::vector<double>{2.5, 2.5, 2.5, 2.5});
    CHECK(mean_ranks({7}) == std::vector<double>{1});
    CHECK(mean_ranks({}).empty());
}

TEST_CASE("mean_ranks: values within 1e-9 of each other tie, others do not") {
    CHECK(mean_ranks({.5, .5 + .9e-9}) == std::vector<double>{1.5, 1.5});
    CHECK(mean_ranks({.5, .5 + 1.1e-9}) == std::vector<double>{2, 1});
}

TEST_CASE("kendall_w: values computed elsewhere, p by counting deals") {
    for (const auto& table : known()) {
        INFO(table.name);
        for (const Table& ranks : {table.ranks, columns_reversed(table.ranks)}) {
            const auto found = kendall_w(ranks);
            REQUIRE(found.has_value());
            CHECK_THAT(found->w, WithinAbs(table.w, 1e-14));
            CHECK_THAT(found->chi2, WithinAbs(table.chi2, 1e-13));
            CHECK_THAT(chi_square_tail(found->chi2, static_cast<int>(ranks.front().size()) - 1),
                       WithinRel(table.tail, 1e-12));
            CHECK(found->exact);
            CHECK_THAT(found->p, WithinRel(table.p, 1e-14));
        }
    }
}

// Five judges on two items, four of them alike: 2 C(5,0) and 2 C(5,1) of 32 ways are as one-sided, 12/32.
TEST_CASE("kendall_w: two items are a sign test") {
    const auto found = kendall_w({{1, 2}, {1, 2}, {2, 1}, {1, 2}, {1, 2}});
    CHECK_THAT(found->w, WithinAbs(.36, 1e-15));
    CHECK(found->p == 12. / 32);
}

TEST_CASE("kendall_w: exact p of random tables with ties agrees with counting every deal") {
    testing::Dice dice(5);
    for (int k = 0; k < 60; ++k) {
        const std::size_t n = static_cast<std::size_t>(dice.between(2, 4));
        const int judges = dice.between(2, n == 4 ? 3 : 5);
        Table ranks;
        for (int j = 0; j < judges; ++j) {
            std::vector<double> values;
            for (std::size_t i = 0; i < n; ++i) values.push_back(dice.between(1, 5));
            ranks.push_back(mean_ranks(values));
        }
        INFO("table " << k << " of " << n << " items and " << judges << " judges");
        const auto found = kendall_w(ranks);
        if (!found) {
            CHECK(counted_p(ranks) == 1);
            continue;
        }
        CHECK(found->exact);
        CHECK_THAT(found->p, WithinRel(counted_p(ranks), 1e-13));
    }
}

// W, chi2 and p by scipy 1.10.1, as above.
TEST_CASE("kendall_w: beyond small tables p is the tail of chi2") {
    const auto seven = kendall_w({{1, 2, 3, 4, 5, 6, 7},
                                  {2, 1, 3, 4, 6, 5, 7},
                                  {1, 3.5, 3.5, 2, 5, 7, 6},
                                  {7, 6, 5, 4, 3, 2, 1},
                                  {1, 2.5, 2.5, 5, 5, 5, 7},
                                  {3, 1, 2, 4, 7, 6, 5}});
    CHECK_THAT(seven->w, WithinAbs(0.3535353535353536, 1e-14));
    CHECK_THAT(seven->chi2, WithinAbs(12.727272727272728, 1e-13));
    CHECK_THAT(seven->p, WithinRel(0.04757720748000102, 1e-12));
    CHECK_FALSE(seven->exact);
    const auto nine = kendall_w(
        {{1, 2, 3, 4, 5, 6, 7, 8, 9}, {2, 1, 3, 4, 6, 5, 7, 9, 8}, {1, 3, 4, 2, 5, 8.5, 8.5, 6, 7}});
    CHECK_THAT(nine->w, WithinAbs(0.8811513463324049, 1e-14));
    CHECK_THAT(nine->p, WithinRel(0.006765426878684411, 1e-12));
    CHECK_FALSE(nine->exact);
}

TEST_CASE("kendall_w: where the small tables end") {
    const std::vector<std::size_t> most{0, 0, 60, 30, 12, 6, 3, 2, 2, 2, 0};
    for (std::size_t n = 2; n < most.size(); ++n) {
        std::vector<double> row;
        for (std::size_t i = 0; i < n; ++i) row.push_back(static_cast<double>(i + 1));
        INFO(n << " items");
        double deals = 1; // All alike: only one of n! deals of each further judge is.
        for (std::size_t i = 2; i <= n; ++i) deals *= static_cast<double>(i);
        if (most[n] > 0) {
            const auto within = kendall_w(Table(most[n], row));
            CHECK(within->exact);
            CHECK_THAT(within->p, WithinRel(1 / std::pow(deals, static_cast<double>(most[n] - 1)), 1e-10));
        }
        CHECK_FALSE(kendall_w(Table(std::max<std::size_t>(most[n], 1) + 1, row))->exact);
    }
}

TEST_CASE("kendall_w: 1 for one mind, whatever its ties") {
    for (const auto& row : {std::vector<double>{1, 2, 3}, {1.5, 1.5, 3}, {1, 2.5, 2.5}}) {
        CHECK_THAT(kendall_w(Table(4, row))->w, WithinAbs(1, 1e-15));
    }
}

TEST_CASE("kendall_w: none for one judge, one item, nobody, or where each ties all items") {
    CHECK_FALSE(kendall_w({}).has_value());
    CHECK_FALSE(kendall_w({{1, 2, 3}}).has_value());
    CHECK_FALSE(kendall_w({{1}, {1}}).has_value());
    CHECK_FALSE(kendall_w({{2, 2, 2}, {2, 2, 2}}).has_value());
    CHECK(kendall_w({{2, 2, 2}, {1, 2.5, 2.5}}).has_value());
}

} // namespace steelyard
