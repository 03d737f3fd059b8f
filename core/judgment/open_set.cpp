#include "core/judgment/open_set.hpp"

#include <Eigen/Cholesky>
#include <cassert>
#include <cmath>
#include <numeric>
#include <utility>

namespace steelyard {
namespace {

using Eigen::Index;
using Eigen::MatrixXd;
using Eigen::VectorXd;

/// The judge's matrix with open pairs marked as judged.
PairMatrix pattern(const OpenJudge& judge) {
    PairMatrix pairs = judge.known;
    for (const auto& entry : judge.open) pairs.set(entry.i, entry.j, 1);
    return pairs;
}

} // namespace

AffineLogs affine_logs(const OpenJudge& judge, std::size_t answers) {
    const auto n = static_cast<Index>(judge.known.size());
    const PairMatrix pairs = pattern(judge);
    AffineLogs logs{VectorXd::Zero(n), MatrixXd::Zero(n, static_cast<Index>(answers)), pairs.complete()};
    const auto add = [](auto&& to, const auto& entry, double what) {
        to(static_cast<Index>(entry[0])) += what;
        to(static_cast<Index>(entry[1])) -= what;
    };
    for (const auto& pair : judge.known.judged_pairs())
        add(logs.start, pair, std::log(judge.known.at(pair[0], pair[1])));
    for (const auto& entry : judge.open) {
        const PairMatrix::Pair pair{entry.i, entry.j};
        add(logs.start, pair, entry.fixed);
        add(logs.columns.col(static_cast<Index>(entry.answer)), pair, entry.factor);
    }
    if (logs.by_pairs) {
        logs.start /= static_cast<double>(n);
        logs.columns /= static_cast<double>(n);
        return logs;
    }
    // All that is multiplied sums to 0 over the items, so adding 1 everywhere to the Laplacian, which makes
    // it invertible, changes nothing.
    MatrixXd laplacian = MatrixXd::Ones(n, n);
    for (const auto& [p, q] : pairs.judged_pairs()) {
        const auto i = static_cast<Index>(p);
        const auto j = static_cast<Index>(q);
        laplacian(i, i) += 1;
        laplacian(j, j) += 1;
        laplacian(i, j) -= 1;
        laplacian(j, i) -= 1;
    }
    const Eigen::LLT<MatrixXd> solver(laplacian);
    logs.start = solver.solve(logs.start).eval();
    logs.columns = solver.solve(logs.columns).eval();
    return logs;
}

OpenSet::OpenSet(Method method, bool arithmetic, const std::vector<OpenJudge>& judges,
                 std::vector<AnswerRange> ranges)
    : method_(method),
      arithmetic_(arithmetic),
      size_(judges.front().known.size()),
      ranges_(std::move(ranges)),
      settled_(size_, 0.0) {
    const double shares = std::accumulate(judges.begin(), judges.end(), 0.0,
                                          [](double sum, const OpenJudge& j) { return sum + j.share; });
    for (const auto& judge : judges) {
        assert(pattern(judge).connected());
        if (!judge.open.empty()) {
            moving_.push_back(judge);
            moving_.back().share /= shares;
            continue;
        }
        const Weights w = *weights_by(method, judge.known);
        for (std::size_t i = 0; i < size_; ++i)
            settled_[i] += judge.share / shares * (arithmetic ? w[i] : std::log(w[i]));
    }
}

OpenSet OpenSet::with_geometric_means() const {
    OpenSet means = *this;
    means.method_ = Method::geometric_mean;
    return means;
}

Weights OpenSet::weights(const std::vector<double>& answers) const {
    Weights combined = settled_;
    for (const auto& judge : moving_) {
        PairMatrix pairs = judge.known;
        for (const auto& entry : judge.open) {
            const double answer = answers[entry.answer];
            // A judge's own answer is taken as given: exp(ln 3) is not 3.
            const bool own = entry.factor == 1 && entry.fixed == 0;
            pairs.set(entry.i, entry.j,
                      own ? answer : std::exp(entry.fixed + entry.factor * std::log(answer)));
        }
        const Weights w = *weights_by(method_, pairs);
        for (std::size_t i = 0; i < size_; ++i)
            combined[i] += judge.share * (arithmetic_ ? w[i] : std::log(w[i]));
    }
    if (!arithmetic_) {
        for (auto& x : combined) x = std::exp(x);
    }
    const double sum = std::accumulate(combined.begin(), combined.end(), 0.0);
    for (auto& x : combined) x /= sum;
    return combined;
}

} // namespace steelyard
