#include <catch_amalgamated.hpp>
#include <optional>
#include <vector>

#include "core/measure/grades.hpp"

namespace steelyard {

using Catch::Matchers::WithinAbs;
using Worths = std::vector<std::optional<double>>;

namespace {

Person person(const Id& id, double share, const std::vector<Id>& abstains = {}) {
    Person p;
    p.id = id;
    p.share = share;
    p.abstains = abstains;
    return p;
}

GradeEntry entry(const Id& by, const Id& grade) {
    GradeEntry e;
    e.by = by;
    e.grade = grade;
    return e;
}

Node graded_leaf() {
    Node leaf;
    leaf.id = "service";
    leaf.rate = RateBy::grade;
    for (const char* id : {"good", "fair", "poor"}) {
        Grade grade;
        grade.id = id;
        leaf.grades.push_back(grade);
    }
    return leaf;
}

const std::vector<Person> one_to_three{person("p1", 1), person("p2", 3)};

GradeFinding found(const std::vector<GradeEntry>& entries, const std::vector<Person>& people = one_to_three,
                   const Worths& worths = {1, .6, 0}) {
    std::vector<const GradeEntry*> entered;
    for (const GradeEntry& e : entries) entered.push_back(&e);
    return find_grade_worth(standing_grades(people, graded_leaf(), "o1", entered), worths);
}

std::optional<double> worth(const std::vector<GradeEntry>& entries,
                            const std::vector<Person>& people = one_to_three,
                            const Worths& worths = {1, .6, 0}) {
    return found(entries, people, worths).worth;
}

} // namespace

TEST_CASE("grades: nothing entered, nothing known") {
    CHECK_FALSE(worth({}).has_value());
}

TEST_CASE("grades: an agreed grade stands in place of the persons'") {
    CHECK(worth({entry("p1", "good"), entry("", "fair"), entry("p2", "good")}) == .6);
    CHECK(worth({entry("", "fair")}, {}) == .6);
    // The last agreed one.
    CHECK(worth({entry("", "good"), entry("", "poor")}) == 0);
}

TEST_CASE("grades: the persons' worths are averaged by share") {
    CHECK_THAT(worth({entry("p1", "good"), entry("p2", "fair")}).value(), WithinAbs((1 + 3 * .6) / 4, 1e-15));
    // Over those who gave one.
    CHECK_THAT(worth({entry("p2", "fair")}).value(), WithinAbs(.6, 1e-15));
}

TEST_CASE("grades: a person's last grade stands, and one without a grade clears it") {
    CHECK_THAT(worth({entry("p1", "poor"), entry("p2", "fair"), entry("p1", "good")}).value(),
               WithinAbs((1 + 3 * .6) / 4, 1e-15));
    CHECK_THAT(worth({entry("p1", "good"), entry("p2", "fair"), entry("p1", "")}).value(),
               WithinAbs(.6, 1e-15));
    CHECK_FALSE(worth({entry("p1", "good"), entry("p1", "")}).has_value());
}

TEST_CASE("grades: a cleared agreement lets the persons speak again") {
    CHECK_THAT(worth({entry("", "poor"), entry("p2", "fair"), entry("", "")}).value(), WithinAbs(.6, 1e-15));
}

TEST_CASE("grades: shares of 0 and those who abstain on the option do not count") {
    CHECK_THAT(worth({entry("p1", "good"), entry("p2", "fair")}, {person("p1", 0), person("p2", 3)}).value(),
               WithinAbs(.6, 1e-15));
    const GradeFinding only_0 = found({entry("p1", "good")}, {person("p1", 0), person("p2", 3)});
    CHECK_FALSE(only_0.given);
    CHECK_FALSE(only_0.worth.has_value());
    const std::vector<Person> abstaining{person("p1", 1, {"o2", "o1"}), person("p2", 3, {"o2"})};
    CHECK_THAT(worth({entry("p1", "good"), entry("p2", "fair")}, abstaining).value(), WithinAbs(.6, 1e-15));
    // An agreed grade stands although somebody abstains.
    CHECK(worth({entry("", "good")}, abstaining) == 1);
}

TEST_CASE("grades: one grade without a worth that is needed leaves the option without") {
    const Worths unknown{1, std::nullopt, 0};
    CHECK(found({entry("", "fair")}, one_to_three, unknown).given);
    CHECK(found({entry("p1", "good"), entry("p2", "fair")}, one_to_three, unknown).given);
    CHECK_FALSE(worth({entry("", "fair")}, one_to_three, unknown).has_value());
    CHECK_FALSE(worth({entry("p1", "good"), entry("p2", "fair")}, one_to_three, unknown).has_value());
    CHECK(worth({entry("p1", "good"), entry("p2", "poor")}, one_to_three, unknown) == .25);
    // Not needed where its giver does not count.
    CHECK(worth({entry("p1", "good"), entry("p2", "fair")}, {person("p1", 1), person("p2", 0)}, unknown) ==
          1);
}

TEST_CASE("grades: without a person, and with one person's alone") {
    const std::vector<GradeEntry> entries{entry("p1", "good"), entry("p2", "fair")};
    std::vector<const GradeEntry*> entered{&entries[0], &entries[1]};
    const StandingGrades grades = standing_grades(one_to_three, graded_leaf(), "o1", entered);
    const Worths worths{1, .6, 0};
    const Person* p1 = &one_to_three[0];
    const Person* p2 = &one_to_three[1];
    CHECK_THAT(find_grade_worth(grades, worths, p2).worth.value(), WithinAbs(1, 1e-15));
    CHECK(find_grade_worth(grades, worths, nullptr, p2).worth == .6);
    // One who gave none speaks with all; without the only one who did nothing is left.
    entered.pop_back();
    const StandingGrades single = standing_grades(one_to_three, graded_leaf(), "o1", entered);
    CHECK(find_grade_worth(single, worths, nullptr, p2).worth == 1);
    CHECK_FALSE(find_grade_worth(single, worths, p1).given);
    // An agreed grade stands whoever is left out.
    const GradeEntry agreed = entry("", "poor");
    entered.push_back(&agreed);
    const StandingGrades settled = standing_grades(one_to_three, graded_leaf(), "o1", entered);
    CHECK(find_grade_worth(settled, worths, p1).worth == 0);
    CHECK(find_grade_worth(settled, worths, nullptr, p1).worth == 0);
}

} // namespace steelyard
