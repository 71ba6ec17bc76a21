using System.Numerics;
using System.Runtime.InteropServices;

namespace OdeDsl.Integration;

/// <summary>
/// Measures an error against the tolerances: the root mean square of error_i / (a_i + r max(|y_i| before, |y_i| after))
/// (Hairer, Norsett and Wanner, Solving ODEs I, equation II.4.11). Tangents are measured as a group of their own, so that
/// they never relax the test of the state; their absolute tolerance follows their length (see <see cref="FollowTangents"/>).
/// </summary>
internal sealed class ErrorNorm
{
    /// <summary>
    /// A tangent shorter than this, in extents, has died out: it needs no relative accuracy, and its tolerance must not underflow to zero.
    /// </summary>
    private const double ShortestTangent = 1e-250;

    /// <summary>
    /// The same against the longest tangent: far below what rounding leaves of it in any use of the two together, and not so far that steps
    /// would have to follow a decay of hundreds of decades.
    /// </summary>
    private const double ShortestShare = 1e-30;

    private readonly int stateCount;
    private readonly int dimension;
    private readonly double[] extents;

    /// <param name="relative">The relative tolerance r.</param>
    /// <param name="absolute">The absolute tolerance of each state.</param>
    /// <param name="tangentCount">The number of tangents.</param>
    public ErrorNorm(double relative, ReadOnlySpan<double> absolute, int tangentCount)
    {
        stateCount = absolute.Length;
        dimension = stateCount * (1 + tangentCount);
        Relative = relative;
        // Beyond the last component the error is zero; a tolerance of one there avoids 0 / 0.
        Absolute = StageSums.Allocate(dimension);
        Array.Fill(Absolute, 1.0);
        absolute.CopyTo(Absolute);
        extents = absolute.ToArray();
    }

    /// <summary>The relative tolerance.</summary>
    public double Relative { get; }

    /// <summary>The absolute tolerances, padded.</summary>
    public double[] Absolute { get; }

    /// <summary>
    /// The norm for a method whose estimate is of lower order: an estimate passes at 0.1 r^((q + 1) / (p + 1)), so that the error of the step
    /// itself stays in proportion to the tolerance (the transformation of E. Hairer and G. Wanner's programs for Radau IIA methods).
    /// </summary>
    /// <param name="estimateOrder">The order q of the estimate.</param>
    /// <param name="order">The order p of the method.</param>
    public ErrorNorm ForEstimateOfOrder(int estimateOrder, int order)
    {
        double relative = 0.1 * Math.Pow(Relative, (estimateOrder + 1.0) / (order + 1));
        double ratio = relative / Relative;
        return new ErrorNorm(relative, Array.ConvertAll(extents, extent => extent * ratio), dimension / stateCount - 1);
    }

    /// <summary>The norm of an error vector; all vectors padded. Not a number if a component is.</summary>
    public double Measure(double[] error, double[] before, double[] after)
    {
        if (dimension != stateCount)
        {
            double state = MeanSquare(error, before, after, 0, stateCount);
            double tangents = MeanSquare(error, before, after, stateCount, dimension);
            return Math.Sqrt(Math.Max(state, tangents));
        }

        ref double e = ref MemoryMarshal.GetArrayDataReference(error);
        ref double b = ref MemoryMarshal.GetArrayDataReference(before);
        ref double a = ref MemoryMarshal.GetArrayDataReference(after);
        ref double floor = ref MemoryMarshal.GetArrayDataReference(Absolute);
        var relative = new Vector<double>(Relative);
        Vector<double> sum = Vector<double>.Zero;
        nuint count = (nuint)error.Length;
        for (nuint i = 0; i < count; i += (nuint)Vector<double>.Count)
        {
            Vector<double> size = Vector.Max(Vector.Abs(Vector.LoadUnsafe(ref b, i)), Vector.Abs(Vector.LoadUnsafe(ref a, i)));
            Vector<double> ratio = Vector.LoadUnsafe(ref e, i) / Vector.MultiplyAddEstimate(relative, size, Vector.LoadUnsafe(ref floor, i));
            sum = Vector.MultiplyAddEstimate(ratio, ratio, sum);
        }

        return Math.Sqrt(Vector.Sum(sum) / dimension);
    }

    /// <summary>The length of a vector of states in units of the tolerances at a state.</summary>
    public double Length(ReadOnlySpan<double> vector, ReadOnlySpan<double> state)
    {
        double sum = 0;
        for (int i = 0; i < vector.Length; i++)
        {
            double ratio = vector[i] / (Absolute[i] + Relative * Math.Abs(state[i]));
            sum += ratio * ratio;
        }

        return Math.Sqrt(sum);
    }

    /// <summary>
    /// Sets the absolute tolerances of each tangent to r times its length, where the length is the largest component
    /// counted in extents of the states: an error that is small against the whole tangent does no harm.
    /// </summary>
    public void FollowTangents(ReadOnlySpan<double> y)
    {
        double longest = 0;
        for (int start = stateCount; start < dimension; start += stateCount) longest = Math.Max(longest, LengthOfTangent(y, start));
        double shortest = Math.Max(ShortestTangent, ShortestShare * longest);
        for (int start = stateCount; start < dimension; start += stateCount)
        {
            double length = Math.Max(LengthOfTangent(y, start), shortest);
            for (int i = 0; i < stateCount; i++) Absolute[start + i] = Relative * length * extents[i];
        }
    }

    private double LengthOfTangent(ReadOnlySpan<double> y, int start)
    {
        double length = 0;
        for (int i = 0; i < stateCount; i++) length = Math.Max(length, Math.Abs(y[start + i]) / extents[i]);
        return length;
    }

    private double MeanSquare(double[] error, double[] before, double[] after, int from, int to)
    {
        double sum = 0;
        for (int i = from; i < to; i++)
        {
            double ratio = error[i] / (Absolute[i] + Relative * Math.Max(Math.Abs(before[i]), Math.Abs(after[i])));
            sum += ratio * ratio;
        }

        return sum / (to - from);
    }
}
