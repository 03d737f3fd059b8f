#include "core/results/examination.hpp"

#include <algorithm>
#include <catch_amalgamated.hpp>

#include "core/decision/apply.hpp"
#include "core/results/solve.hpp"
#include "tests/support/house_decision.hpp"
#include "tests/support/random_decision.hpp"
#include "tests/support/round_trip.hpp"

namespace steelyard {

using Catch::Matchers::WithinAbs;

namespace {

Examination examined(const Decision& d, const Id& set, const Id& by = {}) {
    ExaminationJob job(d, solve(d), set, by);
    double progress = 0;
    for (int slices = 0; !job.found().finished; ++slices) {
        job.step();
        REQUIRE(slices < 1000000);
        REQUIRE(job.found().progress >= progress);
        progress = job.found().progress;
    }
    CHECK(job.found().progress == 1);
    return job.found();
}

Results with(const Decision& d, const Id& set, const Id& by, const Id& a, const Id& b, double ratio) {
    Judgment judgment;
    judgment.set = set;
    judgment.by = by;
    judgment.a = a;
    judgment.b = b;
    judgment.ratio = ratio;
    const Applied applied = steelyard::apply(d, std::vector<Edit>{Enter<Judgment>{judgment}});
    REQUIRE(applied.problems.empty());
    return solve(applied.decision);
}

} // namespace

// HOUSE: see tests/external/house_test.cpp for the source.
TEST_CASE("examination: HOUSE, the pair of the third and the seventh is named first") {
    const Decision d = testing::house_decision();
    const Examination found = examined(d, "goal");
    REQUIRE(found.pairs.size() == 28);
    const PairCorrection& worst = found.pairs.front();
    CHECK(worst.a == "c3");
    CHECK(worst.b == "c7");
    CHECK(worst.said_by.empty());
    CHECK(worst.given == 6);
    CHECK_THAT(worst.best.value(), WithinAbs(.4625, .00005));
    CHECK_THAT(worst.cr_at_best.value(), WithinAbs(.0824, .00005));
    REQUIRE(found.fewest);
    CHECK(found.fewest->proven);
    REQUIRE(found.fewest->changes.size() == 1);
    CHECK(found.fewest->changes[0].a == "c3");
    CHECK(found.fewest->changes[0].b == "c7");
    CHECK(found.fewest->changes[0].given == 6);
    REQUIRE(found.matters_worst);
    CHECK(found.matters_worst->pairs == std::vector<std::array<Id, 2>>{{"c3", "c7"}});
    CHECK_FALSE(found.matters_fewest); // One pair: asked already.
    CHECK_FALSE(found.enough);         // Nothing is open.
    CHECK_FALSE(found.mean_of_several);
}

TEST_CASE("examination: every choice says the CR and the standing that solving it gives") {
    const Decision d = testing::house_decision();
    const Examination found = examined(d, "goal");
    int choices = 0;
    for (const auto& pair : found.pairs) {
        for (const auto& choice : pair.choices) {
            const Results then = with(d, "goal", "", pair.a, pair.b, choice.to);
            CHECK_THAT(choice.cr.value(), WithinAbs(then.sets.front().cr.value(), 1e-9));
            CHECK(choice.then.first == then.options[*then.first]);
            CHECK_THAT(choice.then.lead_points.value(), WithinAbs(then.lead_points.value(), 1e-9));
            ++choices;
        }
    }
    CHECK(choices >= 4);
    // The mildest first; the last is the scale's value nearest to the best one.
    CHECK(found.pairs[0].choices.back().to == .5);
    CHECK_THAT(found.pairs[0].choices.back().cr.value(), WithinAbs(.0825, .00005));
}

TEST_CASE("examination: of a mean of several judges only the pairs are told") {
    Decision d = testing::house_decision();
    for (const char* id : {"p1", "p2"}) {
        Person person;
        person.id = id;
        d.people.push_back(person);
    }
    for (std::size_t k = 0; k < 28; ++k) d.judgments[k].by = "p1";
    for (std::size_t k = 0; k < 28; ++k) {
        Judgment other = d.judgments[k];
        other.by = "p2";
        d.judgments.push_back(other);
    }
    const Examination group = examined(d, "goal");
    CHECK(group.mean_of_several);
    CHECK(group.pairs.size() == 28);
    CHECK_FALSE(group.fewest);
    for (const auto& pair : group.pairs) CHECK(pair.choices.empty());
    const Examination own = examined(d, "goal", "p2");
    CHECK_FALSE(own.mean_of_several);
    CHECK(own.pairs.front().said_by == "p2");
    CHECK(own.fewest.value().changes.front().said_by == "p2");
}

TEST_CASE("examination: an agreed answer in a person's set is the room's") {
    Decision d = testing::house_decision();
    Person person;
    person.id = "p1";
    d.people.push_back(person);
    for (auto& judgment : d.judgments) {
        if (judgment.a != "c3" || judgment.b != "c7") judgment.by = "p1";
    }
    const Examination own = examined(d, "goal", "p1");
    CHECK(own.pairs.front().a == "c3");
    CHECK(own.pairs.front().said_by.empty());
    CHECK(own.pairs.back().said_by == "p1");
}

TEST_CASE("examination: points, sets that fall apart and sets that are not there have nothing to correct") {
    Decision d = testing::house_decision();
    CHECK(examined(d, "none").pairs.empty());
    d.judgments.clear();
    CHECK(examined(d, "goal").pairs.empty());
    d.criteria.weights = WeightsBy::points;
    CHECK(examined(d, "goal").pairs.empty());
}

TEST_CASE("examination: random decisions of all kinds come to an end") {
    int over = 0;
    for (std::uint64_t seed = 1; seed <= 40; ++seed) {
        const Decision d = testing::random_decision(seed);
        const Results results = solve(d);
        for (const auto& set : results.sets) {
            CAPTURE(seed, set.set, set.by);
            const Examination found = examined(d, set.set, set.by);
            if (set.cr && *set.cr > d.settings.limit && !found.mean_of_several) {
                ++over;
                CHECK(found.fewest.has_value());
                CHECK(found.matters_worst.has_value());
            }
        }
    }
    CHECK(over > 10);
}

} // namespace steelyard
