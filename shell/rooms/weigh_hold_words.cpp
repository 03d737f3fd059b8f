#include "shell/rooms/weigh_hold_words.hpp"

#include <algorithm>
#include <cstdio>

#include "core/decision/lookup.hpp"
#include "core/judgment/consistency_limit.hpp"
#include "shell/rooms/weigh_answers.hpp"
#include "shell/rooms/weigh_pairs.hpp"
#include "shell/words.hpp"

namespace steelyard {
namespace {

const char* const dash = "\xE2\x80\x94";

std::size_t pairs_of(const SetResult& entry) {
    return entry.items.size() * (entry.items.size() - 1) / 2;
}

/// As many answers as it takes to link all items, and no more.
bool just_linked(const SetResult& entry) {
    return entry.weights && pairs_of(entry) - entry.missing.size() + 1 == entry.items.size();
}

std::string unlinked(const Decision& d, const SetResult& entry) {
    std::string text = "No answer links these with each other: ";
    for (std::size_t p = 0; p < entry.parts.size(); ++p) {
        const auto& part = entry.parts[p];
        text += p == 0 ? "" : "; ";
        for (std::size_t i = 0; i < part.size(); ++i)
            text += (i == 0 ? "" : ", ") + item_name(d, entry.set, part[i]);
    }
    return text + ".";
}

/// Why there is no consistency ratio.
std::string no_ratio(const Decision& d, const SetResult& entry) {
    if (entry.items.size() <= 2) return "Two items have one answer, which cannot contradict itself.";
    if (entry.parts.size() > 1) return "The answers do not hang together yet.";
    if (just_linked(entry)) return "Just as many answers as link all items: none can contradict another.";
    if (!entry.ri)
        return "The table of " + table_name(d.settings.random_index) + " ends before " +
               std::to_string(entry.items.size()) + " items; another table can be chosen below.";
    return "The answers give no weights.";
}

std::string of_limit(const std::string& value, double limit, int decimals) {
    return value + ", limit " + decimals_text(limit, decimals);
}

HoldTerm ratio_term(const Decision& d, const SetResult& entry) {
    const std::string name = "Consistency ratio CR";
    if (!entry.cr) return {name, dash, no_ratio(d, entry)};
    std::string meaning = "CI divided by RI: 0 without any contradiction, about 1 for answers at random.";
    if (!entry.missing.empty())
        meaning += " With pairs missing it is an estimate; one set may be off by a tenth.";
    return {name, of_limit(decimals_text(*entry.cr, 3), d.settings.limit, 2), meaning};
}

HoldTerm index_term(const SetResult& entry) {
    const std::string name = "Consistency index CI";
    if (!entry.ci || !entry.lambda_max) return {name, dash, "The answers do not hang together yet."};
    return {name, decimals_text(*entry.ci, 3),
            "How far the answers are from fitting one another: (\xCE\xBBmax \xE2\x88\x92 n) / (n "
            "\xE2\x88\x92 1), the "
            "principal eigenvalue \xCE\xBBmax being " +
                decimals_text(*entry.lambda_max, 3) + " and n " + std::to_string(entry.items.size()) + "."};
}

HoldTerm random_term(const Decision& d, const SetResult& entry) {
    const std::string name = "Random index RI";
    if (!entry.ri) return {name, dash, no_ratio(d, entry)};
    return {name, figure_text(*entry.ri, 4),
            "The CI that answers at random give on average, from the table of " +
                table_name(d.settings.random_index) +
                (entry.missing.empty() ? "." : ", lowered for the pairs missing.")};
}

HoldTerm geometric_term(const Decision& d, const SetResult& entry) {
    const std::string name = "Geometric consistency index GCI";
    if (entry.gci) {
        const auto limit = geometric_consistency_limit(entry.items.size(), d.settings.limit);
        return {name, of_limit(decimals_text(*entry.gci, 3), limit.value_or(0), 3),
                "How widely the answers scatter about what the geometric mean's weights say of them, on the "
                "logarithmic scale."};
    }
    return {name, dash,
            entry.items.size() <= 2  ? "Two items have one answer, which cannot contradict itself."
            : entry.parts.size() > 1 ? "The answers do not hang together yet."
                                     : "It needs every pair to be answered."};
}

HoldTerm triad_term(const SetResult& entry) {
    const std::string name = "Koczkodaj's index";
    if (!entry.koczkodaj) return {name, dash, "No three items are judged in full."};
    const bool none = *entry.koczkodaj < 1e-9;
    return {
        name, decimals_text(*entry.koczkodaj, 3),
        none ? "No three answers contradict each other."
             : "By how much the worst three answers miss one another: 0 not at all, towards 1 more and more. "
               "They are:"};
}

HoldTerm zeta_term(const SetResult& entry) {
    const std::string name = "Kendall's coefficient \xCE\xB6";
    if (entry.zeta)
        return {name, decimals_text(*entry.zeta, 3),
                "1 where no three answers run in a circle, 0 where as many do as can."};
    return {name, dash,
            entry.items.size() <= 2  ? "It takes three items to make a circle."
            : !entry.missing.empty() ? "It needs every pair to be answered."
                                     : "It is not defined where answers are ties (1)."};
}

void add_left(std::vector<std::string>& list, std::size_t all, std::size_t most) {
    if (all > most) list.push_back("And " + std::to_string(all - most) + " more.");
}

} // namespace

std::string decimals_text(double value, int decimals) {
    char buffer[64];
    std::snprintf(buffer, sizeof buffer, "%.*f", decimals, value);
    return buffer;
}

std::string percent_text(double part) {
    return decimals_text(100 * part, 1) + " %";
}

std::string method_name(Method method) {
    switch (method) {
    case Method::eigenvector: return "eigenvector";
    case Method::geometric_mean: return "geometric mean";
    case Method::column_average: break;
    }
    return "columns averaged";
}

std::string table_name(RandomIndexTable table) {
    return table == RandomIndexTable::saaty_1980 ? "Saaty 1980" : "Alonso and Lamata 2006";
}

bool over_limit(const Decision& decision, const SetResult& entry) {
    return entry.cr && *entry.cr > decision.settings.limit;
}

bool hidden_while_sealed(const RoomView& view, const SetResult& entry) {
    return view.sealed() && (view.person.empty() || entry.by != view.person);
}

HoldWords hold_words(const RoomView& view, const SetResult& entry) {
    const Decision& d = view.decision;
    if (hidden_while_sealed(view, entry)) {
        return {"Sealed", "What the answers give shows once they are revealed.", HoldTone::open};
    }
    if (entry.missing.size() == pairs_of(entry)) {
        return {"Nothing is answered yet", "", HoldTone::open};
    }
    if (entry.parts.size() > 1) {
        return {"These answers do not hang together yet", unlinked(d, entry), HoldTone::open};
    }
    if (!entry.weights) {
        return {"The columns cannot be averaged yet",
                "That method needs every pair. The other two, in the settings below, do without some.",
                HoldTone::open};
    }
    const auto far = std::count_if(entry.misfits.begin(), entry.misfits.end(), [&](const Misfit& misfit) {
        return misfit_words(entry, misfit.a, misfit.b) == "far off";
    });
    if (over_limit(d, entry)) {
        return {far == 1 ? "One answer contradicts the others" : "Some answers contradict each other", "",
                HoldTone::contradicts};
    }
    if (!entry.cycles.empty()) {
        return {entry.cycles.size() == 1 ? "Three answers run in a circle" : "Some answers run in circles",
                entry.cr ? "By their size they hold together all the same: the ratio is within its limit."
                         : "",
                HoldTone::contradicts};
    }
    if (!entry.cr) {
        return {just_linked(entry) || entry.items.size() <= 2 ? "Nothing here can contradict"
                                                              : "These answers give weights",
                no_ratio(d, entry), HoldTone::holds};
    }
    return {"These answers hold together",
            entry.open.empty() ? "" : "As far as they go: some pairs are not answered.", HoldTone::holds};
}

std::vector<std::string> circle_sentences(const Decision& decision, const SetResult& entry,
                                          std::size_t most) {
    std::vector<std::string> list;
    const auto name = [&](const Id& item) { return item_name(decision, entry.set, item); };
    for (std::size_t k = 0; k < std::min(most, entry.cycles.size()); ++k) {
        const auto& c = entry.cycles[k];
        list.push_back(name(c[0]) + " over " + name(c[1]) + ", " + name(c[1]) + " over " + name(c[2]) +
                       ", yet " + name(c[2]) + " over " + name(c[0]) + ".");
    }
    add_left(list, entry.cycles.size(), most);
    return list;
}

std::vector<std::string> tied_circle_sentences(const Decision& decision, const SetResult& entry,
                                               std::size_t most) {
    std::vector<std::string> list;
    if (!entry.tied_cycles.empty()) list.push_back("Circles in which two count the same:");
    for (std::size_t k = 0; k < std::min(most, entry.tied_cycles.size()); ++k) {
        const auto& c = entry.tied_cycles[k];
        list.push_back(item_name(decision, entry.set, c[0]) + ", " + item_name(decision, entry.set, c[1]) +
                       " and " + item_name(decision, entry.set, c[2]) + ".");
    }
    add_left(list, entry.tied_cycles.size(), most);
    return list;
}

std::vector<HoldTerm> hold_terms(const Decision& decision, const SetResult& entry) {
    return {ratio_term(decision, entry),     index_term(entry), random_term(decision, entry),
            geometric_term(decision, entry), zeta_term(entry),  triad_term(entry)};
}

std::vector<std::string> worst_triad_sentences(const RoomView& view, const SetResult& entry) {
    std::vector<std::string> list;
    if (!entry.worst_triad || !entry.koczkodaj || *entry.koczkodaj < 1e-9) return list;
    const PairTable table(view, entry);
    const auto place = [&](const Id& item) {
        return static_cast<std::size_t>(std::find(entry.items.begin(), entry.items.end(), item) -
                                        entry.items.begin());
    };
    const auto& t = *entry.worst_triad;
    for (const auto& [a, b] : {std::pair{t[0], t[1]}, std::pair{t[1], t[2]}, std::pair{t[0], t[2]}}) {
        if (const auto ratio = table.ratio(place(a), place(b)))
            list.push_back(pair_sentence(view.decision, entry.set, a, b, *ratio) + ".");
    }
    return list;
}

} // namespace steelyard
