#include "core/judgment/judged_set.hpp"

#include <algorithm>
#include <cmath>
#include <optional>

namespace steelyard {

JudgmentsBySet::JudgmentsBySet(const Decision& decision) : decision_(decision) {
    for (const auto& judgment : decision.judgments) by_set_[judgment.set].push_back(&judgment);
}

JudgedSet JudgmentsBySet::gather(const Id& set, const std::vector<Id>& items, bool items_are_options) const {
    JudgedSet result{PairMatrix(items.size()), {}};
    const auto found = by_set_.find(set);
    if (found == by_set_.end()) return result;

    std::map<Id, std::size_t> index;
    for (std::size_t i = 0; i < items.size(); ++i) index.emplace(items[i], i);
    std::map<Id, PairMatrix> own;
    for (const Judgment* judgment : found->second) {
        const auto a = index.find(judgment->a);
        const auto b = index.find(judgment->b);
        if (a == index.end() || b == index.end()) continue;
        PairMatrix& matrix =
            judgment->by.empty() ? result.agreed : own.try_emplace(judgment->by, items.size()).first->second;
        matrix.set(a->second, b->second, judgment->ratio);
    }
    for (const auto& person : decision_.people) {
        const auto answers = own.find(person.id);
        if (answers == own.end()) continue;
        PairMatrix& matrix = answers->second;
        for (const auto& option : items_are_options ? person.abstains : std::vector<Id>{}) {
            const auto at = index.find(option);
            if (at == index.end()) continue;
            for (std::size_t j = 0; j < items.size(); ++j) {
                if (j != at->second) matrix.clear(at->second, j);
            }
        }
        if (!matrix.judged_pairs().empty())
            result.judges.push_back({person.id, person.share, std::move(matrix)});
    }
    return result;
}

PairMatrix judge_matrix(const JudgeAnswers& judge, const PairMatrix& agreed) {
    PairMatrix matrix = judge.own;
    for (const auto& [i, j] : agreed.judged_pairs()) matrix.set(i, j, agreed.at(i, j));
    return matrix;
}

PairMatrix group_matrix(const JudgedSet& set) {
    PairMatrix group = set.agreed;
    for (const auto& [i, j] : set.agreed.missing()) {
        double shares = 0;
        double sum = 0;
        const JudgeAnswers* only = nullptr;
        int judges = 0;
        for (const auto& judge : set.judges) {
            if (!judge.own.judged(i, j) || judge.share == 0) continue;
            shares += judge.share;
            sum += judge.share * std::log(judge.own.at(i, j));
            only = &judge;
            ++judges;
        }
        // One judge's ratio is taken as typed: exp(ln 3) is not 3.
        if (judges == 1) group.set(i, j, only->own.at(i, j));
        if (judges > 1) group.set(i, j, std::exp(sum / shares));
    }
    return group;
}

} // namespace steelyard
