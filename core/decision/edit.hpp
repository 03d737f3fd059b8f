#pragma once

#include <cstddef>
#include <limits>
#include <string>
#include <variant>

#include "core/decision/decision.hpp"

/// Edits: small values that name what changes. They are applied by core/decision/apply.hpp and kept by
/// History.
namespace steelyard {

/// Stands for "at the end" where a place in a list is asked for.
inline constexpr std::size_t at_end = std::numeric_limits<std::size_t>::max();

enum class Heading { title, question, author, decide_by, notes };

struct SetHeading {
    Heading heading = Heading::title;
    std::string text;
};

/// Edits of options, people and requirements, which are plain lists.
template<class T>
struct Add {
    T value;
    std::size_t at = at_end;
};
template<class T>
struct Change {
    T value; ///< Replaces the one with the same id.
};
template<class T>
struct Move {
    Id id;
    std::size_t to = at_end; ///< Its index afterwards.
};
template<class T>
struct Remove {
    Id id;
};

/// Puts a criterion, with all below it, under another. A leaf that gets its first child stops being rated
/// itself.
struct AddNode {
    Id parent;
    Node node;
    std::size_t at = at_end;
};
/// Changes everything of a criterion but its children.
struct ChangeNode {
    Node node;
};
struct MoveNode {
    Id node;
    Id parent;
    std::size_t at = at_end; ///< Its index among the new siblings afterwards.
};
struct RemoveNode {
    Id node;
};

/// Takes back every judgment of a pair by one person, or the agreed ones where `by` is empty.
struct ClearJudgment {
    Id set;
    Id by;
    Id a;
    Id b;
};
struct ClearPoints {
    Id set;
    Id by;
};
struct ReopenSet {
    Id set;
    Id by;
};

/// An entry added after the others; it stands from now on, the earlier ones of its place stay as history.
template<class T>
struct Enter {
    T entry;
};

struct ChangeSettings {
    Settings settings;
};

using Edit =
    std::variant<SetHeading, Add<Option>, Change<Option>, Move<Option>, Remove<Option>, Add<Person>,
                 Change<Person>, Move<Person>, Remove<Person>, Add<Requirement>, Change<Requirement>,
                 Move<Requirement>, Remove<Requirement>, AddNode, ChangeNode, MoveNode, RemoveNode,
                 Enter<Judgment>, ClearJudgment, Enter<PointsEntry>, ClearPoints, Enter<Finished>, ReopenSet,
                 Enter<Figure>, Enter<Cost>, Enter<GradeEntry>, Enter<Check>, ChangeSettings>;

/// What an edit does, for the log and for undo: "Renamed option A to B". `before`: the decision it is applied
/// to.
std::string describe(const Edit& edit, const Decision& before);

} // namespace steelyard
