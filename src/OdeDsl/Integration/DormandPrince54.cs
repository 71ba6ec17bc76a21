using static OdeDsl.Integration.DormandPrince54Tableau;

namespace OdeDsl.Integration;

/// <summary>
/// The explicit pair of Dormand and Prince at work on one field: seven stages of which the last is the first of the next step,
/// proportional-integral step control, detection of stiffness. Coefficients and sources: <see cref="DormandPrince54Tableau"/>.
/// </summary>
internal sealed class DormandPrince54<TField> : Stepper
    where TField : struct, IVectorField
{
    private readonly TField field;
    private readonly double[] k2, k3, k4, k5, k6;
    private double[] k7;
    private StepController controller = new(order: 5);
    private StiffnessDetector stiffness;

    public DormandPrince54(TField field, ErrorNorm norm, IntegrationStatistics statistics)
        : base(field.Dimension, norm, statistics)
    {
        this.field = field;
        k2 = StageSums.Allocate(Dimension);
        k3 = StageSums.Allocate(Dimension);
        k4 = StageSums.Allocate(Dimension);
        k5 = StageSums.Allocate(Dimension);
        k6 = StageSums.Allocate(Dimension);
        k7 = StageSums.Allocate(Dimension);
        stiffness = new StiffnessDetector(field.BlockSize);
    }

    public override IntegrationMethod Method => IntegrationMethod.DormandPrince54;

    protected override int Order => 5;

    public override void Rates(double time, double[] y, double[] rates)
    {
        field.Rates(time, y.AsSpan(0, Dimension), rates.AsSpan(0, Dimension));
        Statistics.RateEvaluations++;
    }

    protected override (StepStatus Outcome, double Error) Attempt(double h)
    {
        double t = StartTime;
        double[] y = Start, k1 = StartRates, stage = Scratch;
        int n = Dimension;

        StageSums.Combine(stage, y, h * A21, k1);
        field.Rates(t + C2 * h, stage.AsSpan(0, n), k2.AsSpan(0, n));
        StageSums.Combine(stage, y, h * A31, k1, h * A32, k2);
        field.Rates(t + C3 * h, stage.AsSpan(0, n), k3.AsSpan(0, n));
        StageSums.Combine(stage, y, h * A41, k1, h * A42, k2, h * A43, k3);
        field.Rates(t + C4 * h, stage.AsSpan(0, n), k4.AsSpan(0, n));
        StageSums.Combine(stage, y, h * A51, k1, h * A52, k2, h * A53, k3, h * A54, k4);
        field.Rates(t + C5 * h, stage.AsSpan(0, n), k5.AsSpan(0, n));
        StageSums.Combine(stage, y, h * A61, k1, h * A62, k2, h * A63, k3, h * A64, k4, h * A65, k5);
        field.Rates(t + h, stage.AsSpan(0, n), k6.AsSpan(0, n));
        StageSums.Combine(End, y, h * B1, k1, h * B3, k3, h * B4, k4, h * B5, k5, h * B6, k6);
        field.Rates(t + h, End.AsSpan(0, n), k7.AsSpan(0, n));
        Statistics.RateEvaluations += StageCount - 1;

        StageSums.Combine(stage, h * E1, k1, h * E3, k3, h * E4, k4, h * E5, k5, h * E6, k6, h * E7, k7);
        double error = Norm.Measure(stage, y, End);
        return (double.IsFinite(error) ? StepStatus.Accepted : StepStatus.NotFinite, error);
    }

    protected override double Accept(double h, double error, bool rejectedBefore)
    {
        if (stiffness.IsDue())
        {
            stiffness.Observe(field, h, StartTime + h, End, StartRates, k7, Norm);
            SuggestsChange = stiffness.IsStiff;
        }

        return h * controller.Accept(error, rejectedBefore);
    }

    protected override double Reject(double h, double error, StepStatus outcome) => h * controller.Reject(error);

    protected override void ComputeDense(double h)
    {
        double[] k1 = StartRates;
        StageSums.Combine(D4, h * P1, k1, h * P3, k3, h * P4, k4, h * P5, k5, h * P6, k6, h * P7, k7);
        for (int i = 0; i < Dimension; i++)
        {
            double difference = End[i] - Start[i];
            D2[i] = h * k1[i] - difference;
            D3[i] = difference - h * k7[i] - D2[i];
        }
    }

    protected override bool CarryRates()
    {
        (StartRates, k7) = (k7, StartRates);
        return true;
    }

    protected override void Forget()
    {
        controller.Reset();
        stiffness.Reset();
    }
}
