#pragma once

#include <cstddef>
#include <string>

#include "core/decision/decision.hpp"
#include "tests/shell/support/headless.hpp"

namespace steelyard::testing {

/// The example in the room Gauge, on a page so tall that nothing has to be scrolled.
class GaugePage : public Headless {
public:
    explicit GaugePage(HeadlessOptions options = {.height = 2400});

    /// Another decision, in the room Gauge.
    void open(const Decision& decision);

    /// The decision as a file saved now would hold it.
    Decision decision();

    /// The figure that stands in it.
    Figure figure(const Id& criterion, const Id& option);
    /// The grade of a person, or the agreed one; empty if there is none.
    Id grade(const Id& criterion, const Id& option, const Id& by);
    /// A leaf, which must be there.
    Node leaf(const Id& id);
    /// How many figures were ever entered.
    std::size_t entries() { return decision().figures.size(); }

    /// What a cell says, all of it.
    std::string cell(const std::string& label) { return item(label, "gridcell").value; }
    /// What has the keyboard.
    std::string focused() const;
    /// True where some text or name to be seen has this in it.
    bool says(const std::string& part) const;

    /// Chooses from a list that drops down.
    void choose(const std::string& list, const std::string& label);
    /// Puts a text into a field in place of what it holds, and Enter.
    void fill(const std::string& field, const std::string& text);
};

} // namespace steelyard::testing
