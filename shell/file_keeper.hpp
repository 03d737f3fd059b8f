#pragma once

#include <cstdint>
#include <functional>
#include <optional>
#include <string>
#include <vector>

#include "core/results/session.hpp"
#include "shell/platform.hpp"

namespace steelyard {

/// Keeps the open decision in the browser's store and says how it stands: stored at, saved to a file at,
/// changed since, or not saved and why. Nothing is written before loading has finished, and never while
/// another page is the writer.
class FileKeeper {
public:
    explicit FileKeeper(Platform& platform) : platform_(platform) {}

    /// Another decision was opened. `stored_revision` is that of the store, 0 where the store does not hold
    /// it. The example is not stored until it is changed.
    void opened(const std::string& id, std::uint64_t session_revision, std::uint64_t stored_revision,
                const std::string& stored_at);

    /// Call every frame: stores what changed, at most once in 0.3 s of `seconds` passed.
    void tick(Session& session, double seconds);

    /// Stores at once what is not stored yet.
    void flush(Session& session);

    void save_file(Session& session, std::function<void(SaveOutcome)> done);
    void take_over();

    bool read_only() const { return claim_ == Claim::taken_elsewhere; }
    bool pending() const { return busy_ > 0 || wants_store_; }

    /// The sentence in the header: "saved here 10:42 · file 09:15, changed since".
    std::string status(const Session& session) const;

    /// Why the last store failed; empty while all is well.
    const std::string& problem() const { return problem_; }

private:
    void store(Session& session);

    Platform& platform_;
    std::string id_;
    std::uint64_t seen_revision_ = 0;   ///< Of the session, when last looked at.
    std::uint64_t stored_session_ = 0;  ///< Of the session, as stored.
    std::uint64_t file_session_ = 0;    ///< Of the session, as saved to a file; 0 for never.
    std::uint64_t stored_revision_ = 0; ///< Of the store.
    std::string stored_at_;
    std::string file_at_;
    std::string problem_;
    Claim claim_ = Claim::granted;
    bool wants_store_ = false;
    double waited_ = 0;
    int busy_ = 0;
    std::uint64_t generation_ = 0; ///< Replies to an earlier decision are dropped.
};

/// "10:42" of an ISO time, in UTC as the platform gives it.
std::string clock_text(const std::string& iso);

/// A name for the saved file: the title in plain letters, the date, and the ending.
std::string file_name(const std::string& title, const std::string& now, const std::string& ending);

} // namespace steelyard
