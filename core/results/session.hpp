#pragma once

#include <cstdint>
#include <optional>
#include <string>

#include "core/decision/history.hpp"
#include "core/results/results.hpp"
#include "core/results/solve_cache.hpp"

namespace steelyard {

/// The one owner of the open decision: its history, and its results, kept until the revision moves on.
class Session {
public:
    explicit Session(Decision decision) : history_(std::move(decision)) {}

    const Decision& decision() const { return history_.now(); }
    const History& history() const { return history_; }
    std::uint64_t revision() const { return history_.revision(); }

    History::Outcome apply(const std::vector<Edit>& edits, const Stamp& stamp, std::string label = {}) {
        return history_.apply(edits, stamp, std::move(label));
    }
    bool undo(const Stamp& stamp) { return history_.undo(stamp); }
    bool redo(const Stamp& stamp) { return history_.redo(stamp); }

    /// Puts another decision in place of the open one; its history starts anew.
    void open(Decision decision);

    /// The results of the present revision, solved at the first call after a change. What the change did not
    /// touch is remembered from before.
    const Results& results();

    /// The fingerprint of the decision, which takes as long as solving: worked out at the first call after a
    /// change, so that changes do not pay for it.
    const std::string& sha256();

    /// For other work on the open decision, which may leave there what it works out.
    SolveCache& cache() { return cache_; }

private:
    History history_;
    SolveCache cache_;
    std::optional<Results> results_;
    std::uint64_t solved_revision_ = 0;
    std::string sha256_; ///< Empty until asked for.
    std::uint64_t hashed_revision_ = 0;
};

} // namespace steelyard
