#include "core/results/session.hpp"

#include <utility>

#include "core/results/solve.hpp"

namespace steelyard {

void Session::open(Decision decision) {
    history_ = History(std::move(decision));
    results_.reset();
}

const Results& Session::results() {
    if (!results_ || solved_revision_ != revision()) {
        results_ = solve(decision());
        solved_revision_ = revision();
    }
    return *results_;
}

} // namespace steelyard
