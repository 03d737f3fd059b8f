#pragma once

#include <cstddef>
#include <optional>
#include <vector>

#include "core/judgment/pair_matrix.hpp"

namespace steelyard {

/// The pair to ask next, i < j; none where every pair is answered or skipped.
///
/// 1. With a star, the item named as mattering most: each other item against it, in item order. A star was
///    best among the trees in the simulations of Bozoki and Szadoczki (2022, from memory).
/// 2. While the answers do not link all items: a pair of two groups. Weights are not known yet, so the rule
/// is
///    our own and grows one star: the two groups that are largest together, of their pairs the one that holds
///    the item with the most answers, then the other with the fewest, then item order.
/// 3. The pair whose answer lowers the summed variance of the weights most: a locally A-optimal step
/// (Chernoff
///    1953; one at a time, Fedorov 1972; both from memory). Equal values, to 1e-9 of the largest: fewer
///    answers of the two items together, then item order. Where the groups cannot be linked (all such pairs
///    skipped), the weights within each group are meant.
///
/// `answered` holds what is known of the set, agreed answers included. Skipped pairs are never asked. Takes
/// O(n^3), a few milliseconds for 100 items.
std::optional<PairMatrix::Pair> next_question(const PairMatrix& answered, std::optional<std::size_t> star,
                                              const std::vector<PairMatrix::Pair>& skipped);

struct QuestionsNeeded {
    std::size_t to_connect = 0; ///< Fewest answers until the set has weights.
    std::size_t to_firm_up = 0; ///< Answers, those included, until the weights stand firm.
};

/// How many more answers a set needs. To firm it up is our own rule: 2(n-1) pairs judged, every item in four
/// on average, or all where there are fewer. In the simulation that the order of questions was chosen by
/// (noise e^.4 on each answer), the weights were then off by about 40 % of what a star alone leaves (n = 6
/// and 9), and later answers each gained little.
QuestionsNeeded questions_needed(const PairMatrix& answered);

} // namespace steelyard
