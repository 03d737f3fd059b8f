#pragma once

#include <optional>
#include <vector>

namespace steelyard {

/// Ranks from 1 for the largest value; values within 1e-9 of their neighbour in size share the mean of their
/// places.
std::vector<double> mean_ranks(const std::vector<double>& values);

/// Kendall's coefficient of concordance.
struct KendallW {
    double w = 0;    ///< 0 to 1; 1 where all rank alike.
    double chi2 = 0; ///< J (n - 1) W.
    double p = 1;    ///< Chance of a W as large, were each judge's ranks dealt out at random.
    bool exact =
        false; ///< p counts all deals; otherwise it is the tail of chi2 with n - 1 degrees of freedom.
};

/// How far the judges' rankings agree, corrected for ties. `ranks`: per judge the ranks of the same items,
/// from `mean_ranks`. None for fewer than two judges or items, and where each judge ties all items.
///
/// p is exact for small tables, ties being dealt out as they are: 2 items and up to 60 judges, 3 and 30, 4
/// and 12, 5 and 6, 6 and 3, 7 to 9 and 2.
///
/// Sources: Kendall and Babington Smith, Annals of Mathematical Statistics 10 (1939) 275-287; Kendall, Rank
/// Correlation Methods (1948), for ties; Friedman, Journal of the American Statistical Association 32 (1937)
/// 675-701, for chi2; from memory.
std::optional<KendallW> kendall_w(const std::vector<std::vector<double>>& ranks);

} // namespace steelyard
