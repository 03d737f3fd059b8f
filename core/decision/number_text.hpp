#pragma once

#include <string>

namespace steelyard {

/// The shortest decimal digits that read back as the same double, laid out as ECMAScript's Number::toString
/// does (ECMA-262, 6.1.6.1.20; asked for by RFC 8785, 3.2.2.3): -0 as "0", exponents from 1e21 up and below
/// 1e-6. `number` finite.
std::string shortest_number(double number);

} // namespace steelyard
