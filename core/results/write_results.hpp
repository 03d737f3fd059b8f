#pragma once

#include <string>

#include "core/decision/decision.hpp"
#include "core/results/results.hpp"

namespace steelyard {

/// The results file: UTF-8 JSON, indented, ending with a newline. `decision` is the one the results were
/// solved from. What was not added to the results (corrections) is absent.
std::string write_results(const Decision& decision, const Results& results);

} // namespace steelyard
