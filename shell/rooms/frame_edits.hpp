#pragma once

#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "core/decision/decision.hpp"
#include "core/decision/edit.hpp"
#include "shell/rooms/outline.hpp"

/// What the acts of the room Frame are as edits. Nothing here draws.
namespace steelyard {

/// A stem for an id, made of a name: small letters, digits and hyphens, cut after 24 of them. `otherwise`
/// where nothing of the name can be written so.
std::string slug(std::string_view name, const std::string& otherwise);

/// Ids not yet in the decision, made of a name.
Id option_id_for(const Decision& decision, std::string_view name);
Id person_id_for(const Decision& decision, std::string_view name);
Id node_id_for(const Decision& decision, std::string_view name);
Id requirement_id_for(const Decision& decision, std::string_view name);

/// Where a criterion can be moved from where it is: before the one above, behind the one below, under the one
/// above, or out of its group to behind it. None where that leads nowhere or too deep.
enum class Way { up, down, in, out };
std::optional<MoveNode> node_move(const Node& root, const Id& id, Way way);

/// A criterion given another way to rate options. One rated by grades gets three to begin with if it has
/// none.
Node rated_by(Node leaf, RateBy rate);

/// What a must takes its values from.
enum class MustKind { yes_no, own_limit, figures, worth };
MustKind kind_of(const Requirement& requirement);

/// The must made one of another kind, without what only its old kind has. `node`: the criterion it then looks
/// at, where the kind asks for one.
Requirement of_kind(Requirement requirement, MustKind kind, const Id& node);

/// What adding a list does.
struct ListPlan {
    std::vector<Edit> edits; ///< One step. Empty if there is a problem or nothing to add.
    std::string label;
    Id first;                                  ///< The first criterion that is added.
    std::string problem;                       ///< A sentence; empty if the list can be added.
    std::vector<std::string> notes;            ///< Sentences worth reading before.
    std::vector<std::optional<double>> shares; ///< Beside the items: the part of its group a weight gives it.
};

/// Adds the criteria of a list under `parent`. Groups whose weights the list gives are weighed by points,
/// agreed; those of its outermost lines only where nothing stands under `parent` yet. Refused: a tree over 12
/// deep. The outline has no problem.
ListPlan plan_list(const Decision& decision, const Id& parent, const Outline& outline);

} // namespace steelyard
