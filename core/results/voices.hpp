#pragma once

#include <optional>

#include "core/decision/decision.hpp"

namespace steelyard {

/// Whose answers make a standing: everybody's by share, agreed ones first, or with one of these changes.
struct Voices {
    /// This person's judgments, points and grades do not count anywhere.
    Id without{};

    /// Where this person's own answers, with the agreed ones, give something (weights of a set, a grade),
    /// they alone count; elsewhere everybody's do.
    Id only{};

    /// As if the room had agreed on this judgment too.
    struct Agreed {
        Id set;
        Id a;
        Id b;
        double ratio = 1;
    };
    std::optional<Agreed> agreed{};
};

} // namespace steelyard
