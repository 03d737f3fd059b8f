#include "tests/support/bad_files.hpp"
#include "tests/support/full_decision.hpp"

namespace steelyard::test {
namespace {

std::vector<BadFile> bad_numbers() {
    const auto sheet = [](const char* years) {
        return with("\"years\": 10", std::string("\"years\": ") + years);
    };
    const std::string sheet_at = "/criteria/children/0/children/1/cost_sheet";
    const auto ratio = [](const char* number) {
        return with("\"ratio\": 3,", std::string("\"ratio\": ") + number + ",");
    };
    const auto trials = [](const char* n) { return with("\"n\": 5000", std::string("\"n\": ") + n); };
    const auto seed = [](const char* n) { return with("\"seed\": 7", std::string("\"seed\": ") + n); };
    return {
        {"a ratio of zero", ratio("0"), {"/judgments/0/ratio"}},
        {"a ratio too small for a double", ratio("1e-999"), {"/judgments/0/ratio"}},
        {"a negative ratio", ratio("-3"), {"/judgments/0/ratio"}},
        {"a ratio just below 1/100", ratio("0.009999999999999998"), {"/judgments/0/ratio"}},
        {"a ratio just above 100", ratio("100.00000000000001"), {"/judgments/0/ratio"}},
        {"a negative share", with("\"share\": 0.5", "\"share\": -0.5"), {"/people/1/share"}},
        {"shares that are all zero",
         small_decision_text(R"(, "people": [{"id": "a", "share": 0}, {"id": "b", "share": 0}])"),
         {"/people"}},
        // 1 and -1 add up to 0, but they are not all 0.
        {"a negative share that cancels another",
         small_decision_text(R"(, "people": [{"id": "a", "share": 1}, {"id": "b", "share": -1}])"),
         {"/people/1/share"}},
        {"a line whose ends are the same",
         with("\"best\": 4000", "\"best\": 9000"),
         {"/criteria/children/0/children/0/curve/best"}},
        {"curve points that stand still", with("[80, 1]", "[40, 1]"), {"/criteria/children/3/curve/at/2"}},
        {"curve points that go back", with("[80, 1]", "[30, 1]"), {"/criteria/children/3/curve/at/2"}},
        {"two curve points out of order",
         with("[40, 0.5], [80, 1]", "[20, 0.5], [10, 1]"),
         {"/criteria/children/3/curve/at/1", "/criteria/children/3/curve/at/2"}},
        {"a curve point worth more than 1",
         with("[80, 1]", "[80, 1.01]"),
         {"/criteria/children/3/curve/at/2/1"}},
        {"a curve point worth less than 0",
         with("[20, 0]", "[20, -0.01]"),
         {"/criteria/children/3/curve/at/0/1"}},
        {"a target without tolerance",
         with("\"tolerance\": 10", "\"tolerance\": 0"),
         {"/criteria/children/4/curve/tolerance"}},
        {"a negative tolerance",
         with("\"tolerance\": 10", "\"tolerance\": -1"),
         {"/criteria/children/4/curve/tolerance"}},
        {"a grade worth more than 1",
         with("\"worth\": 0.6", "\"worth\": 1.2"),
         {"/criteria/children/2/grades/1/worth"}},
        {"a grade worth less than 0",
         with("\"worth\": 0.6", "\"worth\": -0.6"),
         {"/criteria/children/2/grades/1/worth"}},
        {"no years", sheet("0"), {sheet_at + "/years"}},
        {"negative years", sheet("-1"), {sheet_at + "/years"}},
        {"201 years", sheet("201"), {sheet_at + "/years"}},
        {"half a year", sheet("1.5"), {sheet_at + "/years"}},
        {"more years than an integer holds", sheet("3.9e9"), {sheet_at + "/years"}},
        {"more years than a long integer holds", sheet("18446744073709551617"), {sheet_at + "/years"}},
        {"a discount of -1", with("\"discount\": 0.08", "\"discount\": -1"), {sheet_at + "/discount"}},
        {"no volume", with("\"volume\": 12000", "\"volume\": 0"), {sheet_at + "/volume"}},
        {"a negative volume", with("\"volume\": 12000", "\"volume\": -5"), {sheet_at + "/volume"}},
        {"round zero", with("\"round\": 2", "\"round\": 0"), {"/figures/0/round"}},
        {"a negative round", with("\"round\": 2", "\"round\": -1"), {"/figures/0/round"}},
        {"a round beyond an integer", with("\"round\": 2", "\"round\": 3.9e9"), {"/figures/0/round"}},
        {"low above value", with("\"low\": 6000", "\"low\": 6151"), {"/figures/0/low"}},
        {"value above high", with("\"high\": 6600", "\"high\": 6149"), {"/figures/0/high"}},
        {"low above high without a value",
         with_first("figures", R"({"criterion": "price", "option": "o1", "low": 5, "high": 4})"),
         {"/figures/0/low"}},
        {"low above value in a check", with("\"low\": 72", "\"low\": 75"), {"/checks/0/low"}},
        {"value above high in a check", with("\"high\": 77", "\"high\": 73"), {"/checks/0/high"}},
        {"a cost in a negative year", with("\"year\": 5", "\"year\": -1"), {"/costs/1/year"}},
        {"a cost in year 201", with("\"year\": 5", "\"year\": 201"), {"/costs/1/year"}},
        {"a cost in half a year", with("\"year\": 5", "\"year\": 0.5"), {"/costs/1/year"}},
        {"an exchange rate of zero", with("\"in_unit\": 0.92", "\"in_unit\": 0"), {"/costs/0/in_unit"}},
        {"a negative exchange rate", with("\"in_unit\": 0.92", "\"in_unit\": -0.92"), {"/costs/0/in_unit"}},
        {"a least worth above 1",
         with("\"min_worth\": 0.3", "\"min_worth\": 1.3"),
         {"/requirements/3/min_worth"}},
        {"a least worth below 0",
         with("\"min_worth\": 0.3", "\"min_worth\": -0.3"),
         {"/requirements/3/min_worth"}},
        {"negative points", with("\"upkeep\": 30}", "\"upkeep\": -30}"), {"/points/0/points/upkeep"}},
        {"points that add up to zero",
         with(R"("price": 70, "upkeep": 30})", R"("price": 0, "upkeep": 0})"),
         {"/points/0/points"}},
        {"a limit of zero", with("\"limit\": 0.1", "\"limit\": 0"), {"/settings/limit"}},
        {"a negative limit", with("\"limit\": 0.1", "\"limit\": -0.1"), {"/settings/limit"}},
        {"a negative lead", with("\"too_close\": 0.02", "\"too_close\": -0.02"), {"/settings/too_close"}},
        {"a spread below 1", with("\"spread\": 1.25", "\"spread\": 0.99"), {"/settings/trials/spread"}},
        {"no trials", trials("0"), {"/settings/trials/n"}},
        {"negative trials", trials("-1"), {"/settings/trials/n"}},
        {"one trial too many", trials("10000001"), {"/settings/trials/n"}},
        {"half a trial", trials("0.5"), {"/settings/trials/n"}},
        {"trials beyond an integer", trials("3.9e9"), {"/settings/trials/n"}},
        {"a negative seed", seed("-1"), {"/settings/trials/seed"}},
        {"a seed with a fraction", seed("1.5"), {"/settings/trials/seed"}},
        // The next double after 2^53.
        {"a seed above 2^53", seed("9007199254740994"), {"/settings/trials/seed"}},
        {"a seed beyond a long integer", seed("1e20"), {"/settings/trials/seed"}},
    };
}

std::vector<BadFile> bad_words() {
    return {
        {"an unknown way of weighing",
         with(R"("weights": "points")", R"("weights": "equal")"),
         {"/criteria/children/0/weights"}},
        {"an unknown way of rating",
         with(R"("rate": "pairs")", R"("rate": "stars")"),
         {"/criteria/children/1/rate"}},
        {"a way of rating in capitals",
         with(R"("rate": "pairs")", R"("rate": "Pairs")"),
         {"/criteria/children/1/rate"}},
        {"an unknown source of worths",
         with(R"("worths": "given")", R"("worths": "guessed")"),
         {"/criteria/children/2/worths"}},
        {"an unknown kind of curve",
         with(R"("kind": "target")", R"("kind": "wave")"),
         {"/criteria/children/4/curve/kind"}},
        {"an unknown direction",
         with(R"("better": "less")", R"("better": "lower")"),
         {"/criteria/children/0/children/1/curve/better"}},
        {"an unknown result of a cost sheet",
         with(R"("result": "total")", R"("result": "sum")"),
         {"/criteria/children/0/children/1/cost_sheet/result"}},
        {"an unknown status",
         with(R"("status": "quoted")", R"("status": "promised")"),
         {"/figures/0/status"}},
        {"an empty status", with(R"("status": "quoted")", R"("status": "")"), {"/figures/0/status"}},
        {"an unknown kind of cost", with(R"("kind": "per_year")", R"("kind": "yearly")"), {"/costs/0/kind"}},
        {"an unknown state of a check",
         with(R"("state": "met")", R"("state": "passed")"),
         {"/checks/1/state"}},
        {"an empty state of a check", with(R"("state": "met")", R"("state": "")"), {"/checks/1/state"}},
        {"an unknown method", with("\"eigenvector\"", "\"eigen\""), {"/settings/method"}},
        {"an unknown synthesis", with("\"ideal\"", "\"best\""), {"/settings/synthesis"}},
        {"an unknown way to combine",
         with(R"("combine": "judgments")", R"("combine": "mean")"),
         {"/settings/combine"}},
        {"an unknown table", with("\"alonso-lamata-2006\"", "\"saaty-1981\""), {"/settings/random_index"}},
        {"an unknown kind of trial",
         with(R"(["weights", "judgments", "figures"])", R"(["weights", "grades"])"),
         {"/settings/trials/kinds/1"}},
    };
}

std::vector<BadFile> bad_sizes() {
    const std::string id65(65, 'i');
    const std::string bytes65 = repeated("\xc3\xa4", 32) + "i"; // 33 characters, 65 bytes
    const std::string long_text(65537, 't');
    const std::string many = "{\"set\": \"goal\", \"a\": \"cost\", \"b\": \"ease\", \"ratio\": 0},";
    const std::string thirteen =
        R"({"format": "steelyard-decision", "version": 1, "options": [], "criteria": )" + deep_tree_text(13) +
        "}";
    const auto places = [](const std::string& before, int count, const std::string& after) {
        std::vector<std::string> all;
        for (int i = 0; i < count; ++i) all.push_back(before + std::to_string(i) + after);
        return all;
    };
    return {
        {"an empty id of a person", with_first("people", R"({"id": ""})"), {"/people/0/id"}},
        {"an empty id of an option", with_first("options", R"({"id": ""})"), {"/options/0/id"}},
        {"an empty id of a criterion",
         exchanged(small_decision_text(), "\"goal\"", "\"\""),
         {"/criteria/id"}},
        {"an empty id of a requirement", with_first("requirements", R"({"id": ""})"), {"/requirements/0/id"}},
        {"an empty id of a grade",
         with(R"("id": "k3")", R"("id": "")"),
         {"/criteria/children/5/grades/2/id"}},
        {"an empty name for who said it", with(R"("by": null)", R"("by": "")"), {"/judgments/2/by"}},
        {"an empty id where a grade is given",
         with(R"("grade": "g2")", R"("grade": "")"),
         {"/grades/0/grade"}},
        {"an id of a person of 65 bytes",
         with_first("people", "{\"id\": \"" + id65 + "\"}"),
         {"/people/0/id"}},
        {"an id of an option of 65 bytes",
         with_first("options", "{\"id\": \"" + id65 + "\"}"),
         {"/options/0/id"}},
        {"an id of a criterion of 65 bytes",
         exchanged(small_decision_text(), "goal", id65),
         {"/criteria/id"}},
        {"an id of a requirement of 65 bytes",
         with_first("requirements", "{\"id\": \"" + id65 + "\"}"),
         {"/requirements/0/id"}},
        {"an id of 33 characters in 65 bytes",
         with_first("options", "{\"id\": \"" + bytes65 + "\"}"),
         {"/options/0/id"}},
        {"a text of 65,537 bytes", with("\"Works council\"", "\"" + long_text + "\""), {"/author"}},
        {"a text of 65,537 bytes in fewer characters",
         with("\"Works council\"", "\"" + repeated("\xc3\xa4", 32768) + "t\""),
         {"/author"}},
        {"a note of 65,537 bytes", with("\"said twice\"", "\"" + long_text + "\""), {"/judgments/0/note"}},
        {"a text of 65,537 bytes in an unknown member",
         with_member("extra", "[\"" + long_text + "\"]"),
         {"/extra/0"}},
        {"a tree of 13 levels", thirteen, {"/criteria" + repeated("/children/0", 12)}},
        {"101 faulty entries, of which 100 are told",
         small_decision_text(R"(, "log": [)" + repeated("5,", 100) + "5]"), places("/log/", 100, "")},
        {"150 faulty ratios, of which 100 are told",
         with_first("judgments", repeated(many, 149) + many.substr(0, many.size() - 1)),
         places("/judgments/", 100, "/ratio")},
    };
}

std::vector<BadFile> two_faults() {
    const auto both = [](const std::string& text, const char* piece, const char* with) {
        return exchanged(text, piece, with);
    };
    return {
        {"a text and a ratio",
         both(with("\"Works council\"", "5"), "\"ratio\": 3,", "\"ratio\": 300,"),
         {"/author", "/judgments/0/ratio"}},
        {"an unknown word and a lost id",
         both(with("\"quoted\"", "\"promised\""), R"("a": "k1")", R"("a": "k9")"),
         {"/figures/0/status", "/judgments/2/a"}},
        {"a member twice and a range upside down",
         both(with("\"did\": \"opened\",", "\"did\": \"a\", \"did\": \"b\","), "\"low\": 72", "\"low\": 75"),
         {"/log/0/did", "/checks/0/low"}},
        {"two numbers in one entry",
         both(with("\"round\": 2", "\"round\": 0"), "\"high\": 6600", "\"high\": 1"),
         {"/figures/0/round", "/figures/0/high"}},
        {"no version and an unknown method",
         both(with("\"version\": 1,", ""), "\"eigenvector\"", "\"eigen\""),
         {"", "/settings/method"}},
        {"a number beyond a double and a negative share",
         both(with("\"ratio\": 3,", "\"ratio\": 1e999,"), "\"share\": 0.5", "\"share\": -1"),
         {"/judgments/0/ratio", "/people/1/share"}},
    };
}

} // namespace

std::vector<BadFile> bad_values() {
    std::vector<BadFile> all = bad_numbers();
    for (const auto& part : {bad_words(), bad_sizes(), two_faults()})
        all.insert(all.end(), part.begin(), part.end());
    return all;
}

} // namespace steelyard::test
