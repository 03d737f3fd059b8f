#pragma once

#include <string>
#include <vector>

#include "core/results/results.hpp"

/// Small judged decisions, solved. `more` and `settings` are members in JSON, without a comma at either end.
namespace steelyard::testing {

/// One judgment as JSON; an empty `by` is agreed.
std::string judgment(const std::string& set, const std::string& by, const std::string& a,
                     const std::string& b, const std::string& ratio);

/// The member `judgments` with these.
std::string judgments(const std::vector<std::string>& list);

/// The criteria a, b and c of "goal", one option; three people p1, p2 and p3 of shares 1, 3 and 0.
Results criteria(const std::string& more, const std::string& settings = "",
                 const std::string& weights = "pairs");

/// The given options, judged on one leaf "goal"; p1 of share 1, who abstains on the options given, and p2 of
/// share 3.
Results options(const std::string& option_list, const std::string& more, const std::string& abstains = "");

} // namespace steelyard::testing
