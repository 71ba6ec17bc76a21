using System.Runtime.InteropServices;
using OdeDsl.Modeling;

namespace OdeDsl.LinearAlgebra;

/// <summary>Entries near the diagonal.</summary>
internal sealed class BandedShiftedSolver(SparsityPattern pattern, int lower, int upper) : ShiftedSolver
{
    private readonly BandedFactorization<RealNumber> factors = new(pattern, lower, upper);

    public override long FactorEntries => factors.EntryCount;

    public override bool Factor(ReadOnlySpan<double> jacobian, double shift) => factors.Factor(jacobian, new RealNumber(shift));

    public override void Solve(Span<double> vector) => factors.Solve(MemoryMarshal.Cast<double, RealNumber>(vector));
}

/// <summary>Entries near the diagonal, complex.</summary>
internal sealed class BandedComplexShiftedSolver(SparsityPattern pattern, int lower, int upper) : ComplexShiftedSolver
{
    private readonly BandedFactorization<ComplexNumber> factors = new(pattern, lower, upper);
    private readonly ComplexNumber[] vector = new ComplexNumber[pattern.RowCount];

    public override bool Factor(ReadOnlySpan<double> jacobian, double real, double imaginary) =>
        factors.Factor(jacobian, new ComplexNumber(real, imaginary));

    public override void Solve(Span<double> real, Span<double> imaginary)
    {
        ComplexNumber.Join(real, imaginary, vector);
        factors.Solve(vector);
        ComplexNumber.Split(vector, real, imaginary);
    }
}
