namespace OdeDsl.Integration;

/// <summary>
/// The implicit Radau IIA methods at work on one field: simplified Newton iterations on the transformed stage equations, Jacobians
/// and factorisations kept as long as they serve, filtered error estimate, predictive step control (E. Hairer, G. Wanner,
/// Solving ODEs II, section IV.8, with the constants given there). The collocation polynomial continues the step. With several
/// methods, the order changes as <see cref="RadauOrder"/> says.
/// </summary>
internal sealed class RadauIIA<TField> : Stepper
    where TField : struct, IVectorField
{
    private readonly TField field;
    private readonly ErrorNorm tolerances;
    private readonly ErrorNorm[] norms;
    private readonly StageEquations ordinary;
    private readonly double[][] w, f;
    private readonly double[] extrapolation;
    private double[][] z, lastZ;
    private StageEquations? sliding;
    private StageEquations equations;
    private RadauOrder order;
    private RadauCoefficients method;
    private RadauCoefficients lastMethod;
    private PredictiveController controller;
    private ExplicitSuitability suitability;
    private double newtonTolerance;
    private double lastSize;
    private double factoredSize;
    private bool jacobianIsCurrent;
    private bool jacobianServes;
    private double contraction;
    private double convergence = 1;
    private double newtonFactor;
    private int iterations;

    /// <param name="field">The field.</param>
    /// <param name="name">The method's name for reports.</param>
    /// <param name="order">The methods to use.</param>
    /// <param name="norm">The error norm for estimates of full order.</param>
    /// <param name="statistics">What to count in.</param>
    public RadauIIA(TField field, IntegrationMethod name, RadauOrder order, ErrorNorm norm, IntegrationStatistics statistics)
        : base(field.Dimension, order.Largest.Stages - 1, norm, statistics)
    {
        this.field = field;
        this.order = order;
        Method = name;
        tolerances = norm;
        norms = Array.ConvertAll(order.Methods, method => norm.ForEstimateOfOrder(method.Stages, 2 * method.Stages - 1));
        int most = order.Largest.Stages;
        equations = ordinary = new StageEquations(field.Structure, field.Dimension, most);
        (z, lastZ, w, f) = (Allocate(most), Allocate(most), Allocate(most), Allocate(most));
        extrapolation = new double[most * most];
        suitability = new ExplicitSuitability(field.BlockSize);
        method = lastMethod = order.Present;
        Use(order.Present);
    }

    public override IntegrationMethod Method { get; }

    /// <summary>The order of the error estimate, which governs the steps.</summary>
    protected override int Order => method.Stages;

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
        StageSums.Combine(End, Start, 1, z[method.Stages - 1]);
        double error = EstimateError(h);
        return (double.IsFinite(error) ? StepStatus.Accepted : StepStatus.NotFinite, error);
    }

    protected override double Accept(double h, double error, bool rejectedBefore)
    {
        jacobianServes = contraction <= PredictiveController.NegligibleContraction;
        suitability.Observe(h);
        SuggestsChange = suitability.IsSuitable;
        double factor = controller.Accept(h, error, iterations, rejectedBefore);
        order.Accepted(iterations, contraction);
        // A slightly longer step is not worth a factorisation.
        return jacobianServes && factor >= 1 && factor <= PredictiveController.LargestIgnoredGrowth ? h : h * factor;
    }

    protected override double Reject(double h, double error, StepStatus outcome)
    {
        // A Jacobian from an earlier point has served its time.
        jacobianServes = false;
        if (outcome == StepStatus.NewtonFailed && order.NewtonFailed()) Use(order.Present);
        return outcome switch
        {
            StepStatus.NewtonFailed => h * newtonFactor,
            StepStatus.SingularMatrix => h / 2,
            _ => h * controller.Reject(error, iterations),
        };
    }

    protected override void ComputeDense(double h, Span<double> coefficients)
    {
        for (int k = 0; k + 1 < method.Stages; k++)
        {
            Span<double> to = coefficients.Slice(k * Dimension, Dimension);
            to.Clear();
            for (int i = 0; i < method.Stages; i++)
            {
                double weight = method.Dense[k, i];
                ReadOnlySpan<double> stage = z[i].AsSpan(0, Dimension);
                for (int at = 0; at < to.Length; at++) to[at] += weight * stage[at];
            }
        }
    }

    protected override bool CarryRates()
    {
        (z, lastZ) = (lastZ, z);
        lastMethod = method;
        lastSize = EndTime - StartTime;
        jacobianIsCurrent = false;
        if (order.Present != method) Use(order.Present);
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
        order.Reset();
        Use(order.Present);
    }

    // As in the authors' program of variable order.
    private static int MaximumIterations(int stages) => 7 + (stages - 3) * 5 / 2;

    private double[][] Allocate(int count)
    {
        var vectors = new double[count][];
        for (int i = 0; i < count; i++) vectors[i] = StageSums.Allocate(Dimension);
        return vectors;
    }

    private void Use(RadauCoefficients chosen)
    {
        method = chosen;
        Norm = norms[order.PresentIndex];
        Norm.FollowTangents(Start);
        controller.Use(chosen.Stages, MaximumIterations(chosen.Stages));
        // The estimate's tolerance is r' = 0.1 r^x with x = (s + 1) / (2s); Newton's iterations stop at a part r'^(1/x − 1) of it.
        double exponent = 2.0 * chosen.Stages / (chosen.Stages + 1) - 1;
        newtonTolerance = Math.Max(10 * RoundingUnit / Norm.Relative, Math.Min(0.03, Math.Pow(Norm.Relative, exponent)));
        CoefficientCount = chosen.Stages - 1;
        factoredSize = 0;
        convergence = 1;
    }

    private StepStatus PrepareMatrices(double h)
    {
        if (!jacobianServes && !jacobianIsCurrent)
        {
            equations = field.Structure == ordinary.Structure
                ? ordinary
                : sliding ??= new StageEquations(field.Structure, Dimension, order.Largest.Stages);
            field.Jacobian(StartTime, Start.AsSpan(0, Dimension), equations.Jacobian);
            Statistics.JacobianEvaluations++;
            suitability.Measure(equations.Structure, equations.Jacobian, Start, tolerances);
            jacobianIsCurrent = true;
            factoredSize = 0;
        }

        if (h == factoredSize) return StepStatus.Accepted;
        Statistics.Factorisations++;
        factoredSize = 0;
        foreach (double entry in equations.Jacobian)
        {
            if (double.IsFinite(entry)) continue;
            jacobianIsCurrent = jacobianServes = false;
            return StepStatus.NotFinite;
        }

        if (!equations.Factor(method, h)) return StepStatus.SingularMatrix;
        factoredSize = h;
        return StepStatus.Accepted;
    }

    // The last step's polynomial, continued beyond its end.
    private void PredictStages(double h)
    {
        int s = method.Stages;
        if (lastSize == 0)
        {
            for (int i = 0; i < s; i++)
            {
                Array.Clear(z[i]);
                Array.Clear(w[i]);
            }

            return;
        }

        lastMethod.Extrapolate(method, h / lastSize, extrapolation);
        StageTransform.Apply(extrapolation, s, lastMethod.Stages, lastZ, z);
        StageTransform.Apply(method.InverseT, s, z, w);
    }

    private StepStatus SolveStages(double h)
    {
        int s = method.Stages, most = MaximumIterations(s);
        double lastNorm = 0, lastQuotient = 0;
        convergence = Math.Pow(Math.Max(convergence, RoundingUnit), 0.8);
        contraction = PredictiveController.NegligibleContraction;
        for (iterations = 1; iterations <= most; iterations++)
        {
            for (int i = 0; i < s; i++)
            {
                StageSums.Combine(Scratch, Start, 1, z[i]);
                field.Rates(StartTime + method.C[i] * h, Scratch.AsSpan(0, Dimension), f[i].AsSpan(0, Dimension));
            }

            Statistics.RateEvaluations += s;
            Statistics.NewtonIterations++;
            StageTransform.Apply(method.InverseT, s, f, f);
            equations.Correct(method, h, f, w);
            double norm = NewtonNorm(s);
            if (!double.IsFinite(norm)) return StepStatus.NotFinite;
            if (iterations > 1)
            {
                double quotient = norm / lastNorm;
                contraction = iterations == 2 ? quotient : Math.Sqrt(quotient * lastQuotient);
                lastQuotient = quotient;
                if (!Converges(norm, most - iterations)) return StepStatus.NewtonFailed;
            }

            lastNorm = Math.Max(norm, RoundingUnit);
            for (int i = 0; i < s; i++) StageSums.Combine(w[i], w[i], 1, f[i]);
            StageTransform.Apply(method.T, s, w, z);
            if (convergence * norm <= newtonTolerance) return StepStatus.Accepted;
        }

        newtonFactor = 0.5;
        return StepStatus.NewtonFailed;
    }

    // Whether the iterations left will do, at the present rate of contraction (equations IV.8.10 and 8.11).
    private bool Converges(double norm, int left)
    {
        newtonFactor = 0.5;
        if (!(contraction < 0.99)) return false;
        convergence = contraction / (1 - contraction);
        if (left <= 0) return convergence * norm <= newtonTolerance;
        double expected = convergence * norm * Math.Pow(contraction, left) / newtonTolerance;
        if (expected < 1) return true;
        newtonFactor = 0.8 * Math.Pow(Math.Clamp(expected, 1e-4, 20), -1.0 / (4 + left));
        return false;
    }

    private double NewtonNorm(int s)
    {
        double sum = 0;
        for (int i = 0; i < s; i++)
        {
            double norm = Norm.Measure(f[i], Start, Start);
            sum += norm * norm;
        }

        return Math.Sqrt(sum / s);
    }

    // (γ/h − J)⁻¹ (f(t₀, y₀) + Σ eᵢ zᵢ / h); once more through the rates if it would reject a first or repeated step
    // (equations IV.8.19 and 8.20).
    private double EstimateError(double h)
    {
        double[] raw = f[1], filtered = f[0];
        StageSums.Sum(raw, 1 / h, method.ErrorWeights, z);
        StageSums.Combine(filtered, raw, 1, StartRates);
        equations.Filter(filtered);
        double error = Norm.Measure(filtered, Start, End);
        if (!(error >= 1) || !(controller.IsFirst || LastAttemptRejected)) return Math.Max(error, 1e-10);
        StageSums.Combine(Scratch, Start, 1, filtered);
        Rates(StartTime, Scratch, filtered);
        StageSums.Combine(filtered, raw, 1, filtered);
        equations.Filter(filtered);
        return Math.Max(Norm.Measure(filtered, Start, End), 1e-10);
    }
}
