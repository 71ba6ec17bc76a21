using OdeDsl.Assessment;
using OdeDsl.Equilibria;
using OdeDsl.Modeling;
using OdeDsl.Workbench.Figures;
using OdeDsl.Workbench.Wording;

namespace OdeDsl.Workbench.Report;

/// <summary>Everything about one model.</summary>
internal static class ModelSection
{
    public static void Write(Markup markup, ModelReport model, string anchor)
    {
        markup.Open("section", ("aria-labelledby", anchor)).Element("h2", model.Description.Name, ("id", anchor)).Line();
        Page.Paragraphs(markup, [model.Description.Summary]);
        if (model.Assessment is not { } assessment)
        {
            markup.Element("p", "This model could not be assessed: " + model.Failure, ("class", "failure")).Line();
            Equations(markup, model.Description);
            markup.Close().Line();
            return;
        }

        markup.Open("dl", ("class", "answers"));
        foreach (Answer answer in Answers.Of(assessment)) markup.Element("dt", answer.Question).Element("dd", NumberText.Typeset(answer.Full));
        markup.Close().Line();
        Page.Paragraphs(markup, assessment.Remarks, "caution");
        foreach (Figure figure in model.Figures.Where(static figure => !IsAppended(figure))) Page.Figure(markup, figure);
        Rests(markup, assessment);
        MotionsPart.Write(markup, assessment);
        MarginsPart(markup, assessment, model.Figures);
        MethodPart(markup, assessment, model.Figures);
        Equations(markup, model.Description);
        Parameters(markup, assessment);
        markup.Close().Line();
    }

    // Margins and methods have their figures in their own parts.
    private static bool IsAppended(Figure figure) =>
        figure.Id.EndsWith(FigureIds.Margins, StringComparison.Ordinal) || figure.Id.EndsWith(FigureIds.Methods, StringComparison.Ordinal);

    private static void Rests(Markup markup, ModelAssessment assessment)
    {
        markup.Element("h3", "Where it rests").Line();
        ModelDescription description = assessment.Description;
        if (assessment.Rests.Equilibria.Length > 0)
        {
            string time = description.TimeUnit;
            Page.Table(
                markup,
                "Rests, with the leading mode of the motion about each: the fastest to grow, or else the slowest to decay",
                ["Rest", "Kind", .. description.States.Select(static state => "#" + UnitText.Labelled(state.Name, state.Unit)), "#" + UnitText.Labelled("Changes by e in", time), "#" + UnitText.Labelled("Period", time), "#Damping ratio", "#Largest rate left"],
                assessment.Rests.Equilibria.Select((rest, i) => RestRow(description, rest, i)));
        }

        Page.Paragraphs(markup, [assessment.Rests.Completeness], "small quiet");
    }

    private static IReadOnlyList<string> RestRow(ModelDescription description, Equilibrium rest, int index)
    {
        LinearMode? mode = rest.LeadingMode;
        return
        [
            Words.Rest(index),
            Words.Kind(rest),
            .. rest.State.Select((value, i) => NumberText.Format(Answers.WithoutRounding(value, description.States[i]))),
            Words.FactorTime(mode, static value => NumberText.Format(value)),
            mode is { Oscillates: true } ? NumberText.Format(mode.Period) : "–",
            mode is { Oscillates: true } ? NumberText.Format(mode.DampingRatio, 3) : "–",
            NumberText.Format(rest.Residual, 2),
        ];
    }

    private static void MarginsPart(Markup markup, ModelAssessment assessment, IReadOnlyList<Figure> figures)
    {
        markup.Element("h3", "How far each parameter is from a change").Line();
        foreach (Figure figure in figures.Where(static figure => figure.Id.EndsWith(FigureIds.Margins, StringComparison.Ordinal))) Page.Figure(markup, figure);
        Page.Table(
            markup,
            "Nearest change of the attractors below and above the present value of each parameter",
            ["Parameter", "#Value", "Below", "Above"],
            assessment.Margins.Parameters.Select(static margin => (IReadOnlyList<string>)
            [
                margin.Parameter.Name,
                NumberText.With(margin.Value, margin.Parameter.Unit),
                Edge(margin.Down, margin.Parameter.Unit, "down to"),
                Edge(margin.Up, margin.Parameter.Unit, "up to"),
            ]));
        Page.Paragraphs(
            markup,
            assessment.Margins.Parameters
                .SelectMany(static margin => new[] { margin.Down, margin.Up })
                .Where(static edge => edge.Event is not MarginEvent.None)
                .Select(static edge => edge.Text + " " + edge.Evidence)
                .Append(assessment.Margins.Completeness),
            "small quiet");
    }

    private static string Edge(MarginEdge edge, string unit, string way) => edge.Event switch
    {
        MarginEvent.None => $"none {way} {NumberText.With(edge.ExploredTo, unit)}",
        MarginEvent.Unknown => $"not known beyond {NumberText.With(edge.Value ?? double.NaN, unit)}",
        _ => $"{NumberText.With(edge.Value ?? double.NaN, unit, 6)} ({Answers.Percent(edge)}): {Words.Of(edge.Event)}",
    };

    private static void MethodPart(Markup markup, ModelAssessment assessment, IReadOnlyList<Figure> figures)
    {
        markup.Element("h3", "Which method computes it").Line();
        MethodAnswer method = assessment.Method;
        Page.Paragraphs(markup, [method.Reason]);
        foreach (Figure figure in figures.Where(static figure => figure.Id.EndsWith(FigureIds.Methods, StringComparison.Ordinal))) Page.Figure(markup, figure);
        if (method.Measurements.Count > 0)
        {
            Page.Table(
                markup,
                $"Measured over {NumberText.With(method.Duration, assessment.Description.TimeUnit)} of the model's own motion",
                ["Method", "#Relative tolerance", "#Error (share of range)", "#Work (rate evaluations)", "#Steps", "#Wall time (ms)"],
                method.Measurements.Select(static measurement => (IReadOnlyList<string>)
                [
                    Words.Of(measurement.Method),
                    NumberText.Format(measurement.RelativeTolerance, 2),
                    measurement.Failure.Length > 0 ? "failed" : NumberText.Format(measurement.Error, 2),
                    double.IsFinite(measurement.Work) ? NumberText.Format(measurement.Work, 3) : "–",
                    measurement.Statistics is { } statistics ? NumberText.Format(statistics.AcceptedSteps, 6) : "–",
                    measurement.WallTime is { } wall ? NumberText.Format(wall.TotalMilliseconds, 3) : "–",
                ]));
        }

        Page.Paragraphs(markup, ["Errors are measured against " + method.Reference + ".", method.TimingRemark], "small quiet");
    }

    private static void Equations(Markup markup, ModelDescription description)
    {
        markup.Element("h3", "Its equations, as written").Line();
        markup.Open("ul", ("class", "equations"));
        string time = description.TimeUnit.Length == 0 ? "" : $" in {UnitText.Pretty(description.TimeUnit)}";
        foreach (StateDescription state in description.States) markup.Open("li").Element("code", $"d{state.Name}/dt = {state.RateText}").Close().Line();
        foreach (ObservableDescription observable in description.Observables) markup.Open("li").Element("code", $"{observable.Name} = {observable.Text}").Close().Line();
        markup.Close();
        Page.Table(
            markup,
            $"States and observables (time{time})",
            ["Name", "Unit", "Searched between", "What it is"],
            description.States
                .Select(static state => (IReadOnlyList<string>)[state.Name, Unit(state.Unit), Range(state.Lower, state.Upper, state.AnglePeriod), state.Summary])
                .Concat(description.Observables.Select(static observable => (IReadOnlyList<string>)[observable.Name, Unit(observable.Unit), "computed", observable.Summary])));
    }

    private static string Range(double lower, double upper, double? period)
    {
        string range = $"{NumberText.Format(lower)} and {NumberText.Format(upper)}";
        return period is { } turn ? $"{range}, an angle of period {NumberText.Format(turn)}" : range;
    }

    private static void Parameters(Markup markup, ModelAssessment assessment) => Page.Table(
        markup,
        "Parameters as assessed",
        ["Name", "#Value", "Unit", "Explored between", "What it is"],
        assessment.Description.Parameters.Select((parameter, i) => (IReadOnlyList<string>)
        [
            parameter.Name,
            NumberText.Format(assessment.Parameters[i], 6),
            Unit(parameter.Unit),
            Range(parameter.Lower, parameter.Upper, null),
            parameter.Summary,
        ]));

    private static string Unit(string unit) => unit.Length == 0 ? "1" : UnitText.Pretty(unit);
}
