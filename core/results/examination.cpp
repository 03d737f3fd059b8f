#include "core/results/examination.hpp"

#include <algorithm>
#include <cmath>
#include <deque>
#include <functional>
#include <map>
#include <utility>

#include "core/decision/apply.hpp"
#include "core/judgment/best_value.hpp"
#include "core/judgment/consistency.hpp"
#include "core/judgment/fewest_changes.hpp"
#include "core/judgment/judged_set.hpp"
#include "core/judgment/random_index.hpp"
#include "core/results/appraise.hpp"
#include "core/results/corrections.hpp"
#include "core/results/enough.hpp"
#include "core/results/entry_matrix.hpp"
#include "core/results/solve_cache.hpp"

namespace steelyard {
namespace {

/// So many pairs get choices worked out; a person looks at the first few.
constexpr std::size_t pairs_with_choices = 3;

std::size_t place_of(const std::vector<Id>& items, const Id& item) {
    return static_cast<std::size_t>(std::find(items.begin(), items.end(), item) - items.begin());
}

/// The values worth offering for a pair, mildest first: equal, where the best value lies on the other side;
/// the scale's value nearest to the best one; and between it and the given one the first that keeps the
/// limit.
std::vector<double> choices_for(double given, double best) {
    const double nearest = nearest_on_scale(best);
    std::vector<double> values;
    for (int step = -8; step <= 8; ++step) {
        const double value = step >= 0 ? 1 + step : 1.0 / (1 - step);
        const bool between = (value - given) * (value - nearest) <= 0;
        if (between && value != given) values.push_back(value);
    }
    std::sort(values.begin(), values.end(), [&](double x, double y) {
        return std::abs(std::log(x / given)) < std::abs(std::log(y / given));
    });
    return values;
}

MattersAnswer in_words(const EnoughAnswer& answer, std::vector<std::array<Id, 2>> pairs) {
    MattersAnswer out;
    switch (answer.verdict) {
    case EnoughAnswer::Verdict::proven_no: out.matters = Matters::proven_no; break;
    case EnoughAnswer::Verdict::found_yes: out.matters = Matters::found_yes; break;
    case EnoughAnswer::Verdict::not_known: out.matters = Matters::not_known; break;
    }
    out.pairs = std::move(pairs);
    for (const auto& a : answer.answers) out.answers.push_back({a.a, a.b, a.ratio});
    out.first_then = answer.first_then;
    out.why = answer.why;
    return out;
}

} // namespace

struct ExaminationJob::Work {
    /// One slice after the other; a task says whether it has more to do.
    using Task = std::function<bool()>;

    Work(const Decision& d, const Results& r, const Id& set, const Id& by) : decision(d), results(r) {
        found.set = set;
        found.by = by;
        const auto at = std::find_if(results.sets.begin(), results.sets.end(),
                                     [&](const SetResult& s) { return s.set == set && s.by == by; });
        if (at == results.sets.end() || at->from_points) return;
        entry = &*at;
        EntryMatrix matrix = entry_matrix(decision, *entry);
        pairs = std::move(matrix.pairs);
        found.mean_of_several = by.empty() && matrix.judges > 1;
        gather_authors();
        const bool connected = entry->parts.size() <= 1 && entry->items.size() >= 2;
        over = entry->cr && *entry->cr > decision.settings.limit;
        if (connected && (over || !entry->cycles.empty())) {
            plan_corrections();
            plan_enough();
        } else {
            plan_enough();
            if (connected) plan_corrections();
        }
        planned = tasks.size();
    }

    void gather_authors() {
        const auto set_of = [](const Judgment& j) { return std::minmax(j.a, j.b); };
        for (const auto& judgment : decision.judgments) {
            if (judgment.set != found.set) continue;
            auto& author = authors[std::pair<Id, Id>(set_of(judgment))];
            // Agreed ones stand before a person's; of several persons there is a mean.
            if (judgment.by.empty()) author = {true, {}};
            if (!judgment.by.empty() && !author.agreed && (found.by.empty() || judgment.by == found.by))
                author.person = judgment.by;
        }
    }

    Id said_by(const Id& a, const Id& b) const {
        const auto author = authors.find(std::pair<Id, Id>(std::minmax(a, b)));
        return author == authors.end() || author->second.agreed ? Id{} : author->second.person;
    }

    /// Whether the person's answers are his alone to change here.
    bool correctable() const { return !found.mean_of_several; }

    // ---- Corrections ----

    void plan_corrections() {
        found.pairs.reserve(entry->misfits.size());
        tasks.emplace_back([this, next = std::size_t{0}]() mutable {
            if (!values) values.emplace(pairs);
            if (next < entry->misfits.size()) add_pair(entry->misfits[next++]);
            if (next < entry->misfits.size()) return true;
            sort_pairs();
            return false;
        });
        if (!correctable()) return;
        if (over || !entry->cycles.empty()) {
            for (std::size_t p = 0; p < pairs_with_choices; ++p)
                tasks.emplace_back([this, p] { return add_choice(p); });
        }
        if (!over) return;
        tasks.emplace_back([this] { return search_fewest(); });
        tasks.emplace_back([this] {
            if (found.pairs.empty()) return false;
            return ask({{found.pairs.front().a, found.pairs.front().b}}, found.matters_worst);
        });
        tasks.emplace_back([this] {
            if (!found.fewest || found.fewest->changes.size() < 2) return false;
            std::vector<std::array<Id, 2>> changed;
            for (const auto& change : found.fewest->changes) changed.push_back({change.a, change.b});
            return ask(std::move(changed), found.matters_fewest);
        });
    }

    std::optional<double> cr_of(double lambda) const {
        const auto ci = consistency_index(lambda, pairs.size());
        if (!ci || !entry->ri) return std::nullopt;
        return *ci / *entry->ri;
    }

    void add_pair(const Misfit& misfit) {
        PairCorrection pair;
        pair.a = misfit.a;
        pair.b = misfit.b;
        pair.said_by = said_by(misfit.a, misfit.b);
        pair.given = misfit.given;
        pair.implied = misfit.implied;
        const std::size_t i = place_of(entry->items, misfit.a);
        const std::size_t j = place_of(entry->items, misfit.b);
        if (const auto best = values->of(i, j)) {
            pair.best = best->ratio;
            pair.cr_at_best = cr_of(best->lambda);
        }
        found.pairs.push_back(std::move(pair));
    }

    void sort_pairs() {
        if (!entry->ri) return; // Worst first, as they came.
        std::vector<std::pair<std::size_t, PairCorrection>> order;
        const std::size_t n = entry->items.size();
        for (auto& pair : found.pairs) {
            const std::size_t place = place_of(entry->items, pair.a) * n + place_of(entry->items, pair.b);
            order.emplace_back(place, std::move(pair));
        }
        std::sort(order.begin(), order.end(), [](const auto& x, const auto& y) { return x.first < y.first; });
        const auto cr = [&](const PairCorrection& p) { return p.cr_at_best.value_or(*entry->cr); };
        std::stable_sort(order.begin(), order.end(),
                         [&](const auto& x, const auto& y) { return cr(x.second) < cr(y.second) - 1e-12; });
        found.pairs.clear();
        for (auto& [place, pair] : order) found.pairs.push_back(std::move(pair));
    }

    /// One more choice of pair `p`; false once it has all.
    bool add_choice(std::size_t p) {
        if (p >= found.pairs.size() || !found.pairs[p].best) return false;
        PairCorrection& pair = found.pairs[p];
        if (!candidates) {
            candidates.emplace();
            const std::size_t i = place_of(entry->items, pair.a);
            const std::size_t j = place_of(entry->items, pair.b);
            const auto all = choices_for(pair.given, *pair.best);
            for (std::size_t k = 0; k < all.size(); ++k) {
                const auto cr = cr_of(values->lambda_at(i, j, all[k]));
                const bool within = cr && *cr <= decision.settings.limit;
                const bool last = k + 1 == all.size();
                const bool first_within =
                    within && std::none_of(candidates->begin(), candidates->end(), [&](const auto& c) {
                        return c.cr && *c.cr <= decision.settings.limit;
                    });
                const bool equal = all[k] == 1;
                if (last || equal || first_within) candidates->push_back({all[k], cr, {}});
            }
        }
        const std::size_t next = pair.choices.size();
        if (next < candidates->size()) {
            CorrectionChoice choice = (*candidates)[next];
            choice.then = standing_with({{pair.a, pair.b, pair.said_by, choice.to}});
            pair.choices.push_back(std::move(choice));
            return true;
        }
        candidates.reset();
        return false;
    }

    bool search_fewest() {
        if (!search) {
            const auto wanted = entry_search(decision, *entry);
            if (!wanted) return false;
            search.emplace(wanted->pairs, wanted->limit);
        }
        if (search->step()) return true;
        const FewestChangesResult answer = steelyard::in_words(*entry, search->answer());
        FewestCorrections fewest;
        fewest.proven = answer.proven;
        fewest.cr = answer.cr;
        std::vector<Entered> entered;
        for (const auto& change : answer.changes) {
            const double given = pairs.at(place_of(entry->items, change.a), place_of(entry->items, change.b));
            const Id by = said_by(change.a, change.b);
            fewest.changes.push_back({change.a, change.b, by, given, change.to});
            entered.push_back({change.a, change.b, by, change.to});
        }
        fewest.then = standing_with(entered);
        found.fewest = std::move(fewest);
        return false;
    }

    struct Entered {
        Id a;
        Id b;
        Id by;
        double ratio;
    };

    StandingThen standing_with(const std::vector<Entered>& entered) {
        std::vector<Edit> edits;
        for (const auto& e : entered) {
            Judgment judgment;
            judgment.set = found.set;
            judgment.by = e.by;
            judgment.a = e.a;
            judgment.b = e.b;
            judgment.ratio = e.ratio;
            edits.emplace_back(Enter<Judgment>{std::move(judgment)});
        }
        const Applied applied = steelyard::apply(decision, edits);
        StandingThen then;
        if (!applied.problems.empty()) return then;
        const Standing standing = Appraiser(applied.decision, cache).standing();
        if (!standing.first) return then;
        then.first = standing.options[*standing.first];
        then.lead_points = lead_of(*standing.first, standing.scores);
        return then;
    }

    // ---- Enough ----

    void plan_enough() {
        auto open = unanswered_pairs(decision, results, found.set, found.by);
        if (open.empty()) return;
        tasks.emplace_back([this, open = std::move(open)] { return ask(open, found.enough); });
    }

    /// One slice of asking whether these pairs could change first place.
    bool ask(std::vector<std::array<Id, 2>> open, std::optional<MattersAnswer>& answer) {
        if (!enough) enough.emplace(decision, results, found.set, found.by, open);
        if (enough->step()) return true;
        answer = in_words(enough->answer(), std::move(open));
        enough.reset();
        return false;
    }

    void step() {
        if (!tasks.empty() && !tasks.front()()) tasks.pop_front();
        found.finished = tasks.empty();
        const double done = static_cast<double>(planned - tasks.size());
        double part = 0;
        if (!tasks.empty() && search) part = search->progress();
        if (!tasks.empty() && enough) part = enough->progress();
        const double now = planned == 0 ? 1 : (done + std::min(part, 0.99)) / static_cast<double>(planned);
        found.progress = found.finished ? 1 : std::max(found.progress, now);
    }

    struct Author {
        bool agreed = false;
        Id person;
    };

    Decision decision;
    Results results;
    SolveCache cache; ///< Sets that a correction does not touch are weighed once.
    const SetResult* entry = nullptr;
    PairMatrix pairs{0};
    bool over = false;
    std::map<std::pair<Id, Id>, Author> authors;
    std::deque<Task> tasks;
    std::size_t planned = 0;
    std::optional<BestValues> values;
    std::optional<std::vector<CorrectionChoice>> candidates; ///< Of the pair worked at.
    std::optional<FewestChangesSearch> search;
    std::optional<EnoughSearch> enough;
    Examination found;
};

ExaminationJob::ExaminationJob(const Decision& decision, const Results& results, const Id& set, const Id& by)
    : work_(std::make_unique<Work>(decision, results, set, by)) {}
ExaminationJob::~ExaminationJob() = default;
ExaminationJob::ExaminationJob(ExaminationJob&&) noexcept = default;
ExaminationJob& ExaminationJob::operator=(ExaminationJob&&) noexcept = default;

void ExaminationJob::step() {
    work_->step();
}

const Examination& ExaminationJob::found() const {
    return work_->found;
}

} // namespace steelyard
