#include "core/judgment/fewest_changes.hpp"

#include <algorithm>
#include <cassert>
#include <cmath>
#include <numeric>
#include <optional>
#include <utility>

#include "core/judgment/changed_set.hpp"

namespace steelyard {
namespace {

using Subset = std::vector<std::size_t>;

constexpr std::size_t most_exact_items = 10;
constexpr std::size_t most_exact_changes = 3;

/// Floors are below what can be reached by more than the rounding of slopes, times the width of the scale.
constexpr double floor_rounding = 1e-9;

/// Lambdas this near to each other, relative, are equal.
constexpr double tie = 1e-12;

/// Lambda is exact to rounding with this; see SearchEnd.
constexpr double roughly_settled = 1e-5;

/// So many subsets may be passed over within a slice: about as much work as one minimisation.
constexpr int most_passed_over = 200;

} // namespace

class FewestChangesSearch::Work {
public:
    Work(const PairMatrix& pairs, ConsistencyLimit limit)
        : set_(pairs),
          exact_(pairs.size() <= most_exact_items),
          singles_(count()),
          doubles_(exact_ ? count() * count() : 0) {
        assert(pairs.size() > 2 && limit.random_index > 0 && limit.ratio > 0);
        const auto n = static_cast<double>(pairs.size());
        limit_ = n + (n - 1) * limit.random_index * (limit.ratio + 1e-9);
        if (set_.unchanged().whole.principal.lambda <= limit_) {
            finish(set_.unchanged(), true);
        } else {
            subset_ = {0};
        }
    }

    bool step() {
        if (finished_) return false;
        if (current_) {
            grow();
        } else {
            search();
        }
        return !finished_;
    }

    double progress() const { return finished_ ? 1 : progress_; }

    const FewestChanges& answer() const {
        assert(finished_);
        return answer_;
    }

private:
    std::size_t count() const { return set_.judged().size(); }

    // ---- All subsets of one size, then of the next ----

    /// Goes on through the subsets until one was minimised.
    void search() {
        for (int passed = 0; passed < most_passed_over; ++passed) {
            const bool worked = visit();
            if (worked && waiting_) {
                waiting_ = false;
                return; // The same subset again, with more known.
            }
            if (!next_subset()) {
                end_of_size();
                return;
            }
            if (worked) return;
        }
    }

    /// Looks at the present subset; true if something was minimised. `waiting_` is set where that was only
    /// preparation.
    bool visit() {
        if (subset_.size() == 1) {
            // Of small sets every single change is wanted: they begin the larger subsets.
            if (!exact_ && floor(set_.unchanged()) > ceiling()) return false;
            auto& found = singles_[subset_[0]];
            found = std::make_unique<ChangedSet>(minimise(set_.unchanged(), !exact_));
            consider(*found);
            if (!exact_) found.reset();
            return true;
        }
        if (beyond_reach()) return false;
        if (subset_.size() == 2) {
            auto& found = doubles_[subset_[0] * count() + subset_[1]];
            found = std::make_unique<ChangedSet>(minimise(*best_start(), true));
            consider(*found);
            return true;
        }
        for (std::size_t out = subset_.size(); out-- > 0;) {
            Subset pair = subset_;
            pair.erase(pair.begin() + static_cast<std::ptrdiff_t>(out));
            auto& found = doubles_[pair[0] * count() + pair[1]];
            if (found) continue;
            std::swap(pair, subset_);
            found = std::make_unique<ChangedSet>(minimise(*best_start(), false));
            std::swap(pair, subset_);
            waiting_ = true;
            return true;
        }
        consider(minimise(*best_start(), true));
        return true;
    }

    /// The floor that a smaller subset, minimised already, puts under this one.
    double floor(const ChangedSet& below) const {
        return std::accumulate(subset_.begin(), subset_.end(), below.floor,
                               [&](double sum, std::size_t p) { return sum + below.further[p]; });
    }

    /// Above this a floor is of no interest, in ln lambda.
    double ceiling() const {
        return std::log(best_ ? std::min(limit_, best_->whole.principal.lambda) : limit_) + floor_rounding;
    }

    template<class Visit>
    void each_below(Visit visit) const {
        visit(set_.unchanged());
        for (const auto p : subset_) {
            if (singles_[p]) visit(*singles_[p]);
        }
        if (subset_.size() < 3) return;
        for (std::size_t p = 0; p < 2; ++p) {
            for (std::size_t q = p + 1; q < 3; ++q) {
                const auto& found = doubles_[subset_[p] * count() + subset_[q]];
                if (found) visit(*found);
            }
        }
    }

    bool beyond_reach() const {
        const double highest = ceiling();
        bool beyond = false;
        each_below([&](const ChangedSet& below) { beyond = beyond || floor(below) > highest; });
        return beyond;
    }

    const ChangedSet* best_start() const {
        const ChangedSet* start = nullptr;
        each_below([&](const ChangedSet& below) {
            if (start == nullptr || below.whole.principal.lambda < start->whole.principal.lambda)
                start = &below;
        });
        return start;
    }

    ChangedSet minimise(const ChangedSet& start, bool may_give_up) const {
        SearchEnd end{roughly_settled};
        if (may_give_up) end.give_up_above = std::exp(ceiling());
        return set_.change(subset_, start, end);
    }

    void consider(const ChangedSet& found) {
        const double lambda = found.whole.principal.lambda;
        if (lambda > limit_) return;
        if (!best_ || lambda < best_->whole.principal.lambda * (1 - tie)) best_ = found;
    }

    /// The next subset of the same size in item order.
    bool next_subset() {
        ++visited_;
        for (std::size_t k = subset_.size(); k-- > 0;) {
            if (subset_[k] + (subset_.size() - k) >= count()) continue;
            std::iota(subset_.begin() + static_cast<std::ptrdiff_t>(k), subset_.end(), subset_[k] + 1);
            if (k == 0) show_progress();
            return true;
        }
        return false;
    }

    void end_of_size() {
        if (best_) {
            finish(*best_, true);
            return;
        }
        const std::size_t size = subset_.size() + 1;
        if (exact_ && size <= most_exact_changes && size <= count()) {
            subset_.resize(size);
            std::iota(subset_.begin(), subset_.end(), std::size_t{0});
            visited_ = 0;
            return;
        }
        progress_ = std::max(progress_, share_of_exact());
        current_ = set_.unchanged();
        rank_candidates();
    }

    // ---- One change after the other, beyond what can be searched ----

    /// Tries the next candidate; when all were tried takes the best and ranks anew.
    void grow() {
        if (dropping_) {
            drop();
            return;
        }
        if (next_candidate_ < candidates_.size()) {
            ChangedSet found = with(candidates_[next_candidate_++]);
            if (!grown_ || found.whole.principal.lambda < grown_->whole.principal.lambda * (1 - tie))
                grown_ = std::move(found);
            return;
        }
        current_ = std::move(*grown_);
        grown_.reset();
        const double lambda = current_->whole.principal.lambda;
        const double way = std::log(set_.unchanged().whole.principal.lambda / limit_);
        const double left = std::max(0.0, std::log(lambda / limit_));
        // What is left out again at the end is the rest.
        const double grown = .95 * (1 - left / way);
        progress_ = std::max(progress_, share_of_exact() + (1 - share_of_exact()) * grown);
        if (lambda > limit_) {
            rank_candidates();
        } else if (many()) {
            finish(*current_, false);
        } else {
            dropping_ = true;
            next_candidate_ = 0;
        }
    }

    /// From so many changes on they are no longer minimised together, only the newest or the one that gains
    /// most: no person makes so many changes one by one, and the work would grow with their cube.
    bool many() const { return current_->changed.size() >= 40; }

    ChangedSet with(std::size_t pair) const {
        if (many()) return set_.change_one(*current_, pair, {roughly_settled});
        Subset changed = current_->changed;
        changed.insert(std::lower_bound(changed.begin(), changed.end(), pair), pair);
        return set_.change(changed, *current_, {roughly_settled});
    }

    /// The pairs that promise most, a few of them.
    void rank_candidates() {
        const std::size_t few = many() ? 1 : 8;
        const std::vector<double> outlook = set_.outlook(*current_);
        candidates_.clear();
        for (std::size_t p = 0; p < count(); ++p) {
            const auto& changed = current_->changed;
            if (many() || !std::binary_search(changed.begin(), changed.end(), p)) candidates_.push_back(p);
        }
        // Rounding must not choose between equals: it differs from machine to machine.
        const auto rounded = [&](std::size_t p) { return std::round(outlook[p] * 1e9); };
        std::stable_sort(candidates_.begin(), candidates_.end(),
                         [&](std::size_t p, std::size_t q) { return rounded(p) < rounded(q); });
        if (candidates_.size() > few) candidates_.resize(few);
        next_candidate_ = 0;
    }

    /// Leaves out changes that turned out not to be needed.
    void drop() {
        if (next_candidate_ >= current_->changed.size()) {
            finish(*current_, false);
            return;
        }
        Subset fewer = current_->changed;
        fewer.erase(fewer.begin() + static_cast<std::ptrdiff_t>(next_candidate_));
        ChangedSet found = set_.change(fewer, *current_, {roughly_settled});
        if (found.whole.principal.lambda <= limit_) {
            current_ = std::move(found);
        } else {
            ++next_candidate_;
        }
    }

    // ---- The end ----

    void finish(const ChangedSet& found, bool proven) {
        ChangedSet last = found;
        // To the last digits, unless there are so many that they were never at their minimum together.
        const bool exact = proven || !(current_ && many());
        if (exact && !found.changed.empty()) last = set_.change(found.changed, found, {});
        answer_.proven = proven;
        answer_.lambda = last.whole.principal.lambda;
        for (const auto p : last.changed) {
            const auto [i, j] = set_.judged()[p];
            answer_.changes.push_back(
                {i, j, last.whole.matrix(static_cast<Eigen::Index>(i), static_cast<Eigen::Index>(j))});
        }
        finished_ = true;
    }

    double share_of_exact() const { return exact_ ? .9 : .1; }

    /// By the size of the subsets, and within a size by how many were looked at. Most of the time goes into
    /// pairs of changes.
    void show_progress() {
        static constexpr double begins[] = {0, .05, .5, .9};
        const std::size_t size = subset_.size();
        double subsets = 1;
        for (std::size_t k = 0; k < size; ++k)
            subsets *= static_cast<double>(count() - k) / static_cast<double>(k + 1);
        const double part = static_cast<double>(visited_) / subsets;
        const double whole =
            exact_ ? begins[size - 1] + part * (begins[size] - begins[size - 1]) : part * share_of_exact();
        progress_ = std::max(progress_, std::min(whole, 1.0));
    }

    ChangeableSet set_;
    bool exact_;
    double limit_ = 0;
    double progress_ = 0;
    bool finished_ = false;
    FewestChanges answer_;

    Subset subset_;
    std::size_t visited_ = 0; ///< Subsets of the present size.
    bool waiting_ = false;
    std::vector<std::unique_ptr<ChangedSet>> singles_;
    std::vector<std::unique_ptr<ChangedSet>> doubles_;
    std::optional<ChangedSet> best_;

    std::optional<ChangedSet> current_; ///< What was reached one change after the other.
    std::optional<ChangedSet> grown_;
    Subset candidates_;
    std::size_t next_candidate_ = 0;
    bool dropping_ = false;
};

FewestChangesSearch::FewestChangesSearch(const PairMatrix& pairs, ConsistencyLimit limit)
    : work_(std::make_unique<Work>(pairs, limit)) {}
FewestChangesSearch::~FewestChangesSearch() = default;
FewestChangesSearch::FewestChangesSearch(FewestChangesSearch&&) noexcept = default;
FewestChangesSearch& FewestChangesSearch::operator=(FewestChangesSearch&&) noexcept = default;

bool FewestChangesSearch::step() {
    return work_->step();
}

double FewestChangesSearch::progress() const {
    return work_->progress();
}

const FewestChanges& FewestChangesSearch::answer() const {
    return work_->answer();
}

FewestChanges fewest_changes(const PairMatrix& pairs, ConsistencyLimit limit) {
    FewestChangesSearch search(pairs, limit);
    while (search.step()) {
    }
    return search.answer();
}

} // namespace steelyard
