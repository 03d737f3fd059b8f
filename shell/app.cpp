#include "shell/app.hpp"

#include <algorithm>
#include <utility>

#include "core/decision/lookup.hpp"
#include "core/decision/read.hpp"
#include "core/results/write_results.hpp"
#include "shell/app_state.hpp"
#include "shell/context.hpp"
#include "shell/example.hpp"

namespace steelyard {
namespace {

constexpr float header_height = 52;
constexpr float line_height_below = 44;
constexpr float bar_height = 44;
constexpr float standing_width = 276;
constexpr float sealed_bar_height = 34;

/// Below this width the standing folds away behind a button; below the second the rail shrinks.
constexpr float wide_page = 1080;
constexpr float middle_page = 860;

bool shortcut(ImGuiKey key, bool shift = false) {
    const ImGuiIO& io = ImGui::GetIO();
    return io.KeyCtrl && io.KeyShift == shift && !io.KeyAlt && ImGui::IsKeyPressed(key, false);
}

bool any_key_pressed() {
    for (int key = ImGuiKey_NamedKey_BEGIN; key < ImGuiKey_MouseLeft; ++key) {
        if (ImGui::IsKeyPressed(static_cast<ImGuiKey>(key), false)) return true;
    }
    return false;
}

} // namespace

App::App(Platform& platform) : state_(std::make_unique<State>(platform)) {
    state_->rooms = {make_frame_room(),    make_weigh_room(),   make_gauge_room(),
                     make_standing_room(), make_tipping_room(), make_record_room()};
    set_dark(platform.prefers_dark());
}

App::~App() = default;

void App::start() {
    State& s = *state_;
    ++s.waiting;
    s.platform.list_kept([&s](std::vector<KeptDecision> kept, const std::string& problem) {
        --s.waiting;
        s.started = true;
        s.fresh_frames = 2;
        if (!problem.empty()) s.message = problem;
        if (kept.empty()) {
            ReadResult read = read_decision(example_decision());
            const Id id = read.decision->id;
            s.open(std::move(*read.decision), id, 0, {});
        } else {
            s.open_kept(kept.front().id);
        }
    });
}

void App::draw() {
    State& s = *state_;
    Ui& ui = s.ui;
    const ImGuiIO& io = ImGui::GetIO();
    if (any_key_pressed()) ui.keyboard_used = true;
    if (io.MouseDown[0] || io.MouseDown[1]) ui.keyboard_used = false;
    if (s.fresh_frames > 0) --s.fresh_frames;

    ui.ledger.begin_frame("frame");
    ui.paper = ui.look().paper;
    ui.scrolling = false;
    ImGui::SetNextWindowPos({0, 0});
    ImGui::SetNextWindowSize(io.DisplaySize);
    ImGui::Begin("page", nullptr,
                 ImGuiWindowFlags_NoDecoration | ImGuiWindowFlags_NoMove | ImGuiWindowFlags_NoSavedSettings |
                     ImGuiWindowFlags_NoBringToFrontOnFocus | ImGuiWindowFlags_NoScrollWithMouse);
    sharpen_edges();
    if (s.started) {
        Actions actions;
        const RoomView view = s.view();
        Box page{0, 0, io.DisplaySize.x, io.DisplaySize.y};
        const bool wide = page.w >= wide_page;
        draw_header(s, actions, page.take_top(header_height));
        if (s.is_example()) draw_example_bar(s, page.take_top(bar_height));
        if (!s.keeper.problem().empty() || s.keeper.read_only())
            draw_problem_bar(s, page.take_top(bar_height));
        draw_line_below(s, view, actions, page.take_bottom(line_height_below));
        draw_rail(s, view, page.take_left(page.w >= middle_page ? 132.0f : 104.0f));
        if (view.sealed()) draw_sealed_bar(s, actions, page.take_top(sealed_bar_height));
        const bool standing =
            s.room != RoomId::standing && !view.sealed() && s.handing_to.empty() && (wide || s.standing_open);
        if (standing) {
            const Box panel = page.take_right(std::min(standing_width, page.w));
            ui.ledger.set_room("frame");
            draw_standing(ui, view, panel);
        }
        if (page.w > 40) {
            static constexpr std::array names{"frame", "weigh", "gauge", "standing", "tipping", "record"};
            ui.ledger.set_room(names[static_cast<std::size_t>(s.room)]);
            ImGui::PushID(names[static_cast<std::size_t>(s.room)]);
            const bool folded = view.sealed() && (s.room == RoomId::standing || s.room == RoomId::tipping ||
                                                  s.room == RoomId::record);
            if (!s.handing_to.empty())
                draw_begin_card(s, view, page.inset(18));
            else if (s.opening)
                draw_opening_card(s, view, page.inset(18));
            else if (folded)
                draw_folded_card(s, actions, page.inset(18));
            else
                s.rooms[static_cast<std::size_t>(s.room)]->draw(ui, view, actions, page.inset(18));
            ImGui::PopID();
        }
        ui.ledger.set_room("frame");
        draw_dialogs(s);

        if (!io.WantTextInput) {
            if (shortcut(ImGuiKey_Z)) s.undo();
            if (shortcut(ImGuiKey_Y) || shortcut(ImGuiKey_Z, true)) s.redo();
        }
        if (shortcut(ImGuiKey_S)) s.save_file();
        if (shortcut(ImGuiKey_O)) s.platform.pick_file();
        s.carry_out(actions);
        for (const auto& act : std::exchange(s.after_frame, {})) act();
    }
    ImGui::End();
    if (s.started) s.keeper.tick(s.session, static_cast<double>(io.DeltaTime));
}

void App::open_text(const std::string& file_name, const std::string& text) {
    state_->open_file(file_name, text);
}

void App::paste_text(const std::string& text) {
    State& s = *state_;
    if (!s.started || s.keeper.read_only()) return;
    Actions actions;
    s.fresh_frames = 2;
    if (!s.handing_to.empty() || s.opening) return;
    s.rooms[static_cast<std::size_t>(s.room)]->paste(text, s.view(), actions);
    s.carry_out(actions);
}

void App::flush() {
    if (state_->started) state_->keeper.flush(state_->session);
}

void App::set_dark(bool dark) {
    state_->ui.theme = dark ? &dark_theme() : &light_theme();
    apply_theme(*state_->ui.theme);
    state_->fresh_frames = 2;
}

bool App::idle() const {
    return state_->started && state_->waiting == 0 && !state_->keeper.pending() && state_->fresh_frames == 0;
}

bool App::wants_frame() const {
    return state_->fresh_frames > 0 || state_->keeper.pending();
}

const Ledger& App::ledger() const {
    return state_->ui.ledger;
}

std::string App::results_file() {
    return write_results(state_->session.decision(), state_->session.results());
}

} // namespace steelyard
