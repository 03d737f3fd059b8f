// A shell that shows what the page does for it, and nothing else: stands in for shell/app.cpp in
// build/web/probe.html, so that the browser tests of web/ depend on no room. Everything it knows is an item
// with a value.

#include <imgui.h>

#include <array>
#include <cstdio>
#include <stdexcept>
#include <utility>

#include "shell/app.hpp"

namespace steelyard {

namespace {

constexpr double save_delay = 0.3; // seconds

std::string number(double value) {
    std::array<char, 32> text{};
    std::snprintf(text.data(), text.size(), "%g", value);
    return text.data();
}

} // namespace

struct App::State {
    explicit State(Platform& a_platform) : platform(a_platform) {}

    Platform& platform;
    Ledger ledger;

    // The document: a title and a weight.
    std::string id;
    std::array<char, 256> title{};
    std::array<char, 4096> notes{};
    float weight = 3;
    std::uint64_t revision = 0;

    bool changed = false;
    bool storing = false;
    bool loading = true;
    double changed_at = 0;
    int clicks = 0;
    int right_clicks = 0;
    std::string keys;
    // What the page told, by what it is about.
    std::string claim, stored, file, problem, pasted, opened, kept, loaded, scheme;

    void report(std::string label, std::string role, std::string value) {
        LedgerItem item;
        item.id = role + "/" + label;
        item.label = std::move(label);
        item.role = std::move(role);
        item.value = std::move(value);
        item.at = ImGui::GetItemRectMin();
        item.size = ImGui::GetItemRectSize();
        item.focused = ImGui::IsItemActive();
        ledger.add(item);
    }

    void show(const char* label, const std::string& value) {
        ImGui::TextUnformatted((std::string(label) + ": " + value).c_str());
        report(label, "text", value);
    }

    bool press(const char* label) {
        const bool pressed = ImGui::Button(label, ImVec2(0, 28));
        report(label, "button", "");
        ImGui::SameLine();
        return pressed;
    }

    void change() {
        changed = true;
        changed_at = ImGui::GetTime();
        platform.set_unsaved(true);
    }

    void store() {
        if (!changed || storing) return;
        changed = false;
        storing = true;
        StoredDecision decision{id, title.data(), title.data() + ("\n" + number(double(weight))),
                                platform.now(), revision + 1};
        platform.store(decision, [this, decision](SaveOutcome outcome) {
            storing = false;
            stored = outcome.saved ? "revision " + std::to_string(decision.revision) : "no";
            problem = outcome.problem;
            if (outcome.saved) revision = decision.revision;
            platform.set_unsaved(!outcome.saved || changed);
        });
    }

    void ask_claim(bool take_over) {
        platform.claim(id, take_over, [this](Claim answer) {
            claim = answer == Claim::granted ? "granted" : "taken elsewhere";
            loading = false;
        });
    }

    void take(const std::optional<StoredDecision>& decision, const std::string& why) {
        problem = why;
        loaded = decision ? "revision " + std::to_string(decision->revision) : "nothing";
        if (decision) {
            id = decision->id;
            revision = decision->revision;
            const std::size_t end = decision->text.find('\n');
            std::snprintf(title.data(), title.size(), "%s", decision->text.substr(0, end).c_str());
            std::sscanf(decision->text.c_str() + end + 1, "%g", &weight);
        } else {
            id = platform.new_id();
        }
        ask_claim(false);
    }

    void draw_fields() {
        if (ImGui::InputText("Title", title.data(), title.size())) change();
        report("Title", "textbox", title.data());
        ImGui::InputTextMultiline("Notes", notes.data(), notes.size(), ImVec2(400, 60));
        report("Notes", "textbox", notes.data());
        if (ImGui::SliderFloat("Weight", &weight, 1, 9)) change();
        report("Weight", "slider", number(double(weight)));
    }

    void draw_buttons() {
        if (press("Count")) ++clicks;
        if (press("Save a file"))
            platform.save_file(
                "probe: a/b.decision.json", "application/json", title.data(), [this](SaveOutcome outcome) {
                    file = outcome.saved ? "saved" : outcome.cancelled ? "cancelled" : outcome.problem;
                });
        if (press("Open a file")) platform.pick_file();
        if (press("Copy")) platform.copy_text(std::string("copied ") + title.data());
        if (press("Take over")) ask_claim(true);
        if (press("Claim")) ask_claim(false);
        if (press("Forget"))
            platform.forget(
                id, [this](SaveOutcome outcome) { stored = outcome.saved ? "forgotten" : outcome.problem; });
        if (press("Throw")) throw std::runtime_error("thrown on purpose");
        ImGui::NewLine();
    }

    void draw_values() {
        const ImGuiIO& io = ImGui::GetIO();
        if (ImGui::IsMouseReleased(ImGuiMouseButton_Right)) ++right_clicks;
        if (!io.WantTextInput && ImGui::IsKeyPressed(ImGuiKey_Z, false))
            keys += io.KeyShift ? "redo " : io.KeyCtrl ? "undo " : "z ";
        if (!io.WantTextInput && ImGui::IsKeyPressed(ImGuiKey_5, false)) keys += "5 ";
        if (ImGui::IsKeyPressed(ImGuiKey_S, false) && io.KeyCtrl) keys += "save ";
        show("size", number(double(io.DisplaySize.x)) + " x " + number(double(io.DisplaySize.y)) + " at " +
                         number(double(io.DisplayFramebufferScale.x)));
        show("clicks", std::to_string(clicks));
        show("scheme", scheme);
        show("id", id);
        show("claim", claim);
        show("stored", stored);
        show("loaded", loaded);
        show("kept", kept);
        show("problem", problem);
        show("file", file);
        show("opened", opened);
        show("pasted", pasted);
        show("right clicks", std::to_string(right_clicks));
        show("keys", keys);
        ImGui::BeginChild("rows", ImVec2(300, 100));
        for (int row = 0; row < 50; ++row) ImGui::Text("row %d", row);
        const float scrolled = ImGui::GetScrollY();
        ImGui::EndChild();
        report("rows", "list", number(double(scrolled)));
    }
};

App::App(Platform& platform) : state_(std::make_unique<State>(platform)) {}
App::~App() = default;

void App::start() {
    State& s = *state_;
    set_dark(s.platform.prefers_dark());
    s.platform.set_title("Probe");
    s.platform.list_kept([&s](std::vector<KeptDecision> kept, std::string problem) {
        for (const KeptDecision& one : kept) s.kept += (s.kept.empty() ? "" : ", ") + one.title;
        if (kept.empty())
            s.take({}, problem);
        else
            s.platform.load_kept(kept[0].id, [&s](std::optional<StoredDecision> decision, std::string why) {
                s.take(decision, why);
            });
    });
}

void App::draw() {
    State& s = *state_;
    s.ledger.begin_frame("probe");
    ImGui::SetNextWindowPos(ImVec2(0, 0));
    ImGui::SetNextWindowSize(ImGui::GetIO().DisplaySize);
    ImGui::Begin("probe", nullptr, ImGuiWindowFlags_NoDecoration | ImGuiWindowFlags_NoMove);
    s.draw_fields();
    s.draw_buttons();
    s.draw_values();
    ImGui::End();
    if (s.changed && ImGui::GetTime() - s.changed_at > save_delay) s.store();
}

void App::open_text(const std::string& file_name, const std::string& text) {
    state_->opened = file_name + ", " + std::to_string(text.size()) + " bytes: " + text.substr(0, 20);
}

void App::paste_text(const std::string& text) {
    state_->pasted = text;
}
void App::flush() {
    state_->store();
}

void App::set_dark(bool dark) {
    state_->scheme = dark ? "dark" : "light";
}

bool App::idle() const {
    return !state_->changed && !state_->storing && !state_->loading;
}
bool App::wants_frame() const {
    return state_->changed;
}
const Ledger& App::ledger() const {
    return state_->ledger;
}
std::string App::results_file() {
    return "{\"format\":\"probe\"}";
}

} // namespace steelyard
