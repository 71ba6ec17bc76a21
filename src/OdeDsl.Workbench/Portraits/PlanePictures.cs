using OdeDsl.Assessment;
using OdeDsl.Cycles;
using OdeDsl.Equilibria;
using OdeDsl.Modeling;
using OdeDsl.Workbench.Figures;
using OdeDsl.Workbench.Wording;

namespace OdeDsl.Workbench.Portraits;

/// <summary>
/// The pictures of a model's state space: the whole plane for two states, projections for more. Curves are computed from the
/// model itself; nothing is drawn that was not computed.
/// </summary>
internal sealed class PlanePictures
{
    private const int ArrowColumns = 25, ArrowRows = 17, MostOrbits = 5, MostProjectedStates = 3;

    private readonly DynamicSystem system;
    private readonly ModelAssessment assessment;
    private readonly MotionTracer tracer;
    private readonly IReadOnlyList<double[]> motion;
    private readonly Axis[] axes;

    /// <param name="system">The model.</param>
    /// <param name="assessment">What was found.</param>
    /// <param name="motion">The model's own motion, long enough to tell its character.</param>
    /// <param name="cancellation">Ends the work.</param>
    public PlanePictures(DynamicSystem system, ModelAssessment assessment, IReadOnlyList<double[]> motion, CancellationToken cancellation)
    {
        this.system = system;
        this.assessment = assessment;
        this.motion = motion;
        tracer = new MotionTracer(system, cancellation);
        axes = Region.Of(assessment, motion);
    }

    /// <summary>One phase portrait for two states, three projections for three or more, none for one state or rates that depend on time.</summary>
    /// <param name="id">The beginning of the figures' ids.</param>
    /// <param name="setting">The parameter values, for the captions.</param>
    public IReadOnlyList<PlanePicture> All(string id, string setting)
    {
        ModelDescription description = assessment.Description;
        if (system.StateCount < 2 || description.DependsOnTime) return [];
        List<PlaneCurve> Curves(int x, int y) => [.. Cycles(x, y), .. Orbits(x, y), new PlaneCurve(CurveKind.Motion, [Project(motion, x, y)])];
        if (system.StateCount == 2)
        {
            return
            [
                new PlanePicture
                {
                    Id = id + "-portrait",
                    Title = $"Phase portrait of {description.Name}",
                    Caption = $"Phase portrait of {description.Name}: {axes[1].Name} against {axes[0].Name}. {setting}",
                    X = axes[0],
                    Y = axes[1],
                    Field = Field(),
                    Curves = [.. Levels(), .. Walls(), .. Saddles(), .. Curves(0, 1)],
                    Marks = Points(0, 1),
                },
            ];
        }

        int shown = Math.Min(MostProjectedStates, system.StateCount);
        return
        [
            .. from x in Enumerable.Range(0, shown)
               from y in Enumerable.Range(x + 1, shown - x - 1)
               select new PlanePicture
               {
                   Id = $"{id}-plane-{x + 1}-{y + 1}",
                   Title = $"{axes[y].Name} against {axes[x].Name} of {description.Name}",
                   Caption = $"Projection: {axes[y].Name} against {axes[x].Name}; the other states move too. {setting}",
                   X = axes[x],
                   Y = axes[y],
                   Curves = Curves(x, y),
                   Marks = Points(x, y),
               },
        ];
    }

    private static List<PlanePoint> Project(IReadOnlyList<double[]> states, int x, int y) => [.. states.Select(state => new PlanePoint(state[x], state[y]))];

    private List<PlaneMark> Points(int x, int y)
    {
        List<PlaneMark> marks = [new PlaneMark(MarkKind.Start, new PlanePoint(assessment.InitialState[x], assessment.InitialState[y]), "")];
        for (int i = 0; i < assessment.Rests.Equilibria.Length; i++)
        {
            Equilibrium rest = assessment.Rests.Equilibria[i];
            marks.Add(new PlaneMark(KindOf(rest), new PlanePoint(rest.State[x], rest.State[y]), Words.Rest(i)));
        }

        return marks;
    }

    private static MarkKind KindOf(Equilibrium rest) => (rest.Kind, rest.Stability) switch
    {
        (EquilibriumKind.Saddle, _) => MarkKind.Saddle,
        (_, Stability.Stable) => MarkKind.StableRest,
        (_, Stability.Unstable) => MarkKind.UnstableRest,
        _ => MarkKind.UndecidedRest,
    };

    private IEnumerable<PlaneCurve> Cycles(int x, int y)
    {
        for (int i = 0; i < assessment.Motions.Cycles.Count; i++)
        {
            LimitCycle cycle = assessment.Motions.Cycles[i];
            CurveKind kind = cycle.Stability switch
            {
                Stability.Stable => CurveKind.SteadyCycle,
                Stability.Unstable => CurveKind.UnsteadyCycle,
                _ => CurveKind.UndecidedCycle,
            };
            yield return new PlaneCurve(kind, [Project(CourseOf(cycle), x, y)], Words.Cycle(i));
        }
    }

    private List<double[]> CourseOf(LimitCycle cycle)
    {
        // An unstable cycle of the plane attracts in reversed time, in which its course is computed without growing errors.
        bool reversed = cycle.Stability == Stability.Unstable && system.StateCount == 2;
        List<double[]> states = tracer.Follow(cycle.State.AsSpan(), reversed ? -cycle.Period : cycle.Period);
        if (reversed) states.Reverse();
        return states;
    }

    private IEnumerable<PlaneCurve> Orbits(int x, int y) => assessment.Motions.Families.Select((family, i) => new PlaneCurve(
        CurveKind.Orbit,
        [.. family.Members.Take(MostOrbits).Select(member => Project(tracer.Follow(member.State.AsSpan(), member.Period), x, y))],
        Words.Family(i)));

    private List<FieldArrow> Field()
    {
        List<FieldArrow> arrows = [];
        double[] rates = new double[2];
        for (int i = 0; i < ArrowColumns; i++)
        {
            for (int j = 0; j < ArrowRows; j++)
            {
                double x = axes[0].Lower + (axes[0].Upper - axes[0].Lower) * (i + 0.5) / ArrowColumns;
                double y = axes[1].Lower + (axes[1].Upper - axes[1].Lower) * (j + 0.5) / ArrowRows;
                system.Rates(0, [x, y], rates);
                if (double.IsFinite(rates[0]) && double.IsFinite(rates[1])) arrows.Add(new FieldArrow(new PlanePoint(x, y), rates[0], rates[1]));
            }
        }

        return arrows;
    }

    /// <summary>The nullclines: where one state stands still.</summary>
    private IEnumerable<PlaneCurve> Levels()
    {
        double[] rates = new double[2];
        for (int k = 0; k < 2; k++)
        {
            int state = k;
            var lines = Contours.Trace(
                (x, y) =>
                {
                    system.Rates(0, [x, y], rates);
                    return rates[state];
                },
                axes[0],
                axes[1]);
            if (lines.Count > 0) yield return new PlaneCurve(state == 0 ? CurveKind.LevelX : CurveKind.LevelY, lines);
        }
    }

    private IEnumerable<PlaneCurve> Walls()
    {
        IReadOnlyList<IReadOnlyList<PlanePoint>> lines = new JumpSurfaces(system).Lines(axes[0], axes[1]);
        if (lines.Count > 0) yield return new PlaneCurve(CurveKind.Wall, lines);
    }

    private IEnumerable<PlaneCurve> Saddles()
    {
        Separatrices separatrices = new(
            assessment, tracer, [.. axes.Select(static axis => axis.Lower)], [.. axes.Select(static axis => axis.Upper)], [.. assessment.Motions.Cycles.SelectMany(CourseOf)]);
        foreach (Equilibrium saddle in assessment.Rests.Equilibria.Where(static rest => rest is { Kind: EquilibriumKind.Saddle, IsSliding: false, Set: null }))
        {
            yield return new PlaneCurve(CurveKind.FromSaddle, [.. separatrices.Of(saddle, into: false).Select(static line => Project(line, 0, 1))]);
            yield return new PlaneCurve(CurveKind.IntoSaddle, [.. separatrices.Of(saddle, into: true).Select(static line => Project(line, 0, 1))]);
        }
    }
}
