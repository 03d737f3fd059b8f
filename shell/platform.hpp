#pragma once

#include <cstdint>
#include <functional>
#include <optional>
#include <string>
#include <vector>

namespace steelyard {

/// How saving ended. `problem` is a sentence for a person, empty when it went well.
struct SaveOutcome {
    bool saved = false;
    bool cancelled = false; ///< The person closed the dialog; nothing is wrong.
    std::string problem;
};

/// One decision kept in the browser.
struct KeptDecision {
    std::string id;
    std::string title;
    std::string saved_at;
};

/// A decision's text as it is kept. `revision` rises with every save of this decision, from 1.
struct StoredDecision {
    std::string id;
    std::string title;
    std::string text;
    std::string saved_at;
    std::uint64_t revision = 0;
};

/// How asking to be the one writer of a decision ended.
enum class Claim { granted, taken_elsewhere };

/// What the shell needs of its surroundings. web/ implements it for the browser, tests/ with a fake. Every
/// call with a callback calls it exactly once, later or at once. Nothing here throws.
class Platform {
public:
    virtual ~Platform() = default;

    virtual std::string now() = 0;     ///< ISO 8601, UTC, whole seconds: 2026-12-01T09:30:00Z.
    virtual double milliseconds() = 0; ///< Of a clock that only runs forward, to keep slices of work short.
    virtual std::string new_id() = 0;  ///< A random UUID (RFC 9562, version 4).

    /// Saves a text to a file the person chooses, or downloads it under `name`.
    virtual void save_file(const std::string& name, const std::string& media_type, const std::string& text,
                           std::function<void(SaveOutcome)> done) = 0;

    /// Asks the person for a file. A file picked comes to App::open_text; nothing comes where the dialog is
    /// closed.
    virtual void pick_file() = 0;

    /// Puts text on the clipboard; call it while a click or key is being handled.
    virtual void copy_text(const std::string& text) = 0;

    /// The decisions kept, latest saved first; a problem where the store cannot be read.
    virtual void list_kept(std::function<void(std::vector<KeptDecision>, std::string problem)> done) = 0;
    virtual void load_kept(const std::string& id,
                           std::function<void(std::optional<StoredDecision>, std::string problem)> done) = 0;

    /// Stores a decision. Refused with a problem where the store holds a higher or equal revision.
    virtual void store(const StoredDecision& decision, std::function<void(SaveOutcome)> done) = 0;
    virtual void forget(const std::string& id, std::function<void(SaveOutcome)> done) = 0;

    /// Asks to be the one writer of a decision. The claim before is given up. `take_over` takes it from
    /// another page.
    virtual void claim(const std::string& id, bool take_over, std::function<void(Claim)> done) = 0;

    /// The page's title, and whether leaving now would lose something.
    virtual void set_title(const std::string& title) = 0;
    virtual void set_unsaved(bool unsaved) = 0;

    virtual bool prefers_dark() = 0;
};

} // namespace steelyard
