#pragma once

#include <cstddef>
#include <cstdint>
#include <map>
#include <optional>
#include <tuple>
#include <utility>
#include <vector>

#include "core/judgment/concordance.hpp"
#include "core/judgment/matrix_facts.hpp"

namespace steelyard {

/// Answers of a pure function by what it was asked, so that equal questions are answered once. An answer not
/// asked for in `kept_for` solves is forgotten: a few undone steps find theirs still there.
template<class Question, class Answer>
class Memory {
public:
    struct Count {
        std::size_t solved = 0; ///< Worked out.
        std::size_t reused = 0; ///< Remembered.
        bool operator==(const Count&) const = default;
    };

    /// The answer, by `work` if it is not remembered. It stays where it is until forgotten.
    template<class Work>
    const Answer& answer(Question question, Work work) {
        const auto found = answers_.find(question);
        if (found != answers_.end()) {
            ++count_.reused;
            found->second.last_asked = solve_;
            return found->second.answer;
        }
        ++count_.solved;
        return answers_.emplace(std::move(question), Entry{work(), solve_}).first->second.answer;
    }

    void next_solve() {
        ++solve_;
        std::erase_if(answers_,
                      [&](const auto& entry) { return entry.second.last_asked + kept_for < solve_; });
    }

    const Count& count() const { return count_; }
    std::size_t size() const { return answers_.size(); }

private:
    static constexpr std::uint64_t kept_for = 16;

    struct Entry {
        Answer answer;
        std::uint64_t last_asked;
    };
    std::map<Question, Entry> answers_;
    Count count_;
    std::uint64_t solve_ = 0;
};

/// What solving remembers from one decision to the next: whatever follows from a set's matrix or from a table
/// of ranks alone. Remembered by those numbers themselves, so that nothing else (names, other sets, another
/// decision even) can make an answer wrong. A plain value; results with it equal those without.
class SolveCache {
public:
    const MatrixFacts& facts(const PairMatrix& pairs, Method method, RandomIndexTable table) {
        return facts_.answer({method, table, pairs.entries()},
                             [&] { return matrix_facts(pairs, method, table); });
    }

    /// Weights alone, for standings of which nothing else is told.
    const std::optional<Weights>& weights(const PairMatrix& pairs, Method method) {
        return weights_.answer({method, pairs.entries()}, [&] { return weights_by(method, pairs); });
    }

    const std::optional<KendallW>& concordance(const std::vector<std::vector<double>>& ranks) {
        return concordances_.answer(ranks, [&] { return kendall_w(ranks); });
    }

    /// To be called when a solve begins: forgets what was not asked for lately.
    void next_solve() {
        facts_.next_solve();
        weights_.next_solve();
        concordances_.next_solve();
    }

    const auto& facts_count() const { return facts_.count(); }
    const auto& weights_count() const { return weights_.count(); }
    const auto& concordances_count() const { return concordances_.count(); }
    std::size_t size() const { return facts_.size() + weights_.size() + concordances_.size(); }

private:
    using Entries = std::vector<double>;
    Memory<std::tuple<Method, RandomIndexTable, Entries>, MatrixFacts> facts_;
    Memory<std::tuple<Method, Entries>, std::optional<Weights>> weights_;
    Memory<std::vector<std::vector<double>>, std::optional<KendallW>> concordances_;
};

} // namespace steelyard
