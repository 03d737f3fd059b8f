#include "core/decision/lookup.hpp"

#include <algorithm>

namespace steelyard {
namespace {

template<class T>
const T* find_in(const std::vector<T>& list, const Id& id) {
    const auto found = std::find_if(list.begin(), list.end(), [&](const T& x) { return x.id == id; });
    return found == list.end() ? nullptr : &*found;
}

template<class T>
std::vector<Id> ids_of(const std::vector<T>& list) {
    std::vector<Id> ids;
    for (const auto& x : list) ids.push_back(x.id);
    return ids;
}

template<class T>
std::string shown(const T* named, const Id& id) {
    return named == nullptr || named->name.empty() ? id : named->name;
}

void place(const Node& node, const Node* parent, int depth, const std::string& pointer,
           std::vector<PlacedNode>& out) {
    out.push_back({&node, parent, depth, pointer});
    for (std::size_t i = 0; i < node.children.size(); ++i) {
        place(node.children[i], &node, depth + 1, pointer + "/children/" + std::to_string(i), out);
    }
}

} // namespace

const Person* find_person(const Decision& decision, const Id& id) {
    return find_in(decision.people, id);
}
const Option* find_option(const Decision& decision, const Id& id) {
    return find_in(decision.options, id);
}
const Requirement* find_requirement(const Decision& decision, const Id& id) {
    return find_in(decision.requirements, id);
}
const Grade* find_grade(const Node& leaf, const Id& id) {
    return find_in(leaf.grades, id);
}

const Node* find_node(const Node& root, const Id& id) {
    if (root.id == id) return &root;
    for (const auto& child : root.children) {
        if (const auto* found = find_node(child, id)) return found;
    }
    return nullptr;
}

Node* find_node(Node& root, const Id& id) {
    return const_cast<Node*>(find_node(static_cast<const Node&>(root), id));
}

const Node* find_parent(const Node& root, const Id& id) {
    for (const auto& child : root.children) {
        if (child.id == id) return &root;
        if (const auto* found = find_parent(child, id)) return found;
    }
    return nullptr;
}

std::vector<PlacedNode> placed_nodes(const Node& root) {
    std::vector<PlacedNode> out;
    place(root, nullptr, 1, "/criteria", out);
    return out;
}

std::vector<const Node*> leaves(const Node& root) {
    std::vector<const Node*> out;
    for (const auto& placed : placed_nodes(root)) {
        if (placed.node->is_leaf()) out.push_back(placed.node);
    }
    return out;
}

std::vector<Id> set_items(const Decision& decision, const Id& set) {
    const Node* node = find_node(decision.criteria, set);
    if (node == nullptr) return {};
    if (!node->is_leaf()) return ids_of(node->children);
    if (node->rate == RateBy::pairs) return ids_of(decision.options);
    if (node->rate == RateBy::grade && node->worths == WorthsBy::pairs) return ids_of(node->grades);
    return {};
}

std::string person_name(const Decision& decision, const Id& id) {
    return shown(find_person(decision, id), id);
}
std::string option_name(const Decision& decision, const Id& id) {
    return shown(find_option(decision, id), id);
}
std::string node_name(const Decision& decision, const Id& id) {
    return shown(find_node(decision.criteria, id), id);
}
std::string requirement_name(const Decision& decision, const Id& id) {
    return shown(find_requirement(decision, id), id);
}

std::string item_name(const Decision& decision, const Id& set, const Id& item) {
    const Node* node = find_node(decision.criteria, set);
    if (node == nullptr || !node->is_leaf()) return node_name(decision, item);
    return node->rate == RateBy::grade ? shown(find_grade(*node, item), item) : option_name(decision, item);
}

} // namespace steelyard
