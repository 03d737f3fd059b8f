#include "core/measure/grades.hpp"

#include <algorithm>
#include <map>

namespace steelyard {

std::optional<double> graded_worth(const std::vector<Person>& people, const Node& leaf, const Id& option,
                                   const std::vector<const GradeEntry*>& entered,
                                   const std::vector<std::optional<double>>& worths) {
    std::map<Id, Id> grade_by; // Person to the grade that stands; "" is agreed in the room.
    for (const GradeEntry* entry : entered)
        grade_by[entry->by] = entry->grade;
    const auto worth_of_grade = [&](const Id& grade) -> std::optional<double> {
        for (std::size_t i = 0; i < leaf.grades.size(); ++i) {
            if (leaf.grades[i].id == grade)
                return worths[i];
        }
        return std::nullopt;
    };
    if (const auto agreed = grade_by.find(Id{}); agreed != grade_by.end() && !agreed->second.empty()) {
        return worth_of_grade(agreed->second);
    }
    double sum = 0;
    double shares = 0;
    for (const auto& person : people) {
        const auto own = grade_by.find(person.id);
        if (own == grade_by.end() || own->second.empty() || person.share == 0)
            continue;
        if (std::find(person.abstains.begin(), person.abstains.end(), option) != person.abstains.end())
            continue;
        const auto worth = worth_of_grade(own->second);
        if (!worth)
            return std::nullopt;
        sum += person.share * *worth;
        shares += person.share;
    }
    if (shares == 0)
        return std::nullopt;
    return sum / shares;
}

} // namespace steelyard
