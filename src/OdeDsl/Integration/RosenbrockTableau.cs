namespace OdeDsl.Integration;

/// <summary>
/// The coefficients of a stiffly accurate Rosenbrock method in the form that needs no products with the Jacobian (E. Hairer, G. Wanner, Solving
/// ODEs II, section IV.7, equation 7.25): (1/(γh) − J) uᵢ = f(t + cᵢ h, y + Σ aᵢⱼ uⱼ) + Σ Cᵢⱼ uⱼ / h + dᵢ h ∂f/∂t. The new state is
/// y + Σ bⱼ uⱼ, and the last stage is the estimate of its error.
/// </summary>
internal sealed class RosenbrockTableau
{
    /// <summary>The method.</summary>
    public required IntegrationMethod Method { get; init; }

    /// <summary>The order of the new state; the embedded one is one order lower.</summary>
    public required int Order { get; init; }

    /// <summary>γ.</summary>
    public required double Gamma { get; init; }

    /// <summary>The places of the stages within a step.</summary>
    public required double[] Places { get; init; }

    /// <summary>The factors on the derivative by time.</summary>
    public required double[] TimeFactors { get; init; }

    /// <summary>For each stage after the first, aᵢⱼ for those before it.</summary>
    public required double[][] A { get; init; }

    /// <summary>For each stage after the first, Cᵢⱼ for those before it.</summary>
    public required double[][] C { get; init; }

    /// <summary>The weights of the new state.</summary>
    public required double[] B { get; init; }

    /// <summary>The weights of the continuation's coefficients d₂, d₃, ... (<see cref="DenseStep"/>).</summary>
    public required double[][] D { get; init; }
}
