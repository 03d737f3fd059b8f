#include "shell/file_keeper.hpp"

#include <utility>

#include "core/decision/write.hpp"

namespace steelyard {
namespace {

/// Long enough to gather a burst of edits into one write, short enough that a crash costs nothing worth
/// mentioning.
constexpr double store_after = 0.3;

} // namespace

void FileKeeper::opened(const std::string& id, std::uint64_t session_revision, std::uint64_t stored_revision,
                        const std::string& stored_at) {
    id_ = id;
    ++generation_;
    seen_revision_ = session_revision;
    stored_session_ = session_revision;
    file_session_ = 0;
    stored_revision_ = stored_revision;
    stored_at_ = stored_at;
    file_at_.clear();
    problem_.clear();
    wants_store_ = false;
    claim_ = Claim::granted;
    ++busy_;
    platform_.claim(id_, false, [this, generation = generation_](Claim claim) {
        --busy_;
        if (generation == generation_) claim_ = claim;
    });
    platform_.set_unsaved(false);
}

void FileKeeper::take_over() {
    ++busy_;
    platform_.claim(id_, true, [this, generation = generation_](Claim claim) {
        --busy_;
        if (generation == generation_) claim_ = claim;
    });
}

void FileKeeper::tick(Session& session, double seconds) {
    if (session.revision() != seen_revision_) {
        seen_revision_ = session.revision();
        wants_store_ = true;
        waited_ = 0;
        platform_.set_unsaved(true);
    }
    if (!wants_store_ || busy_ > 0) return;
    waited_ += seconds;
    if (waited_ >= store_after) store(session);
}

void FileKeeper::flush(Session& session) {
    if (id_.empty()) return; // Nothing was opened yet: what there is now must not reach the store.
    if (session.revision() != stored_session_) store(session);
}

void FileKeeper::store(Session& session) {
    wants_store_ = false;
    if (read_only()) return;
    const std::uint64_t revision = session.revision();
    StoredDecision stored{id_, session.decision().title, write_decision(session.decision()), platform_.now(),
                          stored_revision_ + 1};
    ++busy_;
    platform_.store(stored, [this, stored, revision, generation = generation_](SaveOutcome outcome) {
        --busy_;
        if (generation != generation_) return;
        if (outcome.saved) {
            stored_revision_ = stored.revision;
            stored_session_ = revision;
            stored_at_ = stored.saved_at;
            problem_.clear();
            platform_.set_unsaved(seen_revision_ != revision);
        } else {
            problem_ = outcome.problem;
        }
    });
}

void FileKeeper::save_file(Session& session, std::function<void(SaveOutcome)> done) {
    const std::uint64_t revision = session.revision();
    const std::string now = platform_.now();
    ++busy_;
    platform_.save_file(
        file_name(session.decision().title, now, ".decision.json"), "application/json",
        write_decision(session.decision()),
        [this, revision, now, done = std::move(done), generation = generation_](SaveOutcome outcome) {
            --busy_;
            if (outcome.saved && generation == generation_) {
                file_session_ = revision;
                file_at_ = now;
                if (!problem_.empty()) platform_.set_unsaved(seen_revision_ != revision);
            }
            done(outcome);
        });
}

std::string FileKeeper::status(const Session& session) const {
    std::string text;
    if (read_only()) return "open for reading only: another page writes it";
    if (!stored_at_.empty()) text = "saved here " + clock_text(stored_at_);
    if (!file_at_.empty()) {
        text += (text.empty() ? "file " : " \xC2\xB7 file ") + clock_text(file_at_);
        if (session.revision() != file_session_) text += ", changed since";
    }
    return text;
}

std::string clock_text(const std::string& iso) {
    return iso.size() >= 16 && iso[10] == 'T' ? iso.substr(11, 5) + " UTC" : iso;
}

std::string file_name(const std::string& title, const std::string& now, const std::string& ending) {
    std::string name;
    for (const char c : title) {
        const bool plain = (c >= 'a' && c <= 'z') || (c >= '0' && c <= '9') || (c >= 'A' && c <= 'Z');
        if (plain) {
            name += c >= 'A' && c <= 'Z' ? static_cast<char>(c - 'A' + 'a') : c;
        } else if (!name.empty() && name.back() != '-') {
            name += '-';
        }
        if (name.size() >= 40) break;
    }
    while (!name.empty() && name.back() == '-') name.pop_back();
    if (name.empty()) name = "decision";
    std::string stamp; // 2026-12-01T09:30:00Z to 2026-12-01-0930
    for (std::size_t i = 0; i < now.size() && i < 16; ++i) {
        if (now[i] == ':') continue;
        stamp += now[i] == 'T' ? '-' : now[i];
    }
    return name + "-" + stamp + ending;
}

} // namespace steelyard
