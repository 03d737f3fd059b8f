#pragma once

#include <cstdint>
#include <string>
#include <vector>

namespace steelyard::testing {

/// Writes a picture (RGBA in memory order, row by row) as a PNG file. False if that fails, and always false
/// in WebAssembly, where no test saves pictures.
bool save_png(const std::string& path, const std::vector<std::uint32_t>& pixels, int width, int height);

} // namespace steelyard::testing
