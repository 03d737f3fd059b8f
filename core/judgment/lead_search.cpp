#include "core/judgment/lead_search.hpp"

#include <algorithm>
#include <cmath>
#include <map>
#include <numeric>
#include <optional>
#include <random>
#include <utility>

#include "core/judgment/lead_bounds.hpp"

namespace steelyard {
namespace {

constexpr int most_samples = 400;
constexpr int grid_steps = 16; ///< From one end of a range to the other: on 1/9 to 9 the steps of the scale.
constexpr int most_sweeps = 6;
constexpr double slice = 1e6;           ///< Operations, roughly: a millisecond.
constexpr double most_descending = 2e8; ///< Operations in all.

} // namespace

struct LeadSearch::Work {
    Work(OpenSet s, std::vector<Lead> l) : set(std::move(s)), leads(std::move(l)) {
        if (set.method() != Method::column_average) bounds.emplace(set, leads);
        const double n = static_cast<double>(set.size());
        evaluation = static_cast<double>(set.moving().size()) * (10 * n * n * n + 6000) + 100;
        most_boxes = set.size() <= 10 ? 2000 : std::max(50, static_cast<int>(2e6 / (n * n * n)));
        best.resize(leads.size());
        open.resize(leads.size());
        std::iota(open.begin(), open.end(), std::size_t{0});
    }
    Work(const Work&) = delete; // bounds refers to set and leads.

    struct Best {
        double value = 0;
        std::vector<double> answers;
    };
    enum class Phase { settled, bounds, samples, starts, descent, boxes };

    void advance();
    void look_at_bounds();
    void sample();
    void start_from_geometric_means();
    void descend();
    void cut_a_box();
    void try_answers(const std::vector<double>& answers);
    void after_searching();
    double on_grid(std::size_t answer, int step) const;
    int nearest_step(std::size_t answer, double value) const;
    std::size_t answers() const { return set.ranges().size(); }

    OpenSet set;
    std::vector<Lead> leads;
    std::optional<LeadBounds> bounds;

    LeadState state = LeadState::searching;
    Phase phase = Phase::settled;
    double cost = 0; ///< Of this slice.
    double evaluation = 0;
    std::vector<std::size_t> open;  ///< Leads not proven.
    std::vector<std::size_t> tried; ///< Those of them whose bounds were looked at, while they are looked at.
    std::vector<Best> best;         ///< Per lead: the lowest seen.
    std::vector<double> found;
    std::size_t lost = 0;

    std::mt19937_64 engine{4};
    int samples = 0;

    std::size_t descending = 0; ///< Place in `open`.
    std::size_t coordinate = 0;
    int sweep = 0;
    bool improved = false;
    double descended = 0;

    std::map<std::pair<double, int>, LeadBox> queue; ///< By bound, then by age.
    std::vector<LeadBox> halves;                     ///< Cut, not looked into.
    int boxes = 0;
    int most_boxes = 0;
};

/// Keeps the lowest value of each open lead; ends the search where one is lost.
void LeadSearch::Work::try_answers(const std::vector<double>& answers) {
    cost += evaluation;
    const Weights w = set.weights(answers);
    for (const auto lead : open) {
        const double value = lead_value(leads[lead], w);
        if (best[lead].answers.empty() || value < best[lead].value) best[lead] = {value, answers};
        if (value >= -lead_margin || state != LeadState::searching) continue;
        state = LeadState::lost;
        found = answers;
        lost = lead;
    }
}

double LeadSearch::Work::on_grid(std::size_t answer, int step) const {
    const auto& [low, high] = set.ranges()[answer];
    if (low == 1.0 / 9 && high == 9) return step >= 8 ? step - 7 : 1.0 / (9 - step);
    if (step == 0) return low;
    if (step == grid_steps) return high;
    return low * std::exp(std::log(high / low) * step / grid_steps);
}

int LeadSearch::Work::nearest_step(std::size_t answer, double value) const {
    int nearest = 0;
    for (int step = 1; step <= grid_steps; ++step) {
        const auto off = [&](int s) { return std::abs(std::log(on_grid(answer, s) / value)); };
        if (off(step) < off(nearest)) nearest = step;
    }
    return nearest;
}

void LeadSearch::Work::advance() {
    switch (phase) {
    case Phase::settled:
        if (set.moving().empty() || open.empty()) {
            // No answer changes anything.
            try_answers(std::vector<double>(answers(), 1.0));
            const bool kept = std::all_of(open.begin(), open.end(),
                                          [&](std::size_t lead) { return best[lead].value > lead_margin; });
            if (state != LeadState::lost) state = kept ? LeadState::kept : LeadState::unknown;
            return;
        }
        phase = bounds ? Phase::bounds : Phase::samples;
        return;
    case Phase::bounds: look_at_bounds(); return;
    case Phase::samples: sample(); return;
    case Phase::starts: start_from_geometric_means(); return;
    case Phase::descent: descend(); return;
    case Phase::boxes: cut_a_box(); return;
    }
}

void LeadSearch::Work::look_at_bounds() {
    // Geometric means lead by lead, since each takes its time; the eigenvector's bounds serve all leads.
    const bool one_by_one = set.method() == Method::geometric_mean;
    std::vector<std::size_t> asked;
    if (one_by_one) {
        asked.push_back(open.front());
        open.erase(open.begin());
    } else {
        asked.swap(open);
    }
    LeadBox box = bounds->whole(std::move(asked));
    cost += bounds->take_cost();
    tried.insert(tried.end(), box.leads.begin(), box.leads.end());
    if (!open.empty()) return;
    open = std::move(tried);
    if (open.empty()) {
        state = LeadState::kept;
        return;
    }
    box.leads = open;
    queue.emplace(std::pair{box.bound, boxes}, std::move(box));
    for (const auto& at : bounds->least_at()) {
        if (state == LeadState::searching) try_answers(at);
    }
    phase = Phase::samples;
}

/// Corners and random steps in turn.
void LeadSearch::Work::sample() {
    std::vector<double> x(answers());
    for (std::size_t p = 0; p < x.size(); ++p) {
        const auto roll = engine();
        const auto steps = static_cast<std::uint64_t>(grid_steps);
        x[p] = on_grid(p, samples % 2 == 0 ? static_cast<int>(roll % 2 * steps)
                                           : static_cast<int>(roll % (steps + 1)));
    }
    try_answers(x);
    descended += evaluation;
    if (++samples == most_samples || descended > most_descending) {
        phase = set.method() == Method::geometric_mean ? Phase::descent : Phase::starts;
        descended = 0;
    }
}

/// The answers that turn the lead of the geometric means turn that of other weights too, or nearly.
void LeadSearch::Work::start_from_geometric_means() {
    phase = Phase::descent;
    const OpenSet means = set.with_geometric_means();
    LeadBounds by_means(means, leads);
    by_means.whole(open);
    cost += by_means.take_cost();
    for (const auto& at : by_means.least_at()) {
        if (state == LeadState::searching) try_answers(at);
    }
}

void LeadSearch::Work::descend() {
    const std::size_t lead = open[descending];
    const std::size_t p = coordinate;
    std::vector<double> x = best[lead].answers;
    const double before = best[lead].value;
    const int here = nearest_step(p, x[p]);
    const double stood = x[p];
    for (const int step : {0, 4, 8, 12, 16, here - 2, here - 1, here + 1, here + 2}) {
        if (step < 0 || step > grid_steps) continue;
        x[p] = on_grid(p, step);
        if (x[p] != stood) try_answers(x);
        if (state == LeadState::lost) return;
        descended += evaluation;
    }
    constexpr double worth_going_on = 1e-12;
    improved = improved || best[lead].value < before - worth_going_on;
    if (++coordinate < answers()) return;
    coordinate = 0;
    const bool again = improved && ++sweep < most_sweeps;
    improved = false;
    if (again && descended < most_descending) return;
    sweep = 0;
    if (++descending == open.size() || descended >= most_descending) after_searching();
}

void LeadSearch::Work::after_searching() {
    const bool settled = !bounds || std::any_of(open.begin(), open.end(),
                                                [&](std::size_t lead) { return bounds->exact(lead); });
    // Where a bound is the least value itself, and neither above nor below 0, nothing more can be said.
    if (settled) state = LeadState::unknown;
    phase = Phase::boxes;
}

/// Cuts the box of least bound; its halves are looked into one by one.
void LeadSearch::Work::cut_a_box() {
    if (halves.empty()) {
        if (queue.empty() || boxes >= most_boxes) {
            state = queue.empty() ? LeadState::kept : LeadState::unknown;
            return;
        }
        halves = bounds->halves(queue.begin()->second);
        queue.erase(queue.begin());
        if (halves.empty()) state = LeadState::unknown;
        return;
    }
    LeadBox box = std::move(halves.back());
    halves.pop_back();
    ++boxes;
    bounds->bound(box);
    cost += bounds->take_cost();
    if (box.leads.empty()) return;
    std::vector<double> centre(answers());
    for (std::size_t p = 0; p < centre.size(); ++p) centre[p] = std::exp((box.low[p] + box.high[p]) / 2);
    try_answers(centre);
    queue.emplace(std::pair{box.bound, boxes}, std::move(box));
}

LeadSearch::LeadSearch(OpenSet set, std::vector<Lead> leads)
    : work_(std::make_unique<Work>(std::move(set), std::move(leads))) {}
LeadSearch::~LeadSearch() = default;
LeadSearch::LeadSearch(LeadSearch&&) noexcept = default;
LeadSearch& LeadSearch::operator=(LeadSearch&&) noexcept = default;

bool LeadSearch::step() {
    work_->cost = 0;
    while (work_->state == LeadState::searching && work_->cost < slice) work_->advance();
    return work_->state == LeadState::searching;
}

double LeadSearch::progress() const {
    const Work& w = *work_;
    if (w.state != LeadState::searching) return 1;
    switch (w.phase) {
    case Work::Phase::settled:
    case Work::Phase::bounds: return 0;
    case Work::Phase::samples: return .1 * w.samples / most_samples;
    case Work::Phase::starts: return .1;
    case Work::Phase::descent:
        return .1 + .2 * static_cast<double>(w.descending) / static_cast<double>(w.open.size());
    case Work::Phase::boxes: break;
    }
    return .3 + .7 * std::min(1.0, static_cast<double>(w.boxes) / w.most_boxes);
}

LeadState LeadSearch::state() const {
    return work_->state;
}
const std::vector<double>& LeadSearch::answers() const {
    return work_->found;
}
std::size_t LeadSearch::lost_lead() const {
    return work_->lost;
}
std::size_t LeadSearch::boxes() const {
    return static_cast<std::size_t>(work_->boxes);
}

} // namespace steelyard
