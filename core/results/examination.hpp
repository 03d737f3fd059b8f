#pragma once

#include <array>
#include <memory>
#include <optional>
#include <string>
#include <vector>

#include "core/decision/decision.hpp"
#include "core/results/results.hpp"

namespace steelyard {

/// Where a decision stands with something entered that is not.
struct StandingThen {
    Id first; ///< Empty where no option is in play.
    std::optional<double> lead_points;
};

/// One answer that could be put in place of a judgment.
struct CorrectionChoice {
    double to = 1; ///< a against b.
    std::optional<double> cr;
    StandingThen then;
};

/// A judgment that could be corrected.
struct PairCorrection {
    Id a;
    Id b;
    Id said_by; ///< Whose judgment stands there: a person's, or empty for an agreed one. Void for a mean of
                ///< several.
    double given = 1;
    std::optional<double> implied; ///< What the other answers say; none where the set falls apart without it.
    std::optional<double> best;    ///< The value that gives the least CR with the others held.
    std::optional<double> cr_at_best;
    std::vector<CorrectionChoice> choices; ///< Mildest first; none for what is far down the list.
};

/// Several judgments changed together, as few as bring the set within its limit.
struct FewestCorrections {
    bool proven = false; ///< No fewer would do.
    struct Change {
        Id a;
        Id b;
        Id said_by;
        double given = 1;
        double to = 1;
    };
    std::vector<Change> changes;
    std::optional<double> cr;
    StandingThen then;
};

/// Whether answers not given could change first place.
enum class Matters { proven_no, found_yes, not_known };

struct MattersAnswer {
    Matters matters = Matters::not_known;
    struct Answer {
        Id a;
        Id b;
        double ratio = 1;
    };
    std::vector<std::array<Id, 2>> pairs; ///< Taken as unanswered.
    std::vector<Answer> answers;          ///< Found: with these first place changes.
    Id first_then;                        ///< Found: to whom.
    std::string why;                      ///< Not known: why, in a sentence.
};

/// What can be done about the contradictions in one person's answers (or the agreed ones) in a set, and
/// whether it matters. Members appear one after the other while the job works.
struct Examination {
    Id set;
    Id by; ///< Empty for the group.
    bool finished = false;
    double progress = 0; ///< 0 to 1.

    bool mean_of_several =
        false; ///< A mean of several judges: nothing to correct here but in their own answers.
    std::vector<PairCorrection>
        pairs; ///< Best to correct first. Empty where the set is not connected or from points.
    std::optional<FewestCorrections> fewest; ///< Where the set is over its limit.
    std::optional<MattersAnswer>
        matters_worst; ///< For the pair that stands first, where the set is over its limit.
    std::optional<MattersAnswer>
        matters_fewest;                  ///< For the pairs of the fewest changes, where they are several.
    std::optional<MattersAnswer> enough; ///< For the pairs still open, where there are some.
};

/// Fills an Examination slice by slice; a slice takes about a millisecond. `decision` and `results` belong
/// together and are copied as far as needed.
class ExaminationJob {
public:
    ExaminationJob(const Decision& decision, const Results& results, const Id& set, const Id& by);
    ~ExaminationJob();
    ExaminationJob(ExaminationJob&&) noexcept;
    ExaminationJob& operator=(ExaminationJob&&) noexcept;

    void step();
    const Examination& found() const;

private:
    struct Work;
    std::unique_ptr<Work> work_;
};

} // namespace steelyard
