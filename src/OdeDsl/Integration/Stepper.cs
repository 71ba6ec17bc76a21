namespace OdeDsl.Integration;

/// <summary>
/// One integration method at work on one field: takes steps under error control, holds the last step for continuation.
/// Time may run in either direction. No member allocates after construction. The loop over steps belongs to the caller.
/// </summary>
internal abstract class Stepper
{
    /// <summary>A step is given up when a tenth of it no longer changes the time (Hairer, Norsett and Wanner, Solving ODEs I, appendix).</summary>
    private const double GiveUpPart = 0.1;

    /// <summary>A step that would come this close to the limit, in parts of itself, is stretched to land on it.</summary>
    private const double Stretch = 1.01;

    /// <summary>Factor on a step that met values that are not finite.</summary>
    private const double NotFiniteFactor = 0.25;

    private readonly double[] continuation;
    private bool stepHeld;
    private bool ratesKnown;
    private bool endMoved;
    private bool fieldChanged;
    private bool estimateStep;
    private bool denseReady;

    /// <param name="dimension">The number of components.</param>
    /// <param name="coefficientCount">The number of vectors beyond the two end states that continue a step at most.</param>
    /// <param name="norm">The error norm.</param>
    /// <param name="statistics">What to count in.</param>
    protected Stepper(int dimension, int coefficientCount, ErrorNorm norm, IntegrationStatistics statistics)
    {
        Dimension = dimension;
        Norm = norm;
        Statistics = statistics;
        Start = StageSums.Allocate(dimension);
        End = StageSums.Allocate(dimension);
        StartRates = StageSums.Allocate(dimension);
        Scratch = StageSums.Allocate(dimension);
        Work = StageSums.Allocate(dimension);
        continuation = new double[dimension * coefficientCount];
        CoefficientCount = coefficientCount;
    }

    /// <summary>The number of components.</summary>
    public int Dimension { get; }

    /// <summary>The method's name for reports.</summary>
    public abstract IntegrationMethod Method { get; }

    /// <summary>Where the last step started.</summary>
    public double StartTime { get; private set; }

    /// <summary>Where the last step ended, and the next will start.</summary>
    public double EndTime { get; private set; }

    /// <summary>The state at <see cref="StartTime"/>, padded.</summary>
    public double[] Start { get; private set; }

    /// <summary>The state at <see cref="EndTime"/>, padded.</summary>
    public double[] End { get; private set; }

    /// <summary>The size of the next step, signed.</summary>
    public double Proposed { get; protected set; }

    /// <summary>The size of the step last tried, signed.</summary>
    public double LastTried { get; private set; }

    /// <summary>The largest step permitted.</summary>
    public double MaximumStep { get; set; } = double.PositiveInfinity;

    /// <summary>The number of attempts permitted in all.</summary>
    public long MaximumAttempts { get; set; } = long.MaxValue;

    /// <summary>Whether the motion suits the other kind of method better.</summary>
    public bool SuggestsChange { get; protected set; }

    /// <summary>The coefficients that continue the last step, see <see cref="DenseStep"/>; ready after <see cref="EnsureDense"/>.</summary>
    public ReadOnlySpan<double> Continuation => continuation.AsSpan(0, Dimension * CoefficientCount);

    /// <summary>The order of the method, for the starting step.</summary>
    protected abstract int Order { get; }

    protected ErrorNorm Norm { get; set; }

    protected IntegrationStatistics Statistics { get; }

    /// <summary>Whether the step under way was rejected before.</summary>
    protected bool LastAttemptRejected { get; private set; }

    /// <summary>The rates at <see cref="Start"/>, padded.</summary>
    protected double[] StartRates { get; set; }

    protected double[] Scratch { get; }

    /// <summary>Workspace that holds nothing from step to step, padded.</summary>
    protected double[] Work { get; }

    /// <summary>The number of vectors that continue the step held.</summary>
    protected int CoefficientCount { get; set; }

    /// <summary>Computes the rates into a padded vector and counts the evaluation.</summary>
    public abstract void Rates(double time, double[] y, double[] rates);

    /// <summary>Starts anew from a state.</summary>
    /// <param name="time">The time.</param>
    /// <param name="y">The state.</param>
    /// <param name="step">The size of the first step; 0: estimated from the rates.</param>
    public void Begin(double time, ReadOnlySpan<double> y, double step)
    {
        EndTime = StartTime = time;
        y[..Dimension].CopyTo(Start);
        y[..Dimension].CopyTo(End);
        Norm.FollowTangents(Start);
        Proposed = step;
        stepHeld = false;
        SuggestsChange = false;
        FieldChanged();
        estimateStep = step == 0;
    }

    /// <summary>Tells that the caller moved <see cref="End"/>: the rates there must be computed anew.</summary>
    public void EndMoved() => endMoved = true;

    /// <summary>
    /// Tells that the rates have another formula after the last step: nothing learnt carries over, and the next step is no longer than
    /// a first step would be.
    /// </summary>
    public void FieldChanged() => endMoved = estimateStep = fieldChanged = true;

    /// <summary>Takes one step under error control.</summary>
    /// <param name="limit">Where to stop at the latest; a step that comes near lands on it exactly.</param>
    /// <returns>The outcome; unless accepted, the position is where the last accepted step ended.</returns>
    public StepStatus Step(double limit)
    {
        MoveOn();
        StepStatus status = Prepare(limit);
        if (status == StepStatus.Accepted) status = TryUntilAccepted(limit);
        if (status == StepStatus.Accepted) return status;
        Undo(shorten: false);
        // Whoever goes on from here has changed something: the size that failed is no guide.
        Proposed = 0;
        return status;
    }

    /// <summary>
    /// Takes the last step again with another end inside it. Neither tested for its error (the longer step passed) nor a guide for the
    /// next step. If it fails, the step is undone, and the next will be at most half as long.
    /// </summary>
    /// <param name="endTime">The new end.</param>
    /// <returns>Whether the step succeeded.</returns>
    public bool Retake(double endTime)
    {
        double h = endTime - StartTime;
        (StepStatus outcome, _) = Attempt(h);
        denseReady = false;
        if (outcome == StepStatus.Accepted)
        {
            EndTime = endTime;
            return true;
        }

        EndTime = endTime;
        Undo(shorten: true);
        return false;
    }

    /// <summary>Undoes the last step: the position is its start again.</summary>
    /// <param name="shorten">Whether the next step is to be at most half as long.</param>
    public void Undo(bool shorten)
    {
        if (shorten) Proposed = (EndTime - StartTime) / 2;
        stepHeld = false;
        EndTime = StartTime;
        Start.CopyTo(End, 0);
    }

    /// <summary>Evaluates the continuation of the last step.</summary>
    /// <param name="time">A time inside the step.</param>
    /// <param name="y">Receives the leading components, as many as fit.</param>
    public void Evaluate(double time, Span<double> y)
    {
        EnsureDense();
        double theta = (time - StartTime) / (EndTime - StartTime);
        DenseStep.Evaluate(theta, Start, End, Continuation, Dimension, y);
    }

    /// <summary>Makes the coefficients of the continuation ready.</summary>
    public void EnsureDense()
    {
        if (denseReady) return;
        ComputeDense(EndTime - StartTime, continuation);
        denseReady = true;
    }

    /// <summary>Tries a step from <see cref="Start"/> with the rates <see cref="StartRates"/>; leaves the result in <see cref="End"/>.</summary>
    /// <returns>Accepted with the error norm, or what went wrong.</returns>
    protected abstract (StepStatus Outcome, double Error) Attempt(double h);

    /// <summary>Learns from an accepted step and proposes the size of the next.</summary>
    protected abstract double Accept(double h, double error, bool rejectedBefore);

    /// <summary>Learns from a rejected step and proposes a smaller one.</summary>
    protected abstract double Reject(double h, double error, StepStatus outcome);

    /// <summary>Computes the coefficients that continue the step held, vectors of <see cref="Dimension"/> one after the other.</summary>
    protected abstract void ComputeDense(double h, Span<double> coefficients);

    /// <summary>Brings the rates at the end of the step held to <see cref="StartRates"/>, if the method knows them.</summary>
    /// <returns>Whether it does.</returns>
    protected abstract bool CarryRates();

    /// <summary>Drops everything learnt about the field.</summary>
    protected abstract void Forget();

    private void MoveOn()
    {
        denseReady = false;
        if (stepHeld)
        {
            stepHeld = false;
            ratesKnown = CarryRates();
            StartTime = EndTime;
            (Start, End) = (End, Start);
            Norm.FollowTangents(Start);
        }

        if (endMoved) ratesKnown = false;
        if (fieldChanged) Forget();
        endMoved = fieldChanged = false;
    }

    private StepStatus Prepare(double limit)
    {
        double direction = limit < StartTime ? -1 : 1;
        Proposed = direction * Math.Min(Math.Abs(Proposed), MaximumStep);
        if (!ratesKnown)
        {
            Rates(StartTime, Start, StartRates);
            if (!AllFinite(StartRates)) return StepStatus.NotFinite;
            ratesKnown = true;
        }

        if (!estimateStep) return StepStatus.Accepted;
        double longest = Math.Min(Math.Abs(limit - StartTime), MaximumStep);
        double estimate = StartingStep.Estimate(this, StartTime, direction * longest, Start, StartRates, Scratch, Work, Norm, Order);
        if (Proposed == 0 || Math.Abs(estimate) < Math.Abs(Proposed)) Proposed = estimate;
        estimateStep = false;
        return StepStatus.Accepted;
    }

    private StepStatus TryUntilAccepted(double limit)
    {
        var failure = StepStatus.StepTooSmall;
        for (LastAttemptRejected = false; ; LastAttemptRejected = true)
        {
            if (Statistics.AcceptedSteps + Statistics.RejectedSteps >= MaximumAttempts) return StepStatus.TooManySteps;
            double remaining = limit - StartTime;
            bool landing = Math.Abs(Proposed) * Stretch >= Math.Abs(remaining);
            double h = LastTried = landing ? remaining : Proposed;
            if (StartTime + GiveUpPart * h == StartTime && !(landing && !LastAttemptRejected)) return failure;
            (StepStatus outcome, double error) = Attempt(h);
            denseReady = false;
            if (outcome == StepStatus.Accepted && error <= 1)
            {
                double next = Accept(h, error, LastAttemptRejected);
                // The shortened last step does not set the next one.
                if (landing && Math.Abs(next) < Math.Abs(Proposed)) next = Proposed;
                Proposed = Math.CopySign(Math.Min(Math.Abs(next), MaximumStep), h);
                EndTime = landing ? limit : StartTime + h;
                stepHeld = true;
                Statistics.AcceptedSteps++;
                return StepStatus.Accepted;
            }

            Statistics.RejectedSteps++;
            failure = outcome is StepStatus.Accepted or StepStatus.NewtonFailed ? StepStatus.StepTooSmall : outcome;
            Proposed = outcome == StepStatus.NotFinite ? h * NotFiniteFactor : Reject(h, error, outcome);
        }
    }

    private static bool AllFinite(double[] values)
    {
        foreach (double value in values)
        {
            if (!double.IsFinite(value)) return false;
        }

        return true;
    }
}
