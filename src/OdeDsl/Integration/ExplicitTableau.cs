namespace OdeDsl.Integration;

/// <summary>
/// The coefficients of an explicit Runge-Kutta pair with a continuous extension. Stages are numbered from 0, the rates at the start; the rates
/// at the end follow the last stage and are the first of the next step.
/// </summary>
internal sealed class ExplicitTableau
{
    /// <summary>The method.</summary>
    public required IntegrationMethod Method { get; init; }

    /// <summary>The order of the weights.</summary>
    public required int Order { get; init; }

    /// <summary>The places of the stages after the first.</summary>
    public required double[] C { get; init; }

    /// <summary>For each stage after the first, the weights of those before it.</summary>
    public required double[][] A { get; init; }

    /// <summary>The weights.</summary>
    public required double[] B { get; init; }

    /// <summary>The weights minus those of the embedded method, rates at the end included.</summary>
    public required double[] Error { get; init; }

    /// <summary>
    /// The same for a second embedded method of lower order, or <see langword="null"/>. The error is then e² / √(e² + 0.01 e₂²)
    /// (Hairer, Norsett and Wanner, Solving ODEs I, section II.10).
    /// </summary>
    public double[]? SecondError { get; init; }

    /// <summary>The places of the stages that only the continuation needs.</summary>
    public double[] ExtraC { get; init; } = [];

    /// <summary>For each of them, the weights of all stages before it, rates at the end included.</summary>
    public double[][] ExtraA { get; init; } = [];

    /// <summary>
    /// The weights of the continuation's coefficients from d₄ on (<see cref="DenseStep"/>), extra stages included. d₂ and d₃ make its
    /// slopes those at the start and the end.
    /// </summary>
    public required double[][] D { get; init; }

    /// <summary>The strength of the integral part of step control.</summary>
    public required double Integral { get; init; }

    /// <summary>The smallest and largest factor on a step.</summary>
    public required (double Smallest, double Largest) Factors { get; init; }

    /// <summary>How far the stability region reaches along the negative real axis, less a margin within which the step hovers.</summary>
    public required double StabilityEdge { get; init; }
}
