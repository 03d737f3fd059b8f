#include "tests/shell/support/weigh_page.hpp"

#include <algorithm>

#include "core/decision/read.hpp"
#include "core/decision/write.hpp"
#include "shell/rooms/weigh_model.hpp"

namespace steelyard::testing {

Decision fresh_set(int items, int judges) {
    Decision d;
    d.id = "fresh";
    d.title = "Fresh";
    d.options = {Option{.id = "o1", .name = "One"}, Option{.id = "o2", .name = "Two"}};
    d.criteria.id = "goal";
    d.criteria.name = "Goal";
    for (int i = 0; i < items; ++i) {
        Node leaf;
        leaf.id = "c" + std::to_string(i);
        leaf.name = "Criterion " + std::string(1, static_cast<char>('A' + i));
        leaf.rate = RateBy::figure;
        leaf.unit = "EUR";
        leaf.curve = Curve{LineCurve{90000, 40000.0 + i}, {}};
        d.criteria.children.push_back(leaf);
    }
    for (int i = 0; i < judges; ++i) {
        d.people.push_back(Person{.id = "p" + std::to_string(i), .name = "Judge " + std::to_string(i + 1)});
    }
    return d;
}

WeighPage::WeighPage(const Decision& decision, HeadlessOptions options)
    : Headless(std::move(options)), opened_(decision) {
    settle();
    app().open_text("fresh.decision.json", write_decision(decision));
    settle();
    click("Close", "button");
    click("Weigh", "tab");
    settle();
}

Decision WeighPage::decision() {
    wait(1);
    settle();
    for (const auto& kept : platform().kept) {
        if (kept.id == opened_.id) return *read_decision(kept.text).decision;
    }
    return opened_; // Nothing was changed.
}

double WeighPage::said(const std::string& a, const std::string& b, const std::string& by) {
    return said_ratio(decision(), "goal", by, a, b).value_or(0);
}

bool WeighPage::says(const std::string& part) const {
    std::string all; // Sentences broken into lines are read across them.
    for (const auto& item : ledger().items()) {
        if (!item.visible) continue;
        all += item.label + " ";
        if (item.value.find(part) != std::string::npos) return true;
    }
    return all.find(part) != std::string::npos;
}

void WeighPage::choose(const std::string& list, const std::string& label) {
    click(list, "combobox");
    settle();
    click(label, "option");
    settle();
}

void WeighPage::fill(const std::string& field, const std::string& text) {
    click(field, "textbox");
    key(ImGuiKey_A, ImGuiMod_Ctrl);
    type(text);
    key(ImGuiKey_Enter);
    settle();
}

} // namespace steelyard::testing
