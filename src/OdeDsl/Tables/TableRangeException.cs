namespace OdeDsl;

/// <summary>A table that does not extrapolate was asked for a value outside its knots.</summary>
public sealed class TableRangeException : ArgumentOutOfRangeException
{
    internal TableRangeException(double argument, double first, double last)
        : base(
            "x",
            argument,
            $"The table holds values from {first:g9} to {last:g9} only. Add knots, or choose another {nameof(Extrapolation)} than {nameof(Extrapolation.Fail)}.")
    {
        (First, Last) = (first, last);
    }

    /// <summary>The first knot.</summary>
    public double First { get; }

    /// <summary>The last knot.</summary>
    public double Last { get; }
}
