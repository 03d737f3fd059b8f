#include <algorithm>

#include "tests/support/random_maker.hpp"

namespace steelyard::testing {

void RandomMaker::make_requirements() {
    const int count = dice_.chance(35) ? 0 : std::min(dice_.between(1, 4), size_.requirements);
    for (int i = 1; i <= count; ++i) {
        Requirement requirement = make_requirement();
        requirement.id = "r" + std::to_string(i);
        requirement.name = text();
        requirement.safety = dice_.chance(20);
        if (dice_.chance(12)) {
            Waiver waiver;
            if (!decision_.people.empty()) waiver.by = dice_.pick(decision_.people).id;
            waiver.at = time();
            waiver.why = text();
            requirement.waived = waiver;
        }
        decision_.requirements.push_back(requirement);
        // Checks of a must on figures play no part; they are there at times all the same.
        if (requirement.node.empty() && (requirement.criterion.empty() || dice_.chance(10)))
            make_checks(requirement);
    }
}

Requirement RandomMaker::make_requirement() {
    Requirement requirement;
    std::vector<Id> figure_leaves;
    for (const Node& node : nodes_)
        if (node.is_leaf() && node.rate == RateBy::figure) figure_leaves.push_back(node.id);

    const int roll = dice_.below(100);
    const bool both = dice_.chance(20);
    if (roll < 35 && !figure_leaves.empty()) {
        requirement.criterion = dice_.pick(figure_leaves);
        const FigureScale& scale = scales_.at(requirement.criterion);
        const Node& leaf = *std::find_if(nodes_.begin(), nodes_.end(),
                                         [&](const Node& node) { return node.id == requirement.criterion; });
        // A computed figure is not to meet its limit but for rounding.
        const double beside = leaf.cost_sheet ? 0.0137 : 0;
        const int most = scale.base + scale.span - scale.span / dice_.between(3, 12);
        const int least = scale.base + scale.span / dice_.between(4, 15);
        const bool upper = dice_.chance(60);
        if (both || upper) requirement.at_most = std::max(most, least) / 10.0 + beside;
        if (both || !upper) requirement.at_least = std::min(most, least) / 10.0 + beside;
    } else if (roll < 60) {
        requirement.unit = "dB(A)";
        const int limit = dice_.between(600, 900);
        if (both || dice_.chance(60)) requirement.at_most = limit / 10.0;
        if (both || !requirement.at_most) requirement.at_least = (limit - 300) / 10.0;
        if (dice_.chance(6)) { // nothing to check yet
            requirement.at_most.reset();
            requirement.at_least.reset();
        }
    } else if (roll < 80) {
        requirement.yes_no = true;
    } else {
        requirement.node = dice_.pick(nodes_).id;
        // Sums of weights and worths do not come to such numbers.
        const double least = dice_.between(5, 65) / 100.0 + 0.00037;
        const int kind = dice_.below(20);
        if (kind < 16) requirement.min_worth = least;
        if (kind == 15 || kind == 16 || kind == 17)
            requirement.at_least = dice_.between(5, 50) / 100.0 + 0.00071;
        if (kind == 18) requirement.at_most = dice_.between(70, 99) / 100.0 + 0.00029;
    }
    return requirement;
}

void RandomMaker::make_checks(const Requirement& requirement) {
    for (const Option& option : decision_.options) {
        const int entries = dice_.chance(15) ? 2 : 1;
        for (int i = 0; i < entries; ++i) {
            if (!answered()) continue;
            Check check;
            check.requirement = requirement.id;
            check.option = option.id;
            if (!decision_.people.empty() && dice_.chance(50)) check.by = dice_.pick(decision_.people).id;
            if (dice_.chance(30)) check.source = text();
            const bool numeric = !requirement.yes_no;
            if (!numeric || dice_.chance(12))
                check.state = dice_.pick<CheckState>({CheckState::met, CheckState::met, CheckState::met,
                                                      CheckState::met, CheckState::met, CheckState::failed,
                                                      CheckState::asked, CheckState::unstated});
            if (numeric && check.state == CheckState::unstated) {
                const double limit = requirement.at_most.value_or(requirement.at_least.value_or(70));
                const int tenths = static_cast<int>(limit * 10 + 0.5) +
                                   (requirement.at_most ? dice_.between(-120, 15) : dice_.between(-15, 120));
                const int shape = dice_.below(12);
                if (shape != 0 && shape != 3) check.value = tenths / 10.0;
                if (shape < 4) // a range with or without a value, or a lower end with or without one
                    check.low = (tenths - dice_.below(60)) / 10.0;
                if (shape < 2) check.high = (tenths + dice_.below(60)) / 10.0;
            } else if (numeric && dice_.chance(25)) {
                check.value = dice_.between(400, 1000) / 10.0; // a value outranks a stated state
            }
            decision_.checks.push_back(check);
        }
    }
}

} // namespace steelyard::testing
