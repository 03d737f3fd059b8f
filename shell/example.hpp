#pragma once

namespace steelyard {

/// The demo decision that a first start shows: the text of assets/parts-washer.decision.json.
const char* example_decision();

} // namespace steelyard
