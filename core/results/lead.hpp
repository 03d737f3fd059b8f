#pragma once

#include <optional>

#include "core/decision/decision.hpp"
#include "core/results/results.hpp"
#include "core/tipping/one_figure.hpp"

namespace steelyard {

/// The figure of one option in play on a leaf rated by figures, ready to be moved. None where the leaf has no
/// curve. `results`: those of `decision`, up to its scores and leaves.
std::optional<MovingFigure> moving_figure(const Decision& decision, const Results& results, const Id& leaf,
                                          const Id& option);

/// The lead in money: how far the figure of the option in first place on the money criterion can worsen
/// before first place changes, a must's limit included, >= 0. None where it cannot, where no money criterion
/// is chosen, or where the option has no figure there.
std::optional<double> lead_in_money(const Decision& decision, const Results& results);

} // namespace steelyard
