#include "core/results/entry_matrix.hpp"

#include <algorithm>

#include "core/decision/lookup.hpp"

namespace steelyard {

EntryMatrix entry_matrix(const Decision& decision, const SetResult& entry) {
    return entry_matrix(decision, JudgmentsBySet(decision), entry);
}

EntryMatrix entry_matrix(const Decision& decision, const JudgmentsBySet& judgments, const SetResult& entry) {
    if (entry.from_points) return {PairMatrix(entry.items.size())};
    const Node* node = find_node(decision.criteria, entry.set);
    const bool of_options = node != nullptr && node->is_leaf() && node->rate == RateBy::pairs;
    const JudgedSet judged = judgments.gather(entry.set, entry.items, of_options);
    const std::size_t judges = judged.judges.size();
    if (entry.by.empty()) return {group_matrix(judged), judges};
    const auto own = std::find_if(judged.judges.begin(), judged.judges.end(),
                                  [&](const JudgeAnswers& judge) { return judge.person == entry.by; });
    // A judge without an answer of his own has no entry; what was agreed is then all there is.
    return {own == judged.judges.end() ? judged.agreed : judge_matrix(*own, judged.agreed), judges};
}

} // namespace steelyard
