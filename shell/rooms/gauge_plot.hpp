#pragma once

#include <functional>
#include <optional>
#include <string>
#include <vector>

#include "shell/ui.hpp"

namespace steelyard::gauge {

/// An option on the axis of a plot.
struct PlotMark {
    std::size_t index = 0; ///< Its place in the decision: letter and colour.
    double figure = 0;
    std::optional<double> low;
    std::optional<double> high;
    bool in_play = true;
    bool chosen = false;
};

/// A figure with the options that have it, and what it is worth.
struct Plot {
    std::string name; ///< For the ledger: what the picture shows, in words.
    std::function<std::optional<double>(double)>
        worth;                   ///< 0 to 1; none where a figure has none. Empty: an axis only.
    std::vector<double> anchors; ///< Where the curve bends; handles stand there.
    std::vector<double> limits;  ///< Limits of a must, drawn across.
    std::vector<PlotMark> marks;
};

/// The figures at the two ends of the axis, with some room beside what is drawn. `low` < `high`.
struct Span {
    double low = 0;
    double high = 1;
};
Span span_of(const Plot& plot);

/// Where marks of a width are put along a line so that none covers another and each is near where it belongs,
/// in the same order as `wanted` (middles). None where they do not fit.
std::optional<std::vector<float>> spread(const std::vector<float>& wanted, float width, float left,
                                         float right);

void draw_plot(Ui& ui, const Plot& plot, const Box& box);

} // namespace steelyard::gauge
