#include "core/results/session.hpp"

#include <utility>

#include "core/decision/fingerprint.hpp"
#include "core/results/solve.hpp"

namespace steelyard {

void Session::open(Decision decision) {
    history_ = History(std::move(decision));
    results_.reset();
    sha256_.clear();
}

const Results& Session::results() {
    if (!results_ || solved_revision_ != revision()) {
        results_ = solve(decision(), cache_);
        solved_revision_ = revision();
    }
    return *results_;
}

const std::string& Session::sha256() {
    if (sha256_.empty() || hashed_revision_ != revision()) {
        sha256_ = decision_sha256(decision());
        hashed_revision_ = revision();
    }
    return sha256_;
}

} // namespace steelyard
