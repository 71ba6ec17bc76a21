namespace OdeDsl.LinearAlgebra;

/// <summary>All entries by rows, partial pivoting.</summary>
internal sealed class DenseShiftedSolver(int size) : ShiftedSolver
{
    private readonly RealFactorization factors = new(size);

    public override long FactorEntries => (long)size * size;

    public override bool Factor(ReadOnlySpan<double> jacobian, double shift)
    {
        for (int i = 0; i < size; i++)
        {
            ReadOnlySpan<double> row = jacobian.Slice(i * size, size);
            for (int j = 0; j < row.Length; j++) factors[i, j] = (i == j ? shift : 0) - row[j];
        }

        return factors.Factor();
    }

    public override void Solve(Span<double> vector) => factors.Solve(vector);
}

/// <summary>All entries by rows, partial pivoting, complex.</summary>
internal sealed class DenseComplexShiftedSolver(int size) : ComplexShiftedSolver
{
    private readonly ComplexFactorization factors = new(size);

    public override bool Factor(ReadOnlySpan<double> jacobian, double real, double imaginary)
    {
        for (int i = 0; i < size; i++)
        {
            ReadOnlySpan<double> row = jacobian.Slice(i * size, size);
            for (int j = 0; j < row.Length; j++) factors.Set(i, j, (i == j ? real : 0) - row[j], i == j ? imaginary : 0);
        }

        return factors.Factor();
    }

    public override void Solve(Span<double> real, Span<double> imaginary) => factors.Solve(real, imaginary);
}
