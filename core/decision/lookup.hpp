#pragma once

#include <string>
#include <vector>

#include "core/decision/decision.hpp"

/// Finding things in a decision. Pointers are into the decision given and live as long as it.
namespace steelyard {

const Person* find_person(const Decision& decision, const Id& id);
const Option* find_option(const Decision& decision, const Id& id);
const Requirement* find_requirement(const Decision& decision, const Id& id);
const Grade* find_grade(const Node& leaf, const Id& id);

const Node* find_node(const Node& root, const Id& id);
Node* find_node(Node& root, const Id& id);

/// The node whose children hold `id`; null for the root and for an unknown id.
const Node* find_parent(const Node& root, const Id& id);

/// One node with where it stands.
struct PlacedNode {
    const Node* node = nullptr;
    const Node* parent = nullptr;
    int depth = 1;       ///< The root is 1.
    std::string pointer; ///< JSON Pointer in the file.
};

/// All nodes, each before its children, in the order of the file.
std::vector<PlacedNode> placed_nodes(const Node& root);

/// The leaves, in the order of the file.
std::vector<const Node*> leaves(const Node& root);

/// The items of the set named `set`: children, options or grades. Empty if there is no such set.
std::vector<Id> set_items(const Decision& decision, const Id& set);

/// What is shown for an id: the name it stands for, or the id itself where that has no name.
std::string person_name(const Decision& decision, const Id& id);
std::string option_name(const Decision& decision, const Id& id);
std::string node_name(const Decision& decision, const Id& id);
std::string requirement_name(const Decision& decision, const Id& id);

/// The same for an item of a set: a criterion, an option or a grade.
std::string item_name(const Decision& decision, const Id& set, const Id& item);

} // namespace steelyard
