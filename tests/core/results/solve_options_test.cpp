#include <array>
#include <catch_amalgamated.hpp>
#include <string>
#include <vector>

#include "tests/support/close.hpp"
#include "tests/support/find_results.hpp"
#include "tests/support/judged_decisions.hpp"
#include "tests/support/pairs.hpp"

// Sets of options: which judgments count when options take no part or judges abstain.
namespace steelyard {

using testing::check_close;
using testing::judgment;
using testing::judgments;
using testing::noticed_at;
using testing::options;
using testing::set_of;
using Pairs = std::vector<std::array<Id, 2>>;
using Words = std::vector<std::string>;

namespace {

constexpr double rounding = 1e-14;

} // namespace

TEST_CASE("sets: judgments of options out of play do not count where the others connect") {
    const std::string list =
        judgments({judgment("goal", "", "o1", "o2", "2"), judgment("goal", "", "o1", "o3", "9"),
                   judgment("goal", "", "o3", "o2", "9")});
    const Results results = options(R"({"id": "o1"}, {"id": "o2"}, {"id": "o3", "withdrawn": true})", list);
    CHECK(set_of(results, "goal").items == std::vector<Id>{"o1", "o2"});
    check_close(set_of(results, "goal").weights.value(), {2. / 3, 1. / 3}, rounding);
    CHECK(noticed_at(results, "whole-set").empty());
}

TEST_CASE("sets: options only linked through one out of play take their values from the whole set") {
    const std::string list =
        judgments({judgment("goal", "", "o1", "o3", "2"), judgment("goal", "", "o3", "o2", "2")});
    const Results results = options(R"({"id": "o1"}, {"id": "o2"}, {"id": "o3", "withdrawn": true})", list);
    const SetResult& whole = set_of(results, "goal");
    CHECK(whole.items == std::vector<Id>{"o1", "o2", "o3"});
    check_close(whole.weights.value(), {4. / 7, 1. / 7, 2. / 7}, rounding);
    CHECK(results.options == std::vector<Id>{"o1", "o2"});
    check_close(results.scores, {1, .25}, rounding); // Against the best in play.
    CHECK_FALSE(results.provisional);
    CHECK(noticed_at(results, "whole-set") == Words{"/criteria"});
    const Results shares = options(R"({"id": "o1"}, {"id": "o2"}, {"id": "o3", "withdrawn": true})",
                                   R"("settings": {"synthesis": "distributive"}, )" + list);
    check_close(shares.scores, {.8, .2}, rounding); // Restricted and set to sum 1 again.
}

TEST_CASE("sets: an option excluded by a must links the others as a withdrawn one does") {
    const Results results =
        options(R"({"id": "o1"}, {"id": "o2"}, {"id": "o3"})",
                judgments({judgment("goal", "", "o1", "o3", "2"), judgment("goal", "", "o3", "o2", "2")}) +
                    R"(, "requirements": [{"id": "r", "yes_no": true}],
                       "checks": [{"requirement": "r", "option": "o3", "state": "failed"}])");
    CHECK(results.options == std::vector<Id>{"o1", "o2"});
    check_close(results.scores, {1, .25}, rounding);
    CHECK(noticed_at(results, "whole-set").size() == 1);
}

TEST_CASE("sets: where not even the whole set connects, only the options in play are told of") {
    const Results results = options(R"({"id": "o1"}, {"id": "o2"}, {"id": "o3", "withdrawn": true})",
                                    judgments({judgment("goal", "", "o1", "o3", "2")}));
    CHECK(set_of(results, "goal").items == std::vector<Id>{"o1", "o2"});
    CHECK(noticed_at(results, "whole-set").empty());
    CHECK(noticed_at(results, "not-connected").size() == 1);
    CHECK(results.provisional);
}

TEST_CASE("sets: with one option in play a leaf of pairs has no set and is worth 1") {
    const Results results = options(R"({"id": "o1"}, {"id": "o2", "withdrawn": true})",
                                    judgments({judgment("goal", "", "o1", "o2", "0.25")}));
    CHECK(results.sets.empty());
    check_close(results.scores, {1}, 0);
    CHECK_FALSE(results.provisional);
}

TEST_CASE("sets: a person's pairs with an option he abstains on do not count") {
    const std::string list =
        judgments({judgment("goal", "p1", "o1", "o2", "9"), judgment("goal", "p1", "o2", "o3", "2"),
                   judgment("goal", "p2", "o1", "o2", "3"), judgment("goal", "p2", "o2", "o3", "2")});
    const std::string three = R"({"id": "o1"}, {"id": "o2"}, {"id": "o3"})";
    const Results results = options(three, list, R"("o1")");
    CHECK(set_of(results, "goal", "p1").missing == Pairs{{"o1", "o2"}, {"o1", "o3"}});
    check_close(set_of(results, "goal").weights.value(), testing::normalised({6, 2, 1}), rounding);
    // Abstaining on all he judged he has no entry.
    CHECK(options(three, list, R"("o2")").sets.size() == 2);
}

} // namespace steelyard
