#pragma once
#include <array>
#include <string>
#include <vector>
#include "core/decision/decision.hpp"
#include "core/results/results.hpp"
namespace steelyard {
struct EnoughAnswer { enum class Verdict { proven_no, found_yes, not_known } verdict = Verdict::not_known; struct A { Id a; Id b; double ratio; }; std::vector<A> answers; Id first_then; std::string why; };
class EnoughSearch { public: EnoughSearch(const Decision&, const Results&, const Id&, const Id&, std::vector<std::array<Id, 2>>) {} bool step() { return false; } double progress() const { return 1; } const EnoughAnswer& answer() const { return a_; } private: EnoughAnswer a_; };
inline std::vector<std::array<Id, 2>> unanswered_pairs(const Decision&, const Results&, const Id&, const Id&) { return {}; }
}
