#pragma once

#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "shell/ui.hpp"

namespace steelyard {

/// One load of the arm: what hangs there, and the range that is at stake.
struct Load {
    std::string name;
    std::string range;
    bool starred = false; ///< Named as mattering most.
};

/// Where one of several judges has put his poise.
struct NamedPoise {
    std::string name;
    double ratio = 1;
};

/// What the arm shows. A ratio says how many times the left load counts as much as the right one.
struct ArmState {
    Load left;
    Load right;
    std::optional<double> ratio;   ///< The poise a hand can take; none: not judged yet.
    std::optional<double> other;   ///< An empty poise: what the other answers say, or a mean of several.
    std::string other_name;        ///< What the empty poise is: "the other answers".
    std::vector<NamedPoise> named; ///< Small poises with their names, for several judges on one arm.
    std::string own_name;          ///< Beside named ones: what the poise a hand can take is, "agreed".
    bool enabled = true;
};

/// What the arm remembers of one pair from frame to frame; the caller keeps it and gives a new one with each
/// pair.
struct ArmMemory {
    bool right_side = false; ///< X was pressed before a digit: the next one counts for the right load.
    std::string typed;       ///< "2." or "1/": a number being typed on, shown by the caller.
    bool grabbed = false;    ///< A press began on the beam.
    bool bring_in = false;   ///< Scroll the arm into sight when it takes the keyboard.
};

struct ArmAnswer {
    std::optional<double> preview; ///< While the poise is dragged: where it is.
    bool off = false;            ///< It is dragged, and held off the beam: letting go takes the answer back.
    std::optional<double> ratio; ///< The gesture ended, or a key was pressed: the new answer.
    bool take_back = false;      ///< Pulled off the beam and let go, or Delete.
    bool next = false;           ///< Enter: on to the next pair.
    bool skip = false;           ///< S.
};

/// The steelyard: two loads hung from a beam, a pivot, and a poise on a logarithmic graduation from 9 over 1
/// to 9, notched at the scale's values and free between them, tilting towards what counts more.
///
/// By mouse or touch: drag the poise, or press where on the beam it shall go; near a notch it settles there,
/// with Shift it does not. Pulled well above or below the beam and let go, it is taken off. A press on a load
/// says that this one counts more. By keys, while the arm has the keyboard: 1 to 9 on the side the poise is
/// on (the left one on a fresh pair), then "." or "/" to type on; X or minus for the other side, before the
/// digit or after it; arrows for a step, with Shift a tenth of one; Enter; S; Delete. `label` is what the
/// poise is called.
ArmAnswer draw_arm(Ui& ui, std::string_view id, std::string_view label, const ArmState& state,
                   ArmMemory& memory, const Box& box);

/// The same without a hand or keys: a picture. `right_side`: the load digits count for elsewhere.
void show_arm(Ui& ui, const ArmState& state, bool right_side, const Box& box);

/// The next notch from a ratio towards the left load (`steps` > 0) or the right one; a tenth of a step with
/// `fine`.
double stepped_ratio(double ratio, int steps, bool fine);

} // namespace steelyard
