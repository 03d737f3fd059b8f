// The page's answers to what the program asked of it through imports.hpp, each with the number of its
// request.

#include <emscripten/emscripten.h>

#include <utility>

#include "web/running.hpp"

using steelyard::guarded;
using steelyard::KeptDecision;
using steelyard::Program;
using steelyard::StoredDecision;

namespace {

// A list comes entry by entry, then is closed with its request's number; one list at a time.
std::vector<KeptDecision> listed;

} // namespace

extern "C" {

EMSCRIPTEN_KEEPALIVE void app_answer_save(int request, int saved, int cancelled, const char* problem) {
    guarded([&](Program& p) { p.platform().answer_save(request, {saved != 0, cancelled != 0, problem}); });
}

EMSCRIPTEN_KEEPALIVE void app_answer_list_entry(const char* id, const char* title, const char* saved_at) {
    listed.push_back({id, title, saved_at});
}

EMSCRIPTEN_KEEPALIVE void app_answer_list(int request, const char* problem) {
    guarded([&](Program& p) { p.platform().answer_list(request, std::exchange(listed, {}), problem); });
}

EMSCRIPTEN_KEEPALIVE void app_answer_load(int request, const char* id, const char* title, const char* text,
                                          int length, const char* saved_at, double revision) {
    guarded([&](Program& p) {
        StoredDecision decision;
        decision.id = id;
        decision.title = title;
        decision.text.assign(text, static_cast<std::size_t>(length));
        decision.saved_at = saved_at;
        decision.revision = static_cast<std::uint64_t>(revision);
        p.platform().answer_load(request, std::move(decision), {});
    });
}

/// Nothing is kept under that name (an empty problem), or the store cannot be read.
EMSCRIPTEN_KEEPALIVE void app_answer_load_nothing(int request, const char* problem) {
    guarded([&](Program& p) { p.platform().answer_load(request, std::nullopt, problem); });
}

EMSCRIPTEN_KEEPALIVE void app_answer_claim(int request, int granted) {
    guarded([&](Program& p) {
        p.platform().answer_claim(request,
                                  granted ? steelyard::Claim::granted : steelyard::Claim::taken_elsewhere);
    });
}

} // extern "C"
