#pragma once

#include <cstdint>
#include <optional>
#include <vector>

#include "core/judgment/lead.hpp"
#include "core/judgment/open_set.hpp"

/// Sets with answers yet to come, for tests, and a slow and obvious way to put answers in.
namespace steelyard::testing {

/// What hangs on the weights of the set.
enum class OpenKind { criteria, options_ideal, options_distributive, grades_ideal };

/// Options whose scores hang on a set's weights.
struct OpenCase {
    Method method = Method::eigenvector;
    bool arithmetic = false;
    OpenKind kind = OpenKind::criteria;
    std::size_t items = 0;
    std::vector<OpenJudge> judges;
    std::vector<AnswerRange> ranges;
    std::vector<double> rest;                ///< Per option: its score from elsewhere.
    double weight = 1;                       ///< Of the node or leaf that the set belongs to.
    std::vector<std::vector<double>> values; ///< Per option and item: what it gets of the item.
    std::size_t leader = 0;

    OpenSet set() const { return {method, arithmetic, judges, ranges}; }
    std::vector<Lead> leads() const;

    /// The weights and the options' scores with these answers, by code that shares nothing with the solver
    /// where all pairs are judged in the end.
    std::vector<double> weights(const std::vector<double>& answers) const;
    std::vector<double> scores(const std::vector<double>& answers) const;

    /// How far the best of the others is ahead of the leader.
    double behind(const std::vector<double>& answers) const;
};

struct OpenCaseSize {
    std::size_t items = 5;
    int open = 2; ///< Pairs to be answered.
    int stay = 0; ///< Pairs that stay missing, where the items hang together without them.
    int judges = 1;
};

/// A random case near a consistent set. The leader is the first with the answers that the rest implies, or
/// all equal.
OpenCase random_open_case(Method method, OpenKind kind, const OpenCaseSize& size, std::uint64_t seed);

/// Answers with which somebody is ahead of the leader by more than 1e-9: random and corner answers, then
/// descent along single answers from the best of them.
std::optional<std::vector<double>> turning_answers(const OpenCase& open, int tries, std::uint64_t seed);

} // namespace steelyard::testing
