#pragma once

#include <optional>
#include <string>
#include <vector>

#include "shell/widgets/arm.hpp"
#include "shell/widgets/text.hpp"

/// How the arm is drawn. What a hand or a key does to it stands in arm.cpp.
namespace steelyard::arm {

/// Where a ratio stands on the graduation: -1 at the left end, 1 at the right end.
double position_of(double ratio);
double ratio_at(double position);

enum class PoiseLook {
    own,   ///< Brass: the one a hand takes.
    judge, ///< Small and of steel: one of several.
    empty, ///< Dashed: not an answer.
};
/// The beam with its tilt: turns positions on the graduation into points of the page.
struct Beam {
    ImVec2 pivot;
    float half = 0;  ///< Length of one side of the graduation.
    float scale = 1; ///< Of beam and poise.
    ImVec2 along{1, 0};

    /// A place on the beam's middle line, or so far above it.
    ImVec2 at(double position, float above = 0) const {
        const float d = static_cast<float>(position) * half;
        return {pivot.x + along.x * d + along.y * above, pivot.y + along.y * d - along.x * above};
    }
    /// Half of the beam's thickness: it tapers towards the ends.
    float thickness(double position) const;
    /// How high a poise stands over the beam's middle line.
    float poise_height(PoiseLook look = PoiseLook::own) const;
};

/// What is written beside the pole of a poise; those at one place share theirs.
struct Flag {
    double ratio = 1;
    std::string text;
    bool own = false;
};

/// Sizes of all parts in a box, the same for every tilt.
struct Layout {
    Box box;
    ImVec2 pivot;
    float half = 0;
    float scale = 1;
    double steepest = 0; ///< Degrees of tilt at the end of the graduation.
    float drop = 0;      ///< How far an end sinks at most.
    float cord = 0;      ///< From the beam's end to a load.
    float foot = 0;      ///< Of the stand.
    float board = 0;     ///< Width of a load.
    float board_height = 0;
    std::size_t name_lines = 1;
    Font load = Font::strong;  ///< Of a load's name, and of the number over the poise.
    Font names = Font::strong; ///< Of named poises.
    std::vector<Flag> flags;   ///< What is written at the poises, where several judges' stand.
};

Layout lay_out(const ArmState& state, const std::optional<double>& shown, const Box& box);
Beam beam_at(const Layout& layout, double position);

/// Where a load hangs.
Box load_box(const Layout& layout, const Beam& beam, bool right);

void draw_stand(Ui& ui, const Layout& layout, const Beam& beam);
void draw_beam(Ui& ui, const Layout& layout, const Beam& beam);
void draw_load(Ui& ui, const Load& load, const Layout& layout, const Beam& beam, bool right, bool chosen);

void draw_poise(const Ui& ui, const Beam& beam, double position, PoiseLook look);
/// One taken off the beam, with its foot at a place.
void draw_loose_poise(const Ui& ui, ImVec2 foot);

/// The named poises with their poles and names.
void draw_named(Ui& ui, const ArmState& state, const Layout& layout, const Beam& beam);

} // namespace steelyard::arm
