#include "tests/shell/support/save_png.hpp"

#include <png.h>

namespace steelyard::testing {

bool save_png(const std::string& path, const std::vector<std::uint32_t>& pixels, int width, int height) {
    png_image image{};
    image.version = PNG_IMAGE_VERSION;
    image.width = static_cast<png_uint_32>(width);
    image.height = static_cast<png_uint_32>(height);
    image.format = PNG_FORMAT_RGBA;
    return png_image_write_to_file(&image, path.c_str(), 0, pixels.data(), 0, nullptr) != 0;
}

} // namespace steelyard::testing
