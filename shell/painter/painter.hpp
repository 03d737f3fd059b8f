#pragma once

#include <imgui.h>

#include <cstdint>
#include <memory>
#include <vector>

namespace steelyard {

/// A rectangle of device pixels, right and bottom excluded.
struct PixelRect {
    int left = 0;
    int top = 0;
    int right = 0;
    int bottom = 0;
};

/// Turns ImGui draw data into pixels on the CPU. Only tiles whose content differs from the frame before are
/// painted.
class Painter {
public:
    Painter();
    ~Painter();

    /// Takes the font atlas (alpha, 8 bit) of the current context; call after every rebuild of it.
    void set_atlas(const unsigned char* alpha, int width, int height);

    /// Paints a frame of `width` x `height` device pixels on an opaque background. Draw data are in CSS
    /// pixels and scaled by FramebufferScale. Returns what changed; the first frame and a new size change
    /// everything.
    const std::vector<PixelRect>& paint(const ImDrawData& data, int width, int height,
                                        std::uint32_t background);

    /// The picture: RGBA, 8 bit each, opaque, row by row without gaps.
    const std::vector<std::uint32_t>& pixels() const;
    int width() const;
    int height() const;

private:
    struct State;
    std::unique_ptr<State> state_;
};

} // namespace steelyard
