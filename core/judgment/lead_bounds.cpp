#include "core/judgment/lead_bounds.hpp"

#include <algorithm>
#include <cassert>
#include <cmath>
#include <limits>
#include <utility>

#include "core/judgment/least_sum.hpp"

namespace steelyard {
namespace {

using Eigen::Index;
using Eigen::VectorXd;

Index at(std::size_t i) {
    return static_cast<Index>(i);
}

/// The logarithms at the middle of a box.
VectorXd centre_logs(const AffineLogs& logs, const LeadBox& box) {
    VectorXd y = logs.start;
    for (Index p = 0; p < logs.columns.cols(); ++p) {
        const auto q = static_cast<std::size_t>(p);
        y += logs.columns.col(p) * ((box.low[q] + box.high[q]) / 2);
    }
    return y;
}

} // namespace

LeadBounds::LeadBounds(const OpenSet& set, const std::vector<Lead>& leads) : set_(set), leads_(leads) {
    assert(set.method() != Method::column_average);
    const auto& judges = set.moving();
    const std::size_t answers = set.ranges().size();
    weight_of_.assign(answers, 0.0);
    for (std::size_t s = 0; s < judges.size(); ++s) {
        logs_.push_back(affine_logs(judges[s], answers));
        PairMatrix pairs = judges[s].known;
        for (const auto& entry : judges[s].open) {
            pairs.set(entry.i, entry.j, 1);
            weight_of_[entry.answer] = std::max(weight_of_[entry.answer], entry.factor * judges[s].share);
        }
        if (set.method() != Method::eigenvector) continue;
        for (const auto& [i, j] : pairs.missing()) {
            completed_.push_back({s, i, j, weight_of_.size()});
            weight_of_.push_back(judges[s].share);
        }
    }
    if (set.method() != Method::geometric_mean || (set.arithmetic() && judges.size() > 1)) return;
    together_ =
        AffineLogs{VectorXd::Zero(at(set.size())), Eigen::MatrixXd::Zero(at(set.size()), at(answers)), true};
    for (std::size_t s = 0; s < judges.size(); ++s) {
        const double share = set.arithmetic() ? 1 : judges[s].share;
        together_->start += share * logs_[s].start;
        together_->columns += share * logs_[s].columns;
        together_->by_pairs = together_->by_pairs && logs_[s].by_pairs;
    }
    for (std::size_t i = 0; i < set.size() && !set.arithmetic(); ++i)
        together_->start(at(i)) += set.settled()[i];
}

double LeadBounds::take_cost() {
    return std::exchange(cost_, 0);
}

bool LeadBounds::exact(std::size_t lead) const {
    const bool one_form = !leads_[lead].largest || leads_[lead].rest <= 0;
    return together_ && together_->by_pairs && one_form && !too_many_orders_;
}

LeadBox LeadBounds::whole(std::vector<std::size_t> leads) {
    LeadBox box;
    box.leads = std::move(leads);
    for (const auto& range : set_.ranges()) {
        box.low.push_back(std::log(range.low));
        box.high.push_back(std::log(range.high));
    }
    for (std::size_t k = 0; k < completed_.size(); ++k) {
        box.low.push_back(-std::numeric_limits<double>::infinity());
        box.high.push_back(std::numeric_limits<double>::infinity());
    }
    if (set_.method() == Method::eigenvector) {
        for (std::size_t s = 0; s < set_.moving().size(); ++s) {
            const bool complete = std::none_of(completed_.begin(), completed_.end(),
                                               [&](const Completed& c) { return c.judge == s; });
            box.judges.emplace_back();
            const EntryBounds known = entries(box, s);
            if (complete) {
                box.judges[s].right = first_ratio_bounds(known);
                continue;
            }
            const VectorXd y = centre_logs(logs_[s], box);
            box.judges[s].right = far_ratio_bounds(known, y);
            box.judges[s].left = far_ratio_bounds(known.transposed(), -y);
            narrow_completed(box, s);
        }
    }
    at_whole_ = true;
    bound(box);
    at_whole_ = false;
    return box;
}

std::vector<LeadBox> LeadBounds::halves(const LeadBox& box) const {
    std::size_t widest = 0;
    double width = 0;
    for (std::size_t p = 0; p < box.low.size(); ++p) {
        const double here = (box.high[p] - box.low[p]) * weight_of_[p];
        if (here <= width) continue;
        widest = p;
        width = here;
    }
    constexpr double narrow_enough = 1e-9;
    std::vector<LeadBox> halves;
    if (width < narrow_enough) return halves;
    halves.assign(2, box);
    halves[0].high[widest] = halves[1].low[widest] = (box.low[widest] + box.high[widest]) / 2;
    return halves;
}

EntryBounds LeadBounds::entries(const LeadBox& box, std::size_t judge) const {
    const OpenJudge& of = set_.moving()[judge];
    const Index n = at(set_.size());
    EntryBounds bounds{Grid::Ones(n, n), Grid::Ones(n, n)};
    const auto put = [&](std::size_t i, std::size_t j, double low, double high) {
        bounds.low(at(i), at(j)) = low;
        bounds.high(at(i), at(j)) = high;
        bounds.low(at(j), at(i)) = 1 / high;
        bounds.high(at(j), at(i)) = 1 / low;
    };
    for (const auto& [i, j] : of.known.judged_pairs()) put(i, j, of.known.at(i, j), of.known.at(i, j));
    for (const auto& entry : of.open) {
        put(entry.i, entry.j, std::exp(entry.fixed + entry.factor * box.low[entry.answer]),
            std::exp(entry.fixed + entry.factor * box.high[entry.answer]));
    }
    for (const auto& c : completed_) {
        if (c.judge == judge) put(c.i, c.j, std::exp(box.low[c.at]), std::exp(box.high[c.at]));
    }
    return bounds;
}

/// a_ij^2 = (w_i / w_j) (v_j / v_i) where a missing pair is completed optimally. False where that leaves
/// nothing of the box.
bool LeadBounds::narrow_completed(LeadBox& box, std::size_t judge) const {
    const auto& [right, left] = box.judges[judge];
    constexpr double rounding = 1e-12;
    for (const auto& c : completed_) {
        if (c.judge != judge) continue;
        const double high = (std::log(right(at(c.i), at(c.j))) + std::log(left(at(c.j), at(c.i)))) / 2;
        const double low = -(std::log(right(at(c.j), at(c.i))) + std::log(left(at(c.i), at(c.j)))) / 2;
        box.high[c.at] = std::min(box.high[c.at], high + rounding);
        box.low[c.at] = std::max(box.low[c.at], low - rounding);
        if (box.low[c.at] > box.high[c.at]) return false;
    }
    return true;
}

/// One round of tightening for one judge. False where the box turned out to hold nothing.
bool LeadBounds::narrow(LeadBox& box, std::size_t judge, bool first, double& gain) {
    const EntryBounds known = entries(box, judge);
    auto& [right, left] = box.judges[judge];
    const auto tighten = [&](Grid& u, const EntryBounds& bounds) {
        if (first) {
            u = u.cwiseMin(first_ratio_bounds(bounds));
            close_ratio_bounds(u);
        }
        gain = std::max(gain, tighten_ratio_bounds(u, bounds));
        const auto n = static_cast<double>(u.rows());
        cost_ += 6 * n * n * n * (n <= 12 ? n : 2);
    };
    tighten(right, known);
    if (left.size() == 0) return true;
    tighten(left, known.transposed());
    return narrow_completed(box, judge);
}

void LeadBounds::bound(LeadBox& box) {
    if (set_.method() != Method::eigenvector) {
        prove(box);
        return;
    }
    const int most_rounds = set_.size() <= 40 ? 40 : 3;
    constexpr double worth_going_on = 1e-3;
    for (int round = 0; round < most_rounds; ++round) {
        double gain = 0;
        for (std::size_t s = 0; s < box.judges.size(); ++s) {
            if (narrow(box, s, round == 0, gain)) continue;
            box.leads.clear();
            return;
        }
        prove(box);
        if (box.leads.empty() || gain < worth_going_on) return;
    }
}

/// Takes away the leads that are proven and sets the bound of the others.
void LeadBounds::prove(LeadBox& box) {
    const Grid combined = combined_ratios(box);
    box.bound = std::numeric_limits<double>::infinity();
    std::vector<std::size_t> left;
    for (const auto lead : box.leads) {
        const double least = lower(box, lead, combined);
        if (least > lead_margin) continue;
        left.push_back(lead);
        box.bound = std::min(box.bound, least);
    }
    box.leads = std::move(left);
}

/// Bounds on the ratios of the combined weights; empty where they are not combined by ratios.
Grid LeadBounds::combined_ratios(const LeadBox& box) const {
    if (set_.arithmetic()) return {};
    if (together_) return ratio_bounds(*together_, box.low, box.high);
    const Index n = at(set_.size());
    if (set_.moving().size() == 1 && set_.moving().front().share == 1) return box.judges.front().right;
    Grid u = Grid::Ones(n, n);
    for (Index i = 0; i < n; ++i) {
        for (Index j = 0; j < n; ++j) {
            if (i == j) continue;
            double log =
                set_.settled()[static_cast<std::size_t>(i)] - set_.settled()[static_cast<std::size_t>(j)];
            for (std::size_t s = 0; s < box.judges.size(); ++s)
                log += set_.moving()[s].share * std::log(box.judges[s].right(i, j));
            u(i, j) = std::exp(log) * (1 + 1e-12);
        }
    }
    return u;
}

/// A lower bound of a lead's forms. With the largest weight as divisor and rest <= 0, the lead is above 0
/// exactly where the forms of all items are; with rest > 0, where one of them is. In both cases it is enough
/// that the form of each item is while that item is the largest.
double LeadBounds::lower(const LeadBox& box, std::size_t index, const Grid& combined) {
    const Lead& lead = leads_[index];
    if (!lead.largest) return lower_form(box, lead_form(lead, 0), combined);
    double all = std::numeric_limits<double>::infinity();
    double any = -all;
    for (std::size_t k = 0; k < set_.size(); ++k) {
        if (lead.part[k] <= 0) continue;
        const auto form = lead_form(lead, k);
        const double least = lower_form(box, form, combined);
        any = std::max(any, least);
        if (combined.size() == 0) {
            all = std::min(all, least);
            continue;
        }
        bool possible = true;
        Grid capped = combined;
        for (std::size_t i = 0; i < set_.size(); ++i) {
            if (lead.part[i] <= 0) continue;
            possible = possible && combined(at(k), at(i)) >= 1;
            capped(at(i), at(k)) = std::min(capped(at(i), at(k)), 1.0);
        }
        if (possible) all = std::min(all, std::max(least, least_mean(form, capped)));
    }
    return lead.rest > 0 ? std::max(all, any) : all;
}

double LeadBounds::lower_form(const LeadBox& box, const std::vector<double>& form, const Grid& combined) {
    const auto n = static_cast<double>(set_.size());
    cost_ += 10 * n * n;
    double by_ratios = 0;
    if (!set_.arithmetic()) {
        by_ratios = least_mean(form, combined);
    } else {
        for (std::size_t i = 0; i < form.size(); ++i) by_ratios += form[i] * set_.settled()[i];
        for (std::size_t s = 0; s < set_.moving().size(); ++s) {
            const double share = set_.moving()[s].share;
            by_ratios += share * (set_.method() == Method::eigenvector
                                      ? least_mean(form, box.judges[s].right)
                                      : least_mean(form, ratio_bounds(logs_[s], box.low, box.high)));
        }
    }
    return together_ ? std::max(by_ratios, lower_by_logs(box, form)) : by_ratios;
}

/// By the logarithms of geometric means.
double LeadBounds::lower_by_logs(const LeadBox& box, const std::vector<double>& form) {
    const std::size_t n = set_.size();
    VectorXd d(at(n));
    double settled = 0;
    for (std::size_t i = 0; i < n; ++i) {
        d(at(i)) = form[i];
        settled += form[i] * set_.settled()[i];
    }
    // One judge's weights among others' settled ones: share * (form . w) + settled, and the w sum to 1.
    if (set_.arithmetic()) d.array() = d.array() * set_.moving().front().share + settled;

    // The weights' sum, to set the bound against: no more than this.
    const VectorXd reach = together_->columns.cwiseAbs() *
                           (Eigen::Map<const VectorXd>(box.high.data(), at(set_.ranges().size())) -
                            Eigen::Map<const VectorXd>(box.low.data(), at(set_.ranges().size()))) /
                           2;
    const VectorXd centre = centre_logs(*together_, box);
    double most = 0;
    for (Index i = 0; i < at(n); ++i) most += std::exp(centre(i) + reach(i));

    std::optional<LeastSum> least;
    if (together_->by_pairs) {
        std::vector<LogShift> shifts;
        std::vector<std::size_t> answer_of;
        for (std::size_t p = 0; p < set_.ranges().size(); ++p) {
            Index i = 0;
            Index j = 0;
            const double up = together_->columns.col(at(p)).maxCoeff(&i);
            together_->columns.col(at(p)).minCoeff(&j);
            if (up == 0) continue;
            shifts.push_back({static_cast<std::size_t>(i), static_cast<std::size_t>(j), up * box.low[p],
                              up * box.high[p]});
            answer_of.push_back(p);
        }
        least = least_sum(together_->start, shifts, d);
        cost_ += 200.0 * static_cast<double>(n * (shifts.size() + 1));
        if (!least) too_many_orders_ = true;
        if (least && at_whole_) {
            std::vector<double> answers(set_.ranges().size(), 1.0);
            for (std::size_t k = 0; k < shifts.size(); ++k) {
                const std::size_t p = answer_of[k];
                const AnswerRange& range = set_.ranges()[p];
                // The ends themselves where it stops there, not what exp makes of their logarithms.
                answers[p] = least->at[k] <= shifts[k].low ? range.low
                             : least->at[k] >= shifts[k].high
                                 ? range.high
                                 : std::exp(least->at[k] / together_->columns.col(at(p)).maxCoeff());
            }
            least_at_.push_back(std::move(answers));
        }
    }
    const double bound = least ? least->bound : linear_bound(*together_, box.low, box.high, d);
    return bound > 0 ? bound / most : bound;
}

} // namespace steelyard
