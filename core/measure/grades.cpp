#include "core/measure/grades.hpp"

#include <algorithm>
#include <map>

namespace steelyard {

GradeFinding find_grade_worth(const std::vector<Person>& people, const Node& leaf, const Id& option,
                              const std::vector<const GradeEntry*>& entered,
                              const std::vector<std::optional<double>>& worths) {
    std::map<Id, Id> grade_by; // Person to the grade that stands; "" is agreed in the room.
    for (const GradeEntry* entry : entered) grade_by[entry->by] = entry->grade;
    const auto worth_of_grade = [&](const Id& grade) -> std::optional<double> {
        for (std::size_t i = 0; i < leaf.grades.size(); ++i) {
            if (leaf.grades[i].id == grade) return worths[i];
        }
        return std::nullopt;
    };
    if (const auto agreed = grade_by.find(Id{}); agreed != grade_by.end() && !agreed->second.empty()) {
        return {true, worth_of_grade(agreed->second)};
    }
    GradeFinding finding;
    double sum = 0;
    double shares = 0;
    for (const auto& person : people) {
        const auto own = grade_by.find(person.id);
        if (own == grade_by.end() || own->second.empty() || person.share == 0) continue;
        if (std::find(person.abstains.begin(), person.abstains.end(), option) != person.abstains.end())
            continue;
        finding.given = true;
        const auto worth = worth_of_grade(own->second);
        if (!worth) return finding;
        sum += person.share * *worth;
        shares += person.share;
    }
    if (finding.given) finding.worth = sum / shares;
    return finding;
}

} // namespace steelyard
