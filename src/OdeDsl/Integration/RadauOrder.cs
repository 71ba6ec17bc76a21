namespace OdeDsl.Integration;

/// <summary>
/// Which Radau IIA method to use: tight tolerances begin with many stages; later the convergence of Newton's iterations decides: where they
/// contract very well, more stages pay, where badly, fewer (E. Hairer, G. Wanner, Stiff differential equations solved by Radau
/// methods, Journal of Computational and Applied Mathematics 111, 1999, section 3).
/// </summary>
internal struct RadauOrder
{
    /// <summary>Contraction below which the number of stages grows.</summary>
    private const double Good = 0.002;

    /// <summary>Contraction above which it shrinks.</summary>
    private const double Bad = 0.8;

    /// <summary>Accepted steps between changes upwards.</summary>
    private const int Patience = 10;

    private readonly int first;
    private int stepsSinceChange;

    private RadauOrder(RadauCoefficients[] methods, int first)
    {
        Methods = methods;
        this.first = PresentIndex = first;
    }

    /// <summary>The methods to choose from, by stages.</summary>
    public RadauCoefficients[] Methods { get; }

    /// <summary>The position of the one in use.</summary>
    public int PresentIndex { get; private set; }

    /// <summary>The one in use.</summary>
    public readonly RadauCoefficients Present => Methods[PresentIndex];

    /// <summary>The one with the most stages.</summary>
    public readonly RadauCoefficients Largest => Methods[^1];

    /// <summary>One method for all times.</summary>
    public static RadauOrder Fixed(RadauCoefficients method) => new([method], 0);

    /// <summary>Three, five or seven stages.</summary>
    /// <param name="relativeTolerance">The tolerance, for the first choice.</param>
    public static RadauOrder Variable(double relativeTolerance) =>
        new([RadauCoefficients.Three, RadauCoefficients.Five, RadauCoefficients.Seven], relativeTolerance > 1e-5 ? 0 : relativeTolerance > 1e-9 ? 1 : 2);

    /// <summary>Learns from an accepted step.</summary>
    public void Accepted(int iterations, double contraction)
    {
        stepsSinceChange++;
        if (iterations > 1 && contraction >= Bad && PresentIndex > 0) ChangeBy(-1);
        else if (iterations > 1 && contraction <= Good && stepsSinceChange >= Patience && PresentIndex + 1 < Methods.Length) ChangeBy(1);
    }

    /// <summary>Learns that Newton's iterations failed.</summary>
    /// <returns>Whether the method changed.</returns>
    public bool NewtonFailed()
    {
        if (PresentIndex == 0) return false;
        ChangeBy(-1);
        return true;
    }

    /// <summary>Starts anew.</summary>
    public void Reset() => (PresentIndex, stepsSinceChange) = (first, 0);

    private void ChangeBy(int step)
    {
        PresentIndex += step;
        stepsSinceChange = 0;
    }
}
