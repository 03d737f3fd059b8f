#include "core/results/enough.hpp"

#include <algorithm>
#include <map>
#include <optional>
#include <random>
#include <set>
#include <utility>

#include "core/decision/lookup.hpp"
#include "core/judgment/judged_set.hpp"
#include "core/judgment/lead_search.hpp"
#include "core/results/open_leads.hpp"
#include "core/results/solve.hpp"

namespace steelyard {
namespace {

constexpr double margin = 1e-9;  ///< Scores closer than this share a rank.
constexpr int most_solved = 600; ///< Answers tried out by solving.
constexpr int first_tries = 200; ///< Of them corners and random ones.
constexpr int scale_steps = 16;

/// The steps of the scale: 0 is 1/9, 8 is 1, 16 is 9.
double on_scale(int step) {
    return step >= 8 ? step - 7 : 1.0 / (9 - step);
}

} // namespace

struct EnoughSearch::Work {
    enum class Phase { start, leads, try_out, done };

    bool step();
    void start();
    void end(EnoughAnswer::Verdict verdict, std::string why = {});
    void look_at_leads();
    void try_out();
    double gap_with(const std::vector<double>& ratios);
    bool found() const { return answer.verdict == EnoughAnswer::Verdict::found_yes; }

    Decision decision;
    Results results;
    OpenPairs open;
    SolveCache cache; ///< Of the decisions in which answers are tried out.

    Phase phase = Phase::start;
    OpenLeadsFinding finding;
    std::optional<LeadSearch> search;
    EnoughAnswer answer;

    // Trying out: corners and random answers, then single answers changed from the best of them.
    std::mt19937_64 engine{4};
    int solved = 0;
    std::vector<int> best; ///< Steps of the scale.
    double least = 0;      ///< The smallest gap seen.
    std::size_t coordinate = 0;
    int change = 0;
    bool improved = false;
};

void EnoughSearch::Work::end(EnoughAnswer::Verdict verdict, std::string why) {
    answer.verdict = verdict;
    answer.why = std::move(why);
    phase = Phase::done;
}

/// How far the option in first place now is ahead of the best of the others once the answers are entered;
/// below 0 where another is ahead. Keeps answers that change first place.
double EnoughSearch::Work::gap_with(const std::vector<double>& ratios) {
    const Results then = solve(with_answers(decision, open, ratios), cache);
    const Id& leader = results.options[*results.first];
    std::optional<double> own;
    std::optional<double> best_other;
    Id other;
    for (std::size_t o = 0; o < then.options.size(); ++o) {
        if (then.options[o] == leader) {
            own = then.scores[o];
        } else if (!best_other || then.scores[o] > *best_other) {
            best_other = then.scores[o];
            other = then.options[o];
        }
    }
    if (!best_other) return own ? 1 : 0; // Alone, or with nobody left there is no other first place.
    const double gap = own ? *own - *best_other : -1;
    if (gap < -margin) {
        answer.answers.clear();
        for (std::size_t p = 0; p < open.pairs.size(); ++p)
            answer.answers.push_back({open.pairs[p][0], open.pairs[p][1], ratios[p]});
        answer.first_then = other;
        end(EnoughAnswer::Verdict::found_yes);
    }
    return gap;
}

void EnoughSearch::Work::start() {
    finding = find_open_leads(decision, results, open);
    if (finding.nothing_changes) {
        end(EnoughAnswer::Verdict::proven_no, finding.why);
    } else if (finding.leads) {
        search.emplace(finding.leads->set, finding.leads->leads);
        phase = Phase::leads;
    } else if (finding.try_out) {
        phase = Phase::try_out;
    } else {
        end(EnoughAnswer::Verdict::not_known, finding.why);
    }
}

void EnoughSearch::Work::look_at_leads() {
    if (search->step()) return;
    const OpenLeads& leads = *finding.leads;
    switch (search->state()) {
    case LeadState::kept: end(EnoughAnswer::Verdict::proven_no); return;
    case LeadState::lost: {
        std::vector<double> ratios(open.pairs.size(), 1.0);
        for (std::size_t k = 0; k < leads.who.size(); ++k) {
            const auto p = leads.who[k];
            ratios[p] = leads.turned[k] ? 1 / search->answers()[k] : search->answers()[k];
        }
        gap_with(ratios);
        if (found()) return;
        finding.why =
            "Some answers move an option across a must, but none was found that changes first place.";
        break;
    }
    case LeadState::searching:
    case LeadState::unknown: break;
    }
    if (finding.try_out) {
        phase = Phase::try_out;
        return;
    }
    std::string why =
        "No answers were found that change first place, but it is not proven that there are none.";
    if (leads.set.method() == Method::column_average)
        why = "Averaged columns can only be tried out: no answers were found that change first place.";
    for (std::size_t o = 0; o < results.options.size(); ++o) {
        if (o == *results.first || results.scores[o] < results.scores[*results.first] - margin) continue;
        why = "\"" + option_name(decision, results.options[*results.first]) + "\" and \"" +
              option_name(decision, results.options[o]) + "\" share first place as it is.";
        break;
    }
    end(EnoughAnswer::Verdict::not_known, std::move(why));
}

/// One set of answers entered and solved.
void EnoughSearch::Work::try_out() {
    const std::size_t count = open.pairs.size();
    std::vector<int> steps = best;
    const bool starting = solved < first_tries;
    constexpr std::array changes{0, 4, 8, 12, 16};
    if (starting) {
        steps.assign(count, 0);
        for (auto& step : steps) {
            const auto roll = static_cast<int>(engine() % (2 * (scale_steps + 1)));
            step = solved % 2 == 0 ? roll % 2 * scale_steps : roll / 2;
        }
    } else {
        steps[coordinate] = changes[static_cast<std::size_t>(change)];
    }
    std::vector<double> ratios;
    for (const int step : steps) ratios.push_back(on_scale(step));
    const double gap = gap_with(ratios);
    if (found()) return;
    if (best.empty() || gap < least) {
        improved = improved || !starting;
        best = std::move(steps);
        least = gap;
    }
    ++solved;
    bool over = count == 0 || solved >= most_solved;
    if (!starting && ++change == static_cast<int>(changes.size())) {
        change = 0;
        if (++coordinate == count) {
            coordinate = 0;
            over = over || !improved;
            improved = false;
        }
    }
    if (over) end(EnoughAnswer::Verdict::not_known, finding.why);
}

bool EnoughSearch::Work::step() {
    switch (phase) {
    case Phase::start: start(); break;
    case Phase::leads: look_at_leads(); break;
    case Phase::try_out: try_out(); break;
    case Phase::done: break;
    }
    return phase != Phase::done;
}

EnoughSearch::EnoughSearch(const Decision& decision, const Results& results, const Id& set, const Id& by,
                           std::vector<std::array<Id, 2>> unanswered)
    : work_(std::make_unique<Work>()) {
    work_->decision = decision;
    work_->results = results;
    const auto items = set_items(decision, set);
    const auto known = [&](const Id& id) { return std::find(items.begin(), items.end(), id) != items.end(); };
    std::set<std::array<Id, 2>> seen;
    work_->open = {set, by, {}};
    for (auto& pair : unanswered) {
        const auto [first, second] = std::minmax(pair[0], pair[1]);
        if (first == second || !known(first) || !known(second)) continue;
        if (seen.insert({first, second}).second) work_->open.pairs.push_back(std::move(pair));
    }
    work_->answer.why = "Still being looked into.";
}

EnoughSearch::~EnoughSearch() = default;
EnoughSearch::EnoughSearch(EnoughSearch&&) noexcept = default;
EnoughSearch& EnoughSearch::operator=(EnoughSearch&&) noexcept = default;

bool EnoughSearch::step() {
    return work_->step();
}

double EnoughSearch::progress() const {
    switch (work_->phase) {
    case Work::Phase::start: return 0;
    case Work::Phase::leads: return work_->search->progress() * (work_->finding.try_out ? .5 : 1);
    case Work::Phase::try_out: {
        const double start = work_->search ? .5 : 0;
        return start + (1 - start) * work_->solved / most_solved;
    }
    case Work::Phase::done: break;
    }
    return 1;
}

const EnoughAnswer& EnoughSearch::answer() const {
    return work_->answer;
}

EnoughAnswer enough(const Decision& decision, const Results& results, const Id& set, const Id& by,
                    std::vector<std::array<Id, 2>> unanswered) {
    EnoughSearch search(decision, results, set, by, std::move(unanswered));
    while (search.step()) {
    }
    return search.answer();
}

std::vector<std::array<Id, 2>> unanswered_pairs(const Decision& decision, const Results& results,
                                                const Id& set, const Id& by) {
    const auto group = std::find_if(results.sets.begin(), results.sets.end(), [&](const SetResult& s) {
        return s.set == set && s.by.empty() && !s.from_points;
    });
    if (group == results.sets.end()) return {};
    if (by.empty()) return group->missing;
    const Node* node = find_node(decision.criteria, set);
    const Person* person = find_person(decision, by);
    if (person == nullptr) return {};
    const bool options = node->is_leaf() && node->rate == RateBy::pairs;
    const JudgedSet judged = JudgmentsBySet(decision).gather(set, group->items, options);
    PairMatrix answered = judged.agreed;
    for (const auto& judge : judged.judges) {
        if (judge.person == by) answered = judge_matrix(judge, judged.agreed);
    }
    std::vector<std::array<Id, 2>> pairs;
    for (const auto& [i, j] : answered.missing()) {
        const auto abstains = [&](const Id& item) {
            return options && std::find(person->abstains.begin(), person->abstains.end(), item) !=
                                  person->abstains.end();
        };
        if (!abstains(group->items[i]) && !abstains(group->items[j]))
            pairs.push_back({group->items[i], group->items[j]});
    }
    return pairs;
}

} // namespace steelyard
