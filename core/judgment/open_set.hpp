#pragma once

#include <Eigen/Core>
#include <cstddef>
#include <vector>

#include "core/judgment/pair_matrix.hpp"
#include "core/judgment/weights.hpp"

namespace steelyard {

/// An entry that hangs on an answer yet to come: ln a_ij = fixed + factor * ln(answer), i < j, factor > 0. A
/// judge's own answer has factor 1; in a group's matrix the factor is his share among those who judged the
/// pair, and `fixed` what the others said.
struct OpenEntry {
    std::size_t i = 0;
    std::size_t j = 0;
    std::size_t answer = 0; ///< Which of the answers.
    double factor = 1;
    double fixed = 0;
};

/// One matrix that gives weights once the answers are in. Pairs neither known nor open stay missing; known
/// and open ones together connect the items.
struct OpenJudge {
    double share = 1; ///< > 0; any sum over the judges.
    PairMatrix known;
    std::vector<OpenEntry> open;
};

/// The values that an answer may take.
struct AnswerRange {
    double low = 1.0 / 9;
    double high = 9;
};

/// y = start + columns * x: the logarithms of weights, up to a common term, in the logarithms x of the
/// answers.
struct AffineLogs {
    Eigen::VectorXd start;
    Eigen::MatrixXd columns; ///< A row for each item, a column for each answer.
    bool by_pairs = true;    ///< Each column has k at one item, -k at another, and nothing else.
};

/// The geometric mean weights of one judge. Source of least squares on incomplete sets: log_least_squares.
AffineLogs affine_logs(const OpenJudge& judge, std::size_t answers);

/// A set of items as one or several judges see it, some of whose answers are yet to come.
class OpenSet {
public:
    /// At least one judge. Several judges' weights are combined by share: arithmetically, or geometrically.
    /// Column averages need judges whose known and open pairs are all pairs.
    OpenSet(Method method, bool arithmetic, const std::vector<OpenJudge>& judges,
            std::vector<AnswerRange> ranges);

    Method method() const { return method_; }
    bool arithmetic() const { return arithmetic_; }
    std::size_t size() const { return size_; }
    const std::vector<AnswerRange>& ranges() const { return ranges_; }

    /// The judges whose weights depend on the answers, shares as parts of the sum of all shares.
    const std::vector<OpenJudge>& moving() const { return moving_; }

    /// What the others bring: the sum over them of share * w_i (arithmetic) or share * ln w_i.
    const std::vector<double>& settled() const { return settled_; }

    /// The weights, sum 1, with these answers.
    Weights weights(const std::vector<double>& answers) const;

    /// The same with the moving judges' weights as geometric means, whatever the method: near it, and its
    /// least leads can be computed.
    OpenSet with_geometric_means() const;

private:
    Method method_;
    bool arithmetic_;
    std::size_t size_;
    std::vector<AnswerRange> ranges_;
    std::vector<OpenJudge> moving_;
    std::vector<double> settled_;
};

} // namespace steelyard
