#include "shell/painter/collect.hpp"

#include <algorithm>
#include <cmath>
#include <cstddef>

#include "shell/painter/blend.hpp"
#include "shell/painter/sample.hpp"

namespace steelyard::painting {
namespace {

/// Device pixels to positions. What is not a number goes far out, where nothing is drawn.
int position_of(double pixels) {
    const double scaled = pixels * one_pixel;
    if (!(scaled > -farthest)) return -farthest;
    if (scaled > farthest) return farthest;
    // The offset makes it positive, where cutting off is rounding down.
    return static_cast<int>(scaled + farthest + 0.5) - farthest;
}

bool same_texel(const Corner& a, const Corner& b) {
    return a.u == b.u && a.v == b.v;
}

std::int64_t turn(const Corner& a, const Corner& b, const Corner& c) {
    return std::int64_t{b.x - a.x} * (c.y - a.y) - std::int64_t{b.y - a.y} * (c.x - a.x);
}

/// How far a glyph is moved so that its texels lie on pixels. Letters of one line differ by whole pixels but
/// for rounding errors: the small addend keeps a line at half a pixel from falling apart.
int whole_shift(double offset) {
    return static_cast<int>(std::floor(offset + 0.5 + 1.0 / 64));
}

/// A quad whose sides are level and upright, in the order ImGui's PrimRect and text use: a upper left, b
/// upper right, c, d.
struct Quad {
    const Corner& a;
    const Corner& b;
    const Corner& c;
    const Corner& d;

    bool upright() const { return a.x == d.x && b.x == c.x && a.y == b.y && c.y == d.y; }
    bool one_colour() const { return a.colour == b.colour && a.colour == c.colour && a.colour == d.colour; }
    bool one_texel() const { return same_texel(a, b) && same_texel(a, c) && same_texel(a, d); }
};

class Collector {
public:
    Collector(const Atlas& atlas, const PixelRect& screen, Scene& scene)
        : atlas_(atlas), screen_(screen), scene_(scene) {}

    void take_list(const ImDrawList& list, const ImDrawData& data) {
        place_corners(list, data);
        for (const ImDrawCmd& command : list.CmdBuffer) {
            if (command.UserCallback != nullptr || command.ElemCount < 3) continue;
            clip_ = clip_of(command, data);
            if (is_empty(clip_)) continue;
            placed_ = corners_.data() + command.VtxOffset;
            take_triangles(list.IdxBuffer.Data + command.IdxOffset, static_cast<int>(command.ElemCount));
        }
    }

private:
    void place_corners(const ImDrawList& list, const ImDrawData& data) {
        corners_.resize(static_cast<std::size_t>(list.VtxBuffer.Size));
        const double scale_x = data.FramebufferScale.x;
        const double scale_y = data.FramebufferScale.y;
        const double origin_x = data.DisplayPos.x;
        const double origin_y = data.DisplayPos.y;
        const auto atlas_width = static_cast<float>(atlas_.width);
        const auto atlas_height = static_cast<float>(atlas_.height);
        Corner* out = corners_.data();
        for (const ImDrawVert& vertex : list.VtxBuffer) {
            out->x = position_of((vertex.pos.x - origin_x) * scale_x);
            out->y = position_of((vertex.pos.y - origin_y) * scale_y);
            out->colour = vertex.col;
            out->u = vertex.uv.x * atlas_width;
            out->v = vertex.uv.y * atlas_height;
            ++out;
        }
    }

    PixelRect clip_of(const ImDrawCmd& command, const ImDrawData& data) const {
        const auto across = [&](float x) {
            return first_pixel(position_of((double{x} - data.DisplayPos.x) * data.FramebufferScale.x));
        };
        const auto down = [&](float y) {
            return first_pixel(position_of((double{y} - data.DisplayPos.y) * data.FramebufferScale.y));
        };
        const ImVec4& clip = command.ClipRect;
        return overlap(screen_, {across(clip.x), down(clip.y), across(clip.z), down(clip.w)});
    }

    void take_triangles(const ImDrawIdx* index, int count) {
        int at = 0;
        while (at + 3 <= count) {
            if (at + 6 <= count && take_quad(index + at))
                at += 6;
            else
                at += take_fan(index + at, count - at);
        }
    }

    /// Two triangles that make a rectangle or a letter; false where they do not.
    bool take_quad(const ImDrawIdx* index) {
        if (index[3] != index[0] || index[4] != index[2]) return false;
        const Quad quad{placed_[index[0]], placed_[index[1]], placed_[index[2]], placed_[index[5]]};
        if (!quad.upright() || !quad.one_colour()) return false;
        if (quad.one_texel()) {
            take_rectangle(quad);
            return true;
        }
        return take_glyph(quad);
    }

    void take_rectangle(const Quad& quad) {
        const Colour colour = seen_colour(quad.a);
        if (alpha_of(colour) == 0) return;
        Primitive made;
        made.kind = Kind::rectangle;
        made.colour = colour;
        made.bounds = {first_pixel(std::min(quad.a.x, quad.c.x)), first_pixel(std::min(quad.a.y, quad.c.y)),
                       first_pixel(std::max(quad.a.x, quad.c.x)), first_pixel(std::max(quad.a.y, quad.c.y))};
        add(made);
    }

    /// A quad with as many texels as pixels, which is how letters come. False where it is not.
    bool take_glyph(const Quad& quad) {
        const Corner& from = quad.a;
        const Corner& to = quad.c;
        if (from.u != quad.d.u || to.u != quad.b.u || from.v != quad.b.v || to.v != quad.d.v) return false;
        const double x = from.x / double{one_pixel} - double{from.u};
        const double y = from.y / double{one_pixel} - double{from.v};
        const double stretch_x = to.x / double{one_pixel} - double{to.u} - x;
        const double stretch_y = to.y / double{one_pixel} - double{to.v} - y;
        // Corners are rounded to 1/256 pixel, texels by less; a stretch that shows is far above.
        constexpr double tolerance = 1.0 / 32;
        if (!(std::fabs(stretch_x) < tolerance && std::fabs(stretch_y) < tolerance)) return false;
        if (to.u <= from.u || to.v <= from.v || from.u < 0 || from.v < 0 ||
            to.u > static_cast<float>(atlas_.width) || to.v > static_cast<float>(atlas_.height))
            return false;
        if (alpha_of(from.colour) == 0) return true;
        const int shift_x = whole_shift(x);
        const int shift_y = whole_shift(y);
        Primitive made;
        made.kind = Kind::glyph;
        made.colour = from.colour;
        made.bounds = overlap(clip_, {first_texel(from.u) + shift_x, first_texel(from.v) + shift_y,
                                      first_texel(to.u) + shift_x, first_texel(to.v) + shift_y});
        made.source_x = made.bounds.left - shift_x;
        made.source_y = made.bounds.top - shift_y;
        made.hash = mixed(made.colour, pair_of(made.source_x, made.source_y));
        add(made);
        return true;
    }

    /// The first texel whose centre is not before a place. Letters have whole places but for a rounding
    /// error.
    static int first_texel(float place) {
        const float nearest = std::floor(place + 0.5F);
        if (std::fabs(place - nearest) < 1.0F / 64) return static_cast<int>(nearest);
        return static_cast<int>(std::ceil(place - 0.5F));
    }

    /// Triangles around one corner, in one colour: how ImGui fills convex shapes. Returns how many indices it
    /// took; a single triangle is taken too.
    int take_fan(const ImDrawIdx* index, int count) {
        const Corner& centre = placed_[index[0]];
        const auto alike = [&](const Corner& other) {
            return other.colour == centre.colour && same_texel(other, centre);
        };
        if (!alike(placed_[index[1]]) || !alike(placed_[index[2]])) {
            take_triangle(index);
            return 3;
        }
        fan_.assign({centre, placed_[index[1]], placed_[index[2]]});
        int taken = 3;
        while (taken + 3 <= count && index[taken] == index[0] && index[taken + 1] == index[taken - 1] &&
               alike(placed_[index[taken + 2]])) {
            fan_.push_back(placed_[index[taken + 2]]);
            taken += 3;
        }
        const Colour colour = seen_colour(centre);
        if (alpha_of(colour) == 0) return taken;
        if (meets_rows_once(fan_)) {
            add_corners(Kind::polygon, colour, fan_.data(), static_cast<int>(fan_.size()));
        } else {
            for (std::size_t i = 2; i < fan_.size(); ++i) {
                const Corner triangle[] = {fan_[0], fan_[i - 1], fan_[i]};
                add_corners(Kind::polygon, colour, triangle, 3);
            }
        }
        return taken;
    }

    /// True if the fan's triangles lie side by side and the whole goes down once and up once: then each row
    /// meets it in one span, and filling it at once is the same as filling the triangles one by one.
    static bool meets_rows_once(const std::vector<Corner>& fan) {
        if (fan.size() == 3) return true;
        bool left = false;
        bool right = false;
        for (std::size_t i = 2; i < fan.size(); ++i) {
            const std::int64_t area = turn(fan[0], fan[i - 1], fan[i]);
            left = left || area < 0;
            right = right || area > 0;
        }
        if (left && right) return false;
        int changes = 0;
        int direction = 0;
        int first_direction = 0;
        for (std::size_t i = 0; i < fan.size(); ++i) {
            const int drop = fan[(i + 1) % fan.size()].y - fan[i].y;
            if (drop == 0) continue;
            const int sign = drop > 0 ? 1 : -1;
            if (direction == 0)
                first_direction = sign;
            else if (sign != direction)
                ++changes;
            direction = sign;
        }
        return changes + (direction != first_direction ? 1 : 0) <= 2;
    }

    /// A triangle whose corners differ in colour or texel.
    void take_triangle(const ImDrawIdx* index) {
        Corner corners[] = {placed_[index[0]], placed_[index[1]], placed_[index[2]]};
        if (turn(corners[0], corners[1], corners[2]) == 0) return;
        if (!same_texel(corners[0], corners[1]) || !same_texel(corners[0], corners[2])) {
            add_corners(Kind::textured, 0, corners, 3);
            return;
        }
        for (Corner& corner : corners) corner.colour = seen_colour(corner);
        const Colour differing =
            (corners[0].colour ^ corners[1].colour) | (corners[0].colour ^ corners[2].colour);
        if ((corners[0].colour | corners[1].colour | corners[2].colour) >> 24 == 0) return;
        const bool alpha_only = (differing & 0xFFFFFF) == 0;
        add_corners(alpha_only ? Kind::shaded : Kind::blended, corners[0].colour, corners, 3);
    }

    void add_corners(Kind kind, Colour colour, const Corner* corners, int count) {
        Primitive made;
        made.kind = kind;
        made.colour = colour;
        made.first_corner = static_cast<int>(scene_.corners.size());
        made.corner_count = count;
        std::uint64_t hash = mixed(colour, static_cast<std::uint64_t>(count));
        PixelRect reach{corners[0].x, corners[0].y, corners[0].x, corners[0].y};
        for (int i = 0; i < count; ++i) {
            const Corner& corner = corners[i];
            reach.left = std::min(reach.left, corner.x);
            reach.right = std::max(reach.right, corner.x);
            reach.top = std::min(reach.top, corner.y);
            reach.bottom = std::max(reach.bottom, corner.y);
            hash = mixed(hash, pair_of(corner.x, corner.y));
            if (kind != Kind::polygon) hash = mixed(hash, corner.colour);
            if (kind == Kind::textured)
                hash = mixed(mixed(hash, static_cast<std::uint64_t>(texel_place(corner.u))),
                             static_cast<std::uint64_t>(texel_place(corner.v)));
        }
        made.hash = hash;
        made.bounds = {first_pixel(reach.left), first_pixel(reach.top), first_pixel(reach.right),
                       first_pixel(reach.bottom)};
        if (add(made)) scene_.corners.insert(scene_.corners.end(), corners, corners + count);
    }

    /// Clips and keeps it, unless nothing is left of it.
    bool add(Primitive made) {
        made.bounds = overlap(made.bounds, clip_);
        if (is_empty(made.bounds)) return false;
        std::uint64_t hash = mixed(made.hash, (static_cast<std::uint64_t>(made.kind) << 32) | made.colour);
        hash = mixed(hash, pair_of(made.bounds.left, made.bounds.top));
        made.hash = mixed(hash, pair_of(made.bounds.right, made.bounds.bottom));
        scene_.primitives.push_back(made);
        return true;
    }

    /// A corner's colour, seen through the atlas at its texel: ImGui's plain shapes all use one white texel.
    Colour seen_colour(const Corner& corner) {
        if (corner.u != white_u_ || corner.v != white_v_) {
            white_u_ = corner.u;
            white_v_ = corner.v;
            white_ = sample(atlas_, texel_place(corner.u), texel_place(corner.v));
        }
        return with_alpha(corner.colour, times255(alpha_of(corner.colour), white_));
    }

    const Atlas& atlas_;
    PixelRect screen_;
    Scene& scene_;
    PixelRect clip_;
    std::vector<Corner> corners_; // of the list at hand, all of them
    const Corner* placed_ = nullptr;
    std::vector<Corner> fan_;
    float white_u_ = -1;
    float white_v_ = -1;
    Colour white_ = 255;
};

} // namespace

void collect(const ImDrawData& data, const Atlas& atlas, int width, int height, Scene& scene) {
    scene.primitives.clear();
    scene.corners.clear();
    Collector collector(atlas, {0, 0, width, height}, scene);
    for (const ImDrawList* list : data.CmdLists) collector.take_list(*list, data);
}

} // namespace steelyard::painting
