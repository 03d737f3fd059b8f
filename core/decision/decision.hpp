#pragma once

#include <array>
#include <cstdint>
#include <optional>
#include <string>
#include <utility>
#include <variant>
#include <vector>

/// The document: one decision as a plain value. It is what a decision file says, member for member; nothing
/// here is computed. Texts are UTF-8. Times are ISO 8601 texts, kept as typed. An empty `by` means "agreed in
/// the room".
///
/// Members that may be absent from a file are plain values with a default, or `std::optional` where absence
/// itself means something. `Extras` keeps what a file said beyond that, so that writing gives back what was
/// read.
namespace steelyard {

using Id = std::string;

/// A member this version does not know, as JSON text.
struct UnknownMember {
    std::string name;
    std::string json;
    bool operator==(const UnknownMember&) const = default;
};

/// What an object of the file said that its plain members cannot hold.
struct Extras {
    std::vector<std::string> stated;   ///< Known members written out although they hold their default.
    std::vector<std::string> left_out; ///< Members always written otherwise that the file did without.
    std::vector<UnknownMember> unknown;
    bool operator==(const Extras&) const = default;
};

struct Person {
    Id id;
    std::string name;
    std::string role;
    double share = 1; ///< Relative weight of this person's answers, >= 0.
    std::string interest;
    std::vector<Id> abstains; ///< Options this person does not judge.
    Extras extras;
    bool operator==(const Person&) const = default;
};

struct Option {
    Id id;
    std::string name;
    std::string note;
    bool withdrawn = false;
    Extras extras;
    bool operator==(const Option&) const = default;
};

enum class WeightsBy { pairs, points };
enum class RateBy { pairs, figure, grade };
enum class WorthsBy { given, pairs };
enum class Better { more, less };

/// Worth proportional to the figure (more) or to its reciprocal (less); figures > 0.
struct ProportionalCurve {
    Better better = Better::more;
    bool operator==(const ProportionalCurve&) const = default;
};

/// Worth 0 at `worst`, 1 at `best`, straight between, held outside.
struct LineCurve {
    double worst = 0;
    double best = 1;
    bool operator==(const LineCurve&) const = default;
};

/// Worth piecewise linear through (figure, worth), figures strictly increasing, flat outside the ends.
struct PointsCurve {
    std::vector<std::array<double, 2>> at;
    bool operator==(const PointsCurve&) const = default;
};

/// Worth 1 at `target`, falling in a straight line to 0 at target +- tolerance.
struct TargetCurve {
    double target = 0;
    double tolerance = 1;
    bool operator==(const TargetCurve&) const = default;
};

struct Curve {
    std::variant<ProportionalCurve, LineCurve, PointsCurve, TargetCurve> shape;
    Extras extras;
    bool operator==(const Curve&) const = default;
};

enum class CostResult { total, per_year, per_part };

/// Turns cost lines into one figure.
struct CostSheet {
    int years = 10;
    double discount = 0;          ///< Rate a year, 0.08 for 8 %.
    std::optional<double> volume; ///< Parts a year.
    CostResult result = CostResult::total;
    Extras extras;
    bool operator==(const CostSheet&) const = default;
};

struct Grade {
    Id id;
    std::string name;
    std::optional<double> worth; ///< 0 to 1.
    Extras extras;
    bool operator==(const Grade&) const = default;
};

/// A criterion. With children it weighs them (`weights`); without, it is a leaf on which options are rated
/// (`rate`).
struct Node {
    Id id;
    std::string name;
    std::string note;
    WeightsBy weights = WeightsBy::pairs;
    std::vector<Node> children;
    RateBy rate = RateBy::pairs;
    std::string unit;
    std::optional<Curve> curve;
    std::optional<CostSheet> cost_sheet;
    WorthsBy worths = WorthsBy::given;
    std::vector<Grade> grades;
    Extras extras;
    bool operator==(const Node&) const = default;
    bool is_leaf() const { return children.empty(); }
};

/// `a` counts `ratio` times as much as `b`, in the set named `set`.
struct Judgment {
    Id set;
    Id by;
    Id a;
    Id b;
    double ratio = 1;
    std::string a_range; ///< What was at stake on a and b when it was judged, as it stood under the arm.
    std::string b_range;
    std::string note;
    std::string at;
    Extras extras;
    bool operator==(const Judgment&) const = default;
};

/// Somebody ended a set early; `skipped` are the pairs left out on purpose.
struct Finished {
    Id set;
    Id by;
    std::vector<std::array<Id, 2>> skipped;
    Extras extras;
    bool operator==(const Finished&) const = default;
};

/// Points shared out over every item of a set; any positive sum.
struct PointsEntry {
    Id set;
    Id by;
    std::vector<std::pair<Id, double>> points;
    std::string note;
    std::string at;
    Extras extras;
    bool operator==(const PointsEntry&) const = default;
};

enum class QuoteStatus { unstated, budget, quoted, spoken, confirmed, measured };

/// One quoted or measured figure. The last entry of a criterion and option stands; one without a value clears
/// it.
struct Figure {
    Id criterion;
    Id option;
    std::optional<double> value;
    std::optional<double> low;
    std::optional<double> high;
    std::string source;
    std::optional<int> round;
    QuoteStatus status = QuoteStatus::unstated;
    std::string valid_until;
    std::string note;
    std::string at;
    Extras extras;
    bool operator==(const Figure&) const = default;
};

enum class CostKind { once, per_year, per_part, in_year };

/// One line of a cost sheet for one option. The last entry of a line stands; one without a value clears it.
struct Cost {
    Id criterion;
    Id option;
    std::string line;
    CostKind kind = CostKind::once;
    std::optional<double> value;
    std::optional<int> year;
    std::string source;
    std::string currency;
    double in_unit = 1; ///< Factor from `value` to the criterion's unit.
    std::string note;
    std::string at;
    Extras extras;
    bool operator==(const Cost&) const = default;
};

/// The grade an option gets on a leaf. The last entry of a person stands; one without a grade clears it.
struct GradeEntry {
    Id criterion;
    Id option;
    Id grade;
    Id by;
    std::string source;
    std::string note;
    std::string at;
    Extras extras;
    bool operator==(const GradeEntry&) const = default;
};

struct Waiver {
    Id by;
    std::string at;
    std::string why;
    Extras extras;
    bool operator==(const Waiver&) const = default;
};

/// A must. Its values come from the figures of `criterion`, from the worth of `node`, or from checks.
struct Requirement {
    Id id;
    std::string name;
    std::string note;
    std::string unit;
    Id criterion;
    Id node;
    std::optional<double> at_least;
    std::optional<double> at_most;
    std::optional<double> min_worth;
    bool yes_no = false;
    bool safety = false;
    std::optional<Waiver> waived;
    Extras extras;
    bool operator==(const Requirement&) const = default;
};

enum class CheckState { unstated, met, failed, asked };

/// What is known of one option and one requirement. The last entry stands.
struct Check {
    Id requirement;
    Id option;
    std::optional<double> value;
    std::optional<double> low;
    std::optional<double> high;
    CheckState state = CheckState::unstated;
    std::string source;
    std::string note;
    Id by;
    std::string at;
    Extras extras;
    bool operator==(const Check&) const = default;
};

enum class Method { eigenvector, geometric_mean, column_average };
enum class Synthesis { distributive, ideal };
enum class Combine { judgments, priorities, priorities_arithmetic };
enum class RandomIndexTable { alonso_lamata_2006, saaty_1980 };
enum class TrialKind { weights, judgments, figures };

struct TrialSettings {
    int n = 10000;
    std::uint64_t seed = 1;
    std::vector<TrialKind> kinds{TrialKind::weights};
    double spread = 1.5;
    Extras extras;
    bool operator==(const TrialSettings&) const = default;
};

struct Settings {
    Method method = Method::eigenvector;
    Synthesis synthesis = Synthesis::ideal;
    Combine combine = Combine::judgments;
    RandomIndexTable random_index = RandomIndexTable::alonso_lamata_2006;
    double limit = 0.10;  ///< Consistency ratio up to which a set holds together.
    double too_close = 0; ///< Lead, in score, at or under which first place is called undecided.
    Id money;             ///< The figure leaf in which differences are told in money; may be empty.
    TrialSettings trials;
    Extras extras;
    bool operator==(const Settings&) const = default;
};

struct FixedRules {
    std::string fixed_at;
    Id by;
    std::string sha256;
    Extras extras;
    bool operator==(const FixedRules&) const = default;
};

struct Outcome {
    Id option;
    std::vector<Id> by;
    std::string at;
    std::string reasons;
    std::string conditions;
    std::string why_not_first;
    Extras extras;
    bool operator==(const Outcome&) const = default;
};

struct LogEntry {
    std::string at;
    Id by;
    std::string did;
    std::string why;
    Extras extras;
    bool operator==(const LogEntry&) const = default;
};

struct Signature {
    Id by;
    std::string at;
    std::string sha256;
    std::string remark;
    Extras extras;
    bool operator==(const Signature&) const = default;
};

struct Decision {
    Id id;
    std::string title;
    std::string question;
    std::string author;
    std::string decide_by;
    std::string notes;
    std::vector<Person> people;
    std::vector<Option> options;
    Node criteria;
    std::vector<Judgment> judgments;
    std::vector<Finished> finished;
    std::vector<PointsEntry> points;
    std::vector<Figure> figures;
    std::vector<Cost> costs;
    std::vector<GradeEntry> grades;
    std::vector<Requirement> requirements;
    std::vector<Check> checks;
    Settings settings;
    std::optional<FixedRules> rules;
    std::optional<Outcome> outcome;
    std::vector<LogEntry> log;
    std::vector<Signature> signatures;
    Extras extras;
    bool operator==(const Decision&) const = default;
};

} // namespace steelyard
