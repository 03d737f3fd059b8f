#pragma once

#include <string>
#include <string_view>

namespace steelyard {

/// SHA-256 of bytes, as 64 lower-case hexadecimal digits. Source: NIST FIPS 180-4, section 6.2.
std::string sha256_hex(std::string_view bytes);

} // namespace steelyard
