using OdeDsl.Modeling;

namespace OdeDsl.Branches;

/// <summary>The sizes that count as 1 along a branch, so that lengths and angles in the space of states and parameter mean something.</summary>
internal static class BranchScales
{
    /// <summary>
    /// One size for each state (its period if it is an angle, the width of its bounds if both are finite, otherwise the size of the
    /// start but at least 1) and the parameter's range last.
    /// </summary>
    public static double[] Of(ModelDescription description, ReadOnlySpan<double> start, double from, double to)
    {
        double[] scales = new double[start.Length + 1];
        for (int i = 0; i < start.Length; i++)
        {
            StateDescription state = description.States[i];
            double width = state.AnglePeriod ?? state.Upper - state.Lower;
            scales[i] = double.IsFinite(width) && width > 0 ? width : Math.Max(Math.Abs(start[i]), 1);
        }

        scales[^1] = Math.Abs(to - from);
        return scales;
    }
}
