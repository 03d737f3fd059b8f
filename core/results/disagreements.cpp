#include "core/results/disagreements.hpp"

#include <algorithm>
#include <cmath>
#include <limits>

#include "core/results/group.hpp"

namespace steelyard {

double Disagreement::lead_movement() const {
    double most = 0;
    for (const auto& side : sides) {
        // An option that leads nobody any more, being excluded, has lost more than any lead.
        const double moved = side.lead_moves
                                 ? std::abs(*side.lead_moves)
                                 : (side.first_moves ? std::numeric_limits<double>::infinity() : 0.0);
        most = std::max(most, moved);
    }
    return most;
}

DisagreementSearch::DisagreementSearch(const Decision& decision, const Results& results, SolveCache& cache)
    : results_(results), appraiser_(decision, cache) {
    if (!results.group) return;
    for (std::size_t s = 0; s < results.group->spreads.size(); ++s) {
        constexpr double rounding = 1e-12;
        if (results.group->spreads[s].gsd > 1 + rounding) spreads_.push_back(s);
    }
}

bool DisagreementSearch::step() {
    if (next_ == spreads_.size()) return false;
    const std::size_t index = spreads_[next_];
    const Spread& spread = results_.group->spreads[index];
    Disagreement found{index, {take(spread, 0), take(spread, 1)}};
    // Put in behind all that it does not clearly exceed: rounding must not decide the order.
    constexpr double equal = 1e-9;
    const auto exceeds = [&](const Disagreement& other) {
        if (found.moves_first() != other.moves_first()) return found.moves_first();
        return found.lead_movement() > other.lead_movement() + equal;
    };
    auto at = found_.end();
    while (at != found_.begin() && exceeds(*(at - 1))) --at;
    found_.insert(at, std::move(found));
    ++next_;
    return true;
}

TakenSide DisagreementSearch::take(const Spread& spread, std::size_t which) {
    TakenSide side;
    side.judge = spread.furthest[which];
    side.ratio = spread.furthest_ratios[which];
    const Standing then =
        appraiser_.standing({.agreed = Voices::Agreed{spread.set, spread.a, spread.b, side.ratio}});
    side.first_moves = first_moves(results_, then);
    if (then.first) side.first = then.options[*then.first];
    if (!results_.first) return side;
    const auto leader =
        std::find(then.options.begin(), then.options.end(), results_.options[*results_.first]);
    if (leader == then.options.end() || !results_.lead_points) return side;
    const auto lead = lead_of(static_cast<std::size_t>(leader - then.options.begin()), then.scores);
    if (lead) side.lead_moves = *lead - *results_.lead_points;
    return side;
}

double DisagreementSearch::progress() const {
    return spreads_.empty() ? 1 : static_cast<double>(next_) / static_cast<double>(spreads_.size());
}

std::vector<Disagreement> disagreements(const Decision& decision, const Results& results, SolveCache& cache) {
    DisagreementSearch search(decision, results, cache);
    while (search.step()) {
    }
    return search.found();
}

} // namespace steelyard
