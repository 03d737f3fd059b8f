#pragma once

#include <optional>
#include <string>
#include <string_view>

#include "shell/ui.hpp"

namespace steelyard {

/// One load of the arm: what hangs there, and the range that is at stake.
struct Load {
    std::string name;
    std::string range;
};

/// What the arm shows. A ratio says how many times the left load counts as much as the right one.
struct ArmState {
    Load left;
    Load right;
    std::optional<double> ratio; ///< None: not judged yet.
    std::optional<double>
        other;              ///< Drawn as an empty poise: what the other answers say, or a mean of several.
    std::string other_name; ///< What the empty poise is: "the other answers".
    bool enabled = true;
};

struct ArmAnswer {
    std::optional<double> preview; ///< While the poise is dragged: where it is.
    std::optional<double> ratio;   ///< The gesture ended, or a key was pressed: the new answer.
    bool next = false;             ///< Enter: on to the next pair.
    bool skip = false;             ///< S.
};

/// The steelyard: two loads, a pivot, and a poise on a logarithmic graduation from 9 over 1 to 9, notched at
/// the scale's values and free between them, tilting towards what counts more. By mouse or touch: drag the
/// poise, or press where it shall go; near a notch it settles there, with Shift it does not. By keys while no
/// text is typed: 1 to 9, arrows (with Shift a tenth of a step), X for the other side, Enter, S. `label` is
/// what the poise is called.
ArmAnswer draw_arm(Ui& ui, std::string_view id, std::string_view label, const ArmState& state,
                   const Box& box);

/// The next notch from a ratio towards the left load (`steps` > 0) or the right one; a tenth of a step with
/// `fine`.
double stepped_ratio(double ratio, int steps, bool fine);

} // namespace steelyard
