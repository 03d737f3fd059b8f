#pragma once

#include <cstdint>

#include "shell/painter/painter.hpp"

struct ImGuiContext;

namespace steelyard::testing {

/// A made-up screen of cards, text, bars, a chart and a balance, as full as a real one: what painter tests
/// and benchmarks paint. Owns its ImGui context, which is the current one while this lives.
class SampleScreen {
public:
    SampleScreen(int width, int height, float density);
    ~SampleScreen();
    SampleScreen(const SampleScreen&) = delete;
    SampleScreen& operator=(const SampleScreen&) = delete;

    /// Draws a frame, not yet painted. `moved` shifts one small part of it.
    const ImDrawData& draw(int moved = 0);

    void give_atlas(Painter& painter) const;
    int device_width() const;
    int device_height() const;
    static constexpr std::uint32_t background = 0xFFEEF4F6;

private:
    ImGuiContext* context_;
    int width_;
    int height_;
    float density_;
};

} // namespace steelyard::testing
