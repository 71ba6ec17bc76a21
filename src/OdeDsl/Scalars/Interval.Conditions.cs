namespace OdeDsl.Scalars;

public readonly partial struct Interval
{
    // A condition is [1, 1] where it holds for all numbers of the operands, [0, 0] where for none, and [0, 1] where that is open.
    private static Interval Open => new(0, 1);

    /// <inheritdoc/>
    public static Interval Min(Interval left, Interval right) => left.IsEmpty || right.IsEmpty
        ? Empty
        : new(Math.Min(left.Lower, right.Lower), Math.Min(left.Upper, right.Upper));

    /// <inheritdoc/>
    public static Interval Max(Interval left, Interval right) => left.IsEmpty || right.IsEmpty
        ? Empty
        : new(Math.Max(left.Lower, right.Lower), Math.Max(left.Upper, right.Upper));

    /// <inheritdoc/>
    public static Interval Floor(Interval x) => x.IsEmpty ? Empty : new(Math.Floor(x.Lower), Math.Floor(x.Upper));

    /// <inheritdoc/>
    public static Interval Condition(bool holds) => Constant(holds ? 1 : 0);

    /// <inheritdoc/>
    /// <remarks>Open too where an operand is empty.</remarks>
    public static Interval Less(Interval left, Interval right) =>
        left.Upper < right.Lower ? Condition(true) : left.Lower >= right.Upper ? Condition(false) : Open;

    /// <inheritdoc/>
    /// <remarks>Open too where an operand is empty.</remarks>
    public static Interval LessOrEqual(Interval left, Interval right) =>
        left.Upper <= right.Lower ? Condition(true) : left.Lower > right.Upper ? Condition(false) : Open;

    /// <inheritdoc/>
    /// <remarks>Open too where an operand is empty.</remarks>
    public static Interval Equal(Interval left, Interval right)
    {
        if (left.Upper < right.Lower || right.Upper < left.Lower) return Condition(false);
        return left.Lower == right.Upper && left.Upper == right.Lower ? Condition(true) : Open;
    }

    /// <inheritdoc/>
    public static Interval Choose(Interval condition, Interval whenTrue, Interval whenFalse) =>
        condition.Lower > 0 ? whenTrue : condition.Upper < 1 ? whenFalse : Hull(whenTrue, whenFalse);
}
