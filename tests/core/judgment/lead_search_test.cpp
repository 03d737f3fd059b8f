#include "core/judgment/lead_search.hpp"

#include <algorithm>
#include <array>
#include <catch_amalgamated.hpp>
#include <cmath>
#include <map>
#include <vector>

#include "tests/support/close.hpp"
#include "tests/support/dice.hpp"
#include "tests/support/open_cases.hpp"
#include "tests/support/pairs.hpp"

using namespace steelyard;
using namespace steelyard::testing;

namespace {

LeadSearch run(const OpenCase& open) {
    LeadSearch search(open.set(), open.leads());
    double progress = 0;
    while (search.step()) {
        CHECK(search.progress() >= progress);
        CHECK(search.progress() <= 1);
        progress = search.progress();
    }
    return search;
}

constexpr std::array all_kinds{OpenKind::criteria, OpenKind::options_ideal, OpenKind::options_distributive,
                               OpenKind::grades_ideal};

/// Sets of 4 to 7 items, or 9, in turn: all kinds of lead, one to three judges, pairs that stay missing.
OpenCase varied_case(Method method, std::size_t number, std::size_t most_items) {
    Dice dice(number);
    OpenCaseSize size;
    size.items = static_cast<std::size_t>(dice.between(4, static_cast<int>(most_items)));
    size.open = dice.chance(80) ? dice.between(1, 4) : dice.between(5, 9);
    size.judges = dice.chance(70) ? 1 : dice.between(2, 3);
    if (method != Method::column_average && dice.chance(25)) size.stay = dice.between(1, 2);
    return random_open_case(method, all_kinds[number % all_kinds.size()], size, number);
}

bool stays_incomplete(const OpenCase& open) {
    const auto pairs = open.items * (open.items - 1) / 2;
    return std::any_of(open.judges.begin(), open.judges.end(), [&](const OpenJudge& judge) {
        return judge.known.judged_pairs().size() + judge.open.size() < pairs;
    });
}

/// Proven ones are attacked, found ones computed anew. Returns how many there were of each state.
std::map<LeadState, int> attack(Method method, std::size_t sets, std::size_t most_items, int tries,
                                std::size_t first = 0) {
    std::map<LeadState, int> count;
    for (std::size_t number = first; number < first + sets; ++number) {
        CAPTURE(number);
        const OpenCase open = varied_case(method, number, most_items);
        const LeadSearch search = run(open);
        ++count[search.state()];
        // Completing a set takes long beside all else here.
        const bool completes = method == Method::eigenvector && stays_incomplete(open);
        if (search.state() == LeadState::kept)
            CHECK_FALSE(turning_answers(open, completes ? tries / 20 : tries, number));
        if (search.state() != LeadState::lost) continue;
        REQUIRE(search.answers().size() == open.ranges.size());
        for (std::size_t p = 0; p < open.ranges.size(); ++p) {
            CHECK(search.answers()[p] >= open.ranges[p].low);
            CHECK(search.answers()[p] <= open.ranges[p].high);
        }
        CHECK(open.behind(search.answers()) > .99e-9);
        // The lead it names is among those turned.
        const auto leads = open.leads();
        CHECK(lead_value(leads[search.lost_lead()], open.weights(search.answers())) < -.99e-9);
    }
    return count;
}

OpenJudge one_judge(const PairMatrix& known, const std::vector<PairMatrix::Pair>& open) {
    OpenJudge judge{1, known, {}};
    for (const auto& [i, j] : open) judge.open.push_back({i, j, judge.open.size()});
    return judge;
}

} // namespace

TEST_CASE(
    "lead search: what is proven withstands 10,000 answers and a descent, what is found is true: geometric "
    "means") {
    const std::size_t sets = std::max<std::size_t>(cases(2000) * 3 / 20, 1);
    const auto count = attack(Method::geometric_mean, sets, 9, 10000);
    if (sets < 300) return;
    CHECK(count.at(LeadState::kept) > 60);
    CHECK(count.at(LeadState::lost) > 60);
    CHECK(!count.contains(LeadState::unknown));
}

TEST_CASE("lead search: what is proven withstands 10,000 answers and a descent, what is found is true: "
          "eigenvectors") {
    const std::size_t sets = std::max<std::size_t>(cases(2000) * 3 / 20, 1);
    const auto count = attack(Method::eigenvector, sets, 7, 10000);
    if (sets < 300) return;
    CHECK(count.at(LeadState::kept) > 60);
    CHECK(count.at(LeadState::lost) > 60);
}

TEST_CASE("lead search: many more sets", "[.long]") {
    for (const Method method : {Method::geometric_mean, Method::eigenvector}) {
        const auto count = attack(method, 3000, 8, 3000, 1000);
        CHECK(count.at(LeadState::kept) > 600);
    }
}

TEST_CASE("lead search: averaged columns are found or not known, never proven") {
    const std::size_t sets = cases(100);
    const auto count = attack(Method::column_average, sets, 6, 0);
    CHECK(!count.contains(LeadState::kept));
    CHECK(count.at(LeadState::lost) > 0);
}

TEST_CASE("lead search: nine in ten sets of up to six items with up to three open pairs are decided") {
    const std::size_t sets = std::max<std::size_t>(cases(2000) / 10, 1);
    for (const Method method : {Method::geometric_mean, Method::eigenvector}) {
        for (const OpenKind kind : all_kinds) {
            std::size_t decided = 0;
            for (std::size_t number = 0; number < sets; ++number) {
                Dice dice(number);
                OpenCaseSize size;
                size.items = static_cast<std::size_t>(dice.between(3, 6));
                size.open = dice.between(1, 3);
                const auto search = run(random_open_case(method, kind, size, number));
                decided += search.state() != LeadState::unknown;
            }
            CHECK(10 * decided >= 9 * sets);
        }
    }
}

TEST_CASE("lead search: two items, the answer that turns the lead lies where the scores meet") {
    // Scores 1 * w1 + 0 * w2 against 0 * w1 + 1 * w2: the lead turns at ratio 1. Known from the ranges alone.
    for (const Method method : {Method::geometric_mean, Method::eigenvector}) {
        const auto state = [&](double low, double high) {
            const std::vector<Lead> leads{{0, {1, -1}, {1, 1}, false}};
            LeadSearch search(OpenSet(method, false, {one_judge(PairMatrix(2), {{0, 1}})}, {{low, high}}),
                              leads);
            while (search.step()) {
            }
            return search.state();
        };
        CHECK(state(1.01, 9) == LeadState::kept);
        CHECK(state(1.0 / 9, 9) == LeadState::lost);
        CHECK(state(.98, .99) == LeadState::lost);
        CHECK(state(1, 9) == LeadState::unknown); // Touches 0: neither.
    }
}

TEST_CASE("lead search: three items with one open pair, against the formula") {
    // a12 = 2, a13 = 4, a23 = x: geometric means w ~ 8^(1/3), (x/2)^(1/3), (1/(4x))^(1/3); the lead is
    // rest + w3 - w1.
    const auto lead = [](double x, double rest) {
        const double a = std::cbrt(8.0);
        const double b = std::cbrt(x / 2);
        const double c = std::cbrt(1 / (4 * x));
        return rest + (c - a) / (a + b + c);
    };
    PairMatrix known(3);
    known.set(0, 1, 2);
    known.set(0, 2, 4);
    for (const double rest : {.2, .3, .4, .45, .5, .55, .6, .65, .7}) {
        double least = 1;
        for (int k = 0; k <= 10000; ++k) least = std::min(least, lead(std::pow(9.0, k / 5000.0 - 1), rest));
        const std::vector<Lead> leads{{rest, {-1, 0, 1}, {1, 1, 1}, false}};
        LeadSearch search(
            OpenSet(Method::geometric_mean, false, {one_judge(known, {{1, 2}})}, {AnswerRange{}}), leads);
        while (search.step()) {
        }
        CAPTURE(rest, least);
        CHECK(search.state() == (least > 0 ? LeadState::kept : LeadState::lost));
    }
}

TEST_CASE("lead search: without open answers the present lead decides") {
    const PairMatrix known = house_pairs();
    const Weights w = *weights_by(Method::eigenvector, known);
    for (const double rest : {-1.0, -.1, .1, 1.0}) {
        const std::vector<Lead> leads{
            {rest, std::vector<double>(8, 0.0), std::vector<double>(8, 1.0), false}};
        LeadSearch search(OpenSet(Method::eigenvector, false, {one_judge(known, {})}, {}), leads);
        while (search.step()) {
        }
        CHECK(search.state() == (rest > 0 ? LeadState::kept : LeadState::lost));
    }
}

TEST_CASE("lead search: the same question has the same answer, cut into any slices") {
    for (std::size_t number = 0; number < 20; ++number) {
        const OpenCase open = varied_case(Method::eigenvector, number, 6);
        const LeadSearch once = run(open);
        const LeadSearch again = run(open);
        CHECK(once.state() == again.state());
        CHECK(once.boxes() == again.boxes());
        CHECK(once.answers() == again.answers());
    }
}

TEST_CASE("lead search: a large set is given up in bounded time") {
    OpenCaseSize size;
    size.items = 30;
    size.open = 60;
    const OpenCase open = random_open_case(Method::eigenvector, OpenKind::options_ideal, size, 1);
    const LeadSearch search = run(open);
    CHECK(search.state() != LeadState::searching);
    if (search.state() == LeadState::lost) CHECK(open.behind(search.answers()) > 0);
}
