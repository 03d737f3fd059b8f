#pragma once

#include <optional>
#include <vector>

#include "core/decision/decision.hpp"

namespace steelyard {

/// Present value of 1 paid at the end of each of `years` years: (1 - (1 + d)^-T)/d, or T at d = 0. d > -1.
/// Standard annuity table: 10 years at 8 % give 6.7101.
double annuity_factor(double discount, int years);

/// Of the costs entered for one option on one leaf those that stand: the last entry of each line, cleared
/// ones left out.
std::vector<const Cost*> standing_costs(const std::vector<const Cost*>& entered);

/// The figure a cost sheet gives for these lines, in the criterion's unit: present value, annuity, or annuity
/// per part. None without lines, or where a line or the result is per part and the sheet has no volume, or
/// where the figure would be beyond a double. Part
/// of life-cycle cost practice (IEC 60300-3-3, ASTM E917, VDMA 34160; from memory).
std::optional<double> cost_sheet_figure(const CostSheet& sheet, const std::vector<const Cost*>& lines);

} // namespace steelyard
