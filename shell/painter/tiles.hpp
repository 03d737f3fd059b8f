#pragma once

#include <vector>

#include "shell/painter/scene.hpp"

namespace steelyard::painting {

/// The screen cut into squares. Each keeps which primitives of the frame touch it, and a hash of them by
/// which the next frame sees whether it changed.
class Tiles {
public:
    static constexpr int size = 64;

    /// Forgets the frame before where the size differs.
    void resize(int width, int height);

    /// Hands the scene's primitives to the tiles they touch. An opaque rectangle over a whole tile becomes
    /// its ground, and what lies under it is dropped.
    void take(const Scene& scene, Colour background);

    /// The next look for changes finds every tile changed.
    void forget() { known_ = false; }

    /// The tiles that differ from the frame before, by index.
    const std::vector<int>& find_changed();

    PixelRect area(int tile) const;
    Colour ground(int tile) const { return tiles_[static_cast<std::size_t>(tile)].ground; }
    const std::vector<int>& primitives(int tile) const {
        return tiles_[static_cast<std::size_t>(tile)].primitives;
    }

    /// Joins tiles, given in ascending order, into few rectangles.
    void join(const std::vector<int>& tiles, std::vector<PixelRect>& joined) const;

private:
    struct Tile {
        std::uint64_t hash = 0;
        std::uint64_t hash_before = 0;
        Colour ground = 0;
        std::vector<int> primitives;
    };

    void hand_out(const Scene& scene, int index);

    int width_ = 0;
    int height_ = 0;
    int columns_ = 0;
    int rows_ = 0;
    bool known_ = false;
    std::vector<Tile> tiles_;
    std::vector<int> changed_;
};

} // namespace steelyard::painting
