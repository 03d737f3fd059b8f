#include "shell/ui.hpp"

#include <algorithm>

namespace steelyard {

Box Box::take_top(float height, float gap) {
    const Box taken{x, y, w, std::min(height, h)};
    y += height + gap;
    h = std::max(0.0f, h - height - gap);
    return taken;
}

Box Box::take_bottom(float height, float gap) {
    const float taken_height = std::min(height, h);
    const Box taken{x, y + h - taken_height, w, taken_height};
    h = std::max(0.0f, h - height - gap);
    return taken;
}

Box Box::take_left(float width, float gap) {
    const Box taken{x, y, std::min(width, w), h};
    x += width + gap;
    w = std::max(0.0f, w - width - gap);
    return taken;
}

Box Box::take_right(float width, float gap) {
    const float taken_width = std::min(width, w);
    const Box taken{x + w - taken_width, y, taken_width, h};
    w = std::max(0.0f, w - width - gap);
    return taken;
}

} // namespace steelyard
