#include "core/decision/migrate.hpp"

#include <utility>

namespace steelyard {

const std::vector<Migration>& migrations() {
    static const std::vector<Migration> steps{};
    return steps;
}

JsonValue migrate(JsonValue file, int version) {
    for (const auto& migration : migrations()) {
        if (migration.from >= version) file = migration.step(std::move(file));
    }
    return file;
}

} // namespace steelyard
