#include "core/judgment/changed_set.hpp"

#include <Eigen/LU>
#include <algorithm>
#include <cmath>
#include <utility>

namespace steelyard {

using Eigen::Index;
using Eigen::MatrixXd;
using Eigen::VectorXd;

namespace {

const double furthest = std::log(9.0); // The ends of the scale.

} // namespace

ChangeableSet::ChangeableSet(const PairMatrix& pairs)
    : pairs_(pairs),
      judged_(pairs.judged_pairs()),
      missing_(pairs.missing()),
      unchanged_(look_around({}, complete_optimally(pairs))) {}

/// Adds what the slopes at a point say of points further away. ln lambda is convex in all logarithms: it
/// stays above its tangent plane there, which missing pairs do not tilt.
ChangedSet ChangeableSet::look_around(std::vector<std::size_t> changed, Completion whole) const {
    ChangedSet set;
    set.further.reserve(judged_.size());
    for (const auto& [p, q] : judged_) {
        const auto i = static_cast<Index>(p);
        const auto j = static_cast<Index>(q);
        const double g = slope(whole, i, j);
        const double x = std::log(whole.matrix(i, j));
        set.further.push_back(std::min(g * (furthest - x), g * (-furthest - x)));
    }
    set.floor = std::log(whole.principal.lambda);
    for (const auto p : changed) {
        set.floor += set.further[p];
        set.further[p] = 0;
    }
    set.changed = std::move(changed);
    set.whole = std::move(whole);
    return set;
}

/// Whether lambda may be level in some direction: it is where the pairs held do not link the items.
bool ChangeableSet::may_be_level(const std::vector<std::size_t>& changed) const {
    if (missing_.empty() && changed.size() + 1 < pairs_.size()) return false; // Too few to cut an item off.
    PairMatrix held = pairs_;
    for (const auto p : changed) held.clear(judged_[p][0], judged_[p][1]);
    return !held.connected();
}

ChangedSet ChangeableSet::change(const std::vector<std::size_t>& changed, const ChangedSet& from,
                                 const SearchEnd& end) const {
    MatrixXd a = from.whole.matrix;
    for (const auto p : from.changed) {
        if (std::binary_search(changed.begin(), changed.end(), p)) continue;
        const auto [i, j] = judged_[p];
        a(static_cast<Index>(i), static_cast<Index>(j)) = pairs_.at(i, j);
        a(static_cast<Index>(j), static_cast<Index>(i)) = pairs_.at(j, i);
    }
    FreePairs free{missing_, {}, may_be_level(changed)};
    for (const auto p : changed) free.bounded.push_back(judged_[p]);
    const PrincipalPair& guess = from.whole.principal;
    return look_around(changed, least_lambda(std::move(a), free, potentials(guess), end, &guess));
}

ChangedSet ChangeableSet::change_one(const ChangedSet& from, std::size_t moving, const SearchEnd& end) const {
    std::vector<std::size_t> changed = from.changed;
    const auto place = std::lower_bound(changed.begin(), changed.end(), moving);
    if (place == changed.end() || *place != moving) changed.insert(place, moving);
    const FreePairs free{missing_, {judged_[moving]}, may_be_level({moving})};
    const PrincipalPair& guess = from.whole.principal;
    return look_around(std::move(changed),
                       least_lambda(from.whole.matrix, free, potentials(guess), end, &guess));
}

std::vector<double> ChangeableSet::outlook(const ChangedSet& at) const {
    // Glossary: see least_lambda.cpp. With one pair X and Y have two entries each.
    const auto& [lambda, w, v] = at.whole.principal;
    const MatrixXd& a = at.whole.matrix;
    MatrixXd g = w * v.transpose() - a;
    g.diagonal().array() += lambda;
    g = g.inverse().eval();
    g.noalias() -= w * v.transpose();
    std::vector<double> falls;
    for (const auto& [p, q] : judged_) {
        const auto i = static_cast<Index>(p);
        const auto j = static_cast<Index>(q);
        const double forth = v(i) * a(i, j) * w(j);
        const double back = v(j) * a(j, i) * w(i);
        const double bend = v(i) * a(i, j) * (g(j, i) * a(i, j) * w(j) - g(j, j) * a(j, i) * w(i)) -
                            v(j) * a(j, i) * (g(i, i) * a(i, j) * w(j) - g(i, j) * a(j, i) * w(i));
        const double tilt = forth - back;
        const double curvature = std::max(forth + back + 2 * bend, 1e-9 * (forth + back));
        const double x = std::log(a(i, j));
        const double to = std::clamp(x - tilt / curvature, -furthest, furthest);
        falls.push_back(std::min(0.0, tilt * (to - x) + 0.5 * curvature * (to - x) * (to - x)));
    }
    return falls;
}

} // namespace steelyard
