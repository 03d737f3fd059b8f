#include "tests/shell/support/save_png.hpp"

namespace steelyard::testing {

bool save_png(const std::string&, const std::vector<std::uint32_t>&, int, int) {
    return false;
}

} // namespace steelyard::testing
