using OdeDsl.Workbench.Wording;

namespace OdeDsl.Workbench.Figures;

/// <summary>One axis of a figure: a quantity and the range shown.</summary>
internal sealed record Axis
{
    public required string Name { get; init; }

    /// <summary>The unit as the model writes it; empty for a pure number.</summary>
    public required string Unit { get; init; }

    public required double Lower { get; init; }

    public required double Upper { get; init; }

    /// <summary>The period if the quantity is an angle and the axis shows one period; values are then taken into the range shown.</summary>
    public double? Period { get; init; }

    public bool IsLogarithmic { get; init; }

    /// <summary>Name and unit.</summary>
    public string Label => UnitText.Labelled(Name, Unit);

    /// <summary>The share of the axis below a value: 0 at the lower end, 1 at the upper.</summary>
    public double Share(double value) => IsLogarithmic
        ? Math.Log(value / Lower) / Math.Log(Upper / Lower)
        : (value - Lower) / (Upper - Lower);

    /// <summary>The value moved by whole periods into the range shown; unchanged if the axis has no period.</summary>
    public double Wrap(double value) => Period is { } period ? value - period * Math.Floor((value - Lower) / period) : value;

    public IReadOnlyList<Tick> TicksFor(int most) => IsLogarithmic
        ? Ticks.Logarithmic(Lower, Upper, most)
        : Period is { } period ? Ticks.Angle(Lower, Upper, period, most) : Ticks.Linear(Lower, Upper, most);
}
