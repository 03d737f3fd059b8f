#pragma once

#include <map>

#include "shell/platform.hpp"

namespace steelyard {

/// The platform in a browser: every call goes to the page's scripts, every answer comes back from them by its
/// number.
class BrowserPlatform : public Platform {
public:
    std::string now() override;
    double milliseconds() override;
    std::string new_id() override;

    void save_file(const std::string& name, const std::string& media_type, const std::string& text,
                   std::function<void(SaveOutcome)> done) override;
    void pick_file() override;
    void copy_text(const std::string& text) override;

    void list_kept(std::function<void(std::vector<KeptDecision>, std::string problem)> done) override;
    void load_kept(const std::string& id,
                   std::function<void(std::optional<StoredDecision>, std::string problem)> done) override;
    void store(const StoredDecision& decision, std::function<void(SaveOutcome)> done) override;
    void forget(const std::string& id, std::function<void(SaveOutcome)> done) override;
    void claim(const std::string& id, bool take_over, std::function<void(Claim)> done) override;

    void set_title(const std::string& title) override;
    void set_unsaved(bool unsaved) override;
    bool prefers_dark() override;

    /// While a copy event is being answered, what is copied goes to it instead of the page's own way to the
    /// clipboard.
    void collect_copies(bool on);
    const std::optional<std::string>& collected() const { return collected_; }

    // The page's answers. A number that nobody waits for is ignored.
    void answer_save(int request, SaveOutcome outcome);
    void answer_list(int request, std::vector<KeptDecision> kept, std::string problem);
    void answer_load(int request, std::optional<StoredDecision> decision, std::string problem);
    void answer_claim(int request, Claim claim);

    /// True while an answer is due.
    bool waiting() const;

private:
    int last_request_ = 0;
    std::map<int, std::function<void(SaveOutcome)>> saves_;
    std::map<int, std::function<void(std::vector<KeptDecision>, std::string)>> lists_;
    std::map<int, std::function<void(std::optional<StoredDecision>, std::string)>> loads_;
    std::map<int, std::function<void(Claim)>> claims_;
    bool collecting_ = false;
    std::optional<std::string> collected_;
    std::string title_;
    bool unsaved_ = false;
};

} // namespace steelyard
