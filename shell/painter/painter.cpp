#include "shell/painter/painter.hpp"

#include <algorithm>

#include "shell/painter/collect.hpp"
#include "shell/painter/draw.hpp"
#include "shell/painter/tiles.hpp"

namespace steelyard {

struct Painter::State {
    painting::Atlas atlas;
    painting::Scene scene;
    painting::Tiles tiles;
    std::vector<std::uint32_t> pixels;
    std::vector<PixelRect> changed;
    int width = 0;
    int height = 0;
};

Painter::Painter() : state_(std::make_unique<State>()) {}
Painter::~Painter() = default;

void Painter::set_atlas(const unsigned char* alpha, int width, int height) {
    const auto size = static_cast<std::ptrdiff_t>(width) * height;
    state_->atlas.alpha.assign(alpha, alpha + size);
    state_->atlas.width = width;
    state_->atlas.height = height;
    // The same places in the atlas may hold other letters now.
    state_->tiles.forget();
}

const std::vector<PixelRect>& Painter::paint(const ImDrawData& data, int width, int height,
                                             std::uint32_t background) {
    State& state = *state_;
    state.width = std::max(width, 0);
    state.height = std::max(height, 0);
    state.pixels.resize(static_cast<std::size_t>(state.width) * static_cast<std::size_t>(state.height));
    background = painting::with_alpha(background, 255);

    painting::collect(data, state.atlas, state.width, state.height, state.scene);
    state.tiles.resize(state.width, state.height);
    state.tiles.take(state.scene, background);

    const painting::Canvas canvas{state.pixels.data(), state.width};
    const std::vector<int>& changed = state.tiles.find_changed();
    for (const int tile : changed) {
        const PixelRect area = state.tiles.area(tile);
        painting::fill(canvas, area, state.tiles.ground(tile));
        for (const int index : state.tiles.primitives(tile)) {
            const painting::Primitive& primitive = state.scene.primitives[static_cast<std::size_t>(index)];
            painting::draw(canvas, area, state.scene, primitive, state.atlas);
        }
    }
    state.tiles.join(changed, state.changed);
    return state.changed;
}

const std::vector<std::uint32_t>& Painter::pixels() const {
    return state_->pixels;
}
int Painter::width() const {
    return state_->width;
}
int Painter::height() const {
    return state_->height;
}

} // namespace steelyard
