#pragma once

#include <cstddef>
#include <optional>
#include <vector>

#include "core/decision/decision.hpp"

/// What one option's figure on one leaf does to first place, everything else held.
namespace steelyard {

/// One leaf as the figure of one option moves. Vectors are per option in play.
struct MovingFigure {
    Curve curve;
    Synthesis synthesis = Synthesis::ideal;
    double weight = 0;                         ///< Of the leaf, from the root down.
    std::vector<std::optional<double>> worths; ///< On this leaf (see worth_of); that of `option` is not read.
    std::vector<double> rest;                  ///< What all other leaves add to each score.
    std::size_t option = 0;                    ///< Whose figure moves.
    std::optional<double> at_least; ///< Limits of musts on the figure: beyond them `option` is out,
    std::optional<double> at_most;  ///< the limit itself being met.
    std::vector<double> without;    ///< Scores where `option` is out; its own entry is not read.
};

/// Scores at a figure inside the limits, or beyond them (`option` then has a score of minus infinity). A
/// figure of 0 or less under a proportional curve counts as missing.
std::vector<double> scores_at(const MovingFigure& leaf, double figure);

/// Where first place changes hands.
struct FigureChange {
    double at = 0;
    std::vector<std::size_t> below; ///< First for figures just below `at`; several where they tie.
    std::vector<std::size_t> above;
    bool by_limit = false; ///< A must's limit does it.
};

/// Every figure at which first place changes hands, ascending, exactly: in each piece of the curve the scores
/// are lines in one variable (up to a common positive factor), so first place is the upper envelope of lines.
/// Over all figures; over x > 0 under a proportional curve. Source: elementary; the reduction is our own.
std::vector<FigureChange> first_place_changes(const MovingFigure& leaf);

} // namespace steelyard
