#pragma once

#include <array>
#include <functional>
#include <memory>
#include <string>
#include <vector>

#include "core/results/session.hpp"
#include "shell/app.hpp"
#include "shell/file_keeper.hpp"
#include "shell/rooms/room.hpp"
#include "shell/ui.hpp"

namespace steelyard {

/// Edits that take entries away and wait for the person's word.
struct AskedStep {
    Actions::Step step;
    std::string losses;
};

/// A file that was refused.
struct Refusal {
    std::string name;
    std::vector<std::string> reasons;
};

struct App::State {
    explicit State(Platform& p) : platform(p), session(Decision{}), keeper(p) {}

    Platform& platform;
    Session session;
    FileKeeper keeper;
    Ui ui;
    std::array<std::unique_ptr<Room>, 6> rooms;
    RoomId room = RoomId::frame;
    Id person; ///< Who answers now; empty: agreed in the room.
    Answering answering = Answering::agreed;
    Id handing_to;                    ///< Asked to say that it is he, before he can answer.
    std::optional<Answering> opening; ///< Asked whether what is sealed shall be opened, to go on like this.
    Results sealed; ///< What may be seen while answers are sealed, for the revision and the person below.
    std::uint64_t sealed_revision = 0;
    Id sealed_for;
    int own_steps = 0; ///< Made since the hand-over: while sealed no others are undone.
    int own_undone = 0;
    std::optional<ExaminationJob> examination;
    std::uint64_t examined_revision = 0;
    std::optional<DisagreementSearch> differing;
    bool all_differing = false; ///< The search is through.
    std::uint64_t differing_revision = 0;
    bool started = false;
    bool standing_open = false; ///< On narrow pages: the standing is laid over the room.

    std::string message;
    std::optional<AskedStep> asked;
    std::optional<Refusal> refusal;
    bool kept_open = false;
    std::vector<KeptDecision> kept;
    int waiting = 0; ///< Platform calls unanswered.
    std::vector<std::function<void()>>
        after_frame;      ///< What replaces the decision waits until nobody reads it.
    int fresh_frames = 2; ///< Frames still to draw after something changed outside of input.

    bool is_example() const;
    RoomView view();
    const Results& seen_results();
    void open(Decision decision, const std::string& key, std::uint64_t stored_revision,
              const std::string& stored_at);
    void open_file(const std::string& name, const std::string& text);
    void start_empty();
    void open_kept(const std::string& id);
    void show_kept();
    void save_file();
    void save_results();
    void carry_out(Actions& actions);
    /// Seats a person (nobody, where empty); nothing half-typed or said before is left to see.
    void seat(Id next);
    void change_answering(Answering way);
    void examine(const Actions::Examined& wish);
    void weigh_disagreements(bool wanted);
    void apply(Actions::Step step);
    void undo();
    void redo();
    Stamp stamp() { return {platform.now(), person, {}}; }
};

/// Parts of the frame around the rooms. Each draws in its box.
void draw_header(App::State& state, Actions& actions, Box box);
void draw_rail(App::State& state, const RoomView& view, Box box);
void draw_example_bar(App::State& state, Box box);
void draw_problem_bar(App::State& state, Box box);
void draw_line_below(App::State& state, const RoomView& view, Actions& actions, Box box);
void draw_standing(Ui& ui, const RoomView& view, Box box);
void draw_dialogs(App::State& state);

/// In place of a room: the person named says that it is he.
void draw_begin_card(App::State& state, const RoomView& view, Box area);
/// In place of a room: whether what is sealed shall be opened.
void draw_opening_card(App::State& state, const RoomView& view, Box area);
/// In place of a room that shows what follows from all answers.
void draw_folded_card(App::State& state, Actions& actions, Box area);
/// One line that says what is folded away.
void draw_sealed_bar(App::State& state, Actions& actions, Box box);

} // namespace steelyard
