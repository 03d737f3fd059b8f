#pragma once

#include <string>
#include <vector>

#include "core/decision/decision.hpp"
#include "tests/shell/support/headless.hpp"

namespace steelyard::testing {

/// Criteria A, B, C … (ids c0, c1, c2 …) below a goal, compared in pairs; people p0, p1 …; nothing answered.
Decision fresh_set(int items, int judges = 0);

/// A decision in the room Weigh.
class WeighPage : public Headless {
public:
    explicit WeighPage(const Decision& decision, HeadlessOptions options = {});

    /// The decision as a person would find it again.
    Decision decision();

    /// The ratio that stands in the goal's set, 0 where there is none.
    double said(const std::string& a, const std::string& b, const std::string& by = {});

    /// True where some text or name to be seen has this in it.
    bool says(const std::string& part) const;

    /// Chooses from a list that drops down.
    void choose(const std::string& list, const std::string& label);

    /// Puts a text into a field in place of what it holds, and Enter.
    void fill(const std::string& field, const std::string& text);

private:
    Decision opened_;
};

} // namespace steelyard::testing
