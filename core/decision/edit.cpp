#include <array>
#include <string_view>

#include "core/decision/edit.hpp"
#include "core/decision/lookup.hpp"
#include "core/decision/number_text.hpp"

namespace steelyard {
namespace {

constexpr std::string_view noun(const Option*) {
    return "option";
}
constexpr std::string_view noun(const Person*) {
    return "person";
}
constexpr std::string_view noun(const Requirement*) {
    return "must";
}

std::string old_name(const Decision& d, const Option*, const Id& id) {
    return option_name(d, id);
}
std::string old_name(const Decision& d, const Person*, const Id& id) {
    return person_name(d, id);
}
std::string old_name(const Decision& d, const Requirement*, const Id& id) {
    return requirement_name(d, id);
}

std::string quoted(const std::string& name) {
    return "\"" + name + "\"";
}

template<class T>
std::string shown(const T& named) {
    return quoted(named.name.empty() ? named.id : named.name);
}

/// A ratio as people say it: 3, or 1/3.
std::string ratio_text(double ratio) {
    return ratio < 1 ? "1/" + shortest_number(1 / ratio) : shortest_number(ratio);
}

struct Describer {
    const Decision& d;

    std::string operator()(const SetHeading& e) const {
        static constexpr std::array<std::string_view, 5> names{"title", "question", "author",
                                                               "date to decide by", "notes"};
        return "Changed the " + std::string(names[static_cast<std::size_t>(e.heading)]);
    }
    template<class T>
    std::string operator()(const Add<T>& e) const {
        return "Added " + std::string(noun(&e.value)) + " " + shown(e.value);
    }
    template<class T>
    std::string operator()(const Change<T>& e) const {
        const std::string before = quoted(old_name(d, &e.value, e.value.id));
        const std::string what(noun(&e.value));
        if (before != shown(e.value)) return "Renamed " + what + " " + before + " to " + shown(e.value);
        return "Changed " + what + " " + before;
    }
    template<class T>
    std::string operator()(const Move<T>& e) const {
        constexpr T* type = nullptr;
        return "Moved " + std::string(noun(type)) + " " + quoted(old_name(d, type, e.id));
    }
    template<class T>
    std::string operator()(const Remove<T>& e) const {
        constexpr T* type = nullptr;
        return "Removed " + std::string(noun(type)) + " " + quoted(old_name(d, type, e.id));
    }
    std::string operator()(const AddNode& e) const { return "Added criterion " + shown(e.node); }
    std::string operator()(const ChangeNode& e) const {
        const std::string before = quoted(node_name(d, e.node.id));
        if (before != shown(e.node)) return "Renamed criterion " + before + " to " + shown(e.node);
        return "Changed criterion " + before;
    }
    std::string operator()(const MoveNode& e) const {
        return "Moved criterion " + quoted(node_name(d, e.node));
    }
    std::string operator()(const RemoveNode& e) const {
        return "Removed criterion " + quoted(node_name(d, e.node));
    }
    std::string operator()(const Enter<Judgment>& e) const {
        const Judgment& j = e.entry;
        return "Judged " + pair(j.set, j.a, j.b) + ": " + ratio_text(j.ratio) + by(j.by);
    }
    std::string operator()(const ClearJudgment& e) const {
        return "Took back the judgment of " + pair(e.set, e.a, e.b) + by(e.by);
    }
    std::string operator()(const Enter<PointsEntry>& e) const {
        return "Shared out points in " + quoted(node_name(d, e.entry.set)) + by(e.entry.by);
    }
    std::string operator()(const ClearPoints& e) const {
        return "Took back the points in " + quoted(node_name(d, e.set)) + by(e.by);
    }
    std::string operator()(const Enter<Finished>& e) const {
        return "Finished " + quoted(node_name(d, e.entry.set)) + by(e.entry.by);
    }
    std::string operator()(const ReopenSet& e) const {
        return "Reopened " + quoted(node_name(d, e.set)) + by(e.by);
    }
    std::string operator()(const Enter<Figure>& e) const {
        return "Entered figure " + place(e.entry) +
               (e.entry.value ? ": " + shortest_number(*e.entry.value) : " as open");
    }
    std::string operator()(const Enter<Cost>& e) const {
        return "Entered cost " + place(e.entry) + ", " + e.entry.line;
    }
    std::string operator()(const Enter<GradeEntry>& e) const {
        return "Graded " + place(e.entry) + by(e.entry.by);
    }
    std::string operator()(const Enter<Check>& e) const {
        return "Checked " + quoted(requirement_name(d, e.entry.requirement)) + " of " +
               quoted(option_name(d, e.entry.option));
    }
    std::string operator()(const ChangeSettings&) const { return "Changed the settings"; }

private:
    std::string pair(const Id& set, const Id& a, const Id& b) const {
        return quoted(item_name(d, set, a)) + " against " + quoted(item_name(d, set, b));
    }
    std::string by(const Id& person) const {
        return person.empty() ? "" : " (" + person_name(d, person) + ")";
    }
    template<class T>
    std::string place(const T& entry) const {
        return quoted(node_name(d, entry.criterion)) + " of " + quoted(option_name(d, entry.option));
    }
};

} // namespace

std::string describe(const Edit& edit, const Decision& before) {
    return std::visit(Describer{before}, edit);
}

} // namespace steelyard
