#pragma once

#include <map>
#include <vector>

#include "core/decision/decision.hpp"
#include "core/judgment/pair_matrix.hpp"

namespace steelyard {

/// One judge's own answers in a set.
struct JudgeAnswers {
    Id person;
    double share = 1;
    PairMatrix own; ///< His judgments alone, agreed ones not put in.
};

/// What was said in a set: the agreed judgments and each judge's own, the last one of a pair and person
/// standing.
struct JudgedSet {
    PairMatrix agreed;
    std::vector<JudgeAnswers> judges; ///< Those with an answer of their own, in the order of the people.
};

/// The judgments of a decision by set, so that each set is gathered without reading all of them.
class JudgmentsBySet {
public:
    explicit JudgmentsBySet(const Decision& decision);

    /// What was said of `items` in `set`. Judgments of other items do not count; where the items are options,
    /// neither do those of a person who abstains on one of the pair.
    JudgedSet gather(const Id& set, const std::vector<Id>& items, bool items_are_options) const;

private:
    const Decision& decision_;
    std::map<Id, std::vector<const Judgment*>> by_set_;
};

/// A judge's matrix: his own answers, agreed ones standing in their place.
PairMatrix judge_matrix(const JudgeAnswers& judge, const PairMatrix& agreed);

/// The group's matrix: per pair the agreed ratio, or else the geometric mean of the judges' ratios by share,
/// shares renormalised over those who judged the pair. Sources: Aczel and Saaty 1983; Aczel and Alsina 1986.
PairMatrix group_matrix(const JudgedSet& set);

} // namespace steelyard
