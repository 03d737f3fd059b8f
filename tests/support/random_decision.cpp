#include "tests/support/random_decision.hpp"

#include <algorithm>

#include "tests/support/random_maker.hpp"

namespace steelyard::testing {

RandomMaker::RandomMaker(std::uint64_t seed, const DecisionSize& size) : dice_(seed), size_(size) {
    const int roll = dice_.below(100);
    progress_ = roll < 45   ? Progress::finished
                : roll < 70 ? Progress::nearly
                : roll < 90 ? Progress::half
                            : Progress::started;
}

bool RandomMaker::answered() {
    switch (progress_) {
    case Progress::finished: return true;
    case Progress::nearly: return dice_.chance(93);
    case Progress::half: return dice_.chance(60);
    case Progress::started: break;
    }
    return dice_.chance(20);
}

std::string RandomMaker::text() {
    static const std::vector<std::string> texts{
        "",
        "",
        "Brook",
        "Lathe 4, used",
        "Größe und Gewicht",
        "a \"quoted\" word",
        "first line\nsecond line\ttab",
        "价格 / 交期",
        "back\\slash",
        "Naïve façade – 20 °C ± 1",
    };
    return dice_.pick(texts);
}

std::string RandomMaker::time() {
    std::string moment = "2026-12-01T09:00:00Z";
    moment[9] = static_cast<char>('1' + dice_.below(9));
    moment[15] = static_cast<char>('0' + dice_.below(10));
    return moment;
}

void RandomMaker::make_people_and_options() {
    int options = dice_.between(2, 6);
    if (dice_.chance(40)) options = dice_.between(1, 9);
    options = std::min(options, size_.options);
    const bool withdrawals = dice_.chance(35);
    for (int i = 1; i <= options; ++i) {
        Option option;
        option.id = "o" + std::to_string(i);
        option.name = text();
        option.withdrawn = withdrawals && dice_.chance(25);
        decision_.options.push_back(option);
    }

    const int people = dice_.chance(25) ? 0 : std::min(dice_.between(1, 5), size_.people);
    static const std::vector<double> shares{1, 1, 1, 1, 2, 3, 0.5, 0};
    bool any_share = false;
    for (int i = 1; i <= people; ++i) {
        Person person;
        person.id = "p" + std::to_string(i);
        person.name = text();
        person.role = text();
        person.share = dice_.pick(shares);
        any_share = any_share || person.share > 0;
        if (dice_.chance(15)) person.interest = text();
        if (dice_.chance(15)) person.abstains.push_back(dice_.pick(decision_.options).id);
        decision_.people.push_back(person);
    }
    if (!any_share && people > 0) decision_.people.front().share = 1;
}

void RandomMaker::make_settings() {
    Settings& settings = decision_.settings;
    settings.method = dice_.pick<Method>(
        {Method::eigenvector, Method::eigenvector, Method::geometric_mean, Method::column_average});
    settings.synthesis = dice_.pick<Synthesis>({Synthesis::ideal, Synthesis::ideal, Synthesis::distributive});
    settings.combine =
        dice_.pick<Combine>({Combine::judgments, Combine::priorities, Combine::priorities_arithmetic});
    settings.random_index =
        dice_.pick<RandomIndexTable>({RandomIndexTable::alonso_lamata_2006,
                                      RandomIndexTable::alonso_lamata_2006, RandomIndexTable::saaty_1980});
    settings.limit = dice_.pick<double>({0.1, 0.1, 0.05, 0.08, 0.2});
    settings.too_close = dice_.pick<double>({0, 0, 0.01});
    for (const Node& node : nodes_)
        if (node.is_leaf() && node.rate == RateBy::figure && dice_.chance(40)) settings.money = node.id;
    settings.trials.n = dice_.pick<int>({1, 1000, 10000, 10000});
    settings.trials.seed = static_cast<std::uint64_t>(dice_.below(1000000));
    settings.trials.kinds =
        dice_.pick<std::vector<TrialKind>>({{TrialKind::weights},
                                            {TrialKind::weights, TrialKind::figures},
                                            {TrialKind::judgments},
                                            {TrialKind::weights, TrialKind::judgments, TrialKind::figures}});
    settings.trials.spread = dice_.pick<double>({1.5, 1.5, 1, 1.3, 2});
}

void RandomMaker::make_papers() {
    decision_.id = "random";
    decision_.title = text();
    decision_.question = text();
    decision_.author = text();
    decision_.notes = text();
    const std::vector<Option>& options = decision_.options;
    const std::vector<Person>& people = decision_.people;
    const Id someone = people.empty() ? Id() : dice_.pick(people).id;
    if (dice_.chance(20)) decision_.decide_by = "2027-02-26";
    if (dice_.chance(20)) {
        LogEntry entry;
        entry.at = time();
        entry.by = someone;
        entry.did = text();
        entry.why = text();
        decision_.log.push_back(entry);
    }
    if (dice_.chance(15)) {
        FixedRules rules;
        rules.fixed_at = time();
        rules.by = someone;
        rules.sha256 = std::string(64, static_cast<char>('a' + dice_.below(6)));
        decision_.rules = rules;
    }
    if (dice_.chance(15)) {
        Outcome outcome;
        outcome.option = dice_.pick(options).id;
        if (!someone.empty()) outcome.by.push_back(someone);
        outcome.at = time();
        outcome.reasons = text();
        decision_.outcome = outcome;
    }
    if (dice_.chance(15)) {
        Signature signature;
        signature.by = someone;
        signature.at = time();
        signature.sha256 = std::string(64, static_cast<char>('0' + dice_.below(10)));
        signature.remark = text();
        decision_.signatures.push_back(signature);
    }
    if (dice_.chance(10)) decision_.extras.unknown.push_back({"x_ticket", "\"A-17\""});
    if (dice_.chance(10))
        decision_.options.front().extras.unknown.push_back({"x_drawing", "[1,2.5,{\"sheet\":null}]"});
}

Decision random_decision(std::uint64_t seed, const DecisionSize& size) {
    RandomMaker maker(seed, size);
    maker.make_people_and_options();
    maker.make_tree();
    maker.make_settings();
    maker.make_answers();
    maker.make_figures();
    maker.make_grades();
    maker.make_requirements();
    maker.make_papers();
    return maker.decision();
}

} // namespace steelyard::testing
