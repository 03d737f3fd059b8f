#include "tests/support/full_decision.hpp"

#include <stdexcept>

namespace steelyard::test {

const std::string& full_decision_text() {
    static const std::string text = R"({
  "format": "steelyard-decision",
  "version": 1,
  "id": "post-round",
  "title": "A cargo bicycle for the post round",
  "question": "Which cargo bicycle do we buy?",
  "author": "Works council",
  "decide_by": "2027-02-26",
  "notes": "Two yards, one hill.",
  "people": [
    {"id": "p1", "name": "Dispatch", "role": "rides", "share": 2, "interest": "none", "abstains": ["o3"]},
    {"id": "p2", "name": "Workshop", "share": 0.5}
  ],
  "options": [
    {"id": "o1", "name": "Halmwerk Long", "note": "front box"},
    {"id": "o2", "name": "Tressel Two", "withdrawn": false},
    {"id": "o3", "name": "Quendel", "withdrawn": true}
  ],
  "criteria": {
    "id": "goal", "name": "A good bicycle", "note": "for years", "weights": "pairs",
    "children": [
      {"id": "cost", "name": "Cost", "weights": "points", "children": [
        {"id": "price", "name": "Price", "rate": "figure", "unit": "EUR",
          "curve": {"kind": "line", "worst": 9000, "best": 4000}},
        {"id": "upkeep", "name": "Upkeep", "rate": "figure", "unit": "EUR",
          "curve": {"kind": "proportional", "better": "less"},
          "cost_sheet": {"years": 10, "discount": 0.08, "volume": 12000, "result": "total"}}
      ]},
      {"id": "ease", "name": "Ease of riding", "rate": "pairs"},
      {"id": "service", "name": "Service", "rate": "grade", "worths": "given", "grades": [
        {"id": "g1", "name": "same day", "worth": 1},
        {"id": "g2", "name": "next day", "worth": 0.6}
      ]},
      {"id": "reach", "name": "Reach", "rate": "figure", "unit": "km",
        "curve": {"kind": "points", "at": [[20, 0], [40, 0.5], [80, 1]]}},
      {"id": "mass", "name": "Mass", "rate": "figure", "unit": "kg",
        "curve": {"kind": "target", "target": 30, "tolerance": 10}},
      {"id": "care", "name": "Care", "rate": "grade", "worths": "pairs", "grades": [
        {"id": "k1", "name": "wipe"},
        {"id": "k2", "name": "grease"},
        {"id": "k3", "name": "strip"}
      ]}
    ]
  },
  "judgments": [
    {"set": "goal", "by": "p1", "a": "cost", "b": "ease", "ratio": 3, "a_range": "400 to 900 EUR", "b_range": "low to high", "note": "said twice", "at": "2026-12-01T09:30:00Z"},
    {"set": "ease", "by": "p2", "a": "o1", "b": "o2", "ratio": 0.25},
    {"set": "care", "by": null, "a": "k1", "b": "k2", "ratio": 2}
  ],
  "finished": [
    {"set": "goal", "by": "p1", "skipped": [["ease", "service"], ["reach", "mass"]]}
  ],
  "points": [
    {"set": "cost", "by": "p1", "points": {"price": 70, "upkeep": 30}, "note": "by feel", "at": "2026-12-01T09:40:00Z"}
  ],
  "figures": [
    {"criterion": "price", "option": "o1", "value": 6150, "low": 6000, "high": 6600, "source": "letter", "round": 2,
      "status": "quoted", "valid_until": "2027-01-31", "note": "without lock", "at": "2026-12-02T08:00:00Z"},
    {"criterion": "reach", "option": "o2", "value": 55, "status": "measured"}
  ],
  "costs": [
    {"criterion": "upkeep", "option": "o1", "line": "tyres", "kind": "per_year", "value": 90, "source": "shop list",
      "currency": "USD", "in_unit": 0.92, "note": "two pairs", "at": "2026-12-02T08:05:00Z"},
    {"criterion": "upkeep", "option": "o1", "line": "battery", "kind": "in_year", "year": 5, "value": 700}
  ],
  "grades": [
    {"criterion": "service", "option": "o1", "grade": "g2", "by": "p1", "source": "trial", "note": "rainy", "at": "2026-12-03"}
  ],
  "requirements": [
    {"id": "r1", "name": "Price held", "note": "board limit", "criterion": "price", "at_most": 8000},
    {"id": "r2", "name": "Brake test", "unit": "m", "at_least": 1, "at_most": 78, "safety": true},
    {"id": "r3", "name": "Lights", "yes_no": true, "waived": {"by": "p1", "at": "2026-12-04", "why": "bought apart"}},
    {"id": "r4", "name": "Cost in hand", "node": "cost", "min_worth": 0.3}
  ],
  "checks": [
    {"requirement": "r2", "option": "o1", "value": 74, "low": 72, "high": 77, "source": "yard", "note": "wet", "by": "p1",
      "at": "2026-12-05"},
    {"requirement": "r3", "option": "o1", "state": "met"}
  ],
  "settings": {
    "method": "eigenvector", "synthesis": "ideal", "combine": "judgments", "random_index": "alonso-lamata-2006",
    "limit": 0.1, "too_close": 0.02, "money": "price",
    "trials": {"n": 5000, "seed": 7, "kinds": ["weights", "judgments", "figures"], "spread": 1.25}
  },
  "rules": {"fixed_at": "2026-12-01T08:00:00Z", "by": "p2", "sha256": "00ff"},
  "outcome": {"option": "o2", "by": ["p1", "p2"], "at": "2026-12-09", "reasons": "rides well", "conditions": "lock added",
    "why_not_first": "late delivery"},
  "log": [
    {"at": "2026-12-01", "by": "p1", "did": "opened", "why": "new round"}
  ],
  "signed": [
    {"by": "p1", "at": "2026-12-09", "sha256": "aa11", "remark": "agreed"}
  ]
}
)";
    return text;
}

std::string exchanged(std::string_view text, std::string_view piece, std::string_view with) {
    const auto first = text.find(piece);
    if (piece.empty() || first == std::string_view::npos ||
        text.find(piece, first + 1) != std::string_view::npos) {
        throw std::logic_error("not there exactly once: " + std::string(piece));
    }
    return std::string(text.substr(0, first)) + std::string(with) +
           std::string(text.substr(first + piece.size()));
}

std::string with(std::string_view piece, std::string_view with) {
    return exchanged(full_decision_text(), piece, with);
}

std::string with_first(std::string_view name, std::string_view entry) {
    // Two spaces of indentation: only the top level has them.
    const std::string opening = "\n  \"" + std::string(name) + "\": [";
    return with(opening, opening + "\n    " + std::string(entry) + ",");
}

std::string with_member(std::string_view name, std::string_view json) {
    return with("\n  ]\n}\n", "\n  ],\n  \"" + std::string(name) + "\": " + std::string(json) + "\n}\n");
}

std::string small_decision_text(std::string_view members) {
    return R"({"format": "steelyard-decision", "version": 1, "options": [{"id": "o1"}, {"id": "o2"}],)"
           R"( "criteria": {"id": "goal"})" +
           std::string(members) + "}";
}

std::string deep_tree_text(int levels) {
    std::string text = "{\"id\": \"n" + std::to_string(levels) + "\"}";
    for (int level = levels - 1; level >= 1; --level) {
        text = "{\"id\": \"n" + std::to_string(level) + "\", \"children\": [" + text + "]}";
    }
    return text;
}

std::string repeated(std::string_view unit, std::size_t count) {
    std::string text;
    text.reserve(unit.size() * count);
    for (std::size_t i = 0; i < count; ++i) text += unit;
    return text;
}

} // namespace steelyard::test
