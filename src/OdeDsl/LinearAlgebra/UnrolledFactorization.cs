using System.Numerics;
using System.Runtime.InteropServices;
using OdeDsl.Modeling;

namespace OdeDsl.LinearAlgebra;

/// <summary>
/// Factors a I − b J without pivoting by the elimination that was generated for the pattern of J, and solves with the factors. Much faster
/// than pivoting for small sparse matrices; where the factors have grown too much it says so, and the caller pivots. Allocates nothing after
/// construction. Not thread-safe.
/// </summary>
/// <remarks>
/// The computed factors are exact for a matrix that differs from the given one by at most n u |L| |U| entry by entry, u being half a unit in
/// the last place (N. J. Higham, Accuracy and Stability of Numerical Algorithms, 2nd edition 2002, theorem 9.3). The check compares the row
/// sums of |L| |U| with those of |A|: both change alike when equations are scaled, as units do.
/// </remarks>
/// <typeparam name="TSystem">The equations; their <see cref="IOdeSystem.Unrolled"/> is not <see langword="null"/>.</typeparam>
/// <typeparam name="TElement">Real or complex entries.</typeparam>
internal sealed class UnrolledFactorization<TSystem, TElement>
    where TSystem : struct, IOdeSystem
    where TElement : struct, IMatrixElement<TElement>
{
    /// <summary>Row sums of |L| |U| over those of |A| that are allowed: three of sixteen digits.</summary>
    private const double GrowthLimit = 1000;

    private readonly UnrolledLayout layout;
    private readonly SparsityPattern pattern;
    private readonly TElement[] entries;
    private readonly double[] rowSums;
    private readonly double[] growth;

    public UnrolledFactorization()
    {
        layout = TSystem.Unrolled ?? throw new InvalidOperationException("These equations have no unrolled elimination; ask IOdeSystem.Unrolled first.");
        pattern = TSystem.Description.StateSparsity;
        entries = new TElement[layout.Length];
        rowSums = new double[layout.DiagonalPlaces.Length];
        growth = new double[2 * rowSums.Length];
    }

    /// <summary>Factors a I − b J.</summary>
    /// <param name="a">The factor of the unit matrix.</param>
    /// <param name="b">The factor of the Jacobian.</param>
    /// <param name="jacobianValues">The entries of J, as <see cref="IOdeSystem.StateJacobianValues"/> gives them.</param>
    /// <returns><see langword="false"/> if a pivot vanishes, the factors grow too much or a number is not finite: use a pivoting method.</returns>
    public bool TryFactor(TElement a, double b, ReadOnlySpan<double> jacobianValues)
    {
        Fill(a, b, jacobianValues);
        growth.AsSpan(0, rowSums.Length).Clear();
        TSystem.Eliminate<TElement>(entries, growth);
        for (int row = 0; row < rowSums.Length; row++)
        {
            bool isSound = growth[row] <= GrowthLimit * rowSums[row] && double.IsFinite(TElement.Size(entries[layout.DiagonalPlaces[row]]));
            if (!isSound) return false;
        }

        return true;
    }

    /// <summary>Solves (a I − b J) x = r with the factors.</summary>
    /// <param name="vector">r, replaced by x.</param>
    public void Solve(Span<TElement> vector) => TSystem.Substitute<TElement>(entries, vector);

    private void Fill(TElement a, double b, ReadOnlySpan<double> values)
    {
        values = values[..pattern.EntryCount];
        for (int i = 0; i < values.Length; i++) entries[i] = TElement.Real(-b * values[i]);
        entries.AsSpan(values.Length).Clear();
        ReadOnlySpan<int> diagonal = layout.DiagonalPlaces.AsSpan(), starts = pattern.RowStarts.AsSpan();
        for (int row = 0; row < diagonal.Length; row++)
        {
            entries[diagonal[row]] += a;
            double sum = diagonal[row] < values.Length ? 0 : TElement.Size(a);
            for (int i = starts[row]; i < starts[row + 1]; i++) sum += TElement.Size(entries[i]);
            rowSums[row] = sum;
        }
    }
}

/// <summary>Calls with plain numbers.</summary>
internal static class UnrolledFactorizationExtensions
{
    /// <inheritdoc cref="UnrolledFactorization{TSystem, TElement}.TryFactor"/>
    public static bool TryFactor<TSystem>(
        this UnrolledFactorization<TSystem, RealElement> factorization, double a, double b, ReadOnlySpan<double> jacobianValues)
        where TSystem : struct, IOdeSystem => factorization.TryFactor(new RealElement(a), b, jacobianValues);

    /// <inheritdoc cref="UnrolledFactorization{TSystem, TElement}.TryFactor"/>
    public static bool TryFactor<TSystem>(
        this UnrolledFactorization<TSystem, ComplexElement> factorization, Complex a, double b, ReadOnlySpan<double> jacobianValues)
        where TSystem : struct, IOdeSystem => factorization.TryFactor(new ComplexElement(a.Real, a.Imaginary), b, jacobianValues);

    /// <inheritdoc cref="UnrolledFactorization{TSystem, TElement}.Solve"/>
    public static void Solve<TSystem>(this UnrolledFactorization<TSystem, RealElement> factorization, Span<double> vector)
        where TSystem : struct, IOdeSystem => factorization.Solve(MemoryMarshal.Cast<double, RealElement>(vector));

    /// <inheritdoc cref="UnrolledFactorization{TSystem, TElement}.Solve"/>
    public static void Solve<TSystem>(this UnrolledFactorization<TSystem, ComplexElement> factorization, Span<Complex> vector)
        where TSystem : struct, IOdeSystem => factorization.Solve(MemoryMarshal.Cast<Complex, ComplexElement>(vector));
}
