#include "tests/support/bad_files.hpp"

#include <iterator>

namespace steelyard::test {

std::vector<BadFile> bad_files() {
    std::vector<BadFile> all = bad_texts();
    for (auto* part : {bad_types, bad_values, bad_references}) {
        std::vector<BadFile> more = part();
        all.insert(all.end(), std::make_move_iterator(more.begin()), std::make_move_iterator(more.end()));
    }
    return all;
}

} // namespace steelyard::test
