using static OdeDsl.Integration.RadauIIA5Coefficients;

namespace OdeDsl.Integration;

/// <summary>
/// The implicit Radau IIA method of order 5 at work on one field: simplified Newton iterations on the transformed stage equations, Jacobians
/// and factorisations kept as long as they serve, filtered error estimate, predictive step control (E. Hairer, G. Wanner,
/// Solving ODEs II, section IV.8, with the constants given there). The collocation polynomial continues the step.
/// </summary>
internal sealed class RadauIIA5<TField> : Stepper
    where TField : struct, IVectorField
{
    private readonly TField field;
    private readonly StageEquations equations;
    private readonly double[] z1, z2, z3, w1, w2, w3, f1, f2, f3;
    private readonly double[] lastD1, lastD2, lastD3;
    private readonly double[] jacobian;
    private readonly double newtonTolerance;
    private PredictiveController controller;
    private ExplicitSuitability suitability;
    private double lastSize;
    private double factoredSize;
    private bool jacobianIsCurrent;
    private bool jacobianServes;
    private double contraction;
    private double convergence = 1;
    private double newtonFactor;
    private int iterations;

    public RadauIIA5(TField field, ErrorNorm norm, IntegrationStatistics statistics)
        : base(field.Dimension, norm, statistics)
    {
        this.field = field;
        equations = new StageEquations(field.BlockSize, field.Dimension);
        (z1, z2, z3) = (Allocate(), Allocate(), Allocate());
        (w1, w2, w3) = (Allocate(), Allocate(), Allocate());
        (f1, f2, f3) = (Allocate(), Allocate(), Allocate());
        (lastD1, lastD2, lastD3) = (Allocate(), Allocate(), Allocate());
        jacobian = new double[field.BlockSize * field.BlockSize];
        newtonTolerance = Math.Max(10 * RoundingUnit / norm.Relative, Math.Min(0.03, Math.Sqrt(norm.Relative)));
    }

    public override IntegrationMethod Method => IntegrationMethod.RadauIIA5;

    /// <summary>The order of the error estimate, which governs the steps.</summary>
    protected override int Order => 3;

    private static double RoundingUnit => double.BitIncrement(1) - 1;

    public override void Rates(double time, double[] y, double[] rates)
    {
        field.Rates(time, y.AsSpan(0, Dimension), rates.AsSpan(0, Dimension));
        Statistics.RateEvaluations++;
    }

    protected override (StepStatus Outcome, double Error) Attempt(double h)
    {
        StepStatus prepared = PrepareMatrices(h);
        if (prepared != StepStatus.Accepted) return (prepared, double.NaN);
        PredictStages(h);
        StepStatus solved = SolveStages(h);
        if (solved != StepStatus.Accepted) return (solved, double.NaN);
        StageSums.Combine(End, Start, 1, z3);
        double error = EstimateError(h);
        return (double.IsFinite(error) ? StepStatus.Accepted : StepStatus.NotFinite, error);
    }

    protected override double Accept(double h, double error, bool rejectedBefore)
    {
        jacobianServes = contraction <= PredictiveController.NegligibleContraction;
        suitability.Observe(h);
        SuggestsChange = suitability.IsSuitable;
        double factor = controller.Accept(h, error, iterations, rejectedBefore);
        // A slightly longer step is not worth a factorisation.
        return jacobianServes && factor >= 1 && factor <= PredictiveController.LargestIgnoredGrowth ? h : h * factor;
    }

    protected override double Reject(double h, double error, StepStatus outcome)
    {
        // A Jacobian from an earlier point has served its time.
        jacobianServes = false;
        return outcome switch
        {
            StepStatus.NewtonFailed => h * newtonFactor,
            StepStatus.SingularMatrix => h / 2,
            _ => h * controller.Reject(error, iterations),
        };
    }

    protected override void ComputeDense(double h)
    {
        for (int i = 0; i < Dimension; i++)
        {
            double difference = End[i] - Start[i];
            double e1 = (z1[i] / C1 - difference) / (1 - C1), e2 = (z2[i] / C2 - difference) / (1 - C2);
            D3[i] = (e2 - e1) / (C2 - C1);
            D2[i] = e1 - C1 * D3[i];
            D4[i] = 0;
        }
    }

    protected override bool CarryRates()
    {
        EnsureDense();
        for (int i = 0; i < Dimension; i++) (lastD1[i], lastD2[i], lastD3[i]) = (End[i] - Start[i], D2[i], D3[i]);
        lastSize = EndTime - StartTime;
        jacobianIsCurrent = false;
        return false;
    }

    protected override void Forget()
    {
        lastSize = 0;
        factoredSize = 0;
        jacobianIsCurrent = jacobianServes = false;
        convergence = 1;
        controller.Reset();
        suitability.Reset();
    }

    private double[] Allocate() => StageSums.Allocate(Dimension);

    private StepStatus PrepareMatrices(double h)
    {
        if (!jacobianServes && !jacobianIsCurrent)
        {
            field.Jacobian(StartTime, Start.AsSpan(0, Dimension), jacobian);
            Statistics.JacobianEvaluations++;
            suitability.Measure(jacobian, Start, Norm, field.BlockSize);
            jacobianIsCurrent = true;
            factoredSize = 0;
        }

        if (h == factoredSize) return StepStatus.Accepted;
        Statistics.Factorisations++;
        factoredSize = 0;
        foreach (double entry in jacobian)
        {
            if (double.IsFinite(entry)) continue;
            jacobianIsCurrent = jacobianServes = false;
            return StepStatus.NotFinite;
        }

        if (!equations.Factor(jacobian, h)) return StepStatus.SingularMatrix;
        factoredSize = h;
        return StepStatus.Accepted;
    }

    // The last step's polynomial, continued beyond its end.
    private void PredictStages(double h)
    {
        if (lastSize == 0)
        {
            Array.Clear(z1);
            Array.Clear(z2);
            Array.Clear(z3);
            Array.Clear(w1);
            Array.Clear(w2);
            Array.Clear(w3);
            return;
        }

        double ratio = h / lastSize;
        Extrapolate(C1 * ratio, z1);
        Extrapolate(C2 * ratio, z2);
        Extrapolate(ratio, z3);
        StageTransform.Apply(InverseT, z1, z2, z3, w1, w2, w3);
    }

    private void Extrapolate(double beyond, double[] z)
    {
        double theta = 1 + beyond;
        StageSums.Combine(z, beyond, lastD1, -beyond * theta, lastD2, -beyond * theta * theta, lastD3);
    }

    private StepStatus SolveStages(double h)
    {
        double lastNorm = 0, lastQuotient = 0;
        convergence = Math.Pow(Math.Max(convergence, RoundingUnit), 0.8);
        contraction = PredictiveController.NegligibleContraction;
        for (iterations = 1; iterations <= PredictiveController.MaximumIterations; iterations++)
        {
            StageRates(h, C1, z1, f1);
            StageRates(h, C2, z2, f2);
            StageRates(h, 1, z3, f3);
            Statistics.RateEvaluations += 3;
            Statistics.NewtonIterations++;
            StageTransform.Apply(InverseT, f1, f2, f3, f1, f2, f3);
            equations.Correct(h, f1, f2, f3, w1, w2, w3);
            double norm = NewtonNorm();
            if (!double.IsFinite(norm)) return StepStatus.NotFinite;
            if (iterations > 1)
            {
                double quotient = norm / lastNorm;
                contraction = iterations == 2 ? quotient : Math.Sqrt(quotient * lastQuotient);
                lastQuotient = quotient;
                if (!Converges(norm)) return StepStatus.NewtonFailed;
            }

            lastNorm = Math.Max(norm, RoundingUnit);
            StageSums.Combine(w1, w1, 1, f1);
            StageSums.Combine(w2, w2, 1, f2);
            StageSums.Combine(w3, w3, 1, f3);
            StageTransform.Apply(T, w1, w2, w3, z1, z2, z3);
            if (convergence * norm <= newtonTolerance) return StepStatus.Accepted;
        }

        newtonFactor = 0.5;
        return StepStatus.NewtonFailed;
    }

    // Whether the iterations left will do, at the present rate of contraction (equations IV.8.10 and 8.11).
    private bool Converges(double norm)
    {
        newtonFactor = 0.5;
        if (!(contraction < 0.99)) return false;
        convergence = contraction / (1 - contraction);
        int left = PredictiveController.MaximumIterations - iterations;
        if (left <= 0) return convergence * norm <= newtonTolerance;
        double expected = convergence * norm * Math.Pow(contraction, left) / newtonTolerance;
        if (expected < 1) return true;
        newtonFactor = 0.8 * Math.Pow(Math.Clamp(expected, 1e-4, 20), -1.0 / (4 + left));
        return false;
    }

    private void StageRates(double h, double c, double[] z, double[] rates)
    {
        StageSums.Combine(Scratch, Start, 1, z);
        field.Rates(StartTime + c * h, Scratch.AsSpan(0, Dimension), rates.AsSpan(0, Dimension));
    }

    private double NewtonNorm()
    {
        double n1 = Norm.Measure(f1, Start, Start), n2 = Norm.Measure(f2, Start, Start), n3 = Norm.Measure(f3, Start, Start);
        return Math.Sqrt((n1 * n1 + n2 * n2 + n3 * n3) / 3);
    }

    // (γ/h − J)⁻¹ (f(t₀, y₀) + (e₁z₁ + e₂z₂ + e₃z₃) / h); once more through the rates if it would reject a first or repeated step
    // (equations IV.8.19 and 8.20).
    private double EstimateError(double h)
    {
        StageSums.Combine(f2, E1 / h, z1, E2 / h, z2, E3 / h, z3);
        StageSums.Combine(f1, f2, 1, StartRates);
        equations.Filter(f1);
        double error = Norm.Measure(f1, Start, End);
        if (!(error >= 1) || !(controller.IsFirst || LastAttemptRejected)) return Math.Max(error, 1e-10);
        StageSums.Combine(Scratch, Start, 1, f1);
        Rates(StartTime, Scratch, f1);
        StageSums.Combine(f1, f2, 1, f1);
        equations.Filter(f1);
        return Math.Max(Norm.Measure(f1, Start, End), 1e-10);
    }
}
