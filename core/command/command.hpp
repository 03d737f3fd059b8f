#pragma once

#include <iosfwd>

namespace steelyard {

/// Exit codes of the command; there is no other.
enum ExitCode : int { done = 0, refused = 1, wrong_usage = 2, cannot_write = 3 };

/// Runs the command line. "-" as FILE is `in`; answers go to `out`, reasons to `err`. Returns an exit code.
int run_command(int argc, const char* const* argv, std::istream& in, std::ostream& out, std::ostream& err);

} // namespace steelyard
