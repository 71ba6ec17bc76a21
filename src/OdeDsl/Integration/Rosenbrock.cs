using OdeDsl.LinearAlgebra;

namespace OdeDsl.Integration;

/// <summary>
/// A Rosenbrock method at work on one field of one block: one Jacobian and one factorisation a step, linear equations instead of Newton
/// iterations, predictive step control (E. Hairer, G. Wanner, Solving ODEs II, sections IV.7 and IV.8).
/// </summary>
internal sealed class Rosenbrock<TField> : Stepper
    where TField : struct, IVectorField
{
    private readonly TField field;
    private readonly RosenbrockTableau tableau;
    private readonly ShiftedSolver ordinary;
    private readonly JacobianStructure ordinaryStructure;
    private readonly double[] jacobian;
    private readonly double[] timeDerivative;
    private readonly double[][] u;
    private ShiftedSolver solver;
    private ShiftedSolver? sliding;
    private JacobianStructure structure;
    private PredictiveController controller;
    private ExplicitSuitability suitability;
    private bool jacobianIsCurrent;

    public Rosenbrock(TField field, RosenbrockTableau tableau, ErrorNorm norm, IntegrationStatistics statistics)
        : base(field.Dimension, tableau.D.Length, norm, statistics)
    {
        this.field = field;
        this.tableau = tableau;
        structure = ordinaryStructure = field.Structure;
        solver = ordinary = structure.MakeReal();
        jacobian = new double[field.LargestJacobian];
        timeDerivative = StageSums.Allocate(Dimension);
        u = new double[tableau.Places.Length][];
        for (int i = 0; i < u.Length; i++) u[i] = StageSums.Allocate(Dimension);
        controller.Use(estimateOrder: tableau.Order - 1, mostIterations: 1);
        suitability = new ExplicitSuitability(field.BlockSize);
    }

    public override IntegrationMethod Method => tableau.Method;

    protected override int Order => tableau.Order;

    public override void Rates(double time, double[] y, double[] rates)
    {
        field.Rates(time, y.AsSpan(0, Dimension), rates.AsSpan(0, Dimension));
        Statistics.RateEvaluations++;
    }

    protected override (StepStatus Outcome, double Error) Attempt(double h)
    {
        if (!jacobianIsCurrent && !Linearise(h)) return (StepStatus.NotFinite, double.NaN);
        Statistics.Factorisations++;
        if (!solver.Factor(jacobian, 1 / (tableau.Gamma * h))) return (StepStatus.SingularMatrix, double.NaN);
        for (int i = 0; i < u.Length; i++)
        {
            double[] right = u[i];
            if (i == 0)
            {
                StartRates.CopyTo(right, 0);
            }
            else
            {
                StageSums.Combine(Scratch, Start, 1, tableau.A[i - 1], u);
                field.Rates(StartTime + tableau.Places[i] * h, Scratch.AsSpan(0, Dimension), right.AsSpan(0, Dimension));
                StageSums.Combine(right, right, 1 / h, tableau.C[i - 1], u);
            }

            if (field.DependsOnTime && tableau.TimeFactors[i] != 0) StageSums.Combine(right, right, tableau.TimeFactors[i] * h, timeDerivative);
            solver.Solve(right.AsSpan(0, Dimension));
        }

        Statistics.RateEvaluations += u.Length - 1;
        // The last stage is evaluated at the new state less the last stage itself.
        StageSums.Combine(End, Scratch, 1, u[^1]);
        double error = Norm.Measure(u[^1], Start, End);
        if (double.IsFinite(error)) return (StepStatus.Accepted, Math.Max(error, 1e-10));
        jacobianIsCurrent = false;
        return (StepStatus.NotFinite, error);
    }

    protected override double Accept(double h, double error, bool rejectedBefore)
    {
        suitability.Observe(h);
        SuggestsChange = suitability.IsSuitable;
        return h * controller.Accept(h, error, 1, rejectedBefore);
    }

    protected override double Reject(double h, double error, StepStatus outcome) =>
        outcome == StepStatus.SingularMatrix ? h / 2 : h * controller.Reject(error, 1);

    protected override void ComputeDense(double h, Span<double> coefficients)
    {
        for (int k = 0; k < tableau.D.Length; k++)
        {
            StageSums.Sum(Scratch, 1, tableau.D[k], u);
            Scratch.AsSpan(0, Dimension).CopyTo(coefficients.Slice(k * Dimension, Dimension));
        }
    }

    protected override bool CarryRates()
    {
        jacobianIsCurrent = false;
        return false;
    }

    protected override void Forget()
    {
        jacobianIsCurrent = false;
        controller.Reset();
        suitability.Reset();
    }

    private bool Linearise(double h)
    {
        if (field.Structure != structure)
        {
            structure = field.Structure;
            solver = structure == ordinaryStructure ? ordinary : sliding ??= structure.MakeReal();
        }

        Span<double> entries = jacobian.AsSpan(0, structure.EntryCount);
        field.Jacobian(StartTime, Start.AsSpan(0, Dimension), entries);
        Statistics.JacobianEvaluations++;
        if (field.DependsOnTime) field.TimeDerivative(StartTime, Start.AsSpan(0, Dimension), h, timeDerivative.AsSpan(0, Dimension));
        foreach (double entry in entries)
        {
            if (!double.IsFinite(entry)) return false;
        }

        suitability.Measure(structure, jacobian, Start, Norm);
        jacobianIsCurrent = true;
        return true;
    }
}
