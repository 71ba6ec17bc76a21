using System.Runtime.InteropServices;
using OdeDsl.Modeling;

namespace OdeDsl.LinearAlgebra;

/// <summary>
/// Entries anywhere, few of them. Where a pivot has lost its digits, a small matrix is factored anew with exchanges; a large one is given
/// up: a method's next try has a smaller step, which strengthens the diagonal.
/// </summary>
internal sealed class SparseShiftedSolver(SparseElimination plan) : ShiftedSolver
{
    /// <summary>Up to this size a matrix is factored with exchanges if need be.</summary>
    private const int LargestDense = 400;

    // Relative to the diagonal. Without a second chance only a pivot without any digits is refused.
    private const double WorstPivot = 1e-10, WorstPivotOfLarge = 1e-15;

    private readonly SparseFactorization<RealNumber> factors = new(plan, WorstPivotFor(plan.Pattern));
    private DenseShiftedSolver? exchanging;
    private double[] matrix = [];
    private bool exchanged;

    public override long FactorEntries => factors.EntryCount;

    /// <summary>The pivot that is still good enough, in parts of the diagonal.</summary>
    public static double WorstPivotFor(SparsityPattern pattern) => IsSmall(pattern) ? WorstPivot : WorstPivotOfLarge;

    /// <summary>Whether there is a second chance with exchanges.</summary>
    public static bool IsSmall(SparsityPattern pattern) => pattern.RowCount <= LargestDense;

    public override bool Factor(ReadOnlySpan<double> jacobian, double shift)
    {
        exchanged = false;
        if (factors.Factor(jacobian, new RealNumber(shift))) return true;
        if (!IsSmall(plan.Pattern)) return false;
        // Made at the first need.
        exchanging ??= new DenseShiftedSolver(plan.Pattern.RowCount);
        exchanged = exchanging.Factor(Spread(plan.Pattern, jacobian, ref matrix), shift);
        return exchanged;
    }

    public override void Solve(Span<double> vector)
    {
        if (exchanged) exchanging!.Solve(vector);
        else factors.Solve(MemoryMarshal.Cast<double, RealNumber>(vector));
    }

    /// <summary>Spreads the entries of a pattern over a whole matrix.</summary>
    public static double[] Spread(SparsityPattern pattern, ReadOnlySpan<double> entries, ref double[] matrix)
    {
        int n = pattern.RowCount;
        if (matrix.Length == 0) matrix = new double[n * n];
        entries.CopyTo(matrix);
        pattern.Expand(matrix);
        return matrix;
    }
}

/// <summary><see cref="SparseShiftedSolver"/> for complex shifts.</summary>
internal sealed class SparseComplexShiftedSolver(SparseElimination plan) : ComplexShiftedSolver
{
    private readonly SparseFactorization<ComplexNumber> factors = new(plan, SparseShiftedSolver.WorstPivotFor(plan.Pattern));
    private readonly ComplexNumber[] vector = new ComplexNumber[plan.Pattern.RowCount];
    private DenseComplexShiftedSolver? exchanging;
    private double[] matrix = [];
    private bool exchanged;

    public override bool Factor(ReadOnlySpan<double> jacobian, double real, double imaginary)
    {
        exchanged = false;
        if (factors.Factor(jacobian, new ComplexNumber(real, imaginary))) return true;
        if (!SparseShiftedSolver.IsSmall(plan.Pattern)) return false;
        exchanging ??= new DenseComplexShiftedSolver(plan.Pattern.RowCount);
        exchanged = exchanging.Factor(SparseShiftedSolver.Spread(plan.Pattern, jacobian, ref matrix), real, imaginary);
        return exchanged;
    }

    public override void Solve(Span<double> real, Span<double> imaginary)
    {
        if (exchanged)
        {
            exchanging!.Solve(real, imaginary);
            return;
        }

        ComplexNumber.Join(real, imaginary, vector);
        factors.Solve(vector);
        ComplexNumber.Split(vector, real, imaginary);
    }
}
