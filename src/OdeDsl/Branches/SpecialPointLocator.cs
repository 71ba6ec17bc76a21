using System.Globalization;
using System.Numerics;
using OdeDsl.LinearAlgebra;

namespace OdeDsl.Branches;

/// <summary>Finds and names the special points between two neighbouring points of a branch.</summary>
/// <remarks>
/// Every special point is a simple zero of a test function along the step, found by bracketing with full Newton corrections at each
/// trial: the tangent's parameter component for folds, and the real part of the eigenvalue of one rank (by descending real part, a
/// continuous function of the step) for changes of stability. At a fold the parameter is stationary, so its value is accurate to the
/// square of the step's accuracy.
/// </remarks>
internal sealed class SpecialPointLocator(EquilibriumCurve curve)
{
    // An eigenvalue with a smaller share of the spectral radius in its imaginary part is real: a double real eigenvalue splits by the
    // square root of rounding.
    private const double RealShare = 1e-6;

    // Below this, relative to the beginning of the step, the n x (n+1) matrix has lost a rank: branches cross and this is no fold.
    // Crossings are located to about the square root of rounding (1e-8), and steps are seldom shorter than 1e-4.
    private const double LostRank = 1e-3;

    /// <summary>A special point and how far along the step it lies.</summary>
    public sealed record Located(double Along, SpecialPointKind Kind, CurvePoint Point, double Condition, int UnstableChange);

    /// <summary>The special points strictly between two points, in order; <see langword="null"/> if one cannot be located.</summary>
    /// <param name="from">The last point.</param>
    /// <param name="to">The next point.</param>
    /// <param name="length">The distance along <paramref name="from"/>'s tangent.</param>
    public List<Located>? Between(CurvePoint from, CurvePoint to, double length)
    {
        var found = new List<Located>();
        if (from.ParameterSlope * to.ParameterSlope < 0 && !AddFold(from, to, length, found)) return null;
        for (int rank = 0; rank < from.Eigenvalues.Length; rank++)
        {
            int before = Sign(from, rank);
            int after = Sign(to, rank);
            if (before * after >= 0) continue;
            int index = rank;
            if (Root(from, length, from.Eigenvalues[rank].Real, to.Eigenvalues[rank].Real, point => point.Eigenvalues[index].Real) is not { } root)
                return null;
            if (IsComplex(root.Point, rank))
            {
                found.Add(new Located(root.Along, SpecialPointKind.HopfPoint, root.Point, Condition(root.Point.Eigenvalues[rank].Real, from, root.Point), 2 * after));
                rank++; // its conjugate
            }
            else
            {
                AddZeroEigenvalue(from, root, rank, after, length, found);
            }
        }

        // Where eigenvalues stay on the axis, as at the centre that meets a saddle, no rank changes sign: the counts tell.
        if (found is [{ Kind: SpecialPointKind.Fold or SpecialPointKind.BranchPoint } only])
            found[0] = only with { UnstableChange = to.UnstableCount - from.UnstableCount };
        found.Sort(static (a, b) => a.Along.CompareTo(b.Along));
        return found;
    }

    /// <summary>Finds where a test function vanishes along a step.</summary>
    /// <returns>The distance along the tangent and the corrected point there; <see langword="null"/> if a correction fails.</returns>
    public (double Along, CurvePoint Point)? Root(
        CurvePoint from, double length, double atStart, double atEnd, Func<CurvePoint, double> test)
    {
        CurvePoint? best = null;
        double smallest = double.PositiveInfinity;
        double bestAlong = 0;
        bool failed = false;
        double Value(double along)
        {
            if (At(from, along) is not { } point)
            {
                failed = true;
                return double.NaN;
            }

            double value = test(point);
            if (Math.Abs(value) < smallest) (smallest, best, bestAlong) = (Math.Abs(value), point, along);
            return value;
        }

        BracketedRoot.Find(Value, 0, atStart, length, atEnd);
        return failed || best is null ? null : (bestAlong, best);
    }

    /// <summary>The corrected point at a distance along a point's tangent.</summary>
    public CurvePoint? At(CurvePoint from, double along)
    {
        double[] predicted = new double[from.Position.Length];
        for (int i = 0; i < predicted.Length; i++) predicted[i] = from.Position[i] + along * from.Tangent[i];
        return curve.Correct(predicted, from.Tangent, from.Tangent);
    }

    /// <summary>What was computed to call the point what it is.</summary>
    public static string Evidence(Located located, double parameter)
    {
        string at = string.Create(CultureInfo.InvariantCulture, $"at {parameter:G9}");
        return located.Kind switch
        {
            SpecialPointKind.Fold =>
                $"the branch turns back {at}, a real eigenvalue passes zero, and the equations keep full rank with the parameter",
            SpecialPointKind.HopfPoint =>
                $"a complex pair of eigenvalues passes the imaginary axis {at} at the angular frequency "
                + string.Create(CultureInfo.InvariantCulture, $"{CriticalFrequency(located.Point):G9}"),
            _ => $"a real eigenvalue is zero {at} and the equations lose rank even with the parameter: another branch crosses",
        };
    }

    /// <summary>The imaginary part of the complex pair nearest to the imaginary axis.</summary>
    public static double CriticalFrequency(CurvePoint point)
    {
        Complex critical = point.Eigenvalues
            .Where(value => Math.Abs(value.Imaginary) > RealShare * point.SpectralRadius)
            .MinBy(static value => Math.Abs(value.Real));
        return Math.Abs(critical.Imaginary);
    }

    private bool AddFold(CurvePoint from, CurvePoint to, double length, List<Located> found)
    {
        if (Root(from, length, from.ParameterSlope, to.ParameterSlope, static point => point.ParameterSlope) is not { } root) return false;
        double critical = root.Point.Eigenvalues.Min(Complex.Abs);
        found.Add(new Located(root.Along, KindOfZeroEigenvalue(from, root.Point), root.Point, Condition(critical, from, root.Point), 0));
        return true;
    }

    private void AddZeroEigenvalue(
        CurvePoint from, (double Along, CurvePoint Point) root, int rank, int after, double length, List<Located> found)
    {
        // At a fold the eigenvalue vanishes with the slope; where branches cross its place is known to the square root of rounding only.
        int fold = found.FindIndex(other =>
            other.Kind != SpecialPointKind.HopfPoint && Math.Abs(other.Along - root.Along) <= 1e-6 + 1e-3 * length);
        if (fold >= 0)
            found[fold] = found[fold] with { UnstableChange = found[fold].UnstableChange + after };
        else
            found.Add(new Located(root.Along, KindOfZeroEigenvalue(from, root.Point), root.Point, Condition(root.Point.Eigenvalues[rank].Real, from, root.Point), after));
    }

    private SpecialPointKind KindOfZeroEigenvalue(CurvePoint from, CurvePoint point) =>
        curve.RankMeasure(point.Position, from.Position) < LostRank ? SpecialPointKind.BranchPoint : SpecialPointKind.Fold;

    private static int Sign(CurvePoint point, int rank) =>
        rank < point.UnstableCount ? 1 : rank >= point.Eigenvalues.Length - point.StableCount ? -1 : 0;

    private static bool IsComplex(CurvePoint point, int rank) =>
        Math.Abs(point.Eigenvalues[rank].Imaginary) > RealShare * point.SpectralRadius;

    private static double Condition(double critical, CurvePoint from, CurvePoint point) =>
        Math.Abs(critical) / Math.Max(from.SpectralRadius, point.SpectralRadius);
}
