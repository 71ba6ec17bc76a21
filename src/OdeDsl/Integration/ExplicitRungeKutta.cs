namespace OdeDsl.Integration;

/// <summary>
/// An explicit Runge-Kutta pair at work on one field: proportional-integral step control, detection of stiffness, the pair's own continuation.
/// </summary>
internal sealed class ExplicitRungeKutta<TField> : Stepper
    where TField : struct, IVectorField
{
    private readonly TField field;
    private readonly ExplicitTableau tableau;

    // For each sum, the weights that are not zero and the stages they belong to.
    private readonly WeightedStages[] rows, extraRows, dense;
    private readonly WeightedStages weights, error;
    private readonly WeightedStages? secondError;
    private readonly double[][] stages;
    private readonly double[] endRates;
    private StepController controller;
    private StiffnessDetector stiffness;

    public ExplicitRungeKutta(TField field, ExplicitTableau tableau, ErrorNorm norm, IntegrationStatistics statistics)
        : base(field.Dimension, 2 + tableau.D.Length, norm, statistics)
    {
        this.field = field;
        this.tableau = tableau;
        int count = tableau.A.Length + 1;
        stages = new double[count + 1 + tableau.ExtraA.Length][];
        for (int i = 0; i < stages.Length; i++) stages[i] = StageSums.Allocate(Dimension);
        StartRates = stages[0];
        endRates = stages[count];
        rows = Rows(tableau.A);
        extraRows = Rows(tableau.ExtraA);
        dense = Rows(tableau.D);
        weights = new WeightedStages(tableau.B, stages);
        error = new WeightedStages(tableau.Error, stages);
        secondError = tableau.SecondError is { } second ? new WeightedStages(second, stages) : null;
        controller = new StepController(tableau.Order, tableau.Integral, tableau.Factors);
        stiffness = new StiffnessDetector(field.BlockSize, tableau.StabilityEdge);
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
        double[] y = Start, stage = Scratch;
        double[] c = tableau.C;
        for (int i = 0; i < rows.Length; i++)
        {
            StageSums.Combine(stage, y, h, rows[i].Weights, rows[i].Stages);
            field.Rates(StartTime + c[i] * h, stage.AsSpan(0, Dimension), stages[i + 1].AsSpan(0, Dimension));
        }

        StageSums.Combine(End, y, h, weights.Weights, weights.Stages);
        field.Rates(StartTime + h, End.AsSpan(0, Dimension), endRates.AsSpan(0, Dimension));
        Statistics.RateEvaluations += rows.Length + 1;

        StageSums.Sum(stage, h, error.Weights, error.Stages);
        double size = Norm.Measure(stage, y, End);
        if (secondError is { } second && size > 0)
        {
            StageSums.Sum(stage, h, second.Weights, second.Stages);
            double other = Norm.Measure(stage, y, End);
            size *= size / Math.Sqrt(size * size + 0.01 * other * other);
        }

        return (double.IsFinite(size) ? StepStatus.Accepted : StepStatus.NotFinite, size);
    }

    protected override double Accept(double h, double error, bool rejectedBefore)
    {
        if (stiffness.IsDue())
        {
            stiffness.Observe(field, h, StartTime + h, End, StartRates, endRates, Norm);
            SuggestsChange = stiffness.IsStiff;
        }

        return h * controller.Accept(error, rejectedBefore);
    }

    protected override double Reject(double h, double error, StepStatus outcome) => h * controller.Reject(error);

    protected override void ComputeDense(double h, Span<double> coefficients)
    {
        int n = Dimension, first = rows.Length + 2;
        for (int i = 0; i < extraRows.Length; i++)
        {
            StageSums.Combine(Scratch, Start, h, extraRows[i].Weights, extraRows[i].Stages);
            Rates(StartTime + tableau.ExtraC[i] * h, Scratch, stages[first + i]);
        }

        double[] startRates = StartRates;
        for (int i = 0; i < n; i++)
        {
            double difference = End[i] - Start[i], d2 = h * startRates[i] - difference;
            coefficients[i] = d2;
            coefficients[n + i] = difference - h * endRates[i] - d2;
        }

        for (int k = 0; k < dense.Length; k++)
        {
            StageSums.Sum(Scratch, h, dense[k].Weights, dense[k].Stages);
            Scratch.AsSpan(0, n).CopyTo(coefficients.Slice((2 + k) * n, n));
        }
    }

    protected override bool CarryRates()
    {
        endRates.CopyTo(StartRates, 0);
        return true;
    }

    protected override void Forget()
    {
        controller.Reset();
        stiffness.Reset();
    }

    private WeightedStages[] Rows(double[][] all) => Array.ConvertAll(all, row => new WeightedStages(row, stages));

    private readonly struct WeightedStages
    {
        public WeightedStages(double[] all, double[][] stages)
        {
            int[] used = [.. Enumerable.Range(0, all.Length).Where(index => all[index] != 0)];
            Weights = Array.ConvertAll(used, index => all[index]);
            Stages = Array.ConvertAll(used, index => stages[index]);
        }

        public double[] Weights { get; }

        public double[][] Stages { get; }
    }
}
