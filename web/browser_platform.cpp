#include "web/browser_platform.hpp"

#include <emscripten.h>

#include <array>
#include <ctime>
#include <utility>

#include "web/imports.hpp"

namespace steelyard {

namespace {

/// Takes the callback out of the list first: it may ask for the next thing while it runs.
template<class Callbacks, class... Values>
void answer(Callbacks& callbacks, int request, Values&&... values) {
    auto found = callbacks.find(request);
    if (found == callbacks.end()) return;
    auto done = std::move(found->second);
    callbacks.erase(found);
    done(std::forward<Values>(values)...);
}

int length_of(const std::string& text) {
    return static_cast<int>(text.size());
}

} // namespace

std::string BrowserPlatform::now() {
    const std::time_t seconds = std::time(nullptr);
    std::tm utc{};
    gmtime_r(&seconds, &utc);
    std::array<char, 32> text{};
    const std::size_t length = std::strftime(text.data(), text.size(), "%Y-%m-%dT%H:%M:%SZ", &utc);
    return std::string(text.data(), length);
}

double BrowserPlatform::milliseconds() {
    return emscripten_get_now();
}

std::string BrowserPlatform::new_id() {
    std::array<unsigned char, 16> bytes{};
    host_random(bytes.data(), static_cast<int>(bytes.size()));
    // Version 4 and the variant of RFC 9562, sections 5.4 and 4.1.
    bytes[6] = static_cast<unsigned char>((bytes[6] & 0x0F) | 0x40);
    bytes[8] = static_cast<unsigned char>((bytes[8] & 0x3F) | 0x80);
    static const char digits[] = "0123456789abcdef";
    std::string id;
    for (std::size_t i = 0; i < bytes.size(); ++i) {
        if (i == 4 || i == 6 || i == 8 || i == 10) id += '-';
        id += digits[bytes[i] >> 4];
        id += digits[bytes[i] & 0x0F];
    }
    return id;
}

void BrowserPlatform::save_file(const std::string& name, const std::string& media_type,
                                const std::string& text, std::function<void(SaveOutcome)> done) {
    saves_[++last_request_] = std::move(done);
    host_save_file(last_request_, name.c_str(), media_type.c_str(), text.data(), length_of(text));
}

void BrowserPlatform::pick_file() {
    host_pick_file();
}

void BrowserPlatform::copy_text(const std::string& text) {
    if (collecting_)
        collected_ = text;
    else
        host_copy_text(text.c_str());
}

void BrowserPlatform::list_kept(std::function<void(std::vector<KeptDecision>, std::string problem)> done) {
    lists_[++last_request_] = std::move(done);
    host_list_kept(last_request_);
}

void BrowserPlatform::load_kept(
    const std::string& id, std::function<void(std::optional<StoredDecision>, std::string problem)> done) {
    loads_[++last_request_] = std::move(done);
    host_load_kept(last_request_, id.c_str());
}

void BrowserPlatform::store(const StoredDecision& decision, std::function<void(SaveOutcome)> done) {
    saves_[++last_request_] = std::move(done);
    // A revision counts saves by one: it stays far below 2^53, where doubles stop being exact.
    host_store(last_request_, decision.id.c_str(), decision.title.c_str(), decision.text.data(),
               length_of(decision.text), decision.saved_at.c_str(), static_cast<double>(decision.revision));
}

void BrowserPlatform::forget(const std::string& id, std::function<void(SaveOutcome)> done) {
    saves_[++last_request_] = std::move(done);
    host_forget(last_request_, id.c_str());
}

void BrowserPlatform::claim(const std::string& id, bool take_over, std::function<void(Claim)> done) {
    claims_[++last_request_] = std::move(done);
    host_claim(last_request_, id.c_str(), take_over ? 1 : 0);
}

void BrowserPlatform::set_title(const std::string& title) {
    if (std::exchange(title_, title) != title) host_set_title(title.c_str());
}

void BrowserPlatform::set_unsaved(bool unsaved) {
    if (std::exchange(unsaved_, unsaved) != unsaved) host_set_unsaved(unsaved ? 1 : 0);
}

bool BrowserPlatform::prefers_dark() {
    return host_prefers_dark() != 0;
}

void BrowserPlatform::collect_copies(bool on) {
    collecting_ = on;
    if (on) collected_.reset();
}

void BrowserPlatform::answer_save(int request, SaveOutcome outcome) {
    answer(saves_, request, std::move(outcome));
}

void BrowserPlatform::answer_list(int request, std::vector<KeptDecision> kept, std::string problem) {
    answer(lists_, request, std::move(kept), std::move(problem));
}

void BrowserPlatform::answer_load(int request, std::optional<StoredDecision> decision, std::string problem) {
    answer(loads_, request, std::move(decision), std::move(problem));
}

void BrowserPlatform::answer_claim(int request, Claim claim) {
    answer(claims_, request, claim);
}

bool BrowserPlatform::waiting() const {
    return !saves_.empty() || !lists_.empty() || !loads_.empty() || !claims_.empty();
}

} // namespace steelyard
