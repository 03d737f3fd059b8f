#pragma once

#include <optional>
#include <string>
#include <string_view>

#include "shell/ui.hpp"

namespace steelyard {

/// What a slider shows.
struct SliderState {
    double value = 0;
    double most = 100;           ///< Its right end; the left one is 0.
    std::optional<double> limit; ///< It goes no further than this, which is marked.
    std::optional<double> other; ///< Drawn as a hollow mark beside: a mean of several.
    bool set = true;             ///< Somebody gave the value; else it is only where a hand would begin.
    bool enabled = true;
};

struct SliderAnswer {
    std::optional<double> preview; ///< While it is dragged: where it is.
    std::optional<double> value;   ///< The gesture ended, or a key was pressed: the new value.
    bool grabbed = false;          ///< A drag began in this frame.
};

/// A weight on a graduated bar. By mouse or touch: drag it, or press where it shall go; whole numbers, with
/// Shift tenths. By keys while it has the focus: arrows 1, with Shift 0.1, Page Up and Page Down 10, Home,
/// End.
SliderAnswer slider(Ui& ui, std::string_view id, std::string_view label, const SliderState& state,
                    const Box& box);

} // namespace steelyard
