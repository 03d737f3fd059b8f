#include "core/decision/apply.hpp"

#include <algorithm>
#include <utility>

#include "core/decision/check.hpp"
#include "core/decision/json_value.hpp"
#include "core/decision/lookup.hpp"
#include "core/decision/prune.hpp"

namespace steelyard {
namespace {

std::vector<Option>& list_of(Decision& d, const Option*) {
    return d.options;
}
std::vector<Person>& list_of(Decision& d, const Person*) {
    return d.people;
}
std::vector<Requirement>& list_of(Decision& d, const Requirement*) {
    return d.requirements;
}

std::vector<Judgment>& entries_of(Decision& d, const Judgment*) {
    return d.judgments;
}
std::vector<PointsEntry>& entries_of(Decision& d, const PointsEntry*) {
    return d.points;
}
std::vector<Finished>& entries_of(Decision& d, const Finished*) {
    return d.finished;
}
std::vector<Figure>& entries_of(Decision& d, const Figure*) {
    return d.figures;
}
std::vector<Cost>& entries_of(Decision& d, const Cost*) {
    return d.costs;
}
std::vector<GradeEntry>& entries_of(Decision& d, const GradeEntry*) {
    return d.grades;
}
std::vector<Check>& entries_of(Decision& d, const Check*) {
    return d.checks;
}

template<class T>
void insert_at(std::vector<T>& list, std::size_t at, T value) {
    list.insert(list.begin() + static_cast<std::ptrdiff_t>(std::min(at, list.size())), std::move(value));
}

/// Carries out edits one after the other on a decision of its own.
class Applier {
public:
    explicit Applier(Decision decision) : d_(std::move(decision)) {}

    void operator()(const SetHeading& e) {
        switch (e.heading) {
        case Heading::title: d_.title = e.text; break;
        case Heading::question: d_.question = e.text; break;
        case Heading::author: d_.author = e.text; break;
        case Heading::decide_by: d_.decide_by = e.text; break;
        case Heading::notes: d_.notes = e.text; break;
        }
    }

    template<class T>
    void operator()(const Add<T>& e) {
        insert_at(list_of(d_, static_cast<T*>(nullptr)), e.at, e.value);
    }
    template<class T>
    void operator()(const Change<T>& e) {
        if (T* old = find(list_of(d_, static_cast<T*>(nullptr)), e.value.id)) *old = e.value;
    }
    template<class T>
    void operator()(const Move<T>& e) {
        auto& list = list_of(d_, static_cast<T*>(nullptr));
        if (T* old = find(list, e.id)) {
            T value = std::move(*old);
            list.erase(list.begin() + (old - list.data()));
            insert_at(list, e.to, std::move(value));
        }
    }
    template<class T>
    void operator()(const Remove<T>& e) {
        auto& list = list_of(d_, static_cast<T*>(nullptr));
        if (T* old = find(list, e.id)) list.erase(list.begin() + (old - list.data()));
        refuse_if_on_record(static_cast<T*>(nullptr), e.id);
    }

    void operator()(const AddNode& e) {
        if (Node* parent = node(e.parent)) {
            if (parent->is_leaf()) stop_rating(*parent);
            insert_at(parent->children, e.at, e.node);
        }
    }
    void operator()(const ChangeNode& e) {
        if (Node* old = node(e.node.id)) {
            Node changed = e.node;
            changed.children = std::move(old->children);
            *old = std::move(changed);
        }
    }
    void operator()(const MoveNode& e) {
        const Node* moved = node(e.node);
        if (moved == nullptr || node(e.parent) == nullptr) return;
        if (find_node(*moved, e.parent) != nullptr) {
            refuse("a criterion moved below itself", "another place");
            return;
        }
        Node value = *moved;
        take_out(e.node);
        (*this)(AddNode{e.parent, std::move(value), e.at});
    }
    void operator()(const RemoveNode& e) {
        if (node(e.node) == nullptr) return;
        if (e.node == d_.criteria.id) {
            refuse("the goal itself", "a criterion below it");
            return;
        }
        take_out(e.node);
    }

    template<class T>
    void operator()(const Enter<T>& e) {
        entries_of(d_, static_cast<T*>(nullptr)).push_back(e.entry);
    }
    void operator()(const ClearJudgment& e) {
        std::erase_if(d_.judgments, [&](const Judgment& j) {
            const bool pair = (j.a == e.a && j.b == e.b) || (j.a == e.b && j.b == e.a);
            return j.set == e.set && j.by == e.by && pair;
        });
    }
    void operator()(const ClearPoints& e) {
        std::erase_if(d_.points, [&](const PointsEntry& p) { return p.set == e.set && p.by == e.by; });
    }
    void operator()(const ReopenSet& e) {
        std::erase_if(d_.finished, [&](const Finished& f) { return f.set == e.set && f.by == e.by; });
    }
    void operator()(const ChangeSettings& e) { d_.settings = e.settings; }

    Decision d_;
    std::vector<Problem> problems_;

private:
    void refuse(std::string found, std::string expected) {
        problems_.push_back({"", std::move(found), std::move(expected)});
    }

    template<class T>
    T* find(std::vector<T>& list, const Id& id) {
        const auto found = std::find_if(list.begin(), list.end(), [&](const T& x) { return x.id == id; });
        if (found != list.end()) return &*found;
        refuse("the id " + JsonValue::of(id).shown(), "one that is there");
        return nullptr;
    }
    Node* node(const Id& id) {
        Node* found = find_node(d_.criteria, id);
        if (found == nullptr) refuse("the id " + JsonValue::of(id).shown(), "a criterion that is there");
        return found;
    }

    static void stop_rating(Node& node) {
        node.rate = RateBy::pairs;
        node.worths = WorthsBy::given;
        node.unit.clear();
        node.curve.reset();
        node.cost_sheet.reset();
        node.grades.clear();
    }

    void take_out(const Id& id) {
        Node& parent = *find_node(d_.criteria, find_parent(d_.criteria, id)->id);
        std::erase_if(parent.children, [&](const Node& child) { return child.id == id; });
    }

    void refuse_if_on_record(const Option*, const Id& id) {
        if (d_.outcome && d_.outcome->option == id) refuse("an option that the outcome names", "another one");
    }
    void refuse_if_on_record(const Requirement*, const Id&) {}
    void refuse_if_on_record(const Person*, const Id& id) {
        const bool decided =
            d_.outcome && std::find(d_.outcome->by.begin(), d_.outcome->by.end(), id) != d_.outcome->by.end();
        const bool fixed = d_.rules && d_.rules->by == id;
        const bool waived = std::any_of(d_.requirements.begin(), d_.requirements.end(),
                                        [&](const Requirement& r) { return r.waived && r.waived->by == id; });
        const bool has_signed = std::any_of(d_.signatures.begin(), d_.signatures.end(),
                                            [&](const Signature& s) { return s.by == id; });
        if (decided || fixed || waived || has_signed) {
            refuse("a person who decided, fixed the rules, waived a requirement or signed",
                   "a person without such an act; a share of 0 takes somebody out of the ranking");
        }
    }
};

/// Edits after which entries may no longer fit. An entry that does not fit when it is made is refused, not
/// removed.
struct ChangesStructure {
    template<class T>
    bool operator()(const T&) const {
        return true;
    }
    template<class T>
    bool operator()(const Enter<T>&) const {
        return false;
    }
    bool operator()(const SetHeading&) const { return false; }
    bool operator()(const ClearJudgment&) const { return false; }
    bool operator()(const ClearPoints&) const { return false; }
    bool operator()(const ReopenSet&) const { return false; }
    bool operator()(const ChangeSettings&) const { return false; }
};

bool changes_structure(const Edit& edit) {
    return std::visit(ChangesStructure{}, edit);
}

void add_count(std::string& text, std::size_t count, const char* one, const char* many) {
    if (count == 0) return;
    text += (text.empty() ? "" : ", ") + std::to_string(count) + " " + (count == 1 ? one : many);
}

} // namespace

Losses& Losses::operator+=(const Losses& other) {
    judgments += other.judgments;
    points += other.points;
    figures += other.figures;
    costs += other.costs;
    grades += other.grades;
    checks += other.checks;
    requirements += other.requirements;
    return *this;
}

std::string sentence(const Losses& losses) {
    std::string text;
    add_count(text, losses.judgments, "judgment", "judgments");
    add_count(text, losses.points, "set of points", "sets of points");
    add_count(text, losses.figures, "figure", "figures");
    add_count(text, losses.costs, "cost line", "cost lines");
    add_count(text, losses.grades, "grade", "grades");
    add_count(text, losses.requirements, "must", "musts");
    add_count(text, losses.checks, "check", "checks");
    if (text.empty()) return text;
    if (const auto comma = text.rfind(", "); comma != std::string::npos) text.replace(comma, 2, " and ");
    const std::size_t all = losses.judgments + losses.points + losses.figures + losses.costs + losses.grades +
                            losses.requirements + losses.checks;
    return text + (all == 1 ? " goes with it." : " go with it.");
}

Applied apply(const Decision& decision, const std::vector<Edit>& edits) {
    Applied applied{decision, {}, {}};
    for (const auto& edit : edits) {
        Applier applier(std::move(applied.decision));
        std::visit(applier, edit);
        applied.decision = std::move(applier.d_);
        if (!applier.problems_.empty()) {
            applied.problems = std::move(applier.problems_);
            return applied;
        }
        if (changes_structure(edit)) applied.losses += prune(applied.decision, decision);
    }
    applied.problems = check(applied.decision).problems;
    return applied;
}

} // namespace steelyard
