#include "shell/rooms/room.hpp"

namespace steelyard {

Id fresh_id(const std::string& stem, const std::function<bool(const Id&)>& taken) {
    if (!taken(stem)) return stem;
    for (int i = 2;; ++i) {
        const Id id = stem + std::to_string(i);
        if (!taken(id)) return id;
    }
}

} // namespace steelyard
