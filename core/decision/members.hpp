#pragma once

#include <concepts>
#include <type_traits>

#include "core/decision/decision.hpp"

/// The members of every object of the decision file, described once. A visitor `v` reads, writes or walks
/// them:
///   v.id, v.number, v.count        members that must be there
///   v.maybe_*, v.text, v.flag, v.word, v.list ...   members that may be absent
/// The order here is the order in which members are written.
namespace steelyard {

template<class T, class U>
concept Like = std::same_as<std::remove_const_t<T>, U>;

template<class V>
void members(V& v, Like<Person> auto& p) {
    v.id("id", p.id);
    v.text("name", p.name);
    v.text("role", p.role);
    v.number_or("share", p.share, 1.0);
    v.text("interest", p.interest);
    v.ids("abstains", p.abstains);
}

template<class V>
void members(V& v, Like<Option> auto& o) {
    v.id("id", o.id);
    v.text("name", o.name);
    v.text("note", o.note);
    v.flag("withdrawn", o.withdrawn);
}

template<class V>
void members(V& v, Like<Curve> auto& c) {
    v.curve_shape(c.shape);
}

template<class V>
void members(V& v, Like<CostSheet> auto& s) {
    v.count_or("years", s.years, 10);
    v.number_or("discount", s.discount, 0.0);
    v.maybe_number("volume", s.volume);
    v.word("result", s.result);
}

template<class V>
void members(V& v, Like<Grade> auto& g) {
    v.id("id", g.id);
    v.text("name", g.name);
    v.maybe_number("worth", g.worth);
}

template<class V>
void members(V& v, Like<Node> auto& n) {
    v.id("id", n.id);
    v.text("name", n.name);
    v.text("note", n.note);
    v.node_kind(n);
    v.text("unit", n.unit);
    v.maybe_object("curve", n.curve);
    v.maybe_object("cost_sheet", n.cost_sheet);
    v.word("worths", n.worths);
    v.list("grades", n.grades);
    v.list("children", n.children);
}

template<class V>
void members(V& v, Like<Judgment> auto& j) {
    v.id("set", j.set);
    v.person_or_room("by", j.by);
    v.id("a", j.a);
    v.id("b", j.b);
    v.number("ratio", j.ratio);
    v.text("a_range", j.a_range);
    v.text("b_range", j.b_range);
    v.text("note", j.note);
    v.text("at", j.at);
}

template<class V>
void members(V& v, Like<Finished> auto& f) {
    v.id("set", f.set);
    v.person_or_room("by", f.by);
    v.id_pairs("skipped", f.skipped);
}

template<class V>
void members(V& v, Like<PointsEntry> auto& p) {
    v.id("set", p.set);
    v.person_or_room("by", p.by);
    v.numbers_by_id("points", p.points);
    v.text("note", p.note);
    v.text("at", p.at);
}

template<class V>
void members(V& v, Like<Figure> auto& f) {
    v.id("criterion", f.criterion);
    v.id("option", f.option);
    v.maybe_number("value", f.value);
    v.maybe_number("low", f.low);
    v.maybe_number("high", f.high);
    v.text("source", f.source);
    v.maybe_count("round", f.round);
    v.word("status", f.status);
    v.text("valid_until", f.valid_until);
    v.text("note", f.note);
    v.text("at", f.at);
}

template<class V>
void members(V& v, Like<Cost> auto& c) {
    v.id("criterion", c.criterion);
    v.id("option", c.option);
    v.needed_text("line", c.line);
    v.needed_word("kind", c.kind);
    v.maybe_number("value", c.value);
    v.maybe_count("year", c.year);
    v.text("source", c.source);
    v.text("currency", c.currency);
    v.number_or("in_unit", c.in_unit, 1.0);
    v.text("note", c.note);
    v.text("at", c.at);
}

template<class V>
void members(V& v, Like<GradeEntry> auto& g) {
    v.id("criterion", g.criterion);
    v.id("option", g.option);
    v.maybe_id("grade", g.grade);
    v.person_or_room("by", g.by);
    v.text("source", g.source);
    v.text("note", g.note);
    v.text("at", g.at);
}

template<class V>
void members(V& v, Like<Waiver> auto& w) {
    v.person_or_room("by", w.by);
    v.text("at", w.at);
    v.text("why", w.why);
}

template<class V>
void members(V& v, Like<Requirement> auto& r) {
    v.id("id", r.id);
    v.text("name", r.name);
    v.text("note", r.note);
    v.text("unit", r.unit);
    v.maybe_id("criterion", r.criterion);
    v.maybe_id("node", r.node);
    v.maybe_number("at_least", r.at_least);
    v.maybe_number("at_most", r.at_most);
    v.maybe_number("min_worth", r.min_worth);
    v.flag("yes_no", r.yes_no);
    v.flag("safety", r.safety);
    v.maybe_object("waived", r.waived);
}

template<class V>
void members(V& v, Like<Check> auto& c) {
    v.id("requirement", c.requirement);
    v.id("option", c.option);
    v.maybe_number("value", c.value);
    v.maybe_number("low", c.low);
    v.maybe_number("high", c.high);
    v.word("state", c.state);
    v.text("source", c.source);
    v.text("note", c.note);
    v.person_or_room("by", c.by);
    v.text("at", c.at);
}

template<class V>
void members(V& v, Like<TrialSettings> auto& t) {
    v.count_or("n", t.n, 10000);
    v.seed("seed", t.seed);
    v.words("kinds", t.kinds);
    v.number_or("spread", t.spread, 1.5);
}

template<class V>
void members(V& v, Like<Settings> auto& s) {
    v.word("method", s.method);
    v.word("synthesis", s.synthesis, Synthesis::ideal);
    v.word("combine", s.combine);
    v.word("random_index", s.random_index);
    v.number_or("limit", s.limit, 0.10);
    v.number_or("too_close", s.too_close, 0.0);
    v.maybe_id("money", s.money);
    v.object("trials", s.trials);
}

template<class V>
void members(V& v, Like<FixedRules> auto& r) {
    v.text("fixed_at", r.fixed_at);
    v.person_or_room("by", r.by);
    v.text("sha256", r.sha256);
}

template<class V>
void members(V& v, Like<Outcome> auto& o) {
    v.maybe_id("option", o.option);
    v.ids("by", o.by);
    v.text("at", o.at);
    v.text("reasons", o.reasons);
    v.text("conditions", o.conditions);
    v.text("why_not_first", o.why_not_first);
}

template<class V>
void members(V& v, Like<LogEntry> auto& l) {
    v.text("at", l.at);
    v.person_or_room("by", l.by);
    v.text("did", l.did);
    v.text("why", l.why);
}

template<class V>
void members(V& v, Like<Signature> auto& s) {
    v.person_or_room("by", s.by);
    v.text("at", s.at);
    v.text("sha256", s.sha256);
    v.text("remark", s.remark);
}

template<class V>
void members(V& v, Like<Decision> auto& d) {
    v.format();
    v.text("id", d.id);
    v.text("title", d.title);
    v.text("question", d.question);
    v.text("author", d.author);
    v.text("decide_by", d.decide_by);
    v.text("notes", d.notes);
    v.list("people", d.people);
    v.needed_list("options", d.options);
    v.needed_object("criteria", d.criteria);
    v.list("judgments", d.judgments);
    v.list("finished", d.finished);
    v.list("points", d.points);
    v.list("figures", d.figures);
    v.list("costs", d.costs);
    v.list("grades", d.grades);
    v.list("requirements", d.requirements);
    v.list("checks", d.checks);
    v.object("settings", d.settings);
    v.maybe_object("rules", d.rules);
    v.maybe_object("outcome", d.outcome);
    v.list("log", d.log);
    v.list("signed", d.signatures);
}

} // namespace steelyard
