namespace OdeDsl.Ensembles;

/// <summary>A Lyapunov exponent as estimated from a run of finite length.</summary>
/// <param name="Value">The estimate, per unit of time.</param>
/// <param name="Uncertainty">
/// Half the width of a 95 % confidence interval of <paramref name="Value"/>, from the scatter of batch means (Student's t), or what the
/// integration's tolerance allows if that is more.
/// </param>
public readonly record struct LyapunovExponent(double Value, double Uncertainty)
{
    /// <summary>Whether the exponent is positive beyond its uncertainty.</summary>
    public bool IsPositive => Value > Uncertainty;
}
