#include "tests/support/house_decision.hpp"

#include <array>
#include <string>

#include "tests/support/pairs.hpp"

namespace steelyard::testing {

Decision house_decision() {
    // Grades of A, B and C on the eight criteria, our own.
    constexpr std::array<std::array<double, 3>, 8> worths{{{.9, .6, .4},
                                                           {.3, .8, .6},
                                                           {.2, .7, 1},
                                                           {.5, .5, .6},
                                                           {.4, .6, .7},
                                                           {1, .4, .2},
                                                           {.5, .8, .7},
                                                           {.6, .9, .5}}};
    Decision d;
    d.id = "house";
    d.title = "Three sites";
    for (const char* id : {"A", "B", "C"}) {
        Option option;
        option.id = id;
        option.name = id;
        d.options.push_back(std::move(option));
    }
    d.criteria.id = "goal";
    d.criteria.name = "Best site";
    for (std::size_t c = 0; c < worths.size(); ++c) {
        Node leaf;
        leaf.id = "c" + std::to_string(c + 1);
        leaf.name = "Criterion " + std::to_string(c + 1);
        leaf.rate = RateBy::grade;
        for (std::size_t o = 0; o < 3; ++o) {
            Grade grade;
            grade.id = leaf.id + "-" + d.options[o].id;
            grade.name = "as " + d.options[o].name;
            grade.worth = worths[c][o];
            leaf.grades.push_back(grade);
            GradeEntry entry;
            entry.criterion = leaf.id;
            entry.option = d.options[o].id;
            entry.grade = grade.id;
            d.grades.push_back(std::move(entry));
        }
        d.criteria.children.push_back(std::move(leaf));
    }
    const PairMatrix pairs = house_pairs();
    for (const auto& [i, j] : pairs.judged_pairs()) {
        Judgment judgment;
        judgment.set = "goal";
        judgment.a = d.criteria.children[i].id;
        judgment.b = d.criteria.children[j].id;
        judgment.ratio = pairs.at(i, j);
        d.judgments.push_back(std::move(judgment));
    }
    return d;
}

} // namespace steelyard::testing
