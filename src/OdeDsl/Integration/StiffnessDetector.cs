namespace OdeDsl.Integration;

/// <summary>
/// Tells when an explicit method's step is held down by stability rather than accuracy: |h| times the size of the largest eigenvalue of the
/// Jacobian stays at the edge of the method's stability region, or near it while the rates themselves hardly change from step to
/// step (after E. Hairer, G. Wanner, Solving ODEs II, section IV.2, with the counts given there). The eigenvalue's size comes from
/// power iteration with Jacobian-vector products, continued from step to step: unlike a difference of stages it does not fade when a
/// tight tolerance keeps the fast components of the motion unexcited.
/// </summary>
/// <param name="dimension">The number of states.</param>
/// <param name="edge">Where the edge of the stability region begins: step control makes the step hover below it.</param>
internal struct StiffnessDetector(int dimension, double edge)
{
    /// <summary>
    /// Near the edge, where a tight tolerance already feels the fast components, a motion counts as stiff if its own rates change this many
    /// times more slowly than the fastest component would.
    /// </summary>
    private const double NearEdge = 1;
    private const double Slowness = 50;

    /// <summary>This many observations at the edge, without <see cref="CountToClear"/> others in a row, mean stiffness.</summary>
    private const int CountToStiff = 15;
    private const int CountToClear = 6;

    /// <summary>While nothing points to stiffness, only every so many steps are looked at.</summary>
    private const int Interval = 10;

    private readonly double[] direction = new double[dimension];
    private readonly double[] product = new double[dimension];
    private bool hasDirection;
    private int atEdge;
    private int clear;
    private int untilDue;

    /// <summary>Whether the motion is stiff.</summary>
    public readonly bool IsStiff => atEdge >= CountToStiff;

    /// <summary>Whether this step is to be observed.</summary>
    public bool IsDue()
    {
        if (--untilDue > 0) return false;
        untilDue = atEdge > 0 ? 1 : Interval;
        return true;
    }

    /// <summary>Observes an accepted step.</summary>
    /// <param name="field">The field.</param>
    /// <param name="h">The size of the step.</param>
    /// <param name="time">Its end time.</param>
    /// <param name="y">The state at its end.</param>
    /// <param name="ratesBefore">The rates at its start.</param>
    /// <param name="ratesAfter">The rates at its end.</param>
    /// <param name="norm">The tolerances, which make the components comparable.</param>
    public void Observe<TField>(TField field, double h, double time, double[] y, double[] ratesBefore, double[] ratesAfter, ErrorNorm norm)
        where TField : struct, IVectorField
    {
        int n = field.BlockSize;
        if (!hasDirection) ratesAfter.AsSpan(0, n).CopyTo(direction);
        double length = norm.Length(direction.AsSpan(0, n), y);
        field.DirectionalDerivative(time, y, direction, product);
        field.DirectionalDerivative(time, y, product, direction);
        double grown = norm.Length(direction.AsSpan(0, n), y);
        hasDirection = grown > 0 && double.IsFinite(grown);
        double growth = hasDirection && length > 0 ? Math.Sqrt(grown / length) : 0;
        for (int i = 0; i < n; i++) direction[i] /= grown;
        double reach = Math.Abs(h) * growth;
        if (reach > edge || (reach > NearEdge && reach > Slowness * Change(n, y, ratesBefore, ratesAfter, norm)))
        {
            clear = 0;
            atEdge++;
        }
        else if (++clear >= CountToClear)
        {
            atEdge = 0;
        }
    }

    // The change of the rates over the step, in parts of the rates.
    private readonly double Change(int n, double[] y, double[] ratesBefore, double[] ratesAfter, ErrorNorm norm)
    {
        for (int i = 0; i < n; i++) product[i] = ratesAfter[i] - ratesBefore[i];
        return norm.Length(product, y) / norm.Length(ratesAfter.AsSpan(0, n), y);
    }

    /// <summary>Starts counting anew.</summary>
    public void Reset()
    {
        hasDirection = false;
        atEdge = clear = untilDue = 0;
    }
}
