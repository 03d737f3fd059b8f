#include "tests/support/judged_decisions.hpp"

#include "core/results/solve.hpp"
#include "tests/support/round_trip.hpp"

namespace steelyard::testing {

std::string judgment(const std::string& set, const std::string& by, const std::string& a,
                     const std::string& b, const std::string& ratio) {
    return R"({"set": ")" + set + R"(", "by": )" + (by.empty() ? "null" : "\"" + by + "\"") + R"(, "a": ")" +
           a + R"(", "b": ")" + b + R"(", "ratio": )" + ratio + "}";
}

std::string judgments(const std::vector<std::string>& list) {
    std::string text;
    for (const auto& one : list) text += (text.empty() ? "" : ", ") + one;
    return R"("judgments": [)" + text + "]";
}

Results criteria(const std::string& more, const std::string& settings, const std::string& weights) {
    return solve(test::read(R"({"format": "steelyard-decision", "version": 1, "options": [{"id": "o1"}],
        "people": [{"id": "p1", "share": 1}, {"id": "p2", "share": 3}, {"id": "p3", "share": 0}],
        "criteria": {"id": "goal", "weights": ")" +
                            weights + R"(", "children": [{"id": "a"}, {"id": "b"}, {"id": "c"}]},
        "settings": {)" + settings +
                            "}" + (more.empty() ? "" : ", " + more) + "}"));
}

Results options(const std::string& option_list, const std::string& more, const std::string& abstains) {
    return solve(test::read(R"({"format": "steelyard-decision", "version": 1, "options": [)" + option_list +
                            R"(], "people": [{"id": "p1", "abstains": [)" + abstains +
                            R"(]}, {"id": "p2", "share": 3}],
        "criteria": {"id": "goal"}, )" +
                            more + "}"));
}

} // namespace steelyard::testing
