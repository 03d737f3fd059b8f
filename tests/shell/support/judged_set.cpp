#include "tests/shell/support/judged_set.hpp"

namespace steelyard::testing {
namespace {

void judge(Decision& d, const Id& by, const std::vector<double>& upper) {
    const auto& items = d.criteria.children;
    std::size_t at = 0;
    for (std::size_t i = 0; i < items.size(); ++i) {
        for (std::size_t j = i + 1; j < items.size() && at < upper.size(); ++j, ++at) {
            if (upper[at] == 0) continue;
            Judgment judgment;
            judgment.set = d.criteria.id;
            judgment.by = by;
            judgment.a = items[i].id;
            judgment.b = items[j].id;
            judgment.ratio = upper[at];
            d.judgments.push_back(judgment);
        }
    }
}

} // namespace

Decision judged_set(const std::vector<std::string>& names, const std::vector<double>& upper) {
    Decision d;
    d.id = "set";
    d.title = "A set";
    d.options = {Option{.id = "brook", .name = "Brook"}, Option{.id = "alder", .name = "Alder"}};
    d.criteria.id = "goal";
    d.criteria.name = "Fit to the cell";
    for (std::size_t i = 0; i < names.size(); ++i) {
        Node leaf;
        leaf.id = "c" + std::to_string(i);
        leaf.name = names[i];
        leaf.rate = RateBy::figure;
        leaf.unit = "kg";
        leaf.curve = Curve{.shape = LineCurve{0, 10}};
        d.criteria.children.push_back(leaf);
        d.figures.push_back(Figure{.criterion = leaf.id, .option = "brook", .value = i % 2 == 0 ? 8 : 3});
        d.figures.push_back(Figure{.criterion = leaf.id, .option = "alder", .value = i % 2 == 0 ? 4 : 5});
    }
    judge(d, "", upper);
    return d;
}

void add_judge(Decision& d, const std::string& name, const std::vector<double>& upper) {
    const Id id = "p" + std::to_string(d.people.size());
    d.people.push_back(Person{.id = id, .name = name});
    judge(d, id, upper);
}

Decision contradicting_set() {
    return judged_set({"Throughput", "Floor space", "Ease of use", "Noise", "Height"},
                      {2, 4, 3, 5, 2, 1.0 / 6, 3, 2, 2, 1});
}

} // namespace steelyard::testing
