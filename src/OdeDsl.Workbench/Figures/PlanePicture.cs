namespace OdeDsl.Workbench.Figures;

/// <summary>What lies in a plane of two states, ready to draw: plain data.</summary>
internal sealed record PlanePicture
{
    public required string Id { get; init; }

    public required string Title { get; init; }

    public required string Caption { get; init; }

    public required Axis X { get; init; }

    public required Axis Y { get; init; }

    /// <summary>The direction of motion at grid points; empty for a projection, where it is not a function of the place.</summary>
    public IReadOnlyList<FieldArrow> Field { get; init; } = [];

    public IReadOnlyList<PlaneCurve> Curves { get; init; } = [];

    public IReadOnlyList<PlaneMark> Marks { get; init; } = [];
}

/// <summary>The rates at a point, in the units of the axes per unit of time.</summary>
internal readonly record struct FieldArrow(PlanePoint At, double RateX, double RateY);

/// <summary>A curve on the unrolled line.</summary>
/// <param name="Kind">What it is.</param>
/// <param name="Lines">One or several lines of consecutive points, in the direction of motion where there is one.</param>
/// <param name="Label">A short name to write beside it; empty for none.</param>
internal sealed record PlaneCurve(CurveKind Kind, IReadOnlyList<IReadOnlyList<PlanePoint>> Lines, string Label = "");

/// <summary>A marked point.</summary>
/// <param name="Kind">What it is.</param>
/// <param name="At">Where it is.</param>
/// <param name="Label">A short name to write beside it; empty for none.</param>
internal sealed record PlaneMark(MarkKind Kind, PlanePoint At, string Label);

/// <summary>The curves a plane may hold, in the order they are drawn: later ones lie on top.</summary>
internal enum CurveKind
{
    /// <summary>Where the horizontal state stands still.</summary>
    LevelX,

    /// <summary>Where the vertical state stands still.</summary>
    LevelY,

    /// <summary>Where the rates jump.</summary>
    Wall,

    /// <summary>A closed orbit of a family.</summary>
    Orbit,

    /// <summary>Motions that end at a saddle: the border between what ends here and what ends there.</summary>
    IntoSaddle,

    /// <summary>Motions that leave a saddle.</summary>
    FromSaddle,

    /// <summary>The motion from the model's own state.</summary>
    Motion,

    /// <summary>A limit cycle whose stability the linearisation does not decide.</summary>
    UndecidedCycle,

    /// <summary>An unstable limit cycle.</summary>
    UnsteadyCycle,

    /// <summary>A stable limit cycle.</summary>
    SteadyCycle,
}

/// <summary>The points a plane may hold.</summary>
internal enum MarkKind
{
    /// <summary>Where the model's own motion starts.</summary>
    Start,

    /// <summary>A rest that is neither shown stable nor unstable.</summary>
    UndecidedRest,

    /// <summary>A saddle.</summary>
    Saddle,

    /// <summary>An unstable node or focus.</summary>
    UnstableRest,

    /// <summary>A stable rest.</summary>
    StableRest,
}
