#pragma once

#include <string>
#include <unordered_map>
#include <vector>

#include "core/decision/decision.hpp"

namespace steelyard {

/// Entries of a decision (costs, grades) by criterion and option, in the order of the file, so that a place
/// is found without reading all of them. Keeps pointers into the list given.
template<class Entry>
class ByPlace {
public:
    explicit ByPlace(const std::vector<Entry>& entries) {
        for (const auto& entry : entries) places_[key(entry.criterion, entry.option)].push_back(&entry);
    }

    const std::vector<const Entry*>& at(const Id& criterion, const Id& option) const {
        static const std::vector<const Entry*> none;
        const auto found = places_.find(key(criterion, option));
        return found == places_.end() ? none : found->second;
    }

private:
    static std::string key(const Id& criterion, const Id& option) {
        return std::to_string(criterion.size()) + criterion + option;
    }

    std::unordered_map<std::string, std::vector<const Entry*>> places_;
};

} // namespace steelyard
