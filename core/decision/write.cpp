#include "core/decision/write.hpp"

#include <algorithm>
#include <string_view>

#include "core/decision/members.hpp"
#include "core/decision/words.hpp"

namespace steelyard {
namespace {

/// Writes the members of one object. A member at its default is left out unless the file stated it.
class Writer {
public:
    explicit Writer(const Extras& extras) : extras_(extras) {}

    template<class T>
    static JsonValue write(const T& object) {
        Writer writer(object.extras);
        members(writer, object);
        for (const auto& member : object.extras.unknown) {
            writer.out_.add(member.name, parse_json(member.json, any_depth).value);
        }
        return std::move(writer.out_);
    }

    void format() {
        out_.add("format", JsonValue::of("steelyard-decision"));
        out_.add("version", JsonValue::of(1));
    }
    void id(const char* name, const Id& id) { out_.add(name, JsonValue::of(id)); }
    void maybe_id(const char* name, const Id& id) { text(name, id); }
    void needed_text(const char* name, const std::string& text) { out_.add(name, JsonValue::of(text)); }
    void text(const char* name, const std::string& text) {
        if (!text.empty() || stated(name)) out_.add(name, JsonValue::of(text));
    }
    void person_or_room(const char* name, const Id& by) {
        if (!by.empty()) {
            out_.add(name, JsonValue::of(by));
        } else if (stated(name)) {
            out_.add(name, JsonValue{});
        }
    }
    void number(const char* name, double number) { out_.add(name, JsonValue::of(number)); }
    void number_or(const char* name, double number, double usual) {
        if (number != usual || stated(name)) out_.add(name, JsonValue::of(number));
    }
    void maybe_number(const char* name, const std::optional<double>& number) {
        if (number) out_.add(name, JsonValue::of(*number));
    }
    void count_or(const char* name, int count, int usual) { number_or(name, count, usual); }
    void maybe_count(const char* name, const std::optional<int>& count) {
        if (count) out_.add(name, JsonValue::of(*count));
    }
    void seed(const char* name, std::uint64_t seed) { number_or(name, static_cast<double>(seed), 1.0); }
    void flag(const char* name, bool flag) {
        if (flag || stated(name)) out_.add(name, JsonValue::of(flag));
    }
    template<class Enum>
    void word(const char* name, Enum value, Enum usual = Enum{}) {
        if (value != usual || stated(name)) out_.add(name, JsonValue::of(steelyard::word(value)));
    }
    template<class Enum>
    void needed_word(const char* name, Enum value) {
        out_.add(name, JsonValue::of(steelyard::word(value)));
    }
    template<class Enum>
    void words(const char* name, const std::vector<Enum>& values) {
        if (values == std::vector<Enum>{Enum{}} && !stated(name)) return;
        JsonValue list = JsonValue::array();
        for (const auto value : values) list.items.push_back(JsonValue::of(steelyard::word(value)));
        out_.add(name, std::move(list));
    }
    void ids(const char* name, const std::vector<Id>& ids) {
        if (ids.empty() && !stated(name)) return;
        JsonValue list = JsonValue::array();
        for (const auto& id : ids) list.items.push_back(JsonValue::of(id));
        out_.add(name, std::move(list));
    }
    void id_pairs(const char* name, const std::vector<std::array<Id, 2>>& pairs) {
        if (pairs.empty() && !stated(name)) return;
        JsonValue list = JsonValue::array();
        for (const auto& [a, b] : pairs) {
            JsonValue pair = JsonValue::array();
            pair.items = {JsonValue::of(a), JsonValue::of(b)};
            list.items.push_back(std::move(pair));
        }
        out_.add(name, std::move(list));
    }
    void numbers_by_id(const char* name, const std::vector<std::pair<Id, double>>& numbers) {
        JsonValue object = JsonValue::object();
        for (const auto& [id, number] : numbers) object.add(id, JsonValue::of(number));
        out_.add(name, std::move(object));
    }
    template<class T>
    void list(const char* name, const std::vector<T>& objects) {
        if (!objects.empty() || stated(name)) needed_list(name, objects);
    }
    template<class T>
    void needed_list(const char* name, const std::vector<T>& objects) {
        JsonValue list = JsonValue::array();
        for (const auto& object : objects) list.items.push_back(write(object));
        out_.add(name, std::move(list));
    }
    template<class T>
    void needed_object(const char* name, const T& object) {
        out_.add(name, write(object));
    }
    template<class T>
    void maybe_object(const char* name, const std::optional<T>& object) {
        if (object) out_.add(name, write(*object));
    }
    template<class T>
    void object(const char* name, const T& object) {
        JsonValue value = write(object);
        if (!value.members.empty() || stated(name)) out_.add(name, std::move(value));
    }

    /// A leaf is written with its rate, an inner node with its way of weighing, unless the file did without.
    void node_kind(const Node& node) {
        if (node.is_leaf()) {
            word("weights", node.weights);
            if (node.rate != RateBy{} || !left_out("rate")) needed_word("rate", node.rate);
        } else if (node.weights != WeightsBy{} || !left_out("weights")) {
            needed_word("weights", node.weights);
        }
    }

    void curve_shape(const decltype(Curve::shape)& shape) {
        if (const auto* c = std::get_if<ProportionalCurve>(&shape)) {
            out_.add("kind", JsonValue::of("proportional"));
            needed_word("better", c->better);
        } else if (const auto* line = std::get_if<LineCurve>(&shape)) {
            out_.add("kind", JsonValue::of("line"));
            number("worst", line->worst);
            number("best", line->best);
        } else if (const auto* points = std::get_if<PointsCurve>(&shape)) {
            out_.add("kind", JsonValue::of("points"));
            JsonValue at = JsonValue::array();
            for (const auto& [x, worth] : points->at) {
                JsonValue point = JsonValue::array();
                point.items = {JsonValue::of(x), JsonValue::of(worth)};
                at.items.push_back(std::move(point));
            }
            out_.add("at", std::move(at));
        } else if (const auto* target = std::get_if<TargetCurve>(&shape)) {
            out_.add("kind", JsonValue::of("target"));
            number("target", target->target);
            number("tolerance", target->tolerance);
        }
    }

private:
    /// Unknown members were read within the limits of a whole file; on their own they only need to be read
    /// back.
    static constexpr JsonLimits any_depth{};

    static bool holds(const std::vector<std::string>& names, std::string_view name) {
        return std::find(names.begin(), names.end(), name) != names.end();
    }
    bool stated(std::string_view name) const { return holds(extras_.stated, name); }
    bool left_out(std::string_view name) const { return holds(extras_.left_out, name); }

    const Extras& extras_;
    JsonValue out_ = JsonValue::object();
};

} // namespace

JsonValue to_json(const Decision& decision) {
    return Writer::write(decision);
}
JsonValue to_json(const Settings& settings) {
    return Writer::write(settings);
}
JsonValue to_json(const Node& node) {
    return Writer::write(node);
}

std::string write_decision(const Decision& decision) {
    return write_json(to_json(decision));
}

} // namespace steelyard
