namespace OdeDsl.Integration;

/// <summary>What an integration cost.</summary>
public sealed record IntegrationStatistics
{
    /// <summary>Steps accepted.</summary>
    public long AcceptedSteps { get; internal set; }

    /// <summary>Steps rejected by the error test, by Newton's method or for values that are not finite.</summary>
    public long RejectedSteps { get; internal set; }

    /// <summary>Evaluations of the rates.</summary>
    public long RateEvaluations { get; internal set; }

    /// <summary>Evaluations of the state Jacobian.</summary>
    public long JacobianEvaluations { get; internal set; }

    /// <summary>Factorisations of the implicit equations; the real and the complex matrix of one step count as one.</summary>
    public long Factorisations { get; internal set; }

    /// <summary>Iterations of Newton's method.</summary>
    public long NewtonIterations { get; internal set; }

    /// <summary>Crossings of switching functions.</summary>
    public long Crossings { get; internal set; }

    /// <summary>Changes between the explicit and the implicit method.</summary>
    public long MethodChanges { get; internal set; }
}
