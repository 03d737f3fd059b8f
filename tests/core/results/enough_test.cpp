#include "core/results/enough.hpp"

#include <algorithm>
#include <array>
#include <catch_amalgamated.hpp>
#include <cmath>
#include <map>
#include <random>
#include <string>
#include <vector>

#include "core/decision/lookup.hpp"
#include "core/results/solve.hpp"
#include "tests/support/close.hpp"
#include "tests/support/dice.hpp"
#include "tests/support/find_results.hpp"
#include "tests/support/judged_decisions.hpp"
#include "tests/support/random_decision.hpp"
#include "tests/support/round_trip.hpp"

using namespace steelyard;
using namespace steelyard::testing;
using Verdict = EnoughAnswer::Verdict;
using Pairs = std::vector<std::array<Id, 2>>;

namespace {

/// The decision with these answers entered after all others.
Decision entered(Decision decision, const Id& set, const Id& by, const std::vector<PairAnswer>& answers) {
    for (const auto& answer : answers) {
        Judgment judgment;
        judgment.set = set;
        judgment.by = by;
        judgment.a = answer.a;
        judgment.b = answer.b;
        judgment.ratio = answer.ratio;
        decision.judgments.push_back(judgment);
    }
    return decision;
}

Id first_of(const Results& results) {
    return results.first ? results.options[*results.first] : Id{};
}

double score_or_nothing(const Results& results, const Id& option) {
    for (std::size_t o = 0; o < results.options.size(); ++o) {
        if (results.options[o] == option) return results.scores[o];
    }
    return -1;
}

/// Answers that put another option ahead, of `tries` random and corner ones.
bool turned_by_trying(const Decision& decision, const Results& results, const Id& set, const Id& by,
                      const Pairs& pairs, int tries, std::uint64_t seed) {
    std::mt19937_64 engine(seed);
    for (int k = 0; k < tries; ++k) {
        std::vector<PairAnswer> answers;
        for (const auto& [a, b] : pairs) {
            double part = static_cast<double>(engine() >> 11) * 0x1p-53;
            if (k % 2 == 0) part = part < .5 ? 0 : 1;
            answers.push_back({a, b, std::pow(9.0, 2 * part - 1)});
        }
        if (first_of(solve(entered(decision, set, by, answers))) != first_of(results)) return true;
    }
    return false;
}

/// Checks one answer by solving, and returns its verdict.
Verdict checked(const Decision& decision, const Results& results, const Id& set, const Id& by,
                const Pairs& pairs, int tries, std::uint64_t seed) {
    EnoughSearch search(decision, results, set, by, pairs);
    double progress = 0;
    while (search.step()) {
        CHECK(search.progress() >= progress);
        CHECK(search.progress() <= 1);
        progress = search.progress();
    }
    CHECK(search.progress() == 1);
    const EnoughAnswer& answer = search.answer();
    CAPTURE(set, by, pairs.size(), answer.why);
    switch (answer.verdict) {
    case Verdict::proven_no:
        CHECK_FALSE(turned_by_trying(decision, results, set, by, pairs, tries, seed));
        CHECK(answer.answers.empty());
        break;
    case Verdict::found_yes: {
        REQUIRE(answer.answers.size() == pairs.size());
        for (std::size_t p = 0; p < pairs.size(); ++p) {
            CHECK(answer.answers[p].a == pairs[p][0]);
            CHECK(answer.answers[p].b == pairs[p][1]);
            CHECK(answer.answers[p].ratio >= 1.0 / 9);
            CHECK(answer.answers[p].ratio <= 9);
        }
        const Results then = solve(entered(decision, set, by, answer.answers));
        CHECK(first_of(then) == answer.first_then);
        CHECK(answer.first_then != first_of(results));
        CHECK(score_or_nothing(then, answer.first_then) > score_or_nothing(then, first_of(results)) + .9e-9);
        break;
    }
    case Verdict::not_known: CHECK_FALSE(answer.why.empty()); break;
    }
    return answer.verdict;
}

Pairs judged_pairs(const Decision& decision, const Id& set, const Id& by) {
    Pairs pairs;
    for (const auto& j : decision.judgments) {
        const std::array<Id, 2> pair{std::min(j.a, j.b), std::max(j.a, j.b)};
        if (j.set == set && j.by == by && std::find(pairs.begin(), pairs.end(), pair) == pairs.end())
            pairs.push_back(pair);
    }
    return pairs;
}

std::string kind_of(const Decision& decision, const Id& set) {
    const Node& node = *find_node(decision.criteria, set);
    return !node.is_leaf() ? "criteria" : node.rate == RateBy::pairs ? "options" : "grades";
}

std::string combined_how(const Settings& settings) {
    switch (settings.combine) {
    case Combine::judgments: return "judgments";
    case Combine::priorities: return "priorities";
    case Combine::priorities_arithmetic: break;
    }
    return "arithmetic";
}

std::string method_name(Method method) {
    switch (method) {
    case Method::eigenvector: return "eigenvector";
    case Method::geometric_mean: return "geometric mean";
    case Method::column_average: break;
    }
    return "column average";
}

/// How often each verdict fell, by kind of set, way to combine, synthesis and method, over the random
/// decisions of these seeds; each verdict checked.
std::map<std::string, std::map<Verdict, int>> asked_at_random(std::uint64_t first, std::size_t decisions,
                                                              int tries) {
    std::map<std::string, std::map<Verdict, int>> count;
    for (std::uint64_t seed = first; seed < first + decisions; ++seed) {
        DecisionSize size;
        size.options = 6;
        size.children = 5;
        size.depth = 3;
        size.leaves = 8;
        const Decision decision = random_decision(seed, size);
        const Results results = solve(decision);
        Dice dice(seed);
        CAPTURE(seed);
        for (const auto& group : results.sets) {
            if (!group.by.empty() || group.from_points) continue;
            Id by;
            if (dice.chance(50) && !decision.people.empty()) by = dice.pick(decision.people).id;
            Pairs pairs = unanswered_pairs(decision, results, group.set, by);
            // Answers given are taken back now and then, beside those not given or in place of them.
            const Pairs given = judged_pairs(decision, group.set, by);
            if (!given.empty() && dice.chance(60)) {
                if (dice.chance(70)) pairs.clear();
                const auto taken = dice.pick(given);
                if (std::find(pairs.begin(), pairs.end(), taken) == pairs.end()) pairs.push_back(taken);
            }
            const Verdict verdict =
                checked(decision, results, group.set, by, pairs, pairs.empty() ? 1 : tries, seed);
            const Settings& settings = decision.settings;
            ++count[kind_of(decision, group.set)][verdict];
            ++count[combined_how(settings)][verdict];
            ++count[settings.synthesis == Synthesis::ideal ? "ideal" : "distributive"][verdict];
            ++count[method_name(settings.method)][verdict];
        }
    }
    return count;
}

/// Three options on the criteria a, b and c, rated by figures from 0 to 100; people p1 (share 1), p2 (share
/// 3).
Decision figures_decision(const std::string& more, const std::string& settings = "",
                          const std::string& rows = "80 30 40 / 40 60 50 / 30 45 70") {
    std::string figures;
    const char* criteria_ids[] = {"a", "b", "c"};
    int option = 1;
    std::size_t criterion = 0;
    std::string number;
    const auto flush = [&] {
        if (number.empty()) return;
        figures += std::string(figures.empty() ? "" : ", ") + R"({"criterion": ")" +
                   criteria_ids[criterion++] + R"(", "option": "o)" + std::to_string(option) +
                   R"(", "value": )" + number + "}";
        number.clear();
    };
    for (const char c : rows) {
        if (c == ' ' || c == '/') {
            flush();
        } else {
            number += c;
        }
        if (c == '/') {
            ++option;
            criterion = 0;
        }
    }
    flush();
    std::string text = R"({"format": "steelyard-decision", "version": 1,
        "options": [{"id": "o1", "name": "Brook"}, {"id": "o2", "name": "Alder"}, {"id": "o3", "name": "Fen"}],
        "people": [{"id": "p1", "share": 1}, {"id": "p2", "share": 3}],
        "criteria": {"id": "goal", "children": [)";
    for (const char* id : criteria_ids) {
        text += std::string(id == criteria_ids[0] ? "" : ", ") + R"({"id": ")" + id +
                R"(", "rate": "figure", "curve": {"kind": "line", "worst": 0, "best": 100}})";
    }
    return test::read(text + R"(]}, "figures": [)" + figures + R"(], "settings": {)" + settings + "}" +
                      (more.empty() ? "" : ", " + more) + "}");
}

EnoughAnswer asked(const Decision& decision, const Id& by, const Pairs& pairs, const Id& set = "goal") {
    return enough(decision, solve(decision), set, by, pairs);
}

} // namespace

TEST_CASE(
    "enough: random decisions, all ways to combine, what is proven withstands answers entered and solved") {
    const std::size_t decisions = std::max<std::size_t>(cases(2000) / 8, 1);
    const auto count = asked_at_random(0, decisions, 30);
    if (decisions < 250) return;
    CHECK(count.size() == 11);
    for (const auto& [what, verdicts] : count) {
        INFO(what);
        CHECK(verdicts.at(Verdict::found_yes) > 5);
        if (what != "column average") CHECK(verdicts.at(Verdict::proven_no) > 20);
    }
}

TEST_CASE("enough: many more random decisions and answers", "[.long]") {
    CHECK(asked_at_random(1000, 800, 100).size() == 11);
}

TEST_CASE("enough: nothing still open can change first place, or it can") {
    // Brook leads on a, which counts most by far; b against c is open.
    const Decision far = figures_decision(
        judgments({judgment("goal", "", "a", "b", "5"), judgment("goal", "", "a", "c", "7")}));
    const Results results = solve(far);
    CHECK(first_of(results) == "o1");
    CHECK(unanswered_pairs(far, results, "goal", "") == Pairs{{"b", "c"}});
    CHECK(checked(far, results, "goal", "", {{"b", "c"}}, 200, 1) == Verdict::proven_no);

    const Decision near = figures_decision(
        judgments({judgment("goal", "", "a", "b", "1"), judgment("goal", "", "a", "c", "1")}));
    CHECK(checked(near, solve(near), "goal", "", {{"b", "c"}}, 200, 1) == Verdict::found_yes);
    // Nothing open: nothing changes.
    CHECK(asked(far, "", {}).verdict == Verdict::proven_no);
}

TEST_CASE("enough: however a judgment is corrected") {
    const Decision decision =
        figures_decision(judgments({judgment("goal", "", "a", "b", "5"), judgment("goal", "", "a", "c", "7"),
                                    judgment("goal", "", "b", "c", "0.5")}));
    CHECK(asked(decision, "", {{"b", "c"}}).verdict == Verdict::proven_no);
    const EnoughAnswer yes = asked(decision, "", {{"b", "a"}, {"c", "a"}});
    REQUIRE(yes.verdict == Verdict::found_yes);
    CHECK(yes.answers[0].a == "b");
    CHECK(yes.first_then != "o1");
}

TEST_CASE("enough: a person's answers weigh by his share; agreed ones stand in their place") {
    const std::vector<std::string> others{
        judgment("goal", "p2", "a", "b", "3"), judgment("goal", "p2", "a", "c", "3"),
        judgment("goal", "p2", "b", "c", "1"), judgment("goal", "p1", "b", "c", "1")};
    for (const char* combine : {"judgments", "priorities", "priorities-arithmetic"}) {
        for (const char* method : {"eigenvector", "geometric-mean"}) {
            const std::string settings =
                std::string(R"("combine": ")") + combine + R"(", "method": ")" + method + "\"";
            CAPTURE(combine, method);
            const Pairs own{{"a", "b"}, {"a", "c"}};
            const Decision decision = figures_decision(judgments(others), settings);
            const Results results = solve(decision);
            CHECK(unanswered_pairs(decision, results, "goal", "p1") == own);
            // A quarter of the say does not turn it here, all of the say does.
            CHECK(checked(decision, results, "goal", "p1", own, 100, 1) == Verdict::proven_no);
            CHECK(checked(decision, results, "goal", "p2", own, 100, 1) == Verdict::found_yes);
            CHECK(checked(decision, results, "goal", "", own, 100, 1) == Verdict::found_yes);

            auto agreed = others;
            agreed.push_back(judgment("goal", "", "a", "b", "3"));
            agreed.push_back(judgment("goal", "", "c", "a", "0.3"));
            const Decision in_room = figures_decision(judgments(agreed), settings);
            CHECK(checked(in_room, solve(in_room), "goal", "p2", own, 100, 1) == Verdict::proven_no);
        }
    }
}

TEST_CASE("enough: options judged on a leaf, in both syntheses") {
    for (const char* synthesis : {"ideal", "distributive"}) {
        const auto decision = [&](const char* ratio) {
            return test::read(
                std::string(R"({"format": "steelyard-decision", "version": 1,
                "options": [{"id": "o1"}, {"id": "o2"}, {"id": "o3"}],
                "criteria": {"id": "goal", "children": [{"id": "ease"}, {"id": "price", "rate": "figure",
                    "curve": {"kind": "line", "worst": 0, "best": 100}}]},
                "figures": [{"criterion": "price", "option": "o1", "value": 90},
                            {"criterion": "price", "option": "o2", "value": 60},
                            {"criterion": "price", "option": "o3", "value": 50}],
                "settings": {"synthesis": ")") +
                synthesis + "\"}, " +
                judgments({judgment("goal", "", "price", "ease", ratio),
                           judgment("ease", "", "o1", "o2", "1"), judgment("ease", "", "o1", "o3", "1")}) +
                "}");
        };
        CAPTURE(synthesis);
        const Decision heavy = decision("9");
        CHECK(checked(heavy, solve(heavy), "ease", "", {{"o2", "o3"}}, 200, 1) == Verdict::proven_no);
        const Decision light = decision("0.5");
        CHECK(checked(light, solve(light), "ease", "", {{"o2", "o3"}, {"o1", "o2"}}, 200, 1) ==
              Verdict::found_yes);
    }
}

TEST_CASE("enough: a set of options that only hangs together through one that is out") {
    const Decision decision = test::read(
        R"({"format": "steelyard-decision", "version": 1,
        "options": [{"id": "o1"}, {"id": "o2"}, {"id": "o3", "withdrawn": true}], "criteria": {"id": "goal"}, )" +
        judgments({judgment("goal", "", "o1", "o3", "3"), judgment("goal", "", "o2", "o3", "1")}) + "}");
    const Results results = solve(decision);
    REQUIRE(set_of(results, "goal").items.size() == 3);
    CHECK(unanswered_pairs(decision, results, "goal", "") == Pairs{{"o1", "o2"}});
    CHECK(checked(decision, results, "goal", "", {{"o1", "o2"}}, 50, 1) == Verdict::found_yes);
    CHECK(checked(decision, results, "goal", "", {{"o2", "o3"}}, 50, 1) == Verdict::found_yes);
    // An answer about the one that is out counts only through the others.
    const Decision linked = entered(decision, "goal", "", {{"o1", "o2", 2}});
    CHECK(checked(linked, solve(linked), "goal", "", {{"o2", "o3"}}, 50, 1) == Verdict::proven_no);
}

TEST_CASE("enough: grades judged in pairs") {
    const auto decision = [](const char* synthesis, const char* weight) {
        return test::read(
            std::string(R"({"format": "steelyard-decision", "version": 1,
            "options": [{"id": "o1"}, {"id": "o2"}, {"id": "o3"}],
            "criteria": {"id": "goal", "children": [{"id": "service", "rate": "grade", "worths": "pairs",
                "grades": [{"id": "g1"}, {"id": "g2"}, {"id": "g3"}]},
                {"id": "price", "rate": "figure", "curve": {"kind": "line", "worst": 0, "best": 100}}]},
            "figures": [{"criterion": "price", "option": "o1", "value": 90},
                        {"criterion": "price", "option": "o2", "value": 60},
                        {"criterion": "price", "option": "o3", "value": 70}],
            "grades": [{"criterion": "service", "option": "o1", "grade": "g2"},
                       {"criterion": "service", "option": "o2", "grade": "g1"}],
            "settings": {"synthesis": ")") +
            synthesis + "\"}, " +
            judgments({judgment("goal", "", "price", "service", weight),
                       judgment("service", "", "g1", "g2", "2"), judgment("service", "", "g2", "g3", "2")}) +
            "}");
    };
    for (const char* synthesis : {"ideal", "distributive"}) {
        CAPTURE(synthesis);
        const Decision heavy = decision(synthesis, "8");
        const Results results = solve(heavy);
        CHECK(unanswered_pairs(heavy, results, "service", "") == Pairs{{"g1", "g3"}});
        CHECK(checked(heavy, results, "service", "", {{"g1", "g3"}}, 200, 1) == Verdict::proven_no);
        const Decision light = decision(synthesis, "1");
        CHECK(checked(light, solve(light), "service", "", {{"g1", "g3"}, {"g1", "g2"}}, 200, 1) ==
              Verdict::found_yes);
    }
}

TEST_CASE("enough: a must on the worth of the node that is weighed") {
    const std::vector<std::string> answers{judgment("goal", "", "a", "b", "5"),
                                           judgment("goal", "", "a", "c", "7")};
    const auto with_must = [&](const char* limit) {
        return figures_decision(judgments(answers) + R"(, "requirements": [{"id": "r1", "node": "goal", )" +
                                limit + "}]");
    };
    // Brook's worth stays from .650 to .687, the others' below .46: the first limit never bites, the second
    // keeps the others out.
    const Decision low = with_must(R"("min_worth": 0.2)");
    CHECK(checked(low, solve(low), "goal", "", {{"b", "c"}}, 200, 1) == Verdict::proven_no);
    const Decision others_out = with_must(R"("min_worth": 0.6)");
    REQUIRE(solve(others_out).options.size() == 1);
    CHECK(checked(others_out, solve(others_out), "goal", "", {{"b", "c"}}, 200, 1) == Verdict::proven_no);
    // Brook stands at .683 and passes .685 where b and c count alike: out, and another is first.
    const Decision upper = with_must(R"("at_most": 0.685)");
    const Results results = solve(upper);
    REQUIRE(first_of(results) == "o1");
    CHECK(checked(upper, results, "goal", "", {{"b", "c"}}, 200, 1) == Verdict::found_yes);
    // A waived must, or one without a limit, is none.
    const Decision waived = with_must(R"("at_most": 0.685, "waived": {"by": "p1", "why": "agreed"})");
    CHECK(checked(waived, solve(waived), "goal", "", {{"b", "c"}}, 200, 1) == Verdict::proven_no);
}

TEST_CASE(
    "enough: a must that moves others in and out without changing first place is not proven either way") {
    const Decision decision = figures_decision(
        judgments({judgment("goal", "", "a", "b", "5"), judgment("goal", "", "a", "c", "7")}) +
        R"(, "requirements": [{"id": "r1", "node": "goal", "min_worth": 0.449}])");
    const Results results = solve(decision);
    REQUIRE(first_of(results) == "o1");
    const Pairs open{{"b", "c"}};
    const EnoughAnswer answer = enough(decision, results, "goal", "", open);
    CHECK(answer.verdict == Verdict::not_known);
    CHECK(answer.why.find("must") != std::string::npos);
    CHECK_FALSE(turned_by_trying(decision, results, "goal", "", open, 200, 1));
}

TEST_CASE("enough: a must above a judged leaf") {
    const auto decision = [](const char* must, const char* synthesis) {
        return test::read(
            std::string(R"({"format": "steelyard-decision", "version": 1,
            "options": [{"id": "o1"}, {"id": "o2"}, {"id": "o3"}], "criteria": {"id": "goal"},
            "settings": {"synthesis": ")") +
            synthesis + R"("}, "requirements": [{"id": "r1", "node": "goal", )" + must + "}], " +
            judgments({judgment("goal", "", "o1", "o2", "5"), judgment("goal", "", "o1", "o3", "5")}) + "}");
    };
    for (const char* synthesis : {"ideal", "distributive"}) {
        CAPTURE(synthesis);
        // Worths of the others go from about .1 to .42; o1 is the best, 1, whatever is said of them.
        const Decision kept = decision(R"("min_worth": 0.02)", synthesis);
        CHECK(checked(kept, solve(kept), "goal", "", {{"o2", "o3"}}, 200, 1) == Verdict::proven_no);
        const Decision turned = decision(R"("at_least": 0.1)", synthesis);
        CHECK(checked(turned, solve(turned), "goal", "", {{"o1", "o2"}, {"o1", "o3"}}, 50, 1) ==
              Verdict::found_yes);
        // The others can come in or go out, which moves nobody to first place.
        const Decision others = decision(R"("min_worth": 0.15)", synthesis);
        REQUIRE(solve(others).options.size() == 3);
        const EnoughAnswer answer = asked(others, "", {{"o2", "o3"}});
        CHECK(answer.verdict == Verdict::not_known);
        CHECK(answer.why.find("must") != std::string::npos);
        // One that fails already is judged among the field, the others among those in play: only tried out.
        const Decision out = decision(R"("min_worth": 0.9)", synthesis);
        REQUIRE(solve(out).options.size() == 1);
        CHECK(checked(out, solve(out), "goal", "", {{"o2", "o3"}}, 50, 1) == Verdict::not_known);
        CHECK(checked(out, solve(out), "goal", "", {{"o1", "o3"}, {"o1", "o2"}}, 50, 1) ==
              Verdict::found_yes);
    }
}

TEST_CASE("enough: a must above grades judged in pairs") {
    const auto decision = [](const char* must) {
        return test::read(
            std::string(R"({"format": "steelyard-decision", "version": 1,
            "options": [{"id": "o1"}, {"id": "o2"}, {"id": "o3"}],
            "criteria": {"id": "goal", "rate": "grade", "worths": "pairs",
                "grades": [{"id": "g1"}, {"id": "g2"}, {"id": "g3"}]},
            "grades": [{"criterion": "goal", "option": "o1", "grade": "g1"},
                       {"criterion": "goal", "option": "o2", "grade": "g2"}],
            "requirements": [{"id": "r1", "node": "goal", )") +
            must + "}], " +
            judgments({judgment("goal", "", "g1", "g2", "4"), judgment("goal", "", "g1", "g3", "4")}) + "}");
    };
    // o3 has no grade: between 0 and 1, undecided, it stays; o2 lies from .1 to .5.
    const Decision kept = decision(R"("min_worth": 0.05)");
    CHECK(checked(kept, solve(kept), "goal", "", {{"g2", "g3"}}, 200, 1) == Verdict::proven_no);
    const Decision turned = decision(R"("at_most": 1, "min_worth": 0.5)");
    REQUIRE(first_of(solve(turned)) == "o1");
    CHECK(checked(turned, solve(turned), "goal", "", {{"g1", "g2"}, {"g2", "g3"}}, 50, 1) ==
          Verdict::found_yes);
}

TEST_CASE("enough: what cannot be asked says why") {
    const auto why = [](const Decision& decision, const Id& set, const Id& by, const Pairs& pairs) {
        const EnoughAnswer answer = enough(decision, solve(decision), set, by, pairs);
        CHECK(answer.verdict == Verdict::not_known);
        CHECK_FALSE(answer.why.empty());
        return answer.why;
    };
    const Decision decision = figures_decision(judgments({judgment("goal", "", "a", "b", "5")}));
    const Pairs open{{"b", "c"}};
    CHECK(why(decision, "a", "", open) == "This is not a set of pairs.");
    CHECK(why(decision, "nowhere", "", open) == "This is not a set of pairs.");
    CHECK(why(decision, "goal", "nobody", open) == "There is no such person.");
    // c stays unlinked.
    CHECK(why(decision, "goal", "", {{"a", "b"}}) ==
          "With these answers \"goal\" would still give no weights.");
    const Decision columns = figures_decision(
        judgments({judgment("goal", "", "a", "b", "5"), judgment("goal", "", "a", "c", "7")}),
        R"("method": "column-average")", "80 70 40 / 40 60 50 / 30 45 70");
    CHECK(why(columns, "goal", "", open).find("Averaged columns") == 0);
    const Decision tied = figures_decision(
        judgments({judgment("goal", "", "a", "b", "5"), judgment("goal", "", "a", "c", "7")}), "",
        "80 30 40 / 80 30 40 / 30 45 70");
    CHECK(why(tied, "goal", "", open) == "\"Brook\" and \"Alder\" share first place as it is.");
    const Decision nobody = test::read(R"({"format": "steelyard-decision", "version": 1,
        "options": [{"id": "o1", "withdrawn": true}], "criteria": {"id": "goal", "children": [{"id": "a"}, {"id": "b"}]}})");
    CHECK(why(nobody, "goal", "", {{"a", "b"}}) == "No option is in play.");
    const Decision alone = test::read(R"({"format": "steelyard-decision", "version": 1,
        "options": [{"id": "o1"}], "criteria": {"id": "goal", "children": [{"id": "a"}, {"id": "b"}]}})");
    const EnoughAnswer only = asked(alone, "", {{"a", "b"}});
    CHECK(only.verdict == Verdict::proven_no);
    CHECK(only.why == "Only one option is in play.");
}

TEST_CASE("enough: a set without weights yet") {
    // Nobody has answered: the criteria count equally for now, and the answers decide.
    const Decision decision = figures_decision("");
    const Results results = solve(decision);
    CHECK(results.provisional);
    const Pairs all = unanswered_pairs(decision, results, "goal", "");
    CHECK(all == Pairs{{"a", "b"}, {"a", "c"}, {"b", "c"}});
    CHECK(checked(decision, results, "goal", "", all, 50, 1) == Verdict::found_yes);
    // One option better everywhere: whatever is answered.
    const Decision clear = figures_decision("", "", "80 70 75 / 40 60 50 / 30 45 70");
    CHECK(checked(clear, solve(clear), "goal", "", all, 200, 1) == Verdict::proven_no);
}

TEST_CASE("enough: pairs named twice, turned or not of the set") {
    const Decision decision = figures_decision(
        judgments({judgment("goal", "", "a", "b", "1"), judgment("goal", "", "a", "c", "1")}));
    const EnoughAnswer answer =
        asked(decision, "", {{"c", "b"}, {"b", "c"}, {"c", "b"}, {"a", "a"}, {"a", "o1"}, {"b", "zzz"}});
    REQUIRE(answer.verdict == Verdict::found_yes);
    REQUIRE(answer.answers.size() == 1);
    CHECK(answer.answers[0].a == "c");
    CHECK(answer.answers[0].b == "b");
}

TEST_CASE("enough: the unanswered pairs of a person leave out agreed ones and options he abstains on") {
    const Decision decision =
        test::read(R"({"format": "steelyard-decision", "version": 1,
        "options": [{"id": "o1"}, {"id": "o2"}, {"id": "o3"}, {"id": "o4"}],
        "people": [{"id": "p1", "abstains": ["o4"]}, {"id": "p2"}],
        "criteria": {"id": "goal"}, )" +
                   judgments({judgment("goal", "", "o2", "o1", "2"), judgment("goal", "p2", "o1", "o3", "2"),
                              judgment("goal", "p1", "o1", "o4", "2")}) +
                   "}");
    const Results results = solve(decision);
    CHECK(unanswered_pairs(decision, results, "goal", "p1") == Pairs{{"o1", "o3"}, {"o2", "o3"}});
    CHECK(unanswered_pairs(decision, results, "goal", "p2") ==
          Pairs{{"o1", "o4"}, {"o2", "o3"}, {"o2", "o4"}, {"o3", "o4"}});
    CHECK(unanswered_pairs(decision, results, "goal", "") ==
          Pairs{{"o1", "o4"}, {"o2", "o3"}, {"o2", "o4"}, {"o3", "o4"}});
    CHECK(unanswered_pairs(decision, results, "nowhere", "").empty());
    CHECK(unanswered_pairs(decision, results, "goal", "nobody").empty());
}
