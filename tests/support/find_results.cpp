#include "tests/support/find_results.hpp"

#include <algorithm>
#include <array>
#include <stdexcept>

namespace steelyard::testing {
namespace {

template<class List, class Test>
const auto& the_one(const List& list, const std::string& what, Test test) {
    const auto found = std::find_if(list.begin(), list.end(), test);
    if (found == list.end()) throw std::logic_error("not among the results: " + what);
    return *found;
}

std::size_t place(const Results& results, const Id& option) {
    const Id& id = the_one(results.options, option, [&](const Id& o) { return o == option; });
    return static_cast<std::size_t>(&id - results.options.data());
}

} // namespace

const SetResult& set_of(const Results& results, const Id& set, const Id& by) {
    return the_one(results.sets, "set " + set + " by " + by,
                   [&](const SetResult& s) { return s.set == set && s.by == by; });
}

double score_of(const Results& results, const Id& option) {
    return results.scores.at(place(results, option));
}

int rank_of(const Results& results, const Id& option) {
    return results.ranks.at(place(results, option));
}

const LeafResult& leaf_of(const Results& results, const Id& leaf) {
    return the_one(results.leaves, "leaf " + leaf, [&](const LeafResult& l) { return l.leaf == leaf; });
}

double local_of(const Results& results, const Id& leaf, const Id& option) {
    return leaf_of(results, leaf).local.at(place(results, option));
}

bool missing_on(const Results& results, const Id& leaf, const Id& option) {
    return leaf_of(results, leaf).missing.at(place(results, option));
}

const MustResult& must_of(const Results& results, const Id& requirement, const Id& option) {
    return the_one(results.musts, "must " + requirement + " of " + option,
                   [&](const MustResult& m) { return m.requirement == requirement && m.option == option; });
}

std::vector<std::string> open_words(const Results& results) {
    static constexpr std::array kinds{"judgment", "points", "figure",     "curve",
                                      "grade",    "worth",  "requirement"};
    std::vector<std::string> lines;
    for (const auto& item : results.open) {
        std::string line = kinds.at(static_cast<std::size_t>(item.kind));
        for (const Id* id :
             {&item.set, &item.a, &item.b, &item.criterion, &item.requirement, &item.option, &item.grade}) {
            if (!id->empty()) line += " " + *id;
        }
        lines.push_back(line);
    }
    return lines;
}

std::vector<std::string> noticed_at(const Results& results, std::string_view code) {
    std::vector<std::string> places;
    for (const auto& notice : results.notices) {
        if (notice.code == code) places.push_back(notice.at);
    }
    return places;
}

} // namespace steelyard::testing
