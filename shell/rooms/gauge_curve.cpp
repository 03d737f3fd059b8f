#include <algorithm>

#include "core/decision/lookup.hpp"
#include "core/measure/curve.hpp"
#include "shell/rooms/gauge_cards.hpp"
#include "shell/rooms/gauge_entries.hpp"
#include "shell/rooms/gauge_look.hpp"
#include "shell/rooms/gauge_plot.hpp"
#include "shell/widgets/icon_button.hpp"
#include "shell/widgets/panels.hpp"
#include "shell/widgets/text.hpp"
#include "shell/words.hpp"

namespace steelyard::gauge {
namespace {

constexpr float column_width = 190;

const ComputedFigures* computed_of(const Results& results, const Id& leaf) {
    const auto found = std::find_if(results.figures.begin(), results.figures.end(),
                                    [&](const ComputedFigures& f) { return f.leaf == leaf; });
    return found == results.figures.end() ? nullptr : &*found;
}

std::vector<double> anchors_of(const Curve& curve) {
    if (const auto* line = std::get_if<LineCurve>(&curve.shape)) return {line->worst, line->best};
    if (const auto* target = std::get_if<TargetCurve>(&curve.shape))
        return {target->target - target->tolerance, target->target, target->target + target->tolerance};
    std::vector<double> anchors;
    if (const auto* points = std::get_if<PointsCurve>(&curve.shape)) {
        for (const auto& point : points->at) anchors.push_back(point[0]);
    }
    return anchors;
}

Plot plot_of(const RoomView& view, const Node& leaf, const Id& option) {
    Plot plot;
    plot.name = "Worth of " + node_name(view.decision, leaf.id);
    double largest = 0;
    for (std::size_t o = 0; o < view.decision.options.size(); ++o) {
        const Id& id = view.decision.options[o].id;
        const auto figure = figure_of(view, leaf, id);
        if (!figure) continue;
        PlotMark mark{
            .index = o, .figure = *figure, .in_play = in_play(view.results, id), .chosen = id == option};
        if (const Figure* entry = leaf.cost_sheet ? nullptr : standing_figure(view.decision, leaf.id, id)) {
            mark.low = entry->low;
            mark.high = entry->high;
        }
        if (leaf.curve && mark.in_play)
            largest = std::max(largest, worth_of(*leaf.curve, *figure).value_or(0));
        plot.marks.push_back(mark);
    }
    if (!leaf.curve) return plot;
    plot.name += ": " + curve_words(*leaf.curve);
    plot.anchors = anchors_of(*leaf.curve);
    // Proportional worths are drawn against the best in play, which is worth 1.
    const double scale = is_anchored(*leaf.curve) ? 1 : largest;
    plot.worth = [curve = *leaf.curve, scale](double figure) -> std::optional<double> {
        const auto worth = worth_of(curve, figure);
        return worth && scale > 0 ? std::optional(std::min(1.0, *worth / scale)) : std::nullopt;
    };
    return plot;
}

class CurveCard {
public:
    CurveCard(Ui& ui, const RoomView& view, Actions& actions, const Node& leaf)
        : ui_(ui), view_(view), actions_(actions), leaf_(leaf) {
        const auto* computed = computed_of(view.results, leaf.id);
        figures_ = known_figures(view.decision, leaf, computed != nullptr ? &computed->values : nullptr);
    }

    void draw(const Id& option, Box box) {
        const Card card(ui_, box);
        Box inside = card_title(ui_, box, "What it is worth: " + node_name(view_.decision, leaf_.id));
        const Box column = inside.take_right(std::min(column_width, 0.5F * inside.w), 14);
        const Plot plot = plot_of(view_, leaf_, option);
        if (plot.marks.empty() && !leaf_.curve) {
            draw_paragraph(ui_, inside.at(), inside.w,
                           "No figures yet. Once two are known, they can be given a worth.",
                           {.ink = ui_.look().quiet});
        } else {
            draw_plot(ui_, plot, {inside.x, inside.y, inside.w, inside.h + 4});
        }
        ScrollArea area(ui_, "gauge-curve", {column.x - 4, column.y - 4, column.w + 8, column.h + 8});
        const Box inner = area.inner();
        Form form(ui_, view_, actions_, {inner.x + 4, inner.y + 4, inner.w - 8, column.h});
        fields(form);
        area.reach(form.bottom());
    }

private:
    std::string name(const char* what) const {
        return std::string(what) + " of " + node_name(view_.decision, leaf_.id);
    }

    void change(std::optional<Curve> curve) {
        Node node = leaf_;
        node.curve = std::move(curve);
        actions_.edit(ChangeNode{std::move(node)});
    }

    /// The same curve with other anchors.
    template<class Shape>
    void reshape(Shape shape) {
        Curve curve = *leaf_.curve;
        curve.shape = std::move(shape);
        change(std::move(curve));
    }

    void fields(Form& form) {
        if (leaf_.curve) {
            pick_kind(form);
            std::visit([&](const auto& shape) { anchors(form, shape); }, leaf_.curve->shape);
        } else {
            suggest(form);
        }
        if (const auto unit = form.text("leaf-unit", "Unit", name("Unit"), leaf_.unit)) {
            Node node = leaf_;
            node.unit = *unit;
            actions_.edit(ChangeNode{std::move(node)});
        }
        if (form.link("rate-in-frame", "Rate otherwise in Frame")) actions_.go(RoomId::frame, leaf_.id);
    }

    void suggest(Form& form) {
        form.sentence("No curve yet: figures alone have no worth.", Tone::open);
        if (figures_.size() < 2) {
            form.sentence("With two different figures a line from the worst to the best can be suggested.");
            return;
        }
        draw_text(ui_, {form.rest().x, form.bottom()}, "Suggest a line from the quotes",
                  {.font = Font::small});
        form.space(22);
        if (form.press("suggest-less", "Less is better")) change(suggested_line(figures_, Better::less));
        if (form.press("suggest-more", "More is better")) change(suggested_line(figures_, Better::more));
    }

    void pick_kind(Form& form) {
        static const std::vector<std::string> kinds{"straight line", "proportional", "points", "target"};
        const auto now = static_cast<std::size_t>(kind_of(*leaf_.curve));
        const auto kind = form.pick("curve-kind", "Kind of curve", name("Kind of curve"), kinds, now);
        if (!kind) return;
        if (auto curve = as_kind(static_cast<CurveKind>(*kind), leaf_.curve, figures_)) {
            change(std::move(curve));
        } else {
            actions_.say("Anchors are not known yet: enter two different figures first.");
        }
    }

    void anchors(Form& form, const ProportionalCurve& shape) {
        const auto better =
            form.pick("curve-better", "Better is", name("Which figures are better on the curve"),
                      {"more", "less"}, shape.better == Better::more ? 0 : 1);
        if (better) reshape(ProportionalCurve{*better == 0 ? Better::more : Better::less});
        form.sentence(shape.better == Better::less ? "Half the figure is worth twice as much."
                                                   : "Twice the figure is worth twice as much.");
    }

    void anchors(Form& form, const LineCurve& shape) {
        const auto worst =
            form.number("curve-worst", "None at", name("Figure worth nothing"), shape.worst, 0, 2);
        const auto best = form.number("curve-best", "Full at", name("Figure worth full"), shape.best, 1, 2);
        const LineCurve line{worst ? worst->value_or(shape.worst) : shape.worst,
                             best ? best->value_or(shape.best) : shape.best};
        if (line == shape) return;
        if (line.worst == line.best) {
            actions_.say("The two ends of a line must differ.");
            return;
        }
        reshape(line);
    }

    void anchors(Form& form, const TargetCurve& shape) {
        const auto target = form.number("curve-target", "Full at", name("Target"), shape.target, 0, 2);
        const auto away = form.number("curve-tolerance", "None at \xC2\xB1", name("Distance worth nothing"),
                                      shape.tolerance, 1, 2);
        const TargetCurve next{target ? target->value_or(shape.target) : shape.target,
                               away ? away->value_or(shape.tolerance) : shape.tolerance};
        if (next == shape) return;
        if (next.tolerance <= 0) {
            actions_.say("The distance from the target must be above 0.");
            return;
        }
        reshape(next);
    }

    void anchors(Form& form, const PointsCurve& shape) {
        auto at = shape.at;
        bool changed = false;
        const Box labels = form.rest();
        const float width = (labels.w - 24 - 16) / 2;
        draw_text(ui_, labels.at(), "Figure", {.font = Font::small, .ink = ui_.look().quiet});
        draw_text(ui_, {labels.x + width + 8, labels.y}, "Worth",
                  {.font = Font::small, .ink = ui_.look().quiet});
        form.space(18);
        std::optional<std::size_t> removed;
        for (std::size_t i = 0; i < at.size(); ++i) {
            const std::string id = "curve-point/" + std::to_string(i);
            const std::string which = "point " + std::to_string(i + 1);
            const Box line = form.rest();
            Form row(ui_, view_, actions_, {line.x, line.y - 18, width, 0});
            const auto x = row.number(id + "/x", {}, name(("Figure of " + which).c_str()), at[i][0]);
            Form second(ui_, view_, actions_, {line.x + width + 8, line.y - 18, width, 0});
            const auto y = second.number(id + "/y", {}, name(("Worth of " + which).c_str()), at[i][1]);
            changed = changed || (x && *x) || (y && *y);
            at[i] = {x ? x->value_or(at[i][0]) : at[i][0], y ? y->value_or(at[i][1]) : at[i][1]};
            if (icon_button(ui_, id + "/remove", "Remove " + which,
                            {line.x + 2 * width + 16, line.y + 4, 24, 24}, Icon::remove,
                            !view_.read_only && at.size() > 1))
                removed = i;
            form.space(36);
        }
        if (removed) {
            at.erase(at.begin() + static_cast<std::ptrdiff_t>(*removed));
            reshape(PointsCurve{std::move(at)});
        } else if (form.press("curve-add-point", "Add a point")) {
            add_point(at);
            reshape(PointsCurve{std::move(at)});
        } else if (changed) {
            enter_points(std::move(at));
        }
    }

    void enter_points(std::vector<std::array<double, 2>> at) {
        std::sort(at.begin(), at.end());
        const bool twice = std::adjacent_find(at.begin(), at.end(), [](const auto& a, const auto& b) {
                               return a[0] == b[0];
                           }) != at.end();
        const bool outside =
            std::any_of(at.begin(), at.end(), [](const auto& point) { return point[1] < 0 || point[1] > 1; });
        if (twice || outside) {
            actions_.say(twice ? "Two points cannot stand at the same figure."
                               : "A worth lies between 0 and 1.");
            return;
        }
        reshape(PointsCurve{std::move(at)});
    }

    /// In the middle of the widest gap, on the curve, so that it changes nothing by itself.
    static void add_point(std::vector<std::array<double, 2>>& at) {
        if (at.size() == 1) {
            at.push_back({at[0][0] + std::max(1.0, 0.1 * std::abs(at[0][0])), at[0][1]});
            return;
        }
        std::size_t widest = 1;
        for (std::size_t i = 2; i < at.size(); ++i) {
            if (at[i][0] - at[i - 1][0] > at[widest][0] - at[widest - 1][0]) widest = i;
        }
        const std::array<double, 2> middle{(at[widest][0] + at[widest - 1][0]) / 2,
                                           (at[widest][1] + at[widest - 1][1]) / 2};
        at.insert(at.begin() + static_cast<std::ptrdiff_t>(widest), middle);
    }

    Ui& ui_;
    const RoomView& view_;
    Actions& actions_;
    const Node& leaf_;
    std::vector<double> figures_;
};

} // namespace

void draw_curve_card(Ui& ui, const RoomView& view, Actions& actions, const Node& leaf, const Id& option,
                     Box box) {
    CurveCard(ui, view, actions, leaf).draw(option, box);
}

std::optional<double> figure_of(const RoomView& view, const Node& leaf, const Id& option) {
    if (!leaf.cost_sheet) {
        const Figure* figure = standing_figure(view.decision, leaf.id, option);
        return figure != nullptr ? figure->value : std::nullopt;
    }
    const ComputedFigures* computed = computed_of(view.results, leaf.id);
    if (computed == nullptr) return std::nullopt;
    for (const auto& [id, value] : computed->values) {
        if (id == option) return value;
    }
    return std::nullopt;
}

std::optional<LocalWorth> local_worth(const Results& results, const Id& leaf, const Id& option) {
    const auto at = std::find(results.options.begin(), results.options.end(), option);
    const auto found = std::find_if(results.leaves.begin(), results.leaves.end(),
                                    [&](const LeafResult& one) { return one.leaf == leaf; });
    if (at == results.options.end() || found == results.leaves.end()) return std::nullopt;
    const auto o = static_cast<std::size_t>(at - results.options.begin());
    const bool nobody =
        std::all_of(found->missing.begin(), found->missing.end(), [](bool missing) { return missing; });
    return LocalWorth{found->local[o], found->missing[o], nobody};
}

bool in_play(const Results& results, const Id& option) {
    return std::find(results.options.begin(), results.options.end(), option) != results.options.end();
}

} // namespace steelyard::gauge
