#pragma once

#include <deque>
#include <functional>
#include <optional>
#include <string>
#include <vector>

#include "shell/platform.hpp"

namespace steelyard::testing {

/// A file as it was saved, or as it is picked.
struct TestFile {
    std::string name;
    std::string text;
    std::string media_type;
};

/// The shell's surroundings in a test: everything is kept in memory, the clock goes on by a second each time
/// it is asked, ids are counted, and what shall go wrong is written down beforehand. Answers come with the
/// next frame, as in a browser, not at once.
class FakePlatform : public Platform {
public:
    // What a test sets. Of the scripted outcomes one is used up by each call; without any, all goes well.
    std::vector<StoredDecision> kept;
    bool dark = false;
    std::deque<SaveOutcome> next_saves;
    std::deque<std::string> next_store_problems; ///< An empty one lets that call pass.
    std::deque<std::string> next_forget_problems;
    std::deque<std::string> next_load_problems;
    std::deque<std::string> next_list_problems;
    std::deque<Claim> next_claims;
    std::deque<TestFile> next_picks; ///< Without any, the dialog is closed.

    // What a test looks at.
    std::vector<TestFile> saved_files;
    std::vector<std::string> copied;
    std::string title;
    bool unsaved = false;
    std::string claimed;
    int stores = 0;     ///< Calls of store, refused ones too.
    int take_overs = 0; ///< Calls of claim that take over.

    /// Where a picked file goes.
    std::function<void(const TestFile&)> on_picked;

    bool waiting() const { return !answers_.empty(); }

    /// Gives the answers that are due; those that they cause come with the next call.
    void answer();

    std::string now() override;
    double milliseconds() override;
    std::string new_id() override;
    void save_file(const std::string& name, const std::string& media_type, const std::string& text,
                   std::function<void(SaveOutcome)> done) override;
    void pick_file() override;
    void copy_text(const std::string& text) override { copied.push_back(text); }
    void list_kept(std::function<void(std::vector<KeptDecision>, std::string problem)> done) override;
    void load_kept(const std::string& id,
                   std::function<void(std::optional<StoredDecision>, std::string problem)> done) override;
    void store(const StoredDecision& decision, std::function<void(SaveOutcome)> done) override;
    void forget(const std::string& id, std::function<void(SaveOutcome)> done) override;
    void claim(const std::string& id, bool take_over, std::function<void(Claim)> done) override;
    void set_title(const std::string& text) override { title = text; }
    void set_unsaved(bool yes) override { unsaved = yes; }
    bool prefers_dark() override { return dark; }

private:
    StoredDecision* find(const std::string& id);

    std::vector<std::function<void()>> answers_;
    int seconds_ = 0;
    int ids_ = 0;
};

} // namespace steelyard::testing
