#include "core/decision/fingerprint.hpp"

#include <algorithm>

#include "core/decision/canonical.hpp"
#include "core/decision/lookup.hpp"
#include "core/decision/sha256.hpp"
#include "core/decision/write.hpp"

namespace steelyard {

std::string canonical_json(const Decision& decision) {
    JsonValue value = to_json(decision);
    std::erase_if(value.members, [](const auto& member) { return member.first == "signed"; });
    return canonical_json(value);
}

std::string decision_sha256(const Decision& decision) {
    return sha256_hex(canonical_json(decision));
}

std::string rules_sha256(const Decision& decision) {
    Decision rules;
    rules.criteria = decision.criteria;
    rules.requirements = decision.requirements;
    rules.settings = decision.settings;
    const auto of_criteria = [&](const auto& entry) {
        const Node* node = find_node(decision.criteria, entry.set);
        return node != nullptr && !node->is_leaf();
    };
    std::copy_if(decision.judgments.begin(), decision.judgments.end(), std::back_inserter(rules.judgments),
                 of_criteria);
    std::copy_if(decision.points.begin(), decision.points.end(), std::back_inserter(rules.points),
                 of_criteria);
    // The five members stand whether or not the file wrote them, so that the same rules have one hash.
    rules.extras.stated = {"judgments", "points", "requirements", "settings"};
    JsonValue value = to_json(rules);
    std::erase_if(value.members, [](const auto& member) {
        return member.first == "format" || member.first == "version" || member.first == "options";
    });
    return sha256_hex(canonical_json(value));
}

} // namespace steelyard
