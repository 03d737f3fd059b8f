#include "core/decision/read.hpp"

#include <algorithm>
#include <cmath>
#include <limits>
#include <set>
#include <string>
#include <utility>

#include "core/decision/check.hpp"
#include "core/decision/json_value.hpp"
#include "core/decision/members.hpp"
#include "core/decision/migrate.hpp"
#include "core/decision/words.hpp"

namespace steelyard {
namespace {

constexpr double not_read = std::numeric_limits<double>::quiet_NaN();
constexpr double largest_exact_integer = 9007199254740992.0; // 2^53: every integer up to here is a double.

using Kind = JsonValue::Kind;

/// The words of a list, for a message: `"more" or "less"`.
template<class Enum>
std::string words_of() {
    std::string text;
    for (const auto w : Words<Enum>::list) {
        if (w.empty()) continue;
        if (!text.empty()) text += w == Words<Enum>::list.back() ? " or " : ", ";
        text += "\"" + std::string(w) + "\"";
    }
    return text;
}

/// Reads the members of one object, noting every member of the wrong type and going on.
class Reader {
public:
    Reader(const JsonValue& object, std::string at, std::vector<Problem>& problems, Unread& unread)
        : object_(object), at_(std::move(at)), problems_(problems), unread_(unread) {}

    /// Reads an object of the file. Something else than an object leaves it as it is.
    template<class T>
    static void read(const JsonValue& value, const std::string& at, T& object, std::vector<Problem>& problems,
                     Unread& unread) {
        if (value.kind != Kind::object) {
            Reader(value, at, problems, unread).refuse(at, value.shown(), "an object");
            mark_list<T>(unread);
            blank(object);
            return;
        }
        Reader reader(value, at, problems, unread);
        members(reader, object);
        object.extras.stated = std::move(reader.stated_);
        object.extras.left_out = std::move(reader.left_out_);
        for (const auto& [name, member] : value.members) {
            if (!reader.known_.contains(name))
                object.extras.unknown.push_back({name, write_json_compact(member)});
        }
        if (reader.bad_id_) mark_list<T>(unread);
    }

    void format() {
        known_.insert("format"); // Both were looked at before anything else.
        known_.insert("version");
    }

    void id(const char* name, Id& id) {
        id.clear();
        if (const auto* value = needed(name)) {
            if (value->kind == Kind::string) {
                id = value->text;
                if (id.empty()) refuse(place(name), "an empty text", "an id of 1 to 64 bytes");
            } else {
                refuse(place(name), value->shown(), "a text");
            }
        }
        if (id.empty() && std::string_view(name) == "id") bad_id_ = true;
    }
    void maybe_id(const char* name, Id& id) {
        if (!given(name)) return;
        if (const auto* value = typed(name, Kind::string, "a text")) {
            id = value->text;
            if (id.empty()) refuse(place(name), "an empty text", "an id of 1 to 64 bytes");
        }
    }
    void needed_text(const char* name, std::string& out) {
        if (needed(name) != nullptr) text(name, out);
    }
    void text(const char* name, std::string& out) {
        if (const auto* value = typed(name, Kind::string, "a text")) {
            out = value->text;
            if (out.empty()) stated_.emplace_back(name);
        }
    }
    void person_or_room(const char* name, Id& by) {
        const auto* value = given(name);
        if (value == nullptr) return;
        if (value->kind == Kind::null) {
            stated_.emplace_back(name);
        } else if (value->kind == Kind::string && !value->text.empty()) {
            by = value->text;
        } else {
            refuse(place(name), value->shown(), "the id of a person, or null");
        }
    }
    void number(const char* name, double& out) {
        out = not_read;
        if (needed(name) == nullptr) return;
        if (const auto* value = typed(name, Kind::number, "a number")) out = value->number;
    }
    void number_or(const char* name, double& out, double usual) {
        out = usual;
        if (given(name) == nullptr) return;
        const auto* value = typed(name, Kind::number, "a number");
        out = value != nullptr ? value->number : not_read;
        if (out == usual) stated_.emplace_back(name);
    }
    void maybe_number(const char* name, std::optional<double>& out) {
        if (const auto* value = typed(name, Kind::number, "a number")) out = value->number;
    }
    void count_or(const char* name, int& out, int usual) {
        out = usual;
        if (const auto whole = whole_number(name, std::numeric_limits<int>::max())) {
            out = static_cast<int>(*whole);
            if (out == usual) stated_.emplace_back(name);
        }
    }
    void maybe_count(const char* name, std::optional<int>& out) {
        if (const auto whole = whole_number(name, std::numeric_limits<int>::max()))
            out = static_cast<int>(*whole);
    }
    void seed(const char* name, std::uint64_t& out) {
        if (const auto whole = whole_number(name, largest_exact_integer)) {
            out = static_cast<std::uint64_t>(*whole);
            if (out == 1) stated_.emplace_back(name);
        }
    }
    void flag(const char* name, bool& out) {
        if (const auto* value = typed(name, Kind::boolean, "true or false")) {
            out = value->truth;
            if (!out) stated_.emplace_back(name);
        }
    }
    template<class Enum>
    void word(const char* name, Enum& out, Enum usual = Enum{}) {
        out = usual;
        if (const auto* value = given(name)) {
            if (const auto known = word_in(*value, place(name), out); known && out == usual)
                stated_.emplace_back(name);
        }
    }
    template<class Enum>
    void needed_word(const char* name, Enum& out) {
        if (const auto* value = needed(name)) word_in(*value, place(name), out);
    }
    template<class Enum>
    void words(const char* name, std::vector<Enum>& out) {
        const auto* value = typed(name, Kind::array, "an array");
        if (value == nullptr) return;
        out.clear();
        for (std::size_t i = 0; i < value->items.size(); ++i) {
            Enum one{};
            if (word_in(value->items[i], place(name) + "/" + std::to_string(i), one)) out.push_back(one);
        }
        if (out == std::vector<Enum>{Enum{}}) stated_.emplace_back(name);
    }
    void ids(const char* name, std::vector<Id>& out) {
        const auto* value = typed(name, Kind::array, "an array");
        if (value == nullptr) return;
        for (std::size_t i = 0; i < value->items.size(); ++i) {
            out.push_back(id_in(value->items[i], place(name) + "/" + std::to_string(i)));
        }
        if (out.empty()) stated_.emplace_back(name);
    }
    void id_pairs(const char* name, std::vector<std::array<Id, 2>>& out) {
        const auto* value = typed(name, Kind::array, "an array");
        if (value == nullptr) return;
        for (std::size_t i = 0; i < value->items.size(); ++i) {
            const auto& pair = value->items[i];
            const std::string at = place(name) + "/" + std::to_string(i);
            if (pair.kind != Kind::array || pair.items.size() != 2) {
                refuse(at, pair.shown(), "an array of two ids");
                out.push_back({});
            } else {
                out.push_back({id_in(pair.items[0], at + "/0"), id_in(pair.items[1], at + "/1")});
            }
        }
        if (out.empty()) stated_.emplace_back(name);
    }
    void numbers_by_id(const char* name, std::vector<std::pair<Id, double>>& out) {
        if (needed(name) == nullptr) return;
        const auto* value = typed(name, Kind::object, "an object");
        if (value == nullptr) return;
        for (const auto& [id, number] : value->members) {
            if (number.kind != Kind::number)
                refuse(place(name) + pointer_part(id), number.shown(), "a number");
            out.emplace_back(id, number.kind == Kind::number ? number.number : not_read);
        }
    }
    template<class T>
    void list(const char* name, std::vector<T>& out) {
        const auto* value = given(name);
        if (value == nullptr) return;
        if (typed(name, Kind::array, "an array") == nullptr) {
            mark_list<T>(unread_);
            return;
        }
        out.resize(value->items.size());
        for (std::size_t i = 0; i < out.size(); ++i) {
            read(value->items[i], place(name) + "/" + std::to_string(i), out[i], problems_, unread_);
        }
        if (out.empty()) stated_.emplace_back(name);
    }
    template<class T>
    void needed_list(const char* name, std::vector<T>& out) {
        if (needed(name) != nullptr) {
            list(name, out);
        } else {
            mark_list<T>(unread_);
        }
    }
    template<class T>
    void needed_object(const char* name, T& out) {
        if (const auto* value = needed(name)) {
            read(*value, place(name), out, problems_, unread_);
        } else {
            mark_list<T>(unread_);
        }
    }
    template<class T>
    void maybe_object(const char* name, std::optional<T>& out) {
        if (const auto* value = given(name)) read(*value, place(name), out.emplace(), problems_, unread_);
    }
    template<class T>
    void object(const char* name, T& out) {
        if (const auto* value = given(name)) {
            read(*value, place(name), out, problems_, unread_);
            if (value->members.empty()) stated_.emplace_back(name);
        }
    }

    void node_kind(Node& node) {
        const auto* children = given("children");
        const bool inner = children != nullptr && !children->items.empty();
        if (inner && given("rate") != nullptr) {
            refuse(place("rate"), "a rate beside children", "either children or a rate");
        }
        word("weights", node.weights);
        word("rate", node.rate);
        const char* usual = inner ? "weights" : "rate";
        if (given(usual) == nullptr) left_out_.emplace_back(usual);
    }

    void curve_shape(decltype(Curve::shape)& shape) {
        const auto* kind = needed("kind");
        if (kind == nullptr) return;
        if (kind->kind != Kind::string) {
            refuse(place("kind"), kind->shown(), "a text");
        } else if (kind->text == "proportional") {
            ProportionalCurve curve;
            needed_word("better", curve.better);
            shape = curve;
        } else if (kind->text == "line") {
            LineCurve curve;
            number("worst", curve.worst);
            number("best", curve.best);
            shape = curve;
        } else if (kind->text == "points") {
            PointsCurve curve;
            curve_points(curve);
            shape = std::move(curve);
        } else if (kind->text == "target") {
            TargetCurve curve;
            number("target", curve.target);
            number("tolerance", curve.tolerance);
            shape = curve;
        } else {
            refuse(place("kind"), kind->shown(), "\"proportional\", \"line\", \"points\" or \"target\"");
        }
    }

private:
    /// Makes an object that could not be read one that the checks pass over.
    template<class T>
    static void blank(T& object) {
        const JsonValue empty = JsonValue::object();
        std::vector<Problem> ignored;
        Unread unread;
        Reader reader(empty, "", ignored, unread);
        members(reader, object);
        object.extras = {};
    }

    /// An id of this list is lost: references into the list cannot be judged.
    template<class T>
    static void mark_list(Unread& unread) {
        if constexpr (std::same_as<T, Person>) unread.people = true;
        if constexpr (std::same_as<T, Option>) unread.options = true;
        if constexpr (std::same_as<T, Node>) unread.nodes = true;
        if constexpr (std::same_as<T, Grade>) unread.grades = true;
        if constexpr (std::same_as<T, Requirement>) unread.requirements = true;
    }

    void curve_points(PointsCurve& curve) {
        if (needed("at") == nullptr) return;
        const auto* at = typed("at", Kind::array, "an array");
        if (at == nullptr) return;
        for (std::size_t i = 0; i < at->items.size(); ++i) {
            const auto& point = at->items[i];
            const bool good = point.kind == Kind::array && point.items.size() == 2 &&
                              point.items[0].kind == Kind::number && point.items[1].kind == Kind::number;
            if (!good) {
                refuse(place("at") + "/" + std::to_string(i), point.shown(), "an array of two numbers");
                curve.at.push_back({not_read, not_read});
            } else {
                curve.at.push_back({point.items[0].number, point.items[1].number});
            }
        }
    }

    std::string place(const std::string& name) const { return at_ + pointer_part(name); }

    void refuse(std::string at, std::string found, std::string expected) {
        unread_.any = true;
        unread_.objects.insert(at_);
        if (problems_.size() < max_problems) {
            problems_.push_back({std::move(at), std::move(found), std::move(expected)});
        }
    }

    const JsonValue* given(const char* name) {
        known_.insert(name);
        return object_.find(name);
    }

    const JsonValue* needed(const char* name) {
        const auto* value = given(name);
        if (value == nullptr) refuse(at_, "no member \"" + std::string(name) + "\"", "one");
        return value;
    }

    const JsonValue* typed(const char* name, Kind kind, const char* expected) {
        const auto* value = given(name);
        if (value == nullptr || value->kind == kind) return value;
        refuse(place(name), value->shown(), expected);
        return nullptr;
    }

    std::optional<double> whole_number(const char* name, double largest) {
        const auto* value = typed(name, Kind::number, "a whole number");
        if (value == nullptr) return std::nullopt;
        if (std::floor(value->number) != value->number || value->number < 0 || value->number > largest) {
            refuse(place(name), value->shown(), "a whole number from 0 to " + JsonValue::of(largest).shown());
            return std::nullopt;
        }
        return value->number;
    }

    template<class Enum>
    bool word_in(const JsonValue& value, const std::string& at, Enum& out) {
        if (value.kind == Kind::string && !value.text.empty()) {
            const auto& list = Words<Enum>::list;
            const auto found = std::find(list.begin(), list.end(), value.text);
            if (found != list.end()) {
                out = static_cast<Enum>(found - list.begin());
                return true;
            }
        }
        refuse(at, value.shown(), words_of<Enum>());
        return false;
    }

    Id id_in(const JsonValue& value, const std::string& at) {
        if (value.kind == Kind::string && !value.text.empty()) return value.text;
        refuse(at, value.kind == Kind::string ? "an empty text" : value.shown(), "an id of 1 to 64 bytes");
        return {};
    }

    const JsonValue& object_;
    std::string at_;
    std::vector<Problem>& problems_;
    Unread& unread_;
    std::set<std::string> known_;
    std::vector<std::string> stated_;
    std::vector<std::string> left_out_;
    bool bad_id_ = false;
};

/// What the head of a file says. Without a version the file is read as one of this version, to name its other
/// faults; another format or a newer version may mean anything and is not read on.
struct Head {
    int version = current_version;
    bool read_on = true;
};

Head read_head(const JsonValue& file, std::vector<Problem>& problems) {
    Head head;
    if (file.kind != Kind::object) {
        problems.push_back({"", file.shown(), "an object"});
        return {current_version, false};
    }
    const auto* format = file.find("format");
    if (format == nullptr) {
        problems.push_back({"", "no member \"format\"", "\"steelyard-decision\""});
    } else if (format->kind != Kind::string || format->text != "steelyard-decision") {
        problems.push_back({"/format", format->shown(), "\"steelyard-decision\""});
        head.read_on = false;
    }
    const std::string known = "a version from 1 to " + std::to_string(current_version);
    const auto* version = file.find("version");
    if (version == nullptr) {
        problems.push_back({"", "no member \"version\"", known});
    } else if (version->kind != Kind::number || std::floor(version->number) != version->number ||
               version->number < 1) {
        problems.push_back({"/version", version->shown(), known});
    } else if (version->number > current_version) {
        problems.push_back({"/version", version->shown() + ", newer than this program knows", known});
        head.read_on = false;
    } else {
        head.version = static_cast<int>(version->number);
    }
    return head;
}

} // namespace

ReadResult read_decision(std::string_view text) {
    ReadResult result;
    ParsedJson parsed = parse_json(text);
    result.problems = std::move(parsed.problems);
    if (!parsed.whole) return result;

    const Head head = read_head(parsed.value, result.problems);
    if (!head.read_on) return result;
    const JsonValue file = migrate(std::move(parsed.value), head.version);

    Decision decision;
    Unread unread;
    unread.any = !result.problems.empty();
    Reader::read(file, "", decision, result.problems, unread);
    Checked checked = check(decision, unread);
    for (auto& problem : checked.problems) {
        if (result.problems.size() < max_problems) result.problems.push_back(std::move(problem));
    }
    if (!result.problems.empty()) return result;
    result.notices = std::move(checked.notices);
    result.decision = std::move(decision);
    return result;
}

} // namespace steelyard
