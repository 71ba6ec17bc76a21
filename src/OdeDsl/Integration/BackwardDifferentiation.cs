using OdeDsl.LinearAlgebra;
using static OdeDsl.Integration.DifferenceFormulas;

namespace OdeDsl.Integration;

/// <summary>
/// The backward differentiation formulas of orders 1 to 5 at work on one field, as numerical differentiation formulas on equal steps whose
/// differences are converted where the size changes (L. F. Shampine, M. W. Reichelt, The MATLAB ODE suite, SIAM Journal on Scientific
/// Computing 18, 1997, section 2). Jacobians and factorisations are kept as long as they serve.
/// </summary>
internal sealed class BackwardDifferentiation<TField> : Stepper
    where TField : struct, IVectorField
{
    private const int MaximumIterations = 4;
    private const double Safety = 0.9;
    private const double SmallestFactor = 0.2;
    private const double LargestFactor = 10;

    /// <summary>Changes of the step between these factors are not worth a factorisation.</summary>
    private const double IgnoredShrinkage = 0.9, IgnoredGrowth = 1.2;

    private readonly TField field;
    private readonly JacobianStructure ordinaryStructure;
    private readonly ShiftedSolver ordinary;
    private readonly double[] jacobian;
    private readonly double[] correction, residual, history;
    private readonly double[] conversion = new double[(LargestOrder + 1) * (LargestOrder + 1)];
    private readonly double newtonTolerance;

    // Backward differences: at the start with the size of the step before, at the start with that of the attempt, at the end of the attempt.
    private readonly double[][] converted;
    private double[][] differences, next;
    private ShiftedSolver solver;
    private ShiftedSolver? sliding;
    private JacobianStructure structure;
    private ExplicitSuitability suitability;
    private int order, nextOrder, heldOrder, equalSteps, iterations;
    private double differenceSize, attemptSize, factoredShift, convergence;
    private bool jacobianIsCurrent, hasJacobian;

    public BackwardDifferentiation(TField field, ErrorNorm norm, IntegrationStatistics statistics)
        : base(field.Dimension, LargestOrder - 1, norm, statistics)
    {
        this.field = field;
        structure = ordinaryStructure = field.Structure;
        solver = ordinary = structure.MakeReal();
        jacobian = new double[field.LargestJacobian];
        (correction, residual, history) = (StageSums.Allocate(Dimension), StageSums.Allocate(Dimension), StageSums.Allocate(Dimension));
        (differences, converted, next) = (Vectors(), Vectors(), Vectors());
        newtonTolerance = Math.Max(10 * (double.BitIncrement(1) - 1) / norm.Relative, Math.Min(0.03, Math.Sqrt(norm.Relative)));
        suitability = new ExplicitSuitability(field.BlockSize);
    }

    public override IntegrationMethod Method => IntegrationMethod.BackwardDifferentiation;

    /// <summary>Every run begins with order 1.</summary>
    protected override int Order => 1;

    public override void Rates(double time, double[] y, double[] rates)
    {
        field.Rates(time, y.AsSpan(0, Dimension), rates.AsSpan(0, Dimension));
        Statistics.RateEvaluations++;
    }

    protected override (StepStatus Outcome, double Error) Attempt(double h)
    {
        Convert(h);
        double shift = Alpha[order] / h;
        while (true)
        {
            StepStatus prepared = PrepareMatrix(shift);
            if (prepared != StepStatus.Accepted) return (prepared, double.NaN);
            StepStatus solved = Solve(StartTime + h, shift);
            if (solved == StepStatus.Accepted) break;
            // A Jacobian from an earlier point gets a second chance with a new one.
            if (jacobianIsCurrent) return (solved, double.NaN);
            hasJacobian = false;
        }

        UpdateDifferences();
        heldOrder = order;
        double error = ErrorConstant[order] * Norm.Measure(correction, Start, End);
        return (double.IsFinite(error) ? StepStatus.Accepted : StepStatus.NotFinite, error);
    }

    protected override double Accept(double h, double error, bool rejectedBefore)
    {
        suitability.Observe(h);
        SuggestsChange = suitability.IsSuitable;
        nextOrder = order;
        if (++equalSteps <= order) return h;
        double stay = Factor(error, order + 1);
        double down = order > 1 ? Factor(ErrorConstant[order - 1] * Norm.Measure(next[order], Start, End), order) : 0;
        double up = order < LargestOrder ? Factor(ErrorConstant[order + 1] * Norm.Measure(next[order + 2], Start, End), order + 2) : 0;
        double best = Math.Max(stay, Math.Max(down, up));
        nextOrder = best == stay ? order : best == down ? order - 1 : order + 1;
        double factor = Math.Min(rejectedBefore ? 1 : LargestFactor, SafetyNow() * best);
        if (nextOrder == order && factor > IgnoredShrinkage && factor < IgnoredGrowth) return h;
        equalSteps = 0;
        return h * factor;
    }

    protected override double Reject(double h, double error, StepStatus outcome)
    {
        equalSteps = 0;
        return outcome == StepStatus.Accepted ? h * Math.Max(SmallestFactor, SafetyNow() * Factor(error, order + 1)) : h / 2;
    }

    protected override void ComputeDense(double h, Span<double> coefficients)
    {
        CoefficientCount = Math.Max(heldOrder - 1, 1);
        coefficients.Clear();
        double[,] rows = Nested[heldOrder];
        for (int k = 0; k + 1 < heldOrder; k++)
        {
            Span<double> to = coefficients.Slice(k * Dimension, Dimension);
            for (int j = 2; j <= heldOrder; j++)
            {
                double weight = rows[k, j - 1];
                ReadOnlySpan<double> difference = next[j].AsSpan(0, Dimension);
                for (int i = 0; i < to.Length; i++) to[i] += weight * difference[i];
            }
        }
    }

    protected override bool CarryRates()
    {
        (differences, next) = (next, differences);
        differenceSize = attemptSize;
        order = nextOrder;
        jacobianIsCurrent = false;
        // The rates at the start serve the first step only.
        return true;
    }

    protected override void Forget()
    {
        order = nextOrder = 1;
        equalSteps = 0;
        differenceSize = factoredShift = 0;
        hasJacobian = jacobianIsCurrent = false;
        convergence = 1;
        suitability.Reset();
    }

    private static double Factor(double error, int root) => Math.Pow(Math.Max(error, 1e-10), -1.0 / root);

    private double SafetyNow() => Safety * (2 * MaximumIterations + 1) / (2 * MaximumIterations + iterations);

    private double[][] Vectors()
    {
        var vectors = new double[LargestOrder + 3][];
        for (int k = 0; k < vectors.Length; k++) vectors[k] = StageSums.Allocate(Dimension);
        return vectors;
    }

    // Brings the differences at the start to the size of the attempt.
    private void Convert(double h)
    {
        attemptSize = h;
        if (differenceSize == 0)
        {
            Start.CopyTo(converted[0], 0);
            for (int i = 0; i < Dimension; i++) converted[1][i] = h * StartRates[i];
            for (int k = 2; k < converted.Length; k++) Array.Clear(converted[k]);
            return;
        }

        // Differences over a short step say little of a long one.
        if (Math.Abs(h) > LargestFactor * Math.Abs(differenceSize)) (order, nextOrder, equalSteps) = (1, 1, 0);
        if (h == differenceSize)
        {
            for (int k = 1; k < converted.Length; k++) differences[k].CopyTo(converted[k], 0);
        }
        else
        {
            equalSteps = 0;
            DifferenceFormulas.Convert(order, h / differenceSize, conversion);
            StageTransform.Apply(conversion, order + 1, order + 1, differences, converted);
        }

        // The caller may have moved the state.
        Start.CopyTo(converted[0], 0);
    }

    private StepStatus PrepareMatrix(double shift)
    {
        if (!hasJacobian)
        {
            if (field.Structure != structure)
            {
                structure = field.Structure;
                solver = structure == ordinaryStructure ? ordinary : sliding ??= structure.MakeReal();
            }

            Span<double> entries = jacobian.AsSpan(0, structure.EntryCount);
            field.Jacobian(StartTime, Start.AsSpan(0, Dimension), entries);
            Statistics.JacobianEvaluations++;
            factoredShift = 0;
            foreach (double entry in entries)
            {
                if (!double.IsFinite(entry)) return StepStatus.NotFinite;
            }

            suitability.Measure(structure, jacobian, Start, Norm);
            hasJacobian = jacobianIsCurrent = true;
        }

        if (shift == factoredShift) return StepStatus.Accepted;
        Statistics.Factorisations++;
        factoredShift = 0;
        convergence = 1;
        if (!solver.Factor(jacobian, shift)) return StepStatus.SingularMatrix;
        factoredShift = shift;
        return StepStatus.Accepted;
    }

    // Newton's iterations for the correction d of the prediction: α d / h + Σ γₖ ∇ᵏ / h = f(t, predicted + d).
    private StepStatus Solve(double time, double shift)
    {
        Start.CopyTo(End, 0);
        Array.Clear(history);
        for (int k = 1; k <= order; k++)
        {
            StageSums.Combine(End, End, 1, converted[k]);
            StageSums.Combine(history, history, Gamma[k] / attemptSize, converted[k]);
        }

        Array.Clear(correction);
        convergence = Math.Pow(Math.Max(convergence, double.BitIncrement(1) - 1), 0.8);
        double lastNorm = 0;
        for (iterations = 1; iterations <= MaximumIterations; iterations++)
        {
            Rates(time, End, residual);
            Statistics.NewtonIterations++;
            StageSums.Combine(residual, residual, -1, history, -shift, correction);
            for (int start = 0; start < Dimension; start += structure.Size) solver.Solve(residual.AsSpan(start, structure.Size));
            double norm = Norm.Measure(residual, Start, Start);
            if (!double.IsFinite(norm)) return StepStatus.NotFinite;
            if (iterations > 1)
            {
                double contraction = norm / lastNorm;
                if (!(contraction < 1)) return StepStatus.NewtonFailed;
                convergence = contraction / (1 - contraction);
                if (convergence * norm * Math.Pow(contraction, MaximumIterations - iterations) > newtonTolerance) return StepStatus.NewtonFailed;
            }

            lastNorm = norm;
            StageSums.Combine(End, End, 1, residual);
            StageSums.Combine(correction, correction, 1, residual);
            if (norm == 0 || convergence * norm <= newtonTolerance) return StepStatus.Accepted;
        }

        return StepStatus.NewtonFailed;
    }

    private void UpdateDifferences()
    {
        StageSums.Combine(next[order + 2], correction, -1, converted[order + 1]);
        correction.CopyTo(next[order + 1], 0);
        for (int k = order; k >= 0; k--) StageSums.Combine(next[k], converted[k], 1, next[k + 1]);
    }
}
