#pragma once

#include <cstdint>
#include <functional>
#include <memory>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "core/decision/edit.hpp"
#include "core/results/disagreements.hpp"
#include "core/results/examination.hpp"
#include "core/results/results.hpp"
#include "shell/ui.hpp"

namespace steelyard {

enum class RoomId { frame, weigh, gauge, standing, tipping, record };

/// How a group answers: in one voice; each alone, unseen by the others until all is revealed; or by a show of
/// hands that one person types.
enum class Answering { agreed, alone, hands };

/// What a room may read.
struct RoomView {
    const Decision& decision;
    const Results& results;
    Id person;              ///< Who answers now; empty: agreed in the room.
    bool read_only = false; ///< Another page writes this decision; controls that edit are disabled.
    Answering answering = Answering::agreed;
    const std::vector<Disagreement>* disagreements = nullptr; ///< As far as they are worked out.
    double disagreement_progress = 0;                         ///< 0 to 1.
    const Examination* examination = nullptr; ///< Of the set asked for by Actions::examine, as far as it is.
    std::uint64_t revision = 0;               ///< Another one for every change of the open decision.

    /// The decision's fingerprint. It takes a while: for what is drawn only while it is needed.
    std::function<std::string()> sha256;

    /// Nobody but the one who answers may be seen, and nothing that follows from what the others said.
    bool sealed() const { return answering == Answering::alone; }
};

/// What a room asks for. Carried out after the frame.
class Actions {
public:
    /// One step. Where it takes entries away the app asks first, naming how many. `why`: the reason for the
    /// log.
    void edit(Edit edit) { this->edit(std::vector<Edit>{std::move(edit)}); }
    void edit(std::vector<Edit> edits, std::string label = {}, std::string why = {}) {
        steps.push_back({std::move(edits), std::move(label), std::move(why)});
    }

    /// Another room, showing the item with this id (a set, a criterion, an option) if not empty.
    void go(RoomId room, Id focus = {}) { go_to = {room, std::move(focus), true}; }
    void copy(std::string text) { to_copy = std::move(text); }

    /// Hands over to a person, who says first that it is he; or to nobody, where `person` is empty.
    void answer_as(Id person) { answers = {std::move(person), true}; }

    /// Another way of answering, with nobody chosen. Answers that are sealed are opened only after a
    /// question.
    void answer_by(Answering way) { answering = way; }

    /// Looks into the answers of `by` (empty: the group) in a set, a slice in each frame, as long as it is
    /// asked for in every frame; what is found stands in RoomView::examination.
    void examine(Id set, Id by) { to_examine = {std::move(set), std::move(by), true}; }
    void say(std::string text) { message = std::move(text); }

    /// Works out what the judges' disagreements do to the standing, in the same way.
    void weigh_disagreements() { disagreements_wanted = true; }

    struct Step {
        std::vector<Edit> edits;
        std::string label;
        std::string why;
    };
    struct Destination {
        RoomId room = RoomId::frame;
        Id focus;
        bool wanted = false;
    };
    struct Answers {
        Id person;
        bool wanted = false;
    };
    struct Examined {
        Id set;
        Id by;
        bool wanted = false;
    };
    std::vector<Step> steps;
    Destination go_to;
    Answers answers;
    std::optional<Answering> answering;
    Examined to_examine;
    bool disagreements_wanted = false;
    std::string to_copy;
    std::string message;
};

/// One room of the rail. It keeps only its own selection, scroll and half-typed text.
class Room {
public:
    virtual ~Room() = default;
    virtual void draw(Ui& ui, const RoomView& view, Actions& actions, Box area) = 0;

    /// Shows an item, asked for by another room or the line below.
    virtual void show(const Id&) {}

    /// Text pasted while no field had the focus. True if it was taken.
    virtual bool paste(const std::string&, const RoomView&, Actions&) { return false; }

    /// A new decision was opened: selections are void.
    virtual void reset() {}
};

/// A fresh id for something added: `stem`, or `stem2`, `stem3` … not among those taken.
Id fresh_id(const std::string& stem, const std::function<bool(const Id&)>& taken);

std::unique_ptr<Room> make_frame_room();
std::unique_ptr<Room> make_weigh_room();
std::unique_ptr<Room> make_gauge_room();
std::unique_ptr<Room> make_standing_room();
std::unique_ptr<Room> make_tipping_room();
std::unique_ptr<Room> make_record_room();

} // namespace steelyard
