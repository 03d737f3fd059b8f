#pragma once

#include <cstddef>
#include <optional>
#include <vector>

#include "core/judgment/lead.hpp"
#include "core/judgment/open_set.hpp"
#include "core/judgment/ratio_bounds.hpp"

namespace steelyard {

/// Both leads and found answers keep this distance from 0: scores closer than that share a rank.
inline constexpr double lead_margin = 1e-9;

/// A box of answers and what is proven over it.
struct LeadBox {
    std::vector<double> low; ///< Logarithms: of the answers, then of the values that the sets complete.
    std::vector<double> high;
    struct Ratios {
        Grid right; ///< Upper bounds of w_i / w_j.
        Grid left;  ///< Of v_i / v_j; only where pairs stay missing.
    };
    std::vector<Ratios> judges;     ///< Of the judges that move; eigenvectors only.
    std::vector<std::size_t> leads; ///< Those not proven over this box.
    double bound = 0;               ///< No lead of these, as a form (lead_form), is less.
};

/// Lower bounds of leads over boxes of answers.
class LeadBounds {
public:
    /// Both must outlive this. Not for averaged columns.
    LeadBounds(const OpenSet& set, const std::vector<Lead>& leads);

    /// All answers in their ranges, and what of these leads is not proven over them.
    LeadBox whole(std::vector<std::size_t> leads);

    /// The two halves of a box, cut where its range is widest, their bounds still those of the whole; none
    /// where it is too small to cut.
    std::vector<LeadBox> halves(const LeadBox& box) const;

    /// Tightens a box's bounds and takes away the leads that are proven over it: all, where no answers of the
    /// box can be.
    void bound(LeadBox& box);

    /// Whether the bound of this lead is the least value itself, so that cutting boxes gains nothing.
    bool exact(std::size_t lead) const;

    /// Answers at which leads were found least by `whole`; geometric means only.
    const std::vector<std::vector<double>>& least_at() const { return least_at_; }

    /// Rough count of operations since the last call.
    double take_cost();

private:
    struct Completed { ///< A pair that stays missing and the place of its value in a box.
        std::size_t judge, i, j, at;
    };

    bool narrow(LeadBox& box, std::size_t judge, bool first, double& gain);
    EntryBounds entries(const LeadBox& box, std::size_t judge) const;
    bool narrow_completed(LeadBox& box, std::size_t judge) const;
    void prove(LeadBox& box);
    double lower(const LeadBox& box, std::size_t lead, const Grid& combined);
    double lower_form(const LeadBox& box, const std::vector<double>& form, const Grid& combined);
    double lower_by_logs(const LeadBox& box, const std::vector<double>& form);
    Grid combined_ratios(const LeadBox& box) const;

    const OpenSet& set_;
    const std::vector<Lead>& leads_;
    std::vector<AffineLogs> logs_;       ///< Of each moving judge's geometric means.
    std::optional<AffineLogs> together_; ///< Of the combined weights, where they are of this kind.
    std::vector<Completed> completed_;
    std::vector<double> weight_of_; ///< How much an entry's logarithm moves with each place of a box.
    std::vector<std::vector<double>> least_at_;
    bool at_whole_ = false;
    bool too_many_orders_ = false;
    double cost_ = 0;
};

} // namespace steelyard
