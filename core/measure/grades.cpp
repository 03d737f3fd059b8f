#include "core/measure/grades.hpp"

#include <algorithm>
#include <map>
#include <string_view>

namespace steelyard {

StandingGrades standing_grades(const std::vector<Person>& people, const Node& leaf, const Id& option,
                               const std::vector<const GradeEntry*>& entered) {
    std::map<std::string_view, const Id*>
        grade_by; // Person to the grade that stands; "" is agreed in the room.
    for (const GradeEntry* entry : entered) grade_by[entry->by] = &entry->grade;
    const auto grade_of = [&](const Id& by) -> std::optional<std::size_t> {
        const auto found = grade_by.find(by);
        if (found == grade_by.end() || found->second->empty()) return std::nullopt;
        const auto at = std::find_if(leaf.grades.begin(), leaf.grades.end(),
                                     [&](const Grade& grade) { return grade.id == *found->second; });
        if (at == leaf.grades.end()) return std::nullopt;
        return static_cast<std::size_t>(at - leaf.grades.begin());
    };
    StandingGrades grades;
    grades.agreed = grade_of(Id{});
    for (const auto& person : people) {
        if (person.share == 0) continue;
        const auto grade = grade_of(person.id);
        if (!grade) continue;
        if (std::find(person.abstains.begin(), person.abstains.end(), option) == person.abstains.end())
            grades.own.push_back({&person, *grade});
    }
    return grades;
}

GradeFinding find_grade_worth(const StandingGrades& grades, const std::vector<std::optional<double>>& worths,
                              const Person* without, const Person* only) {
    if (grades.agreed) return {true, worths[*grades.agreed]};
    for (const auto& [person, grade] : grades.own) {
        if (person == only) return {true, worths[grade]};
    }
    GradeFinding finding;
    double sum = 0;
    double shares = 0;
    for (const auto& [person, grade] : grades.own) {
        if (person == without) continue;
        finding.given = true;
        if (!worths[grade]) return finding;
        sum += person->share * *worths[grade];
        shares += person->share;
    }
    if (finding.given) finding.worth = sum / shares;
    return finding;
}

} // namespace steelyard
