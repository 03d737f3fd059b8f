#pragma once

#include <array>
#include <optional>
#include <string>
#include <utility>
#include <vector>

#include "core/decision/decision.hpp"
#include "core/decision/problem.hpp"
#include "core/measure/musts.hpp"
#include "core/results/group_result.hpp"

/// Everything the solver says about a decision. Vectors over options follow `options` (the options in play,
/// in the order of the file); vectors over the items of a set follow its `items`.
namespace steelyard {

/// A judged pair beside what the other answers of its set say. `a` comes before `b` in the set's items.
struct Misfit {
    Id a;
    Id b;
    double given = 1;
    std::optional<double>
        implied; ///< Ratio of the weights re-derived without this pair; none if the set falls apart.
    /// With corrections only (see corrections.hpp): the ratio at which lambda max is least, and CR there.
    std::optional<double> best{};
    std::optional<double> cr_at_best{};
};

/// The smallest number of judgments that need new values to bring a set within its limit, with such values.
struct FewestChangesResult {
    struct Change {
        Id a;
        Id b;
        double to = 1;
    };
    bool proven = false; ///< Fewer would not do; otherwise they are merely the fewest found.
    std::vector<Change> changes;
    double cr = 0; ///< With them.
};

/// Items that no judgment links with the others, when a set does not hang together.
using Parts = std::vector<std::vector<Id>>;

struct SetResult {
    Id set;
    Id by; ///< Empty for the group.
    bool from_points = false;
    std::vector<Id> items;
    std::vector<std::array<Id, 2>> missing;
    std::vector<std::array<Id, 2>> open; ///< The missing pairs that nobody skipped on purpose.
    std::optional<std::vector<double>> weights;
    std::optional<std::vector<double>> eigenvector;
    std::optional<std::vector<double>> geometric_mean;
    std::optional<std::vector<double>> column_average;
    std::optional<double> lambda_max;
    std::optional<double> lambda_hand; ///< Mean of (A w)_i / w_i for `weights`, the common hand estimate.
    std::optional<double> ci;
    std::optional<double> ri;
    std::optional<double> cr;
    std::optional<double> gci;
    std::optional<double> koczkodaj;
    std::optional<std::array<Id, 3>> worst_triad;
    std::vector<std::array<Id, 3>> cycles;      ///< a > b > c > a, starting with the one first in items.
    std::vector<std::array<Id, 3>> tied_cycles; ///< a >= b >= c >= a with one or two ties.
    std::optional<double> zeta;  ///< Kendall's coefficient of consistence, complete sets without ties.
    std::vector<Misfit> misfits; ///< Worst first.
    Parts parts;                 ///< More than one where the set does not hang together.
    std::optional<FewestChangesResult> fewest_changes; ///< With corrections only.

    /// Of the group, in sets of pairs: where two or more judges with a share connect the set by their own
    /// judgments and do not all tie all items.
    std::optional<Concordance> concordance;
};

struct NodeResult {
    Id node;
    Id parent; ///< Empty for the root.
    int depth = 0;
    bool leaf = true;
    double local_weight = 1;
    double weight = 1;                ///< Product of local weights from the root.
    std::vector<double> contribution; ///< Per option: what this node adds to its score.
};

struct LeafResult {
    Id leaf;
    double weight = 0;
    std::vector<double> local;                 ///< Per option, placeholders included.
    std::vector<bool> missing;                 ///< Per option: `local` is a placeholder.
    std::vector<std::optional<double>> worths; ///< Per option, before they are set against each other.
};

/// Figures computed from a cost sheet, for every option that has one, in play or not.
struct ComputedFigures {
    Id leaf;
    std::vector<std::pair<Id, double>> values;
};

struct MustResult {
    Id requirement;
    Id option;
    MustState state = MustState::unchecked;
    std::optional<double> value;
};

struct Exclusion {
    Id option;
    Id requirement;
    std::optional<double> value;
};

enum class OpenKind { judgment, points, figure, curve, grade, worth, requirement };

/// Something not yet answered. Which of the ids are set depends on the kind:
/// judgment: set, a, b; points: set; figure: criterion, option; curve: criterion; grade: criterion, option;
/// worth: criterion, grade; requirement: requirement, option.
struct OpenItem {
    OpenKind kind = OpenKind::judgment;
    Id set{};
    Id a{};
    Id b{};
    Id criterion{};
    Id option{};
    Id grade{};
    Id requirement{};
};

/// What the judgments pay: the change of an option's money figure that exactly cancels a change of one unit
/// (for grades: of one grade) of another of its figures.
struct Rates {
    Id money;  ///< The money criterion.
    Id option; ///< At whose figures.
    struct Rate {
        Id leaf;
        std::optional<double> per_unit; ///< None where either figure does not move the score.
    };
    std::vector<Rate> rates; ///< Of every other leaf rated by figures or grades, in the order of the tree.
};

/// Two options whose order turns round when the field changes.
struct Reversal {
    Id a;                   ///< Ahead before.
    Id b;                   ///< Ahead after.
    std::vector<Id> leaves; ///< Where their local values move for it, what moves most first.
};

/// What another option's coming or going does to the order of those that stay.
struct FieldChange {
    enum class Kind { without, copy_of, typical } kind = Kind::without;
    Id option;                       ///< Empty for the typical one.
    std::vector<Reversal> reversals; ///< In the order the options had before.
    Id first_before;
    Id first_after; ///< Among those that stay, and the newcomer (its id is empty).
};

struct Results {
    Settings settings;
    std::vector<Id> options; ///< In play.
    std::vector<SetResult> sets;
    bool corrected = false;        ///< Whether corrections were added to the sets.
    std::vector<NodeResult> nodes; ///< Depth first, root first.
    std::vector<LeafResult> leaves;
    std::vector<ComputedFigures> figures;
    std::vector<double> scores;
    std::optional<std::vector<double>> shares; ///< None if all scores are 0.
    std::vector<int> ranks;
    std::optional<std::size_t> first; ///< Index in `options` of the option in first place.
    bool provisional = false;
    std::vector<std::pair<Id, std::array<double, 2>>>
        ranges;                        ///< Ideal synthesis: score with what is missing at 0 and at 1.
    std::optional<double> lead_points; ///< 100 x the difference of the first two scores.
    std::optional<double> lead_money;  ///< See lead_in_money().
    std::optional<Rates> rates;        ///< At the option in first place, where a money criterion is chosen.
    std::optional<std::vector<FieldChange>> field_changes; ///< Only where asked for.
    std::vector<MustResult> musts;
    std::vector<Exclusion> excluded;
    std::vector<OpenItem> open;
    std::optional<GroupResult> group; ///< Where there are two or more judges.
    std::vector<Notice> notices;
};

} // namespace steelyard
