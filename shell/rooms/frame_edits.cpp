#include "shell/rooms/frame_edits.hpp"

#include <algorithm>
#include <array>
#include <map>
#include <set>
#include <utility>

#include "core/decision/lookup.hpp"
#include "shell/rooms/room.hpp"

namespace steelyard {
namespace {

constexpr std::size_t longest_slug = 24;
constexpr int deepest_tree = 12; ///< As core/decision/check.cpp has it; the root is 1.

/// The letters U+00C0 to U+00FF as plain ones; an empty text for the two signs among them.
constexpr std::array<std::string_view, 64> plain_letters{
    "a", "a", "a", "a", "ae", "a", "ae", "c", "e", "e", "e", "e", "i",  "i", "i",  "i",
    "d", "n", "o", "o", "o",  "o", "oe", "",  "o", "u", "u", "u", "ue", "y", "th", "ss",
    "a", "a", "a", "a", "ae", "a", "ae", "c", "e", "e", "e", "e", "i",  "i", "i",  "i",
    "d", "n", "o", "o", "o",  "o", "oe", "",  "o", "u", "u", "u", "ue", "y", "th", "y"};

/// What the letter at `i` becomes in an id; empty where it cannot stand there. Moves `i` past it.
std::string plain_letter(std::string_view name, std::size_t& i) {
    const auto c = static_cast<unsigned char>(name[i++]);
    if ((c >= 'a' && c <= 'z') || (c >= '0' && c <= '9')) return std::string(1, static_cast<char>(c));
    if (c >= 'A' && c <= 'Z') return std::string(1, static_cast<char>(c - 'A' + 'a'));
    if (c == 0xC3 && i < name.size()) {
        const auto second = static_cast<unsigned char>(name[i++]);
        if (second >= 0x80 && second < 0xC0) return std::string(plain_letters[second - 0x80]);
    }
    return {};
}

template<class T>
Id id_for(const std::vector<T>& list, std::string_view name, const std::string& otherwise) {
    return fresh_id(slug(name, otherwise), [&](const Id& id) {
        return std::any_of(list.begin(), list.end(), [&](const T& x) { return x.id == id; });
    });
}

int height(const Node& node) {
    int most = 0;
    for (const auto& child : node.children) most = std::max(most, height(child));
    return most + 1;
}

int depth_of(const Node& root, const Id& id) {
    for (const auto& placed : placed_nodes(root)) {
        if (placed.node->id == id) return placed.depth;
    }
    return 0;
}

/// Builds the criteria of a list and the points its weights are.
class ListPlanner {
public:
    ListPlanner(const Decision& decision, const Node& parent, const Outline& outline)
        : parent_(parent), items_(outline.items), parents_(outline_parents(items_)) {
        for (const auto& placed : placed_nodes(decision.criteria)) taken_.insert(placed.node->id);
        plan_.notes = outline.notes;
        plan_.shares.resize(items_.size());
    }

    ListPlan plan(int parent_depth) {
        if (items_.empty()) return std::move(plan_);
        for (const auto& item : items_) {
            if (parent_depth + static_cast<int>(item.depth) + 1 > deepest_tree) {
                plan_.problem = "Line " + std::to_string(item.line) +
                                " would stand more than 12 deep in the tree, counted from the goal.";
                return std::move(plan_);
            }
            ids_.push_back(
                fresh_id(slug(item.name, "criterion"), [&](const Id& id) { return taken_.contains(id); }));
            taken_.insert(ids_.back());
        }
        plan_.first = ids_.front();
        weigh_parent();
        for (std::size_t i = 0; i < items_.size(); ++i) {
            if (parents_[i] == items_.size()) plan_.edits.push_back(AddNode{parent_.id, node_of(i)});
        }
        std::move(points_.begin(), points_.end(), std::back_inserter(plan_.edits));
        plan_.label = items_.size() == 1 ? "Added a criterion from a list"
                                         : "Added " + std::to_string(items_.size()) + " criteria from a list";
        return std::move(plan_);
    }

private:
    std::vector<std::size_t> children_of(std::size_t parent) const {
        std::vector<std::size_t> children;
        for (std::size_t i = 0; i < items_.size(); ++i) {
            if (parents_[i] == parent) children.push_back(i);
        }
        return children;
    }

    void weigh_parent() {
        const auto outermost = children_of(items_.size());
        if (!items_[outermost.front()].weight) return;
        if (!parent_.children.empty()) {
            plan_.notes.push_back("The weights of the outermost lines are left out: other criteria already "
                                  "stand in the same group, and the list says nothing about them.");
            return;
        }
        if (parent_.weights != WeightsBy::points) {
            Node changed = parent_;
            changed.weights = WeightsBy::points;
            plan_.edits.push_back(ChangeNode{std::move(changed)});
        }
        add_points(parent_.id, outermost);
    }

    void add_points(const Id& set, const std::vector<std::size_t>& group) {
        double sum = 0;
        for (const std::size_t i : group) sum += *items_[i].weight;
        PointsEntry entry;
        entry.set = set;
        for (const std::size_t i : group) {
            plan_.shares[i] = *items_[i].weight / sum;
            entry.points.emplace_back(ids_[i], *items_[i].weight);
        }
        points_.push_back(Enter<PointsEntry>{std::move(entry)});
    }

    Node node_of(std::size_t i) {
        Node node;
        node.id = ids_[i];
        node.name = items_[i].name;
        const auto children = children_of(i);
        if (!children.empty() && items_[children.front()].weight) {
            node.weights = WeightsBy::points;
            add_points(node.id, children);
        }
        for (const std::size_t child : children) node.children.push_back(node_of(child));
        return node;
    }

    const Node& parent_;
    const std::vector<OutlineItem>& items_;
    std::vector<std::size_t> parents_;
    std::set<Id> taken_;
    std::vector<Id> ids_;
    std::vector<Edit> points_; ///< Entered last, when all the criteria they name are there.
    ListPlan plan_;
};

} // namespace

std::string slug(std::string_view name, const std::string& otherwise) {
    std::string text;
    for (std::size_t i = 0; i < name.size() && text.size() < longest_slug;) {
        const std::string letter = plain_letter(name, i);
        if (!letter.empty())
            text += letter;
        else if (!text.empty() && text.back() != '-')
            text += '-';
    }
    while (!text.empty() && text.back() == '-') text.pop_back();
    return text.empty() ? otherwise : text;
}

Id option_id_for(const Decision& decision, std::string_view name) {
    return id_for(decision.options, name, "option");
}
Id person_id_for(const Decision& decision, std::string_view name) {
    return id_for(decision.people, name, "person");
}
Id requirement_id_for(const Decision& decision, std::string_view name) {
    return id_for(decision.requirements, name, "must");
}
Id node_id_for(const Decision& decision, std::string_view name) {
    return fresh_id(slug(name, "criterion"),
                    [&](const Id& id) { return find_node(decision.criteria, id) != nullptr; });
}

std::optional<MoveNode> node_move(const Node& root, const Id& id, Way way) {
    const Node* node = find_node(root, id);
    const Node* parent = find_parent(root, id);
    if (node == nullptr || parent == nullptr) return std::nullopt;
    const auto at = static_cast<std::size_t>(node - parent->children.data());
    switch (way) {
    case Way::up:
        if (at > 0) return MoveNode{id, parent->id, at - 1};
        break;
    case Way::down:
        if (at + 1 < parent->children.size()) return MoveNode{id, parent->id, at + 1};
        break;
    case Way::in:
        if (at > 0 && depth_of(root, id) + height(*node) <= deepest_tree)
            return MoveNode{id, parent->children[at - 1].id, at_end};
        break;
    case Way::out:
        if (const Node* above = find_parent(root, parent->id)) {
            const auto after = static_cast<std::size_t>(parent - above->children.data()) + 1;
            return MoveNode{id, above->id, after};
        }
        break;
    }
    return std::nullopt;
}

Node rated_by(Node leaf, RateBy rate) {
    leaf.rate = rate;
    if (rate == RateBy::grade && leaf.grades.empty())
        leaf.grades = {{"good", "good", 1.0}, {"fair", "fair", 0.5}, {"poor", "poor", 0.0}};
    return leaf;
}

MustKind kind_of(const Requirement& requirement) {
    if (requirement.yes_no) return MustKind::yes_no;
    if (!requirement.criterion.empty()) return MustKind::figures;
    return requirement.node.empty() ? MustKind::own_limit : MustKind::worth;
}

Requirement of_kind(Requirement requirement, MustKind kind, const Id& node) {
    if (kind == MustKind::yes_no || kind == MustKind::worth || kind_of(requirement) == MustKind::worth) {
        requirement.at_least.reset();
        requirement.at_most.reset();
    }
    if (kind != MustKind::worth) requirement.min_worth.reset();
    if (kind == MustKind::yes_no || kind == MustKind::worth) requirement.unit.clear();
    requirement.yes_no = kind == MustKind::yes_no;
    requirement.criterion = kind == MustKind::figures ? node : Id{};
    requirement.node = kind == MustKind::worth ? node : Id{};
    return requirement;
}

ListPlan plan_list(const Decision& decision, const Id& parent, const Outline& outline) {
    const Node* node = find_node(decision.criteria, parent);
    if (node == nullptr) node = &decision.criteria;
    return ListPlanner(decision, *node, outline).plan(depth_of(decision.criteria, node->id));
}

} // namespace steelyard
