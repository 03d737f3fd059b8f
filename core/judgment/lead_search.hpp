#pragma once

#include <cstddef>
#include <memory>
#include <vector>

#include "core/judgment/lead.hpp"
#include "core/judgment/open_set.hpp"

namespace steelyard {

enum class LeadState {
    searching,
    kept,   ///< Proven: every lead stays above 1e-9 whatever the answers are.
    lost,   ///< Found: answers with which a lead falls below -1e-9.
    unknown ///< Neither.
};

/// Whether any answers in their ranges can turn a lead: a search in slices of about a millisecond.
///
/// 1. Bounds over all answers: for geometric means exact where every open pair gets answered (least_sum); for
///    eigenvectors by bounds on the ratios of weights (ratio_bounds.hpp). Leads proven here are done with.
/// 2. 400 corner and random answers, then coordinate search from the best of each lead and, for eigenvectors,
///    from the answers that turn the lead of the geometric means.
/// 3. Branching: the box of least bound is halved along its widest range, up to 2000 boxes.
///
/// Where pairs stay missing under the eigenvector, their completed values are unknowns too: a box holds
/// ranges for them that the condition of the optimal completion (v_i a_ij w_j = v_j a_ji w_i) narrows.
/// Averaged columns are searched only, never proven.
///
/// The answers meant are complete ones. An answer left out counts as the ratio that the others imply; where
/// that lies outside the range, what is proven does not speak of it.
class LeadSearch {
public:
    LeadSearch(OpenSet set, std::vector<Lead> leads);
    ~LeadSearch();
    LeadSearch(LeadSearch&&) noexcept;
    LeadSearch& operator=(LeadSearch&&) noexcept;

    /// One slice; true while there is more to do.
    bool step();

    /// 0 to 1, never falling.
    double progress() const;
    LeadState state() const;

    /// Where lost: the answers, and which lead they turn.
    const std::vector<double>& answers() const;
    std::size_t lost_lead() const;

    /// How many boxes were looked into.
    std::size_t boxes() const;

private:
    struct Work;
    std::unique_ptr<Work> work_;
};

} // namespace steelyard
