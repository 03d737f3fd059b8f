#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "core/decision/problem.hpp"
#include "core/results/results.hpp"

/// Single answers out of a decision's results. What is not there throws std::logic_error, so that a test
/// cannot pass by looking at nothing.
namespace steelyard::testing {

const SetResult& set_of(const Results& results, const Id& set, const Id& by = {});
double score_of(const Results& results, const Id& option);
int rank_of(const Results& results, const Id& option);
const LeafResult& leaf_of(const Results& results, const Id& leaf);
double local_of(const Results& results, const Id& leaf, const Id& option);
bool missing_on(const Results& results, const Id& leaf, const Id& option);
const MustResult& must_of(const Results& results, const Id& requirement, const Id& option);

/// What is open, one word list each: "judgment goal a b", "figure price o1" and so on.
std::vector<std::string> open_words(const Results& results);

/// The places of the notices with this code.
std::vector<std::string> noticed_at(const Results& results, std::string_view code);

} // namespace steelyard::testing
