#include "tests/shell/support/gauge_page.hpp"

#include <stdexcept>
#include <utility>

#include "core/decision/lookup.hpp"
#include "core/decision/read.hpp"
#include "core/decision/write.hpp"
#include "shell/rooms/gauge_entries.hpp"

namespace steelyard::testing {

GaugePage::GaugePage(HeadlessOptions options) : Headless(std::move(options)) {
    click("Gauge", "tab");
}

void GaugePage::open(const Decision& decision) {
    app().open_text("x.decision.json", write_decision(decision));
    settle();
    click("Gauge", "tab");
}

Decision GaugePage::decision() {
    key(ImGuiKey_S, ImGuiMod_Ctrl);
    const auto read = read_decision(platform().saved_files.back().text);
    if (!read.decision) throw std::runtime_error("the file saved cannot be read");
    return *read.decision;
}

Figure GaugePage::figure(const Id& criterion, const Id& option) {
    const Decision d = decision();
    const Figure* found = gauge::standing_figure(d, criterion, option);
    return found != nullptr ? *found : Figure{};
}

Id GaugePage::grade(const Id& criterion, const Id& option, const Id& by) {
    const Decision d = decision();
    const GradeEntry* found = gauge::standing_grade(d, criterion, option, by);
    return found != nullptr ? found->grade : Id{};
}

Node GaugePage::leaf(const Id& id) {
    const Decision d = decision();
    const Node* found = find_node(d.criteria, id);
    if (found == nullptr) throw std::runtime_error("no criterion " + id);
    return *found;
}

std::string GaugePage::focused() const {
    for (const LedgerItem& one : ledger().items()) {
        if (one.focused) return one.label;
    }
    return {};
}

bool GaugePage::says(const std::string& part) const {
    for (const LedgerItem& one : ledger().items()) {
        if (one.visible && one.label.find(part) != std::string::npos) return true;
    }
    return false;
}

void GaugePage::choose(const std::string& list, const std::string& label) {
    click(list, "combobox");
    click(label, "option");
}

void GaugePage::fill(const std::string& field, const std::string& text) {
    click(field, "textbox");
    key(ImGuiKey_A, ImGuiMod_Ctrl);
    type(text);
    key(ImGuiKey_Enter);
}

} // namespace steelyard::testing
