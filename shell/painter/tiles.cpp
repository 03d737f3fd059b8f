#include "shell/painter/tiles.hpp"

#include <algorithm>

namespace steelyard::painting {
namespace {

/// True if a triangle or polygon with its corners in order round certainly has no pixel centre in the area:
/// an edge has the whole area on its outer side. `turning` is +1 or -1, the side on which its inside lies.
bool passes_by(const Corner* corners, const PixelRect& area, int turning) {
    for (int i = 0; i < 3; ++i) {
        const Corner& from = corners[i];
        const Corner& to = corners[i == 2 ? 0 : i + 1];
        const std::int64_t along_x = std::int64_t{to.x - from.x} * turning;
        const std::int64_t along_y = std::int64_t{to.y - from.y} * turning;
        // The corner of the area that lies farthest in.
        const std::int64_t x = (along_y > 0 ? area.left : area.right) * std::int64_t{one_pixel};
        const std::int64_t y = (along_x > 0 ? area.bottom : area.top) * std::int64_t{one_pixel};
        if (along_x * (y - from.y) - along_y * (x - from.x) < 0) return true;
    }
    return false;
}

int turning(const Corner* c) {
    const std::int64_t area =
        std::int64_t{c[1].x - c[0].x} * (c[2].y - c[0].y) - std::int64_t{c[1].y - c[0].y} * (c[2].x - c[0].x);
    return area > 0 ? 1 : -1;
}

} // namespace

void Tiles::resize(int width, int height) {
    if (width == width_ && height == height_) return;
    width_ = width;
    height_ = height;
    columns_ = (width + size - 1) / size;
    rows_ = (height + size - 1) / size;
    tiles_.clear();
    tiles_.resize(static_cast<std::size_t>(columns_) * static_cast<std::size_t>(rows_));
    known_ = false;
}

PixelRect Tiles::area(int tile) const {
    const int left = tile % columns_ * size;
    const int top = tile / columns_ * size;
    return {left, top, std::min(left + size, width_), std::min(top + size, height_)};
}

void Tiles::take(const Scene& scene, Colour background) {
    for (Tile& tile : tiles_) {
        tile.hash_before = tile.hash;
        tile.ground = background;
        tile.hash = mixed(0, background);
        tile.primitives.clear();
    }
    for (int i = 0; i < static_cast<int>(scene.primitives.size()); ++i) hand_out(scene, i);
}

void Tiles::hand_out(const Scene& scene, int index) {
    const Primitive& primitive = scene.primitives[static_cast<std::size_t>(index)];
    const PixelRect& bounds = primitive.bounds;
    const int first_column = bounds.left / size;
    const int last_column = (bounds.right - 1) / size;
    const int first_row = bounds.top / size;
    const int last_row = (bounds.bottom - 1) / size;
    const bool hides = primitive.kind == Kind::rectangle && alpha_of(primitive.colour) == 255;
    const Corner* corners = scene.corners.data() + primitive.first_corner;
    // A long slanted line has wide bounds and touches few tiles.
    const bool slanted = primitive.corner_count == 3 && first_column != last_column && first_row != last_row;
    const int side = slanted ? turning(corners) : 0;
    for (int row = first_row; row <= last_row; ++row) {
        for (int column = first_column; column <= last_column; ++column) {
            const int at = row * columns_ + column;
            if (slanted && passes_by(corners, area(at), side)) continue;
            Tile& tile = tiles_[static_cast<std::size_t>(at)];
            if (hides && covers(bounds, area(at))) {
                tile.primitives.clear();
                tile.ground = primitive.colour;
                tile.hash = mixed(0, primitive.colour);
            } else {
                tile.primitives.push_back(index);
                tile.hash = mixed(tile.hash, primitive.hash);
            }
        }
    }
}

const std::vector<int>& Tiles::find_changed() {
    changed_.clear();
    for (int i = 0; i < static_cast<int>(tiles_.size()); ++i) {
        const Tile& tile = tiles_[static_cast<std::size_t>(i)];
        if (!known_ || tile.hash != tile.hash_before) changed_.push_back(i);
    }
    known_ = true;
    return changed_;
}

void Tiles::join(const std::vector<int>& tiles, std::vector<PixelRect>& joined) const {
    joined.clear();
    for (std::size_t i = 0; i < tiles.size();) {
        std::size_t end = i + 1;
        while (end < tiles.size() && tiles[end] == tiles[end - 1] + 1 && tiles[end] % columns_ != 0) ++end;
        PixelRect run = area(tiles[i]);
        run.right = area(tiles[end - 1]).right;
        i = end;
        // A run right below an equal one lengthens it.
        const auto above = std::find_if(joined.begin(), joined.end(), [&](const PixelRect& rect) {
            return rect.bottom == run.top && rect.left == run.left && rect.right == run.right;
        });
        if (above != joined.end())
            above->bottom = run.bottom;
        else
            joined.push_back(run);
    }
}

} // namespace steelyard::painting
